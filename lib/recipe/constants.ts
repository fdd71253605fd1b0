// The constants that belong to acrylate and methacrylate resins as a class, not to one ingredient; all of them uncertain.

import type { z } from "zod";
import type { SourcedValue } from "../result.js";
import { readDocument, strict, type JsonDocument } from "./document.js";
import { sourced } from "./sourced.js";

/** Class constants of free-radical resins. */
export interface ResinConstants {
  /** Oxygen dissolved per pascal of oxygen above the resin. */
  readonly oxygenSolubility_molm3Pa: SourcedValue;
  /** Oxygen molecules used up per radical started, while oxygen lasts, without inhibitor. */
  readonly oxygenPerRadical: SourcedValue;
  /** Termination of two peroxyl radicals, kxx in d[X]/dt = -2 kxx [X]². */
  readonly peroxylTermination_m3mols: SourcedValue;
  /** Oxygen given back per pair of peroxyl radicals that end each other. */
  readonly oxygenReturned: SourcedValue;
  /** Factor on the oxygen diffusivity that the two-thirds law gives. */
  readonly diffusivityFactor: SourcedValue;
  /** Propagation kp. */
  readonly propagation_m3mols: SourcedValue;
  /** Termination kt in d[R]/dt = -2 kt [R]². */
  readonly termination_m3mols: SourcedValue;
  /** Capture of a radical by oxygen, kO. */
  readonly oxygenCapture_m3mols: SourcedValue;
  /** Double-bond conversion at which the resin holds as a solid. */
  readonly gelConversion: SourcedValue;
  /** Slope of a measured working curve over the slope that the absorption gives it. */
  readonly slopeFactor: SourcedValue;
  /** Initiator molecules lost per photon that they absorb. */
  readonly bleachingYield: SourcedValue;
  /** Napierian absorption of the resin without initiator and absorber. */
  readonly backgroundAbsorption_percm: SourcedValue;
  /** Grunberg–Nissan G of a pair of liquids that nobody has measured. */
  readonly unmeasuredInteraction: SourcedValue;
  /** Volume fraction of pigment and filler at which a suspension no longer flows. */
  readonly packingLimit: SourcedValue;
  /** Intrinsic viscosity of the particles: 2.5 for spheres, more for other shapes. */
  readonly intrinsicViscosity: SourcedValue;
}

/**
 * Reads the constants file.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readConstants } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const gelConversion = { value: 0.12, u: 0.02, source: "our own bench", status: "measured here" };
 * const file = { ...readShelf(["data"]).constants, gelConversion };
 * readConstants(parseJson(JSON.stringify(file), "resin.json")).gelConversion.value; // → 0.12
 * ```
 */
export function readConstants(document: JsonDocument): ResinConstants {
  return readDocument(constantsSchema, document);
}

const constantsSchema: z.ZodType<ResinConstants> = strict({
  oxygenSolubility_molm3Pa: sourced("oxygenSolubility_molm3Pa", { above: 0 }),
  oxygenPerRadical: sourced("oxygenPerRadical", { above: 0 }),
  peroxylTermination_m3mols: sourced("peroxylTermination_m3mols", { above: 0 }),
  oxygenReturned: sourced("oxygenReturned", { above: 0, max: 1 }),
  diffusivityFactor: sourced("diffusivityFactor", { above: 0 }),
  propagation_m3mols: sourced("propagation_m3mols", { above: 0 }),
  termination_m3mols: sourced("termination_m3mols", { above: 0 }),
  oxygenCapture_m3mols: sourced("oxygenCapture_m3mols", { above: 0 }),
  gelConversion: sourced("gelConversion", { above: 0, max: 0.9 }),
  slopeFactor: sourced("slopeFactor", { above: 0, max: 10 }),
  bleachingYield: sourced("bleachingYield", { above: 0, max: 1 }),
  backgroundAbsorption_percm: sourced("backgroundAbsorption_percm", { above: 0 }),
  unmeasuredInteraction: sourced("unmeasuredInteraction"),
  packingLimit: sourced("packingLimit", { above: 0.1, max: 0.9 }),
  intrinsicViscosity: sourced("intrinsicViscosity", { min: 2.5, max: 20 }),
});
