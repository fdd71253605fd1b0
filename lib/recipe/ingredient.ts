// An ingredient: what the bottle holds, every figure with its source and doubt; and a lot, whose measured figures come first.

import { z } from "zod";
import { InputError } from "../door.js";
import type { SourcedValue, SourceStatus } from "../result.js";
import { readDocument, strict, type JsonDocument } from "./document.js";
import { hasCasCheckDigit } from "./identity.js";
import {
  hazardCodeSchema,
  idSchema,
  sourced,
  sourcedAtTemperature,
  sourceText,
  statusSchema,
  type AtTemperature,
} from "./sourced.js";

/** What an ingredient is for. Diluents and oligomers are the liquids that mix; the others are dissolved or dispersed in them. */
export type Role =
  "diluent" | "oligomer" | "photoinitiator" | "synergist" | "absorber" | "inhibitor" | "pigment" | "filler";

/** Every role an ingredient can have, liquids first. */
export const roles: readonly Role[] = [
  "diluent",
  "oligomer",
  "photoinitiator",
  "synergist",
  "absorber",
  "inhibitor",
  "pigment",
  "filler",
];

/** A hazard statement (GHS code such as `H317`) with where it was read. The supplier's safety data sheet decides. */
export interface HazardStatement {
  readonly code: string;
  readonly source: string;
  readonly status: SourceStatus;
}

/** The figures of an ingredient that a lot may measure anew. */
export interface IngredientFigures {
  /** Molar mass, number average for an oligomer. */
  readonly molarMass_gmol?: SourcedValue;
  readonly density_gcm3?: AtTemperature;
  readonly viscosity_mPas?: AtTemperature;
  /** B of ln(viscosity) = A + B/T. */
  readonly viscosityActivation_K?: SourcedValue;
  readonly refractiveIndex?: AtTemperature;
  readonly homopolymerGlassTransition_C?: SourcedValue;
  /** Chain-starting radicals per photon the initiator absorbs. */
  readonly radicalsPerPhoton?: SourcedValue;
  /** Rate constant of peroxyl radical + inhibitor. */
  readonly peroxylCapture_m3mols?: SourcedValue;
  /** Radicals that one molecule of the inhibitor ends. */
  readonly radicalsCaught?: SourcedValue;
  /** The most that stays dissolved in a liquid acrylate resin at room temperature, percent of the mass. */
  readonly solubility_pct?: SourcedValue;
}

/** One substance or generic oligomer on the shelf. */
export interface Ingredient extends IngredientFigures {
  readonly id: string;
  readonly name: string;
  /** CAS number; absent for a generic oligomer that has none. */
  readonly cas?: string;
  readonly role: Role;
  readonly state: "liquid" | "solid";
  /** Empirical formula; absent for a mixture or a polymer. */
  readonly formula?: string;
  /** Polymerisable double bonds in a molecule. */
  readonly functionality?: number;
  /** Name of its absorption spectrum on the shelf. */
  readonly spectrum?: string;
  /** Statements found; absent means that nobody has looked, which is not the same as none. */
  readonly hazards?: readonly HazardStatement[];
  readonly note?: string;
  /** The lot whose measured figures stand here, and which figures those are. */
  readonly lot?: { readonly id: string; readonly measured: readonly string[] };
}

/** A lot of an ingredient: figures measured on it, which come before the typical ones. */
export interface Lot {
  readonly id: string;
  readonly ingredient: string;
  readonly measured: IngredientFigures;
}

/**
 * Reads an ingredient file.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readIngredient } from "resinwright";
 * const viscosity_mPas = {
 *   value: "9 cP", u: "2 cP", temperature_C: "77 °F", source: "supplier's sheet", status: "from memory",
 * };
 * const file = { id: "IBOA", name: "isobornyl acrylate", role: "diluent", state: "liquid", viscosity_mPas };
 * const { viscosity_mPas: read } = readIngredient(parseJson(JSON.stringify(file), "iboa.json"));
 * [read?.value, read?.temperature_C]; // → [9, 25]
 * ```
 */
export function readIngredient(document: JsonDocument): Ingredient {
  const ingredient = readDocument(ingredientSchema, document);
  if (ingredient.cas !== undefined && !hasCasCheckDigit(ingredient.cas)) {
    throw new InputError(
      `${document.where}: cas is "${ingredient.cas}", whose check digit is wrong; compare it with the label`,
    );
  }
  return ingredient;
}

/**
 * Reads a lot file.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readLot } from "resinwright";
 * const viscosity_mPas = {
 *   value: 8.6, u: 0.2, temperature_C: 25, source: "mean of three readings", status: "measured here",
 * };
 * const file = { id: "L-3", ingredient: "IBOA", measured: { viscosity_mPas } };
 * readLot(parseJson(JSON.stringify(file), "l-3.json")).measured.viscosity_mPas?.value; // → 8.6
 * ```
 */
export function readLot(document: JsonDocument): Lot {
  return readDocument(lotSchema, document);
}

const figureShape = {
  molarMass_gmol: sourced("molarMass_gmol", { above: 0 }).optional(),
  density_gcm3: sourcedAtTemperature("density_gcm3", { above: 0.3, max: 10 }).optional(),
  viscosity_mPas: sourcedAtTemperature("viscosity_mPas", { above: 0 }).optional(),
  viscosityActivation_K: sourced("viscosityActivation_K", { min: 0, max: 30000 }).optional(),
  refractiveIndex: sourcedAtTemperature("refractiveIndex", { min: 1, max: 4 }).optional(),
  homopolymerGlassTransition_C: sourced("homopolymerGlassTransition_C", { above: -150, max: 400 }).optional(),
  radicalsPerPhoton: sourced("radicalsPerPhoton", { above: 0, max: 2 }).optional(),
  peroxylCapture_m3mols: sourced("peroxylCapture_m3mols", { above: 0 }).optional(),
  radicalsCaught: sourced("radicalsCaught", { above: 0, max: 10 }).optional(),
  solubility_pct: sourced("solubility_pct", { above: 0, max: 100 }).optional(),
};

const ingredientSchema: z.ZodType<Ingredient> = strict({
  id: idSchema,
  name: z.string().min(2),
  cas: z.string().optional(),
  role: z.enum(roles as [Role, ...Role[]]),
  state: z.enum(["liquid", "solid"]),
  formula: z.string().optional(),
  functionality: z.number().int().min(0).max(12).optional(),
  spectrum: idSchema.optional(),
  ...figureShape,
  hazards: z
    .array(
      strict({
        code: hazardCodeSchema,
        source: sourceText,
        status: statusSchema,
      }),
    )
    .min(1)
    .optional(),
  note: z.string().optional(),
});

const lotSchema: z.ZodType<Lot> = strict({
  id: idSchema,
  ingredient: idSchema,
  measured: strict(figureShape),
});
