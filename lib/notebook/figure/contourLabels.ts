// Where contour lines carry their values: every level that is drawn has a label, clear of the others and of the edges, and so has
// each of its branches that has room for one. Where lines crowd so that two labels would lie on each other, one is left out.

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

/** A label for each branch of each level, the longest branch first, placed as far as can be from `taken` places, edges and other labels. */
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
    const branches = branchesOf(crossingsOf(level, x.values, y.values, z.values));
    branches.forEach((branch, k) => {
      const placed = branch
        .map((label) => ({ label, place: placeOf(label, x, y) }))
        .filter(({ place }) => k === 0 || offEdges(place))
        .filter(({ place }) => labels.every((other) => standApart(place, placeOf(other, x, y))));
      if (placed.length === 0) return;
      const best = placed.reduce((a, b) => (room(b.place, places) > room(a.place, places) ? b : a));
      if (k > 0 && room(best.place, places) < leastRoom) return;
      labels.push({ level, x: best.label.x, y: best.label.y, steep: best.label.steep });
      places.push(best.place);
    });
  }
  return labels;
}

/** Whether two labels leave each other legible on a narrow page, where one is about this wide and high. */
function standApart([x, y]: Place, [otherX, otherY]: Place): boolean {
  return Math.abs(x - otherX) > 0.15 || Math.abs(y - otherY) > 0.08;
}

/** Whether a label is whole within a narrow figure. */
function offEdges([x, y]: Place): boolean {
  return x > 0.08 && x < 0.85 && y > 0.05 && y < 0.95;
}

/** What a further label of a level needs, as a share of the figure: on a narrow page a label is about this wide. */
const leastRoom = 0.1;

/** The place of a point of the grid. */
export function placeOf({ x, y }: { x: number; y: number }, xAxis: GridAxis, yAxis: GridAxis): Place {
  return [along(xAxis, x), along(yAxis, y)];
}

/** A point where a level crosses a grid line; `cells` are the two cells that meet there. */
interface Crossing extends LevelLabel {
  readonly cells: readonly [string, string];
}

/** The points where a level crosses the grid lines, found by straight lines between grid points. */
function crossingsOf(
  level: number,
  x: readonly number[],
  y: readonly number[],
  z: readonly (readonly (number | null)[])[],
): Crossing[] {
  const cell = (i: number, j: number): string => `${i} ${j}`;
  return z.flatMap((row, j) =>
    row.flatMap((value, i): Crossing[] => {
      const right = fractionAt(level, value, row[i + 1]);
      const above = fractionAt(level, value, z[j + 1]?.[i]);
      const along = (from: number, to: number | undefined, part: number) => from + part * (to! - from);
      return [
        ...(right === undefined
          ? []
          : [
              {
                level,
                x: along(x[i]!, x[i + 1], right),
                y: y[j]!,
                steep: true,
                cells: [cell(i, j), cell(i, j - 1)] as const,
              },
            ]),
        ...(above === undefined
          ? []
          : [
              {
                level,
                x: x[i]!,
                y: along(y[j]!, y[j + 1], above),
                steep: false,
                cells: [cell(i, j), cell(i - 1, j)] as const,
              },
            ]),
      ];
    }),
  );
}

/** Crossings that one line runs through, the longest line first: two of one cell lie on the same line. */
function branchesOf(crossings: readonly Crossing[]): Crossing[][] {
  const branches: { cells: Set<string>; crossings: Crossing[] }[] = [];
  for (const crossing of crossings) {
    const met = branches.filter(({ cells }) => crossing.cells.some((cell) => cells.has(cell)));
    for (const branch of met) branches.splice(branches.indexOf(branch), 1);
    branches.push({
      cells: new Set([...crossing.cells, ...met.flatMap(({ cells }) => [...cells])]),
      crossings: [...met.flatMap((branch) => branch.crossings), crossing],
    });
  }
  return branches.map((branch) => branch.crossings).sort((a, b) => b.length - a.length);
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
