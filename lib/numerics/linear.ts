// Linear least squares by Householder QR, with the standard errors, covariance and leverages a chemist asks for next.
// Columns are scaled to unit length first, so that a column in the hundred thousands beside one near zero does no harm.
import { InputError, positive } from "../door.js";
import { dot } from "./dot.js";
import { checkList, checkSameLength, type NumberList } from "./lists.js";

/** A linear model y = X b: one row of `design` per reading, one column per coefficient. */
export interface LinearProblem {
  readonly design: readonly NumberList[];
  readonly response: NumberList;
  /** One weight above 0 per reading, proportional to 1/variance; equal weights unless given. */
  readonly weights?: NumberList;
}

/** The fitted coefficients and how well they are known. */
export interface LinearFit {
  readonly coefficients: readonly number[];
  /** Covariance of the coefficients, scaled by the residual variance. */
  readonly covariance: readonly (readonly number[])[];
  readonly standardErrors: readonly number[];
  /** Reading minus fitted value, in the unit of the response, not weighted. */
  readonly residuals: readonly number[];
  /** sqrt(sum w r^2 / degreesOfFreedom), with w = 1 unless weights were given. */
  readonly residualStandardDeviation: number;
  readonly degreesOfFreedom: number;
  /** Diagonal of the hat matrix, 0 to 1 per reading: how much a reading decides its own fitted value. */
  readonly leverage: readonly number[];
}

/**
 * Fits y = X b by minimising sum w (y - X b)^2.
 *
 * - `design`: n rows of p finite numbers, n at least p + 1; an intercept is a column of ones.
 * - `response`: n finite numbers.
 * - `weights`: n numbers above 0.
 *
 * With Q R = sqrt(w) X: b = R^-1 Q' sqrt(w) y and covariance s^2 (R' R)^-1. Assumes errors of the response only,
 * independent, with variance proportional to 1/w.
 * @throws InputError on lists of different lengths, too few rows, or a column that repeats the ones before it.
 * @source G. H. Golub, Numerische Mathematik 7 (1965) 206-216, doi 10.1007/BF01436075 (from memory).
 * @example
 * ```ts
 * import { linearLeastSquares } from "resinwright";
 * const line = linearLeastSquares({ design: [[1, 0], [1, 1], [1, 2]], response: [1, 2, 4] });
 * line.coefficients[1]; // → 1.5
 * line.standardErrors[1]; // → 0.2887
 * ```
 */
export function linearLeastSquares(problem: LinearProblem): LinearFit {
  checkProblem(problem);
  const { design, response, weights } = problem;
  const rootWeights = Array.from(response, (_, i) => (weights === undefined ? 1 : Math.sqrt(weights[i]!)));
  const weighted = design.map((row, i) => Array.from(row, (x) => x * rootWeights[i]!));
  const norms = columnNorms(weighted);
  const X = weighted.map((row) => row.map((x, j) => x / norms[j]!));
  const y = rootWeights.map((w, i) => w * response[i]!);

  const { R, Qty } = triangularise(X, y);
  const inverseR = invertUpper(R);
  const coefficients = inverseR.map((row, j) => dot(row, Qty) / norms[j]!);
  const residuals = design.map((row, i) => response[i]! - dot(Array.from(row), coefficients));
  const degreesOfFreedom = design.length - norms.length;
  const variance = residuals.reduce((sum, r, i) => sum + (rootWeights[i]! * r) ** 2, 0) / degreesOfFreedom;
  const covariance = inverseR.map((row, j) =>
    inverseR.map((other, k) => (variance * dot(row, other)) / (norms[j]! * norms[k]!)),
  );
  checkList(where, "coefficients", coefficients, tooLarge);
  covariance.forEach((row, j) => checkList(where, `covariance[${j}]`, row, tooLarge));
  return {
    coefficients,
    covariance,
    standardErrors: covariance.map((row, j) => Math.sqrt(row[j]!)),
    residuals,
    residualStandardDeviation: Math.sqrt(variance),
    degreesOfFreedom,
    leverage: X.map((row) => sumOfSquares(timesUpper(row, inverseR))),
  };
}

const where = "linearLeastSquares";
const tooLarge = { advice: "scale the design and the response to ordinary sizes" } as const;

function checkProblem({ design, response, weights }: LinearProblem): void {
  checkList(where, "response", response);
  checkSameLength(where, { design: Array.from(design, () => 0), response });
  design.forEach((row, i) => checkList(where, `design[${i}]`, row));
  const columns = design[0]!.length;
  design.forEach((row, i) => {
    if (row.length !== columns) {
      throw new InputError(
        `${where}: design[${i}] holds ${row.length} numbers; it must hold ${columns}, as design[0] does`,
      );
    }
  });
  if (design.length <= columns) {
    throw new InputError(
      `${where}: ${design.length} readings for ${columns} coefficients; at least ${columns + 1} readings must be given`,
    );
  }
  if (weights === undefined) return;
  checkList(where, "weights", weights, positive);
  checkSameLength(where, { response, weights });
}

function columnNorms(rows: readonly (readonly number[])[]): number[] {
  return rows[0]!.map((_, j) => {
    const norm = Math.hypot(...rows.map((row) => row[j]!));
    if (norm > 0) return norm;
    throw new InputError(`${where}: column ${j} of the design is all zeros; leave it out`);
  });
}

/** Reflects X to upper triangular R, and y with it to Q' y; both come back with as many rows as X has columns. */
function triangularise(X: readonly (readonly number[])[], y: readonly number[]) {
  const A = X.map((row, i) => [...row, y[i]!]);
  const columns = X[0]!.length;
  for (let k = 0; k < columns; k++) reflectColumn(A, k);
  const R = A.slice(0, columns).map((row) => row.slice(0, columns));
  R.forEach((row, k) => {
    if (Math.abs(row[k]!) < A.length * Number.EPSILON) {
      throw new InputError(
        `${where}: column ${k} of the design is a combination of the columns before it; leave it out or vary it`,
      );
    }
  });
  return { R, Qty: A.slice(0, columns).map((row) => row[columns]!) };
}

/** Applies the Householder reflection H = I - 2 v v' / v'v that clears column k of A below the diagonal. */
function reflectColumn(A: number[][], k: number): void {
  const v = A.map((row, i) => (i < k ? 0 : row[k]!));
  const norm = Math.hypot(...v);
  if (norm === 0) return;
  v[k]! += v[k]! < 0 ? -norm : norm;
  const vv = sumOfSquares(v);
  for (let j = k; j < A[0]!.length; j++) {
    let projection = 0;
    for (let i = k; i < A.length; i++) projection += v[i]! * A[i]![j]!;
    for (let i = k; i < A.length; i++) A[i]![j]! -= (2 * projection * v[i]!) / vv;
  }
}

function invertUpper(R: readonly (readonly number[])[]): number[][] {
  const inverse = R.map(() => R.map(() => 0));
  for (let j = 0; j < R.length; j++) {
    for (let i = j; i >= 0; i--) {
      let rest = i === j ? 1 : 0;
      for (let k = i + 1; k <= j; k++) rest -= R[i]![k]! * inverse[k]![j]!;
      inverse[i]![j] = rest / R[i]![i]!;
    }
  }
  return inverse;
}

const timesUpper = (row: readonly number[], upper: readonly (readonly number[])[]): number[] =>
  row.map((_, j) => row.reduce((sum, x, i) => sum + x * upper[i]![j]!, 0));

const sumOfSquares = (values: readonly number[]): number => dot(values, values);
