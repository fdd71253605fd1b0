// The end of a notebook: what was decided, and what was made, shown and appended to the lab record.

import { isDeepStrictEqual } from "node:util";
import { dataHashOf } from "../lab/dataHash.js";
import { appendRecord, readRecords } from "../lab/record.js";
import { checkRecord, type BatchRecord, type DecisionRecord } from "../lab/record/kinds.js";
import type { ReturnedBatch } from "../lab/batch/files.js";
import type { Case } from "../assess/case.js";
import { decisionMark } from "./content.js";
import { numberText } from "./digits.js";
import { showMarkdown, showSummary, showTable } from "./show.js";
import { tableOf } from "./table.js";

/**
 * Shows a decision with the figures behind it, heads the page with it, and appends it to the lab record, in the folder that the
 * environment variable `RESINWRIGHT_RECORDS` names or else `../records`. The record and the page name the version of the library
 * and the hash of the data used ({@link dataHashOf}).
 * @param input - The case decided on; `from`, the notebook; the `statement`; `figures`, numbers or short text with units in
 * their names.
 * @throws InputError when the statement is empty or a figure is not finite; outside a notebook.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { decide } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const cell = () => decide({
 *   work,
 *   from: "02-viscosity-and-ratio",
 *   statement: "Mix six parts of oligomer with four of diluent.",
 *   figures: { share: 0.6, viscosity_mPas: 400 },
 * });
 * typeof cell; // → "function"
 * ```
 */
export function decide({
  work,
  from,
  statement,
  figures,
}: {
  work: Case;
  from: string;
  statement: string;
  figures: Readonly<Record<string, number | string>>;
}): void {
  const { brief, formulation } = work;
  showAndAppend({
    say: () => {
      showMarkdown(decisionMark + statement);
      showSummary({ work, decided: statement });
    },
    record: {
      kind: "decision",
      from,
      brief: brief.id,
      formulation: formulation.id,
      dataHash: dataHashOf(work),
      statement,
      figures,
    },
    figures,
  });
}

/**
 * Shows and appends a batch as it was weighed, portion by portion with lots, as {@link decide} does a decision. A batch that stands
 * in the record with the same weighings is not appended again.
 * @param input - The case as planned; `from`, the notebook; the `batch`; the `statement`.
 * @throws InputError when the statement is empty; outside a notebook.
 * @example
 * ```ts
 * import { openBatch, openBrief } from "resinwright/files";
 * import { recordBatch } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const batch = openBatch({ ...work, draws: 200 })!;
 * const cell = () => recordBatch({ work, from: "06-weigh-it-out", batch, statement: "TEGDMA poured over its mark." });
 * typeof cell; // → "function"
 * ```
 */
export function recordBatch({
  work,
  from,
  batch: { weighed, made },
  statement,
}: {
  work: Case;
  from: string;
  batch: ReturnedBatch;
  statement: string;
}): void {
  const { brief, formulation } = work;
  const { lines, total_g } = made;
  const stands = readRecords(recordFolder()).some(
    (record) =>
      record.kind === "batch" && record.batch === weighed.id && isDeepStrictEqual(record.lines, lines),
  );
  if (stands) {
    showMarkdown(`${statement} It stands in the lab record already.`);
    return;
  }
  showAndAppend({
    say: () => showMarkdown(statement),
    record: {
      kind: "batch",
      from,
      brief: brief.id,
      formulation: formulation.id,
      dataHash: dataHashOf(work),
      statement,
      batch: weighed.id,
      lines,
    },
    figures: { batch: weighed.id, portions: lines.length, total_g },
  });
}

/** Checked and shown before it is written: a record that cannot be or is not read by anybody leaves nothing behind. */
function showAndAppend({
  say,
  record,
  figures,
}: {
  say: () => void;
  record: (BatchRecord | DecisionRecord) & { readonly dataHash: string };
  figures: Readonly<Record<string, number | string>>;
}): void {
  checkRecord(record);
  say();
  const { file, record: written } = appendRecord({ folder: recordFolder(), record });
  const rows = Object.entries(figures).map(([figure, value]) => ({
    figure,
    value: typeof value === "number" ? numberText(value) : value,
  }));
  showTable(
    tableOf({
      caption: "What was appended to the lab record",
      rows: [
        ...rows,
        { figure: "computed by", value: `resinwright ${written.libraryVersion}` },
        { figure: "from the data", value: shortHashes(record.dataHash) },
        { figure: "written at", value: written.at },
        { figure: "in the file", value: shortHashes(file) },
      ],
    }),
  );
}

function recordFolder(): string {
  return process.env["RESINWRIGHT_RECORDS"] || "../records";
}

/** On a page twelve digits tell hashes apart; the record holds all of them. */
function shortHashes(text: string): string {
  return text.replace(/([0-9a-f]{12})[0-9a-f]{52}/g, "$1…");
}
