// The records folder on disc: one file a record, named by its time and by the hash of what it says; written whole or not at all.

import { createHash, randomBytes } from "node:crypto";
import {
  closeSync,
  fsyncSync,
  linkSync,
  mkdirSync,
  openSync,
  readdirSync,
  readFileSync,
  unlinkSync,
  writeFileSync,
} from "node:fs";
import { dirname, join } from "node:path";
import { InputError } from "../../door.js";
import type { LabRecord } from "./kinds.js";

/** Something about a records folder that a person should look at. `code` is stable for scripts; `message` is for people. */
export interface RecordProblem {
  readonly code:
    | "edited"
    | "missing"
    | "not-a-record"
    | "misnamed"
    | "unreadable"
    | "unfinished-write"
    | "clock-backwards"
    | "amends-nothing";
  readonly file: string;
  readonly message: string;
}

/** A file whose name is that of a record. */
export interface RecordFile {
  readonly file: string;
  /** The hash its name states. */
  readonly id: string;
  /** What it says, if that is what was written. */
  readonly record?: LabRecord;
  readonly problem?: RecordProblem;
}

/** The names in a folder; a folder that does not exist holds none. */
export function namesIn(folder: string): string[] {
  try {
    return readdirSync(folder);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === "ENOENT") return [];
    throw error;
  }
}

/** The id that a file name states, or undefined for a file that is no record. */
export function idOf(file: string): string | undefined {
  return /^\d{4}-\d\d-\d\dT\d\d-\d\d-\d\d-\d{3}Z-([0-9a-f]{64})\.json$/.exec(file)?.[1];
}

/** Whether a file name is that of a write that has not finished. */
export function isUnfinished(file: string): boolean {
  return /^\.[0-9a-f]{16}\.tmp$/.test(file);
}

/** Reads one record file and says what is wrong with it, if anything is. */
export function readRecordFile(folder: string, file: string): RecordFile {
  const id = idOf(file)!;
  const bad = (code: RecordProblem["code"], message: string): RecordFile => ({
    file,
    id,
    problem: { code, file, message: `${file}: ${message}` },
  });
  let bytes: Buffer;
  try {
    // A checkout may have given the lines the endings of its system; JSON has no raw line ending inside a text.
    const asRead = readFileSync(join(folder, file), "latin1").replaceAll("\r\n", "\n");
    bytes = Buffer.from(asRead, "latin1");
  } catch (error) {
    const { code = "unknown reason" } = error as NodeJS.ErrnoException;
    return bad("unreadable", `cannot be read (${code}); check the disc and the rights`);
  }
  if (hashOf(bytes) !== id) {
    return bad(
      "edited",
      "is not what was written: its content does not match the hash in its name; restore it from a copy",
    );
  }
  const record = parse(bytes.toString());
  if (record === undefined)
    return bad("not-a-record", "this is not a lab record; move it out of the records folder");
  const rightName = fileName(record.at, id);
  if (rightName === file) return { file, id, record };
  return { ...bad("misnamed", `was renamed; name it ${rightName} again`), record };
}

/** The text of a record's file and the name it goes by. */
export function fileOf(record: LabRecord): { file: string; id: string; text: string } {
  const text = `${JSON.stringify(record, null, 2)}\n`;
  const id = hashOf(text);
  return { file: fileName(record.at, id), id, text };
}

/**
 * Writes a file whole or not at all: under a temporary name, flushed, then linked to its name, which fails if that exists.
 * @throws InputError saying that nothing was recorded, with the system's error as its cause.
 */
export function writeOnce({ folder, file, text }: { folder: string; file: string; text: string }): void {
  try {
    const made = mkdirSync(folder, { recursive: true });
    const temporary = join(folder, `.${randomBytes(8).toString("hex")}.tmp`);
    try {
      writeFlushed(temporary, text);
      linkSync(temporary, join(folder, file));
    } finally {
      unlinkIfThere(temporary);
    }
    flushFolder(folder);
    if (made !== undefined) flushFolder(dirname(made));
  } catch (error) {
    const { code = "unknown reason" } = error as NodeJS.ErrnoException;
    throw new InputError(
      `records folder ${folder}: the record could not be written (${code}); ${advice[code] ?? otherAdvice}`,
      { cause: error },
    );
  }
}

const advice: Readonly<Record<string, string>> = {
  ENOSPC: "nothing was recorded; free some space and append it again",
  EDQUOT: "nothing was recorded; free some space and append it again",
  EROFS: "nothing was recorded; the folder is read-only, name another one or change its rights",
  EACCES: "nothing was recorded; the folder is read-only, name another one or change its rights",
  EPERM: "nothing was recorded; the folder is read-only or its disc has no hard links, name another one",
};
const otherAdvice = "look with verifyRecords whether it stands before you append it again";

function hashOf(text: string | Buffer): string {
  return createHash("sha256").update(text).digest("hex");
}

function fileName(at: string, id: string): string {
  return `${at.replaceAll(":", "-").replace(".", "-")}-${id}.json`;
}

function parse(text: string): LabRecord | undefined {
  try {
    const value = JSON.parse(text) as Partial<LabRecord> | null;
    const isRecord =
      typeof value?.kind === "string" &&
      typeof value.at === "string" &&
      typeof value.statement === "string" &&
      Array.isArray(value.after) &&
      value.after.every((one) => typeof one === "string");
    return isRecord ? (value as LabRecord) : undefined;
  } catch {
    return undefined;
  }
}

function writeFlushed(path: string, text: string): void {
  const handle = openSync(path, "wx");
  try {
    writeFileSync(handle, text);
    fsyncSync(handle);
  } finally {
    closeSync(handle);
  }
}

function unlinkIfThere(path: string): void {
  try {
    unlinkSync(path);
  } catch (error) {
    // The disc that refused the write may refuse this too; a stray temporary file is no record and is reported as such.
    if (!["ENOENT", "EROFS", "EACCES", "EPERM", "EIO"].includes((error as NodeJS.ErrnoException).code ?? ""))
      throw error;
  }
}

/** Makes the new name itself survive a power cut, where the system lets a folder be flushed. */
function flushFolder(folder: string): void {
  let handle: number | undefined;
  try {
    handle = openSync(folder, "r");
    fsyncSync(handle);
  } catch (error) {
    if (!["EISDIR", "EPERM", "EACCES", "EINVAL"].includes((error as NodeJS.ErrnoException).code ?? ""))
      throw error;
  } finally {
    if (handle !== undefined) closeSync(handle);
  }
}
