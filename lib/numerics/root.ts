// One root finder for the library: Brent's method, which never leaves its bracket and never loops for ever.
import { checkNumbers, InputError } from "../door.js";

/** What `findRoot` is asked: where `f` changes sign between `low` and `high`. */
export interface RootProblem {
  /** A continuous function with values of opposite sign (or zero) at `low` and `high`. */
  readonly f: (x: number) => number;
  readonly low: number;
  readonly high: number;
  /** Stands before each error message: which model asked. */
  readonly where: string;
}

/**
 * The x between `low` and `high` with f(x) = 0, to the last few digits of x.
 *
 * Each step is an inverse quadratic or secant step if that stays inside the bracket and shrinks it fast enough,
 * and a bisection otherwise; it stops when the bracket is narrower than 4 units in the last place of x.
 * @throws InputError when f has the same sign at both ends, or is not a finite number somewhere in between.
 * @source R. P. Brent, Algorithms for Minimization without Derivatives, Prentice-Hall 1973, chapter 4 (from memory).
 * @example
 * ```ts
 * import { findRoot } from "resinwright";
 * findRoot({ f: (x) => x * x - 2, low: 0, high: 2, where: "example" }); // → 1.414213562373
 * ```
 */
export function findRoot({ f, low, high, where }: RootProblem): number {
  checkNumbers(where, { low, high }, { low: {}, high: {} });
  const value = (x: number): number => finiteAt(where, x, f(x));
  // b is the best estimate, a the one before it, c the far end of the bracket.
  let [a, b] = [low, high];
  let [fa, fb] = [value(a), value(b)];
  if (fa === 0) return a;
  if (Math.sign(fa) === Math.sign(fb)) {
    throw new InputError(
      `${where}: no sign change between ${low} (value ${fa}) and ${high} (value ${fb}); the bracket must hold a root`,
    );
  }
  let [c, fc] = [a, fa];
  let step = b - a;
  let stepBefore = step;
  for (;;) {
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const tolerance = 2 * Number.EPSILON * Math.abs(b) + Number.MIN_VALUE;
    const half = (c - b) / 2;
    if (Math.abs(half) <= tolerance || fb === 0) return b;
    const proposed =
      Math.abs(stepBefore) >= tolerance && Math.abs(fa) > Math.abs(fb)
        ? interpolatedStep({ a, b, c, fa, fb, fc })
        : undefined;
    if (proposed !== undefined && isSafe(proposed, { half, tolerance, stepBefore })) {
      [stepBefore, step] = [step, proposed];
    } else {
      [stepBefore, step] = [half, half];
    }
    [a, fa] = [b, fb];
    b += Math.abs(step) > tolerance ? step : Math.sign(half) * tolerance;
    fb = value(b);
    if (Math.sign(fb) === Math.sign(fc)) {
      [c, fc] = [a, fa];
      step = b - a;
      stepBefore = step;
    }
  }
}

interface Bracket {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly fa: number;
  readonly fb: number;
  readonly fc: number;
}

/** The step from b to the root of the secant through a and b, or of the inverse quadratic through a, b and c. */
function interpolatedStep({ a, b, c, fa, fb, fc }: Bracket): number {
  const s = fb / fa;
  if (a === c) return ((c - b) * s) / (1 - s);
  const q = fa / fc;
  const r = fb / fc;
  const p = s * ((c - b) * q * (q - r) - (b - a) * (r - 1));
  return -p / ((q - 1) * (r - 1) * (s - 1));
}

/** A step is taken if it stays within three quarters of the bracket and is less than half the step before last. */
function isSafe(
  step: number,
  { half, tolerance, stepBefore }: Record<"half" | "tolerance" | "stepBefore", number>,
): boolean {
  const towardsRoot = step * Math.sign(half);
  return (
    towardsRoot > 0 &&
    towardsRoot < 1.5 * Math.abs(half) - tolerance / 2 &&
    Math.abs(step) < Math.abs(stepBefore) / 2
  );
}

function finiteAt(where: string, x: number, value: number): number {
  if (Number.isFinite(value)) return value;
  throw new InputError(
    `${where}: the function to be solved is ${value} at ${x}; it must be finite within the bracket`,
  );
}
