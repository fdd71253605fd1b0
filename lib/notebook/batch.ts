// How a batch is shown: what to weigh, what was weighed, what that changed, and what puts it right.

import type { AsMade, MasterBatch, PropertyChange, WeighOutSheet } from "../lab/batch.js";
import { hasToDissolve, solubilityOf } from "../lab/batch/dissolving.js";
import type { ReturnedBatch } from "../lab/batch/files.js";
import type { Brief } from "../recipe/brief.js";
import { massText } from "./batchMass.js";
import { rescueText } from "./batchRescue.js";
import type { TableContent } from "./content.js";
import { numberText } from "./digits.js";
import { targetText } from "./phrases.js";
import { tableOf } from "./table.js";
import { valueText } from "./verdicts.js";

/**
 * The portions of a batch in the order to add them, with target, limits and cost.
 * @example
 * ```ts
 * import { weighOut } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { weighOutTable } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
 * const table = weighOutTable(weighOut({ formulation, batch_g: 500, balance }));
 * table.rows[0].slice(0, 5); // → [1, "IBOA", "147.750", "147.015 to 148.485", "147.750"]
 * ```
 */
export function weighOutTable(sheet: WeighOutSheet): TableContent {
  const { formulation, batch_g, balance, accuracy, portions } = sheet;
  const currency = sheet.cost?.currency;
  return tableOf({
    caption: `What to weigh for ${numberText(batch_g, 9)} g of ${formulation.title}, in this order. Within these limits no ingredient's share is off by more than ${numberText(100 * accuracy)} % of itself. Cost: ${costText(sheet)}`,
    rows: portions.map(({ line, label, target_g, low_g, high_g, runningTotal_g, cost, reason }) => ({
      step: line,
      portion: label,
      target_g: massText(target_g, balance),
      limits: `${massText(low_g, balance)} to ${massText(high_g, balance)}`,
      runningTotal_g: massText(runningTotal_g, balance),
      ...(currency === undefined ? {} : { cost: cost === null ? null : cost.toFixed(2) }),
      reason,
    })),
    columns: [
      { key: "step", align: "right" },
      { key: "portion" },
      { key: "target_g", align: "right" },
      { key: "limits", unit: "g", align: "right" },
      { key: "runningTotal_g", name: "in the vessel", align: "right" },
      ...(currency === undefined ? [] : [{ key: "cost", unit: currency, align: "right" as const }]),
      { key: "reason", name: "why now, and how" },
    ],
  });
}

/**
 * The master batches of a sheet, one weighing a row; undefined where none is needed.
 * @example
 * ```ts
 * import { weighOut } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { masterBatchTable } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
 * const table = masterBatchTable(weighOut({ formulation, batch_g: 500, balance }));
 * table?.rows[0].slice(0, 5); // → ["MEHQ in IBOA", "0.250", "1.600 of MEHQ", "14.400 of IBOA", "10"]
 * ```
 */
export function masterBatchTable({
  masterBatches,
  minimumWeight_g,
  balance,
}: WeighOutSheet): TableContent | undefined {
  if (masterBatches.length === 0) return undefined;
  return tableOf({
    caption: `Master batches to make first: these portions are below the ${massText(minimumWeight_g, balance)} g that the balance weighs honestly. ${masterBatches.map((one) => `${one.label}: ${dissolvingText(one)}`).join(". ")}`,
    rows: masterBatches.flatMap((master) => {
      const { label, carrier, stages, massFraction, dose_g, enoughFor } = master;
      return stages.map(({ of, mass_g, carrier_g }) => ({
        "master batch": [label, ...lightNotes(master)].join(". "),
        needed_g: massText(massFraction * dose_g, balance),
        weigh_g: `${massText(mass_g, balance)} of ${of}`,
        with_g: `${massText(carrier_g, balance)} of ${carrier.id}`,
        holds_pct: numberText(100 * massFraction),
        dose_g: massText(dose_g, balance),
        enoughFor,
      }));
    }),
    columns: [
      { key: "master batch", name: "master batch" },
      { key: "needed_g", name: "too little", align: "right" },
      { key: "weigh_g", name: "weigh" },
      { key: "with_g", name: "with" },
      { key: "holds_pct", name: "holds in the end", align: "right" },
      { key: "dose_g", name: "dose", align: "right" },
      { key: "enoughFor", name: "enough for batches" },
    ],
  });
}

/**
 * What was weighed against the sheet, one portion a row.
 * @example
 * ```ts
 * import { openBatch, openBrief } from "resinwright/files";
 * import { weighedTable } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const batch = openBatch({ ...work, draws: 200 })!;
 * weighedTable(batch).rows[2]; // → ["TEGDMA", "TEGDMA-0119", "67.662 to 68.338", "76.415", "8.415 too much"]
 * ```
 */
export function weighedTable({ sheet, made }: { sheet: WeighOutSheet; made: AsMade }): TableContent {
  const { portions, balance } = sheet;
  return tableOf({
    caption: `What the balance showed: ${massText(made.total_g, balance)} g of ${numberText(sheet.batch_g, 9)} g`,
    rows: portions.map(({ label, target_g, low_g, high_g }, i) => {
      const { lot, actual_g } = made.lines[i]!;
      const off = `${massText(Math.abs(actual_g - target_g), balance)} too ${actual_g > target_g ? "much" : "little"}`;
      return {
        portion: label,
        lot: lot === "" ? null : lot,
        limits: `${massText(low_g, balance)} to ${massText(high_g, balance)}`,
        actual_g: massText(actual_g, balance),
        note: actual_g < low_g || actual_g > high_g ? off : "within",
      };
    }),
    columns: [
      { key: "portion" },
      { key: "lot", align: "left" },
      { key: "limits", unit: "g", align: "right" },
      { key: "actual_g", name: "weighed", align: "right" },
      { key: "note", name: "against the target" },
    ],
  });
}

/**
 * The formulation as it was made: each share with its 95 % interval from the weighings (normal, 1.96 u).
 * @example
 * ```ts
 * import { asMade, weighOut } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { madeTable } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
 * const sheet = weighOut({ formulation, batch_g: 500, balance });
 * const weighings = sheet.portions.map(({ line, target_g }) => ({ line, mass_g: target_g }));
 * madeTable(asMade({ sheet, weighings })).rows[0]; // → ["UDMA", "55", "55.00000 (54.99954 to 55.00046)", "0", "within"]
 * ```
 */
export function madeTable({ formulation, parts }: AsMade): TableContent {
  return tableOf({
    caption: `${formulation.title}: shares with their 95 % interval from the weighings (law of propagation, JCGM 100:2008); the master batches are taken to be made as the sheet says`,
    rows: parts.map(({ ingredient, plannedMassFraction, massFraction, u, relativeChange, within }) => ({
      ingredient,
      planned_pct: numberText(100 * plannedMassFraction),
      made_pct: {
        value: 100 * massFraction,
        low: 100 * (massFraction - 1.96 * u),
        high: 100 * (massFraction + 1.96 * u),
      },
      change_pct: numberText(100 * relativeChange, 2),
      note: within ? "within" : "too far off",
    })),
    columns: [
      { key: "ingredient" },
      { key: "planned_pct", name: "planned", unit: "mass %", align: "right" },
      { key: "made_pct", name: "as made", unit: "mass %", align: "right" },
      { key: "change_pct", name: "off by", unit: "% of itself", align: "right" },
      { key: "note", name: "against what was asked" },
    ],
  });
}

/**
 * What a batch as made changes in every assessed property: planned, as made, by how much, and whether it is still in its target.
 * @example
 * ```ts
 * import { openBatch, openBrief } from "resinwright/files";
 * import { batchChangeTable } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const batch = openBatch({ ...work, draws: 200 })!;
 * batchChangeTable({ ...batch, brief: work.brief }).rows.length; // → 8
 * ```
 */
export function batchChangeTable({
  made,
  brief,
}: {
  made: Pick<AsMade, "changes">;
  brief: Pick<Brief, "targets">;
}): TableContent {
  const { changes } = made;
  const level = changes.flatMap(({ after }) => (after.outcome === "value" ? after.level : []))[0] ?? 0.95;
  return tableOf({
    caption: `Every property as planned and as made, with ${numberText(100 * level)} % intervals from the same draws; the doubt of the weighings is not in them`,
    rows: changes.map((change) => ({
      property: change.title,
      unit: change.unit,
      planned: valueText(change.before),
      made: valueText(change.after),
      change: change.relativeChange === null ? null : numberText(100 * change.relativeChange, 2),
      target: targetOf(brief, change),
      verdict: inTarget(change),
    })),
    columns: [
      { key: "property" },
      { key: "unit" },
      { key: "planned", align: "right" },
      { key: "made", name: "as made", align: "right" },
      { key: "change", unit: "%", align: "right" },
      { key: "target", align: "left" },
      { key: "verdict", name: "in its target", align: "left" },
    ],
  });
}

/**
 * What to do with a batch that came back, with the figures behind it: use it as it was made where every share is as it was asked
 * for and no target is worse met than planned; else put it right, or keep it apart where that cannot be done.
 * @example
 * ```ts
 * import { openBatch, openBrief } from "resinwright/files";
 * import { batchDecision } from "resinwright/notebook";
 * const batch = openBatch({ ...openBrief("data/briefs/flow-cell.json"), draws: 200 })!;
 * batchDecision(batch).figures.made_g; // → 508.06
 * ```
 */
export function batchDecision({ weighed, sheet, made, plan }: ReturnedBatch): {
  statement: string;
  figures: Readonly<Record<string, number | string>>;
} {
  const outside = made.parts.filter(({ within }) => !within);
  const worse = made.changes.filter(isWorse).map(({ title }) => title);
  const [farthest] = outside.sort((a, b) => Math.abs(b.relativeChange) - Math.abs(a.relativeChange));
  const shares =
    farthest === undefined
      ? `every share is within ${numberText(100 * sheet.accuracy)} % of itself`
      : `the share of ${farthest.ingredient} is off by ${numberText(100 * farthest.relativeChange, 2)} % of itself`;
  const targets =
    worse.length === 0 ? "no target is worse met than planned" : `worse than planned: ${worse.join(", ")}`;
  const act =
    outside.length === 0 && worse.length === 0
      ? `Use batch ${weighed.id} as it was made`
      : plan.outcome === "add"
        ? `Put batch ${weighed.id} right before it is used`
        : `Keep batch ${weighed.id} apart`;
  const right = plan.outcome === "within" ? "" : ` ${rescueText({ sheet, plan })}`;
  return {
    statement: `${act}: ${shares}; ${targets}.${right}`,
    figures: {
      batch: weighed.id,
      planned_g: sheet.batch_g,
      made_g: made.total_g,
      ...Object.fromEntries(
        made.parts.map(({ ingredient, massFraction }) => [`${ingredient}_pct`, 100 * massFraction]),
      ),
      putRight: plan.outcome,
    },
  };
}

/** What light means for a master batch; nothing where it holds no initiator. */
export function lightNotes({ solute }: MasterBatch): string[] {
  return solute.role === "photoinitiator" ? ["Under amber light, in a covered vessel"] : [];
}

/** Whether the ingredient of a master batch dissolves in it, in its strongest stage. */
export function dissolvingText({ solute, stages }: MasterBatch): string {
  const { mass_g, carrier_g } = stages[0]!;
  const solubility = solubilityOf(solute);
  if (!hasToDissolve(solute)) return "stir until no streak is left";
  if (solubility === undefined)
    return "whether it dissolves is not known here, try a little first; stir until clear";
  const share_pct = (100 * mass_g) / (mass_g + carrier_g);
  return `it holds ${numberText(share_pct, 2)} %, and the shelf says that ${solubility.text} dissolves; stir until clear`;
}

/** What a batch costs, and what that leaves out. */
export function costText({ cost, portions }: WeighOutSheet): string {
  if (cost === null || portions.every((portion) => portion.cost === null)) return "no prices given";
  const { total, currency, unpriced } = cost;
  const without = unpriced.length === 0 ? "" : `, without ${unpriced.join(", ")} (no price given)`;
  return `${currency} ${total.toFixed(2)}${without}`;
}

function targetOf({ targets }: Pick<Brief, "targets">, { property }: PropertyChange): string | null {
  const target = targets[property];
  return target === undefined ? null : targetText(target);
}

function inTarget({ verdictBefore, verdictAfter }: PropertyChange): string | null {
  if (verdictAfter === null) return null;
  return verdictBefore === verdictAfter
    ? `${verdictAfter}, as planned`
    : `${verdictBefore} → ${verdictAfter}`;
}

/** Whether a property does worse against its target than was planned. */
function isWorse({ verdictBefore, verdictAfter }: PropertyChange): boolean {
  const rank = ["fails", "cannot tell", "meets"];
  return (
    verdictBefore !== null &&
    verdictAfter !== null &&
    rank.indexOf(verdictAfter) < rank.indexOf(verdictBefore)
  );
}
