import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { extract } from "../../lib/notebook/content.js";
import { shareFigure } from "../../lib/notebook/figure/share.js";
import { startKernel, type Kernel } from "../../lib/notebook/kernel.js";
import { showFigure, showPanel, showSheet, showTable } from "../../lib/notebook/show.js";
import { sheetOf } from "../../lib/notebook/sheet.js";
import { tableOf } from "../../lib/notebook/table.js";
import { weighOut } from "../../lib/lab/batch.js";
import { screenHazards } from "../../lib/lab/hazards.js";
import { readSafetyRules } from "../../lib/lab/hazards/files.js";
import { readWorkbench } from "../../lib/recipe/files.js";

const shares = {
  caption: "Shares </script>",
  conditions: "Invented",
  rows: [{ label: "<b>a</b>", share: 1 }],
};
const batches = { caption: "Batches", rows: [{ batch: "B1", mass_g: 12.5 }] };

const { brief, formulation, file } = readWorkbench("data/briefs/flow-cell.json");
const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
const sheet = {
  sheet: weighOut({ formulation, batch_g: 500, balance }),
  screening: screenHazards({ formulation, rules: readSafetyRules("data/rules"), draws: 50 }),
  brief,
};

describe("outside a notebook", () => {
  it.each<[string, () => void]>([
    ["showFigure", () => showFigure(shareFigure(shares))],
    ["showTable", () => showTable(tableOf(batches))],
    ["showPanel", () => showPanel(readWorkbench("data/briefs/flow-cell.json"))],
    ["showSheet", () => showSheet({ ...sheet, file })],
  ])("%s says so", (name, call) => {
    expect(call).toThrow(
      `${name}: no notebook is running here; call it in a cell of a notebook of this project`,
    );
  });
});

describe("in a notebook", () => {
  // The kernel loads the built library, as a notebook does: `npm test` builds first.
  const root = fileURLToPath(new URL("../../", import.meta.url));
  let kernel: Kernel;
  beforeAll(async () => {
    kernel = await startKernel({ folder: root, environment: {} });
    const load = ["show", "table", "figure/share", "../recipe/files"].map(
      (file) => `...require("./lib/dist/notebook/${file}.js")`,
    );
    const run = await kernel.execute({ code: `const library = { ${load.join(", ")} };`, timeLimit_s: 60 });
    expect(run).toEqual({ status: "ok", outputs: [], errorText: "" });
  }, 60_000);
  afterAll(async () => {
    await kernel.stop();
  });

  /** The HTML that a cell displays, and nothing beside it. */
  async function htmlOf(code: string): Promise<string> {
    const { status, outputs, errorText } = await kernel.execute({ code, timeLimit_s: 60 });
    expect({ status, errorText, count: outputs.length }).toEqual({ status: "ok", errorText: "", count: 1 });
    const [output] = outputs;
    return output?.kind === "display" ? (output.data["text/html"] ?? "") : "";
  }

  it("a figure arrives as its data, its caption, its words and its table", async () => {
    const html = await htmlOf(`library.showFigure(library.shareFigure(${JSON.stringify(shares)}));`);
    expect(extract(html)).toEqual(JSON.parse(JSON.stringify(shareFigure(shares))));
    expect(html).toContain("<figcaption>Shares &lt;/script&gt;. Invented.</figcaption>");
    expect(html).toContain(
      'aria-label="Bars of 1 input by share of the doubt, largest first: &lt;b&gt;a&lt;/b&gt; 100 %."',
    );
    expect(html).toContain("Data behind this figure");
    expect(html).toContain("<p>Run this cell to see the drawing.</p>");
    expect(html).toContain("files/node_modules/plotly.js-dist/plotly.js");
  });

  it("a table arrives as its data and as HTML", async () => {
    const html = await htmlOf(`library.showTable(library.tableOf(${JSON.stringify(batches)}));`);
    expect(extract(html)).toEqual(JSON.parse(JSON.stringify(tableOf(batches))));
    expect(html).toContain("<table>");
  });

  it("a panel arrives as its data and a word on where it works", async () => {
    const html = await htmlOf(
      `library.showPanel(library.readWorkbench("${root}data/briefs/flow-cell.json"));`,
    );
    expect(extract(html)).toMatchObject({ kind: "panel", work: { brief: { id: "flow-cell" } } });
    expect(html).toContain("The panel works on the rendered page");
    expect(html).not.toContain(root);
  });

  it("a sheet arrives as its data, with a page for each paper to save", async () => {
    const code = `
      const { weighOut, screenHazards } = require("resinwright");
      const { openBrief, readSafetyRules } = require("resinwright/files");
      const { brief, formulation, file } = openBrief("data/briefs/flow-cell.json");
      const sheet = weighOut({ formulation, batch_g: 500, balance: ${JSON.stringify(balance)} });
      const screening = screenHazards({ formulation, rules: readSafetyRules("data/rules"), draws: 50 });
      library.showSheet({ sheet: sheet, screening: screening, brief: brief, file: file });`;
    const html = await htmlOf(code);
    expect(extract(html)).toEqual(sheetOf(sheet));
    const saved = [...html.matchAll(/<a download="([^"]*)" href="data:text\/html;base64,([^"]*)">([^<]*)</g)];
    expect(saved.map(([, name, , paper]) => [name, paper])).toEqual([
      ["weigh-out-a4.html", "A4"],
      ["weigh-out-letter.html", "US Letter"],
    ]);
    for (const [, , page] of saved)
      expect(Buffer.from(page!, "base64").toString()).toMatch(/^<!doctype html>[^]*Brief flow-cell\.json/);
  });

  it("frames load without a word on the error stream", async () => {
    const frame = `library.frameOf(${JSON.stringify(batches.rows)})`;
    const html = await htmlOf(
      `library.showTable(library.tableOfFrame({ caption: "Batches", frame: ${frame} }));`,
    );
    expect(extract(html)).toEqual(JSON.parse(JSON.stringify(tableOf(batches))));
  });
});
