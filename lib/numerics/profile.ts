// Reads a profile known at points: its value in between, and the places where it passes a level.
import { checkNumber, InputError } from "../door.js";
import { checkList, checkSameLength, type NumberList } from "./lists.js";
import { findRoot } from "./root.js";

/** A quantity along a depth: values at rising depths, at least four of them. */
export interface DepthProfile {
  readonly depths_um: NumberList;
  readonly values: NumberList;
}

/**
 * The value of a profile at a depth within it, by the cubic through the four nearest points, but never beyond these: beside a
 * steep front a cubic swings out, and a conversion would come out above 1.
 *
 * - `depths_um`: rising, um; `values`: one per depth, any unit.
 * - `depth_um`: from the first to the last depth, um.
 * @throws InputError when the lists do not match, or the depth lies outside them.
 * @source Lagrange interpolation.
 * @example
 * ```ts
 * import { valueAtDepth } from "resinwright";
 * valueAtDepth({ depths_um: [0, 1, 2, 3], values: [0, 1, 4, 9], depth_um: 1.5 }); // → 2.25
 * ```
 */
export function valueAtDepth(input: DepthProfile & { readonly depth_um: number }): number {
  const where = "valueAtDepth";
  const { depths_um, values, depth_um } = input;
  checkProfile(where, input);
  const last = depths_um.length - 1;
  checkNumber(depth_um, { where, field: "depth_um", min: depths_um[0]!, max: depths_um[last]! });
  let i = 1;
  while (i < last && depths_um[i]! < depth_um) i++;
  const first = firstOfFour(i, last);
  const four = [0, 1, 2, 3].map((k) => values[first + k]!);
  const cubic = cubicAt(depth_um, depths_um, (k) => values[k]!, first);
  return Math.min(Math.max(cubic, Math.min(...four)), Math.max(...four));
}

/**
 * The depths in um at which a profile passes a level, from the window on; empty when it never does.
 *
 * - `depths_um`: rising, um; `values`: one per depth, any unit; `level` in the same unit.
 *
 * Between two points on either side of the level the cubic through the four nearest points decides: of the logarithms where all
 * four and the level are above 0 (conversion and oxygen change by decades within a cell), of the values themselves otherwise.
 * @throws InputError when the lists do not match or the level is not a finite number.
 * @source Lagrange interpolation.
 * @example
 * ```ts
 * import { depthsAtLevel } from "resinwright";
 * depthsAtLevel({ depths_um: [0, 1, 2, 3], values: [1, 2, 4, 8], level: 3 })[0]; // → 1.585
 * ```
 */
export function depthsAtLevel(input: DepthProfile & { readonly level: number }): number[] {
  const where = "depthsAtLevel";
  const { depths_um, values, level } = input;
  checkProfile(where, input);
  checkNumber(level, { where, field: "level" });
  const last = depths_um.length - 1;
  const found: number[] = [];
  for (let i = 1; i <= last; i++) {
    if (values[i - 1]! < level === values[i]! < level) continue;
    const first = firstOfFour(i, last);
    const rises = level > 0 && [0, 1, 2, 3].every((k) => values[first + k]! > 0);
    const measure = rises ? Math.log : (value: number): number => value;
    const f = (depth: number): number =>
      cubicAt(depth, depths_um, (k) => measure(values[k]!), first) - measure(level);
    found.push(crossing(f, depths_um[i - 1]!, depths_um[i]!, where));
  }
  return found;
}

/** The cubic passes through both ends but for rounding, which can leave no sign change when an end lies on the level. */
function crossing(f: (depth: number) => number, low: number, high: number, where: string): number {
  const [atLow, atHigh] = [f(low), f(high)];
  if (Math.sign(atLow) === Math.sign(atHigh)) return Math.abs(atLow) < Math.abs(atHigh) ? low : high;
  return findRoot({ f, low, high, where });
}

const firstOfFour = (i: number, last: number): number => Math.min(Math.max(i - 2, 0), last - 3);

function cubicAt(x: number, xs: NumberList, value: (k: number) => number, first: number): number {
  let sum = 0;
  for (let k = first; k < first + 4; k++) {
    let term = value(k);
    for (let m = first; m < first + 4; m++) if (m !== k) term *= (x - xs[m]!) / (xs[k]! - xs[m]!);
    sum += term;
  }
  return sum;
}

function checkProfile(where: string, { depths_um, values }: DepthProfile): void {
  checkList(where, "depths_um", depths_um, { atLeast: 4 });
  checkList(where, "values", values);
  checkSameLength(where, { depths_um, values });
  for (let i = 1; i < depths_um.length; i++) {
    if (depths_um[i]! > depths_um[i - 1]!) continue;
    throw new InputError(
      `${where}: depths_um[${i}] is ${depths_um[i]!} after ${depths_um[i - 1]!}; the depths must rise`,
    );
  }
}
