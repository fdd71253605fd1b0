// A line figure for those who cannot see it: what it shows in words, and every plotted number as a table.

import type { TableColumn, TableContent } from "../content.js";
import { spanOf, type PlotAxis } from "./axis.js";
import type { LineFigure, Series } from "./line.js";
import { bandText, markText, type Band } from "./marks.js";
import { axisText, levelText, quantityText, sentence, spanText } from "./words.js";

interface Axes {
  readonly x: PlotAxis;
  readonly y: PlotAxis;
}

/** What the figure shows: axes with ranges, each series from first to last with its extremes, windows, marks. */
export function describeLines({ series, bands = [], marks = [] }: LineFigure, axes: Axes): string {
  return [
    `Drawn: ${axisText(axes.y)} against ${axisText(axes.x)}.`,
    ...series.map((one) => `${one.name}: ${courseText(one, axes)}.`),
    ...bands.flatMap((band) => [
      `Window ${bandText(band, axes[band.axis])}:`,
      `${series.map((one) => `${one.name} ${reachText(one, band, axes)}`).join("; ")}.`,
    ]),
    ...marks.map((mark) => `Mark ${markText(mark, axes)}.`),
  ].join(" ");
}

/** Every plotted number. Series over the same x stand side by side, others one below the other. */
export function tableOfLines(figure: LineFigure): TableContent {
  const { series, bands = [], marks = [] } = figure;
  const besides = [
    ...bands.map((band) => `Window: ${bandText(band, figure[band.axis])}.`),
    ...marks.map((mark) => `Mark: ${markText(mark, figure)}.`),
  ];
  const caption = [sentence(figure.caption), ...besides].join(" ");
  const shared = series.every(
    ({ x }) => x.length === series[0]!.x.length && x.every((v, i) => v === series[0]!.x[i]),
  );
  return { kind: "table", caption, ...(shared ? sideBySide(figure) : oneBelowTheOther(figure)) };
}

/** "3 points, 1200 mPa s at 20 °C to 370 mPa s at 40 °C, falling". */
function courseText({ x, y, level }: Series, axes: Axes): string {
  const at = (i: number): string =>
    `${quantityText(y[i]!, axes.y.unit)} at ${quantityText(x[i]!, axes.x.unit)}`;
  const interval = level === undefined ? "" : `, with ${levelText(level)}`;
  if (y.length === 1) return `1 point, ${at(0)}${interval}`;
  const [low, high] = spanOf(y);
  const extremes = `lowest ${at(y.indexOf(low))}, highest ${at(y.indexOf(high))}`;
  return `${y.length} points, ${at(0)} to ${at(y.length - 1)}, ${trendOf(y) ?? extremes}${interval}`;
}

function trendOf(y: readonly number[]): string | undefined {
  const steps = y.slice(1).map((value, i) => value - y[i]!);
  if (steps.every((step) => step === 0)) return "level";
  if (steps.every((step) => step >= 0)) return "rising";
  return steps.every((step) => step <= 0) ? "falling" : undefined;
}

/** Whether a series reaches a window, and where. */
function reachText(
  { x, y, style }: Series,
  { axis, from = -Infinity, to = Infinity }: Band,
  axes: Axes,
): string {
  const values = { x, y };
  const other = axis === "x" ? "y" : "x";
  const inside = values[axis].flatMap((value, i) => (value >= from && value <= to ? [i] : []));
  if (inside.length === x.length) return "inside throughout";
  if (inside.length > 0) {
    const span = spanText(spanOf(inside.map((i) => values[other][i]!)), axes[other].unit);
    return `inside at ${axes[other].label} ${span} (${inside.length} of ${x.length} points)`;
  }
  const sides = new Set(values[axis].map((value) => value < from));
  return sides.size > 1 && style !== "points" ? "crosses it between two points" : "does not reach it";
}

function sideBySide({ x, y, series }: LineFigure): Pick<TableContent, "columns" | "rows"> {
  const columns = series.flatMap(({ name, y: values, low, high }) => [
    { name, values },
    ...(low === undefined ? [] : [{ name: `${name}, low`, values: low }]),
    ...(high === undefined ? [] : [{ name: `${name}, high`, values: high }]),
  ]);
  return {
    columns: [numbers(x.label, x.unit), ...columns.map(({ name }) => numbers(`${y.label}: ${name}`, y.unit))],
    rows: series[0]!.x.map((value, i) => [value, ...columns.map(({ values }) => values[i]!)]),
  };
}

function oneBelowTheOther(figure: LineFigure): Pick<TableContent, "columns" | "rows" | "rowHeader"> {
  const { label, unit } = figure.y;
  const withEnds = figure.series.some(({ low }) => low !== undefined);
  const ends = withEnds ? [numbers(`${label}, low`, unit), numbers(`${label}, high`, unit)] : [];
  return {
    columns: [
      { name: "series", align: "left" },
      numbers(figure.x.label, figure.x.unit),
      numbers(label, unit),
      ...ends,
    ],
    rows: figure.series.flatMap(({ name, x, y, low, high }) =>
      x.map((value, i) => [name, value, y[i]!, ...(withEnds ? [low?.[i] ?? null, high?.[i] ?? null] : [])]),
    ),
    rowHeader: true,
  };
}

function numbers(name: string, unit?: string): TableColumn {
  return { name, unit, align: "right" };
}
