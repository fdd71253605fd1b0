// A CSV table whose columns are named by field and unit: read whole or refused with row and column.

import Papa from "papaparse";
import { InputError, unknownName } from "../door.js";

/** What separates columns, as the line that names them shows it: tabs, else semicolons, else commas. @internal */
export function separatorOf(header: string): "\t" | ";" | "," {
  return (["\t", ";"] as const).find((mark) => header.includes(mark)) ?? ",";
}

/**
 * Reads a CSV text with a header line into columns of numbers. Lines that begin with `#` are comments.
 *
 * Columns are separated by tabs, else semicolons, else commas, as the header is. With tabs or semicolons numbers may have a
 * decimal comma or a decimal point, one kind in the whole file.
 * @param input - `text`, `where` for messages, `columns` that must be there and no others.
 * @throws InputError with row and column of a missing or unknown column, a short or long row, or an entry that is no number.
 * @example
 * ```ts
 * import { readNumberTable } from "resinwright";
 * const text = "massFraction,viscosity_mPas\n0.5,210\n";
 * const table = readNumberTable({ text, where: "readings.csv", columns: ["massFraction", "viscosity_mPas"] });
 * table.viscosity_mPas[0]; // → 210
 * ```
 */
export function readNumberTable<C extends string>({
  text,
  where,
  columns,
}: {
  text: string;
  where: string;
  columns: readonly C[];
}): Record<C, number[]> {
  const lines = text.replace(/^\uFEFF/, "").split(/\r?\n/);
  const kept = lines
    .map((line, index) => ({ line, row: index + 1 }))
    .filter(({ line }) => line.trim() !== "" && !line.startsWith("#"));
  const separator = separatorOf(kept[0]?.line ?? "");
  const [header, ...body] = kept.map(({ line, row }) => ({
    row,
    cells: cellsOf(line, separator, where, row),
  }));
  if (header === undefined)
    throw new InputError(`${where}: the table is empty; its first line names the columns`);
  for (const name of header.cells) {
    if (!(columns as readonly string[]).includes(name)) {
      throw new InputError(unknownName(`${where}, row ${header.row}`, "column", name, columns));
    }
  }
  const absent = columns.filter((name) => !header.cells.includes(name));
  if (absent.length > 0) {
    throw new InputError(
      `${where}, row ${header.row}: column ${absent.join(", ")} is missing; the columns are ${columns.join(", ")}`,
    );
  }
  const table = Object.fromEntries(columns.map((name) => [name, [] as number[]])) as Record<C, number[]>;
  const hasComma = separator !== "," && body.some(({ cells }) => cells.some((cell) => cell.includes(",")));
  const point = body.find(({ cells }) => cells.some((cell) => cell.includes(".")));
  if (hasComma && point !== undefined) {
    throw new InputError(
      `${where}, row ${point.row}: a decimal point, and decimal commas elsewhere; use one kind in the whole file, and no thousands separators`,
    );
  }
  for (const { row, cells } of body) {
    if (cells.length !== header.cells.length) {
      throw new InputError(
        `${where}, row ${row}: ${cells.length} entries under ${header.cells.length} columns${separator === "," ? "; numbers with a decimal comma need semicolons between the columns" : ""}`,
      );
    }
    cells.forEach((cell, i) =>
      table[header.cells[i] as C].push(
        numberOf(hasComma ? cell.replace(",", ".") : cell, where, row, header.cells[i]!),
      ),
    );
  }
  return table;
}

function cellsOf(line: string, separator: string, where: string, row: number): string[] {
  const { data, errors } = Papa.parse<string[]>(line, { delimiter: separator });
  if (errors.length > 0) throw new InputError(`${where}, row ${row}: ${errors[0]!.message}`);
  return data[0]!.map((cell) => cell.trim());
}

function numberOf(cell: string, where: string, row: number, column: string): number {
  const value = Number(cell);
  if (cell !== "" && Number.isFinite(value)) return value;
  throw new InputError(
    `${where}, row ${row}, column ${column}: "${cell}" is not a number; write it with a decimal point`,
  );
}
