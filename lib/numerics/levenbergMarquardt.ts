// Nonlinear least squares by Levenberg and Marquardt, with a plain answer to the question whether it arrived.
// Every step, and the errors at the end, are a linear least-squares problem: one QR for the whole library.
import { checkNumber, InputError, positive } from "../door.js";
import { dot } from "./dot.js";
import { linearLeastSquares, type LinearFit } from "./linear.js";
import { checkList, checkSameLength, type NumberList } from "./lists.js";

/** A model y = f(b), the readings y and where to start looking for b. */
export interface NonlinearProblem {
  /** Stands before each error message: which model asked. */
  readonly where: string;
  /** The fitted value of every reading, in order; NaN where the parameters are not allowed. */
  readonly model: (parameters: readonly number[]) => NumberList;
  readonly response: NumberList;
  /** One finite number per parameter; its size also sets the step of the differences for a parameter at 0. */
  readonly start: NumberList;
  /** One weight above 0 per reading, proportional to 1/variance; equal weights unless given. */
  readonly weights?: NumberList;
  /** Derivatives of the fitted values, one row per reading; central differences unless given. */
  readonly jacobian?: (parameters: readonly number[]) => readonly NumberList[];
}

/** The fitted parameters and how well they are known; errors and leverages are those of the model made linear there. */
export interface NonlinearFit extends Omit<LinearFit, "coefficients"> {
  readonly parameters: readonly number[];
  /**
   * The step still left is below a ten-thousandth of every standard error or 1e-8 of the parameter itself, or the residuals
   * are down to rounding.
   */
  readonly converged: boolean;
  /** The largest undamped step still left, in standard errors of its parameter. */
  readonly remainingStep: number;
  /** Steps tried, the rejected ones included. */
  readonly iterations: number;
}

/**
 * Fits y = f(b) by minimising sum w (y - f(b))^2.
 *
 * - `response`: n finite numbers, at least one more than there are parameters.
 * - `start`: one number per parameter; the model must be finite there.
 *
 * Each step d solves the augmented system [J; sqrt(lambda) D] d = [r; 0] by QR, D the largest norm each column of J has
 * had so far. A step that does not lower the sum of squares is rejected and lambda grows; otherwise lambda shrinks with
 * the share of the predicted gain that came true. Derivatives are central differences with a step of 6e-6 of the
 * parameter. It stops when a step is below 1e-12 of the parameters, or after 1000 steps.
 *
 * Assumes errors of the response only, independent, with variance proportional to 1/w. It finds a minimum near its
 * start, not always the lowest: look at `converged` and at the residuals.
 * @throws InputError on lists of different lengths, too few readings, a model that is not finite at the start, or
 * parameters the readings do not tell apart.
 * @source D. W. Marquardt, J. SIAM 11 (1963) 431-441, doi 10.1137/0111030; scaling and augmented QR as J. J. Moré,
 * Lecture Notes in Mathematics 630 (1978) 105-116, doi 10.1007/BFb0067700; damping as H. B. Nielsen, report
 * IMM-REP-1999-05, Technical University of Denmark 1999 (all three from memory).
 * @example
 * ```ts
 * import { levenbergMarquardt } from "resinwright";
 * const fit = levenbergMarquardt({
 *   where: "decay",
 *   model: ([a, k]) => [0, 1, 2, 3].map((t) => a! * Math.exp(-k! * t)),
 *   response: [10, 6.1, 3.6, 2.3],
 *   start: [5, 1],
 * });
 * fit.parameters[1]; // → 0.4994
 * fit.converged; // → true
 * ```
 */
export function levenbergMarquardt(problem: NonlinearProblem): NonlinearFit {
  checkProblem(problem);
  const { where, response, weights } = problem;
  const jacobianAt = problem.jacobian ?? ((b: readonly number[]) => differences(problem, b));
  const rootWeights = Array.from(response, (_, i) => (weights === undefined ? 1 : Math.sqrt(weights[i]!)));
  let b = Array.from(problem.start);
  let state = residualsAt(problem, rootWeights, b);
  if (!Number.isFinite(state.sum)) {
    throw new InputError(
      `${where}: the model is not a finite number at the start (${b.join(", ")}); start elsewhere`,
    );
  }
  let J = weighted(jacobianAt(b), rootWeights);
  let scale = columnNorms(J);
  let lambda = 1e-3;
  let growth = 2;
  let iterations = 0;
  while (iterations < MOST_STEPS && state.sum > 0) {
    iterations++;
    const step = dampedStep(J, state.residuals, scale, lambda);
    const tried = b.map((value, j) => value + step[j]!);
    const small = norm(step, scale) <= 1e-12 * norm(b, scale);
    const next = residualsAt(problem, rootWeights, tried);
    const gain = (state.sum - next.sum) / predictedGain(J, state, step);
    if (next.sum < state.sum) {
      [b, state] = [tried, next];
      J = weighted(jacobianAt(b), rootWeights);
      scale = columnNorms(J).map((size, j) => Math.max(size, scale[j]!));
      lambda = Math.max(lambda * Math.max(1 / 3, 1 - (2 * gain - 1) ** 3), LEAST_DAMPING);
      growth = 2;
    } else {
      lambda *= growth;
      growth *= 2;
    }
    if (small || !Number.isFinite(lambda)) break;
  }
  return { ...statistics(problem, b, jacobianAt(b)), parameters: b, iterations };
}

const MOST_STEPS = 1000;
/** Below its square root the damping rows would vanish beside the others in the QR. */
const LEAST_DAMPING = 1e-20;

function checkProblem({ where, response, start, weights }: NonlinearProblem): void {
  checkList(where, "start", start);
  checkList(where, "response", response);
  if (response.length <= start.length) {
    throw new InputError(
      `${where}: ${response.length} readings for ${start.length} parameters; at least ${start.length + 1} readings must be given`,
    );
  }
  if (weights === undefined) return;
  checkList(where, "weights", weights, positive);
  checkSameLength(where, { response, weights });
}

interface State {
  /** sqrt(w) (y - f(b)). */
  readonly residuals: readonly number[];
  /** Infinity where the model is not finite, so that such a step is always rejected. */
  readonly sum: number;
}

function residualsAt(problem: NonlinearProblem, rootWeights: readonly number[], b: readonly number[]): State {
  const fitted = problem.model(b);
  checkSameLength(problem.where, { response: problem.response, model: fitted });
  const residuals = rootWeights.map((w, i) => w * (problem.response[i]! - fitted[i]!));
  const sum = residuals.reduce((total, r) => total + r * r, 0);
  return { residuals, sum: Number.isFinite(sum) ? sum : Infinity };
}

function differences({ where, model, start }: NonlinearProblem, b: readonly number[]): number[][] {
  const columns = b.map((value, j) => {
    const h = Math.cbrt(Number.EPSILON) * (Math.abs(value) || Math.abs(start[j]!) || 1);
    const at = (x: number): NumberList => model(b.map((other, k) => (k === j ? x : other)));
    const [above, below] = [at(value + h), at(value - h)];
    return Array.from(above, (y, i) =>
      checkNumber((y - below[i]!) / (value + h - (value - h)), {
        where,
        field: `the slope of fitted value ${i} with parameter ${j}`,
        advice: "keep the parameters away from where the model ends",
      }),
    );
  });
  return Array.from(columns[0]!, (_, i) => columns.map((column) => column[i]!));
}

const weighted = (rows: readonly NumberList[], rootWeights: readonly number[]): number[][] =>
  rows.map((row, i) => Array.from(row, (x) => x * rootWeights[i]!));

const columnNorms = (rows: readonly (readonly number[])[]): number[] =>
  rows[0]!.map((_, j) => Math.hypot(...rows.map((row) => row[j]!)));

function dampedStep(
  J: readonly (readonly number[])[],
  residuals: readonly number[],
  scale: readonly number[],
  lambda: number,
): readonly number[] {
  // A column of zeros takes no step, and no scale either: 1 keeps the system solvable.
  const damping = scale.map((size, j) =>
    scale.map((_, k) => (k === j ? Math.sqrt(lambda) * (size || 1) : 0)),
  );
  return linearLeastSquares({ design: [...J, ...damping], response: [...residuals, ...scale.map(() => 0)] })
    .coefficients;
}

/** How far the sum of squares of the linear model falls with the step: |r|^2 - |r - J d|^2. */
function predictedGain(
  J: readonly (readonly number[])[],
  { residuals, sum }: State,
  step: readonly number[],
): number {
  return sum - residuals.reduce((total, r, i) => total + (r - dot(J[i]!, step)) ** 2, 0);
}

/** The linear problem at the solution: its covariance is that of the parameters, its coefficients the step still left. */
function statistics(
  { where, response, weights, model }: NonlinearProblem,
  b: readonly number[],
  J: readonly NumberList[],
) {
  const fitted = model(b);
  const residuals = Array.from(response, (y, i) => y - fitted[i]!);
  const { coefficients, ...fit } = linearAt(where, {
    design: J,
    response: residuals,
    ...(weights && { weights }),
  });
  const left = coefficients.map((d, j) => ({
    d: Math.abs(d),
    u: fit.standardErrors[j]!,
    size: Math.abs(b[j]!),
  }));
  // Of exact readings only rounding is left, and steps within rounding mean nothing.
  const rounding = 1e-12 * Math.max(...Array.from(response, Math.abs));
  return {
    ...fit,
    residuals,
    converged:
      fit.residualStandardDeviation <= rounding ||
      left.every(({ d, u, size }) => d <= Math.max(1e-4 * u, 1e-8 * size)),
    remainingStep: Math.max(...left.map(({ d, u }) => (u > 0 ? d / u : 0))),
  };
}

function linearAt(where: string, problem: Parameters<typeof linearLeastSquares>[0]): LinearFit {
  try {
    return linearLeastSquares(problem);
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    throw new InputError(
      `${where}: the readings do not tell the parameters apart (${error.message}); fit fewer parameters or add readings`,
    );
  }
}

const norm = (values: readonly number[], scale: readonly number[]): number =>
  Math.hypot(...values.map((x, j) => x * scale[j]!));
