// A notebook that has run, as one page that needs nothing else: no network, no other file, no kernel.
// Prose is set, code is folded away, figures can be hovered over, tables are tables.

import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import path from "node:path";
import { codeHtml } from "./code.js";
import { decisionMark } from "./content.js";
import { escapeHtml } from "./html.js";
import { inlineHtml, markdownHtml, plainText, splitTitle, type Heading } from "./markdown.js";
import type { CodeCell, Notebook } from "./notebookFile.js";
import { contentIn, outputHtml, type Counts } from "./outputs.js";
import { pageHtml, type Origin } from "./page.js";
import { pageScript } from "./pageScript.js";
import type { SheetContent } from "./sheet/content.js";
import { papers, sheetFile, sheetHtml, sheetLinks } from "./sheet/page.js";
import type { Paper } from "./sheet/style.js";
import type { SummaryContent } from "./summary.js";
import { summaryHtml } from "./summaryHtml.js";

/** A page: its title and first paragraph in plain words, and the whole of it as HTML. */
export interface Page {
  readonly title: string;
  readonly summary: string;
  /** What the notebook decided, in plain words, if it did. */
  readonly decision?: string;
  /** The weigh-out sheets it shows. */
  readonly sheets: readonly SheetContent[];
  readonly html: string;
}

/** A page as the index lists it; `file` is the name of the page's file. */
export interface IndexEntry {
  readonly file: string;
  readonly title: string;
  readonly summary: string;
  readonly decision?: string;
  readonly sheets?: readonly SheetContent[];
}

/**
 * Renders a notebook with its outputs to one self-contained HTML page.
 *
 * The title is the heading of level 1 that the first cell starts with, or the name of the file.
 * @throws InputError naming the cell for a formula, figure, table or picture that cannot be shown.
 */
export function renderNotebook(given: { readonly notebook: Notebook; readonly origin: Origin }): Page {
  const { notebook, origin } = given;
  const name = path.basename(notebook.file, ".ipynb");
  const [first] = notebook.cells;
  const { title = escapeMarkdown(name), rest } =
    first?.kind === "markdown" ? splitTitle(first.source) : { rest: undefined };
  const titleHtml = inlineHtml({ source: title, where: notebook.file });
  const counts: Counts = { figures: 0, tables: 0, panels: 0, pictures: 0, headings: [], sheets: [] };
  let number = 0;
  const body = notebook.cells.map((cell, i) => {
    if (cell.kind === "code") return codeCellHtml(cell, ++number, notebook.file, counts);
    const source = i === 0 && rest !== undefined ? rest : cell.source;
    return markdownHtml({ source, where: `${notebook.file}, cell ${i + 1}`, headings: counts.headings });
  });
  const contents = contentsHtml(counts.headings);
  const html = pageHtml({
    title: plainText(titleHtml),
    origin,
    bar: `<header class="bar"><a href="index.html">All notebooks</a></header>`,
    mainClass: contents === "" ? "page" : "page has-contents",
    main: `<h1>${titleHtml}</h1>\n${cardOf(notebook)}\n${contents}\n${body.join("\n")}`,
    note: number === 0 ? "" : `<p class="print-only">${printNote}</p>\n`,
    scripts: [
      ...(counts.figures > 0 ? [figureLibrary()] : []),
      ...(counts.panels > 0 ? [panelScript()] : []),
      pageScript,
    ],
  });
  return {
    title: plainText(titleHtml),
    summary: firstParagraph(body),
    decision: decisionOf(notebook),
    sheets: counts.sheets,
    html,
  };
}

/** Renders a sheet on every paper, by file name; the pages link to the others of the same folder. */
export function renderSheet(given: {
  readonly content: SheetContent;
  readonly origin: Origin;
}): Map<string, string> {
  const { content, origin } = given;
  const bar = `<header class="bar"><a href="index.html">All notebooks</a> · ${sheetLinks(content)}</header>`;
  return new Map(
    (Object.keys(papers) as Paper[]).map((paper) => [
      sheetFile(content, paper),
      sheetHtml({ content, paper, origin, bar }),
    ]),
  );
}

/** Renders the page that lists all others, in the order given, with what each decided. */
export function renderIndex(given: {
  readonly pages: readonly IndexEntry[];
  readonly origin: Origin;
  readonly title: string;
  readonly introduction: string;
}): string {
  const items = given.pages.map(({ file, title, summary, decision, sheets = [] }) => {
    const words = summary === "" ? "" : `<p>${escapeHtml(summary)}</p>`;
    const decided =
      decision === undefined
        ? ""
        : `<p class="decided"><strong>Decided.</strong> ${escapeHtml(decision)}</p>`;
    const toPrint = sheets.map((sheet) => `<p class="sheets">${sheetLinks(sheet)}</p>`).join("");
    return `<li><a href="${escapeHtml(encodeURIComponent(file))}">${escapeHtml(title)}</a>${words}${decided}${toPrint}</li>`;
  });
  const heading = `<h1>${escapeHtml(given.title)}</h1>\n<p>${escapeHtml(given.introduction)}</p>`;
  const main = `${heading}\n<ol class="list">\n${items.join("\n")}\n</ol>`;
  return pageHtml({ title: given.title, main, origin: given.origin });
}

const printNote =
  "The code and the numbers behind the figures are left out in print; on a screen they are folded away beside each result.";

function codeCellHtml({ source, outputs }: CodeCell, number: number, file: string, counts: Counts): string {
  const where = `${file}, code cell ${number}`;
  const code = codeHtml({ source: source.trim(), language: "typescript" });
  const folded =
    source.trim() === ""
      ? ""
      : `<details class="code"><summary>Code of cell ${number}</summary>\n<pre class="scroll"><code>${code}</code></pre></details>\n`;
  return folded + outputs.map((output) => outputHtml({ output, where, counts })).join("");
}

function contentsHtml(headings: readonly Heading[]): string {
  const listed = headings.filter(({ level }) => level <= 3);
  if (listed.length < 2) return "";
  const items = listed.map(({ level, anchor, html }) => {
    const deeper = level === 3 ? ` class="deeper"` : "";
    return `<li${deeper}><a href="#${escapeHtml(encodeURIComponent(anchor))}">${escapeHtml(plainText(html))}</a></li>`;
  });
  return `<div class="contents-place"><nav class="contents" aria-label="Contents"><p>Contents</p>\n<ol>\n${items.join("\n")}\n</ol></nav></div>`;
}

function decisionOf({ cells }: Notebook): string | undefined {
  const outputs = cells.flatMap((cell) => (cell.kind === "code" ? cell.outputs : []));
  const said = outputs.flatMap((output) =>
    output.kind === "display" ? (output.data["text/markdown"] ?? []) : [],
  );
  return said.findLast((text) => text.startsWith(decisionMark))?.slice(decisionMark.length);
}

function firstParagraph(body: readonly string[]): string {
  const found = /<p>(?!<img)([^]*?)<\/p>/.exec(body.join("\n"));
  return found === null ? "" : plainText(found[1]!).replace(/\s+/g, " ").trim();
}

function cardOf({ file, cells }: Notebook): string {
  const summaries = cells.flatMap((cell): SummaryContent[] => {
    const outputs = cell.kind === "code" ? cell.outputs : [];
    return outputs.flatMap((output) => {
      const html = output.kind === "display" ? output.data["text/html"] : undefined;
      const content = html === undefined ? undefined : contentIn(html, file);
      return content?.kind === "summary" ? [content] : [];
    });
  });
  const last = summaries.at(-1);
  return last === undefined ? "" : summaryHtml(last);
}

function figureLibrary(): string {
  return scriptText(createRequire(import.meta.url).resolve("plotly.js-cartesian-dist-min"));
}

/** The panel's script, which `npm run build` bundles. */
function panelScript(): string {
  const library = createRequire(import.meta.url).resolve("resinwright/package.json");
  return scriptText(path.join(path.dirname(library), "dist", "panel", "panel.js"));
}

function scriptText(file: string): string {
  return readFileSync(file, "utf8").replaceAll("</script", "<\\/script");
}

function escapeMarkdown(text: string): string {
  return text.replace(/[\\`*_[\]$<>#]/g, "\\$&");
}
