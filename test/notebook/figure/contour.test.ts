import { describe, expect, it } from "vitest";
import { embed, extract } from "../../../lib/notebook/content.js";
import { contourFigure, type ContourFigure } from "../../../lib/notebook/figure/contour.js";
import { levelLabels } from "../../../lib/notebook/figure/contourLabels.js";

const plain: ContourFigure = {
  caption: "Viscosity over diluent and temperature",
  conditions: "Invented resin",
  x: { label: "diluent", unit: "%", values: [0, 20, 40] },
  y: { label: "temperature", unit: "°C", values: [20, 40] },
  z: {
    label: "viscosity",
    unit: "mPa s",
    values: [
      [2000, 900, 400],
      [700, 300, 130],
    ],
  },
};
const feasible = { label: "pours well", from: 200, to: 800 };

type Part = Record<string, unknown>;
function partsOf(figure: ContourFigure): {
  traces: Part[];
  layout: { annotations: Part[] } & Record<string, Part>;
} {
  const { data, layout } = contourFigure(figure);
  return { traces: data as Part[], layout: layout as ReturnType<typeof partsOf>["layout"] };
}

/** A plane z = x + y over a square of `size` grid lines a side, from 0 to `size - 1`. */
function plane(size: number): Pick<ContourFigure, "x" | "y" | "z"> {
  const values = Array.from({ length: size }, (_, i) => i);
  return {
    x: { label: "a", values },
    y: { label: "b", values },
    z: { label: "sum", values: values.map((b) => values.map((a) => a + b)) },
  };
}

describe("contourFigure", () => {
  it("draws evenly spaced round levels as one trace", () => {
    const { traces } = partsOf(plain);
    const contours = traces.filter((trace) => trace["type"] === "contour");
    expect(contours).toHaveLength(1);
    // 130 to 2000 in about six steps: every 500.
    expect(contours[0]!["contours"]).toMatchObject({ start: 500, end: 2000, size: 500 });
  });

  it("draws unevenly spaced levels as one trace each, of which one answers the pointer and one the legend", () => {
    const { traces } = partsOf({ ...plain, levels: [200, 500, 1000] });
    const contours = traces.filter((trace) => trace["type"] === "contour");
    expect(contours.map((trace) => (trace["contours"] as Part)["start"])).toEqual([200, 500, 1000]);
    expect(contours.map((trace) => trace["showlegend"])).toEqual([true, false, false]);
    expect(contours.map((trace) => "hovertemplate" in trace)).toEqual([true, false, false]);
    expect(contours[0]!["hovertemplate"]).toContain("viscosity: %{z:.4~r} mPa s");
  });

  it("labels each level once, on its line", () => {
    const { traces } = partsOf({ ...plain, ...plane(11), levels: [4, 9, 15] });
    const labels = traces.find((trace) => trace["mode"] === "text")! as {
      x: number[];
      y: number[];
      text: string[];
    };
    expect(labels.text).toEqual(["4", "9", "15"]);
    labels.text.forEach((text, i) => expect(labels.x[i]! + labels.y[i]!).toBeCloseTo(Number(text), 12));
  });

  it("tints, outlines and labels the feasible region", () => {
    const { traces, layout } = partsOf({ ...plain, feasible });
    expect(traces[0]).toMatchObject({
      name: "pours well: viscosity 200 to 800<br>mPa\u00a0s",
      // The constraint names what lies outside: plotly tints where a constraint does not hold.
      contours: { type: "constraint", operation: "][", value: [200, 800] },
      line: { width: 4 },
    });
    expect(layout.annotations).toHaveLength(1);
    expect(layout.annotations[0]).toMatchObject({ text: "<b>pours well</b>" });
  });

  it.each([
    [{ from: 500 }, "<", 500],
    [{ to: 500 }, ">", 500],
  ])("draws a region open on one side: %o", (limits, operation, value) => {
    const { traces } = partsOf({ ...plain, feasible: { label: "r", ...limits } });
    expect(traces[0]!["contours"]).toMatchObject({ operation, value });
  });

  it("keeps the label of the region off the marks, inside the region", () => {
    const of = (marks: ContourFigure["marks"]) => {
      const { layout } = partsOf({
        ...plain,
        ...plane(21),
        feasible: { label: "r", from: 10, to: 30 },
        marks,
      });
      const [label] = layout.annotations as { x: number; y: number }[];
      return label!;
    };
    const free = of([]);
    expect([free.x, free.y]).toEqual([10, 10]);
    const { x, y } = of([{ label: "present", x: free.x, y: free.y }]);
    expect(x + y).toBeGreaterThanOrEqual(10);
    expect(x + y).toBeLessThanOrEqual(30);
    // A label and a mark are up to 0.3 of a narrow figure wide and 0.14 high; the axes are 20 long.
    expect(Math.abs(x - free.x) > 6 || Math.abs(y - free.y) > 2.8).toBe(true);
  });

  it("labels each branch of a level that has room", () => {
    // z = |x + y - 20| is 10 along two lines, 0.35 of the figure from each other; at 1 they lie too close for two labels.
    const ridge = plane(21);
    const values = ridge.z.values.map((row) => row.map((sum) => Math.abs(sum! - 20)));
    const labels = levelLabels({ ...ridge, z: { label: "away", values }, levels: [10, 1], taken: [] });
    expect(labels.filter(({ level }) => level === 10)).toHaveLength(2);
    const sides = labels.map(({ level, x, y }) => `${level}: ${x + y}`);
    expect(sides.slice(0, 2).toSorted()).toEqual(["10: 10", "10: 30"]);
    expect(labels.filter(({ level }) => level === 1).length).toBeGreaterThan(0);
  });

  it("places the label of the region inside it, in powers of ten on a logarithmic axis", () => {
    const x = { ...plain.x, logarithmic: true, values: [1, 10, 100] };
    const { layout } = partsOf({ ...plain, x, feasible: { label: "r", to: 200 } });
    expect(layout.annotations[0]).toMatchObject({ x: 2, y: 40 });
  });

  it("draws a property that is the same everywhere", () => {
    const flat = contourFigure({
      ...plain,
      z: {
        ...plain.z,
        values: [
          [5, 5, 5],
          [5, 5, 5],
        ],
      },
    });
    expect(flat.alternativeText).toContain(
      "Lowest 5 mPa s at 0 % and 20 °C; highest 5 mPa s at 0 % and 20 °C.",
    );
  });

  it("survives the way to the page, gaps included", () => {
    const values = [
      [2000, 900, null],
      [700, 300, 130],
    ];
    const figure = contourFigure({ ...plain, feasible, z: { ...plain.z, values } });
    expect(extract(embed(figure))).toEqual(JSON.parse(JSON.stringify(figure)));
  });
});

describe("levelLabels", () => {
  it("keeps labels apart, off the edges and off what is there already", () => {
    const taken = [[0.5, 0.5]] as const;
    const labels = levelLabels({ ...plane(21), levels: [10, 20, 30], taken });
    const places = [...taken, ...labels.map(({ x, y }) => [x / 20, y / 20] as const)];
    places.forEach(([x, y], i) => {
      expect(Math.min(x, 1 - x, y, 1 - y)).toBeGreaterThan(0.1);
      for (const [px, py] of places.slice(0, i)) expect(Math.hypot(x - px, y - py)).toBeGreaterThan(0.2);
    });
  });

  it("skips a level that no line has, and tells steep lines from flat ones", () => {
    const steep = {
      ...plane(3),
      z: {
        label: "z",
        values: [
          [0, 1, 2],
          [0, 1, 2],
          [0, 1, 2],
        ],
      },
    };
    expect(levelLabels({ ...steep, levels: [0.5, 7], taken: [] })).toEqual([
      { level: 0.5, x: 0.5, y: 1, steep: true },
    ]);
    const flat = {
      ...plane(3),
      z: {
        label: "z",
        values: [
          [0, 0, 0],
          [1, 1, 1],
          [2, 2, null],
        ],
      },
    };
    expect(levelLabels({ ...flat, levels: [1.5], taken: [] })).toEqual([
      { level: 1.5, x: 1, y: 1.5, steep: false },
    ]);
  });
});

describe("the words of a contour figure", () => {
  it("say property, axes, extremes, levels, region and marks", () => {
    const marks = [{ label: "chosen", x: 20, y: 25 }];
    expect(contourFigure({ ...plain, feasible, marks, levels: [500, 1000] }).alternativeText).toBe(
      "Contour lines of viscosity (mPa s) over diluent (%, 0 to 40) and temperature (°C, 20 to 40). " +
        "Lowest 130 mPa s at 40 % and 40 °C; highest 2000 mPa s at 0 % and 20 °C. Lines at 500, 1000 mPa s. " +
        "Region pours well (viscosity 200 to 800 mPa s): 3 of 6 grid points, " +
        "within diluent 0 to 40 % and temperature 20 to 40 °C. Mark chosen at diluent 20 %, temperature 25 °C.",
    );
  });

  it("say that nothing lies in a region", () => {
    const figure = contourFigure({ ...plain, feasible: { label: "thin", to: 100 } });
    expect(figure.alternativeText).toContain(
      "Region thin (viscosity at most 100 mPa s): no grid point lies in it.",
    );
    expect((figure.layout as { annotations: unknown[] }).annotations).toEqual([]);
  });
});

describe("the table behind a contour figure", () => {
  it("holds a small grid whole", () => {
    const { table } = contourFigure({ ...plain, feasible });
    expect(table.columns.map(({ name }) => name)).toEqual(["temperature (°C)", "0", "20", "40"]);
    expect(table.rows).toEqual([
      ["20", 2000, 900, 400],
      ["40", 700, 300, 130],
    ]);
    expect(table.caption).toBe(
      "Viscosity over diluent and temperature. viscosity (mPa s): one row for each temperature (°C), " +
        "one column for each diluent (%). Region: pours well (viscosity 200 to 800 mPa s).",
    );
  });

  it("thins a large grid to twelve a side, ends included, and says so", () => {
    const { table } = contourFigure({ ...plain, ...plane(31) });
    expect(table.rows).toHaveLength(12);
    expect(table.columns).toHaveLength(13);
    expect(table.caption).toContain("Thinned to 12 of 31 columns and 12 of 31 rows.");
    const names = table.columns.slice(1).map(({ name }) => Number(name));
    expect([names[0], names.at(-1)]).toEqual([0, 30]);
    for (const [b, ...sums] of table.rows) sums.forEach((sum, i) => expect(sum).toBe(Number(b) + names[i]!));
  });
});

describe("contourFigure refuses", () => {
  const where = 'contourFigure "Viscosity over diluent and temperature"';
  const z = (values: (number | null)[][]): Partial<ContourFigure> => ({ z: { ...plain.z, values } });
  it.each<[string, Partial<ContourFigure>, string]>([
    [
      "too few rows",
      z([[1, 2, 3]]),
      `${where}: z: values has 1 row; give 2 rows (one for each y) of 3 values (one for each x)`,
    ],
    [
      "a short row",
      z([
        [1, 2, 3],
        [1, 2],
      ]),
      `${where}: z: values[1] has 2 values; give 2 rows (one for each y) of 3 values (one for each x)`,
    ],
    [
      "NaN",
      z([
        [1, 2, 3],
        [1, NaN, 3],
      ]),
      `${where}: z: values[1][1] is NaN; it must be a finite number; use null where there is no such recipe`,
    ],
    [
      "gaps only",
      z([
        [null, null, null],
        [null, null, null],
      ]),
      `${where}: z: values holds null only; give at least one number`,
    ],
    [
      "a single grid line",
      { x: { label: "a", values: [1] } },
      `${where}: x axis: values has 1 number; give at least 2`,
    ],
    [
      "grid lines out of order",
      { x: { label: "a", values: [1, 3, 3] } },
      `${where}: x axis: values[2] is 3 after 3; each value must be above the one before`,
    ],
    [
      "zero on a logarithmic axis",
      { x: { ...plain.x, logarithmic: true } },
      `${where}: x axis: values[0] is 0; it must be a finite number above 0`,
    ],
    ["no levels", { levels: [] }, `${where}: levels has 0 numbers; give at least 1`],
    [
      "a region without extent",
      { feasible: { label: "r", from: 3, to: 2 } },
      `${where}: feasible "r": from is 3 and to is 2; from must be below to`,
    ],
    [
      "a misspelt key",
      { ...({ level: [1] } as object) },
      `${where}: unknown field "level"; did you mean "levels"?`,
    ],
  ])("%s", (_name, change, message) => {
    expect(() => contourFigure({ ...plain, ...change })).toThrow(message);
  });
});
