// An axis as a chemist states it, checked, and the range it shows.

import { checkNumber, InputError, refuseUnknownKeys, show } from "../../door.js";
import { titleOf } from "./words.js";

/** An axis: its quantity, its unit, and on request a logarithmic scale and a range (in the unit of the axis). */
export interface Axis {
  readonly label: string;
  readonly unit?: string;
  readonly logarithmic?: boolean;
  /** Lower and upper end. Without it the axis holds everything drawn, with a small margin. */
  readonly range?: readonly [number, number];
}

/** A window on one axis, open on the side that is left out: a target such as "at most 900 mPa s" has no `from`. */
export interface Limits {
  readonly from?: number | undefined;
  readonly to?: number | undefined;
}

/** An axis with everything decided. */
export interface PlotAxis {
  readonly label: string;
  readonly title: string;
  readonly unit: string;
  readonly logarithmic: boolean;
  readonly range: readonly [number, number];
}

/** The axis to draw for `values` (everything that must be seen on it). */
export function plotAxis(axis: Axis, values: readonly number[]): PlotAxis {
  const { label, unit = "", logarithmic = false } = axis;
  return { label, title: titleOf(axis), unit, logarithmic, range: axis.range ?? padded(values, logarithmic) };
}

/** Refuses an axis without label, with an unknown key, or with a range that cannot be drawn. */
export function checkAxis(where: string, axis: Axis): void {
  refuseUnknownKeys(where, axis, axisKeys);
  if (typeof axis.label !== "string" || axis.label.trim() === "") {
    throw new InputError(
      `${where}: label is ${show(axis.label)}; it must name the quantity, such as "viscosity"`,
    );
  }
  if (axis.range === undefined) return;
  const [low, high] = axis.range;
  checkAxisNumbers(where, axis, "range", axis.range);
  if (low >= high) {
    throw new InputError(`${where}: range is ${low} to ${high}; its first number must be below its second`);
  }
}

/** Refuses numbers that are not finite, or not positive on a logarithmic axis, naming the first one by its place. */
export function checkAxisNumbers(where: string, axis: Axis, field: string, values: readonly number[]): void {
  values.forEach((value, i) => checkNumber(value, { where, field: `${field}[${i}]`, ...axisRule(axis) }));
}

/** What the numbers of `axis` must be, beside finite. */
export function axisRule({ logarithmic }: Axis): { min?: number; above?: boolean; advice?: string } {
  const advice = "a logarithmic axis shows positive values only; leave the value out or use a linear axis";
  return logarithmic ? { min: 0, above: true, advice } : {};
}

/** Refuses a window without limits, upside down, or not to be drawn on `axis`. */
export function checkLimits(where: string, axis: Axis, { from, to }: Limits): void {
  if (from !== undefined) checkNumber(from, { where, field: "from", ...axisRule(axis) });
  if (to !== undefined) checkNumber(to, { where, field: "to", ...axisRule(axis) });
  if (from === undefined && to === undefined) {
    throw new InputError(`${where}: from and to are both missing; give at least one of them`);
  }
  if (from !== undefined && to !== undefined && from >= to) {
    throw new InputError(`${where}: from is ${from} and to is ${to}; from must be below to`);
  }
}

/** The finite limits of windows, for the range of the axis they stand on. */
export function limitsOf(windows: readonly Limits[]): number[] {
  return windows.flatMap(({ from, to }) => [from, to]).filter((limit) => limit !== undefined);
}

/** The least and the greatest of `values`. */
export function spanOf(values: readonly number[]): readonly [number, number] {
  return values.reduce(
    ([low, high], value) => [Math.min(low, value), Math.max(high, value)],
    [Infinity, -Infinity],
  );
}

const axisKeys = ["label", "unit", "logarithmic", "range"];

/** The span of `values` with 5 % to spare; a linear axis of values that are never negative does not go below zero. */
function padded(values: readonly number[], logarithmic: boolean): readonly [number, number] {
  const [low, high] = spanOf(values);
  if (logarithmic) {
    const factor = Math.max((high / low) ** 0.05, 1.1);
    return [low / factor, high * factor];
  }
  const margin = high > low ? 0.05 * (high - low) : 0.1 * Math.abs(high) || 1;
  return [low >= 0 ? Math.max(0, low - margin) : low - margin, high + margin];
}
