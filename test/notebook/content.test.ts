import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  embed,
  extract,
  tableHtml,
  type FigureContent,
  type TableContent,
} from "../../lib/notebook/content.js";

const table: TableContent = {
  kind: "table",
  caption: "Viscosity",
  columns: [
    { name: "monomer", align: "left" },
    { name: "viscosity", unit: "mPa·s", align: "right" },
  ],
  rows: [
    ["IBOA", 8.23456],
    ["unknown", null],
  ],
  rowHeader: true,
};
const figure: FigureContent = {
  kind: "figure",
  caption: "A line",
  alternativeText: "It rises.",
  data: [{ x: [1, 2], y: [1, null] }],
  layout: { height: 300 },
  table,
};
const hostile = `</script><script>alert(1)</script>"><img src=x onerror=alert(1)>`;

describe("embed and extract", () => {
  it("give back what was put in, with anything after it left alone", () => {
    expect(extract(`${embed(table)}<table><tr><td>live</td></tr></table>`)).toEqual(table);
    expect(extract(embed(figure))).toEqual(figure);
  });

  it("hold any text, and none of it ends the script element", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary" }), (text) => {
        const html = embed({ ...table, caption: text + hostile });
        expect(html.match(/<\/script>/g)).toHaveLength(1);
        expect(extract(html)).toEqual({ ...table, caption: text + hostile });
      }),
    );
  });

  it("carry the steps of a slider, and refuse one that starts beyond them", () => {
    const steps = ["1 s", "2 s"].map((name, i) => ({ name, data: [{ x: [1, 2], y: [1, i] }] }));
    const moving = { ...figure, moments: { label: "light", shown: 1, steps } };
    expect(extract(embed(moving))).toEqual(moving);
    expect(() => extract(embed({ ...moving, moments: { ...moving.moments, shown: 2 } }))).toThrow(
      "output figure: moments: shown is beyond the last step",
    );
  });

  it("write typed arrays as lists", () => {
    const html = embed({ ...figure, data: [{ y: Float64Array.of(1, 2) }] });
    expect(extract(html)).toMatchObject({ data: [{ y: [1, 2] }] });
  });

  it.each([NaN, Infinity, -Infinity])("refuse %s and say where it stands", (value) => {
    expect(() => embed({ ...figure, data: [{ y: [1, value] }] })).toThrow(
      `figure.data.0.y.1 is ${value}; it must be a finite number, or null for a gap`,
    );
    expect(() => embed({ ...figure, data: [{ y: Float64Array.of(value) }] })).toThrow(
      `figure.data.0.y.0 is ${value}`,
    );
  });

  it("leave other HTML alone, also where the element does not come first", () => {
    for (const html of ["<b>x</b>", "", `<p></p>${embed(table)}`, "<script>alert(1)</script>"]) {
      expect(extract(html)).toBeUndefined();
    }
  });

  const script = (kind: string, json: string) =>
    `<script type="application/json" data-resinwright="${kind}">${json}</script>`;
  it.each([
    [
      script("verdict", "{}"),
      'output: unknown content "verdict"; known: figure, table, panel, sheet, summary',
    ],
    [script("table", "{"), "output table: the data: "],
    [script("table", JSON.stringify(figure)), "output table: kind: "],
    [
      script("table", JSON.stringify({ ...table, colour: 1 })),
      'output table: the data: Unrecognized key: "colour"',
    ],
    [
      script("table", JSON.stringify({ ...table, rows: [["a", 1], ["b"]] })),
      "output table: rows.1: has 1 cells; it must have 2, one a column",
    ],
    [script("figure", JSON.stringify({ ...figure, table: undefined })), "output figure: table: "],
  ])("refuse what is not a figure or a table: %s", (html, message) => {
    expect(() => extract(html)).toThrow(message);
  });
});

describe("tableHtml", () => {
  it("is a table with a caption, headed columns with units, and named rows", () => {
    const html = tableHtml(table, "Table 3.");
    expect(html).toContain("<caption><span><strong>Table 3.</strong> Viscosity</span></caption>");
    expect(html).toContain(`<th scope="col" class="right">viscosity <span class="unit">(mPa·s)</span></th>`);
    expect(html).toContain(
      `<tr><th scope="row" class="left whole">IBOA</th><td class="right">8.235</td></tr>`,
    );
    expect(html).toContain(`<td class="right">–</td>`);
    expect(tableHtml(table)).toContain("<caption><span>Viscosity</span></caption>");
    expect(tableHtml({ ...table, rowHeader: false })).not.toContain(`scope="row"`);
  });

  it.each([
    [8.23456, "8.235"],
    [-0.5, "−0.5"],
    [0, "0"],
    [28000, "28000"],
    [123456, "123456"],
    [-12, "−12"],
    [123456.7, "123500"],
    [1234567, "1.235 × 10⁶"],
    [0.00001234, "1.234 × 10⁻⁵"],
  ])("writes the number %s as %s", (value, text) => {
    expect(tableHtml({ ...table, rows: [["x", value]] })).toContain(`<td class="right">${text}</td>`);
  });

  it("shows text as it was given, without breaking a word at its hyphens", () => {
    const html = tableHtml({ ...table, rows: [["5888-33-5", "450 (300 to 610)"]] });
    expect(html).toContain(`class="left whole">5888-33-5<`);
    expect(html).toContain(`class="right">450 (300 to 610)<`);
  });

  it("marks a table of many columns, which a screen gives more room and print sets smaller", () => {
    const columns = Array.from({ length: 9 }, () => ({ name: "x", align: "left" }) as const);
    expect(tableHtml({ ...table, columns, rows: [] })).toMatch(/^<table class="many crowded">/);
    expect(tableHtml({ ...table, columns: columns.slice(3), rows: [] })).toMatch(/^<table class="many">/);
    expect(tableHtml({ ...table, columns: columns.slice(4), rows: [] })).toMatch(/^<table>/);
  });

  it("gives more room to a table whose columns cannot be made narrow enough for prose", () => {
    const intervals = Array.from({ length: 4 }, () => "0.859 (0.783 to 0.943)");
    const columns = ["change", "a", "b", "c", "d"].map((name, i) => ({
      name,
      align: i === 0 ? ("left" as const) : ("right" as const),
    }));
    const wide = { ...table, columns, rows: [["nitrogen under the film", ...intervals]] };
    expect(tableHtml(wide)).toMatch(/^<table class="many">/);
    expect(tableHtml({ ...wide, rows: [["nitrogen", 1, 2, 3, 4]] })).toMatch(/^<table>/);
  });

  it("lets sentences run over lines, and names each cell of their table but the first for a narrow page", () => {
    const sentence = "Nobody has measured it here: stir a little into the resin first.";
    const html = tableHtml({ ...table, rows: [["IBOA", sentence]] });
    expect(html).toMatch(/^<table class="sentences">/);
    expect(html).toContain(`<td class="right sentence" data-label="viscosity (mPa·s)">${sentence}</td>`);
    expect(html).toContain(`<th scope="row" class="left whole">IBOA</th>`);
    expect(tableHtml(table)).not.toContain("data-label");
  });

  it("marks a long table, which print may break between pages", () => {
    const rows = Array.from({ length: 7 }, () => table.rows[0]!);
    expect(tableHtml({ ...table, rows })).toMatch(/^<table class="long">/);
    expect(tableHtml({ ...table, rows: rows.slice(1) })).toMatch(/^<table>/);
  });

  it("keeps hostile text as text", () => {
    const html = tableHtml(
      {
        kind: "table",
        caption: hostile,
        columns: [{ name: hostile, unit: hostile, align: "left" }],
        rows: [[hostile]],
      },
      hostile,
    );
    expect(html).not.toMatch(/<script|<img/);
    expect(html.match(/&lt;script&gt;/g)).toHaveLength(5);
  });
});
