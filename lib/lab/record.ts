// The lab record: one JSON file a record, written whole or not at all, added to and never changed.

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
  writeSync,
} from "node:fs";
import { join } from "node:path";
import { InputError } from "../door.js";

/** What was decided or measured, by which part of the work, about which formulation. */
export interface LabRecord {
  /** When it was written, ISO 8601 in UTC. */
  readonly at: string;
  readonly kind: "decision" | "measurement";
  /** The notebook, script or person it comes from. */
  readonly from: string;
  readonly brief: string;
  readonly formulation: string;
  /** What was decided or found, in a sentence. */
  readonly statement: string;
  /** The figures behind it: numbers or short text, units in the names. */
  readonly figures: Readonly<Record<string, number | string>>;
}

/**
 * Appends a record to a folder as a new file; a record that stands is never touched.
 * @param input - `folder` (made if missing) and the record without its time.
 * @returns The record as written and the name of its file.
 * @throws InputError when the statement is empty or a figure is not finite; the system's error when the disc refuses.
 */
export function appendRecord({ folder, record }: { folder: string; record: Omit<LabRecord, "at"> }): {
  file: string;
  record: LabRecord;
} {
  if (record.statement.trim() === "")
    throw new InputError("record: statement is empty; say what was decided or found");
  for (const [name, value] of Object.entries(record.figures)) {
    if (typeof value === "number" && !Number.isFinite(value)) {
      throw new InputError(`record: figures.${name} is ${value}; a record holds finite numbers or text`);
    }
  }
  const written: LabRecord = { at: new Date().toISOString(), ...record };
  const text = `${JSON.stringify(written, null, 2)}\n`;
  const digest = createHash("sha256").update(text).digest("hex").slice(0, 16);
  const file = `${written.at.replaceAll(":", "-").replace(".", "-")}-${digest}.json`;
  mkdirSync(folder, { recursive: true });
  writeOnce(folder, file, text);
  return { file, record: written };
}

/**
 * Reads all records of a folder, oldest first; a folder that does not exist holds none.
 * @throws InputError naming a file that is not a record.
 */
export function readRecords(folder: string): LabRecord[] {
  let names: string[];
  try {
    names = readdirSync(folder);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === "ENOENT") return [];
    throw error;
  }
  return names
    .filter((name) => name.endsWith(".json"))
    .sort()
    .map((name) => {
      try {
        const record = JSON.parse(readFileSync(join(folder, name), "utf8")) as LabRecord;
        if (typeof record.statement === "string" && typeof record.at === "string") return record;
      } catch (error) {
        if (!(error instanceof SyntaxError)) throw error;
      }
      throw new InputError(`${name}: this is not a lab record; move it out of the records folder`);
    });
}

/** Writes under a temporary name, flushes, then links to the final name: the link fails if that exists already. */
function writeOnce(folder: string, file: string, text: string): void {
  const temporary = join(folder, `.${randomBytes(8).toString("hex")}.tmp`);
  const handle = openSync(temporary, "wx");
  try {
    try {
      writeSync(handle, text);
      fsyncSync(handle);
    } finally {
      closeSync(handle);
    }
    linkSync(temporary, join(folder, file));
  } finally {
    unlinkSync(temporary);
  }
}
