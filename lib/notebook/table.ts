// Tables in notebooks: from plain rows, and by way of a danfo.js frame where rows have to be selected, sorted or grouped.
// This is the only file that knows danfo.js; it is loaded when the first frame is made.

import { createRequire } from "node:module";
import { checkNumber, InputError, refuseUnknownKeys, show, unknownName, type NumberRule } from "../door.js";
import { unitEndingOf, unitLabel } from "../recipe/units.js";
import { intervalText, numberText } from "./digits.js";
import type { TableContent } from "./content.js";

/** A column: which field of the rows, its heading, unit, significant digits (1 to 15, default 4) and side. */
export interface Column {
  readonly key: string;
  readonly name?: string;
  readonly unit?: string;
  readonly digits?: number;
  readonly align?: "left" | "right";
}

/** What a table shows: rows as objects, and on request which columns, in which order, under which headings. */
export interface TableInput {
  readonly caption: string;
  readonly rows: readonly object[];
  readonly columns?: readonly Column[];
}

type Fields = Readonly<Record<string, unknown>>;

/**
 * A danfo.js frame, as far as notebooks use it: rows that can be selected, sorted and grouped.
 * Stated here because reading danfo.js's own types takes a notebook's first cell over two seconds, and so that the package can be replaced.
 */
export interface Frame {
  readonly columns: readonly string[];
  readonly values: readonly unknown[];
  readonly shape: readonly number[];
  /** One column, to make a condition of: `frame.query(frame.column("mass_g").gt(8))`. */
  column(name: string): FrameColumn;
  query(condition: FrameCondition): Frame;
  sortValues(column: string, options?: { ascending: boolean }): Frame;
  head(rows: number): Frame;
  groupby(columns: string[]): FrameGroups;
}

/** A column of a frame: its values, and the conditions that select rows. */
export interface FrameColumn {
  readonly values: readonly unknown[];
  gt(value: number): FrameCondition;
  ge(value: number): FrameCondition;
  lt(value: number): FrameCondition;
  le(value: number): FrameCondition;
  eq(value: number | string | boolean): FrameCondition;
}

/** Which rows are selected. */
export interface FrameCondition {
  and(other: FrameCondition): FrameCondition;
  or(other: FrameCondition): FrameCondition;
}

/** Rows grouped by the columns of their names; `col` says of which columns to take the mean and so on. */
export interface FrameGroups {
  col(columns: string[]): { count(): Frame; mean(): Frame; sum(): Frame; min(): Frame; max(): Frame };
}

/**
 * Makes a table of rows. A cell may be text, a number, yes or no, an interval, or missing.
 *
 * Without `columns` every field becomes one: `layerThickness_um` is headed "layer thickness (µm)". An interval (an
 * object with `value`, `low` and `high`) is written "450 (300 to 610)". Numbers stand on the right, text on the left.
 * @throws InputError when there is nothing to show, when a column names no field, when a cell is not finite or cannot be shown.
 * @example
 * ```ts
 * import { tableOf } from "resinwright/notebook";
 * const table = tableOf({
 *   caption: "Two trials",
 *   rows: [
 *     { trial: "first", viscosity_mPas: { value: 447.3, low: 301.2, high: 612.9 } },
 *     { trial: "second", viscosity_mPas: { value: 980, low: 910, high: 1060 } },
 *   ],
 * });
 * table.columns[1]; // → { name: "viscosity", unit: "mPa s", align: "right" }
 * table.rows; // → [["first", "450 (300 to 610)"], ["second", "980 (910 to 1060)"]]
 * ```
 */
export function tableOf({ caption, rows, columns, ...rest }: TableInput): TableContent {
  refuseUnknownKeys("tableOf", rest, ["caption", "rows", "columns"]);
  if (typeof caption !== "string" || caption.trim() === "") {
    throw new InputError(`tableOf: caption is ${show(caption)}; say what the table shows`);
  }
  const where = `tableOf "${caption}"`;
  const keys = [...new Set(rows.flatMap((row) => Object.keys(row)))];
  const shown = columns ?? keys.map((key): Column => ({ key }));
  if (shown.length === 0) throw new InputError(`${where}: rows is empty; give at least one row, or columns`);
  for (const column of shown) checkColumn(where, column, keys);
  const fields = rows as readonly Fields[];
  const cells = fields.map((row, i) =>
    shown.map(({ key, digits }) => cellOf(row[key], digits, { where: `${where}: row ${i + 1}`, field: key })),
  );
  return {
    kind: "table",
    caption,
    columns: shown.map((column) => ({
      name: column.name ?? headingOf(column.key),
      unit: column.unit ?? (unitLabel(column.key) || undefined),
      align: column.align ?? (fields.some((row) => isText(row[column.key])) ? "left" : "right"),
    })),
    rows: cells,
    rowHeader: fields.length > 0 && fields.every((row) => isText(row[shown[0]!.key])),
  };
}

/**
 * Makes a danfo.js frame of rows, for selecting, sorting and grouping.
 *
 * A missing text is `null`, a missing number NaN, danfo.js's own mark: given `null`, its grouped means count a zero.
 * @throws InputError when there are no rows, when a number is not finite, when a field holds two kinds of cells or
 *   anything but text, numbers, true and false.
 * @example
 * ```ts
 * import { frameOf } from "resinwright/notebook";
 * const frame = frameOf([{ batch: "B1", mass_g: 12.5 }, { batch: "B2", mass_g: 7.5 }]);
 * frame.sortValues("mass_g").values; // → [["B2", 7.5], ["B1", 12.5]]
 * ```
 */
export function frameOf(rows: readonly object[]): Frame {
  if (rows.length === 0) throw new InputError("frameOf: rows is empty; give at least one row");
  const keys = [...new Set(rows.flatMap((row) => Object.keys(row)))];
  const columns = keys.map((key) =>
    frameColumn(
      key,
      rows.map((row) => (row as Fields)[key]),
    ),
  );
  const values = rows.map((_, i) => columns.map((column) => column[i]));
  return new (danfo().DataFrame)(values, { columns: keys });
}

/**
 * Makes a table of a frame. Units come from the names of the columns, or from `units` by column name.
 * @throws InputError when the frame is empty, when `units` names no column, when a cell cannot be shown.
 * @example
 * ```ts
 * import { frameOf, tableOfFrame } from "resinwright/notebook";
 * const frame = frameOf([{ batch: "B1", mass_g: 12.5 }, { batch: "B2", mass_g: 7.5 }]);
 * tableOfFrame({ caption: "Batches", frame }).rows; // → [["B1", 12.5], ["B2", 7.5]]
 * ```
 */
export function tableOfFrame({
  caption,
  frame,
  units = {},
}: {
  caption: string;
  frame: Pick<Frame, "columns" | "values">;
  units?: Readonly<Record<string, string>>;
}): TableContent {
  refuseUnknownKeys(`tableOfFrame "${caption}": units`, units, frame.columns);
  const rows = (frame.values as readonly (readonly unknown[])[]).map((cells) =>
    Object.fromEntries(frame.columns.map((key, i) => [key, isMissing(cells[i]) ? null : cells[i]])),
  );
  const columns = frame.columns.map((key) => ({ key, ...(key in units && { unit: units[key]! }) }));
  return tableOf({ caption, rows, columns });
}

interface Danfo {
  readonly DataFrame: new (values: readonly unknown[][], options: { columns: readonly string[] }) => Frame;
}

function danfo(): Danfo {
  return createRequire(import.meta.url)("danfojs-node") as Danfo;
}

/** danfo.js marks a missing number with NaN, a missing text with null or undefined. */
function isMissing(cell: unknown): boolean {
  return cell === null || cell === undefined || Number.isNaN(cell);
}

function frameColumn(key: string, cells: readonly unknown[]): unknown[] {
  const kind = typeof cells.find((cell) => !isMissing(cell));
  return cells.map((cell, i) => {
    const place = { where: `frameOf: row ${i + 1}`, field: key };
    if (cell === null || cell === undefined) return kind === "number" ? NaN : null;
    if (typeof cell === "number") checkNumber(cell, place);
    if (typeof cell === kind && frameKinds.includes(kind)) return cell;
    const allowed = frameKinds.includes(kind)
      ? `a ${kind}, as in the rows before`
      : "text, a number, true or false";
    throw new InputError(`${place.where}: ${key} is ${show(cell)}; it must be ${allowed}`);
  });
}

const frameKinds = ["string", "number", "boolean"];

function cellOf(cell: unknown, digits: number | undefined, place: NumberRule): string | number | null {
  if (cell === null || cell === undefined) return null;
  if (typeof cell === "string") return cell;
  if (typeof cell === "boolean") return cell ? "yes" : "no";
  if (isInterval(cell)) {
    for (const field of ["value", "low", "high"] as const) {
      checkNumber(cell[field], { where: place.where, field: `${place.field}.${field}` });
    }
    return intervalText(cell);
  }
  if (typeof cell !== "number") {
    const allowed = "a cell holds text, a number, true or false, or an interval";
    throw new InputError(`${place.where}: ${place.field} is ${show(cell)}; ${allowed}`);
  }
  checkNumber(cell, place);
  return digits === undefined ? cell : numberText(cell, digits);
}

function isInterval(cell: unknown): cell is { value: number; low: number; high: number } {
  return typeof cell === "object" && cell !== null && "value" in cell && "low" in cell && "high" in cell;
}

/** Whether a cell is read as words: its column then stands on the left. */
function isText(cell: unknown): boolean {
  return typeof cell === "string" || typeof cell === "boolean";
}

/** `layerThickness_um` as people say it: "layer thickness". */
function headingOf(key: string): string {
  const ending = unitEndingOf(key);
  const bare = ending === undefined ? key : key.slice(0, -ending.length - 1);
  return bare.replace(/([a-z0-9])([A-Z])/g, "$1 $2").toLowerCase();
}

function checkColumn(where: string, column: Column, keys: readonly string[]): void {
  const place = `${where}: column "${column.key}"`;
  refuseUnknownKeys(place, column, ["key", "name", "unit", "digits", "align"]);
  if (keys.length > 0 && !keys.includes(column.key))
    throw new InputError(unknownName(where, "column", column.key, keys));
  if (column.digits !== undefined)
    checkNumber(column.digits, { where: place, field: "digits", min: 1, max: 15 });
}
