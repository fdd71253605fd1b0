// Values with their intervals, one below the other: an assessment at a glance, each against its target.

import { checkNumber, InputError, refuseUnknownKeys } from "../../door.js";
import type { Interval } from "../../result.js";
import { intervalText } from "../digits.js";
import type { FigureContent, TableContent } from "../content.js";
import { axisRule, checkAxis, checkLimits, limitsOf, plotAxis } from "./axis.js";
import type { Axis, Limits, PlotAxis } from "./axis.js";
import { layoutOf, lookOf, neutralColor, plotlyAxis, tinted, type PlotlyPart } from "./style.js";
import { axisText, captionOf, checkCaption, hoverFormat, hoverLine, levelText } from "./words.js";
import { plainText, quantityText, sentence, windowText, wrapped } from "./words.js";

/** One value with its interval; `target` is the window it should lie in, one limit of which may be left out. */
export interface IntervalRow extends Interval {
  readonly label: string;
  readonly target?: readonly [number | undefined, number | undefined];
}

/** What an interval figure shows. `conditions` says formulation and conditions and stands under the figure. */
export interface IntervalFigure {
  readonly caption: string;
  readonly conditions: string;
  /** What the figure shows, in words, for those who cannot see it. Written from the numbers unless given. */
  readonly alternativeText?: string;
  readonly axis: Axis;
  /** From top to bottom; all on the one axis, and all with intervals of the same level. */
  readonly rows: readonly IntervalRow[];
  /** A value that every row is seen against, as an upright line: such as the factor 1, where nothing changes. */
  readonly reference?: { readonly label: string; readonly at: number };
}

/**
 * Builds a figure of values with their intervals, each beside its target window.
 *
 * The marker's shape says whether a value lies inside its target, outside it, or has none; the target is a tinted strip
 * with a line at each limit. Rows may be spread from results: `{ label: "viscosity", ...viscosity }`.
 * @throws InputError when there are no rows, when a number is not finite or not positive on a logarithmic axis, when
 *   an interval is upside down, when levels differ, when a target has no extent.
 * @example
 * ```ts
 * import { intervalFigure } from "resinwright/notebook";
 * const figure = intervalFigure({
 *   caption: "Viscosity of two trials",
 *   conditions: "Invented resins, 25 °C",
 *   axis: { label: "viscosity", unit: "mPa s" },
 *   rows: [
 *     { label: "trial 1", value: 447.3, low: 301.2, high: 612.9, level: 0.95, target: [undefined, 900] },
 *     { label: "trial 2", value: 980, low: 910, high: 1060, level: 0.95, target: [undefined, 900] },
 *   ],
 * });
 * figure.table.rows[0]; // → ["trial 1", 447.3, 301.2, 612.9, "at most 900", "inside"]
 * ```
 */
export function intervalFigure(figure: IntervalFigure): FigureContent {
  checkIntervalFigure(figure);
  const { rows, reference } = figure;
  const axis = plotAxis(figure.axis, [
    ...rows.flatMap(({ value, low, high }) => [value, low, high]),
    ...limitsOf(rows.map(targetOf)),
    ...(reference === undefined ? [] : [reference.at]),
  ]);
  return {
    kind: "figure",
    caption: captionOf(figure),
    alternativeText: figure.alternativeText ?? describe(figure, axis),
    data: [whiskers(rows), ...valueTraces(rows, axis)],
    layout: layoutOf({
      x: valueAxis(axis),
      y: rowAxis(rows.map(({ label }) => label)),
      height: heightOf(rows) + 20 * 4,
      shapes: [...targetShapes(rows, axis), ...(reference === undefined ? [] : [referenceShape(reference)])],
      showlegend: true,
    }),
    table: tableBehind(figure),
  };
}

/** The height of a figure of named rows: room between the middles of two rows for half of each label, and for the other axis. */
export function heightOf(rows: readonly { label: string }[]): number {
  const lines = rows.map(({ label }) => rowLabel(label).split("<br>").length);
  const between = lines.map((count, i) => (count + (lines[i + 1] ?? count)) / 2);
  return 80 + rows.length * (12 + 18 * Math.max(...between));
}

/** The axis of the values of named rows: the names leave it half of a narrow page. */
export function valueAxis(axis: PlotAxis): PlotlyPart {
  return plotlyAxis(axis, { ticks: 4, titleWidth: 22 });
}

/** The upright axis of named rows, the first on top. */
export function rowAxis(labels: readonly string[]): PlotlyPart {
  return {
    tickmode: "array",
    tickvals: labels.map((_, i) => i),
    ticktext: labels.map(rowLabel),
    range: [labels.length - 0.4, -0.6],
    showgrid: false,
  };
}

function rowLabel(label: string): string {
  return wrapped(label, 18);
}

/** Each interval as a line with end strokes; the gaps between rows are `null`. */
function whiskers(rows: readonly IntervalRow[]): PlotlyPart {
  return {
    type: "scatter",
    mode: "lines+markers",
    name: plainText(levelText(rows[0]!.level)),
    x: rows.flatMap(({ low, high }) => [low, high, null]),
    y: rows.flatMap((_, i) => [i, i, null]),
    line: { color: neutralColor, width: 2 },
    marker: { symbol: "line-ns", size: 12, line: { color: neutralColor, width: 2 } },
    hoverinfo: "skip",
  };
}

/** The values, one trace for each kind of marker, so that the legend explains the markers. */
function valueTraces(rows: readonly IntervalRow[], axis: PlotAxis): PlotlyPart[] {
  const format = hoverFormat(rows.flatMap(({ low, high }) => [low, high]));
  const interval =
    `%{customdata[0]:${format}} to %{customdata[1]:${format}} ${plainText(axis.unit)}`.trimEnd();
  return markerKinds.flatMap(({ place, name, symbol, color }) => {
    const shown = rows.map((row, i) => ({ row, i })).filter(({ row }) => placeOf(row) === place);
    if (shown.length === 0) return [];
    const values = shown.map(({ row }) => row.value);
    return [
      {
        type: "scatter",
        mode: "markers",
        name,
        x: values,
        y: shown.map(({ i }) => i),
        text: shown.map(({ row }) => plainText(row.label)),
        customdata: shown.map(({ row }) => [row.low, row.high]),
        marker: { symbol, color, size: 13 },
        hovertemplate: `<b>%{text}</b><br>${hoverLine(axis, "x", values)}<br>${plainText(levelText(rows[0]!.level))}: ${interval}<extra></extra>`,
      },
    ];
  });
}

const markerKinds = [
  { place: "none", name: "value", symbol: "diamond", color: lookOf(0).color },
  { place: "inside", name: "value inside its target", symbol: "circle", color: lookOf(0).color },
  { place: "outside", name: "value outside its target", symbol: "x", color: lookOf(1).color },
] as const;

/** Each target as a tinted strip with its limits; the first strip stands for all of them in the legend. */
function targetShapes(rows: readonly IntervalRow[], { range }: PlotAxis): PlotlyPart[] {
  const first = rows.findIndex((row) => row.target !== undefined);
  return rows.flatMap((row, i) => {
    if (row.target === undefined) return [];
    const { from, to } = targetOf(row);
    const tall = { xref: "x", yref: "y", y0: i - 0.36, y1: i + 0.36, layer: "below" };
    const ends = { x0: from ?? range[0], x1: to ?? range[1] };
    const strip = { type: "rect", ...tall, ...ends, line: { width: 0 }, fillcolor: tinted(neutralColor) };
    const line = { color: neutralColor, width: 2, dash: "dash" };
    const limits = [from, to].filter((limit) => limit !== undefined);
    return [
      i === first ? { ...strip, showlegend: true, name: "target" } : strip,
      ...limits.map((limit) => ({ type: "line", ...tall, x0: limit, x1: limit, line })),
    ];
  });
}

function referenceShape({ label, at }: { label: string; at: number }): PlotlyPart {
  const line = { color: neutralColor, width: 2, dash: "dot" };
  const across = { xref: "x", x0: at, x1: at, yref: "paper", y0: 0, y1: 1 };
  return { type: "line", layer: "below", ...across, line, showlegend: true, name: plainText(label) };
}

function tableBehind({ caption, axis, rows }: IntervalFigure): TableContent {
  const number = (name: string) => ({ name, unit: axis.unit, align: "right" }) as const;
  const withTarget = rows.some((row) => row.target !== undefined);
  const target = [
    { name: "target", unit: axis.unit, align: "right" } as const,
    { name: "place", align: "left" } as const,
  ];
  return {
    kind: "table",
    caption: sentence(caption),
    columns: [
      { name: "", align: "left" },
      number(axis.label),
      number(`low end of ${levelText(rows[0]!.level)}`),
      number("high end"),
      ...(withTarget ? target : []),
    ],
    rows: rows.map((row) => [
      row.label,
      row.value,
      row.low,
      row.high,
      ...(withTarget
        ? [row.target === undefined ? null : windowText(targetOf(row)), placeText(row) ?? null]
        : []),
    ]),
    rowHeader: true,
  };
}

function describe({ rows, axis: { unit }, reference }: IntervalFigure, axis: PlotAxis): string {
  return [
    `Values with their ${levelText(rows[0]!.level)} over ${axisText(axis)}.`,
    ...(reference === undefined ? [] : [`Line at ${quantityText(reference.at, unit)}: ${reference.label}.`]),
    ...rows.map((row) => {
      const place =
        row.target === undefined ? "" : `; target ${windowText(targetOf(row), unit)}: ${placeText(row)}`;
      return `${row.label}: ${`${intervalText(row)} ${unit ?? ""}`.trimEnd()}${place}.`;
    }),
  ].join(" ");
}

/** Where a value lies, and whether its interval says otherwise. */
function placeText(row: IntervalRow): string | undefined {
  const place = placeOf(row);
  if (place === "none") return undefined;
  const { from = -Infinity, to = Infinity } = targetOf(row);
  if (place === "inside")
    return row.low >= from && row.high <= to ? "inside" : "inside, interval reaches outside";
  return row.high < from || row.low > to ? "outside" : "outside, interval reaches inside";
}

function placeOf(row: IntervalRow): "none" | "inside" | "outside" {
  if (row.target === undefined) return "none";
  const { from = -Infinity, to = Infinity } = targetOf(row);
  return row.value >= from && row.value <= to ? "inside" : "outside";
}

function targetOf({ target }: IntervalRow): Limits {
  return { from: target?.[0], to: target?.[1] };
}

function checkIntervalFigure(figure: IntervalFigure): void {
  const where = checkCaption("intervalFigure", figure);
  const { axis, rows, reference } = figure;
  refuseUnknownKeys(where, figure, ["caption", "conditions", "alternativeText", "axis", "rows", "reference"]);
  checkAxis(`${where}: axis`, axis);
  if (reference !== undefined) {
    const place = `${where}: reference "${reference.label}"`;
    refuseUnknownKeys(place, reference, ["label", "at"]);
    checkNumber(reference.at, { where: place, field: "at", ...axisRule(axis) });
  }
  if (rows.length === 0) throw new InputError(`${where}: rows is empty; give at least one row`);
  for (const row of rows) checkRow(`${where}: row "${row.label}"`, row, figure);
}

function checkRow(where: string, row: IntervalRow, { axis, rows }: IntervalFigure): void {
  for (const field of ["value", "low", "high"] as const) {
    checkNumber(row[field], { where, field, ...axisRule(axis) });
  }
  checkNumber(row.level, {
    where,
    field: "level",
    min: 0,
    max: 1,
    advice: "say which interval it is, 0.95 for 95 %",
  });
  if (row.low > row.value || row.value > row.high) {
    const given = `value is ${row.value}, low is ${row.low} and high is ${row.high}`;
    throw new InputError(`${where}: ${given}; low must not be above value, nor value above high`);
  }
  if (row.level !== rows[0]!.level) {
    const other = `the first row has ${rows[0]!.level}`;
    throw new InputError(
      `${where}: level is ${row.level} and ${other}; show intervals of one level in one figure`,
    );
  }
  if (row.target !== undefined) checkLimits(`${where}: target`, axis, targetOf(row));
}
