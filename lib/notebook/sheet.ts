// The weigh-out sheet for the bench: what a batch, its screening and its brief say, and the page it is printed from.
// The page and its style stand in the folder beside this file.

import { InputError } from "../door.js";
import { avoidedIn } from "../assess/assess.js";
import type { HazardScreening } from "../lab/hazards.js";
import type { MasterBatch, Portion, WeighOutSheet } from "../lab/batch.js";
import { isHonest } from "../lab/batch/balance.js";
import type { Brief } from "../recipe/brief.js";
import { densityOf } from "../recipe/formulation.js";
import { flagText, riseText } from "./safety.js";
import { costText, dissolvingText, lightNotes } from "./batch.js";
import { massText } from "./batchMass.js";
import { numberText } from "./digits.js";
import type { Origin } from "./page.js";
import type { SheetContent, SheetMasterBatch, SheetPortion } from "./sheet/content.js";
import { sheetHtml } from "./sheet/page.js";
import type { Paper } from "./sheet/style.js";

/** What a sheet is made of. */
export interface SheetInput {
  readonly sheet: WeighOutSheet;
  /** The screening of the same formulation. */
  readonly screening: HazardScreening;
  /** What it says to avoid stands as a warning on the sheet. */
  readonly brief: Pick<Brief, "title" | "avoid">;
  /** What the names of its files begin with: small letters, digits, hyphens; "weigh-out" unless given. */
  readonly name?: string;
}

/**
 * What the sheet of a batch says, as data.
 * @throws InputError when the screening is of another formulation.
 * @example
 * ```ts
 * import { screenHazards, weighOut } from "resinwright";
 * import { openBrief, readSafetyRules } from "resinwright/files";
 * import { sheetOf } from "resinwright/notebook";
 * const { brief, formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
 * const sheet = weighOut({ formulation, batch_g: 500, balance });
 * const screening = screenHazards({ formulation, rules: readSafetyRules("data/rules") });
 * sheetOf({ sheet, screening, brief }).portions[5].limits; // → "273.632 to 276.368"
 * ```
 */
export function sheetOf({ sheet, screening, brief, name = "weigh-out" }: SheetInput): SheetContent {
  const { formulation, batch_g } = sheet;
  if (screening.formulation !== formulation.id) {
    throw new InputError(
      `sheet of "${formulation.id}": the screening is of "${screening.formulation}"; screen the formulation that is weighed out`,
    );
  }
  if (!/^[a-z0-9-]+$/.test(name)) {
    throw new InputError(
      `sheet of "${formulation.id}": name is "${name}"; it becomes part of a file name: use small letters, digits and hyphens`,
    );
  }
  return {
    kind: "sheet",
    name,
    title: `Weigh out ${numberText(batch_g, 9)} g: ${formulation.title}`,
    label: `${formulation.id}, ${numberText(batch_g, 9)} g`,
    facts: factsOf(sheet, brief),
    warnings: [
      ...avoidedIn({ brief, formulation }).map(
        ({ ingredient, reason }) => `Do not mix this: the brief says to avoid ${ingredient} (${reason}).`,
      ),
      ...sheet.warnings.map(({ message }) => `${message}.`),
    ],
    protection: screening.protection.map(({ text }) => text),
    masterBatches: sheet.masterBatches.map((one) => masterBatchOf(one, sheet)),
    portions: sheet.portions.map((portion) => portionOf(portion, sheet)),
    hazards: screening.ingredients.map(({ ingredient, name, checked, statements }) => ({
      ingredient,
      name,
      cas: casOf(sheet, ingredient),
      statements: checked ? listOr(statements, "none known here") : "nobody has checked",
    })),
    findings: [
      `If all of it cures at once it ${riseText(screening)}.`,
      ...screening.flags.map((flag) => `${flag.statement} ${flag.title}: the mixture ${flagText(flag)}.`),
      ...screening.regulatory.map(
        ({ substance, region, fact, date }) => `${substance}, ${region} (${date}): ${fact}`,
      ),
    ],
    storage: screening.storage.map(({ text }) => text),
    law: screening.law.map(({ text }) => text),
    caution: screening.caution,
  };
}

/**
 * The weigh-out sheet as one self-contained HTML page, to be printed across (landscape) and written on.
 * @param input - As {@link sheetOf}; `paper`, A4 or Letter; `origin`, what the foot says of its making.
 * @throws InputError as {@link sheetOf}; when the paper is another one.
 * @source Paper: ISO 216 (A4, 210 mm by 297 mm); ANSI Y14.1 size A (8.5 in by 11 in); both from memory.
 * @example
 * ```ts
 * import { screenHazards, weighOut } from "resinwright";
 * import { openBrief, readSafetyRules } from "resinwright/files";
 * import { weighOutPage } from "resinwright/notebook";
 * const { brief, formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
 * const html = weighOutPage({
 *   sheet: weighOut({ formulation, batch_g: 500, balance }),
 *   screening: screenHazards({ formulation, rules: readSafetyRules("data/rules") }),
 *   brief,
 *   paper: "Letter",
 *   origin: { brief: "flow-cell.json", libraryVersion: "0.1.0", nodeVersion: "20.20.2", date: "2026-01-05" },
 * });
 * html.includes("size: letter landscape"); // → true
 * ```
 */
export function weighOutPage({
  paper,
  origin,
  ...input
}: SheetInput & { readonly paper: Paper; readonly origin: Origin }): string {
  return sheetHtml({ content: sheetOf(input), paper, origin });
}

function factsOf(sheet: WeighOutSheet, brief: SheetInput["brief"]): SheetContent["facts"] {
  const { formulation, balance, accuracy, minimumWeight_g } = sheet;
  const facts = [
    ["Formulation", formulation.id],
    ["Brief", brief.title],
    ["Size", sizeText(sheet)],
    [
      "Balance",
      `reads ${massText(balance.readability_g, balance)} g, up to ${numberText(balance.capacity_g, 9)} g; honest from ${massText(minimumWeight_g, balance)} g`,
    ],
    ["Limits", `keep every share within ${numberText(100 * accuracy)} % of itself`],
    ["Cost", costText(sheet)],
  ] as const;
  return facts.map(([name, text]) => ({ name, text }));
}

function sizeText({ formulation, batch_g }: WeighOutSheet): string {
  const size = `${numberText(batch_g, 9)} g`;
  if (formulation.components.some(({ ingredient }) => ingredient.density_gcm3 === undefined)) return size;
  const density_gcm3 = densityOf(formulation);
  return `${size}, about ${numberText(batch_g / density_gcm3, 3)} mL at ${numberText(density_gcm3, 3)} g/cm³ (additive volumes)`;
}

function masterBatchOf(master: MasterBatch, { balance, batch_g, portions }: WeighOutSheet): SheetMasterBatch {
  const { label, solute, carrier, stages, massFraction, relativeU, dose_g, enoughFor } = master;
  const line = portions.find((one) => one.label === `master batch of ${label}`)!.line;
  const last = stages.at(-1)!;
  const made_g = last.mass_g + last.carrier_g;
  return {
    title: `Master batch of ${label}, for step ${line}`,
    weighings: stages.flatMap(({ of, mass_g, carrier_g }, k) => [
      { what: stageText(stages, k, of), target: massText(mass_g, balance) },
      { what: stageText(stages, k, carrier.id), target: massText(carrier_g, balance) },
    ]),
    notes: [
      ...lightNotes(master).map((note) => `${note}.`),
      `The batch needs ${massText(massFraction * dose_g, balance)} g of ${solute.id}, too little to weigh by itself.`,
      `Weigh to the last digit: it is taken to hold ${numberText(100 * massFraction)} % ${solute.id}, to ${numberText(100 * relativeU, 2)} % of that (one standard uncertainty).`,
      `Makes ${massText(made_g, balance)} g, enough for ${enoughFor} of this batch.${made_g > batch_g ? " That is more than the batch itself: a balance with a smaller minimum weight needs less." : ""}`,
      `${sentence(dissolvingText(master))}.`,
    ],
  };
}

function stageText(stages: MasterBatch["stages"], k: number, what: string): string {
  return stages.length === 1 ? what : `for stage ${k + 1}: ${what}`;
}

function portionOf(portion: Portion, { balance, minimumWeight_g, portions }: WeighOutSheet): SheetPortion {
  const { line, label, contents, reason, amberLight, loads, lot } = portion;
  const { exact_g, target_g, low_g, high_g, drawnIn_g } = portion;
  const isMaster = contents.length > 1;
  const notes = [
    amberLight && !portions.some((one) => one.line < line && one.amberLight) && "Amber light from here on",
    isMaster && "Made before, as above",
    !isMaster &&
      drawnIn_g === 0 &&
      !isHonest(exact_g, minimumWeight_g) &&
      "Too little for this balance: see the warning",
    loads > 1 && `In ${loads} loads`,
  ];
  return {
    line,
    portion: label,
    identity: isMaster ? "" : (contents[0]!.ingredient.cas ?? ""),
    reason: sentence(reason),
    notes: notes.filter((note) => note !== false),
    target: massText(target_g, balance),
    limits: `${massText(low_g, balance)} to ${massText(high_g, balance)}`,
    total: massText(portion.runningTotal_g, balance),
    lot,
  };
}

function sentence(text: string): string {
  return text[0]!.toUpperCase() + text.slice(1);
}

function casOf({ formulation }: WeighOutSheet, id: string): string {
  return formulation.components.find(({ ingredient }) => ingredient.id === id)?.ingredient.cas ?? "–";
}

function listOr(statements: readonly { readonly code: string }[], otherwise: string): string {
  return statements.length === 0 ? otherwise : statements.map(({ code }) => code).join(", ");
}
