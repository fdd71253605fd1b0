// A cure-depth series planned before it is measured: which exposures, how many, and how well Dp and Ec will then be known.
import { checkNumber, checkNumbers, InputError, positive } from "../../door.js";
import type { Warning } from "../../result.js";
import { exposureForDepth, type WorkingCurve } from "./workingCurve.js";

/** What is known before, and what is wanted. */
export interface CureDepthQuestion extends WorkingCurve {
  /** Thinnest film that can be lifted and measured, above 0, um. */
  readonly thinnestFilm_um: number;
  /** Thickest that the gauge or the gap allows, above the thinnest, um. */
  readonly thickestFilm_um: number;
  /** Standard uncertainty of one depth, spot to spot, above 0, um. */
  readonly scatter_um: number;
  /** Wanted relative standard uncertainty, of Dp and of Ec alike, above 0, at most 0.5. */
  readonly relativeU: number;
}

/** The plan, and what it promises if the guess is right. */
export interface CureDepthPlan {
  /** In rising order, equal factors apart. */
  readonly exposures_mJcm2: readonly number[];
  /** Expected at each exposure. */
  readonly cureDepths_um: readonly number[];
  /** Expected relative standard uncertainties. */
  readonly penetrationDepth: { readonly relativeU: number };
  readonly criticalExposure: { readonly relativeU: number };
  /** Codes: `narrow-exposure-range`, `far-from-critical`, `wanted-not-reached`. */
  readonly warnings: readonly Warning[];
}

/**
 * Plans a cure-depth series: the fewest exposures, equal factors apart over the films that can be measured, that fix Dp and Ec
 * as well as wanted.
 *
 * - `penetrationDepth_um`, `criticalExposure_mJcm2`: the guess, above 0.
 * - `thinnestFilm_um`, `thickestFilm_um`, `scatter_um`, `relativeU`: as in `CureDepthQuestion`.
 *
 * With n exposures evenly spread in ln E over w = (thickest - thinnest) / Dp, S = n (n + 1) w^2 / (12 (n - 1)):
 * u(Dp) = s / sqrt(S) and u(ln Ec) = (s / Dp) sqrt(1/n + m^2 / S), m = (thickest + thinnest) / (2 Dp). n runs from 5, below which
 * a bend passes for a line, to 40.
 *
 * Assumes a straight curve and equal errors. If the guess is off by much, the films come out thinner or thicker than planned:
 * measure three first.
 * @throws InputError when an argument is out of range.
 * @source Variances of a least-squares line, N. R. Draper, H. Smith, Applied Regression Analysis, 3rd ed. 1998, chapter 1 (from
 * memory); delta method as in `fitWorkingCurve`.
 * @example
 * ```ts
 * import { planCureDepths } from "resinwright";
 * const plan = planCureDepths({
 *   penetrationDepth_um: 100,
 *   criticalExposure_mJcm2: 5,
 *   thinnestFilm_um: 40,
 *   thickestFilm_um: 300,
 *   scatter_um: 8,
 *   relativeU: 0.05,
 * });
 * plan.exposures_mJcm2.length; // → 14
 * plan.exposures_mJcm2[0]; // → 7.459
 * ```
 */
export function planCureDepths(input: CureDepthQuestion): CureDepthPlan {
  checkQuestion(input);
  const { thinnestFilm_um, thickestFilm_um, relativeU } = input;
  let n = FEWEST;
  while (n < MOST && Math.max(...expectedU(input, n)) > relativeU) n++;
  const [depthU, exposureU] = expectedU(input, n);
  const cureDepths_um = Array.from(
    { length: n },
    (_, i) => thinnestFilm_um + (i * (thickestFilm_um - thinnestFilm_um)) / (n - 1),
  );
  return {
    exposures_mJcm2: cureDepths_um.map((cureDepth_um) => exposureForDepth({ ...input, cureDepth_um })),
    cureDepths_um,
    penetrationDepth: { relativeU: depthU },
    criticalExposure: { relativeU: exposureU },
    warnings: warningsOf(input, n, Math.max(depthU, exposureU)),
  };
}

const where = "planCureDepths";
const [FEWEST, MOST] = [5, 40];

function checkQuestion(input: CureDepthQuestion): void {
  checkNumbers(where, input, {
    penetrationDepth_um: positive,
    criticalExposure_mJcm2: positive,
    thinnestFilm_um: positive,
    thickestFilm_um: positive,
    scatter_um: positive,
    relativeU: { ...positive, max: 0.5 },
  });
  if (input.thickestFilm_um > input.thinnestFilm_um) return;
  throw new InputError(
    `${where}: thickestFilm_um is ${input.thickestFilm_um}; it must be above thinnestFilm_um, ${input.thinnestFilm_um}`,
  );
}

/** Relative standard uncertainties of Dp and Ec with n exposures. */
function expectedU(
  { penetrationDepth_um: Dp, thinnestFilm_um, thickestFilm_um, scatter_um: s }: CureDepthQuestion,
  n: number,
): [number, number] {
  const w = (thickestFilm_um - thinnestFilm_um) / Dp;
  const m = (thickestFilm_um + thinnestFilm_um) / (2 * Dp);
  const S = (n * (n + 1) * w ** 2) / (12 * (n - 1));
  const u: [number, number] = [s / Dp / Math.sqrt(S), (s / Dp) * Math.sqrt(1 / n + m ** 2 / S)];
  u.forEach((value) => checkNumber(value, { where, field: "the expected uncertainty" }));
  return u;
}

function warningsOf(
  { penetrationDepth_um: Dp, thinnestFilm_um, thickestFilm_um, relativeU }: CureDepthQuestion,
  n: number,
  reached: number,
): Warning[] {
  const warnings: Warning[] = [];
  const factor = Math.exp((thickestFilm_um - thinnestFilm_um) / Dp);
  const lowest = Math.exp(thinnestFilm_um / Dp);
  if (factor < 5) {
    warnings.push({
      code: "narrow-exposure-range",
      message: `these films span a factor of ${factor.toPrecision(2)} in exposure; below 5 the slope is poorly fixed: find a way to measure thinner or thicker ones`,
    });
  }
  if (lowest > 5) {
    warnings.push({
      code: "far-from-critical",
      message: `the thinnest film needs ${lowest.toPrecision(2)} times the critical exposure, which is extrapolated from there: measure thinner films`,
    });
  }
  if (reached > relativeU) {
    warnings.push({
      code: "wanted-not-reached",
      message: `${n} exposures reach a relative uncertainty of ${reached.toPrecision(2)}, not ${relativeU}: lower the scatter or widen the range`,
    });
  }
  return warnings;
}
