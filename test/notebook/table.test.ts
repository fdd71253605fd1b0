import { describe, expect, it } from "vitest";
import { embed, extract } from "../../lib/notebook/content.js";
import { frameOf, tableOf, tableOfFrame, type FrameCondition } from "../../lib/notebook/table.js";

const interval = { value: 447.3, low: 301.2, high: 612.9, level: 0.95, warnings: [] };

describe("tableOf", () => {
  it("makes a column of every field, headed by its name and unit", () => {
    const rows = [
      { trial: "a", layerThickness_um: 50 },
      { trial: "b", mass_pct: 12.5 },
    ];
    expect(tableOf({ caption: "Trials", rows })).toEqual({
      kind: "table",
      caption: "Trials",
      columns: [
        { name: "trial", unit: undefined, align: "left" },
        { name: "layer thickness", unit: "µm", align: "right" },
        { name: "mass", unit: "%", align: "right" },
      ],
      rows: [
        ["a", 50, null],
        ["b", null, 12.5],
      ],
      rowHeader: true,
    });
  });

  it("shows the columns that are named, in their order, with heading, unit, digits and side", () => {
    const table = tableOf({
      caption: "Trials",
      rows: [{ x: 1, y: 2.34567, z: "n" }],
      columns: [
        { key: "z", name: "note", align: "right" },
        { key: "y", unit: "mm", digits: 2 },
      ],
    });
    expect(table.columns).toEqual([
      { name: "note", unit: undefined, align: "right" },
      { name: "y", unit: "mm", align: "right" },
    ]);
    expect(table.rows).toEqual([["n", "2.3"]]);
  });

  it("writes intervals by their width, true and false as words, missing values as no value", () => {
    const rows = [
      { viscosity_mPas: interval, cures: true, note: null },
      { viscosity_mPas: interval, cures: false },
    ];
    const table = tableOf({ caption: "Results", rows });
    expect(table.rows).toEqual([
      ["450 (300 to 610)", "yes", null],
      ["450 (300 to 610)", "no", null],
    ]);
    expect(table.columns.map(({ align }) => align)).toEqual(["right", "left", "right"]);
  });

  it("names rows by their first cell only where every one is text", () => {
    const headed = (first: unknown[]): boolean | undefined =>
      tableOf({ caption: "T", rows: first.map((a) => ({ a, b: 1 })) }).rowHeader;
    expect(headed(["x", "y"])).toBe(true);
    expect(headed(["x", 2])).toBe(false);
    expect(headed([1, 2])).toBe(false);
  });

  it("shows columns without rows", () => {
    const table = tableOf({ caption: "Nothing found", rows: [], columns: [{ key: "mass_g" }] });
    expect(table).toMatchObject({ columns: [{ name: "mass", unit: "g" }], rows: [], rowHeader: false });
  });

  it("survives the way to the page", () => {
    const table = tableOf({ caption: "T", rows: [{ a: "</script>", viscosity_mPas: interval }] });
    expect(extract(embed(table))).toEqual(JSON.parse(JSON.stringify(table)));
  });

  it.each<[string, Parameters<typeof tableOf>[0], string]>([
    ["no caption", { caption: "", rows: [{ a: 1 }] }, 'tableOf: caption is ""; say what the table shows'],
    [
      "nothing to show",
      { caption: "T", rows: [] },
      'tableOf "T": rows is empty; give at least one row, or columns',
    ],
    [
      "NaN",
      { caption: "T", rows: [{ a: 1 }, { a: NaN }] },
      'tableOf "T": row 2: a is NaN; it must be a finite number',
    ],
    [
      "an interval with infinite ends",
      { caption: "T", rows: [{ a: { value: 1, low: 0, high: Infinity } }] },
      'tableOf "T": row 1: a.high is Infinity; it must be a finite number',
    ],
    [
      "what is no cell",
      { caption: "T", rows: [{ a: [1, 2] }] },
      'tableOf "T": row 1: a is a list; a cell holds text, a number, true or false, or an interval',
    ],
    [
      "a misspelt column",
      { caption: "T", rows: [{ mass_g: 1 }], columns: [{ key: "mas_g" }] },
      'tableOf "T": unknown column "mas_g"; did you mean "mass_g"?',
    ],
    [
      "a misspelt key of a column",
      { caption: "T", rows: [{ a: 1 }], columns: [{ key: "a", ...({ units: "g" } as object) }] },
      'tableOf "T": column "a": unknown field "units"; did you mean "unit"?',
    ],
    [
      "digits that do not exist",
      { caption: "T", rows: [{ a: 1 }], columns: [{ key: "a", digits: 0 }] },
      'tableOf "T": column "a": digits is 0; it must be a number from 1 to 15',
    ],
    [
      "a misspelt key",
      { caption: "T", rows: [{ a: 1 }], ...({ column: [] } as object) },
      'tableOf: unknown field "column"; did you mean "columns"?',
    ],
  ])("refuses %s", (_name, input, message) => {
    expect(() => tableOf(input)).toThrow(message);
  });
});

describe("frameOf and tableOfFrame", () => {
  const rows = [
    { batch: "B1", resin: "amber", mass_g: 10 },
    { batch: "B2", resin: "clear", mass_g: 7.5 },
    { batch: "B3", resin: "amber", mass_g: 20 },
  ];

  it("bring rows back as they went in", () => {
    const table = tableOfFrame({ caption: "Batches", frame: frameOf(rows) });
    expect(table).toEqual(tableOf({ caption: "Batches", rows }));
  });

  it("sort, select and group on the way", () => {
    const frame = frameOf(rows);
    const heavy = frame.query(frame.column("mass_g").gt(8)).sortValues("mass_g", { ascending: false });
    expect(tableOfFrame({ caption: "Heavy", frame: heavy }).rows.map(([batch]) => batch)).toEqual([
      "B3",
      "B1",
    ]);
    const means = frame.groupby(["resin"]).col(["mass_g"]).mean();
    expect(tableOfFrame({ caption: "Means", frame: means, units: { mass_g_mean: "g" } })).toMatchObject({
      columns: [{ name: "resin" }, { name: "mass_g_mean", unit: "g" }],
      rows: [
        ["amber", 15],
        ["clear", 7.5],
      ],
    });
  });

  it("take every condition, alone and together", () => {
    const frame = frameOf(rows);
    const [mass, resin] = [frame.column("mass_g"), frame.column("resin")];
    const chosen = (condition: FrameCondition): unknown => frame.query(condition).column("batch").values;
    expect(chosen(mass.gt(10))).toEqual(["B3"]);
    expect(chosen(mass.ge(10))).toEqual(["B1", "B3"]);
    expect(chosen(mass.lt(10))).toEqual(["B2"]);
    expect(chosen(mass.le(10))).toEqual(["B1", "B2"]);
    expect(chosen(resin.eq("amber").and(mass.eq(20)))).toEqual(["B3"]);
    expect(chosen(resin.eq("clear").or(mass.eq(20)))).toEqual(["B2", "B3"]);
  });

  it.each([
    ["count", [2, 1]],
    ["sum", [30, 7.5]],
    ["min", [10, 7.5]],
    ["max", [20, 7.5]],
  ] as const)("group by %s", (how, values) => {
    const grouped = frameOf(rows).groupby(["resin"]).col(["mass_g"])[how]();
    expect(grouped.values).toEqual([
      ["amber", values[0]],
      ["clear", values[1]],
    ]);
  });

  it("say their size, and show only the first rows on request", () => {
    expect(frameOf(rows).shape).toEqual([3, 3]);
    expect(frameOf(rows).head(1).values).toEqual([["B1", "amber", 10]]);
  });

  it("keep a missing number missing, also in the mean of its group", () => {
    const frame = frameOf([...rows, { batch: "B4", resin: "clear" }]);
    expect(tableOfFrame({ caption: "Batches", frame }).rows[3]).toEqual(["B4", "clear", null]);
    const means = frame.groupby(["resin"]).col(["mass_g"]).mean();
    expect(tableOfFrame({ caption: "Means", frame: means }).rows).toEqual([
      ["amber", 15],
      ["clear", null],
    ]);
  });

  it("keep a missing text missing", () => {
    expect(frameOf([{ a: "x", b: 1 }, { b: 2 }]).values).toEqual([
      ["x", 1],
      [null, 2],
    ]);
  });

  it.each<[string, () => unknown, string]>([
    ["no rows", () => frameOf([]), "frameOf: rows is empty; give at least one row"],
    ["NaN", () => frameOf([{ a: 1 }, { a: NaN }]), "frameOf: row 2: a is NaN; it must be a finite number"],
    [
      "text among numbers",
      () => frameOf([{ a: 1 }, { a: "x" }]),
      'frameOf: row 2: a is "x"; it must be a number, as in the rows before',
    ],
    [
      "what is no cell",
      () => frameOf([{ a: interval }]),
      "frameOf: row 1: a is an object; it must be text, a number, true or false",
    ],
    [
      "a unit for no column",
      () => tableOfFrame({ caption: "T", frame: frameOf(rows), units: { mas_g: "g" } }),
      'tableOfFrame "T": units: unknown field "mas_g"; did you mean "mass_g"?',
    ],
  ])("refuse %s", (_name, make, message) => {
    expect(make).toThrow(message);
  });
});
