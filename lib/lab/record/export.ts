// The record for other programs: JSON Lines, which keeps everything, or CSV, which a spreadsheet opens.

import Papa from "papaparse";
import { InputError, show } from "../../door.js";
import { listRecords, type RecordEntry } from "./list.js";

/**
 * All records of a folder that are as they were written, oldest first, as one text.
 *
 * `"jsonl"`: one JSON object a line, the record with its `id`, `file` and `amendedBy`. `"csv"`: one row a record under a header
 * line; nested fields as `figures.viscosity_mPas`, lists of numbers or ids joined by spaces, other lists as JSON; a text that a spreadsheet would
 * take for a formula begins with an apostrophe.
 * @param input - `folder` and `format`.
 * @throws InputError for another format; the system's error when the folder cannot be read.
 * @example
 * ```ts
 * import { mkdtempSync } from "node:fs";
 * import { tmpdir } from "node:os";
 * import { join } from "node:path";
 * import { appendRecord, exportRecords } from "resinwright/files";
 * const folder = mkdtempSync(join(tmpdir(), "records-"));
 * const about = { from: "bench", brief: "flow-cell", formulation: "flow-cell-a", figures: { share: 0.6 } };
 * appendRecord({ folder, record: { ...about, kind: "decision", statement: "Six parts in ten." } });
 * JSON.parse(exportRecords({ folder, format: "jsonl" })).figures.share; // → 0.6
 * exportRecords({ folder, format: "csv" }).split(",").slice(0, 3); // → ["id","file","amendedBy"]
 * ```
 */
export function exportRecords({ folder, format }: { folder: string; format: "csv" | "jsonl" }): string {
  if (!["csv", "jsonl"].includes(format))
    throw new InputError(`exportRecords: format is ${show(format)}; it must be "csv" or "jsonl"`);
  const rows = listRecords(folder).entries.map(rowOf);
  return format === "csv" ? csvOf(rows) : rows.map((row) => `${JSON.stringify(row)}\n`).join("");
}

/** The parser's own pattern misses a formula with a line break in it. */
const formula = /^[=+\-@\t\r]/;

function rowOf({ id, file, amendedBy, record }: RecordEntry) {
  return { id, file, amendedBy, ...record };
}

function csvOf(rows: readonly object[]): string {
  const flat = rows.map((row) => flatten("", row));
  const fields = [...new Set(flat.flatMap((row) => Object.keys(row)))];
  if (fields.length === 0) return "";
  return `${Papa.unparse({ fields, data: flat }, { escapeFormulae: formula })}\r\n`;
}

function flatten(prefix: string, value: object): Record<string, string | number> {
  return Object.fromEntries(
    Object.entries(value).flatMap(([key, one]: [string, unknown]) => {
      const name = `${prefix}${key}`;
      if (Array.isArray(one)) return [[name, listText(one)]];
      return typeof one === "object" && one !== null
        ? Object.entries(flatten(`${name}.`, one))
        : [[name, one]];
    }),
  ) as Record<string, string | number>;
}

function listText(list: readonly unknown[]): string {
  return list.some((one) => typeof one === "object") ? JSON.stringify(list) : list.join(" ");
}
