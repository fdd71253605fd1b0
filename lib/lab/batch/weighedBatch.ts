// A batch that came back from the bench: what the balance showed and which lots went in, as a file states them.

import { z } from "zod";
import { InputError, unknownName } from "../../door.js";
import { quantity, readDocument, strict, type JsonDocument } from "../../recipe/document.js";
import { idSchema, sourceText, statusSchema } from "../../recipe/sourced.js";
import type { SourceStatus } from "../../result.js";
import type { Weighing } from "./asMade.js";
import type { Balance } from "./balance.js";
import type { WeighOutSheet } from "./weighOut.js";

/** A weighed batch: which sheet it was weighed by, and each portion as the balance showed it. */
export interface WeighedBatch {
  /** The name on the bottle. */
  readonly id: string;
  readonly formulation: string;
  /** The size on the sheet, above 0. */
  readonly batch_g: number;
  readonly balance: Balance;
  /** As asked of the sheet; its usual one where absent. */
  readonly accuracy?: number;
  readonly weighingAccuracy?: number;
  readonly weighings: readonly {
    /** As the sheet calls it. */
    readonly portion: string;
    /** As the bottle says. */
    readonly lot?: string;
    readonly mass_g: number;
    /** The balance did show a mass that is far from the one on the sheet. */
    readonly asShown?: true;
  }[];
  readonly source: string;
  readonly status: SourceStatus;
}

/**
 * Reads the file of a weighed batch.
 * @throws InputError with file, line and field; when a portion is weighed twice.
 * @example
 * ```ts
 * import { parseJson, readWeighedBatch } from "resinwright";
 * const file = {
 *   id: "A-3", formulation: "flow-cell-a", batch_g: "0.5 kg",
 *   balance: { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 },
 *   weighings: [{ portion: "IBOA", lot: "I-22", mass_g: 141.203 }],
 *   source: "bench sheet of 2026-02-03", status: "measured here",
 * };
 * readWeighedBatch(parseJson(JSON.stringify(file), "a-3.json")).batch_g; // → 500
 * ```
 */
export function readWeighedBatch(document: JsonDocument): WeighedBatch {
  const weighed = readDocument(weighedSchema, document);
  const names = weighed.weighings.map(({ portion }) => portion);
  const twice = names.find((name, i) => names.indexOf(name) !== i);
  if (twice === undefined) return weighed;
  throw new InputError(
    `${document.where}: portion "${twice}" is weighed twice; add the two masses up and keep one`,
  );
}

/**
 * The weighings of a batch as the lines of its sheet, as {@link asMade} and {@link rescue} take them.
 * @param input - `sheet`, the one it was weighed by, and `weighed`.
 * @throws InputError when the sheet is of another formulation or size, or has no portion of that name, with the nearest one; when
 * a mass is more than ten times what the sheet says, or less than a tenth of it, and is not said to be `asShown`.
 * @example
 * ```ts
 * import { weighingsOn } from "resinwright";
 * import { openBatch, openBrief } from "resinwright/files";
 * const batch = openBatch({ ...openBrief("data/briefs/flow-cell.json"), draws: 200 })!;
 * weighingsOn(batch)[0]; // → { line: 1, mass_g: 147.771, lot: "IBOA-0311" }
 * ```
 */
export function weighingsOn({ sheet, weighed }: { sheet: WeighOutSheet; weighed: WeighedBatch }): Weighing[] {
  const { formulation, batch_g, portions } = sheet;
  const where = `batch "${weighed.id}"`;
  if (weighed.formulation !== formulation.id || weighed.batch_g !== batch_g) {
    throw new InputError(
      `${where}: weighed as ${weighed.batch_g} g of "${weighed.formulation}", and the sheet is ${batch_g} g of "${formulation.id}"; make the sheet it was weighed by`,
    );
  }
  return weighed.weighings.map(({ portion, lot, mass_g, asShown }, i) => {
    const planned = portions.find(({ label }) => label === portion);
    if (planned !== undefined) {
      if (!asShown) refuseSlip(`${where}: weighings[${i}].mass_g of ${portion}`, mass_g, planned.target_g);
      return { line: planned.line, mass_g, ...(lot === undefined ? {} : { lot }) };
    }
    const labels = portions.map(({ label }) => label);
    throw new InputError(
      `${unknownName(where, "portion", portion, labels)} (a changed formulation, balance or solubility makes another sheet)`,
    );
  });
}

/** Beyond this factor a mass is likelier mistyped than mis-weighed; a portion left out is 0. */
const SLIP = 10;

function refuseSlip(place: string, mass_g: number, target_g: number): void {
  if (mass_g === 0 || (mass_g <= SLIP * target_g && mass_g >= target_g / SLIP)) return;
  throw new InputError(
    `${place} is ${mass_g}, and the sheet says ${target_g} g; check the unit (g), or say "asShown": true beside it if the balance did show that`,
  );
}

const weighedSchema: z.ZodType<WeighedBatch> = strict({
  id: idSchema,
  formulation: idSchema,
  batch_g: quantity("batch_g", { above: 0 }),
  balance: strict({
    readability_g: quantity("readability_g", { above: 0 }),
    repeatability_g: quantity("repeatability_g", { min: 0 }),
    capacity_g: quantity("capacity_g", { above: 0 }),
  }),
  accuracy: z.number().positive().max(0.5).optional(),
  weighingAccuracy: z.number().positive().max(1).optional(),
  weighings: z
    .array(
      strict({
        portion: z.string().min(1),
        lot: z.string().min(1).optional(),
        mass_g: quantity("mass_g", { min: 0 }),
        asShown: z.literal(true).optional(),
      }),
    )
    .min(1),
  source: sourceText,
  status: statusSchema,
});
