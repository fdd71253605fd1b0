// Readings taken on the printer's own window: how long the light needs before the resin gels, and how thick a layer stays
// liquid. They say what the oxygen models guess: how many radicals the light starts, and how fast oxygen moves.

import { z } from "zod";
import { InputError } from "../door.js";
import type { SourceStatus } from "../result.js";
import { gasPressures_Pa } from "./brief.js";
import { quantity, readDocument, strict, type JsonDocument } from "./document.js";
import { checkMeasuredParts, measuredPartsSchema, type MeasuredParts } from "./measuredParts.js";
import { idSchema, sourced, sourceText, statusSchema } from "./sourced.js";

/** A reading with its standard uncertainty, both in the unit of the field that holds it. */
export interface ReadValue {
  readonly value: number;
  readonly u: number;
}

/** Light until something is seen. */
export interface InductionReading {
  /** What ended it: the first gel, or the dissolved oxygen being used up (the start of heat or of stiffening). */
  readonly until: "first gel" | "oxygen used";
  readonly irradiance_mWcm2: number;
  readonly time_s: ReadValue;
}

/** The layer that stays liquid on the window under light that has been on for many induction times. */
export interface UncuredReading {
  readonly irradiance_mWcm2: number;
  /** Oxygen in the gas under the film while it was read. */
  readonly gasOxygenFraction: number;
  readonly thickness_um: ReadValue;
}

/** Readings of one formulation in one light on one film. */
export interface WindowReadings {
  readonly kind: "window";
  readonly id: string;
  /** The formulation's name, for people; what counts is `parts`. */
  readonly formulation: string;
  /** What was on the window. */
  readonly parts: MeasuredParts;
  /** The engine: its spectrum on the shelf, or its nominal wavelength. */
  readonly spectrum?: string | undefined;
  readonly wavelength_nm?: number | undefined;
  readonly temperature_C: number;
  readonly film: string;
  readonly filmThickness_um: ReadValue;
  readonly gasPressure_Pa: number;
  readonly inductionTimes: readonly InductionReading[];
  readonly uncuredLayers: readonly UncuredReading[];
  readonly source: string;
  readonly status: SourceStatus;
}

/**
 * Reads a file of window readings.
 * @throws InputError with file, line and field; when it holds no reading; when parts do not add up to 100 ± 0.05; when it names both a spectrum and a wavelength, or neither.
 * @example
 * ```ts
 * import { parseJson, readWindowReadings } from "resinwright";
 * const file = {
 *   kind: "window", id: "our-window", formulation: "first", wavelength_nm: 405, temperature_C: 25,
 *   parts: [{ ingredient: "HDDA", mass_pct: 99 }, { ingredient: "BAPO", mass_pct: 1 }],
 *   film: "FEP", filmThickness_um: { value: 100, u: 5 },
 *   inductionTimes: [{ until: "first gel", irradiance_mWcm2: 6, time_s: { value: "900 ms", u: 0.1 } }],
 *   source: "shutter and needle, notebook 12", status: "measured here",
 * };
 * readWindowReadings(parseJson(JSON.stringify(file), "our-window.json")).inductionTimes[0].time_s.value; // → 0.9
 * ```
 */
export function readWindowReadings(document: JsonDocument): WindowReadings {
  const readings = readDocument(windowReadingsSchema, document);
  const { where } = document;
  checkMeasuredParts(document, readings.parts);
  const { spectrum, wavelength_nm, inductionTimes, uncuredLayers } = readings;
  if ((spectrum === undefined) === (wavelength_nm === undefined)) {
    const given = spectrum === undefined ? "neither" : "both";
    throw new InputError(
      `${where}: ${given} of spectrum and wavelength_nm is given; name the light with one of them`,
    );
  }
  if (inductionTimes.length + uncuredLayers.length === 0) {
    throw new InputError(
      `${where}: neither inductionTimes nor uncuredLayers holds a reading; give at least one`,
    );
  }
  return readings;
}

/** A value with its doubt; a reading without doubt is not a reading, so `u` is above 0. */
const read = (field: string) =>
  strict({ value: quantity(field, { above: 0 }), u: quantity(field, { above: 0 }) });
const irradiance_mWcm2 = quantity("irradiance_mWcm2", { above: 0, max: 10000 });

const wavelengths_nm = { min: 250, max: 700 } as const;
/** A number, or the figure with its source as the brief states it: which engine it was counts, not how well it is known. */
const wavelength_nm = z
  .unknown()
  .transform((given) =>
    isFigure(given) ? given : { value: given, u: 0, source: "as stated", status: "measured here" },
  )
  .pipe(sourced("wavelength_nm", wavelengths_nm))
  .transform(({ value }) => value);
const isFigure = (given: unknown) => typeof given === "object" && given !== null;

const windowReadingsSchema: z.ZodType<WindowReadings> = strict({
  kind: z.literal("window"),
  id: idSchema,
  formulation: idSchema,
  parts: measuredPartsSchema,
  spectrum: idSchema.optional(),
  wavelength_nm: wavelength_nm.optional(),
  temperature_C: quantity("temperature_C", { min: 0, max: 120 }),
  film: idSchema,
  filmThickness_um: read("filmThickness_um"),
  gasPressure_Pa: quantity("gasPressure_Pa", gasPressures_Pa).default(101325),
  inductionTimes: z
    .array(
      strict({
        until: z.enum(["first gel", "oxygen used"]),
        irradiance_mWcm2,
        time_s: read("time_s"),
      }),
    )
    .max(20)
    .default([]),
  uncuredLayers: z
    .array(
      strict({
        irradiance_mWcm2,
        gasOxygenFraction: z.number().gt(0).max(1).default(0.2095),
        thickness_um: read("thickness_um"),
      }),
    )
    .max(20)
    .default([]),
  source: sourceText,
  status: statusSchema,
});
