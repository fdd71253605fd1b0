// A contour figure for those who cannot see it: what it shows in words, and a thinned grid of its numbers as a table.

import { numberText } from "../digits.js";
import type { TableContent } from "../content.js";
import { spanOf, type PlotAxis } from "./axis.js";
import type { ContourFigure, GridAxis, GridValues, Region } from "./contour.js";
import { markText } from "./marks.js";
import { thinned } from "./thinned.js";
import { axisText, counted, quantityText, sentence, spanText, titleOf, windowText } from "./words.js";

/** A grid point by its place among the values of x and of y. */
export type GridPoint = readonly [number, number];

/** What the figure shows: the property, its extremes, the lines drawn, the region and how far it reaches, the marks. */
export function describeContours(
  figure: ContourFigure,
  axes: { x: PlotAxis; y: PlotAxis },
  levels: readonly number[],
): string {
  const { z, feasible, marks = [] } = figure;
  const [low, high] = spanOf(knownValues(z));
  return [
    `Contour lines of ${titleOf(z)} over ${axisText(axes.x)} and ${axisText(axes.y)}.`,
    `Lowest ${valueAt(figure, low)}; highest ${valueAt(figure, high)}.`,
    `Lines at ${levels.map((level) => numberText(level)).join(", ")} ${z.unit ?? ""}`.trimEnd() + ".",
    ...(feasible === undefined ? [] : [regionText(figure, feasible)]),
    ...marks.map((mark) => `Mark ${markText(mark, axes)}.`),
  ].join(" ");
}

/** At most 12 by 12 of the numbers, first and last grid line included: one row for each y, one column for each x. */
export function tableOfContours({ caption, x, y, z, feasible, marks = [] }: ContourFigure): TableContent {
  const columns = thinned([...x.values.keys()], 12);
  const rows = thinned([...y.values.keys()], 12);
  const besides = [
    `${titleOf(z)}: one row for each ${titleOf(y)}, one column for each ${titleOf(x)}.`,
    ...(columns.length === x.values.length && rows.length === y.values.length
      ? []
      : [
          `Thinned to ${columns.length} of ${x.values.length} columns and ${rows.length} of ${y.values.length} rows.`,
        ]),
    ...(feasible === undefined
      ? []
      : [`Region: ${feasible.label} (${z.label} ${windowText(feasible, z.unit)}).`]),
    ...marks.map((mark) => `Mark: ${markText(mark, { x, y })}.`),
  ];
  return {
    kind: "table",
    caption: [sentence(caption), ...besides].join(" "),
    columns: [
      { name: titleOf(y), align: "right" },
      ...columns.map((i) => ({ name: numberText(x.values[i]!), align: "right" as const })),
    ],
    rows: rows.map((j) => [numberText(y.values[j]!), ...columns.map((i) => z.values[j]![i]!)]),
    rowHeader: true,
  };
}

/** The values that are there. */
export function knownValues({ values }: GridValues): number[] {
  return values.flat().filter((value) => value !== null);
}

/** The grid points that lie in a region. */
export function regionOf({ z }: ContourFigure, { from = -Infinity, to = Infinity }: Region): GridPoint[] {
  return z.values.flatMap((row, j) =>
    row.flatMap((value, i): GridPoint[] => (value !== null && value >= from && value <= to ? [[i, j]] : [])),
  );
}

function regionText(figure: ContourFigure, region: Region): string {
  const points = regionOf(figure, region);
  const name = `Region ${region.label} (${figure.z.label} ${windowText(region, figure.z.unit)})`;
  if (points.length === 0) return `${name}: no grid point lies in it.`;
  const reach = (axis: GridAxis, k: 0 | 1): string =>
    `${axis.label} ${spanText(spanOf(points.map((point) => axis.values[point[k]]!)), axis.unit)}`;
  const share = `${points.length} of ${counted(knownValues(figure.z).length, "grid point")}`;
  return `${name}: ${share}, within ${reach(figure.x, 0)} and ${reach(figure.y, 1)}.`;
}

function valueAt({ x, y, z }: ContourFigure, value: number): string {
  const j = z.values.findIndex((row) => row.includes(value));
  const place = [x.values[z.values[j]!.indexOf(value)]!, y.values[j]!] as const;
  return `${quantityText(value, z.unit)} at ${quantityText(place[0], x.unit)} and ${quantityText(place[1], y.unit)}`;
}
