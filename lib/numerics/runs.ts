// Do residuals look like chance? Signs that come in long runs mean a model that bends differently from the readings,
// one residual far from the rest means a reading to look at again.
import { checkList, type NumberList } from "./lists.js";
import { median } from "./median.js";

/** Signs of residuals, counted in the order given. */
export interface RunsTest {
  readonly runs: number;
  readonly positive: number;
  readonly negative: number;
  /** Mean number of runs of so many signs in random order. */
  readonly expectedRuns: number;
  /** Chance of this many runs or fewer, 0 to 1, if the order of the signs were random; small means slow waves. */
  readonly probability: number;
  /** The smallest `probability` that so many signs of each kind can give: above 0.05 the test can find nothing. */
  readonly leastProbability: number;
}

/**
 * The runs test of Wald and Wolfowitz on the signs of residuals, one-sided: too few runs.
 *
 * - `residuals`: finite numbers in the order of what was varied; those equal to 0 are passed over.
 *
 * With n1 positive and n2 negative signs, P(R = 2k) = 2 C(n1-1, k-1) C(n2-1, k-1) / C(n1+n2, n1) and
 * P(R = 2k+1) = [C(n1-1, k) C(n2-1, k-1) + C(n1-1, k-1) C(n2-1, k)] / C(n1+n2, n1), summed up to the runs found: exact
 * for small samples. Signs of one kind only say nothing about their order: probability 1.
 *
 * Assumes independent signs. Residuals of a fit are not quite: p coefficients make a few more runs than chance does, so
 * a small probability means a misfit all the more.
 * @throws InputError when a residual is not a finite number or none is given.
 * @source A. Wald, J. Wolfowitz, Annals of Mathematical Statistics 11 (1940) 147-162, doi 10.1214/aoms/1177731909 (doi
 * from memory).
 * @example
 * ```ts
 * import { runsTest } from "resinwright";
 * runsTest([-1, -2, -1, 1, 2, 1, -1, -1]).runs; // → 3
 * runsTest([-1, -2, -1, 1, 2, 1, -1, -1]).probability; // → 0.1429
 * ```
 */
export function runsTest(residuals: NumberList): RunsTest {
  checkList("runsTest", "residuals", residuals);
  const signs = Array.from(residuals, Math.sign).filter((sign) => sign !== 0);
  const positive = signs.filter((sign) => sign > 0).length;
  const negative = signs.length - positive;
  const runs = signs.filter((sign, i) => sign !== signs[i - 1]).length;
  const upTo = (most: number): number => {
    let sum = 0;
    for (let r = 2; r <= most; r++) sum += chanceOf(r, positive, negative);
    return Math.min(sum, 1);
  };
  const mixed = positive > 0 && negative > 0;
  return {
    runs,
    positive,
    negative,
    expectedRuns: mixed ? 1 + (2 * positive * negative) / signs.length : runs,
    probability: mixed ? upTo(runs) : 1,
    leastProbability: mixed ? upTo(2) : 1,
  };
}

/**
 * How far each number lies from the median, in robust standard deviations: 0.6745 (r - median) / MAD, with its sign.
 *
 * - `residuals`: finite numbers in any order.
 *
 * MAD is the median of |r - median|; where it is 0, the mean of |r - median| over 0.7979 stands in for MAD / 0.6745, and
 * where that is 0 too, all scores are 0. A number of size above 3.5 deserves a second look.
 *
 * Assumes residuals that are normal but for a few; more than half of them wrong, and the score means nothing.
 * @throws InputError when a residual is not a finite number or none is given.
 * @source B. Iglewicz, D. C. Hoaglin, How to Detect and Handle Outliers, ASQC 1993 (from memory): score and limit.
 * @example
 * ```ts
 * import { robustScores } from "resinwright";
 * robustScores([0.1, -0.2, 0, 0.2, -0.1, 3])[5]; // → 13.3
 * ```
 */
export function robustScores(residuals: NumberList): number[] {
  checkList("robustScores", "residuals", residuals);
  const centre = median(Array.from(residuals));
  const distances = Array.from(residuals, (r) => Math.abs(r - centre));
  const mean = distances.reduce((sum, d) => sum + d, 0) / distances.length;
  const spread = median(distances) / NORMAL_MEDIAN || mean / NORMAL_MEAN;
  return Array.from(residuals, (r) => (spread === 0 ? 0 : (r - centre) / spread));
}

/** Of |z| for standard normal z: its median, and its mean sqrt(2 / pi). */
const NORMAL_MEDIAN = 0.674489750196082;
const NORMAL_MEAN = Math.sqrt(2 / Math.PI);

function chanceOf(runs: number, n1: number, n2: number): number {
  const k = Math.floor(runs / 2);
  const ways = (a: number, b: number): number =>
    Math.exp(lnChoose(n1 - 1, a) + lnChoose(n2 - 1, b) - lnChoose(n1 + n2, n1));
  return runs % 2 === 0 ? 2 * ways(k - 1, k - 1) : ways(k, k - 1) + ways(k - 1, k);
}

/** ln of n over k, as a sum of logarithms: exact enough for any table of readings, never too large, and -Infinity for k = n + 1. */
function lnChoose(n: number, k: number): number {
  let sum = 0;
  for (let i = 1; i <= k; i++) sum += Math.log((n - k + i) / i);
  return sum;
}
