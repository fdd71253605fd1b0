// Saving a batch that was weighed wrong: nothing can be taken out, so everything else is added until the proportions are right.

import { checkNumber, InputError, notNegative, positive } from "../../door.js";
import { checkLines, type Weighing } from "./asMade.js";
import { isHonest, readable } from "./balance.js";
import type { Portion, WeighOutSheet } from "./weighOut.js";

/** What to add of one line. */
export interface RescueAddition {
  readonly line: number;
  readonly label: string;
  /** What is in the vessel of it. */
  readonly present_g: number;
  /** What to add, as the balance can show it; 0 where it is within the tolerance of the new total. */
  readonly add_g: number;
}

/** How a batch is saved, or that it need not or cannot be. */
export type Rescue =
  | { readonly outcome: "within"; readonly total_g: number }
  | {
      readonly outcome: "add";
      readonly total_g: number;
      /** New total over the batch as planned. */
      readonly growth: number;
      /** The line that asks for this size: the one there is too much of, or one whose addition could not be weighed at less. */
      readonly setBy: string;
      readonly additions: readonly RescueAddition[];
    }
  | {
      readonly outcome: "impossible";
      readonly reason: string;
      /** What the batch would have to grow to, where that is what stands in the way. */
      readonly neededTotal_g?: number;
    };

/**
 * The additions that bring a mis-weighed batch back to its recipe.
 *
 * The new size is g = max over the lines of m / target; each line is then short of g × target by what is to be added. Where
 * that is less than the balance weighs honestly, it is left out if the line is within its tolerance without it, and otherwise
 * the batch grows until it can be weighed.
 * @param input - `sheet`; `weighings` so far, lines not yet weighed left out; `wrong`, what was poured in beside the sheet;
 * `vessel_g`, the most the vessel holds.
 * @returns `within` when all lines are there and no mass fraction is off by more than the sheet's accuracy; `add` with what to add,
 * in the order of the sheet; `impossible` when something is in it that the recipe does not hold, or the vessel is too small.
 * @throws InputError when a line is unknown or given twice, a mass is out of range, or nothing is in the vessel.
 * @example
 * ```ts
 * import { rescue, weighOut } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.001, capacity_g: 2000 };
 * const sheet = weighOut({ formulation, batch_g: 1000, balance, weighingAccuracy: 0.1 });
 * const weighings = sheet.portions.map(({ line, target_g }) => ({ line, mass_g: line === 6 ? 605 : target_g }));
 * const plan = rescue({ sheet, weighings });
 * plan.outcome === "add" && plan.total_g; // → 1100
 * ```
 */
export function rescue({
  sheet,
  weighings,
  wrong = [],
  vessel_g = Number.MAX_VALUE,
}: {
  sheet: WeighOutSheet;
  weighings: readonly Weighing[];
  wrong?: readonly { readonly ingredient: string; readonly mass_g: number }[];
  vessel_g?: number;
}): Rescue {
  const where = `rescue of "${sheet.formulation.id}"`;
  checkLines(where, sheet.portions, weighings);
  checkNumber(vessel_g, { where, field: "vessel_g", ...positive });
  wrong.forEach(({ mass_g }, i) =>
    checkNumber(mass_g, { where, field: `wrong[${i}].mass_g`, ...notNegative }),
  );
  const foreign = wrong.find(
    ({ ingredient, mass_g }) => mass_g > 0 && ownLine(sheet, ingredient) === undefined,
  );
  if (foreign !== undefined) {
    const reason = `${foreign.ingredient} has no line of its own on the sheet, and nothing takes it out again; keep the batch apart under another name or discard it`;
    return { outcome: "impossible", reason };
  }
  const lines = sheet.portions.map((portion): Line => {
    const weighed = weighings.find(({ line }) => line === portion.line)?.mass_g ?? 0;
    const poured = wrong.filter(({ ingredient }) => ownLine(sheet, ingredient) === portion);
    return { portion, present_g: poured.reduce((sum, { mass_g }) => sum + mass_g, weighed) };
  });
  const inVessel_g = lines.reduce((sum, { present_g }) => sum + present_g, 0);
  if (inVessel_g === 0)
    throw new InputError(`${where}: nothing is in the vessel; weigh out the sheet instead`);
  if (isWithin(sheet, lines)) return { outcome: "within", total_g: inVessel_g };
  return plan(sheet, lines, vessel_g);
}

interface Line {
  readonly portion: Portion;
  readonly present_g: number;
}

/** The line that is this ingredient alone; of several lots the first. */
function ownLine({ portions }: WeighOutSheet, id: string): Portion | undefined {
  return portions.find(({ contents }) => contents.length === 1 && contents[0]!.ingredient.id === id);
}

/** Whether one size of batch has every line within its tolerance. */
function isWithin({ tolerance: t }: WeighOutSheet, lines: readonly Line[]): boolean {
  const sizes = lines.map(({ portion, present_g }) => present_g / portion.exact_g);
  return Math.max(...sizes) / (1 + t) <= Math.min(...sizes) / (1 - t);
}

function plan(sheet: WeighOutSheet, lines: readonly Line[], vessel_g: number): Rescue {
  const { growth, setBy } = sizeOf(sheet, lines);
  const additions = lines.map(({ portion, present_g }): RescueAddition => {
    const short_g = growth * portion.exact_g - present_g;
    const add_g = isHonest(short_g, smallest(sheet, portion)) ? readable(short_g, sheet.balance) : 0;
    return { line: portion.line, label: portion.label, present_g, add_g };
  });
  const total_g = additions.reduce((sum, { present_g, add_g }) => sum + present_g + add_g, 0);
  if (total_g <= vessel_g)
    return { outcome: "add", total_g, growth: total_g / sheet.batch_g, setBy, additions };
  const reason = `the batch would have to grow to ${Number(total_g.toPrecision(6))} g, and the vessel holds ${vessel_g} g; take a larger vessel, or discard part of what is in it after stirring and plan again with what is left`;
  return { outcome: "impossible", reason, neededTotal_g: total_g };
}

/**
 * The smallest size, as a multiple of the sheet's, that needs no addition too small to weigh: each line forbids the sizes at
 * which it lacks less than that and is outside its tolerance.
 */
function sizeOf(sheet: WeighOutSheet, lines: readonly Line[]): { growth: number; setBy: string } {
  const sizes = lines.map(({ portion, present_g }) => present_g / portion.exact_g);
  let growth = Math.max(1, ...sizes);
  let setBy = growth > 1 ? lines[sizes.indexOf(growth)]!.portion.label : "the sheet";
  for (;;) {
    const stuck = lines.find(({ portion, present_g }) => {
      const wanted_g = growth * portion.exact_g;
      const outside = present_g < wanted_g * (1 - sheet.tolerance);
      return outside && !isHonest(wanted_g - present_g, smallest(sheet, portion));
    });
    if (stuck === undefined) return { growth, setBy };
    growth = (stuck.present_g + smallest(sheet, stuck.portion)) / stuck.portion.exact_g;
    setBy = stuck.portion.label;
  }
}

/** The least that is weighed of a line: the minimum weight, or the portion itself where the sheet had to go below that. */
function smallest({ minimumWeight_g }: WeighOutSheet, { exact_g }: Portion): number {
  return Math.min(minimumWeight_g, exact_g);
}
