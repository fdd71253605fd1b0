// Shows figures, tables, panels, weigh-out sheets and prose in a notebook: the data for the rendered page, then what a running
// notebook displays itself.
// The only file that knows tslab; it asks for it when something is shown, so the library also loads without a kernel.

import { createRequire } from "node:module";
import type * as Tslab from "tslab";
import type { Case } from "../assess/case.js";
import { InputError } from "../door.js";
import { embed, type FigureContent, type TableContent } from "./content.js";
import { escapeHtml } from "./html.js";
import { liveFigure, liveTable } from "./live.js";
import { originOf } from "./origin.js";
import { panelOf } from "./panel/panel.js";
import { sheetOf, type SheetInput } from "./sheet.js";
import { papers, sheetFile, sheetHtml } from "./sheet/page.js";
import type { Paper } from "./sheet/style.js";
import { summaryOf } from "./summary.js";

/**
 * Shows a figure in the cell that calls it, with its caption and the table behind it; nothing where there was nothing to draw.
 * @throws InputError outside a notebook.
 * @example
 * ```ts
 * import { shareFigure, showFigure } from "resinwright/notebook";
 * const cell = () => showFigure(shareFigure({
 *   caption: "What carries the doubt in the viscosity",
 *   conditions: "Invented resin, 25 °C",
 *   rows: [{ label: "temperature", share: 1 }],
 * }));
 * typeof cell; // → "function"
 * ```
 */
export function showFigure(figure: FigureContent | undefined): void {
  if (figure === undefined) return;
  display("showFigure", embed(figure) + liveFigure(figure));
}

/**
 * Shows a table in the cell that calls it; nothing where there is none.
 * @throws InputError outside a notebook.
 * @example
 * ```ts
 * import { showTable, tableOf } from "resinwright/notebook";
 * const cell = () => showTable(tableOf({ caption: "Batches", rows: [{ batch: "B1", mass_g: 12.5 }] }));
 * typeof cell; // → "function"
 * ```
 */
export function showTable(table: TableContent | undefined): void {
  if (table === undefined) return;
  display("showTable", embed(table) + liveTable(table));
}

/**
 * Shows the weigh-out sheet of a batch in the cell that calls it: as links to its pages for A4 and Letter, which `npm start` writes
 * beside the notebook's page and a running notebook offers to save.
 * @param input - As {@link sheetOf}; `file`, that of the brief.
 * @throws InputError as {@link sheetOf}; outside a notebook.
 * @example
 * ```ts
 * import { screenHazards, weighOut } from "resinwright";
 * import { openBrief, readSafetyRules } from "resinwright/files";
 * import { showSheet } from "resinwright/notebook";
 * const { brief, formulation, file } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
 * const sheet = weighOut({ formulation, batch_g: 500, balance });
 * const screening = screenHazards({ formulation, rules: readSafetyRules("data/rules") });
 * const cell = () => showSheet({ sheet, screening, brief, file });
 * typeof cell; // → "function"
 * ```
 */
export function showSheet({ file, ...input }: SheetInput & { readonly file: string }): void {
  const content = sheetOf(input);
  const origin = originOf(file);
  const links = (Object.keys(papers) as Paper[]).map((paper) => {
    const html = Buffer.from(sheetHtml({ content, paper, origin })).toString("base64");
    return `<a download="${escapeHtml(sheetFile(content, paper))}" href="data:text/html;base64,${html}">${papers[paper]}</a>`;
  });
  display("showSheet", `${embed(content)}<p>Save the weigh-out sheet to print it: ${links.join(" · ")}</p>`);
}

/**
 * Shows Markdown in the cell that calls it: a sentence whose numbers were computed.
 * @throws InputError outside a notebook.
 * @example
 * ```ts
 * import { showMarkdown } from "resinwright/notebook";
 * const cell = () => showMarkdown("**Decided.** Print at 30 °C.");
 * typeof cell; // → "function"
 * ```
 */
export function showMarkdown(text: string): void {
  display("showMarkdown", text, "markdown");
}

/**
 * Shows controls for ratio, initiator, absorber, light and temperature that recompute every property in the rendered page, with
 * this library. A live notebook says where the panel works.
 * @throws InputError as `assess`; outside a notebook.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { showPanel } from "resinwright/notebook";
 * const cell = () => showPanel(openBrief("data/briefs/flow-cell.json"));
 * typeof cell; // → "function"
 * ```
 */
export function showPanel(work: Case): void {
  display("showPanel", embed(panelOf(work)) + livePanel);
}

/** Heads the rendered page with a card of what was asked and decided; a live notebook shows nothing. @internal */
export function showSummary(given: { work: Case; decided: string }): void {
  display("showSummary", embed(summaryOf(given)));
}

const livePanel =
  "<p>The panel works on the rendered page: run <code>npm start</code> and open <code>rendered/index.html</code>.</p>";

/**
 * The kernel runs the copy of tslab it finds from the notebook's folder upwards, and `require` gives that very copy as
 * long as this library is installed in the same project. Another copy has no kernel behind it and says so.
 */
function display(shower: string, text: string, kind: "html" | "markdown" = "html"): void {
  const tslab = createRequire(import.meta.url)("tslab") as typeof Tslab;
  try {
    tslab.display[kind](text);
  } catch {
    throw new InputError(
      `${shower}: no notebook is running here; call it in a cell of a notebook of this project`,
    );
  }
}
