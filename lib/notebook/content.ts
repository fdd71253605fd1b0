// What a cell hands over when it shows a figure or a table: plain data inside a script element that never runs.
// The live notebook shows the HTML that follows it; the rendered page reads the data and draws it itself.

import { z } from "zod";
import { InputError } from "../door.js";
import { numberText } from "./digits.js";
import { escapeHtml } from "./html.js";

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
}

/** How the Markdown of a decision begins; the index repeats what follows it. */
export const decisionMark = "**Decided.** ";

/** What a cell can show beside text and pictures. */
export type Content = FigureContent | TableContent;

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
 * The figure or table that `html` begins with, or undefined if it is any other HTML.
 * @throws InputError if the script element is there but does not hold a figure or a table.
 */
export function extract(html: string): Content | undefined {
  const found = /^\s*<script type="application\/json" data-resinwright="([^"]*)">([^<]*)<\/script>/.exec(
    html,
  );
  if (found === null) return undefined;
  const [, kind = "", json = ""] = found;
  const schema = kind === "figure" ? figureSchema : kind === "table" ? tableSchema : undefined;
  if (schema === undefined) throw new InputError(`output: unknown content "${kind}"; known: figure, table`);
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

function columnTitle({ name, unit }: TableColumn): string {
  return escapeHtml(name) + (unit === undefined ? "" : ` <span class="unit">(${escapeHtml(unit)})</span>`);
}

function cellHtml({ columns, rowHeader }: TableContent, cell: string | number | null, i: number): string {
  const text = cell === null ? "–" : typeof cell === "number" ? numberCell(cell) : escapeHtml(cell);
  // A registry number or a short name without spaces is not broken at its hyphens.
  const whole = typeof cell === "string" && /^\S{1,20}$/.test(cell) ? " whole" : "";
  const look = columns[i]!.align + whole;
  if (i === 0 && rowHeader) return `<th scope="row" class="${look}">${text}</th>`;
  return `<td class="${look}">${text}</td>`;
}

// Whole numbers are counts or years, and stay whole.
function numberCell(value: number): string {
  return Number.isInteger(value) && Math.abs(value) < 1e6
    ? String(value).replace("-", "−")
    : numberText(value);
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
});

/** Many columns stand wider on a screen; a crowd of them is set smaller in print, where a long table may break between pages. */
function tableClass({ columns, rows }: TableContent): string {
  const classes = [columns.length > 5 && "many", columns.length > 8 && "crowded", rows.length > 6 && "long"];
  const named = classes.filter((name) => name !== false);
  return named.length === 0 ? "" : ` class="${named.join(" ")}"`;
}
