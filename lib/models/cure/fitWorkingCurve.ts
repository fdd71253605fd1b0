// Penetration depth and critical exposure from measured cure depths, with the doubt in both.
// The critical exposure is an extrapolation to depth zero, so its interval is found in ln Ec and is not symmetric.
import { checkNumber, InputError, positive } from "../../door.js";
import { studentQuantile } from "../../numerics/distributions.js";
import { linearLeastSquares } from "../../numerics/linear.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import type { Interval, Warning } from "../../result.js";

/** Cure depths measured after known exposures, and the coverage wanted. */
export interface CureDepthReadings {
  readonly exposures_mJcm2: NumberList;
  readonly cureDepths_um: NumberList;
  readonly level: number;
}

/** The working curve that fits the readings. */
export interface WorkingCurveFit {
  readonly penetrationDepth_um: Interval;
  readonly criticalExposure_mJcm2: Interval;
  /** Of (Dp in um, ln(Ec / (mJ/cm2))), in that order; the two errors go together. */
  readonly covariance: readonly [readonly [number, number], readonly [number, number]];
  readonly residualStandardDeviation_um: number;
  readonly points: number;
  /** Codes: `narrow-exposure-range`, `far-from-critical`, `few-points`, `slope-uncertain`. */
  readonly warnings: readonly Warning[];
}

/**
 * Fits the working curve to measured cure depths.
 *
 * - `exposures_mJcm2`: 3 or more, above 0, not all equal, mJ/cm2.
 * - `cureDepths_um`: one per exposure, above 0, um; leave out exposures that cured nothing.
 * - `level`: coverage of the intervals, 0.5 to 0.999.
 *
 * Least squares of Cd = a + Dp (ln E - m) with equal weights, m the mean of ln E: a and Dp are then uncorrelated.
 * ln Ec = m - a / Dp; by the delta method var(ln Ec) = (var a + (ln Ec - m)^2 var Dp) / Dp^2 and
 * cov(Dp, ln Ec) = -(ln Ec - m) var Dp / Dp. Intervals are value -+ t u with n - 2 degrees of freedom, for Ec in ln Ec.
 *
 * Assumes errors in the depth only, alike for all depths. A thickness gauge that presses a soft film, an oxygen layer
 * left uncured or a broad light source shift both parameters and do not show in the intervals.
 * @throws InputError on fewer than 3 points, lists of different lengths, an exposure or depth not above 0, all
 * exposures equal, or a depth that does not rise with exposure.
 * @source P. F. Jacobs, Rapid Prototyping and Manufacturing, SME 1992, chapter 4 (from memory); delta method as JCGM
 * 100:2008, clause 5.2, equation 13.
 * @example
 * ```ts
 * import { fitWorkingCurve } from "resinwright";
 * const fit = fitWorkingCurve({
 *   exposures_mJcm2: [8, 12, 20, 35, 60, 100],
 *   cureDepths_um: [45, 90, 137, 196, 248, 299],
 *   level: 0.95,
 * });
 * fit.penetrationDepth_um.value; // → 100.03
 * fit.criticalExposure_mJcm2.low; // → 4.777
 * ```
 */
export function fitWorkingCurve(readings: CureDepthReadings): WorkingCurveFit {
  checkReadings(readings);
  const { exposures_mJcm2, cureDepths_um, level } = readings;
  const lnE = Array.from(exposures_mJcm2, Math.log);
  const mean = lnE.reduce((sum, x) => sum + x, 0) / lnE.length;
  const fit = linearLeastSquares({ design: lnE.map((x) => [1, x - mean]), response: cureDepths_um });
  const [a, Dp] = fit.coefficients as [number, number];
  checkRises(Dp);
  const lnEc = mean - a / Dp;
  const [varA, varD] = fit.standardErrors.map((u) => u ** 2) as [number, number];
  const varE = (varA + (lnEc - mean) ** 2 * varD) / Dp ** 2;
  const covDE = (-(lnEc - mean) * varD) / Dp;
  const t = studentQuantile({ probability: (1 + level) / 2, degreesOfFreedom: fit.degreesOfFreedom });
  const [spreadD, spreadE] = [t * Math.sqrt(varD), t * Math.sqrt(varE)];
  const penetrationDepth_um = { value: Dp, low: Dp - spreadD, high: Dp + spreadD, level };
  const criticalExposure_mJcm2 = {
    value: statedExposure(lnEc),
    low: statedExposure(lnEc - spreadE),
    high: statedExposure(lnEc + spreadE),
    level,
  };
  return {
    penetrationDepth_um,
    criticalExposure_mJcm2,
    covariance: [
      [varD, covDE],
      [covDE, varE],
    ],
    residualStandardDeviation_um: fit.residualStandardDeviation,
    points: exposures_mJcm2.length,
    warnings: warningsOf(exposures_mJcm2, penetrationDepth_um, criticalExposure_mJcm2),
  };
}

const where = "fitWorkingCurve";

function checkReadings({ exposures_mJcm2, cureDepths_um, level }: CureDepthReadings): void {
  checkList(where, "exposures_mJcm2", exposures_mJcm2, { ...positive, atLeast: 3 });
  checkList(where, "cureDepths_um", cureDepths_um, {
    ...positive,
    advice: "leave out exposures that cured nothing: they lie below the critical exposure, not on the line",
  });
  checkSameLength(where, { exposures_mJcm2, cureDepths_um });
  checkNumber(level, { where, field: "level", min: 0.5, max: 0.999 });
  if (Array.from(exposures_mJcm2).every((E) => E === exposures_mJcm2[0])) {
    throw new InputError(
      `${where}: all exposures are ${exposures_mJcm2[0]} mJ/cm2; expose to at least two, better five, different ones`,
    );
  }
}

function checkRises(Dp: number): void {
  if (Dp > 0) return;
  throw new InputError(
    `${where}: the cure depth does not rise with exposure (${Dp.toPrecision(3)} um per factor e); ` +
      "check that exposures and depths are listed in the same order",
  );
}

function statedExposure(lnExposure: number): number {
  return checkNumber(Math.exp(lnExposure), {
    where,
    field: "criticalExposure_mJcm2",
    ...positive,
    advice:
      "the depth hardly rises with exposure, so the line cannot be followed to depth zero; widen the exposures",
  });
}

function warningsOf(exposures_mJcm2: NumberList, Dp: Interval, Ec: Interval): Warning[] {
  const exposures = Array.from(exposures_mJcm2);
  const [least, most] = [Math.min(...exposures), Math.max(...exposures)];
  const warnings: Warning[] = [];
  const warn = (code: string, message: string): number => warnings.push({ code, message });
  if (most < 5 * least) {
    warn(
      "narrow-exposure-range",
      `the exposures span a factor of ${(most / least).toPrecision(2)}; below a factor of 5 the slope is poorly fixed`,
    );
  }
  if (least > 5 * Ec.value) {
    warn(
      "far-from-critical",
      `the lowest exposure is ${(least / Ec.value).toPrecision(2)} times the critical exposure, which is extrapolated ` +
        "from there; add exposures within 5 times of it",
    );
  }
  if (exposures.length < 5) {
    warn(
      "few-points",
      `${exposures.length} points; with fewer than 5 a curved line passes for a straight one`,
    );
  }
  if (Dp.low <= 0) {
    warn(
      "slope-uncertain",
      "the interval of the penetration depth reaches zero; these readings do not show a slope",
    );
  }
  return warnings;
}
