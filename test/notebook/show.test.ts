import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { extract } from "../../lib/notebook/content.js";
import { shareFigure } from "../../lib/notebook/figure/share.js";
import { startKernel, type Kernel } from "../../lib/notebook/kernel.js";
import { showFigure, showTable } from "../../lib/notebook/show.js";
import { tableOf } from "../../lib/notebook/table.js";

const shares = {
  caption: "Shares </script>",
  conditions: "Invented",
  rows: [{ label: "<b>a</b>", share: 1 }],
};
const batches = { caption: "Batches", rows: [{ batch: "B1", mass_g: 12.5 }] };

describe("outside a notebook", () => {
  it.each<[string, () => void]>([
    ["showFigure", () => showFigure(shareFigure(shares))],
    ["showTable", () => showTable(tableOf(batches))],
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
    const load = ["show", "table", "figure/share"].map(
      (file) => `...require("./lib/dist/notebook/${file}.js")`,
    );
    const run = await kernel.execute({ code: `const library = { ${load.join(", ")} };`, timeLimit_s: 60 });
    expect(run).toEqual({ status: "ok", outputs: [], errorText: "" });
  });
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
    expect(html).toContain("files/node_modules/plotly.js-cartesian-dist-min/plotly-cartesian.min.js");
  });

  it("a table arrives as its data and as HTML", async () => {
    const html = await htmlOf(`library.showTable(library.tableOf(${JSON.stringify(batches)}));`);
    expect(extract(html)).toEqual(JSON.parse(JSON.stringify(tableOf(batches))));
    expect(html).toContain("<table>");
  });

  it("frames load without a word on the error stream", async () => {
    const frame = `library.frameOf(${JSON.stringify(batches.rows)})`;
    const html = await htmlOf(
      `library.showTable(library.tableOfFrame({ caption: "Batches", frame: ${frame} }));`,
    );
    expect(extract(html)).toEqual(JSON.parse(JSON.stringify(tableOf(batches))));
  });
});
