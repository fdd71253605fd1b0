// What a cell hands over when it shows a figure, a table or a weigh-out sheet: plain data inside a script element that never runs.
// The live notebook shows the HTML that follows it; the rendered page reads the data and draws it itself.

import { z } from "zod";
import { InputError } from "../door.js";
import { cellText } from "./digits.js";
import { escapeHtml } from "./html.js";
import type { PanelContent } from "./panel/panel.js";
import { sheetSchema, type SheetContent } from "./sheet/content.js";
import type { SummaryContent } from "./summary.js";

/** One column of a table: its name, the unit of its numbers, and the side its cells are set to. */
export interface TableColumn {
  readonly name: string;
  readonly unit?: string | undefined;
  readonly align: "left" | "right";
}

/**
 * A table as data. Every row has one cell a column; a cell is text, a number or `null` (no value).
 * Text is shown as given, a number with up to four significant digits. `rowHeader` makes the first cell name its row.
 */
export interface TableContent {
  readonly kind: "table";
  readonly caption: string;
  readonly columns: readonly TableColumn[];
  readonly rows: readonly (readonly (string | number | null)[])[];
  readonly rowHeader?: boolean | undefined;
}

/**
 * A figure as data: plotly traces and layout, what it shows in words, and the numbers behind it.
 * The page sets width, paper, text and grid colours, so that light, dark and print all work; traces bring their own colours.
 */
export interface FigureContent {
  readonly kind: "figure";
  readonly caption: string;
  readonly alternativeText: string;
  readonly data: readonly unknown[];
  readonly layout: object;
  readonly table: TableContent;
  /** Other data for the same layout, one step of a slider each; `data` is that of the step `shown`. */
  readonly moments?: Moments | undefined;
}

/** The steps of a figure's slider: what it chooses, which step is shown first, and the data of each under its name. */
export interface Moments {
  readonly label: string;
  readonly shown: number;
  readonly steps: readonly { readonly name: string; readonly data: readonly unknown[] }[];
}

/** How the Markdown of a decision begins; the index repeats what follows it. */
export const decisionMark = "**Decided.** ";

/** What a cell can show beside text and pictures. */
export type Content = FigureContent | TableContent | SheetContent | PanelContent | SummaryContent;

/**
 * The script element that carries `content` to the rendered page.
 * @throws InputError naming the entry that is NaN or infinite; a gap in a line is `null`.
 */
export function embed(content: Content): string {
  return `<script type="application/json" data-resinwright="${content.kind}">${toJson(content, content.kind)}</script>`;
}

/** `value` as JSON that may stand inside a script element; `name` stands before the entry that is refused. */
export function toJson(value: object, name: string): string {
  refuseNotFinite(value, name);
  const json = JSON.stringify(value, (_, entry: unknown) =>
    ArrayBuffer.isView(entry) ? Array.from(entry as Float64Array) : entry,
  );
  return json.replaceAll("<", "\\u003c");
}

/**
 * The content that `html` begins with, or undefined if it is any other HTML.
 * @throws InputError if the script element is there but does not hold what it says.
 */
export function extract(html: string): Content | undefined {
  const found = /^\s*<script type="application\/json" data-resinwright="([^"]*)">([^<]*)<\/script>/.exec(
    html,
  );
  if (found === null) return undefined;
  const [, kind = "", json = ""] = found;
  const schema = new Map(Object.entries(schemas)).get(kind);
  if (schema === undefined) {
    throw new InputError(`output: unknown content "${kind}"; known: ${Object.keys(schemas).join(", ")}`);
  }
  const result = schema.safeParse(parseQuietly(json));
  if (result.success) return result.data;
  const { path, message } = result.error.issues[0]!;
  throw new InputError(`output ${kind}: ${path.length > 0 ? path.join(".") : "the data"}: ${message}`);
}

/** `table` as an HTML table; `label` ("Table 2.") stands before the caption. */
export function tableHtml(table: TableContent, label = ""): string {
  const before = label === "" ? "" : `<strong>${escapeHtml(label)}</strong> `;
  const head = table.columns.map(
    (column) => `<th scope="col" class="${column.align}">${columnTitle(column)}</th>`,
  );
  const body = table.rows.map((row) => `<tr>${row.map((cell, i) => cellHtml(table, cell, i)).join("")}</tr>`);
  return [
    `<table${tableClass(table)}>`,
    `<caption><span>${before}${escapeHtml(table.caption)}</span></caption>`,
    `<thead><tr>${head.join("")}</tr></thead>`,
    `<tbody>${body.join("\n")}</tbody></table>`,
  ].join("\n");
}

/** A table that scrolls in a frame of its own, which the keyboard reaches and a screen reader calls `name`. */
export function scrolling(table: string, name: string): string {
  return `<div class="scroll" role="region" aria-label="${escapeHtml(name)}" tabindex="0">${table}</div>`;
}

function columnTitle({ name, unit }: TableColumn): string {
  return escapeHtml(name) + (unit === undefined ? "" : ` <span class="unit">(${escapeHtml(unit)})</span>`);
}

function cellHtml(table: TableContent, cell: string | number | null, i: number): string {
  const text = escapeHtml(cellText(cell));
  const { name, unit, align } = table.columns[i]!;
  // A registry number or a short name without spaces is not broken at its hyphens.
  const whole = typeof cell === "string" && /^\S{1,20}$/.test(cell);
  const look = [align, whole && "whole", isSentence(cell) && "sentence"].filter(Boolean).join(" ");
  if (i === 0 && table.rowHeader) return `<th scope="row" class="${look}">${text}</th>`;
  // Where a narrow page sets cell below cell, each but the first says what it is.
  const said = i > 0 && name !== "" && table.rows.some((row) => row.some(isSentence));
  const label = said ? ` data-label="${escapeHtml(unit === undefined ? name : `${name} (${unit})`)}"` : "";
  return `<td class="${look}"${label}>${text}</td>`;
}

/** Words that must be allowed to run over lines, wherever they stand. */
function isSentence(cell: string | number | null): boolean {
  return typeof cell === "string" && cell.length > 40;
}

function refuseNotFinite(value: unknown, where: string): void {
  if (typeof value === "number" && !Number.isFinite(value)) {
    throw new InputError(`${where} is ${value}; it must be a finite number, or null for a gap`);
  }
  if (typeof value !== "object" || value === null) return;
  for (const [key, entry] of Object.entries(value)) refuseNotFinite(entry, `${where}.${key}`);
}

function parseQuietly(json: string): unknown {
  try {
    return JSON.parse(json) as unknown;
  } catch {
    return undefined;
  }
}

const tableSchema = z
  .strictObject({
    kind: z.literal("table"),
    caption: z.string(),
    columns: z.array(
      z.strictObject({ name: z.string(), unit: z.string().optional(), align: z.enum(["left", "right"]) }),
    ),
    rows: z.array(z.array(z.union([z.string(), z.number(), z.null()]))),
    rowHeader: z.boolean().optional(),
  })
  .check(({ value, issues }) => {
    const wrong = value.rows.findIndex((row) => row.length !== value.columns.length);
    if (wrong === -1) return;
    const message = `has ${value.rows[wrong]!.length} cells; it must have ${value.columns.length}, one a column`;
    issues.push({ code: "custom", message, input: value, path: ["rows", wrong] });
  });

const figureSchema = z.strictObject({
  kind: z.literal("figure"),
  caption: z.string(),
  alternativeText: z.string(),
  data: z.array(z.looseObject({})),
  layout: z.looseObject({}),
  table: tableSchema,
  moments: z
    .strictObject({
      label: z.string(),
      shown: z.int().min(0),
      steps: z.array(z.strictObject({ name: z.string(), data: z.array(z.looseObject({})) })).min(2),
    })
    .refine(({ shown, steps }) => shown < steps.length, { error: "shown is beyond the last step" })
    .optional(),
});

const rowSchema = z.strictObject({
  property: z.string(),
  unit: z.string(),
  value: z.string(),
  target: z.string().nullable(),
  verdict: z.string().nullable(),
});

// What is in the case of a panel is checked by the models that compute with it, in the page.
const panelSchema = z.strictObject({
  kind: z.literal("panel"),
  work: z.looseObject({}) as unknown as z.ZodType<PanelContent["work"]>,
  start: z.strictObject({
    rows: z.array(rowSchema),
    warnings: z.array(z.string()),
    draws: z.number(),
    level: z.number(),
  }),
});

const summarySchema = z.strictObject({
  kind: z.literal("summary"),
  asked: z.array(z.string()),
  formulation: z.array(z.string()),
  decided: z.string(),
  rows: z.array(rowSchema),
  cautions: z.array(z.string()),
});

const schemas: Readonly<Record<Content["kind"], z.ZodType<Content>>> = {
  figure: figureSchema,
  table: tableSchema,
  panel: panelSchema,
  sheet: sheetSchema,
  summary: summarySchema,
};

/** The slider of a figure's moments; a script has to unhide and follow it. */
export function sliderHtml({ label, shown, steps }: Moments, id: string): string {
  const chosen = escapeHtml(steps[shown]!.name);
  return `<div class="moments" hidden><label for="${id}-moment">${escapeHtml(label)}</label>
<input id="${id}-moment" type="range" min="0" max="${steps.length - 1}" step="1" value="${shown}" aria-valuetext="${chosen}">
<output for="${id}-moment">${chosen}</output></div>`;
}

/**
 * A table that needs more room than prose stands wider on a screen; a crowd of columns is set smaller in print, where a long table may
 * break between pages; sentences stand cell below cell where the page is narrow.
 */
function tableClass(table: TableContent): string {
  const { columns, rows } = table;
  const classes = [
    (columns.length > 5 || leastCharacters(table) > proseCharacters) && "many",
    columns.length > 8 && "crowded",
    rows.length > 6 && "long",
    rows.some((row) => row.some(isSentence)) && "sentences",
  ];
  const named = classes.filter((name) => name !== false);
  return named.length === 0 ? "" : ` class="${named.join(" ")}"`;
}

/** How many characters of a table fit beside each other in a column of prose. */
const proseCharacters = 80;

/** The width below which a table cannot go, in characters: the longest of what each column keeps on one line, and the gaps between. */
function leastCharacters({ columns, rows }: TableContent): number {
  const longestWord = (text: string) => Math.max(...text.split(" ").map(({ length }) => length));
  const least = columns.map(({ name, unit = "", align }, i) => {
    const cells = rows.map((row) =>
      align === "right" && !isSentence(row[i]!) ? cellText(row[i]!).length : longestWord(cellText(row[i]!)),
    );
    return Math.max(longestWord(name), unit.length, ...cells);
  });
  return least.reduce((sum, one) => sum + one + 2.5, 0);
}
