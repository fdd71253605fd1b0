import { describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import { embed, extract } from "../../lib/notebook/content.js";
import { summaryOf } from "../../lib/notebook/summary.js";
import { summaryHtml } from "../../lib/notebook/summaryHtml.js";
import { assessmentTable } from "../../lib/notebook/views.js";
import { readWorkbench } from "../../lib/recipe/files.js";
import { brief, formulationOf, shelf } from "../fixtures.js";

const flowCell = readWorkbench("data/briefs/flow-cell.json");
const summary = summaryOf({ work: flowCell, decided: "Go on." });

describe("summaryOf", () => {
  it("says what was asked, of which formulation, and what was decided", () => {
    expect(summary.asked).toEqual([
      "Flow-cell bodies for river-monitoring probes",
      "8 mW/cm² of led-412; PDMS film of 200 µm over air; layers of 50 µm at 28 °C",
    ]);
    expect(summary.formulation).toEqual([
      "Flow-cell resin, first proposal (invented for the demo)",
      "UDMA 55 %, IBOA 30 %, TEGDMA 13.6 %, BAPO 1.2 %, BBOT 0.15 %, MEHQ 0.05 %",
    ]);
    expect(summary.decided).toBe("Go on.");
  });

  it("gives every property that has a target, in the words of the assessment", () => {
    const rows = assessmentTable(assess(flowCell)).rows.filter(([, , , target]) => target !== null);
    expect(summary.rows.map((row) => [row.property, row.unit, row.value, row.target, row.verdict])).toEqual(
      rows,
    );
    expect(rows).toHaveLength(4);
  });

  it("names what to avoid, what to know, the hazard statements by holder and who decides", () => {
    const formulation = formulationOf({ THIN: 70, THICK: 27, PI: 2, AB: 1 });
    const avoid = [{ ingredient: "PI", reason: "it is on the list" }];
    const { cautions } = summaryOf({
      work: { formulation, brief: { ...brief, avoid }, shelf },
      decided: "No.",
    });
    expect(cautions[0]).toBe("The brief says to avoid PI: it is on the list.");
    expect(cautions[1]).toMatch(/^Before using the numbers, know: .*working curve estimated/);
    expect(cautions[2]).toBe("Hazard statements: H317 (THIN, THICK), H360FD (PI), not checked (AB).");
    expect(cautions[3]).toContain("Safety data sheets, local rules and a competent person decide.");
  });

  it("arrives on the page as it was sent", () => {
    expect(extract(embed(summary))).toEqual(summary);
  });
});

describe("summaryHtml", () => {
  it("is a section of its own, with cautions and a table whose rows are named", () => {
    const html = summaryHtml(summary);
    expect(html).toContain(`<section class="card" aria-label="Summary">`);
    expect(html).toContain("<dt>Decided</dt><dd>Go on.</dd>");
    expect(html).toContain(`<th scope="row" class="left">viscosity at print temperature (mPa s)</th>`);
    expect(html).toContain(`<ul class="cautions" aria-label="Cautions">`);
  });

  it("has no table where the brief sets no target, and keeps hostile text as text", () => {
    const hostile = `</script><img src=x onerror=alert(1)>`;
    const html = summaryHtml({
      ...summary,
      asked: [hostile],
      decided: hostile,
      cautions: [hostile],
      rows: [],
    });
    expect(html).not.toContain("<table");
    expect(html).not.toContain("<img");
    expect(html.match(/&lt;img/g)).toHaveLength(3);
  });
});
