// What stands on a figure beside its data: target windows with their limits, and marks such as the chosen recipe.

import { checkNumber, refuseUnknownKeys } from "../../door.js";
import { axisRule, checkLimits, type Axis, type Limits, type PlotAxis } from "./axis.js";
import { neutralColor, tinted, type PlotlyPart } from "./style.js";
import { hoverBox, hoverLine, plainText, quantityText, windowText, wrapped } from "./words.js";

/** A window on one axis, drawn as a tinted strip with dashed limits and its label: a target. One limit may be left out. */
export interface Band extends Limits {
  readonly label: string;
  readonly axis: "x" | "y";
}

/** A point to point out, or with `y` left out an upright line at `x`: the chosen recipe. */
export interface Mark {
  readonly label: string;
  readonly x: number;
  readonly y?: number;
}

/** The shapes of a window: the tint, a dashed line at each limit, and the label inside, on the `side` that is given for one across. */
export function bandShapes(
  { label, axis, from, to }: Band,
  plot: PlotAxis,
  side: "left" | "right" = "left",
): PlotlyPart[] {
  const [start, end] = [from ?? plot.range[0], to ?? plot.range[1]];
  const limit = (value: number): PlotlyPart => ({
    type: "line",
    layer: "below",
    ...across(axis, value, value),
    line: { color: neutralColor, width: 1.5, dash: "dash" },
  });
  const strip = {
    type: "rect",
    layer: "below",
    ...across(axis, start, end),
    line: { width: 0 },
    fillcolor: tinted(neutralColor),
    label: {
      text: wrapped(label, axis === "x" ? 14 : 24),
      // An upright strip may be narrower than its label, which then needs room on the side away from the edge.
      textposition: axis === "x" && placeAlong(plot, start) > 0.6 ? "top right" : `top ${side}`,
      textangle: 0,
      padding: 4,
    },
  };
  return [strip, ...[from, to].filter((value) => value !== undefined).map(limit)];
}

/** The traces of the marks that have a `y`, each with its label beside it, on the side where there is room. */
export function markTraces(marks: readonly Mark[], axes: { x: PlotAxis; y: PlotAxis }): PlotlyPart[] {
  return marks.filter(isPoint).map(({ label, x, y }) => ({
    type: "scatter",
    mode: "markers+text",
    x: [x],
    y: [y],
    text: [plainText(label)],
    textposition: placeAlong(axes.y, y) > 0.85 ? `bottom ${sideOf(axes.x, x)}` : `top ${sideOf(axes.x, x)}`,
    cliponaxis: false,
    marker: { symbol: "star", size: 15, color: neutralColor },
    showlegend: false,
    hovertemplate: hoverBox(label, [hoverLine(axes.x, "x", [x]), hoverLine(axes.y, "y", [y])]),
  }));
}

/** The side of a window across a figure that its label takes: away from the first upright line. */
export function freeSide(marks: readonly Mark[], x: PlotAxis): "left" | "right" {
  const upright = marks.find((mark) => !isPoint(mark));
  return upright !== undefined && placeAlong(x, upright.x) < 0.5 ? "right" : "left";
}

/** The upright lines of the marks that have no `y`. */
export function markShapes(marks: readonly Mark[], x: PlotAxis): PlotlyPart[] {
  const upright = marks.filter((mark) => !isPoint(mark));
  return upright.map((mark) => ({
    type: "line",
    ...across("x", mark.x, mark.x),
    line: { color: neutralColor, width: 2 },
    label: {
      text: plainText(mark.label),
      textangle: 0,
      textposition: "end",
      xanchor: placeAlong(x, mark.x) > 0.5 ? "right" : "left",
      padding: 6,
    },
  }));
}

/** A band in words, for the alternative text and the caption of the table: `"target (viscosity 200 to 900 mPa s)"`. */
export function bandText(band: Band, axis: Axis): string {
  return `${band.label} (${axis.label} ${windowText(band, axis.unit)})`;
}

/** A mark in words: `"chosen at temperature 30 °C, viscosity 640 mPa s"`. */
export function markText({ label, x, y }: Mark, axes: { x: Axis; y: Axis }): string {
  const height = y === undefined ? "" : `, ${axes.y.label} ${quantityText(y, axes.y.unit)}`;
  return `${label} at ${axes.x.label} ${quantityText(x, axes.x.unit)}${height}`;
}

/** Refuses bands that cannot be drawn. */
export function checkBands(where: string, bands: readonly Band[], axes: { x: Axis; y: Axis }): void {
  for (const band of bands) {
    const place = `${where}: band "${band.label}"`;
    refuseUnknownKeys(place, band, ["label", "axis", "from", "to"]);
    checkLimits(place, axes[band.axis], band);
  }
}

/** Refuses marks that cannot be drawn. */
export function checkMarks(where: string, marks: readonly Mark[], axes: { x: Axis; y: Axis }): void {
  for (const mark of marks) {
    const { label, x, y } = mark;
    const place = `${where}: mark "${label}"`;
    refuseUnknownKeys(place, mark, ["label", "x", "y"]);
    checkNumber(x, { where: place, field: "x", ...axisRule(axes.x) });
    if (y !== undefined) checkNumber(y, { where: place, field: "y", ...axisRule(axes.y) });
  }
}

/** Whether a mark is a point, not an upright line. */
export function isPoint(mark: Mark): mark is Mark & { y: number } {
  return mark.y !== undefined;
}

/** Plotly's two ends of a shape that lies across the whole figure at `from` to `to` of `axis`. */
function across(axis: "x" | "y", from: number, to: number): PlotlyPart {
  return axis === "x"
    ? { xref: "x", x0: from, x1: to, yref: "paper", y0: 0, y1: 1 }
    : { yref: "y", y0: from, y1: to, xref: "paper", x0: 0, x1: 1 };
}

/** Where `value` stands along an axis: 0 at its lower end, 1 at its upper end. */
function placeAlong({ range: [low, high], logarithmic }: PlotAxis, value: number): number {
  return logarithmic ? Math.log(value / low) / Math.log(high / low) : (value - low) / (high - low);
}

/** The side of a point on which its label has room. */
function sideOf(x: PlotAxis, value: number): "left" | "center" | "right" {
  const place = placeAlong(x, value);
  return place < 0.35 ? "right" : place > 0.65 ? "left" : "center";
}
