// The window film under the resin: a generic polymer and how fast oxygen passes through it.

import { z } from "zod";
import type { SourcedValue } from "../result.js";
import { readDocument, strict, type JsonDocument } from "./document.js";
import { idSchema, sourced } from "./sourced.js";

/** A window film by its generic polymer name. */
export interface Film {
  readonly id: string;
  readonly name: string;
  readonly cas?: string;
  readonly oxygenPermeability_barrer: SourcedValue;
  /** Of oxygen in the film itself; with the permeability it says how much oxygen the film holds. */
  readonly oxygenDiffusivity_m2s?: SourcedValue | undefined;
  readonly note?: string;
}

/**
 * Reads a film file.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readFilm } from "resinwright";
 * const oxygenPermeability_barrer = { value: 600, u: 100, source: "one permeation cell", status: "measured here" };
 * const file = { id: "PDMS", name: "poly(dimethylsiloxane)", oxygenPermeability_barrer };
 * readFilm(parseJson(JSON.stringify(file), "pdms.json")).oxygenPermeability_barrer.value; // → 600
 * ```
 */
export function readFilm(document: JsonDocument): Film {
  return readDocument(filmSchema, document);
}

const filmSchema: z.ZodType<Film> = strict({
  id: idSchema,
  name: z.string().min(2),
  cas: z.string().optional(),
  oxygenPermeability_barrer: sourced("oxygenPermeability_barrer", { above: 0 }),
  oxygenDiffusivity_m2s: sourced("oxygenDiffusivity_m2s", { above: 0 }).optional(),
  note: z.string().optional(),
});
