// Lines and points on two axes: a model with its interval, measurements, target windows, and the chosen recipe.

import { checkNumber, InputError, refuseUnknownKeys, show, unknownName } from "../../door.js";
import type { FigureContent } from "../content.js";
import { checkAxis, checkAxisNumbers, limitsOf, plotAxis, type Axis, type PlotAxis } from "./axis.js";
import { describeLines, tableOfLines } from "./lineWords.js";
import {
  bandShapes,
  checkBands,
  checkMarks,
  freeSide,
  markShapes,
  markTraces,
  type Band,
  type Mark,
} from "./marks.js";
import { dashes, layoutOf, lookOf, plotlyAxis, tinted, type PlotlyPart } from "./style.js";
import {
  captionOf,
  checkCaption,
  hoverBox,
  hoverFormat,
  hoverLine,
  levelText,
  plainText,
  wrapped,
} from "./words.js";

/** One line or set of points. `low`, `high` and their `level` (0 to 1) add the interval of every point. */
export interface Series {
  readonly name: string;
  readonly x: readonly number[];
  readonly y: readonly number[];
  readonly low?: readonly number[];
  readonly high?: readonly number[];
  readonly level?: number;
  /** A line (default) for what is calculated, points for what is measured, or both. */
  readonly style?: "line" | "points" | "both";
}

/** What a line figure shows. `conditions` says formulation and conditions and stands under the figure. */
export interface LineFigure {
  readonly caption: string;
  readonly conditions: string;
  /** What the figure shows, in words, for those who cannot see it. Written from the numbers unless given. */
  readonly alternativeText?: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly series: readonly Series[];
  readonly bands?: readonly Band[];
  readonly marks?: readonly Mark[];
}

/**
 * Builds a figure of one to six series over two axes.
 *
 * Series differ in dash and marker shape as well as in colour. An interval is a shaded band around a line and a bar at
 * a point. Bands are target windows, marks point out a recipe; both carry their label. The table behind the figure
 * holds every plotted number.
 * @throws InputError when series are missing, too many, of different lengths or not finite, when a logarithmic axis
 *   meets a value that is not positive, when an interval is upside down or has no level, when a band has no extent.
 * @example
 * ```ts
 * import { lineFigure } from "resinwright/notebook";
 * const figure = lineFigure({
 *   caption: "Viscosity against temperature",
 *   conditions: "Invented resin, no filler",
 *   x: { label: "temperature", unit: "°C" },
 *   y: { label: "viscosity", unit: "mPa s", logarithmic: true },
 *   series: [{ name: "model", x: [20, 30, 40], y: [1200, 640, 370] }],
 *   bands: [{ label: "target", axis: "y", from: 200, to: 900 }],
 * });
 * figure.caption; // → "Viscosity against temperature. Invented resin, no filler."
 * figure.table.rows; // → [[20, 1200], [30, 640], [40, 370]]
 * ```
 */
export function lineFigure(figure: LineFigure): FigureContent {
  checkLineFigure(figure);
  const { bands = [], marks = [], series } = figure;
  const x = plotAxis(figure.x, [
    ...series.flatMap((one) => one.x),
    ...limitsOf(bands.filter((band) => band.axis === "x")),
    ...marks.map((mark) => mark.x),
  ]);
  const y = plotAxis(figure.y, [
    ...series.flatMap((one) => [...one.y, ...(one.low ?? []), ...(one.high ?? [])]),
    ...limitsOf(bands.filter((band) => band.axis === "y")),
    ...marks.flatMap((mark) => mark.y ?? []),
  ]);
  const axes = { x, y };
  return {
    kind: "figure",
    caption: captionOf(figure),
    alternativeText: figure.alternativeText ?? describeLines(figure, axes),
    data: [...series.flatMap((one, i) => seriesTraces(one, i, axes)), ...markTraces(marks, axes)],
    layout: layoutOf({
      x: plotlyAxis(x),
      y: plotlyAxis(y),
      shapes: [
        ...bands.flatMap((band) => bandShapes(band, axes[band.axis], freeSide(marks, x))),
        ...markShapes(marks, x),
      ],
      showlegend: true,
    }),
    table: tableOfLines(figure),
  };
}

interface Ends {
  readonly low: readonly number[];
  readonly high: readonly number[];
}

function seriesTraces(series: Series, index: number, { x, y }: { x: PlotAxis; y: PlotAxis }): PlotlyPart[] {
  const { name, style = "line", low, high } = series;
  const { color, dash, symbol } = lookOf(index);
  const interval = low === undefined || high === undefined ? undefined : { low, high };
  const lines = [hoverLine(x, "x", series.x), hoverLine(y, "y", series.y)];
  if (interval !== undefined) lines.push(intervalHover(series, y.unit));
  const trace = {
    type: "scatter",
    mode: { line: "lines", points: "markers", both: "lines+markers" }[style],
    name: wrapped(interval && style === "points" ? `${name}, ${levelText(series.level!)}` : name, 34),
    x: series.x,
    y: series.y,
    line: { color, dash, width: 2.5 },
    marker: { color, symbol, size: 9 },
    legendrank: 1000 + 2 * index,
    hovertemplate: hoverBox(name, lines),
    ...(interval && { customdata: interval.low.map((value, i) => [value, interval.high[i]]) }),
  };
  if (interval === undefined) return [trace];
  if (style === "points") return [{ ...trace, error_y: errorBars(series.y, interval, color) }];
  // The band is drawn first, under the line, and stands after it in the legend.
  return [{ ...intervalBand(series, interval, color), legendrank: trace.legendrank + 1 }, trace];
}

function errorBars(y: readonly number[], { low, high }: Ends, color: string): PlotlyPart {
  return {
    type: "data",
    symmetric: false,
    array: high.map((value, i) => value - y[i]!),
    arrayminus: low.map((value, i) => y[i]! - value),
    color,
    thickness: 1.5,
    width: 4,
  };
}

/** The interval as one closed outline: along the upper ends and back along the lower ones. */
function intervalBand({ name, x, level }: Series, { low, high }: Ends, color: string): PlotlyPart {
  return {
    type: "scatter",
    mode: "lines",
    name: wrapped(`${name}, ${levelText(level!)}`, 34),
    x: [...x, ...x.toReversed()],
    y: [...high, ...low.toReversed()],
    fill: "toself",
    fillcolor: tinted(color),
    line: { color, width: 0.75 },
    hoverinfo: "skip",
  };
}

function intervalHover({ low = [], high = [], level }: Series, unit: string): string {
  const format = hoverFormat([...low, ...high]);
  const ends = `%{customdata[0]:${format}} to %{customdata[1]:${format}}`;
  return `${plainText(levelText(level!))}: ${ends} ${plainText(unit)}`.trimEnd();
}

const styles = ["line", "points", "both"];

function checkLineFigure(figure: LineFigure): void {
  const where = checkCaption("lineFigure", figure);
  const { series, bands = [], marks = [] } = figure;
  refuseUnknownKeys(where, figure, figureKeys);
  checkAxis(`${where}: x axis`, figure.x);
  checkAxis(`${where}: y axis`, figure.y);
  if (series.length === 0) throw new InputError(`${where}: series is empty; give at least one series`);
  if (series.length > dashes.length) {
    const advice = `at most ${dashes.length} can be told apart; split the figure`;
    throw new InputError(`${where}: series holds ${series.length}; ${advice}`);
  }
  for (const one of series) checkSeries(`${where}: series "${one.name}"`, one, figure);
  checkBands(where, bands, figure);
  checkMarks(where, marks, figure);
}

function checkSeries(where: string, series: Series, axes: { x: Axis; y: Axis }): void {
  const { x, style = "line" } = series;
  refuseUnknownKeys(where, series, seriesKeys);
  if (!styles.includes(style)) throw new InputError(unknownName(where, "style", style, styles));
  if (!Array.isArray(x) || x.length === 0) {
    throw new InputError(`${where}: x is ${Array.isArray(x) ? "empty" : show(x)}; give at least one value`);
  }
  checkAxisNumbers(where, axes.x, "x", x);
  for (const field of ["y", "low", "high"] as const) {
    const values = series[field];
    if (values === undefined && field !== "y") continue;
    if (values?.length !== x.length) {
      throw new InputError(
        `${where}: ${field} has ${values?.length ?? 0} values and x has ${x.length}; give one for each x`,
      );
    }
    checkAxisNumbers(where, axes.y, field, values);
  }
  checkEnds(where, series);
}

function checkEnds(where: string, { y, low, high, level }: Series): void {
  if (low === undefined && high === undefined && level === undefined) return;
  if (low === undefined || high === undefined) {
    throw new InputError(
      `${where}: ${low ? "high" : "low"} is missing; an interval needs low, high and level`,
    );
  }
  checkNumber(level, {
    where,
    field: "level",
    min: 0,
    max: 1,
    advice: "say which interval it is, 0.95 for 95 %",
  });
  const wrong = y.findIndex((value, i) => low[i]! > value || value > high[i]!);
  if (wrong === -1) return;
  const ends = `low[${wrong}] is ${low[wrong]} and high[${wrong}] is ${high[wrong]}`;
  throw new InputError(
    `${where}: y[${wrong}] is ${y[wrong]}, ${ends}; low must not be above y, nor y above high`,
  );
}

const figureKeys = ["caption", "conditions", "alternativeText", "x", "y", "series", "bands", "marks"];
const seriesKeys = ["name", "x", "y", "low", "high", "level", "style"];
