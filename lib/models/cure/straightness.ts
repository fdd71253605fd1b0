// Is a working curve straight? A quadratic term beside the line, the scatter of repeats beside the scatter about the line, and
// single readings far from the line of the others.
import { studentQuantile } from "../../numerics/distributions.js";
import { extraScatter } from "../../numerics/extraScatter.js";
import { linearLeastSquares } from "../../numerics/linear.js";
import { median } from "../../numerics/median.js";
import { varianceRatioProbability } from "../../numerics/varianceRatio.js";
import { leastSquaresLine, type DepthPoint } from "./depthLine.js";

/** How the slope of the readings changes along the curve. */
export interface Curvature {
  /** Slope at the lowest and at the highest exposure, um per factor e. */
  readonly lowestSlope_um: number;
  readonly highestSlope_um: number;
  /** Chance of such a bend, 0 to 1, if the curve were straight. */
  readonly probability: number;
}

/** The scatter about the line against that of repeats at one exposure. */
export interface CureDepthLackOfFit {
  /** Variance about the line beyond that of repeats, over the variance of repeats. */
  readonly ratio: number;
  /** Chance of such a ratio, 0 to 1, if the line were right. */
  readonly probability: number;
  /** Standard deviation of repeats. */
  readonly repeatability_um: number;
}

/** The quadratic term; undefined where the readings are too few, or lie on one line to the last digits. @internal */
export function curvatureOf(points: readonly DepthPoint[]): Curvature | undefined {
  const exposures = new Set(points.map(({ lnE }) => lnE));
  if (points.length < 4 || exposures.size < 3) return undefined;
  const [low, high] = [Math.min(...exposures), Math.max(...exposures)];
  const middle = (low + high) / 2;
  const fit = linearLeastSquares({
    design: points.map(({ lnE }) => [1, lnE - middle, (lnE - middle) ** 2]),
    response: points.map(({ depth_um }) => depth_um),
    weights: points.map(({ weight }) => weight),
  });
  const [, slope, bend] = fit.coefficients as [number, number, number];
  const change = 2 * bend * (high - low);
  if (Math.abs(change) < 1e-9 * Math.abs(slope)) return undefined;
  const t = bend / fit.standardErrors[2]!;
  return {
    lowestSlope_um: slope - change / 2,
    highestSlope_um: slope + change / 2,
    probability: Number.isFinite(t * t)
      ? varianceRatioProbability({ ratio: t * t, degreesAbove: 1, degreesBelow: fit.degreesOfFreedom })
      : 0,
  };
}

/** Lack of fit beside repeats; undefined without repeats, or where repeats agree to the last digit. @internal */
export function lackOfFitOf(
  points: readonly DepthPoint[],
  residuals: readonly number[],
): CureDepthLackOfFit | undefined {
  const exposures = [...new Set(points.map(({ lnE }) => lnE))];
  const [n, k] = [points.length, exposures.length];
  if (n === k || k < 3) return undefined;
  const total = residuals.reduce((sum, r, i) => sum + points[i]!.weight * r * r, 0);
  const within = exposures.reduce((sum, lnE) => sum + scatterWithin(points.filter((p) => p.lnE === lnE)), 0);
  if (within === 0) return undefined;
  const { ratio, probability, standardDeviation } = extraScatter(
    { sum: total, degrees: n - 2 },
    { sum: within, degrees: n - k },
  );
  return { ratio, probability, repeatability_um: standardDeviation };
}

/** Chance of calling anything an outlier in readings without one. */
const FALSE_ALARM = 0.02;

/**
 * Places of readings far from the line of the others. A robust line (median of all slopes between two readings) puts them in
 * order; the line through the cleanest three quarters then takes the others in one by one, until one lies further off than
 * chance allows: it and all after it are outliers. Two that lie together cannot hide each other that way.
 * @source H. Theil 1950; P. K. Sen, J. Am. Stat. Assoc. 63 (1968) 1379-1389, doi 10.1080/01621459.1968.10480934; forward search:
 * A. S. Hadi, J. S. Simonoff, J. Am. Stat. Assoc. 88 (1993) 1264-1272 (all from memory).
 * @internal
 */
export function outliersOf(points: readonly DepthPoint[]): number[] {
  const n = points.length;
  const order = fromRobustLine(points);
  const rounding = 1e-9 * Math.max(...points.map(({ depth_um }) => depth_um));
  for (let m = Math.max(n - Math.max(1, Math.floor(n / 4)), 3); m < n; m++) {
    const kept = order.slice(0, m).map((i) => points[i]!);
    if (kept.every(({ lnE }) => lnE === kept[0]!.lnE)) continue;
    const { mean, a, Dp, varA, varD, scatter_um } = leastSquaresLine(kept);
    const { lnE, depth_um, weight } = points[order[m]!]!;
    const off = Math.abs(depth_um - a - Dp * (lnE - mean));
    const u = Math.sqrt(scatter_um ** 2 / weight + varA + (lnE - mean) ** 2 * varD);
    const most = studentQuantile({ probability: 1 - FALSE_ALARM / (2 * n), degreesOfFreedom: m - 2 });
    if (off > rounding && off > most * u) return order.slice(m).sort((i, k) => i - k);
  }
  return [];
}

/** Places of the readings in the order of their distance from the line of median slope. */
function fromRobustLine(points: readonly DepthPoint[]): number[] {
  const slopes = points.flatMap((p, i) =>
    points
      .slice(i + 1)
      .filter((q) => q.lnE !== p.lnE)
      .map((q) => (q.depth_um - p.depth_um) / (q.lnE - p.lnE)),
  );
  const slope = median(slopes);
  const rest = points.map(({ lnE, depth_um }) => depth_um - slope * lnE);
  const centre = median(rest);
  const distances = rest.map((r, i) => Math.sqrt(points[i]!.weight) * Math.abs(r - centre));
  return points.map((_, i) => i).sort((i, k) => distances[i]! - distances[k]!);
}

function scatterWithin(group: readonly DepthPoint[]): number {
  const weights = group.reduce((sum, { weight }) => sum + weight, 0);
  const mean = group.reduce((sum, { weight, depth_um }) => sum + weight * depth_um, 0) / weights;
  return group.reduce((sum, { weight, depth_um }) => sum + weight * (depth_um - mean) ** 2, 0);
}
