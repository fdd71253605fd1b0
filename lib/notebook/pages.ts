// The public way to render: what sets pages is loaded at the first call, since cells that only draw figures do not need it.
// The work is in render.ts.

import type { Notebook } from "./notebookFile.js";
import type { Origin } from "./page.js";
import type { IndexEntry, Page } from "./render.js";

/**
 * Renders a notebook with its outputs to one self-contained HTML page, which asks nothing of any network or other file.
 *
 * The title is the heading of level 1 that the first cell starts with, or the name of the file.
 * @throws InputError naming the cell for a formula, figure, table or picture that cannot be shown.
 * @example
 * ```ts
 * import { renderNotebook } from "resinwright/notebook";
 * const page = await renderNotebook({
 *   notebook: { file: "trial.ipynb", cells: [{ kind: "markdown", source: "# Does it flow?\n\nAt 25 °C, yes." }] },
 *   origin: { brief: "flow-cell.json", libraryVersion: "0.1.0", nodeVersion: "20.20.2", date: "2026-01-05" },
 * });
 * page.title; // → "Does it flow?"
 * page.summary; // → "At 25 °C, yes."
 * ```
 */
export async function renderNotebook(given: {
  readonly notebook: Notebook;
  readonly origin: Origin;
}): Promise<Page> {
  return (await import("./render.js")).renderNotebook(given);
}

/**
 * Renders the page that lists all others, in the order given, with what each decided, under a title and a paragraph.
 * @example
 * ```ts
 * import { renderIndex } from "resinwright/notebook";
 * const html = await renderIndex({
 *   title: "Camera housings",
 *   introduction: "Printed in-house.",
 *   pages: [{ file: "01-viscosity.html", title: "Does it flow?", summary: "At 25 °C, yes." }],
 *   origin: { brief: "flow-cell.json", libraryVersion: "0.1.0", nodeVersion: "20.20.2", date: "2026-01-05" },
 * });
 * html.includes('<a href="01-viscosity.html">Does it flow?</a>'); // → true
 * ```
 */
export async function renderIndex(given: {
  readonly pages: readonly IndexEntry[];
  readonly origin: Origin;
  readonly title: string;
  readonly introduction: string;
}): Promise<string> {
  return (await import("./render.js")).renderIndex(given);
}
