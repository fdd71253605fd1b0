// The end of a notebook: what was decided, shown and appended to the lab record.

import { appendRecord } from "../lab/record.js";
import { checkRecord } from "../lab/record/kinds.js";
import type { Case } from "../assess/case.js";
import { decisionMark } from "./content.js";
import { numberText } from "./digits.js";
import { showMarkdown, showSummary, showTable } from "./show.js";
import { tableOf } from "./table.js";

/**
 * Shows a decision with the figures behind it, heads the page with it, and appends it to the lab record, in the folder that the environment variable
 * `RESINWRIGHT_RECORDS` names or else `../records`.
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
  const folder = process.env["RESINWRIGHT_RECORDS"] || "../records";
  const record = {
    kind: "decision" as const,
    from,
    brief: work.brief.id,
    formulation: work.formulation.id,
    statement,
    figures,
  };
  // Checked and shown before it is written: a record that cannot be or is not read by anybody leaves nothing behind.
  checkRecord(record);
  showMarkdown(decisionMark + statement);
  showSummary({ work, decided: statement });
  const { file, record: written } = appendRecord({ folder, record });
  const rows = Object.entries(figures).map(([figure, value]) => ({
    figure,
    value: typeof value === "number" ? numberText(value) : value,
  }));
  showTable(
    tableOf({
      caption: "What was appended to the lab record",
      rows: [
        ...rows,
        { figure: "written at", value: written.at },
        { figure: "in the file", value: file.replace(/([0-9a-f]{12})[0-9a-f]{20,}/, "$1…") },
      ],
    }),
  );
}
