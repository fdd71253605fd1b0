// The area under a smooth curve: Gauss-Legendre on panels.
import { checkNumber, checkNumbers, InputError, positive } from "../door.js";

/** A smooth function and where to integrate it. */
export interface AreaProblem {
  readonly f: (x: number) => number;
  readonly low: number;
  readonly high: number;
  /** Widest panel, above 0: a width over which f is near a polynomial of degree 15. */
  readonly panel: number;
  /** Stands before each error message: which model asked. */
  readonly where: string;
}

/**
 * Integral of f from `low` to `high`, by the eight-point Gauss-Legendre rule on panels of equal width.
 * @throws InputError when `high` is below `low`, an argument is out of range, or f is not a finite number somewhere.
 * @source M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions, table 25.4 (nodes and weights from memory; the tests
 * hold them to the polynomials that the rule integrates exactly).
 */
export function areaUnder({ f, low, high, panel, where }: AreaProblem): number {
  checkNumbers(where, { low, panel }, { low: {}, panel: positive });
  checkNumber(high, { where, field: "high", min: low });
  if (high === low) return 0;
  const panels = Math.ceil((high - low) / panel);
  const half = (high - low) / panels / 2;
  let sum = 0;
  for (let k = 0; k < panels; k++) {
    const middle = low + (2 * k + 1) * half;
    for (const [node, weight] of rule) sum += weight * (f(middle - node * half) + f(middle + node * half));
  }
  if (Number.isFinite(sum)) return sum * half;
  throw new InputError(`${where}: the function to be integrated is not finite between ${low} and ${high}`);
}

const rule = [
  [0.1834346424956498, 0.362683783378362],
  [0.525532409916329, 0.3137066458778873],
  [0.7966664774136267, 0.2223810344533745],
  [0.9602898564975363, 0.1012285362903763],
] as const;
