// What a running notebook displays of a figure or a table: HTML with a few rules of its own, since Jupyter sets tables for other uses.
// It works in JupyterLab and in the notebook applications, without a network: the figure library comes from the notebook server.

import { randomUUID } from "node:crypto";
import { sliderHtml, tableHtml, type FigureContent, type TableContent } from "./content.js";
import { figureLook } from "./figureLook.js";
import { escapeHtml } from "./html.js";
import { darkPalette, lightPalette } from "./palette.js";

/** A table as a running notebook displays it. */
export function liveTable(table: TableContent): string {
  return `<style>${style}</style>\n<div class="resinwright">${tableHtml(table)}</div>`;
}

/**
 * A figure as a running notebook displays it. It must stand right behind the figure's data.
 * A notebook that is not trusted runs no script: it keeps the sentence, the caption and the numbers.
 */
export function liveFigure(figure: FigureContent): string {
  const id = `figure-${randomUUID()}`;
  return [
    `<figure id="${id}" class="resinwright" style="margin:0">`,
    `<div role="img" aria-label="${escapeHtml(figure.alternativeText)}"><p>Run this cell to see the drawing.</p></div>`,
    ...(figure.moments === undefined ? [] : [sliderHtml(figure.moments, id)]),
    `<figcaption>${escapeHtml(figure.caption)}</figcaption>`,
    `<details><summary style="display:list-item">Data behind this figure</summary>${tableHtml(figure.table)}</details>`,
    `</figure>`,
    `<style>${style}</style>`,
    `<script>(${drawLive})(document.getElementById("${id}"));</script>`,
  ].join("\n");
}

const style = [
  ".resinwright { overflow-x: auto; }",
  ".resinwright table { margin: 0.5em 0; border-collapse: collapse; font-variant-numeric: tabular-nums; }",
  ".resinwright caption { caption-side: top; padding: 0.25em 0; text-align: left; color: inherit; }",
  ".resinwright th, .resinwright td { max-width: 32em; text-align: left; vertical-align: baseline; white-space: normal; }",
  ".resinwright .right { text-align: right; }",
  ".resinwright .right, .resinwright .whole, .resinwright .unit { white-space: nowrap; }",
  ".resinwright tbody th, .resinwright .unit { font-weight: normal; }",
].join("\n");

/**
 * Runs in the browser of a running notebook. The figure library is loaded once a page; while it loads, `define` is out of
 * sight, or it would hand itself to the module loader of the older notebook application instead of the page.
 */
const drawLive = `function (figure) {
  const page = window;
  const { baseUrl = "/" } = document.body.dataset.baseUrl === undefined
    ? JSON.parse(document.getElementById("jupyter-config-data")?.textContent ?? "{}")
    : document.body.dataset;
  page.figureLibrary ??= new Promise((resolve, reject) => {
    const { define } = page;
    page.define = undefined;
    const script = document.createElement("script");
    script.src = baseUrl + "files/node_modules/plotly.js-dist/plotly.js";
    const restored = (next) => () => { page.define = define; next(); };
    script.onload = restored(resolve);
    script.onerror = restored(reject);
    document.head.append(script);
  });
  const target = figure.firstElementChild;
  const { data, layout, moments } = JSON.parse(figure.previousElementSibling.textContent);
  const colors = document.body.dataset.jpThemeLight === "false" ? ${JSON.stringify(darkPalette)} : ${JSON.stringify(lightPalette)};
  const look = ${figureLook};
  const draw = (shown) =>
    page.Plotly.react(target, shown, look(layout, colors), { displayModeBar: false, responsive: true });
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
  page.figureLibrary.then(
    () => {
      target.replaceChildren();
      draw(data);
      if (moments !== undefined) follow();
    },
    () => { target.textContent = "The figure could not be drawn here; its numbers stand below. Open the notebooks with npm run lab."; },
  );
}`;
