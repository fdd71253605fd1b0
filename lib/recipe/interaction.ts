// How two liquids of a blend pull its viscosity off the log-ideal line: a Grunberg–Nissan G with the basis it was fitted on.

import { z } from "zod";
import type { SourcedValue, Warning } from "../result.js";
import { readDocument, strict, type JsonDocument } from "./document.js";
import { idSchema, sourced } from "./sourced.js";

/** A measured interaction of two liquids. A G is meaningless without its basis. */
export interface Interaction {
  readonly pair: readonly [string, string];
  readonly basis: "mole" | "mass" | "volume";
  readonly G: SourcedValue;
  readonly temperature_C?: number;
  /** What to know of the readings it was fitted to. */
  readonly warnings?: readonly Warning[];
}

/**
 * Reads an interaction file.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readInteraction } from "resinwright";
 * const G = { value: -0.9, u: 0.05, source: "fit to seven blends", status: "measured here" };
 * const file = { pair: ["UDMA", "IBOA"], basis: "mass", G, temperature_C: 25 };
 * readInteraction(parseJson(JSON.stringify(file), "udma-iboa.json")).G.value; // → -0.9
 * ```
 */
export function readInteraction(document: JsonDocument): Interaction {
  return readDocument(interactionSchema, document);
}

const interactionSchema: z.ZodType<Interaction> = strict({
  pair: z.tuple([idSchema, idSchema]),
  basis: z.enum(["mole", "mass", "volume"]),
  G: sourced("G"),
  temperature_C: z.number().optional(),
});
