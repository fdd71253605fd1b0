// Viscometer readings on blends of two liquids: what turns a guessed interaction into a measured one.

import { z } from "zod";
import { InputError } from "../door.js";
import type { SourceStatus } from "../result.js";
import { quantity, readDocument, strict, type JsonDocument } from "./document.js";
import { idSchema, sourceText, statusSchema } from "./sourced.js";

/** Viscosities of blends of two liquids at one temperature, both neat liquids among them. */
export interface BlendReadings {
  readonly id: string;
  readonly kind?: "blend viscosities";
  /** The two liquids; mass fractions are of the first. */
  readonly pair: readonly [string, string];
  readonly temperature_C: number;
  /** Standard uncertainty of a reading as a fraction of it. */
  readonly relativeU: number;
  readonly massFractions: readonly number[];
  readonly viscosities_mPas: readonly number[];
  readonly source: string;
  readonly status: SourceStatus;
}

/**
 * Reads a file of blend readings.
 * @throws InputError with file, line and field; when the lists differ in length or a neat liquid is missing.
 * @example
 * ```ts
 * import { parseJson, readBlendReadings } from "resinwright";
 * const file = {
 *   id: "udma-iboa", pair: ["UDMA", "IBOA"], temperature_C: 25, relativeU: 0.03,
 *   source: "cone and plate", status: "measured here",
 *   massFractions: [1, 0.7, 0.4, 0], viscosities_mPas: ["9.6 Pa s", 970, 114, 8.5],
 * };
 * readBlendReadings(parseJson(JSON.stringify(file), "udma-iboa.json")).viscosities_mPas; // → [9600, 970, 114, 8.5]
 * ```
 */
export function readBlendReadings(document: JsonDocument): BlendReadings {
  const readings = readDocument(readingsSchema, document);
  const { massFractions, viscosities_mPas } = readings;
  if (massFractions.length !== viscosities_mPas.length) {
    throw new InputError(
      `${document.where}: massFractions has ${massFractions.length} entries and viscosities_mPas has ${viscosities_mPas.length}; each blend needs one reading`,
    );
  }
  for (const [end, liquid] of [
    [1, readings.pair[0]],
    [0, readings.pair[1]],
  ] as const) {
    if (!massFractions.includes(end)) {
      throw new InputError(`${document.where}: no reading of neat ${liquid} (mass fraction ${end}); add it`);
    }
  }
  return readings;
}

const readingsSchema: z.ZodType<BlendReadings> = strict({
  id: idSchema,
  kind: z.literal("blend viscosities").optional(),
  pair: z.tuple([idSchema, idSchema]),
  temperature_C: quantity("temperature_C", { above: -100, max: 200 }),
  relativeU: z.number().min(0).max(1),
  massFractions: z.array(z.number().min(0).max(1)).min(4),
  viscosities_mPas: z.array(quantity("viscosity_mPas", { above: 0 })).min(4),
  source: sourceText,
  status: statusSchema,
});
