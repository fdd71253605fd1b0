// The page a weigh-out sheet is printed from: what to know, what to make first, what to weigh with room to write, and what
// to do when it goes wrong. All text of the sheet is escaped here.

import { InputError, unknownName } from "../../door.js";
import { scrolling } from "../content.js";
import { escapeHtml } from "../html.js";
import { pageHtml, type Origin } from "../page.js";
import type { SheetContent, SheetMasterBatch, SheetPortion } from "./content.js";
import { sheetStyle, type Paper } from "./style.js";

/** The papers with their name on a page. */
export const papers: Readonly<Record<Paper, string>> = { A4: "A4", Letter: "US Letter" };

/** The name of the file that holds a sheet on a paper. */
export function sheetFile({ name }: SheetContent, paper: Paper): string {
  return `${name}-${paper.toLowerCase()}.html`;
}

/** Links to the files of a sheet beside the page they stand on. */
export function sheetLinks(content: SheetContent): string {
  const links = Object.entries(papers).map(([paper, name]) => {
    const file = sheetFile(content, paper as Paper);
    return `<a href="${escapeHtml(file)}">weigh-out sheet, ${name}</a>`;
  });
  return links.join(" · ");
}

/**
 * A sheet as a page; `bar` stands above it, on a screen only.
 * @throws InputError when the paper is none of {@link papers}.
 */
export function sheetHtml(given: {
  readonly content: SheetContent;
  readonly paper: Paper;
  readonly origin: Origin;
  readonly bar?: string;
}): string {
  const { content, paper, origin, bar } = given;
  if (!Object.hasOwn(papers, paper))
    throw new InputError(unknownName("sheet", "paper", paper, Object.keys(papers)));
  return pageHtml({
    title: `${content.title} (${papers[paper]})`,
    main: mainOf(content, paper, origin),
    origin,
    mainClass: "page sheet",
    style: sheetStyle({ paper, label: `${content.label}, computed ${origin.date}` }),
    ...(bar === undefined ? {} : { bar }),
  });
}

function mainOf(content: SheetContent, paper: Paper, origin: Origin): string {
  return [
    `<h1>${escapeHtml(content.title)}</h1>`,
    `<p class="screen-only">Made to be printed across ${papers[paper]} paper and written on with a pen.</p>`,
    writtenFields,
    factsHtml(content, origin),
    content.warnings.length === 0 ? "" : `<h2>Stop: read this first</h2>${list(content.warnings)}`,
    `<h2>Before a bottle is opened</h2>`,
    `<div class="side-by-side">${list(content.protection)}</div>`,
    `<p>${decides}</p>`,
    content.masterBatches.length === 0 ? "" : masterBatchesHtml(content.masterBatches),
    portionsHtml(content.portions),
    wrongHtml,
    hazardsHtml(content),
    `<h2>Keeping it</h2>`,
    `<div class="side-by-side">${list(content.storage)}</div>`,
  ].join("\n");
}

const decides =
  "Screening only: the suppliers' safety data sheets, local rules and a competent person decide.";

const writtenFields = `<dl class="written">
${["Batch (name on the bottle)", "Date", "Weighed by", "Balance, last checked"].map((name) => `<div><dt>${name}</dt><dd></dd></div>`).join("\n")}
</dl>`;

function factsHtml({ facts }: SheetContent, { date, libraryVersion }: Origin): string {
  const computed = { name: "Computed", text: `${date}, by resinwright ${libraryVersion}` };
  const items = [...facts, computed].map(
    ({ name, text }) => `<div><dt>${escapeHtml(name)}</dt><dd>${escapeHtml(text)}</dd></div>`,
  );
  return `<dl class="facts">\n${items.join("\n")}\n</dl>`;
}

function masterBatchesHtml(masterBatches: readonly SheetMasterBatch[]): string {
  const head = `<tr><th scope="col">Weigh</th>${massHead("Target")}${penHead}</tr>`;
  const one = ({ title, weighings, notes }: SheetMasterBatch) => {
    const rows = weighings.map(
      ({ what, target }) =>
        `<tr><th scope="row">${escapeHtml(what)}</th><td class="right target">${escapeHtml(target)}</td>${penCells("")}</tr>`,
    );
    const columns = ["what", "mass", ...penColumns];
    const table = tableHtml({ caption: title, columns, head, rows, kind: "master" });
    return `<div>${table}${list(notes)}</div>`;
  };
  return `<h2>Make first: master batches</h2>\n<div class="masters">${masterBatches.map(one).join("\n")}</div>`;
}

function portionsHtml(portions: readonly SheetPortion[]): string {
  const head = `<tr><th scope="col" class="right">Step</th><th scope="col">Portion, and why now</th>${massHead("Target")}${massHead("Low to high")}${massHead("In the vessel")}${penHead}</tr>`;
  return `<h2 class="at-the-bench">Weigh, in this order</h2>\n${tableHtml({
    caption: "Each portion with its limits and what the vessel holds after it, by the targets",
    columns: ["step", "what", "mass", "limits", "vessel", ...penColumns],
    head,
    rows: portions.map(portionRow),
    kind: "weigh",
  })}`;
}

function portionRow({ line, portion, identity, reason, notes, target, limits, total, lot }: SheetPortion) {
  const cas = identity === "" ? "" : ` <span class="unit">CAS ${escapeHtml(identity)}</span>`;
  const flags = notes.map((note) => `<strong class="flag">${escapeHtml(note)}.</strong> `).join("");
  return `<tr><td class="right">${line}</td><th scope="row"><span class="name">${escapeHtml(portion)}</span>${cas}<br><span class="reason">${flags}${escapeHtml(reason)}.</span></th><td class="right target">${escapeHtml(target)}</td><td class="right">${escapeHtml(limits)}</td><td class="right">${escapeHtml(total)}</td>${penCells(escapeHtml(lot))}</tr>`;
}

const penColumns = ["lot", "actual", "initials", "done"];

const penHead = `<th scope="col" class="pen">Lot</th><th scope="col" class="pen">Weighed<br><span class="unit">(g)</span></th><th scope="col" class="pen">Initials</th><th scope="col" class="pen">Done</th>`;

function penCells(lot: string): string {
  return `<td class="pen">${lot}</td><td class="pen"></td><td class="pen"></td><td class="pen"><span class="tick"></span></td>`;
}

function massHead(name: string): string {
  return `<th scope="col" class="right">${name} <span class="unit">(g)</span></th>`;
}

const wrongHtml = `<div class="whole-block"><h2>If a portion is weighed wrong</h2>
<div class="side-by-side"><ul>
<li>Write down what the balance shows, at once, also when it is wrong. Too little: add the rest. Too much in the vessel: do not scoop it back; it brings the rest along.</li>
<li>Go on if the next steps do not depend on it, or stop and cover the vessel. The correction additions are worked out by notebook 06, under “Putting it right”, or by <code>rescue</code> in a script, from the masses written above.</li>
<li>Another substance than the sheet names went in: stop. It does not come out again; keep the vessel apart, under another name, until it is decided what becomes of it.</li>
<li>Afterwards the masses and lots go into <code>measurements/batches/</code> (see <code>data/README.md</code>), and the notebook says what was really made.</li>
</ul></div></div>`;

function hazardsHtml({ hazards, findings, law, caution }: SheetContent): string {
  const rows = hazards.map(
    ({ ingredient, name, cas, statements }) =>
      `<tr><th scope="row">${escapeHtml(ingredient)}</th><td>${escapeHtml(name)}</td><td class="whole">${escapeHtml(cas)}</td><td>${escapeHtml(statements)}</td></tr>`,
  );
  const head = ["Ingredient", "Name", "CAS number", "Hazard statements"].map(
    (column) => `<th scope="col">${column}</th>`,
  );
  const table = tableHtml({
    caption: "Hazard statements known for the ingredients. “Nobody has checked” is not “none”",
    columns: ["ingredient", "chemical", "cas", "statements"],
    head: `<tr>${head.join("")}</tr>`,
    rows,
    kind: "hazards",
  });
  return `<h2>What is in it</h2>\n${table}\n<div class="side-by-side">${list(findings)}</div>\n<p>${escapeHtml([caution, ...law].join(" "))}</p>`;
}

function tableHtml(given: {
  caption: string;
  columns: readonly string[];
  head: string;
  rows: readonly string[];
  kind: string;
}): string {
  const { caption, columns, head, rows, kind } = given;
  const table = `<table class="${kind}">
<caption><span>${escapeHtml(caption)}</span></caption>
<colgroup>${columns.map((column) => `<col class="${column}">`).join("")}</colgroup>
<thead>${head}</thead>
<tbody>${rows.join("\n")}</tbody></table>`;
  return scrolling(table, caption);
}

function list(texts: readonly string[]): string {
  return `<ul>\n${texts.map((text) => `<li>${escapeHtml(text)}</li>`).join("\n")}\n</ul>`;
}
