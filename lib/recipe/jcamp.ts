// JCAMP-DX, the open standard for spectra: labelled records, ordinates in any of its number forms, and every check it offers.
// Strict on purpose: a spectrum that was damaged on its way is refused with the line, never repaired.

import { InputError } from "../door.js";
import { absorbanceOf, risingSpectrum, type MeasuredSpectrum } from "./spectrumTable.js";

/**
 * Reads one absorption spectrum from a JCAMP-DX text.
 *
 * - `text`: one block from `##TITLE=` to `##END=`; `where` names the file in errors.
 *
 * Ordinates: `XYDATA=(X++(Y..Y))` in the forms AFFN, PAC, SQZ, DIF and DUP, or `XYPOINTS=(XY..XY)`. X units `1/CM`,
 * `NANOMETERS` or `MICROMETERS` become nm; Y units `ABSORBANCE` or `TRANSMITTANCE` become decadic absorbance. Checked:
 * NPOINTS, FIRSTX, LASTX, DELTAX and FIRSTY where given, the X of every line, the repeated Y after a line of differences. A last
 * line of differences may stand without the line that repeats its Y: instruments leave it out (from memory).
 * @throws InputError with the line: a record that is missing, repeated or not a number; a check that fails; blocks within
 * blocks, other units, a character of no number form.
 * @source R. S. McDonald, P. A. Wilks, Appl. Spectrosc. 42 (1988) 151-162, doi 10.1366/0003702884428734 (JCAMP-DX 4.24; doi
 * from memory).
 * @example
 * ```ts
 * import { readJcamp } from "resinwright";
 * const text = `##TITLE= film of a dye
 * ##JCAMP-DX= 4.24
 * ##DATA TYPE= UV/VIS SPECTRUM
 * ##XUNITS= NANOMETERS
 * ##YUNITS= ABSORBANCE
 * ##FIRSTX= 400
 * ##LASTX= 402
 * ##NPOINTS= 3
 * ##XFACTOR= 1
 * ##YFACTOR= 0.001
 * ##XYDATA= (X++(Y..Y))
 * 400C50J5k0
 * ##END=`;
 * readJcamp({ text, where: "film.jdx" }).values[2]; // → 0.345
 * ```
 */
export function readJcamp({ text, where }: { text: string; where: string }): MeasuredSpectrum {
  const file = readRecords(text, where);
  recordOf(file, "JCAMPDX");
  const points = file.records.has("XYPOINTS") ? readPoints(file) : readOrdinates(file);
  const wavelength = unitOf(file, "XUNITS", xUnits);
  const absorbance = unitOf(file, "YUNITS", yUnits);
  return risingSpectrum(where, {
    title: recordOf(file, "TITLE").value,
    quantity: "absorbance",
    wavelengths_nm: points.map(({ x, line }) => wavelength(x, `${where}, line ${line}: X`)),
    values: points.map(({ y, line }) => absorbance(y, `${where}, line ${line}: Y`)),
  });
}

/** A record: what stands behind its `=`, and the lines that follow. Lines count from 1. */
interface JcampRecord {
  readonly value: string;
  readonly line: number;
  readonly rows: { readonly text: string; readonly line: number }[];
}

interface JcampFile {
  readonly where: string;
  readonly records: ReadonlyMap<string, JcampRecord>;
}

/** A point in the units of the file, factors applied. */
interface Point {
  readonly x: number;
  readonly y: number;
  readonly line: number;
}

function readRecords(text: string, where: string): JcampFile {
  const lines = text
    .replace(/^\uFEFF/, "")
    .trimEnd()
    .split(/\r?\n/);
  const records = new Map<string, JcampRecord>();
  let open: JcampRecord | undefined;
  for (const [index, raw] of lines.entries()) {
    const line = index + 1;
    const text = raw.replace(/\$\$.*$/, "").trimEnd();
    const [, label, value] = /^\s*##(.*?)=(.*)$/.exec(text) ?? [];
    if (label !== undefined) {
      const name = label.toUpperCase().replace(/[\s\-/_]/g, "");
      open = { value: value!.trim(), line, rows: [] };
      if (records.size === 0 && name !== "TITLE")
        fail(where, line, `begins with ##${label}=; the first record must be ##TITLE=`);
      if (records.has("END")) fail(where, line, "stands after ##END=; give one spectrum a file");
      if (name === "TITLE" && records.size > 0)
        fail(where, line, "begins a second block; give one spectrum a file");
      // Comments and the makers' own records may come often; none of them is read here.
      if (records.has(name) && needed.has(name))
        fail(where, line, `repeats ##${label}=, given in line ${records.get(name)!.line}; keep one`);
      records.set(name, open);
    } else if (text.trim() !== "") {
      if (open === undefined) fail(where, line, "stands before ##TITLE=; this is not a JCAMP-DX file");
      open.rows.push({ text, line });
    }
  }
  if (!records.has("END")) fail(where, lines.length, "is the last, without ##END=; the file was cut off");
  return { where, records };
}

/** Equally spaced points: each line gives the X of its first ordinate. */
function readOrdinates(file: JcampFile): Point[] {
  const { where } = file;
  const data = recordOf(file, "XYDATA");
  checkForm(where, data, "XYDATA", "(X++(Y..Y))");
  const [first, last, count] = [numberOf(file, "FIRSTX"), numberOf(file, "LASTX"), countOf(file)];
  const [xFactor, yFactor] = [factorOf(file, "XFACTOR"), factorOf(file, "YFACTOR")];
  const step = (last.value - first.value) / (count - 1);
  checkStep(file, step, count);
  const points: Point[] = [];
  let differences = false;
  for (const { text, line } of data.rows) {
    const row = decode(text, (what) => fail(where, line, what));
    const start = differences ? points.length - 1 : points.length;
    const expected = first.value + start * step;
    const given = row.x.value * xFactor;
    // X is printed with few digits, and so are the ends of the file.
    const slack = Math.min(
      row.x.unit * Math.abs(xFactor) + Math.max(first.unit, last.unit),
      Math.abs(step) / 2,
    );
    if (!(Math.abs(given - expected) <= slack * (1 + 1e-9))) {
      fail(
        where,
        line,
        `begins at X ${given}; point ${start + 1} of ${count} must lie at ${Number(expected.toPrecision(9))}: a line is missing, or FIRSTX, LASTX or NPOINTS is wrong`,
      );
    }
    const ordinates = differences ? row.ordinates.slice(1) : row.ordinates;
    const repeated = points.at(-1)?.y;
    if (differences && row.ordinates[0]! * yFactor !== repeated) {
      fail(
        where,
        line,
        `begins with Y ${row.ordinates[0]! * yFactor}; it must repeat the last Y before it, ${repeated}: a difference was damaged`,
      );
    }
    for (const y of ordinates) points.push({ x: first.value + points.length * step, y: y * yFactor, line });
    differences = row.endsInDifference;
  }
  checkCount(file, data, points, count);
  checkFirstY(file, points);
  return points;
}

/** Points of any spacing, X and Y in pairs. */
function readPoints(file: JcampFile): Point[] {
  const { where } = file;
  const data = recordOf(file, "XYPOINTS");
  checkForm(where, data, "XYPOINTS", "(XY..XY)");
  const [xFactor, yFactor] = [factorOf(file, "XFACTOR"), factorOf(file, "YFACTOR")];
  const points = data.rows.flatMap(({ text, line }) => {
    const words = text
      .trim()
      .split(/\s*[,;]\s*|\s+/)
      .filter((word) => word !== "");
    const numbers = words.map(
      (word) => parsed(word) ?? fail(where, line, `holds ${JSON.stringify(word)}, which is not a number`),
    );
    if (numbers.length % 2 !== 0)
      fail(where, line, `holds ${numbers.length} numbers; X and Y must come in pairs`);
    return numbers.flatMap((x, i) =>
      i % 2 === 0 ? [{ x: x * xFactor, y: numbers[i + 1]! * yFactor, line }] : [],
    );
  });
  checkCount(file, data, points, countOf(file));
  checkFirstY(file, points);
  checkEnd(file, "FIRSTX", points[0]!.x);
  checkEnd(file, "LASTX", points.at(-1)!.x);
  return points;
}

interface DecodedRow {
  readonly x: PrintedNumber;
  readonly ordinates: readonly number[];
  /** The last ordinate came as a difference, so the next line must repeat it. */
  readonly endsInDifference: boolean;
}

/**
 * One line: X as a plain number, then ordinates. A letter is sign and first digit at once: @ A-I a-i of a value, % J-R j-r of
 * a difference to the value before, S-Z s of a count of repeats. E is an exponent only before a sign and two or three digits.
 */
function decode(text: string, refuse: (what: string) => never): DecodedRow {
  const tokens =
    text.match(/[+-]?(?:\d+\.?\d*|\.\d+)(?:E[+-]\d{2,3})?|[@A-Ia-i%J-Rj-rS-Zs]\d*|[\s,;]+|./g) ?? [];
  const ordinates: number[] = [];
  let [x, difference]: [PrintedNumber | undefined, number | undefined] = [undefined, undefined];
  for (const token of tokens) {
    const head = token[0]!;
    if (/[\s,;]/.test(head)) continue;
    const last = ordinates.at(-1);
    if (/[\d.+-]/.test(head) && parsed(token) !== undefined) {
      if (x === undefined) x = printed(token);
      else [difference] = [undefined, ordinates.push(parsed(token)!)];
    } else if (x === undefined)
      refuse(`begins with ${JSON.stringify(head)}; a line must begin with its X as a plain number`);
    else if (squeezed.includes(head)) [difference] = [undefined, ordinates.push(valueOf(token, squeezed))];
    else if (differences.includes(head)) {
      if (last === undefined)
        refuse("begins with a difference; the first ordinate of a line must be a value");
      difference = valueOf(token, differences);
      ordinates.push(last + difference);
    } else if (repeats.includes(head)) {
      const count = Number(`${repeats.indexOf(head)}${token.slice(1)}`);
      if (last === undefined) refuse("begins with a count of repeats; there is nothing to repeat");
      for (let k = 1; k < count; k++) ordinates.push(ordinates.at(-1)! + (difference ?? 0));
    } else
      refuse(
        `holds ${JSON.stringify(head)}, which no number form of JCAMP-DX uses; missing ordinates cannot be read`,
      );
  }
  if (x === undefined || ordinates.length === 0)
    refuse("holds no ordinate; a line gives X and at least one Y");
  return { x, ordinates, endsInDifference: difference !== undefined };
}

/** Place in the alphabet is the digit: 0 to 9, then -1 to -9. */
const squeezed = "@ABCDEFGHIabcdefghi";
const differences = "%JKLMNOPQRjklmnopqr";
const repeats = " STUVWXYZs";

function valueOf(token: string, alphabet: string): number {
  const place = alphabet.indexOf(token[0]!);
  const size = Number(`${place > 9 ? place - 9 : place}${token.slice(1)}`);
  return place > 9 ? -size : size;
}

type Conversion = (value: number, place: string) => number;

const xUnits: Readonly<Record<string, Conversion>> = {
  "1/CM": (x, place) => 1e7 / aboveZero(x, place),
  NANOMETERS: aboveZero,
  MICROMETERS: (x, place) => 1e3 * aboveZero(x, place),
};

const yUnits: Readonly<Record<string, Conversion>> = { ABSORBANCE: (y) => y, TRANSMITTANCE: absorbanceOf };

function aboveZero(x: number, place: string): number {
  if (x > 0) return x;
  throw new InputError(`${place} is ${x}; a wavelength or wavenumber must be above 0`);
}

function unitOf(file: JcampFile, label: string, units: Readonly<Record<string, Conversion>>): Conversion {
  const { value, line } = recordOf(file, label);
  return (
    units[value.toUpperCase()] ??
    fail(file.where, line, `gives ##${label}= ${value}; it must be one of ${Object.keys(units).join(", ")}`)
  );
}

function checkForm(where: string, { value, line }: JcampRecord, label: string, form: string): void {
  if (value.replace(/\s/g, "").toUpperCase() === form) return;
  fail(where, line, `gives ##${label}= ${value}; the form read here is ${form}`);
}

function checkStep(file: JcampFile, step: number, count: number): void {
  if (step === 0)
    fail(file.where, recordOf(file, "LASTX").line, "gives LASTX equal to FIRSTX; the points must spread");
  if (!file.records.has("DELTAX")) return;
  const given = numberOf(file, "DELTAX");
  const ends = Math.max(numberOf(file, "FIRSTX").unit, numberOf(file, "LASTX").unit);
  if (Math.abs(given.value - step) <= given.unit + ends / (count - 1)) return;
  fail(
    file.where,
    given.line,
    `gives ##DELTAX= ${given.value}; FIRSTX, LASTX and NPOINTS make it ${Number(step.toPrecision(9))}`,
  );
}

function checkCount(file: JcampFile, data: JcampRecord, points: readonly Point[], count: number): void {
  if (points.length === count) return;
  const line = data.rows.at(-1)?.line ?? data.line;
  fail(
    file.where,
    line,
    `ends the data after ${points.length} points; NPOINTS says ${count}: the file was damaged or cut`,
  );
}

function checkFirstY(file: JcampFile, points: readonly Point[]): void {
  if (!file.records.has("FIRSTY")) return;
  const { value, unit, line } = numberOf(file, "FIRSTY");
  if (isPrinted(points[0]!.y, value, unit)) return;
  fail(file.where, line, `gives ##FIRSTY= ${value}; the first ordinate is ${points[0]!.y}`);
}

/** Within half a unit of the last digit printed, and rounding noise. */
const isPrinted = (x: number, value: number, unit: number): boolean =>
  Math.abs(x - value) <= 0.5 * unit + 1e-9 * Math.abs(value);

function checkEnd(file: JcampFile, label: string, x: number): void {
  const { value, unit, line } = numberOf(file, label);
  if (isPrinted(x, value, unit)) return;
  fail(file.where, line, `gives ##${label}= ${value}; the data say ${x}`);
}

function recordOf({ where, records }: JcampFile, label: string): JcampRecord {
  return (
    records.get(label) ??
    fail(where, records.get("END")!.line, `is reached without ##${label}=; the record must be there`)
  );
}

interface PrintedNumber {
  readonly value: number;
  /** One unit of the last digit printed. */
  readonly unit: number;
}

function numberOf(file: JcampFile, label: string): PrintedNumber & { readonly line: number } {
  const { value, line } = recordOf(file, label);
  if (parsed(value) === undefined)
    fail(file.where, line, `gives ##${label}= ${value}, which is not a number`);
  return { ...printed(value), line };
}

function factorOf(file: JcampFile, label: string): number {
  const { value, line } = numberOf(file, label);
  return value !== 0 ? value : fail(file.where, line, `gives ##${label}= 0; a factor must differ from 0`);
}

function countOf(file: JcampFile): number {
  const { value, line } = numberOf(file, "NPOINTS");
  if (Number.isInteger(value) && value >= 2) return value;
  return fail(file.where, line, `gives ##NPOINTS= ${value}; it must be a whole number of at least 2`);
}

function parsed(word: string): number | undefined {
  return /^[+-]?(\d+\.?\d*|\.\d+)(E[+-]?\d{1,3})?$/i.test(word) && Number.isFinite(Number(word))
    ? Number(word)
    : undefined;
}

function printed(word: string): PrintedNumber {
  const [, decimals = "", exponent = "0"] = /^[^.E]*(?:\.(\d*))?(?:E(.*))?$/i.exec(word) ?? [];
  return { value: Number(word), unit: 10 ** (Number(exponent) - decimals.length) };
}

const needed = new Set(
  "TITLE XUNITS YUNITS FIRSTX LASTX DELTAX FIRSTY NPOINTS XFACTOR YFACTOR XYDATA XYPOINTS".split(" "),
);

function fail(where: string, line: number, what: string): never {
  throw new InputError(`${where}, line ${line}: ${what}`);
}
