// Where contour lines carry their values: every line that is drawn has one label, clear of the others and of the edges.

import type { GridAxis, GridValues } from "./contour.js";

/** A place on the plane, each way from 0 (lower end of the axis) to 1 (upper end). */
export type Place = readonly [number, number];

/** A label of a level; `steep` where the line runs rather upwards, so that the label stands beside it, not above it. */
export interface LevelLabel {
  readonly level: number;
  readonly x: number;
  readonly y: number;
  readonly steep: boolean;
}

/** One label for each level that crosses the grid, placed as far as can be from `taken` places, edges and other labels. */
export function levelLabels({
  x,
  y,
  z,
  levels,
  taken,
}: {
  x: GridAxis;
  y: GridAxis;
  z: GridValues;
  levels: readonly number[];
  taken: readonly Place[];
}): LevelLabel[] {
  const places = [...taken];
  const labels: LevelLabel[] = [];
  for (const level of levels) {
    const crossings = crossingsOf(level, x.values, y.values, z.values);
    if (crossings.length === 0) continue;
    const placed = crossings.map((label) => ({ label, place: placeOf(label, x, y) }));
    const best = placed.reduce((a, b) => (room(b.place, places) > room(a.place, places) ? b : a));
    labels.push(best.label);
    places.push(best.place);
  }
  return labels;
}

/** The place of a point of the grid. */
export function placeOf({ x, y }: { x: number; y: number }, xAxis: GridAxis, yAxis: GridAxis): Place {
  return [along(xAxis, x), along(yAxis, y)];
}

/** The points where a level crosses the grid lines, found by straight lines between grid points. */
function crossingsOf(
  level: number,
  x: readonly number[],
  y: readonly number[],
  z: readonly (readonly (number | null)[])[],
): LevelLabel[] {
  return z.flatMap((row, j) =>
    row.flatMap((value, i) => {
      const right = fractionAt(level, value, row[i + 1]);
      const above = fractionAt(level, value, z[j + 1]?.[i]);
      return [
        ...(right === undefined
          ? []
          : [{ level, x: x[i]! + right * (x[i + 1]! - x[i]!), y: y[j]!, steep: true }]),
        ...(above === undefined
          ? []
          : [{ level, x: x[i]!, y: y[j]! + above * (y[j + 1]! - y[j]!), steep: false }]),
      ];
    }),
  );
}

function fractionAt(level: number, a: number | null, b: number | null | undefined): number | undefined {
  if (a === null || b === null || b === undefined || a > level === b > level) return undefined;
  return (level - a) / (b - a);
}

function along({ values, logarithmic }: GridAxis, value: number): number {
  const scaled = (v: number): number => (logarithmic ? Math.log(v) : v);
  const [low, high] = [scaled(values[0]!), scaled(values.at(-1)!)];
  return (scaled(value) - low) / (high - low);
}

/** The distance to the nearest place taken; a label needs less room towards an edge than towards another label. */
function room([x, y]: Place, places: readonly Place[]): number {
  const toEdge = 2 * Math.min(x, 1 - x, y, 1 - y);
  return Math.min(toEdge, ...places.map(([px, py]) => Math.hypot(x - px, y - py)));
}
