// A property over two axes as labelled contour lines: where in the plane of two ingredients (or settings) a recipe does what it must.

import { checkNumber, InputError, refuseUnknownKeys, show } from "../../door.js";
import { numberText } from "../digits.js";
import type { FigureContent } from "../content.js";
import { checkAxis, checkAxisNumbers, checkLimits, plotAxis, spanOf } from "./axis.js";
import type { Axis, Limits, PlotAxis } from "./axis.js";
import { describeContours, knownValues, regionOf, tableOfContours, type GridPoint } from "./contourWords.js";
import { levelLabels, placeOf } from "./contourLabels.js";
import { checkMarks, isPoint, markShapes, markTraces, type Mark } from "./marks.js";
import { layoutOf, neutralColor, plotlyAxis, seriesColors, tinted, type PlotlyPart } from "./style.js";
import { roundValues } from "./ticks.js";
import { captionOf, checkCaption, counted, hoverBox, hoverLine, titleOf } from "./words.js";
import { windowText, wrapped } from "./words.js";

/** An axis with the grid lines at which the property was calculated, each above the one before. */
export interface GridAxis extends Axis {
  readonly values: readonly number[];
}

/** The property: one row of values for each y, one value for each x; `null` where there is no such recipe. */
export interface GridValues {
  readonly label: string;
  readonly unit?: string;
  readonly values: readonly (readonly (number | null)[])[];
}

/** A region to point out: where the property lies between two values, one of which may be left out. */
export interface Region extends Limits {
  readonly label: string;
}

/** What a contour figure shows. `conditions` says formulation and conditions and stands under the figure. */
export interface ContourFigure {
  readonly caption: string;
  readonly conditions: string;
  /** What the figure shows, in words, for those who cannot see it. Written from the numbers unless given. */
  readonly alternativeText?: string;
  readonly x: GridAxis;
  readonly y: GridAxis;
  readonly z: GridValues;
  /** The values at which contour lines are drawn; round ones unless given. */
  readonly levels?: readonly number[];
  readonly feasible?: Region;
  readonly marks?: readonly Mark[];
}

/**
 * Builds a figure of contour lines, each labelled with its value, over a grid.
 *
 * The feasible region is tinted, outlined with heavy lines and labelled in place. Lines run straight between grid
 * points, so a finer grid gives truer lines. The table behind the figure is a grid of at most 12 by 12 of the same
 * numbers; its caption says how it was thinned.
 * @throws InputError when the grid is smaller than 2 by 2, not rising, not finite or not of the shape of the axes,
 *   when a logarithmic axis meets a value that is not positive, when the feasible region has no extent.
 * @example
 * ```ts
 * import { contourFigure } from "resinwright/notebook";
 * const figure = contourFigure({
 *   caption: "Viscosity over temperature and diluent",
 *   conditions: "Invented resin",
 *   x: { label: "diluent", unit: "%", values: [0, 20, 40] },
 *   y: { label: "temperature", unit: "°C", values: [20, 40] },
 *   z: { label: "viscosity", unit: "mPa s", values: [[2000, 900, 400], [700, 300, 130]] },
 *   feasible: { label: "pours well", from: 200, to: 800 },
 * });
 * figure.table.rows; // → [["20", 2000, 900, 400], ["40", 700, 300, 130]]
 * ```
 */
export function contourFigure(figure: ContourFigure): FigureContent {
  checkContourFigure(figure);
  const { feasible, marks = [] } = figure;
  const x = plotAxis({ range: ends(figure.x.values), ...figure.x }, []);
  const y = plotAxis({ range: ends(figure.y.values), ...figure.y }, []);
  const axes = { x, y };
  const levels = figure.levels ?? roundLevels(knownValues(figure.z));
  const middle = middleOfRegion(figure);
  return {
    kind: "figure",
    caption: captionOf(figure),
    alternativeText: figure.alternativeText ?? describeContours(figure, axes, levels),
    data: [
      ...(feasible === undefined ? [] : regionTraces(figure, feasible)),
      ...contourTraces(figure, axes, levels),
      labelTrace(figure, levels, middle),
      ...markTraces(marks, axes),
    ],
    layout: layoutOf({
      x: plotlyAxis(x),
      y: plotlyAxis(y),
      height: 460,
      shapes: markShapes(marks, x),
      annotations: feasible && middle ? [regionLabel(feasible, middle, axes)] : [],
      showlegend: true,
    }),
    table: tableOfContours(figure),
  };
}

interface Point {
  readonly x: number;
  readonly y: number;
}

/** One trace for evenly spaced levels; otherwise one a level, since plotly only spaces them evenly. */
function contourTraces(
  { x, y, z }: ContourFigure,
  axes: { x: PlotAxis; y: PlotAxis },
  levels: readonly number[],
): PlotlyPart[] {
  const runs = evenlySpaced(levels) ? [levels] : levels.map((level) => [level]);
  const lines = [
    hoverLine(axes.x, "x", x.values),
    hoverLine(axes.y, "y", y.values),
    hoverLine(z, "z", knownValues(z)),
  ];
  return runs.map((run, i) => ({
    type: "contour",
    name: wrapped(titleOf(z), 34),
    x: x.values,
    y: y.values,
    z: z.values,
    autocontour: false,
    contours: {
      coloring: "none",
      start: run[0],
      end: run.at(-1),
      size: run.length > 1 ? run[1]! - run[0]! : 1,
    },
    line: { color: neutralColor, width: 1.25, smoothing: 0 },
    showscale: false,
    showlegend: i === 0,
    legendgroup: "levels",
    ...(i === 0 ? { hovertemplate: hoverBox(z.label, lines) } : { hoverinfo: "skip" }),
  }));
}

function regionTraces({ x, y, z }: ContourFigure, { label, from, to }: Region): PlotlyPart[] {
  return [
    {
      type: "contour",
      name: wrapped(
        `${label}: ${z.label} ${windowText({ from, to }, z.unit?.replaceAll(" ", "\u00a0"))}`,
        34,
      ),
      x: x.values,
      y: y.values,
      z: z.values,
      contours: { type: "constraint", ...outsideOf({ from, to }) },
      fillcolor: tinted(seriesColors[2]),
      line: { color: seriesColors[2], width: 4, smoothing: 0 },
      showscale: false,
      showlegend: true,
      hoverinfo: "skip",
    },
  ];
}

/** Plotly tints where a constraint does not hold, so the region is given as what lies outside it. */
function outsideOf({ from, to }: Limits): PlotlyPart {
  if (from === undefined) return { operation: ">", value: to };
  return to === undefined ? { operation: "<", value: from } : { operation: "][", value: [from, to] };
}

/** The label of the region, at a grid point that lies in it. */
function regionLabel({ label }: Region, { x, y }: Point, axes: { x: PlotAxis; y: PlotAxis }): PlotlyPart {
  const scaled = (axis: PlotAxis, value: number): number => (axis.logarithmic ? Math.log10(value) : value);
  const text = `<b>${wrapped(label, 16)}</b>`;
  return { x: scaled(axes.x, x), y: scaled(axes.y, y), text, showarrow: false };
}

/** The grid point of the region nearest to its middle whose label keeps clear of the marks, or undefined where no grid point lies in it. */
function middleOfRegion(figure: ContourFigure): Point | undefined {
  const { x, y, feasible, marks = [] } = figure;
  const points = feasible === undefined ? [] : regionOf(figure, feasible);
  if (points.length === 0) return undefined;
  const at = ([i, j]: GridPoint): Point => ({ x: x.values[i]!, y: y.values[j]! });
  const taken = marks.filter(isPoint).map((mark) => placeOf(mark, x, y));
  const clear = points.filter((point) => {
    const [right, up] = placeOf(at(point), x, y);
    const apart = taken.every(([r, u]) => Math.abs(right - r) > labelWidth || Math.abs(up - u) > labelHeight);
    return apart && right > labelWidth / 2 && right < 1 - labelWidth / 2;
  });
  return at(nearestToMiddle(clear.length > 0 ? clear : points, points));
}

/** What a label and a mark take of a narrow figure, as shares of its width and height. */
const [labelWidth, labelHeight] = [0.3, 0.14];

/** The value of each level beside its line, kept off the label of the region and off the marks. */
function labelTrace(
  { x, y, z, marks = [] }: ContourFigure,
  levels: readonly number[],
  middle?: Point,
): PlotlyPart {
  const besides = [
    ...(middle === undefined ? [] : [middle]),
    ...marks.map((mark) => ({ y: y.values[0]!, ...mark })),
  ];
  const labels = levelLabels({ x, y, z, levels, taken: besides.map((point) => placeOf(point, x, y)) });
  return {
    type: "scatter",
    mode: "text",
    x: labels.map((label) => label.x),
    y: labels.map((label) => label.y),
    text: labels.map((label) => numberText(label.level)),
    textposition: labels.map(({ steep }) => (steep ? "middle right" : "top center")),
    hoverinfo: "skip",
    showlegend: false,
  };
}

function nearestToMiddle(candidates: readonly GridPoint[], region: readonly GridPoint[]): GridPoint {
  const mean = (k: 0 | 1): number => region.reduce((sum, point) => sum + point[k], 0) / region.length;
  const [i, j] = [mean(0), mean(1)];
  const distance = (point: GridPoint): number => (point[0] - i) ** 2 + (point[1] - j) ** 2;
  return candidates.reduce((best, point) => (distance(point) < distance(best) ? point : best));
}

/** About six round levels within the values; a property that is the same everywhere has that one level. */
function roundLevels(values: readonly number[]): number[] {
  const [low, high] = spanOf(values);
  return low === high ? [low] : roundValues({ low, high, count: 6 });
}

function evenlySpaced(levels: readonly number[]): boolean {
  const size = levels[1]! - levels[0]!;
  return levels.slice(1).every((level, k) => Math.abs(level - levels[k]! - size) <= 1e-9 * Math.abs(size));
}

function ends(values: readonly number[]): readonly [number, number] {
  return [values[0]!, values.at(-1)!];
}

function checkContourFigure(figure: ContourFigure): void {
  const where = checkCaption("contourFigure", figure);
  const { x, y, z, levels, feasible, marks = [] } = figure;
  refuseUnknownKeys(where, figure, figureKeys);
  checkGridAxis(`${where}: x axis`, x);
  checkGridAxis(`${where}: y axis`, y);
  checkGrid(`${where}: z`, figure);
  if (levels !== undefined) checkRising(where, "levels", levels, 1);
  if (feasible !== undefined) {
    const place = `${where}: feasible "${feasible.label}"`;
    refuseUnknownKeys(place, feasible, ["label", "from", "to"]);
    checkLimits(place, z, feasible);
  }
  checkMarks(where, marks, figure);
}

function checkGridAxis(where: string, axis: GridAxis): void {
  const { values, ...rest } = axis;
  checkAxis(where, rest);
  checkRising(where, "values", values, 2);
  checkAxisNumbers(where, axis, "values", values);
}

function checkRising(where: string, field: string, values: readonly number[], fewest: number): void {
  if (!Array.isArray(values) || values.length < fewest) {
    const given = Array.isArray(values) ? `has ${counted(values.length, "number")}` : `is ${show(values)}`;
    throw new InputError(`${where}: ${field} ${given}; give at least ${fewest}`);
  }
  values.forEach((value: unknown, i) => {
    checkNumber(value, { where, field: `${field}[${i}]` });
    if (i === 0 || values[i]! > values[i - 1]!) return;
    const pair = `${field}[${i}] is ${values[i]} after ${values[i - 1]}`;
    throw new InputError(`${where}: ${pair}; each value must be above the one before`);
  });
}

function checkGrid(where: string, { x, y, z }: ContourFigure): void {
  refuseUnknownKeys(where, z, ["label", "unit", "values"]);
  const wanted = `give ${y.values.length} rows (one for each y) of ${x.values.length} values (one for each x)`;
  if (z.values.length !== y.values.length) {
    throw new InputError(`${where}: values has ${counted(z.values.length, "row")}; ${wanted}`);
  }
  z.values.forEach((row, j) => {
    if (row.length !== x.values.length) {
      throw new InputError(`${where}: values[${j}] has ${counted(row.length, "value")}; ${wanted}`);
    }
    row.forEach((value, i) => {
      if (value !== null) checkNumber(value, { where, field: `values[${j}][${i}]`, advice: gapAdvice });
    });
  });
  if (knownValues(z).length === 0)
    throw new InputError(`${where}: values holds null only; give at least one number`);
}

const gapAdvice = "use null where there is no such recipe";

const figureKeys = ["caption", "conditions", "alternativeText", "x", "y", "z", "levels", "feasible", "marks"];
