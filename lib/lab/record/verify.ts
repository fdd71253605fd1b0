// Proving the record: every file still says what was written, and none that another was written on is gone.

import type { RecordProblem } from "./folder.js";
import { harmless, listRecords } from "./list.js";

/** What the check of a folder found. */
export interface RecordCheck {
  /** Nothing was edited, is missing or cannot be read. */
  readonly sound: boolean;
  /** Records that are as they were written. */
  readonly count: number;
  /** Ids of the newest records; note them elsewhere, and pass them as `expected` next time. */
  readonly newest: readonly string[];
  readonly problems: readonly RecordProblem[];
}

/**
 * Checks every record of a folder against the hash in its name and every record it was written on against what is there.
 *
 * An edited record is found, and so is one that was taken away, if a later record was written on it. The newest records have
 * none after them: note their ids elsewhere (in the notebook, in version control) and pass them as `expected`. The check finds
 * accidents and careless edits; whoever rewrites all records from one on with new hashes is found only by ids noted elsewhere.
 * @param input - `folder`, and `expected`: ids that must be there.
 * @throws the system's error when the folder itself cannot be read.
 * @source SHA-256: FIPS 180-4, 2015. Records that name the hash of those before: S. Haber, W. S. Stornetta, Journal of
 * Cryptology 3 (1991) 99-111, doi 10.1007/BF00196791 (from memory).
 * @example
 * ```ts
 * import { mkdtempSync, unlinkSync } from "node:fs";
 * import { tmpdir } from "node:os";
 * import { join } from "node:path";
 * import { appendRecord, verifyRecords } from "resinwright/files";
 * const folder = mkdtempSync(join(tmpdir(), "records-"));
 * const record = { kind: "recipe" as const, from: "bench", formulation: "neat", parts: [{ ingredient: "IBOA", massFraction: 1 }] };
 * const { file, id } = appendRecord({ folder, record: { ...record, statement: "One." } });
 * appendRecord({ folder, record: { ...record, statement: "Two." } });
 * verifyRecords({ folder, expected: [id] }).sound; // → true
 * unlinkSync(join(folder, file));
 * verifyRecords({ folder }).problems[0].code; // → "missing"
 * ```
 */
export function verifyRecords({
  folder,
  expected = [],
}: {
  folder: string;
  expected?: readonly string[];
}): RecordCheck {
  const { entries, problems: found, newest } = listRecords(folder);
  const whole = new Set(entries.map(({ id }) => id));
  const problems = [
    ...found,
    ...expected
      .filter((id) => !whole.has(id) && !found.some(({ file }) => file.includes(id)))
      .map((id) => ({
        code: "missing" as const,
        file: "",
        message: `a record that was expected is not here; restore the file that ends in ${id}.json`,
      })),
  ];
  const sound = problems.every(({ code }) => harmless.includes(code));
  return { sound, count: entries.length, newest, problems };
}
