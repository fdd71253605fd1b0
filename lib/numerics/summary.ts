// What a cloud of draws says: quantiles, the interval that covers a share of it, and whether two clouds rise together.
import { checkNumber, InputError } from "../door.js";
import { checkList, checkSameLength, type NumberList } from "./lists.js";

/** A median with the interval that holds the share `level` of the draws around it. */
export interface CoverageInterval {
  readonly value: number;
  readonly low: number;
  readonly high: number;
  readonly level: number;
}

/**
 * The quantile of a sample, interpolated linearly between the order statistics: definition 7 of Hyndman and Fan.
 *
 * - `sortedValues`: at least one finite number, in rising order.
 * - `probability`: 0 to 1.
 *
 * With h = (n - 1) probability, counted from 0: (1 - f) x[floor h] + f x[floor h + 1], f = h - floor h.
 * @throws InputError when the list is empty, not in rising order, or holds something that is not a finite number.
 * @source R. J. Hyndman, Y. Fan, The American Statistician 50 (1996) 361-365, doi 10.1080/00031305.1996.10473566
 * (from memory).
 * @example
 * ```ts
 * import { quantile } from "resinwright";
 * quantile([1, 2, 3, 4], 0.25); // → 1.75
 * ```
 */
export function quantile(sortedValues: NumberList, probability: number): number {
  checkList("quantile", "sortedValues", sortedValues);
  checkRising(sortedValues);
  checkNumber(probability, { where: "quantile", field: "probability", min: 0, max: 1 });
  return interpolated(sortedValues, probability);
}

/**
 * The median of a sample and its probabilistically symmetric coverage interval.
 *
 * - `values`: finite draws in any order, at least `drawsNeeded`.
 * - `level`: coverage probability p, above 0 and below 1.
 *
 * With M draws sorted as y(1) ... y(M): q is p M rounded to a whole number, r is (M - q)/2 rounded up,
 * low = y(r), high = y(r + q).
 * @throws InputError when there are too few draws for the level, or one is not a finite number.
 * @source JCGM 101:2008, Propagation of distributions using a Monte Carlo method, clause 7.7 (from memory).
 * @example
 * ```ts
 * import { coverageInterval } from "resinwright";
 * const draws = Array.from({ length: 1000 }, (_, i) => i + 1);
 * coverageInterval(draws, 0.9).low; // → 50
 * coverageInterval(draws, 0.9).high; // → 950
 * ```
 */
export function coverageInterval(values: NumberList, level: number): CoverageInterval {
  checkList("coverageInterval", "values", values);
  checkNumber(level, {
    where: "coverageInterval",
    field: "level",
    min: 0,
    above: true,
    max: 1 - Number.EPSILON,
  });
  const y = Float64Array.from(values).sort();
  const M = y.length;
  const q = Math.floor(level * M + 0.5);
  const r = Math.floor((M - q + 1) / 2);
  if (M < drawsNeeded(level)) {
    throw new InputError(
      `coverageInterval: ${M} draws cannot show an interval of level ${level}; draw at least ${drawsNeeded(level)}`,
    );
  }
  return { value: interpolated(y, 0.5), low: y[r - 1]!, high: y[r + q - 1]!, level };
}

/**
 * How many draws a coverage interval needs at least: 2 / (1 - level), so that one is expected beyond each end, and 1 / level.
 *
 * - `level`: coverage probability, above 0 and below 1.
 * @throws InputError when the level is out of range.
 * @example
 * ```ts
 * import { drawsNeeded } from "resinwright";
 * drawsNeeded(0.95); // → 40
 * ```
 */
export function drawsNeeded(level: number): number {
  const field = "level";
  checkNumber(level, { where: "drawsNeeded", field, min: 0, above: true, max: 1 - Number.EPSILON });
  // A hair is taken off first: 2 / (1 - 0.9) is 20.000000000000004.
  return Math.ceil(Math.max(2 / (1 - level), 1 / level) - 1e-9);
}

/**
 * Spearman's rank correlation of two samples, -1 to 1: the correlation of their ranks, ties sharing their mean rank.
 *
 * - `a`, `b`: two lists of the same length, at least 2 finite numbers each, neither of them constant.
 * @throws InputError when the lengths differ, there are fewer than 2 numbers, or all of one list are equal.
 * @source C. Spearman, American Journal of Psychology 15 (1904) 72-101, doi 10.2307/1412159 (from memory).
 * @example
 * ```ts
 * import { rankCorrelation } from "resinwright";
 * rankCorrelation([1, 2, 3, 4], [1, 4, 9, 16]); // → 1
 * ```
 */
export function rankCorrelation(a: NumberList, b: NumberList): number {
  checkList("rankCorrelation", "a", a, { atLeast: 2 });
  checkList("rankCorrelation", "b", b, { atLeast: 2 });
  checkSameLength("rankCorrelation", { a, b });
  const meanRank = (a.length + 1) / 2;
  const da = ranks(a).map((rank) => rank - meanRank);
  const db = ranks(b).map((rank) => rank - meanRank);
  const r = dot(da, db) / Math.sqrt(spread("a", da) * spread("b", db));
  return Math.max(-1, Math.min(1, r));
}

function interpolated(sorted: NumberList, probability: number): number {
  const h = (sorted.length - 1) * probability;
  const share = h - Math.floor(h);
  return (1 - share) * sorted[Math.floor(h)]! + share * sorted[Math.ceil(h)]!;
}

function ranks(values: NumberList): Float64Array {
  const order = Array.from(values, (_, i) => i).sort((i, j) => values[i]! - values[j]!);
  const rank = new Float64Array(values.length);
  for (let start = 0, end = 0; start < order.length; start = end) {
    while (end < order.length && values[order[end]!] === values[order[start]!]) end++;
    for (let k = start; k < end; k++) rank[order[k]!] = (start + 1 + end) / 2;
  }
  return rank;
}

function spread(field: string, deviations: Float64Array): number {
  const sum = dot(deviations, deviations);
  if (sum > 0) return sum;
  throw new InputError(
    `rankCorrelation: all numbers of ${field} are equal; a constant has no rank correlation, leave it out`,
  );
}

const dot = (a: Float64Array, b: Float64Array): number => a.reduce((sum, x, i) => sum + x * b[i]!, 0);

function checkRising(values: NumberList): void {
  for (let i = 1; i < values.length; i++) {
    if (values[i]! < values[i - 1]!) {
      throw new InputError(
        `quantile: sortedValues[${i}] is ${values[i]}, below the ${values[i - 1]} before it; sort the values first`,
      );
    }
  }
}
