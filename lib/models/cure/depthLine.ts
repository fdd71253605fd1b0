// The straight line under a working curve, depth against ln exposure, fitted to readings of which some are only bounds.
import { InputError } from "../../door.js";
import { linearLeastSquares } from "../../numerics/linear.js";
import { lnNormalBelow, normalHazard } from "./normalTail.js";

/** A reading as the line sees it. @internal */
export interface DepthPoint {
  /** ln(exposure / (mJ/cm2)). */
  readonly lnE: number;
  readonly depth_um: number;
  readonly kind: "measured" | "at-least" | "at-most";
  readonly weight: number;
}

/** depth = a + Dp (lnE - mean), with the covariance of (a, Dp). @internal */
export interface DepthLine {
  readonly mean: number;
  readonly a: number;
  readonly Dp: number;
  readonly varA: number;
  readonly covAD: number;
  readonly varD: number;
  readonly scatter_um: number;
  readonly degreesOfFreedom: number;
}

/**
 * The line: weighted least squares where every depth was measured, maximum likelihood with normal errors where some are bounds.
 * Covariances are those of the likelihood times n / (n - 2), n the measured ones: without bounds that is least squares.
 * @source Bounds: J. Tobin, Econometrica 26 (1958) 24-36; in these parameters the likelihood has one maximum: R. J. Olsen,
 * Econometrica 46 (1978) 1211-1215 (both from memory).
 * @internal
 */
export function depthLine(points: readonly DepthPoint[]): DepthLine {
  const measured = points.filter(({ kind }) => kind === "measured");
  const line = leastSquaresLine(measured);
  const bounds = points.filter(({ kind }) => kind !== "measured");
  if (bounds.length === 0) return line;
  const size = Math.max(...points.map(({ depth_um }) => depth_um));
  if (line.scatter_um > 1e-9 * size) return likeliestLine(points, line);
  if (bounds.every((point) => isKept(point, line, size))) return line;
  throw new InputError(
    "fitWorkingCurve: the measured depths lie on one line without scatter and a bound contradicts it; check the bounds",
  );
}

/** The depth of the line at a point. @internal */
export const lineAt = ({ a, Dp, mean }: DepthLine, lnE: number): number => a + Dp * (lnE - mean);

/** Weighted least squares, bounds taken for depths. @internal */
export function leastSquaresLine(points: readonly DepthPoint[]): DepthLine {
  const mean = weightedMean(points);
  const fit = linearLeastSquares({
    design: points.map(({ lnE }) => [1, lnE - mean]),
    response: points.map(({ depth_um }) => depth_um),
    weights: points.map(({ weight }) => weight),
  });
  const [[varA, covAD], [, varD]] = fit.covariance as [[number, number], [number, number]];
  return {
    mean,
    a: fit.coefficients[0]!,
    Dp: fit.coefficients[1]!,
    varA,
    covAD,
    varD,
    scatter_um: fit.residualStandardDeviation,
    degreesOfFreedom: fit.degreesOfFreedom,
  };
}

function weightedMean(points: readonly DepthPoint[]): number {
  const total = points.reduce((sum, { weight }) => sum + weight, 0);
  return points.reduce((sum, { lnE, weight }) => sum + weight * lnE, 0) / total;
}

function isKept(point: DepthPoint, line: DepthLine, size: number): boolean {
  const above = lineAt(line, point.lnE) - point.depth_um;
  return (point.kind === "at-least" ? above : -above) >= -1e-9 * size;
}

/** Of (a / sigma, Dp / sigma, 1 / sigma). */
type Parameters = readonly [number, number, number];

/** Newton's method on the log likelihood, which is concave in these parameters; each step a least-squares problem. */
function likeliestLine(points: readonly DepthPoint[], start: DepthLine): DepthLine {
  const { mean } = start;
  const n = start.degreesOfFreedom + 2;
  let p: Parameters = [start.a / start.scatter_um, start.Dp / start.scatter_um, 1 / start.scatter_um];
  for (;;) {
    const { coefficients, covariance, residualStandardDeviation } = newtonStep(points, mean, p);
    const size = Math.hypot(...coefficients.map((d, j) => d / (Math.abs(p[j]!) + 1)));
    if (size < 1e-10) {
      const information = covariance.map((row) => row.map((c) => c / residualStandardDeviation ** 2));
      return lineOf(p, information, mean, n);
    }
    p = improved(points, mean, p, coefficients);
  }
}

/** Rows u and r with -Hessian = sum u u' and gradient = sum r u, so that the Newton step solves u d = r in least squares. */
function newtonStep(points: readonly DepthPoint[], mean: number, p: Parameters) {
  const rows = points.map((point) => {
    const root = Math.sqrt(point.weight);
    const [one, x, y] = [root, root * (point.lnE - mean), -root * point.depth_um];
    if (point.kind === "measured") return { u: [one, x, y], r: -(p[0] * one + p[1] * x + p[2] * y) };
    const sign = point.kind === "at-least" ? 1 : -1;
    const w = sign * (p[0] * one + p[1] * x + p[2] * y);
    const hazard = normalHazard(w);
    const bend = Math.sqrt(Math.max(hazard * (hazard + w), 1e-300));
    return { u: [sign * bend * one, sign * bend * x, sign * bend * y], r: hazard / bend };
  });
  const n = points.filter(({ kind }) => kind === "measured").length;
  // ln theta for each measured depth: its second derivative is -n / theta^2.
  const last = { u: [0, 0, Math.sqrt(n) / p[2]], r: Math.sqrt(n) };
  return linearLeastSquares({
    design: [...rows, last].map(({ u }) => u),
    response: [...rows, last].map(({ r }) => r),
  });
}

function improved(
  points: readonly DepthPoint[],
  mean: number,
  p: Parameters,
  step: readonly number[],
): Parameters {
  const before = lnLikelihood(points, mean, p);
  for (let length = 1; length > 1e-12; length /= 2) {
    const tried: Parameters = [p[0] + length * step[0]!, p[1] + length * step[1]!, p[2] + length * step[2]!];
    if (tried[2] > 0 && lnLikelihood(points, mean, tried) >= before - 1e-12 * Math.abs(before)) return tried;
  }
  throw new InputError(
    "fitWorkingCurve: the bounds leave no likeliest line; check them against the measured depths",
  );
}

function lnLikelihood(points: readonly DepthPoint[], mean: number, [g0, g1, theta]: Parameters): number {
  return points.reduce((sum, { lnE, depth_um, kind, weight }) => {
    const w = Math.sqrt(weight) * (g0 + g1 * (lnE - mean) - theta * depth_um);
    if (kind === "measured") return sum + Math.log(theta) - 0.5 * w * w;
    return sum + lnNormalBelow(kind === "at-least" ? w : -w);
  }, 0);
}

/** Back to a and Dp; the covariance by the derivatives of g / theta. */
function lineOf(
  [g0, g1, theta]: Parameters,
  C: readonly (readonly number[])[],
  mean: number,
  n: number,
): DepthLine {
  const [a, Dp] = [g0 / theta, g1 / theta];
  const enlarged = n / (n - 2) / theta ** 2;
  const cov = (i: 0 | 1, j: 0 | 1): number => {
    const [vi, vj] = [[a, Dp][i]!, [a, Dp][j]!];
    return enlarged * (C[i]![j]! - vi * C[2]![j]! - vj * C[i]![2]! + vi * vj * C[2]![2]!);
  };
  return {
    mean,
    a,
    Dp,
    varA: cov(0, 0),
    covAD: cov(0, 1),
    varD: cov(1, 1),
    scatter_um: Math.sqrt(n / (n - 2)) / theta,
    degreesOfFreedom: n - 2,
  };
}
