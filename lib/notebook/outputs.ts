// What a cell gave, as HTML of a page: figures, tables, panels, text, prose and pictures; anything else as text.
// Nothing a cell writes reaches the page as HTML of its own.

import { InputError } from "../door.js";
import {
  extract,
  scrolling,
  sliderHtml,
  tableHtml,
  toJson,
  type Content,
  type FigureContent,
} from "./content.js";
import { escapeHtml } from "./html.js";
import { markdownHtml, type Heading } from "./markdown.js";
import type { Output } from "./notebookFile.js";
import type { PanelContent } from "./panel/panel.js";
import type { SheetContent } from "./sheet/content.js";
import { sheetLinks } from "./sheet/page.js";

/** What is counted over a page: figures, tables, panels and pictures shown so far, headings, and the sheets it goes with. */
export interface Counts {
  figures: number;
  tables: number;
  panels: number;
  pictures: number;
  readonly headings: Heading[];
  readonly sheets: SheetContent[];
}

/**
 * One output as HTML; `counts` is brought up to date.
 * @throws InputError naming `where` for a figure, table, picture or formula that cannot be shown.
 */
export function outputHtml(given: { output: Output; where: string; counts: Counts }): string {
  const { output, where, counts } = given;
  if (output.kind === "text") return textHtml(output.text);
  const { data } = output;
  const html = data["text/html"];
  const content = html === undefined ? undefined : contentIn(html, where);
  if (content !== undefined) return contentHtml(content, counts);
  if (data["image/svg+xml"] !== undefined) return svgHtml(data["image/svg+xml"], counts);
  if (data["image/png"] !== undefined) return pngHtml(data["image/png"], where, counts);
  if (data["text/markdown"] !== undefined) {
    return markdownHtml({ source: data["text/markdown"], where, headings: counts.headings });
  }
  return textHtml(data["text/plain"] ?? Object.values(data).join("\n"));
}

/** The content that HTML of a cell carries, or undefined. @throws InputError naming `where`. */
export function contentIn(html: string, where: string): Content | undefined {
  try {
    return extract(html);
  } catch (error) {
    throw new InputError(`${where}: ${(error as Error).message}`);
  }
}

function contentHtml(content: Content, counts: Counts): string {
  if (content.kind === "sheet") {
    counts.sheets.push(content);
    return `<p>${sheetLinks(content)}</p>\n`;
  }
  if (content.kind === "figure") return figureHtml(content, ++counts.figures);
  if (content.kind === "panel") return panelHtml(content, ++counts.panels);
  // The card stands at the head of the page, not here.
  if (content.kind === "summary") return "";
  return `${scrolling(tableHtml(content, `Table ${++counts.tables}.`), `Table ${counts.tables}`)}\n`;
}

function figureHtml(
  { caption, alternativeText, data, layout, table, moments }: FigureContent,
  number: number,
): string {
  const id = `resinwright-figure-${number}`;
  // What a slider shows first is among its steps.
  const drawing = moments === undefined ? { data, layout } : { layout, moments };
  return `<figure class="drawn" id="${id}">
<div class="plot" role="img" aria-labelledby="${id}-name" aria-describedby="${id}-words"></div>
<script type="application/json">${toJson(drawing, "figure")}</script>${moments === undefined ? "" : `\n${sliderHtml(moments, id)}`}
<noscript><p>The drawing needs JavaScript; its words and numbers stand below.</p></noscript>
<figcaption>
<p class="name" id="${id}-name"><strong>Figure ${number}.</strong> ${escapeHtml(caption)}</p>
</figcaption>
<details class="data"><summary>Figure ${number} in words and numbers</summary>
<p id="${id}-words">${escapeHtml(alternativeText)}</p>
${scrolling(tableHtml(table), `Data behind figure ${number}`)}
</details>
</figure>
`;
}

function panelHtml(content: PanelContent, number: number): string {
  return `<section class="panel" id="resinwright-panel-${number}" aria-label="Panel ${number}: other settings">
<script type="application/json">${toJson(content, "panel")}</script>
<noscript><p>This panel computes in the page. It needs a browser that may run scripts; everything else on this page stands without.</p></noscript>
</section>
`;
}

function textHtml(text: string): string {
  return `<pre class="output scroll">${escapeHtml(text.trimEnd())}</pre>\n`;
}

// As a picture, SVG runs no script and fetches nothing, whatever it holds.
function svgHtml(svg: string, counts: Counts): string {
  const title = /<title[^>]*>([^<]*)<\/title>/.exec(svg)?.[1]?.trim();
  const source = `data:image/svg+xml;base64,${Buffer.from(svg).toString("base64")}`;
  return pictureHtml(source, title, counts);
}

function pngHtml(base64: string, where: string, counts: Counts): string {
  if (!/^[A-Za-z0-9+/\s]+={0,2}\s*$/.test(base64)) {
    throw new InputError(
      `${where}: a picture of type image/png is not base64; display the bytes of a PNG file`,
    );
  }
  return pictureHtml(`data:image/png;base64,${base64.replace(/\s/g, "")}`, undefined, counts);
}

function pictureHtml(source: string, title: string | undefined, counts: Counts): string {
  const alternative =
    title === undefined || title === "" ? `Picture ${++counts.pictures}, without a description` : title;
  return `<p><img src="${source}" alt="${escapeHtml(alternative)}"></p>\n`;
}
