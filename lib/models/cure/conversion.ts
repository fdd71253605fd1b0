// From exposure to conversion and back: the bridge between a working curve and what a spectrometer sees.
import { checkNumber, checkNumbers, InputError, notNegative, positive } from "../../door.js";

/**
 * Conversion of the double bonds after an exposure, 0 to 1, in a resin whose gel conversion and critical exposure are known.
 *
 * - `exposure_mJcm2`: at the place, at least 0, mJ/cm2.
 * - `criticalExposure_mJcm2`: above 0, mJ/cm2; `gelConversion`: above 0, below 1.
 * - `inductionExposure_mJcm2`: what of the critical exposure burns oxygen before any bond reacts, at least 0, below the critical
 *   exposure, mJ/cm2; 0 unless given.
 *
 * X = 1 - exp(-K (E - Ei)), K = -ln(1 - X_gel) / (Ec - Ei), so X = 1 - (1 - X_gel)^((E - Ei) / (Ec - Ei)), 0 up to Ei. With Ei = 0
 * and E falling as exp(-mu z) it is the front X(z) = 1 - exp(-K I0 t e^(-mu z)), whose gel lies at the working curve with Dp = 1 / mu.
 *
 * Assumes that conversion depends on exposure alone, first order in the double bonds, with no slowing as the resin sets. Good near
 * the gel point, too high far beyond it. The more of the critical exposure is oxygen's, the steeper conversion rises beyond the gel.
 * @throws InputError when an argument is out of range.
 * @source A. Vitale, J. T. Cabral, Materials 9 (2016) 760, doi 10.3390/ma9090760 (form and doi from memory).
 * @example
 * ```ts
 * import { conversionAfterExposure } from "resinwright";
 * conversionAfterExposure({ exposure_mJcm2: 20, criticalExposure_mJcm2: 5, gelConversion: 0.1 }); // → 0.3439
 * ```
 */
export function conversionAfterExposure(input: {
  readonly exposure_mJcm2: number;
  readonly criticalExposure_mJcm2: number;
  readonly gelConversion: number;
  readonly inductionExposure_mJcm2?: number;
}): number {
  const where = "conversionAfterExposure";
  const { exposure_mJcm2: E, criticalExposure_mJcm2: Ec, gelConversion } = input;
  const { inductionExposure_mJcm2: Ei = 0 } = input;
  checkNumbers(
    where,
    { exposure_mJcm2: E, criticalExposure_mJcm2: Ec, gelConversion, inductionExposure_mJcm2: Ei },
    {
      exposure_mJcm2: notNegative,
      criticalExposure_mJcm2: positive,
      gelConversion: partial,
      inductionExposure_mJcm2: notNegative,
    },
  );
  if (Ei >= Ec) {
    throw new InputError(
      `${where}: inductionExposure_mJcm2 is ${Ei}; it must be below criticalExposure_mJcm2, ${Ec}, of which it is a part`,
    );
  }
  return -Math.expm1((Math.max(E - Ei, 0) / (Ec - Ei)) * Math.log1p(-gelConversion));
}

/**
 * Critical exposure in mJ/cm2 from one conversion measured after a known exposure.
 *
 * - `exposure_mJcm2`: above 0, mJ/cm2; `conversion`: measured after it, above 0, below 1.
 * - `gelConversion`: at which the resin holds as a solid, above 0, below 1.
 *
 * Ec = E ln(1 - X_gel) / ln(1 - X), the inverse of `conversionAfterExposure`.
 *
 * Assumes what that does; measure near the gel conversion.
 * @throws InputError when an argument is out of range.
 * @source As `conversionAfterExposure`.
 * @example
 * ```ts
 * import { criticalExposureFromConversion } from "resinwright";
 * criticalExposureFromConversion({ exposure_mJcm2: 20, conversion: 0.3439, gelConversion: 0.1 }); // → 5
 * ```
 */
export function criticalExposureFromConversion(input: {
  readonly exposure_mJcm2: number;
  readonly conversion: number;
  readonly gelConversion: number;
}): number {
  const where = "criticalExposureFromConversion";
  checkNumbers(where, input, { exposure_mJcm2: positive, conversion: partial, gelConversion: partial });
  const { exposure_mJcm2: E, conversion: X, gelConversion } = input;
  return checkNumber((E * Math.log1p(-gelConversion)) / Math.log1p(-X), {
    where,
    field: "the critical exposure in mJ/cm2",
  });
}

/**
 * How the rate follows the irradiance: the exponent n of rate ~ irradiance^n between two measurements.
 *
 * - `irradiances_mWcm2`: two, above 0, different.
 * - `times_s`: to the same conversion at each, above 0, s; take the induction time off first.
 *
 * n = ln(t1 / t2) / ln(I2 / I1). 1: only the exposure counts; 0.5: radicals end each other in pairs.
 * @throws InputError when an argument is out of range or the irradiances are equal.
 * @source Definition.
 * @example
 * ```ts
 * import { irradianceExponent } from "resinwright";
 * irradianceExponent({ irradiances_mWcm2: [5, 20], times_s: [4, 2] }); // → 0.5
 * ```
 */
export function irradianceExponent(input: {
  readonly irradiances_mWcm2: readonly [number, number];
  readonly times_s: readonly [number, number];
}): number {
  const where = "irradianceExponent";
  for (const [field, values] of Object.entries(input)) {
    values.forEach((value, i) => checkNumber(value, { where, field: `${field}[${i}]`, ...positive }));
  }
  const [I1, I2] = input.irradiances_mWcm2;
  const [t1, t2] = input.times_s;
  if (I1 === I2) {
    throw new InputError(
      `${where}: both irradiances are ${I1} mW/cm2; measure at two, best a factor of 4 apart`,
    );
  }
  return Math.log(t1 / t2) / Math.log(I2 / I1);
}

const partial = { ...positive, max: 1 - Number.EPSILON / 2, advice: "give it as a fraction" };
