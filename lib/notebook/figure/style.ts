// How figures look: colours, dashes and markers that tell series apart, and the layout all figures share.
// Text and axes are a middle grey on a transparent ground, so that a figure stands on a white page and on a dark one.

import { numberText } from "../digits.js";
import { logarithmicTicks, roundValues } from "./ticks.js";
import { wrapped } from "./words.js";
import type { PlotAxis } from "./axis.js";

/** A plotly trace or layout part as plain data: plotly itself cannot be loaded in Node. */
export type PlotlyPart = Readonly<Record<string, unknown>>;

/**
 * The colours of series, in order: blue, vermillion, bluish green, reddish purple.
 *
 * They are the four of the eight published colours with a contrast of at least 3:1 on white as well as on #14171a.
 * @source Okabe, M.; Ito, K. (2008) Color Universal Design: how to make figures and presentations that are friendly to
 *   colorblind people, J*FLY, https://jfly.uni-koeln.de/color/ (from memory).
 */
export const seriesColors = ["#0072B2", "#D55E00", "#009E73", "#CC79A7"] as const;

/** Text, axes, limits and marks: at least 4:1 on white and on #14171a. */
export const neutralColor = "#7b7b7b";

/** Dashes in the order of the series; six are as many as stay apart without colour. */
export const dashes = ["solid", "dash", "dot", "dashdot", "longdash", "longdashdot"] as const;

/** Marker shapes in the order of the series, one for each dash. */
export const symbols = ["circle", "square", "diamond", "triangle-up", "x", "cross"] as const;

/** The tint of a region: too weak to be told by alone, so every region has an outline and a text label too. */
export const tintOpacity = 0.16;

/** The look of the series at `index`, 0 to 5: its dash and its marker are its own, whatever its colour. */
export function lookOf(index: number): { color: string; dash: string; symbol: string } {
  return { color: seriesColors[index % seriesColors.length]!, dash: dashes[index]!, symbol: symbols[index]! };
}

/** `#rrggbb` as a colour of the given opacity. */
export function tinted(color: string, opacity = tintOpacity): string {
  const [r, g, b] = [1, 3, 5].map((start) => parseInt(color.slice(start, start + 2), 16));
  return `rgba(${r}, ${g}, ${b}, ${opacity})`;
}

/** The layout every figure shares, around its own axes and shapes; one that needs no height of its own takes that of the page. */
export function layoutOf({
  x,
  y,
  height,
  ...parts
}: {
  x: PlotlyPart;
  y: PlotlyPart;
  height?: number;
  shapes?: readonly PlotlyPart[];
  annotations?: readonly PlotlyPart[];
  showlegend?: boolean;
}): object {
  return {
    autosize: true,
    ...(height === undefined ? {} : { height }),
    paper_bgcolor: "rgba(0,0,0,0)",
    plot_bgcolor: "rgba(0,0,0,0)",
    font: { family: "inherit", size: 13, color: neutralColor },
    margin: { l: 8, r: 16, t: 32, b: 8 },
    dragmode: false,
    hovermode: "closest",
    hoverlabel: { bgcolor: "#ffffff", bordercolor: neutralColor, font: { color: "#14171a" }, align: "left" },
    legend: {
      orientation: "h",
      x: 0,
      xanchor: "left",
      y: 0,
      yref: "container",
      yanchor: "bottom",
      tracegroupgap: 0,
    },
    xaxis: { ...axisLook, ...x },
    yaxis: { ...axisLook, ...y },
    ...parts,
  };
}

/** The plotly axis of a checked axis: its title, its range, and few enough ticks and letters a line for a narrow page. */
export function plotlyAxis(
  { title, logarithmic, range }: PlotAxis,
  { ticks: most = 7, titleWidth = 34 } = {},
): PlotlyPart {
  const [low, high] = range;
  const ticks = logarithmic ? logarithmicTicks(low, high, most) : roundValues({ low, high, count: most - 1 });
  return {
    title: { text: wrapped(title, titleWidth), standoff: 10, font: { size: 14 } },
    type: logarithmic ? "log" : "linear",
    range: logarithmic ? range.map(Math.log10) : range,
    tickmode: "array",
    tickvals: ticks,
    ticktext: ticks.map((tick) => numberText(tick, 12)),
  };
}

const axisLook = {
  automargin: true,
  fixedrange: true,
  showline: true,
  linecolor: neutralColor,
  ticks: "outside",
  tickcolor: neutralColor,
  gridcolor: tinted(neutralColor, 0.22),
  zeroline: false,
};
