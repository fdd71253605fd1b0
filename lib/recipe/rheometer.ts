// A rheometer's table of blend readings, as exported: columns named with their units, read row by row. A row that cannot be
// used is set aside with its reason, and the rest is read.

import Papa from "papaparse";
import { checkNumber, InputError, nearestName, notNegative, positive } from "../door.js";
import { readQuantity } from "./quantity.js";
import { separatorOf } from "./table.js";
import { unitLabel } from "./units.js";

/** One usable row: a blend, its conditions and its viscosity. */
export interface RheometerReading {
  /** The line of the file it stands in, from 1. */
  readonly row: number;
  /** Mass fractions in the order of the table's liquids, adding up to 1. */
  readonly fractions: readonly number[];
  readonly temperature_C: number;
  readonly viscosity_mPas: number;
  readonly shearRate_pers?: number;
  readonly repeat?: number;
}

/** A row that was not used, and why. */
export interface RejectedRow {
  readonly row: number;
  readonly reason: string;
}

/** What a rheometer's table holds. */
export interface RheometerTable {
  /** In the order of their columns. */
  readonly liquids: readonly string[];
  readonly readings: readonly RheometerReading[];
  readonly rejected: readonly RejectedRow[];
}

/**
 * Reads a table of viscosities of blends, in the shape that {@link fitBlend} takes as `readings`.
 *
 * - `text`: the first line that is no comment names the columns as `name (unit)`: one column a liquid, `UDMA (mass %)` or
 *   `UDMA (mass fraction)`; `temperature (°C)`, or K or °F, above -100 and at most 200 °C; `viscosity (mPa s)`, or another
 *   unit of viscosity; and where known `shear rate (1/s)` and `repeat`, a whole number, whose entries may be empty.
 * - `where`: names the file in errors.
 *
 * Columns are separated by tabs, else semicolons, else commas, as the first line is. With tabs or semicolons numbers may
 * have a decimal comma or a decimal point, one kind in the whole file. Lines that begin with `#`, and empty ones, are
 * passed over. Mass fractions that add up to 1 within 0.005 are divided by their sum; other rows that cannot be used are
 * in `rejected`.
 * @throws InputError on a column that is unknown, missing, without unit or there twice; on decimal points and commas in one
 * file; when no row can be used, with all reasons.
 * @example
 * ```ts
 * import { readRheometerTable } from "resinwright";
 * const text = `UDMA (mass %); IBOA (mass %); temperature (°C); viscosity (Pa s)
 * 100; 0; 25,0; 9,64
 * 60; 40; 25,0; 0,465
 * 60; 30; 25,0; 0,465
 * `;
 * const table = readRheometerTable({ text, where: "blends.csv" });
 * table.liquids; // → ["UDMA", "IBOA"]
 * table.readings[1]; // → { row: 3, fractions: [0.6, 0.4], temperature_C: 25, viscosity_mPas: 465 }
 * table.rejected[0].row; // → 4
 * ```
 */
export function readRheometerTable({ text, where }: { text: string; where: string }): RheometerTable {
  const [first, ...rest] = text
    .replace(/^\uFEFF/, "")
    .split(/\r\n|\n|\r/)
    .map((line, index) => ({ line, row: index + 1 }))
    .filter(({ line }) => !/^[\s,;]*(#|$)/.test(line));
  if (first === undefined) {
    throw new InputError(
      `${where}: the table is empty; its first line names the columns, as in "${example}"`,
    );
  }
  const separator = separatorOf(first.line);
  const columns = readHeader(`${where}, row ${first.row}`, split(first.line, separator));
  const rows = rest.map(({ line, row }) => ({ row, ...split(line, separator) }));
  const format = { separator, decimalMark: decimalMarkOf(where, rows, separator) };

  const readings: RheometerReading[] = [];
  const rejected: RejectedRow[] = [];
  for (const row of rows) {
    try {
      readings.push(readRow(row, columns, format));
    } catch (error) {
      if (!(error instanceof InputError)) throw error;
      rejected.push({ row: row.row, reason: error.message });
    }
  }
  if (readings.length === 0) {
    const reasons = rejected.map(({ row, reason }) => `row ${row}: ${reason}`);
    throw new InputError(
      [`${where}: no reading can be used out of ${rows.length} rows below the header`, ...reasons].join("\n"),
    );
  }
  const liquids = columns.flatMap(({ liquid }) => (liquid === undefined ? [] : [liquid]));
  return { liquids, readings, rejected };
}

interface Column {
  /** As the header has it, unit included. */
  readonly label: string;
  readonly field: "massFraction" | "temperature_C" | "viscosity_mPas" | "shearRate_pers" | "repeat";
  readonly unit: string;
  readonly liquid?: string;
}

interface Row {
  readonly row: number;
  readonly cells: readonly string[];
  readonly problem?: string;
}

interface Format {
  readonly separator: string;
  readonly decimalMark: "." | ",";
}

const SUM_TOLERANCE = 0.005;
const ROUNDING = 1e-9;
const example = "UDMA (mass %), IBOA (mass %), temperature (°C), viscosity (mPa s)";

const quantities = [
  { name: "temperature", field: "temperature_C", example: "temperature (°C)" },
  { name: "viscosity", field: "viscosity_mPas", example: "viscosity (mPa s)" },
  { name: "shear rate", field: "shearRate_pers", example: "shear rate (1/s)" },
] as const;
type Quantity = (typeof quantities)[number];
const knownNames = [...quantities.map(({ name }) => name), "repeat"];

/** Of temperatures as {@link readBlendReadings}: kelvin under °C stand out. */
const allowed: Readonly<Record<Column["field"], { min: number; above?: boolean; max?: number }>> = {
  massFraction: notNegative,
  temperature_C: { min: -100, above: true, max: 200 },
  viscosity_mPas: positive,
  shearRate_pers: positive,
  repeat: notNegative,
};

const numberWith = {
  ".": /^[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i,
  ",": /^[-+]?(\d+,?\d*|,\d+)(e[-+]?\d+)?$/i,
} as const;

function split(line: string, separator: string): Omit<Row, "row"> {
  const { data, errors } = Papa.parse<string[]>(line, { delimiter: separator });
  return { cells: data[0]!.map((cell) => cell.trim()), problem: errors[0]?.message };
}

function readHeader(place: string, { cells, problem }: Omit<Row, "row">): Column[] {
  if (problem !== undefined) throw new InputError(`${place}: ${problem}`);
  const columns = cells.map((label, i) => columnOf(place, label, i + 1));
  columns.forEach((column, i) => {
    const twin = columns.slice(0, i).find((one) => nameOf(one) === nameOf(column));
    if (twin === undefined) return;
    throw new InputError(
      `${place}: ${nameOf(column)} has two columns, "${twin.label}" and "${column.label}"; keep one of them`,
    );
  });
  const needed = [{ field: "massFraction", example: "UDMA (mass %)" }, ...quantities.slice(0, 2)];
  const absent = needed.filter(({ field }) => !columns.some((column) => column.field === field));
  if (absent.length === 0) return columns;
  throw new InputError(
    `${place}: no column ${absent.map((one) => `"${one.example}"`).join(" and no column ")}; a table has for instance "${example}"`,
  );
}

const nameOf = ({ liquid, field }: Column): string =>
  liquid ?? quantities.find((one) => one.field === field)?.name ?? field;

function columnOf(place: string, label: string, number: number): Column {
  if (label === "") throw new InputError(`${place}: column ${number} has no name; name it or take it out`);
  const [, name = label, unit = ""] = /^(.+?)\s*\(\s*([^()]*?)\s*\)$/.exec(label) ?? [];
  const plainName = name.toLowerCase().replace(/\s+/g, " ");
  const quantity = quantities.find((one) => one.name === plainName);
  if (quantity !== undefined) {
    return { label, field: quantity.field, unit: readableUnit(place, label, unit, quantity) };
  }
  if (plainName === "repeat" && unit === "") return { label, field: "repeat", unit };
  if (plainName === "repeat") {
    throw new InputError(
      `${place}: column "${label}" has a unit; a repeat is a number without one: "repeat"`,
    );
  }
  const share = /^mass[\s-]*(%|fraction)$/i.exec(unit)?.[1];
  if (share !== undefined) return { label, field: "massFraction", unit: share.toLowerCase(), liquid: name };
  const near = nearestName(name, knownNames);
  const hint = near === undefined ? `known: ${knownNames.join(", ")}.` : `did you mean "${near}"?`;
  throw new InputError(
    `${place}: unknown column "${label}"; ${hint} A liquid is written "${name} (mass %)" or "${name} (mass fraction)"`,
  );
}

/** The unit as {@link readQuantity} takes it behind a number. */
function readableUnit(place: string, label: string, given: string, quantity: Quantity): string {
  const unit = given
    .replace(/^1\s*\//, "/")
    .replace("⁻¹", "^-1")
    .replace(/Pa\.?s$/, "Pa s");
  try {
    readQuantity({ where: place, field: quantity.field, given: `1 ${unit}` });
    return unit;
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    const fault =
      unit === "" ? "no unit" : `the unit "${given}", which does not convert to ${unitLabel(quantity.field)}`;
    throw new InputError(
      `${place}: column "${label}" has ${fault}; write for instance "${quantity.example}"`,
    );
  }
}

/** A point or a comma that could be a thousands separator elsewhere shows itself by the other kind in the same file. */
function decimalMarkOf(where: string, rows: readonly Row[], separator: string): "." | "," {
  const hasMark = (mark: "." | ",") => (cell: string) => cell.includes(mark) && numberWith[mark].test(cell);
  const comma = separator === "," ? undefined : rows.find(({ cells }) => cells.some(hasMark(",")));
  const point = rows.find(({ cells }) => cells.some(hasMark(".")));
  if (comma === undefined || point === undefined) return comma === undefined ? "." : ",";
  const commaIsLater = comma.row > point.row;
  const [later, earlier] = commaIsLater ? ["comma", "point"] : ["point", "comma"];
  const [row, other] = commaIsLater ? [comma.row, point.row] : [point.row, comma.row];
  throw new InputError(
    `${where}, row ${row}: a decimal ${later}, and a decimal ${earlier} in ${row === other ? "the same row" : `row ${other}`}; ` +
      "use one kind in the whole file, and no thousands separators",
  );
}

function readRow({ row, cells, problem }: Row, columns: readonly Column[], format: Format): RheometerReading {
  if (problem !== undefined) throw new InputError(problem);
  if (cells.length !== columns.length) {
    const advice =
      format.separator === "," ? "; numbers with a decimal comma need semicolons between the columns" : "";
    throw new InputError(`${cells.length} entries under ${columns.length} columns${advice}`);
  }
  const values = columns.map((column, i) => valueOf(column, cells[i]!, format));
  const shares = values.filter((_, i) => columns[i]!.field === "massFraction") as number[];
  const sum = shares.reduce((total, share) => total + share, 0);
  if (Math.abs(sum - 1) > SUM_TOLERANCE + ROUNDING) {
    throw new InputError(
      `the mass fractions add up to ${+sum.toPrecision(6)}; they must add up to 1 ± ${SUM_TOLERANCE}: ` +
        "give every liquid a column, and check percent against fraction",
    );
  }
  const entries = values.flatMap((value, i) =>
    value === undefined || columns[i]!.field === "massFraction" ? [] : [[columns[i]!.field, value] as const],
  );
  const others = Object.fromEntries(entries) as Omit<RheometerReading, "row" | "fractions">;
  return { row, fractions: shares.map((share) => share / sum), ...others };
}

function valueOf(column: Column, cell: string, { decimalMark }: Format): number | undefined {
  const { label, field, unit } = column;
  const where = `column "${label}"`;
  if (cell === "" && (field === "shearRate_pers" || field === "repeat")) return undefined;
  if (cell === "") {
    throw new InputError(
      `${where} is empty; write ${field === "massFraction" ? "0 for a liquid that is not in it" : "what was measured"}`,
    );
  }
  const written = numberWith[decimalMark].test(cell) ? Number(cell.replace(",", ".")) : NaN;
  if (!Number.isFinite(written) || (field === "repeat" && !Number.isInteger(written))) {
    const mark = decimalMark === "." ? "point" : "comma";
    const kind = field === "repeat" ? "whole number" : `number with a decimal ${mark}`;
    throw new InputError(`${where}: "${cell}" is not a ${kind}`);
  }
  return checkNumber(inFieldUnit(where, field, written, unit), { where, field, ...allowed[field] });
}

function inFieldUnit(where: string, field: Column["field"], written: number, unit: string): number {
  if (field === "repeat" || unit === "fraction") return written;
  // As readQuantity: without the rounding noise that a conversion leaves behind.
  if (unit === "%") return Number((written / 100).toPrecision(12));
  return readQuantity({ where, field, given: `${written} ${unit}` });
}
