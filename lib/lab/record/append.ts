// Adding to the record: a new file on the newest ones, which it names.

import { randomBytes } from "node:crypto";
import { resolve } from "node:path";
import { InputError } from "../../door.js";
import { fileOf, idOf, namesIn, readRecordFile, writeOnce } from "./folder.js";
import { checkRecord, type NewRecord, type Written } from "./kinds.js";
import { libraryVersion } from "./version.js";

/**
 * Appends a record to a folder as a new file; a record that stands is never touched.
 *
 * The file is written whole or not at all, and named by its time and the SHA-256 of its content. It names the newest records
 * it was written on (`after`), so that one that is edited or taken away later is missed. Several programs may append at once,
 * and two copies of a folder may be merged file by file: the next record is then written on both ends.
 * @param input - `folder` (made if missing) and the record: a recipe, batch, measurement, print, decision or amendment.
 * @returns The record as written, its id and the name of its file.
 * @throws InputError naming a field that is missing, empty, unknown or not finite; when an amendment amends no record of this
 * folder; when the disc refuses, with the system's error as its cause.
 * @example
 * ```ts
 * import { mkdtempSync } from "node:fs";
 * import { tmpdir } from "node:os";
 * import { join } from "node:path";
 * import { appendRecord } from "resinwright/files";
 * const { record } = appendRecord({
 *   folder: mkdtempSync(join(tmpdir(), "records-")),
 *   record: {
 *     kind: "measurement", from: "cone and plate", formulation: "flow-cell-a", batch: "A-3",
 *     quantity: "viscosity_mPas", repeats: [316, 320, 318], instrument: "rotational, 40 mm",
 *     conditions: { temperature_C: 28 }, statement: "Within the target.",
 *   },
 * });
 * record.repeats; // → [316, 320, 318]
 * ```
 */
export function appendRecord<R extends NewRecord>({
  folder,
  record,
}: {
  folder: string;
  record: R;
}): { id: string; file: string; record: R & Required<Written> } {
  checkRecord(record);
  const after = newestIn(folder);
  if (record.kind === "amendment") requireRecord(folder, record.amends);
  const added = {
    at: new Date().toISOString(),
    nonce: randomBytes(8).toString("hex"),
    after,
    libraryVersion: libraryVersion(),
  };
  const written = { ...added, ...record };
  const { id, file, text } = fileOf(written);
  writeOnce({ folder, file, text });
  return { id, file, record: written };
}

/** What was seen of a folder: its record files, what they were written on, and those that none was written on. */
interface Seen {
  readonly files: Set<string>;
  readonly older: Set<string>;
  newest: string[];
}

/** A record file never changes, so what was read of a folder need not be read again. */
const seenFolders = new Map<string, Seen>();

/** Ids of the records that no other record was written on. */
function newestIn(folder: string): string[] {
  const names = namesIn(folder);
  let seen = seenFolders.get(resolve(folder));
  const present = new Set(names);
  if (seen === undefined || ![...seen.files].every((file) => present.has(file)))
    seen = { files: new Set(), older: new Set(), newest: [] };
  seenFolders.set(resolve(folder), seen);
  const { files, older } = seen;
  const fresh = names.filter((file) => !files.has(file) && idOf(file) !== undefined);
  for (const file of fresh) {
    files.add(file);
    for (const id of readRecordFile(folder, file).record?.after ?? []) older.add(id);
  }
  seen.newest = [...seen.newest, ...fresh.map((file) => idOf(file)!)].filter((id) => !older.has(id)).sort();
  return seen.newest;
}

function requireRecord(folder: string, id: string): void {
  if (namesIn(folder).some((file) => idOf(file) === id)) return;
  throw new InputError(
    `record: amends is "${id}", which is no record of this folder; take the id from listRecords`,
  );
}
