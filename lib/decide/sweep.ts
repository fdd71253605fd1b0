// One property along one variable, or a number over two: what a figure needs, and the point on it to choose.

import { checkNumber, InputError, positive } from "../door.js";
import type { Case } from "../assess/case.js";
import type { DrawOptions } from "../assess/doubt.js";
import type { NeverCures, Property } from "../assess/property.js";
import type { Target } from "../recipe/brief.js";

/** A property along a variable, with its interval; `never` are the places where the resin never cures. */
export interface Curve {
  readonly x: number[];
  readonly y: number[];
  readonly low: number[];
  readonly high: number[];
  readonly never: number[];
}

/**
 * Assesses one property at each of the values `over`.
 * @param input - `over`, the values; `at`, which makes the case for one of them; `of`, the property, such as `viscosityOf`;
 * draw options.
 * @throws InputError when `over` is empty or a case cannot be assessed.
 * @example
 * ```ts
 * import { sweep, viscosityOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const warming = { over: [20, 30, 40], at: (temperature_C: number) => ({ ...work, brief: { ...work.brief, temperature_C } }) };
 * sweep({ ...warming, of: viscosityOf }).x; // → [20, 30, 40]
 * ```
 */
export function sweep({
  over,
  at,
  of,
  ...options
}: DrawOptions & {
  over: readonly number[];
  at: (value: number) => Case;
  of: (input: Case & DrawOptions) => Property | NeverCures;
}): Curve {
  if (over.length === 0) throw new InputError("sweep: over is empty; give the values to go through");
  const curve: Curve = { x: [], y: [], low: [], high: [], never: [] };
  for (const value of over) {
    const property = of({ ...at(value), ...options });
    if (property.outcome === "never-cures") {
      curve.never.push(value);
      continue;
    }
    curve.x.push(value);
    curve.y.push(property.value);
    curve.low.push(property.low);
    curve.high.push(property.high);
  }
  return curve;
}

/**
 * Evenly spaced values, both ends included; on a logarithmic scale each is the same multiple of the one before.
 * @throws InputError when there are fewer than two, the ends are not in order, or a logarithmic scale does not start above 0.
 * @example
 * ```ts
 * import { evenSteps } from "resinwright";
 * evenSteps({ from: 1, to: 100, count: 3, logarithmic: true }); // → [1, 10, 100]
 * ```
 */
export function evenSteps({
  from,
  to,
  count,
  logarithmic = false,
}: {
  from: number;
  to: number;
  count: number;
  logarithmic?: boolean;
}): number[] {
  const where = "evenSteps";
  checkNumber(count, { where, field: "count", min: 2, max: 10000 });
  checkNumber(from, { where, field: "from", ...(logarithmic ? positive : {}) });
  checkNumber(to, { where, field: "to", min: from, above: true });
  const at = (part: number) => (logarithmic ? from * (to / from) ** part : from + (to - from) * part);
  // Twelve digits: steps such as 0.1 + 0.2 should read as people write them.
  return Array.from({ length: count }, (_, i) => Number(at(i / (count - 1)).toPrecision(12)));
}

/**
 * A number (or null, where there is no such recipe) for each place of a grid: one row for each `y`, one number for each `x`, as a contour figure takes them.
 * @example
 * ```ts
 * import { mapOver, stefanForce } from "resinwright";
 * const lift = { viscosity_mPas: 300, crossSection_mm2: 320 };
 * const pull = (gap_um: number, liftSpeed_mms: number) => stefanForce({ ...lift, gap_um, liftSpeed_mms });
 * const pulls_N = mapOver({ x: [50, 100, 200], y: [1, 2], at: pull });
 * [pulls_N.length, pulls_N[0].length]; // → [2, 3]
 * pulls_N[1][0] / pulls_N[0][0]; // → 2.000
 * ```
 */
export function mapOver<T extends number | null>({
  x,
  y,
  at,
}: {
  x: readonly number[];
  y: readonly number[];
  at: (x: number, y: number) => T;
}): T[][] {
  return y.map((row) => x.map((column) => at(column, row)));
}

/**
 * The point of a curve to choose for a target: of the points whose whole interval lies within it, the one nearest to
 * `present`; where there is none, the point whose value lies deepest within the target or least outside it.
 * @returns The point and whether its interval `fits`.
 * @throws InputError when the curve has no point.
 * @example
 * ```ts
 * import { nearestWithin } from "resinwright";
 * const curve = { x: [0.5, 0.6, 0.7], y: [180, 400, 900], low: [140, 310, 700], high: [230, 520, 1200], never: [] };
 * const chosen = nearestWithin({ curve, target: { min: 100, max: 600 }, present: 0.7 });
 * chosen; // → { x: 0.6, y: 400, low: 310, high: 520, fits: true }
 * ```
 */
export function nearestWithin({
  curve,
  target,
  present,
}: {
  curve: Curve;
  target: Target;
  present: number;
}): {
  x: number;
  y: number;
  low: number;
  high: number;
  fits: boolean;
} {
  checkNumber(present, { where: "nearestWithin", field: "present" });
  if (curve.x.length === 0)
    throw new InputError("nearestWithin: curve has no point; the resin never cures anywhere on it");
  const { min = 0, max = Infinity } = target;
  const points = curve.x.map((x, i) => ({ x, y: curve.y[i]!, low: curve.low[i]!, high: curve.high[i]! }));
  const fitting = points.filter(({ low, high }) => low >= min && high <= max);
  const [best] =
    fitting.length > 0
      ? [...fitting].sort((a, b) => Math.abs(a.x - present) - Math.abs(b.x - present))
      : [...points].sort((a, b) => margin(b.y, min, max) - margin(a.y, min, max));
  return { ...best!, fits: fitting.length > 0 };
}

/** How far inside its target a value lies, as a ratio on the nearer side; below 0 outside. Figures here are ratio quantities. */
function margin(value: number, min: number, max: number): number {
  return Math.min(Math.log(value / min), Math.log(max / value));
}
