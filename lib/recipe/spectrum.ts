// A spectrum on stated nodes: what an ingredient absorbs, or what a light engine sends out.

import { z } from "zod";
import { InputError } from "../door.js";
import type { SourceStatus } from "../result.js";
import { quantity, readDocument, strict, type JsonDocument } from "./document.js";
import { idSchema, sourceText, statusSchema } from "./sourced.js";

/** A tabulated spectrum; between its nodes it is a straight line, beyond them it is not known. */
export interface Spectrum {
  readonly id: string;
  /** `molarAbsorption_Lmolcm`: decadic molar absorption coefficient. `relativePower`: power per nm, any scale. */
  readonly quantity: "molarAbsorption_Lmolcm" | "relativePower";
  readonly title: string;
  /** Solvent or resin the absorption was measured in; the detector for an emission. */
  readonly medium: string;
  /** Standard uncertainty of the scale as a fraction of the values: it moves all of them together. */
  readonly relativeU: number;
  readonly source: string;
  readonly status: SourceStatus;
  readonly wavelengths_nm: readonly number[];
  readonly values: readonly number[];
}

/**
 * Reads a spectrum file.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readSpectrum } from "resinwright";
 * const file = {
 *   id: "lamp", quantity: "relativePower", title: "the lamp at the window",
 *   medium: "calibrated detector", relativeU: 0.05, source: "one reading at the window", status: "measured here",
 *   wavelengths_nm: [395, 405, 415], values: [0, 1, 0],
 * };
 * readSpectrum(parseJson(JSON.stringify(file), "lamp.json")).wavelengths_nm; // → [395, 405, 415]
 * ```
 */
export function readSpectrum(document: JsonDocument): Spectrum {
  const spectrum = readDocument(spectrumSchema, document);
  const { wavelengths_nm: nodes, values } = spectrum;
  if (nodes.length !== values.length) {
    throw new InputError(
      `${document.where}: wavelengths_nm has ${nodes.length} entries and values has ${values.length}; each wavelength needs one value`,
    );
  }
  const fall = nodes.findIndex((node, index) => index > 0 && node <= nodes[index - 1]!);
  if (fall > 0) {
    throw new InputError(
      `${document.where}: wavelengths_nm[${fall}] is ${nodes[fall]}, after ${nodes[fall - 1]}; wavelengths must increase`,
    );
  }
  if (spectrum.quantity === "relativePower" && values.every((value) => value === 0)) {
    throw new InputError(
      `${document.where}: values are 0 at every wavelength; a light engine must send light at some of them`,
    );
  }
  return spectrum;
}

const spectrumSchema: z.ZodType<Spectrum> = strict({
  id: idSchema,
  quantity: z.enum(["molarAbsorption_Lmolcm", "relativePower"]),
  title: z.string().min(3),
  medium: z.string().min(2),
  relativeU: z.number().min(0).max(2),
  source: sourceText,
  status: statusSchema,
  wavelengths_nm: z.array(quantity("wavelength_nm", { min: 150, max: 1200 })).min(2),
  values: z.array(z.number().min(0)).min(2),
});
