// The highest point of a curve with one hump, where its slope is not at hand.
import { checkNumber, checkNumbers, InputError, positive } from "../door.js";

/** Where to look, and how near is near enough. */
export interface MaximumProblem {
  /** Rises to one maximum and falls after it, or only rises or only falls. */
  readonly f: (x: number) => number;
  readonly low: number;
  readonly high: number;
  /** How far off the x found may lie, above 0. */
  readonly tolerance: number;
  /** Stands before each error message: which model asked. */
  readonly where: string;
}

/**
 * The x between `low` and `high` at which f is greatest, within `tolerance`.
 * @throws InputError when `high` is not above `low`, or f is not a number somewhere in between.
 * @source J. Kiefer, Proc. Am. Math. Soc. 4 (1953) 502-506: golden-section search (from memory).
 */
export function findMaximum({ f, low, high, tolerance, where }: MaximumProblem): number {
  checkNumbers(where, { low, tolerance }, { low: {}, tolerance: positive });
  checkNumber(high, { where, field: "high", min: low, above: true });
  const value = (x: number): number => {
    const y = f(x);
    if (Number.isNaN(y)) throw new InputError(`${where}: the function to be maximised is NaN at ${x}`);
    return y;
  };
  let [a, b] = [low, high];
  let [x, y] = [b - GOLDEN * (b - a), a + GOLDEN * (b - a)];
  let [fx, fy] = [value(x), value(y)];
  while (b - a > tolerance) {
    if (fx >= fy) {
      [b, y, fy] = [y, x, fx];
      x = b - GOLDEN * (b - a);
      fx = value(x);
    } else {
      [a, x, fx] = [x, y, fy];
      y = a + GOLDEN * (b - a);
      fy = value(y);
    }
  }
  return (a + b) / 2;
}

const GOLDEN = (Math.sqrt(5) - 1) / 2;
