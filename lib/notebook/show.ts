// Shows a figure or a table in a notebook: the data for the rendered page, then what a running notebook displays itself.
// The only file that knows tslab; it asks for it when something is shown, so the library also loads without a kernel.

import { randomUUID } from "node:crypto";
import { createRequire } from "node:module";
import type * as Tslab from "tslab";
import { InputError } from "../door.js";
import { embed, sliderHtml, tableHtml, type FigureContent, type TableContent } from "./content.js";
import { escapeHtml } from "./html.js";

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
  display("showTable", embed(table) + tableHtml(table));
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

function liveFigure(figure: FigureContent): string {
  const id = `figure-${randomUUID()}`;
  return [
    `<figure id="${id}" style="margin:0">`,
    `<div role="img" aria-label="${escapeHtml(figure.alternativeText)}"></div>`,
    ...(figure.moments === undefined ? [] : [sliderHtml(figure.moments, id)]),
    `<figcaption>${escapeHtml(figure.caption)}</figcaption>`,
    `<details><summary style="display:list-item">Data behind this figure</summary>${tableHtml(figure.table)}</details>`,
    `</figure>`,
    `<script>(${drawLive})(document.getElementById("${id}"));</script>`,
  ].join("\n");
}

/**
 * Runs in the browser of a live notebook. plotly is loaded once a page, from the notebook server; while it loads,
 * `define` is out of sight, or plotly would hand itself to the notebook's module loader instead of the page.
 */
const drawLive = `function (figure) {
  const page = window;
  page.plotlyLoaded ??= new Promise((resolve, reject) => {
    const { define } = page;
    page.define = undefined;
    const script = document.createElement("script");
    script.src = (document.body.dataset.baseUrl ?? "/") + "files/node_modules/plotly.js-dist/plotly.js";
    const restored = (next) => () => { page.define = define; next(); };
    script.onload = restored(resolve);
    script.onerror = restored(reject);
    document.head.append(script);
  });
  const target = figure.firstElementChild;
  const { data, layout, moments } = JSON.parse(figure.previousElementSibling.textContent);
  const draw = (shown) => page.Plotly.react(target, shown, layout, { displayModeBar: false, responsive: true });
  const follow = () => {
    const box = figure.querySelector(".moments");
    const [slider, name] = [box.querySelector("input"), box.querySelector("output")];
    box.hidden = false;
    slider.addEventListener("input", () => {
      const step = moments.steps[slider.value];
      name.textContent = step.name;
      slider.setAttribute("aria-valuetext", step.name);
      draw(step.data);
    });
  };
  page.plotlyLoaded.then(
    () => { draw(data); if (moments !== undefined) follow(); },
    () => { target.textContent = "The figure could not be drawn here; its numbers stand below."; },
  );
}`;
