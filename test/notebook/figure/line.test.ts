import { describe, expect, it } from "vitest";
import { embed, extract } from "../../../lib/notebook/content.js";
import { lineFigure, type LineFigure, type Series } from "../../../lib/notebook/figure/line.js";

const measured: Series = {
  name: "measured",
  style: "points",
  x: [20, 40],
  y: [1180, 400],
  low: [1100, 380],
  high: [1260, 430],
  level: 0.95,
};
const model: Series = { name: "model", x: [20, 30, 40], y: [1200, 640, 370] };
const plain: LineFigure = {
  caption: "Viscosity against temperature",
  conditions: "Invented resin, shear rate 10 s⁻¹",
  x: { label: "temperature", unit: "°C" },
  y: { label: "viscosity", unit: "mPa s" },
  series: [model],
};

interface Plot {
  traces: Record<string, unknown>[];
  layout: Record<string, Record<string, unknown>> & { shapes: Record<string, unknown>[] };
}

function plotOf(figure: LineFigure): Plot {
  const { data, layout } = lineFigure(figure);
  return { traces: data as Plot["traces"], layout: layout as Plot["layout"] };
}

describe("lineFigure", () => {
  it("says quantity and unit on each axis", () => {
    const { layout } = plotOf(plain);
    expect(layout["xaxis"]!["title"]).toMatchObject({ text: "temperature (°C)" });
    expect(layout["yaxis"]!["title"]).toMatchObject({ text: "viscosity (mPa s)" });
    const bare = plotOf({ ...plain, x: { label: "trial" } });
    expect(bare.layout["xaxis"]!["title"]).toMatchObject({ text: "trial" });
  });

  it("puts formulation and conditions under the figure", () => {
    expect(lineFigure(plain).caption).toBe(
      "Viscosity against temperature. Invented resin, shear rate 10 s⁻¹.",
    );
  });

  it("survives the way to the page", () => {
    const figure = lineFigure({ ...plain, series: [model, measured] });
    expect(extract(embed(figure))).toEqual(JSON.parse(JSON.stringify(figure)));
  });

  it("shows everything on the axis, with a margin, and never goes below zero for it", () => {
    const { layout } = plotOf({ ...plain, bands: [{ label: "target", axis: "y", from: 50, to: 2000 }] });
    const [low, high] = layout["yaxis"]!["range"] as [number, number];
    expect(low).toBe(0);
    expect(high).toBeCloseTo(2000 + 0.05 * 1950, 10);
    expect(layout["xaxis"]!["range"]).toEqual([19, 41]);
  });

  it("keeps a range that is given, in powers of ten on a logarithmic axis", () => {
    const { layout } = plotOf({ ...plain, y: { ...plain.y, logarithmic: true, range: [100, 10000] } });
    expect(layout["yaxis"]).toMatchObject({
      type: "log",
      range: [2, 4],
      ticktext: ["100", "200", "500", "1000", "2000", "5000", "10000"],
    });
  });

  it("leaves room around a single point and around equal values", () => {
    const one = plotOf({ ...plain, series: [{ name: "one", x: [0], y: [5] }] });
    expect(one.layout["xaxis"]!["range"]).toEqual([0, 1]);
    expect(one.layout["yaxis"]!["range"]).toEqual([4.5, 5.5]);
  });

  it("draws a line, points or both", () => {
    const series = (["line", "points", "both"] as const).map((style) => ({ ...model, name: style, style }));
    expect(plotOf({ ...plain, series }).traces.map((trace) => trace["mode"])).toEqual([
      "lines",
      "markers",
      "lines+markers",
    ]);
  });

  it("tells six series apart by dash and by marker, not by colour alone", () => {
    const series = ["a", "b", "c", "d", "e", "f"].map((name) => ({ ...model, name }));
    const { traces } = plotOf({ ...plain, series });
    const looks = traces as unknown as { line: { dash: string }; marker: { symbol: string } }[];
    expect(new Set(looks.map(({ line }) => line.dash)).size).toBe(6);
    expect(new Set(looks.map(({ marker }) => marker.symbol)).size).toBe(6);
  });

  it("draws the interval of a line as a closed band whose legend entry says its level", () => {
    const interval = { low: [1000, 500, 300], high: [1500, 800, 450], level: 0.9 };
    const { traces } = plotOf({ ...plain, series: [{ ...model, ...interval }] });
    expect(traces[0]).toMatchObject({
      name: "model, 90 &#37; interval",
      x: [20, 30, 40, 40, 30, 20],
      y: [1500, 800, 450, 300, 500, 1000],
      fill: "toself",
    });
    expect(traces[1]).toMatchObject({
      name: "model",
      customdata: [
        [1000, 1500],
        [500, 800],
        [300, 450],
      ],
    });
  });

  it("keeps the legend in the order of the series, an interval after its line", () => {
    const interval = { low: model.y, high: model.y, level: 0.95 };
    const { traces } = plotOf({
      ...plain,
      series: [{ ...model, ...interval }, measured, { ...model, name: "other" }],
    });
    const inOrder = traces.toSorted((a, b) => Number(a["legendrank"]) - Number(b["legendrank"]));
    expect(inOrder.map((trace) => trace["name"])).toEqual([
      "model",
      "model, 95 &#37; interval",
      "measured, 95 &#37; interval",
      "other",
    ]);
  });

  it("draws the interval of points as bars", () => {
    const { traces } = plotOf({ ...plain, series: [measured] });
    expect(traces).toHaveLength(1);
    expect(traces[0]!["name"]).toBe("measured, 95 &#37; interval");
    expect(traces[0]!["error_y"]).toMatchObject({ array: [80, 30], arrayminus: [80, 20], symmetric: false });
  });

  it("draws a target window with its label and a line at each limit", () => {
    const { layout } = plotOf({ ...plain, bands: [{ label: "target", axis: "y", from: 200, to: 900 }] });
    expect(layout.shapes).toHaveLength(3);
    expect(layout.shapes[0]).toMatchObject({
      type: "rect",
      yref: "y",
      y0: 200,
      y1: 900,
      label: { text: "target" },
    });
    expect(layout.shapes.slice(1).map((line) => [line["type"], line["y0"], line["y1"]])).toEqual([
      ["line", 200, 200],
      ["line", 900, 900],
    ]);
  });

  it("draws an open window up to the edge, with one limit", () => {
    const { layout } = plotOf({ ...plain, bands: [{ label: "warm", axis: "x", from: 30 }] });
    expect(layout.shapes).toHaveLength(2);
    expect(layout.shapes[0]).toMatchObject({
      xref: "x",
      x0: 30,
      x1: 41,
      label: { textposition: "top left" },
    });
  });

  it("turns the label of an upright window away from the edge", () => {
    const { layout } = plotOf({ ...plain, bands: [{ label: "hot", axis: "x", from: 38, to: 40 }] });
    expect(layout.shapes[0]!["label"]).toMatchObject({ textposition: "top right" });
  });

  it("draws a mark as a labelled star, or as an upright line", () => {
    const marks = [
      { label: "chosen", x: 22, y: 1190 },
      { label: "storage", x: 39 },
    ];
    const { traces, layout } = plotOf({ ...plain, marks });
    expect(traces.at(-1)).toMatchObject({
      x: [22],
      y: [1190],
      text: ["chosen"],
      textposition: "bottom right",
    });
    expect(layout.shapes).toHaveLength(1);
    expect(layout.shapes[0]).toMatchObject({ x0: 39, x1: 39, label: { text: "storage", xanchor: "right" } });
  });

  it("hovers with the unit and four significant digits, in powers of ten where needed", () => {
    const template = (series: Series): unknown =>
      plotOf({ ...plain, series: [series] }).traces[0]!["hovertemplate"];
    expect(template(model)).toBe(
      "<b>model</b><br>temperature: %{x:.4~r} °C<br>viscosity: %{y:.4~r} mPa s<extra></extra>",
    );
    expect(template({ name: "slow", x: [0, 1], y: [1e-9, 2e-9] })).toContain("%{y:.3~e} mPa s");
    expect(template(measured)).toContain(
      "95 &#37; interval: %{customdata[0]:.4~r} to %{customdata[1]:.4~r} mPa s",
    );
  });

  it("shows markup, formulas and places in a name letter by letter", () => {
    const { traces } = plotOf({ ...plain, series: [{ ...model, name: "<b>x</b> %{y} $a$ & b" }] });
    expect(traces[0]!["name"]).toBe("&#60;b&#62;x&#60;/b&#62; &#37;{y} &#36;a&#36; &#38; b");
  });

  it("breaks a long legend entry into lines that fit a phone", () => {
    const { traces } = plotOf({
      ...plain,
      series: [{ ...model, name: "a resin whose name is much longer than others" }],
    });
    expect(traces[0]!["name"]).toBe("a resin whose name is much longer<br>than others");
  });

  it("stays quiet: no dragging that stops a page from scrolling", () => {
    const { layout } = plotOf(plain);
    expect(layout["xaxis"]!["fixedrange"]).toBe(true);
    expect((layout as Record<string, unknown>)["dragmode"]).toBe(false);
  });
});

describe("the words of a line figure", () => {
  it("say axes, ranges, first and last value, trend, windows and marks", () => {
    const figure = lineFigure({
      ...plain,
      y: { ...plain.y, logarithmic: true, range: [100, 2000] },
      bands: [{ label: "target", axis: "y", from: 200, to: 900 }],
      marks: [{ label: "chosen", x: 30, y: 640 }],
    });
    expect(figure.alternativeText).toBe(
      "Drawn: viscosity (mPa s, 100 to 2000, logarithmic) against temperature (°C, 19 to 41). " +
        "model: 3 points, 1200 mPa s at 20 °C to 370 mPa s at 40 °C, falling. " +
        "Window target (viscosity 200 to 900 mPa s): model inside at temperature 30 to 40 °C (2 of 3 points). " +
        "Mark chosen at temperature 30 °C, viscosity 640 mPa s.",
    );
  });

  it("say the interval", () => {
    expect(lineFigure({ ...plain, series: [measured] }).alternativeText).toContain(
      "measured: 2 points, 1180 mPa s at 20 °C to 400 mPa s at 40 °C, falling, with 95 % interval.",
    );
  });

  it.each([
    ["rising", [1, 2, 3], "40 °C, rising."],
    ["level", [2, 2, 2], "40 °C, level."],
    ["with a dip", [2, 1, 3], "lowest 1 mPa s at 30 °C, highest 3 mPa s at 40 °C"],
  ])("say the trend of a series that is %s", (_name, y, words) => {
    expect(lineFigure({ ...plain, series: [{ ...model, y }] }).alternativeText).toContain(words);
  });

  it.each([
    ["all of it", { axis: "y", from: 100 }, "model inside throughout"],
    ["none of it", { axis: "y", to: 100 }, "model does not reach it"],
    ["a crossing", { axis: "y", from: 700, to: 800 }, "model crosses it between two points"],
    ["an upright one", { axis: "x", from: 25 }, "model inside at viscosity 370 to 640 mPa s (2 of 3 points)"],
  ] as const)("say how a series meets a window: %s", (_name, limits, words) => {
    expect(lineFigure({ ...plain, bands: [{ label: "w", ...limits }] }).alternativeText).toContain(words);
  });

  it("do not let points cross a window between themselves", () => {
    const bands = [{ label: "w", axis: "y" as const, from: 700, to: 800 }];
    expect(lineFigure({ ...plain, bands, series: [measured] }).alternativeText).toContain(
      "measured does not reach it",
    );
  });

  it("give way to words that are given", () => {
    expect(lineFigure({ ...plain, alternativeText: "A curve." }).alternativeText).toBe("A curve.");
  });
});

describe("the table behind a line figure", () => {
  it("stands series over the same x side by side", () => {
    const interval = { low: [1000, 500, 300], high: [1500, 800, 450], level: 0.9 };
    const { table } = lineFigure({ ...plain, series: [model, { ...model, name: "other", ...interval }] });
    expect(table.columns.map(({ name, unit }) => `${name} / ${unit}`)).toEqual([
      "temperature / °C",
      "viscosity: model / mPa s",
      "viscosity: other / mPa s",
      "viscosity: other, low / mPa s",
      "viscosity: other, high / mPa s",
    ]);
    expect(table.rows[1]).toEqual([30, 640, 640, 500, 800]);
    expect(table.rows).toHaveLength(3);
  });

  it("stands series over different x one below the other", () => {
    const { table } = lineFigure({ ...plain, series: [model, measured] });
    expect(table.rows).toEqual([
      ["model", 20, 1200, null, null],
      ["model", 30, 640, null, null],
      ["model", 40, 370, null, null],
      ["measured", 20, 1180, 1100, 1260],
      ["measured", 40, 400, 380, 430],
    ]);
    expect(table.rowHeader).toBe(true);
  });

  it("says windows and marks in its caption", () => {
    const { table } = lineFigure({
      ...plain,
      bands: [{ label: "target", axis: "y", to: 900 }],
      marks: [{ label: "storage", x: 20 }],
    });
    expect(table.caption).toBe(
      "Viscosity against temperature. Window: target (viscosity at most 900 mPa s). Mark: storage at temperature 20 °C.",
    );
  });
});

describe("lineFigure refuses", () => {
  const where = 'lineFigure "Viscosity against temperature"';
  const log = { ...plain.y, logarithmic: true };
  it.each<[string, Partial<LineFigure>, string]>([
    ["no caption", { caption: " " }, 'lineFigure: caption is " "; say what the figure shows'],
    [
      "no conditions",
      { conditions: "" },
      'lineFigure: conditions is ""; say the formulation and the conditions',
    ],
    ["no series", { series: [] }, `${where}: series is empty; give at least one series`],
    [
      "seven series",
      { series: Array.from({ length: 7 }, () => model) },
      `${where}: series holds 7; at most 6 can be told apart; split the figure`,
    ],
    [
      "different lengths",
      { series: [{ name: "a", x: [1, 2, 3, 4], y: [1, 2, 3] }] },
      `${where}: series "a": y has 3 values and x has 4; give one for each x`,
    ],
    [
      "an empty series",
      { series: [{ name: "a", x: [], y: [] }] },
      `${where}: series "a": x is empty; give at least one value`,
    ],
    [
      "NaN",
      { series: [{ name: "a", x: [1, 2], y: [1, NaN] }] },
      `${where}: series "a": y[1] is NaN; it must be a finite number`,
    ],
    [
      "Infinity",
      { series: [{ name: "a", x: [1, Infinity], y: [1, 2] }] },
      `${where}: series "a": x[1] is Infinity; it must be a finite number`,
    ],
    [
      "zero on a logarithmic axis",
      { y: log, series: [{ name: "a", x: [1, 2], y: [1, 0] }] },
      `${where}: series "a": y[1] is 0; it must be a finite number above 0; ` +
        "a logarithmic axis shows positive values only; leave the value out or use a linear axis",
    ],
    [
      "a mark below zero on a logarithmic axis",
      { y: log, marks: [{ label: "m", x: 1, y: -1 }] },
      `${where}: mark "m": y is -1; it must be a finite number above 0`,
    ],
    [
      "a band without extent",
      { bands: [{ label: "target", axis: "y", from: 900, to: 900 }] },
      `${where}: band "target": from is 900 and to is 900; from must be below to`,
    ],
    [
      "a band without limits",
      { bands: [{ label: "target", axis: "y" }] },
      `${where}: band "target": from and to are both missing; give at least one of them`,
    ],
    [
      "a band that reaches zero on a logarithmic axis",
      { y: log, bands: [{ label: "target", axis: "y", from: 0, to: 900 }] },
      `${where}: band "target": from is 0; it must be a finite number above 0`,
    ],
    [
      "half an interval",
      { series: [{ ...model, low: [1, 2, 3] }] },
      `${where}: series "model": high is missing; an interval needs low, high and level`,
    ],
    [
      "an interval without level",
      { series: [{ ...model, low: model.y, high: model.y }] },
      `${where}: series "model": level is missing; it must be a number from 0 to 1; say which interval it is, 0.95 for 95 %`,
    ],
    [
      "a value outside its interval",
      { series: [{ ...model, low: [1, 1, 1], high: [2000, 600, 500], level: 0.95 }] },
      `${where}: series "model": y[1] is 640, low[1] is 1 and high[1] is 600; low must not be above y, nor y above high`,
    ],
    [
      "an unknown style",
      { series: [{ ...model, style: "point" as "points" }] },
      `${where}: series "model": unknown style "point"; did you mean "points"?`,
    ],
    [
      "a misspelt key",
      { ...({ serie: [] } as object) },
      `${where}: unknown field "serie"; did you mean "series"?`,
    ],
    [
      "an axis without label",
      { x: { label: "" } },
      `${where}: x axis: label is ""; it must name the quantity, such as "viscosity"`,
    ],
    [
      "a range upside down",
      { x: { label: "t", range: [5, 1] } },
      `${where}: x axis: range is 5 to 1; its first number must be below its second`,
    ],
  ])("%s", (_name, change, message) => {
    expect(() => lineFigure({ ...plain, ...change })).toThrow(message);
  });
});
