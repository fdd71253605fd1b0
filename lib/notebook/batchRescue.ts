// How putting a batch right is shown: what to add, how large that makes it, and the smaller way where a small addition sets the size.

import type { Balance, Portion, Rescue, SmallerRescue, WeighOutSheet } from "../lab/batch.js";
import { isHonest } from "../lab/batch/balance.js";
import { massText } from "./batchMass.js";
import type { TableContent } from "./content.js";
import { numberText } from "./digits.js";
import { tableOf } from "./table.js";

/**
 * What to add to a mis-weighed batch, one portion a row; undefined where nothing is to be added.
 * @example
 * ```ts
 * import { openBatch, openBrief } from "resinwright/files";
 * import { rescueTable } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const batch = openBatch({ ...work, draws: 200 })!;
 * rescueTable(batch)?.rows[1]; // → ["master batch of MEHQ in IBOA", "2.503", "0.306"]
 * ```
 */
export function rescueTable({
  sheet,
  plan,
}: {
  sheet: WeighOutSheet;
  plan: Rescue;
}): TableContent | undefined {
  if (plan.outcome !== "add") return undefined;
  const { balance, minimumWeight_g, portions } = sheet;
  const { additions } = plan;
  const amber = additions.some(({ present_g }, i) => present_g > 0 && holdsInitiator(portions[i]!));
  const small = additions
    .filter(({ add_g }) => add_g > 0 && !isHonest(add_g, minimumWeight_g))
    .map((one) => `${one.label} ${numberText((200 * one.u_g) / (one.present_g + one.add_g), 2)} %`);
  return tableOf({
    caption: [
      `What to add, in the order of the sheet${amber ? ", under amber light, as an initiator is in the vessel" : ""}. The balance carries ${numberText(balance.capacity_g, 9)} g, vessel included: where the batch and its vessel are more, each in a vessel of its own`,
      ...(small.length === 0
        ? []
        : [
            `Less than ${massText(minimumWeight_g, balance)} g of one portion is weighed where what is in and what is added are together known well enough; two standard uncertainties are, of the whole portion: ${small.join(", ")}`,
          ]),
    ].join(". "),
    rows: additions.map(({ label, present_g, add_g }) => ({
      portion: label,
      present_g: massText(present_g, balance),
      add_g: add_g === 0 ? "nothing" : `${massText(add_g, balance)}${loadsText(add_g, balance)}`,
    })),
    columns: [
      { key: "portion" },
      { key: "present_g", name: "in the vessel", align: "right" },
      { key: "add_g", name: "add", align: "right" },
    ],
  });
}

/**
 * A rescue in a sentence.
 * @example
 * ```ts
 * import { weighOut } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { rescueText } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
 * const sheet = weighOut({ formulation, batch_g: 500, balance });
 * rescueText({ sheet, plan: { outcome: "within", total_g: 500 } }); // → "Every share is within the accuracy that was asked for: nothing is to be added."
 * ```
 */
export function rescueText({ sheet, plan }: { sheet: WeighOutSheet; plan: Rescue }): string {
  if (plan.outcome === "within")
    return "Every share is within the accuracy that was asked for: nothing is to be added.";
  if (plan.outcome === "impossible") return `It cannot be put right: ${plan.reason}.`;
  const { total_g, growth, setBy, smaller } = plan;
  const { balance } = sheet;
  const grams = (mass_g: number) => `${massText(mass_g, balance)} g`;
  const grown = `To be brought back to its recipe the batch has to grow to ${grams(total_g)}, ${numberText(growth, 3)} times what was planned; ${setBy} asks for that much.`;
  const brought = `It is brought back to its recipe by adding what is missing, up to the planned ${grams(total_g)}.`;
  return [
    growth <= 1 ? brought : grown,
    ...(smaller === undefined ? [] : [smallerText(smaller, grams)]),
    ...(total_g <= balance.capacity_g
      ? []
      : [
          `That is more than the ${numberText(balance.capacity_g, 9)} g the balance carries: weigh each addition in a vessel of its own.`,
        ]),
  ].join(" ");
}

/** The smaller way where an addition too small for the balance sets the size of a batch. */
function smallerText({ total_g, short }: SmallerRescue, grams: (mass_g: number) => string): string {
  const lacking = short.map(
    ({ label, relativeChange }) => `${label} ${numberText(-100 * relativeChange, 2)} % of itself`,
  );
  return `What sets this size is an addition too small for the balance. Without such additions the batch is ${grams(total_g)} and lacks ${lacking.join(", ")}: see whether the targets bear that, or add what lacks from a thinner master batch or on a finer balance.`;
}

/** In how many loads a mass is weighed, where it takes several. */
function loadsText(mass_g: number, { capacity_g }: Balance): string {
  const loads = Math.ceil(mass_g / capacity_g);
  return loads > 1 ? ` in ${loads} loads` : "";
}

function holdsInitiator({ contents }: Portion): boolean {
  return contents.some(({ ingredient }) => ingredient.role === "photoinitiator");
}
