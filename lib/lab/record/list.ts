// Reading the record: every record after the ones it was written on, whatever the clocks said.

import { InputError } from "../../door.js";
import {
  idOf,
  isUnfinished,
  namesIn,
  readRecordFile,
  type RecordFile,
  type RecordProblem,
} from "./folder.js";
import type { LabRecord } from "./kinds.js";

/** A record with its id, its file, and the ids of the amendments that correct it, oldest first. */
export interface RecordEntry {
  readonly id: string;
  readonly file: string;
  readonly record: LabRecord;
  readonly amendedBy: readonly string[];
}

/** All records of a folder that are as they were written, oldest first, and whatever else is to be said of the folder. */
export interface RecordList {
  readonly entries: readonly RecordEntry[];
  readonly problems: readonly RecordProblem[];
  /** Ids of the newest records: those that no other record was written on. */
  readonly newest: readonly string[];
}

/**
 * Lists a folder: each record comes after those it was written on; where that leaves a choice, by its time. A folder that does
 * not exist holds none. What cannot be used is left out of the entries and named among the problems.
 * @throws the system's error when the folder itself cannot be read.
 * @example
 * ```ts
 * import { mkdtempSync } from "node:fs";
 * import { tmpdir } from "node:os";
 * import { join } from "node:path";
 * import { appendRecord, listRecords } from "resinwright/files";
 * const folder = mkdtempSync(join(tmpdir(), "records-"));
 * const about = { from: "bench", statement: "First try.", formulation: "flow-cell-a" };
 * const lines = [{ ingredient: "IBOA", lot: "I-22", target_g: 30, actual_g: 30.4 }];
 * const { id } = appendRecord({ folder, record: { ...about, kind: "batch", batch: "A-1", lines } });
 * appendRecord({ folder, record: {
 *   kind: "amendment", from: "bench", amends: id, statement: "Misread the balance.", corrections: { actual_g: 30.1 },
 * } });
 * const { entries, problems } = listRecords(folder);
 * entries.map(({ record, amendedBy }) => `${record.kind}, amended ${amendedBy.length}`); // → ["batch, amended 1", "amendment, amended 0"]
 * problems; // → []
 * ```
 */
export function listRecords(folder: string): RecordList {
  const { files, stray } = readFolder(folder);
  const present = new Map(files.map((one) => [one.id, one]));
  const ordered = inOrder(files.filter(({ record }) => record !== undefined));
  const amendments = new Map<string, string[]>();
  for (const { id, record } of ordered) {
    if (record.kind === "amendment")
      amendments.set(record.amends, [...(amendments.get(record.amends) ?? []), id]);
  }
  const older = new Set(ordered.flatMap(({ record }) => record.after));
  return {
    entries: ordered.map(({ id, file, record }) => ({
      id,
      file,
      record,
      amendedBy: amendments.get(id) ?? [],
    })),
    problems: [
      ...files.flatMap(({ problem }) => problem ?? []),
      ...ordered.flatMap((one) => linkProblems(one, present)),
      ...stray,
    ],
    newest: [...present.keys()].filter((id) => !older.has(id)).sort(),
  };
}

/**
 * Reads all records of a folder, oldest first, and refuses a folder in which one is edited, missing or no record; a folder that
 * does not exist holds none. Temporary files of unfinished writes and clocks set back are no obstacle; {@link listRecords} names them.
 * @throws InputError with every problem on its own line.
 * @example
 * ```ts
 * import { mkdtempSync } from "node:fs";
 * import { tmpdir } from "node:os";
 * import { join } from "node:path";
 * import { appendRecord, readRecords } from "resinwright/files";
 * const folder = mkdtempSync(join(tmpdir(), "records-"));
 * const about = { from: "my script", brief: "flow-cell", formulation: "flow-cell-a", figures: { share: 0.6 } };
 * appendRecord({ folder, record: { ...about, kind: "decision", statement: "Try six parts of oligomer in ten." } });
 * readRecords(folder).map(({ statement }) => statement); // → ["Try six parts of oligomer in ten."]
 * ```
 */
export function readRecords(folder: string): LabRecord[] {
  const { entries, problems } = listRecords(folder);
  const grave = problems.filter(({ code }) => !harmless.includes(code));
  if (grave.length > 0) throw new InputError(grave.map(({ message }) => message).join("\n"));
  return entries.map(({ record }) => record);
}

/** Problems that leave every record as it was written. */
export const harmless: readonly RecordProblem["code"][] = ["unfinished-write", "clock-backwards"];

type Read = RecordFile & { readonly record: LabRecord };

function readFolder(folder: string): { files: RecordFile[]; stray: RecordProblem[] } {
  const files = new Map<string, RecordFile>();
  let names = namesIn(folder);
  let fresh = names;
  // A record may appear while the folder is being listed and be missed, while one written on it is seen: then look again.
  do {
    for (const file of fresh) {
      const id = idOf(file);
      if (id !== undefined && !files.has(id)) files.set(id, readRecordFile(folder, file));
    }
    const seen = new Set(names);
    if (holdsAllNamed(files)) break;
    names = namesIn(folder);
    fresh = names.filter((file) => !seen.has(file));
  } while (fresh.length > 0);
  return { files: [...files.values()], stray: strayFiles(names, files) };
}

function holdsAllNamed(files: ReadonlyMap<string, RecordFile>): boolean {
  return [...files.values()].every(({ record }) => record?.after.every((id) => files.has(id)) ?? true);
}

function strayFiles(names: readonly string[], files: ReadonlyMap<string, RecordFile>): RecordProblem[] {
  return names.flatMap((file): RecordProblem[] => {
    const id = idOf(file);
    if (isUnfinished(file)) {
      const message = `${file}: left by a write that did not finish, or is under way; no record is lost, delete it when nothing writes here`;
      return [{ code: "unfinished-write", file, message }];
    }
    if (id === undefined && file.endsWith(".json")) {
      const message = `${file}: this is not a lab record; move it out of the records folder`;
      return [{ code: "not-a-record", file, message }];
    }
    if (id !== undefined && files.get(id)!.file !== file) {
      return [{ code: "misnamed", file, message: `${file}: is a copy of ${files.get(id)!.file}; delete it` }];
    }
    return [];
  });
}

/** By time, but each record after those it was written on. */
function inOrder(files: readonly RecordFile[]): Read[] {
  const byName = (files as readonly Read[]).toSorted((a, b) => (a.file < b.file ? -1 : 1));
  const byId = new Map(byName.map((one) => [one.id, one]));
  const placed = new Set<Read>();
  for (const one of byName) {
    const waiting = [one];
    while (waiting.length > 0) {
      const next = waiting.at(-1)!;
      const before = next.record.after
        .flatMap((id) => byId.get(id) ?? [])
        .filter((older) => !placed.has(older));
      if (before.length > 0 && !placed.has(next)) waiting.push(...before);
      else {
        placed.add(next);
        waiting.pop();
      }
    }
  }
  return [...placed];
}

function linkProblems({ file, record }: Read, present: ReadonlyMap<string, RecordFile>): RecordProblem[] {
  const problem = (code: RecordProblem["code"], message: string) => ({
    code,
    file,
    message: `${file}: ${message}`,
  });
  const before = record.after.map((id) => present.get(id));
  const gone = record.after.filter((id) => !present.has(id));
  const later = before.find((one) => one?.record !== undefined && one.record.at > record.at);
  return [
    ...gone.map((id) =>
      problem(
        "missing",
        `was written on a record that is not here; restore the file that ends in ${id}.json`,
      ),
    ),
    ...(later?.record === undefined
      ? []
      : [
          problem(
            "clock-backwards",
            `says it was written at ${record.at}, after one of ${later.record.at}; a clock was set back or two clocks differ`,
          ),
        ]),
    ...(record.kind === "amendment" && !present.has(record.amends)
      ? [problem("amends-nothing", `amends ${record.amends}, which is not here; restore that record`)]
      : []),
  ];
}
