// Shows a figure or a table in a notebook: the data for the rendered page, then what a running notebook displays itself.
// The only file that knows tslab; it asks for it when something is shown, so the library also loads without a kernel.

import { createRequire } from "node:module";
import type * as Tslab from "tslab";
import { InputError } from "../door.js";
import { embed, type FigureContent, type TableContent } from "./content.js";
import { liveFigure, liveTable } from "./live.js";

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
 * Shows a table in the cell that calls it.
 * @throws InputError outside a notebook.
 * @example
 * ```ts
 * import { showTable, tableOf } from "resinwright/notebook";
 * const cell = () => showTable(tableOf({ caption: "Batches", rows: [{ batch: "B1", mass_g: 12.5 }] }));
 * typeof cell; // → "function"
 * ```
 */
export function showTable(table: TableContent): void {
  display("showTable", embed(table) + liveTable(table));
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
