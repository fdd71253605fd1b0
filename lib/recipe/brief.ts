// The brief: the printer's light, layer and window, the temperature, what the resin must reach and what it must not hold.

import { z } from "zod";
import { InputError } from "../door.js";
import type { SourcedValue } from "../result.js";
import { quantity, readDocument, strict, type JsonDocument } from "./document.js";
import { propertyNames } from "./propertyNames.js";
import { hazardCodeSchema, idSchema, sourced } from "./sourced.js";

/** The properties a target can be set on; each is assessed for a formulation under a brief. */
export type PropertyName =
  | "viscosity_mPas"
  | "opticalDepth_um"
  | "penetrationDepth_um"
  | "criticalExposure_mJcm2"
  | "layerExposure_mJcm2"
  | "layerTime_s"
  | "deadZone_um"
  | "inductionTime_s";

/** Within these a brief may ask for a resin temperature. */
export const printTemperatures_C = { min: 0, max: 120 } as const;

/** From a rough vacuum to a pressure vessel: a pressure in bar or atm falls below it. */
export const gasPressures_Pa = { min: 1e3, max: 1e7 } as const;

/** From `min` to `max`, either of which may be absent, in the unit the property's name ends in. */
export interface Target {
  readonly min?: number;
  readonly max?: number;
}

/** Something the resin must not hold: an ingredient by name, or whatever carries a hazard statement. */
export interface Avoid {
  readonly ingredient?: string;
  /** The code of a hazard statement of GHS or CLP; `H360` also finds `H360FD`. */
  readonly hazard?: string;
  readonly reason: string;
}

/** What a formulation has to do, on which printer, under which conditions. */
export interface Brief {
  readonly id: string;
  readonly title: string;
  readonly scenario: string;
  /** Path of the formulation to start from, relative to the brief. */
  readonly formulation: string;
  /** Folders of ingredients, spectra, films..., relative to the brief; a later one overrides an earlier one. */
  readonly shelf: readonly string[];
  /** Resin temperature while printing. */
  readonly temperature_C: number;
  readonly layerThickness_um: number;
  /** Cure depth asked for, as a multiple of the layer thickness: what is over one binds the layers. */
  readonly cureDepthPerLayer: number;
  readonly light: {
    /** Name of the engine's spectrum on the shelf, or its wavelength. */
    readonly spectrum?: string;
    readonly wavelength_nm?: SourcedValue;
    /** At the window, where the resin is. */
    readonly irradiance_mWcm2: SourcedValue;
  };
  readonly window: {
    readonly film: string;
    readonly filmThickness_um: SourcedValue;
    /** Oxygen in the gas under the film: 0.2095 for air, 0 for nitrogen, 1 for oxygen. */
    readonly gasOxygenFraction: number;
    readonly gasPressure_Pa: number;
  };
  /** The largest cross-section that has to come off the window in one lift. */
  readonly crossSection_mm2: number;
  /** Speed at which the plate leaves the window. */
  readonly liftSpeed_mms: number;
  /** What happens between two layers: how long it stays dark, and which share of the liquid left at the window is exchanged for fresh. */
  readonly betweenLayers: { readonly dark_s: number; readonly freshFraction: number };
  readonly targets: Readonly<Partial<Record<PropertyName, Target>>>;
  readonly avoid: readonly Avoid[];
}

/**
 * Reads a brief file.
 * @throws InputError with file, line and field; when the light has both a spectrum and a wavelength or neither; when a
 * target's `min` is not below its `max`.
 * @example
 * ```ts
 * import { parseJson, readBrief } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { brief } = openBrief("data/briefs/flow-cell.json");
 * const warmer = { ...brief, id: "flow-cell-warm", temperature_C: "95 °F" };
 * readBrief(parseJson(JSON.stringify(warmer), "warmer.json")).temperature_C; // → 35
 * ```
 */
export function readBrief(document: JsonDocument): Brief {
  const brief = readDocument(briefSchema, document);
  const { spectrum, wavelength_nm } = brief.light;
  if ((spectrum === undefined) === (wavelength_nm === undefined)) {
    const given = spectrum === undefined ? "neither" : "both";
    throw new InputError(
      `${document.where}: light has ${given} of spectrum and wavelength_nm; give one of them`,
    );
  }
  for (const [property, { min, max }] of Object.entries(brief.targets)) {
    if (min !== undefined && max !== undefined && min >= max) {
      throw new InputError(
        `${document.where}: targets.${property} runs from ${min} to ${max}; min must be below max`,
      );
    }
  }
  return brief;
}

const target = (property: PropertyName) =>
  strict({ min: quantity(property, { min: 0 }).optional(), max: quantity(property, { min: 0 }).optional() })
    .refine(({ min, max }) => min !== undefined || max !== undefined, {
      error: "has neither min nor max; give one of them",
    })
    .optional();

const targetShape = Object.fromEntries(
  propertyNames.map((property) => [property, target(property)]),
) as Record<PropertyName, ReturnType<typeof target>>;

const briefSchema = strict({
  id: idSchema,
  title: z.string().min(3),
  scenario: z.string().min(3),
  formulation: z.string().min(1),
  shelf: z.array(z.string().min(1)).min(1).default([".."]),
  temperature_C: quantity("temperature_C", printTemperatures_C),
  layerThickness_um: quantity("layerThickness_um", { min: 1, max: 500 }),
  cureDepthPerLayer: z.number().min(1).max(5),
  light: strict({
    spectrum: idSchema.optional(),
    wavelength_nm: sourced("wavelength_nm", { min: 250, max: 700 }).optional(),
    irradiance_mWcm2: sourced("irradiance_mWcm2", { above: 0, max: 10000 }),
  }),
  window: strict({
    film: idSchema,
    filmThickness_um: sourced("filmThickness_um", { above: 0, max: 20000 }),
    gasOxygenFraction: z.number().min(0).max(1),
    gasPressure_Pa: quantity("gasPressure_Pa", gasPressures_Pa),
  }),
  crossSection_mm2: quantity("crossSection_mm2", { above: 0 }),
  liftSpeed_mms: quantity("liftSpeed_mms", { above: 0 }),
  betweenLayers: strict({
    dark_s: quantity("dark_s", { min: 0, max: 600 }),
    freshFraction: z.number().min(0).max(1),
  }),
  targets: strict(targetShape),
  avoid: z.array(
    strict({
      ingredient: idSchema.optional(),
      hazard: hazardCodeSchema.optional(),
      reason: z.string().min(3),
    }).refine(({ ingredient, hazard }) => (ingredient === undefined) !== (hazard === undefined), {
      error: "must name either an ingredient or a hazard",
    }),
  ),
});
