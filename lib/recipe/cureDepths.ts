// Cure-depth series: how deep spots of one resin cured after known exposures by one light engine; and the working curve that
// a series becomes once it is fitted.

import { z } from "zod";
import { InputError } from "../door.js";
import type { SourcedValue, SourceStatus, Warning } from "../result.js";
import { placeOf, quantity, readDocument, strict, type JsonDocument } from "./document.js";
import { checkMeasuredParts, measuredPartsSchema, type MeasuredParts } from "./measuredParts.js";
import { idSchema, sourced, sourceText, statusSchema } from "./sourced.js";

/** One exposed spot. */
export interface CureDepthSpot {
  /** Irradiance as read before the series, times the time set. */
  readonly exposure_mJcm2: number;
  /** Thickness of the film; what a floated film showed may be left out. */
  readonly cureDepth_um?: number;
  /**
   * `at-least`: it cured through the gap of that height. `at-most`: no film could be lifted, and the thinnest that can be is
   * that thick. `floated`: it came off or folded, and its thickness is not used.
   */
  readonly reading: "measured" | "at-least" | "at-most" | "floated";
  readonly note?: string;
}

/** Spots of one resin under one light engine. */
export interface CureDepthSeries {
  readonly id: string;
  readonly kind: "cure depths";
  /** The formulation's name, for people; what counts is `parts`. */
  readonly formulation: string;
  /** What was in the bottle. */
  readonly parts: MeasuredParts;
  readonly light: {
    readonly spectrum?: string;
    readonly wavelength_nm?: SourcedValue;
    readonly irradiance_mWcm2: SourcedValue;
  };
  /** Standard uncertainty of one depth. */
  readonly depthU_um: number;
  readonly spots: readonly CureDepthSpot[];
  readonly source: string;
  readonly status: SourceStatus;
}

/** What a series says: the two figures of its working curve, whose errors go together. */
export interface MeasuredWorkingCurve {
  readonly series: CureDepthSeries;
  readonly penetrationDepth_um: SourcedValue;
  readonly criticalExposure_mJcm2: SourcedValue;
  /** Of the errors of penetration depth and ln critical exposure, -1 to 1. */
  readonly correlation: number;
  /** What the fit has to say of the series. */
  readonly warnings: readonly Warning[];
}

/** A bend passes for a line on fewer. */
const FEWEST_MEASURED = 5;
const FEWEST_EXPOSURES = 3;
/** Nobody lifts a thinner film; depths in millimetre fall below it. */
const THINNEST_UM = 1;

/**
 * Reads a file of cure depths.
 * @throws InputError with file, line and field; when parts do not add up to 100 ± 0.05, the light has both a spectrum and a
 * wavelength or neither, a depth is missing, or fewer than 5 depths at 3 exposures are measured.
 * @example
 * ```ts
 * import { parseJson, readCureDepths } from "resinwright";
 * const irradiance_mWcm2 = { value: "80 W/m^2", u: 0.4, source: "our meter at the window", status: "measured here" };
 * const depths = [[10, 22], [20, 76], [40, 131], [80, 186], [160, 243]];
 * const file = {
 *   id: "first-412", kind: "cure depths", formulation: "first", depthU_um: 4,
 *   parts: [{ ingredient: "HDDA", mass_pct: 99 }, { ingredient: "BAPO", mass_pct: 1 }],
 *   light: { spectrum: "led-412", irradiance_mWcm2 },
 *   spots: depths.map(([exposure_mJcm2, cureDepth_um]) => ({ exposure_mJcm2, cureDepth_um })),
 *   source: "spots on a glass slide, caliper", status: "measured here",
 * };
 * readCureDepths(parseJson(JSON.stringify(file), "first-412.json")).light.irradiance_mWcm2.value; // → 8
 * ```
 */
export function readCureDepths(document: JsonDocument): CureDepthSeries {
  const series = readDocument(seriesSchema, document);
  const { where } = document;
  checkMeasuredParts(document, series.parts);
  const { spectrum, wavelength_nm } = series.light;
  if ((spectrum === undefined) === (wavelength_nm === undefined)) {
    const given = spectrum === undefined ? "neither" : "both";
    throw new InputError(`${where}: light has ${given} of spectrum and wavelength_nm; give one of them`);
  }
  series.spots.forEach(({ cureDepth_um, reading }, i) => {
    if (cureDepth_um === undefined && reading !== "floated")
      throw new InputError(
        `${where}: spots[${i}] has no cureDepth_um; add it, or say "reading": "floated" if the film was lost`,
      );
  });
  const measured = series.spots.filter(({ reading }) => reading === "measured");
  const deepest = Math.max(...measured.map(({ cureDepth_um }) => cureDepth_um!));
  if (measured.length > 0 && series.depthU_um >= deepest) {
    throw new InputError(
      `${placeOf(document, ["depthU_um"])} is ${series.depthU_um}, and the deepest measured cureDepth_um is ${deepest}; a depth has to be known better than that: check the units of both (µm)`,
    );
  }
  const exposures = new Set(measured.map(({ exposure_mJcm2 }) => exposure_mJcm2)).size;
  if (measured.length < FEWEST_MEASURED || exposures < FEWEST_EXPOSURES) {
    throw new InputError(
      `${where}: ${measured.length} depths at ${exposures} exposures are measured; a working curve needs ${FEWEST_MEASURED} depths at ${FEWEST_EXPOSURES} exposures, best over a factor of 8`,
    );
  }
  return series;
}

const seriesSchema = strict({
  id: idSchema,
  kind: z.literal("cure depths"),
  formulation: idSchema,
  parts: measuredPartsSchema,
  light: strict({
    spectrum: idSchema.optional(),
    wavelength_nm: sourced("wavelength_nm", { min: 250, max: 700 }).optional(),
    irradiance_mWcm2: sourced("irradiance_mWcm2", { above: 0, max: 10000 }),
  }),
  depthU_um: quantity("depthU_um", { above: 0, max: 1000 }),
  spots: z
    .array(
      strict({
        exposure_mJcm2: quantity("exposure_mJcm2", { above: 0 }),
        cureDepth_um: quantity("cureDepth_um", { min: THINNEST_UM, max: 20000 }).optional(),
        reading: z.enum(["measured", "at-least", "at-most", "floated"]).default("measured"),
        note: z.string().min(3).optional(),
      }),
    )
    .min(1),
  source: sourceText,
  status: statusSchema,
});
