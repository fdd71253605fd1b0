import { describe, expect, it } from "vitest";
import { embed, extract } from "../../../lib/notebook/content.js";
import {
  intervalFigure,
  type IntervalFigure,
  type IntervalRow,
} from "../../../lib/notebook/figure/interval.js";
import { shareFigure, type ShareRow } from "../../../lib/notebook/figure/share.js";

type Part = Record<string, unknown>;

const level = 0.95;
const inside: IntervalRow = {
  label: "a",
  value: 447.3,
  low: 301.2,
  high: 612.9,
  level,
  target: [undefined, 900],
};
const nearly: IntervalRow = { label: "b", value: 880, low: 800, high: 960, level, target: [200, 900] };
const doubtful: IntervalRow = { label: "c", value: 950, low: 870, high: 1060, level, target: [200, 900] };
const outside: IntervalRow = { label: "d", value: 150, low: 110, high: 190, level, target: [200, undefined] };
const free: IntervalRow = { label: "e", value: 500, low: 400, high: 600, level };
const plain: IntervalFigure = {
  caption: "Viscosity of trials",
  conditions: "Invented resins, 25 °C",
  axis: { label: "viscosity", unit: "mPa s" },
  rows: [inside, nearly, doubtful, outside, free],
};

describe("intervalFigure", () => {
  const figure = intervalFigure(plain);
  const traces = figure.data as Part[];
  const layout = figure.layout as { shapes: Part[]; yaxis: Part; height: number };

  it("draws every interval with end strokes and a gap after it", () => {
    expect(traces[0]).toMatchObject({ name: "95 &#37; interval", marker: { symbol: "line-ns" } });
    expect((traces[0]!["x"] as unknown[]).slice(0, 6)).toEqual([301.2, 612.9, null, 800, 960, null]);
    expect((traces[0]!["y"] as unknown[]).slice(0, 6)).toEqual([0, 0, null, 1, 1, null]);
  });

  it("tells values inside, outside and without target apart by the shape of the marker, named in the legend", () => {
    const kinds = traces
      .slice(1)
      .map((trace) => [trace["name"], trace["x"], (trace["marker"] as Part)["symbol"]]);
    expect(kinds).toEqual([
      ["value", [500], "diamond"],
      ["value inside its target", [447.3, 880], "circle"],
      ["value outside its target", [950, 150], "x"],
    ]);
  });

  it("draws a target as a strip with a line at each limit, once in the legend", () => {
    const strips = layout.shapes.filter((shape) => shape["type"] === "rect");
    expect(strips).toHaveLength(4);
    expect(layout.shapes.filter((shape) => shape["type"] === "line").map((shape) => shape["x0"])).toEqual([
      900, 200, 900, 200, 900, 200,
    ]);
    expect(layout.shapes.filter((shape) => shape["showlegend"])).toEqual([strips[0]]);
  });

  it("puts the first row on top and breaks long labels", () => {
    const [bottom, top] = layout.yaxis["range"] as [number, number];
    expect(bottom).toBeGreaterThan(top);
    const label = "a name that needs three lines at this width";
    const tall = intervalFigure({ ...plain, rows: [{ ...free, label }] }).layout as typeof layout;
    expect(tall.yaxis["ticktext"]).toEqual(["a name that needs<br>three lines at<br>this width"]);
    const low = intervalFigure({ ...plain, rows: [free] }).layout as typeof layout;
    expect(tall.height - low.height).toBe(36);
  });

  it("draws what all are seen against as an upright line, named in the legend, within the axis", () => {
    const seen = intervalFigure({ ...plain, rows: [free], reference: { label: "the old resin", at: 700 } });
    const { shapes, xaxis } = seen.layout as { shapes: Part[]; xaxis: { range: [number, number] } };
    expect(shapes).toEqual([
      expect.objectContaining({ type: "line", x0: 700, x1: 700, showlegend: true, name: "the old resin" }),
    ]);
    expect(xaxis.range[1]).toBeGreaterThan(700);
    expect(seen.alternativeText).toContain("Line at 700 mPa s: the old resin.");
  });

  it("takes room for half of each of two labels between them, not for the longest twice", () => {
    const heightOf = (...labels: string[]) =>
      (
        intervalFigure({ ...plain, rows: labels.map((label) => ({ ...free, label })) })
          .layout as typeof layout
      ).height;
    const long = "a name that needs three lines at this width";
    expect(heightOf("x", long, "y") - heightOf("x", "z", "y")).toBe(3 * 18);
    expect(heightOf(long, long, "y") - heightOf("x", "z", "y")).toBe(3 * 36);
  });

  it("hovers with value, unit and interval", () => {
    expect(traces[1]!["hovertemplate"]).toBe(
      "<b>%{text}</b><br>viscosity: %{x:.4~r} mPa s<br>95 &#37; interval: " +
        "%{customdata[0]:.4~r} to %{customdata[1]:.4~r} mPa s<extra></extra>",
    );
  });

  it("says in words what each interval means for its target", () => {
    expect(figure.alternativeText).toBe(
      "Values with their 95 % interval over viscosity (mPa s, 62.5 to 1110). " +
        "a: 450 (300 to 610) mPa s; target at most 900 mPa s: inside. " +
        "b: 880 (800 to 960) mPa s; target 200 to 900 mPa s: inside, interval reaches outside. " +
        "c: 950 (870 to 1060) mPa s; target 200 to 900 mPa s: outside, interval reaches inside. " +
        "d: 150 (110 to 190) mPa s; target at least 200 mPa s: outside. " +
        "e: 500 (400 to 600) mPa s.",
    );
  });

  it("keeps the plotted numbers in its table", () => {
    expect(figure.table.rows[0]).toEqual(["a", 447.3, 301.2, 612.9, "at most 900", "inside"]);
    expect(figure.table.rows[4]).toEqual(["e", 500, 400, 600, null, null]);
    expect(intervalFigure({ ...plain, rows: [free] }).table.rows).toEqual([["e", 500, 400, 600]]);
  });

  it("takes results as they are, with what else they carry", () => {
    const result = { value: 1, low: 0.5, high: 2, level: 0.9, warnings: [], unit: "mPa s" };
    expect(intervalFigure({ ...plain, rows: [{ label: "r", ...result }] }).table.rows).toEqual([
      ["r", 1, 0.5, 2],
    ]);
  });

  it("survives the way to the page", () => {
    expect(extract(embed(figure))).toEqual(JSON.parse(JSON.stringify(figure)));
  });

  const where = 'intervalFigure "Viscosity of trials"';
  it.each<[string, Partial<IntervalFigure>, string]>([
    ["no rows", { rows: [] }, `${where}: rows is empty; give at least one row`],
    ["NaN", { rows: [{ ...free, low: NaN }] }, `${where}: row "e": low is NaN; it must be a finite number`],
    [
      "a value outside its interval",
      { rows: [{ ...free, low: 700, high: 800 }] },
      `${where}: row "e": value is 500, low is 700 and high is 800; low must not be above value, nor value above high`,
    ],
    [
      "intervals of different levels",
      { rows: [free, { ...inside, level: 0.9 }] },
      `${where}: row "a": level is 0.9 and the first row has 0.95; show intervals of one level in one figure`,
    ],
    [
      "no level",
      { rows: [{ ...free, level: undefined as unknown as number }] },
      `${where}: row "e": level is missing; it must be a number from 0 to 1; say which interval it is, 0.95 for 95 %`,
    ],
    [
      "zero on a logarithmic axis",
      { axis: { ...plain.axis, logarithmic: true }, rows: [{ ...free, low: 0 }] },
      `${where}: row "e": low is 0; it must be a finite number above 0`,
    ],
    [
      "a reference that has no place",
      { reference: { label: "old", at: NaN } },
      `${where}: reference "old": at is NaN; it must be a finite number`,
    ],
    [
      "an unknown key of a reference",
      { reference: { label: "old", at: 1, colour: "red" } as unknown as { label: string; at: number } },
      `${where}: reference "old": unknown`,
    ],
    [
      "a target without extent",
      { rows: [{ ...free, target: [900, 200] }] },
      `${where}: row "e": target: from is 900 and to is 200; from must be below to`,
    ],
  ])("refuses %s", (_name, change, message) => {
    expect(() => intervalFigure({ ...plain, ...change })).toThrow(message);
  });
});

describe("shareFigure", () => {
  const rows = [
    { label: "temperature", share: 0.21 },
    { label: "interaction", share: 0.784 },
    { label: "weighing", share: 0.0062 },
  ];
  const plainShares = { caption: "What carries the doubt", conditions: "Invented resin", rows };
  const figure = shareFigure(plainShares);
  const bars = figure.data[0] as Part;

  it("draws percent, the largest on top, each bar with its number", () => {
    expect(bars).toMatchObject({
      orientation: "h",
      y: [0, 1, 2],
      text: ["78 &#37;", "21 &#37;", "0.6 &#37;"],
    });
    expect(bars["customdata"]).toEqual(["interaction", "temperature", "weighing"]);
    expect(figure.table.rows.map(([label]) => label)).toEqual(["interaction", "temperature", "weighing"]);
    expect(figure.table.rows.map(([, share]) => share)).toEqual(bars["x"]);
  });

  it("says the shares in words", () => {
    expect(figure.alternativeText).toBe(
      "Bars of 3 inputs by share of the doubt, largest first: interaction 78 %, temperature 21 %, weighing 0.6 %.",
    );
  });

  it("leaves the rows it was given in their order", () => {
    expect(rows.map(({ label }) => label)).toEqual(["temperature", "interaction", "weighing"]);
  });

  it("draws shares that are all zero", () => {
    const none = shareFigure({ ...plainShares, rows: [{ label: "a", share: 0 }] });
    expect((none.layout as { xaxis: Part }).xaxis["range"]).toEqual([0, 1]);
  });

  it.each<[string, ShareRow[], string]>([
    ["no rows", [], "rows is empty; give at least one row"],
    [
      "percent",
      [{ label: "a", share: 43 }],
      'row "a": share is 43; it must be a number from 0 to 1; write 0.43 for 43 %',
    ],
    ["NaN", [{ label: "a", share: NaN }], 'row "a": share is NaN; it must be a number from 0 to 1'],
  ])("refuses %s", (_name, wrong, message) => {
    expect(() => shareFigure({ ...plainShares, rows: wrong })).toThrow(
      `shareFigure "What carries the doubt": ${message}`,
    );
  });
});
