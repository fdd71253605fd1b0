// Penetration depth and critical exposure from measured cure depths, with the doubt in both.
// The critical exposure is an extrapolation to depth zero, so its interval is found in ln Ec and is not symmetric.
import {
  checkNumber,
  InputError,
  notNegative,
  positive,
  refuseUnknownKeys,
  unknownName,
} from "../../door.js";
import { studentQuantile } from "../../numerics/distributions.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import type { Interval, Warning } from "../../result.js";
import { percent } from "../percent.js";
import { depthLine, lineAt, type DepthPoint } from "./depthLine.js";
import {
  curvatureOf,
  lackOfFitOf,
  outliersOf,
  type CureDepthLackOfFit,
  type Curvature,
} from "./straightness.js";

/**
 * What a reading says. `measured`: the depth. `at-least`: it cured through the gap of that height. `at-most`: no film could be
 * lifted, and the thinnest that can be is that thick. A film that floated off unmeasured says nothing: leave it out.
 */
export type CureDepthKind = "measured" | "at-least" | "at-most";

/** Cure depths measured after known exposures, and the coverage wanted. */
export interface CureDepthReadings {
  readonly exposures_mJcm2: NumberList;
  readonly cureDepths_um: NumberList;
  readonly level: number;
  /** One a reading; all `measured` unless given. */
  readonly kinds?: readonly CureDepthKind[];
  /** One a reading, above 0, proportional to 1/variance of the depth; equal unless given. */
  readonly weights?: NumberList;
  /** Liquid layer that oxygen keeps at the window, at least 0, um; added to every depth. 0 unless given. */
  readonly oxygenLayer_um?: number;
}

/** The working curve that fits the readings. */
export interface WorkingCurveFit {
  readonly penetrationDepth_um: Interval;
  readonly criticalExposure_mJcm2: Interval;
  /** Of (Dp in um, ln(Ec / (mJ/cm2))), in that order; the two errors go together. */
  readonly covariance: readonly [readonly [number, number], readonly [number, number]];
  readonly degreesOfFreedom: number;
  readonly residualStandardDeviation_um: number;
  /** Depth minus line, um, in the order of the readings; of a bound too. */
  readonly residuals_um: readonly number[];
  /** Places of the measured depths that lie far from the line of the others, counted from 0. */
  readonly outliers: readonly number[];
  /** Absent on fewer than 4 measured depths, or when they are straight to the last digits. */
  readonly curvature?: Curvature;
  /** Absent without repeats. */
  readonly lackOfFit?: CureDepthLackOfFit;
  /** Readings used, bounds included. */
  readonly points: number;
  /**
   * Codes: `narrow-exposure-range`, `far-from-critical`, `few-points`, `slope-uncertain`, `bent`, `outlier`, `lack-of-fit`.
   */
  readonly warnings: readonly Warning[];
}

/**
 * Fits the working curve to measured cure depths.
 *
 * - `exposures_mJcm2`: 3 or more, above 0, not all equal, mJ/cm2; repeats at one exposure are welcome.
 * - `cureDepths_um`: one per exposure, above 0, um; 3 or more of them measured.
 * - `level`: coverage of the intervals, 0.5 to 0.999.
 * - `kinds`: which depths are bounds; `weights`; `oxygenLayer_um`.
 *
 * Least squares of Cd = a + Dp (ln E - m), m the mean of ln E; where some depths are bounds, maximum likelihood with normal
 * errors, to which a bound adds the chance of lying beyond it. ln Ec = m - a / Dp; by the delta method
 * var(ln Ec) = (var a + 2 x cov + x^2 var Dp) / Dp^2, x = ln Ec - m, and cov(Dp, ln Ec) = -(cov + x var Dp) / Dp. Intervals are
 * value -+ t u with n - 2 degrees of freedom, n the measured depths, for Ec in ln Ec. A measured depth counts as an outlier when
 * it lies further from the line of the others than 2 to 3 in 100 straight series would show; it stays in the fit. The bend is
 * the t test of a quadratic term, the lack of fit the F test beside repeats; both warn below a chance of 5 %.
 *
 * Assumes errors in the depth only, alike for all depths but for the weights. A thickness gauge that presses a soft film or a
 * broad light engine shift both parameters and do not show in the intervals. An oxygen layer d makes Ec larger by e^(d/Dp) if
 * it is not taken into account.
 * @throws InputError on fewer than 3 measured points, lists of different lengths, an exposure or depth not above 0, all
 * exposures equal, a depth that does not rise with exposure, an unknown kind, or bounds that contradict the depths.
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
  const { level } = readings;
  const points = pointsOf(readings);
  const line = depthLine(points);
  checkRises(line.Dp);
  const { Dp, mean } = line;
  const x = -line.a / Dp;
  const lnEc = mean + x;
  const varE = (line.varA + 2 * x * line.covAD + x ** 2 * line.varD) / Dp ** 2;
  const covDE = -(line.covAD + x * line.varD) / Dp;
  const t = studentQuantile({ probability: (1 + level) / 2, degreesOfFreedom: line.degreesOfFreedom });
  const [spreadD, spreadE] = [t * Math.sqrt(line.varD), t * Math.sqrt(varE)];
  const residuals_um = points.map(({ lnE, depth_um }) => depth_um - lineAt(line, lnE));
  const fit = {
    penetrationDepth_um: { value: Dp, low: Dp - spreadD, high: Dp + spreadD, level },
    criticalExposure_mJcm2: {
      value: statedExposure(lnEc),
      low: statedExposure(lnEc - spreadE),
      high: statedExposure(lnEc + spreadE),
      level,
    },
    covariance: [
      [line.varD, covDE],
      [covDE, varE],
    ] as const,
    degreesOfFreedom: line.degreesOfFreedom,
    residualStandardDeviation_um: line.scatter_um,
    residuals_um,
    points: points.length,
    ...examined(points, residuals_um),
  };
  return { ...fit, warnings: warningsOf(readings, fit) };
}

const where = "fitWorkingCurve";
const kindNames: readonly CureDepthKind[] = ["measured", "at-least", "at-most"];

function checkReadings(readings: CureDepthReadings): void {
  const { exposures_mJcm2, cureDepths_um, level, kinds, weights, oxygenLayer_um } = readings;
  refuseUnknownKeys(where, readings, [
    "exposures_mJcm2",
    "cureDepths_um",
    "level",
    "kinds",
    "weights",
    "oxygenLayer_um",
  ]);
  checkList(where, "exposures_mJcm2", exposures_mJcm2, { ...positive, atLeast: 3 });
  checkList(where, "cureDepths_um", cureDepths_um, {
    ...positive,
    advice: "leave out exposures that cured nothing: they lie below the critical exposure, not on the line",
  });
  checkSameLength(where, { exposures_mJcm2, cureDepths_um });
  checkNumber(level, { where, field: "level", min: 0.5, max: 0.999 });
  if (weights !== undefined) {
    checkList(where, "weights", weights, positive);
    checkSameLength(where, { exposures_mJcm2, weights });
  }
  if (oxygenLayer_um !== undefined)
    checkNumber(oxygenLayer_um, { where, field: "oxygenLayer_um", ...notNegative });
  if (kinds !== undefined) checkKinds(kinds, exposures_mJcm2);
  const measured = Array.from(exposures_mJcm2).filter((_, i) => (kinds?.[i] ?? "measured") === "measured");
  if (measured.every((E) => E === measured[0])) {
    throw new InputError(
      `${where}: all exposures are ${measured[0]} mJ/cm2; expose to at least two, better five, different ones`,
    );
  }
}

function checkKinds(kinds: readonly CureDepthKind[], exposures_mJcm2: NumberList): void {
  kinds.forEach((kind, i) => {
    if (!kindNames.includes(kind))
      throw new InputError(unknownName(`${where}: kinds[${i}]`, "kind", String(kind), kindNames));
  });
  if (kinds.length !== exposures_mJcm2.length) {
    throw new InputError(
      `${where}: exposures_mJcm2 holds ${exposures_mJcm2.length}, kinds holds ${kinds.length}; each reading needs one`,
    );
  }
  const measured = kinds.filter((kind) => kind === "measured").length;
  if (measured < 3)
    throw new InputError(
      `${where}: ${measured} of the depths are measured; at least 3 must be, the rest may be bounds`,
    );
}

function pointsOf({
  exposures_mJcm2,
  cureDepths_um,
  kinds,
  weights,
  oxygenLayer_um = 0,
}: CureDepthReadings): DepthPoint[] {
  return Array.from(exposures_mJcm2, (E, i) => ({
    lnE: Math.log(E),
    depth_um: cureDepths_um[i]! + oxygenLayer_um,
    kind: kinds?.[i] ?? "measured",
    weight: weights?.[i] ?? 1,
  }));
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

const SIGNIFICANT = 0.05;

/** Bounds have no residual in the sense of these tests, so only measured depths take part. */
function examined(points: readonly DepthPoint[], residuals_um: readonly number[]) {
  const places = points.map((_, i) => i).filter((i) => points[i]!.kind === "measured");
  const measured = places.map((i) => points[i]!);
  const curvature = curvatureOf(measured);
  const lackOfFit = lackOfFitOf(
    measured,
    places.map((i) => residuals_um[i]!),
  );
  return {
    outliers: outliersOf(measured).map((k) => places[k]!),
    ...(curvature && { curvature }),
    ...(lackOfFit && { lackOfFit }),
  };
}

function warningsOf(
  { exposures_mJcm2, cureDepths_um }: CureDepthReadings,
  fit: Omit<WorkingCurveFit, "warnings">,
): Warning[] {
  const exposures = Array.from(exposures_mJcm2);
  const [least, most] = [Math.min(...exposures), Math.max(...exposures)];
  const Ec = fit.criticalExposure_mJcm2.value;
  const warnings: Warning[] = [];
  const warn = (code: string, message: string): number => warnings.push({ code, message });
  if (most < 5 * least) {
    warn(
      "narrow-exposure-range",
      `the exposures span a factor of ${(most / least).toPrecision(2)}; below a factor of 5 the slope is poorly fixed`,
    );
  }
  if (least > 5 * Ec) {
    warn(
      "far-from-critical",
      `the lowest exposure is ${(least / Ec).toPrecision(2)} times the critical exposure, which is extrapolated ` +
        "from there; add exposures within 5 times of it",
    );
  }
  if (exposures.length < 5) {
    warn(
      "few-points",
      `${exposures.length} points; with fewer than 5 a curved line passes for a straight one`,
    );
  }
  if (fit.penetrationDepth_um.low <= 0) {
    warn(
      "slope-uncertain",
      "the interval of the penetration depth reaches zero; these readings do not show a slope",
    );
  }
  for (const i of fit.outliers) {
    warn(
      "outlier",
      `the depth of ${cureDepths_um[i]} um after ${exposures[i]} mJ/cm2 lies far from the line of the others; measure it again ` +
        "or leave it out and say so: it is still in this fit",
    );
  }
  if (fit.curvature !== undefined && fit.curvature.probability < SIGNIFICANT)
    warn("bent", bentMessage(fit.curvature));
  if (fit.lackOfFit !== undefined && fit.lackOfFit.probability < SIGNIFICANT) {
    warn(
      "lack-of-fit",
      `the depths lie further from the line than repeats from each other (chance ${percent(fit.lackOfFit.probability)}); ` +
        "the curve is not straight, or exposures were not what they were set to",
    );
  }
  return warnings;
}

function bentMessage({ lowestSlope_um, highestSlope_um, probability }: Curvature): string {
  const change = `the slope goes from ${lowestSlope_um.toPrecision(3)} to ${highestSlope_um.toPrecision(3)} um`;
  const cause =
    highestSlope_um > lowestSlope_um
      ? "a broad light engine or a bleaching initiator bends it upward"
      : "a gauge that presses thick films, or exposures that did not add up, bend it downward";
  return `${change} along the curve (chance ${percent(probability)} if it were straight): ${cause}; Dp and Ec hold for these exposures only`;
}
