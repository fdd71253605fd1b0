// `resinwright record list`: what the lab record holds.

import { InputError, unknownName } from "../door.js";
import { listRecords, type RecordEntry, type RecordList } from "../lab/record.js";
import { recordKinds } from "../lab/record/kinds.js";
import { tableOf } from "../notebook/table.js";
import type { Run } from "./act.js";
import { jsonText } from "./jsonText.js";
import { standingRecords } from "./records.js";
import { paragraph, tableText } from "./textTable.js";

/** With `--json`: "resinwright records 1", a {@link RecordList} with the entries of the kind asked for. */
export const run: Run = (given, around) => {
  const folder = standingRecords("record list", given, around);
  const { kind } = given.text;
  if (kind !== undefined && !(recordKinds as readonly string[]).includes(kind))
    throw new InputError(unknownName("record list", "kind", kind, recordKinds));
  const whole = listRecords(folder);
  const list = {
    ...whole,
    entries: whole.entries.filter(({ record }) => kind === undefined || record.kind === kind),
  };
  const text = given.isOn("json") ? jsonText("resinwright records 1", list) : recordText(list, around.width);
  around.print(text.trimEnd());
  return 0;
};

/** The list as a table, with what is wrong with the folder below it. */
export function recordText({ entries, problems }: RecordList, width: number): string {
  const caption = `The lab record: ${entries.length === 1 ? "1 record" : `${entries.length} records`}`;
  const table =
    entries.length === 0 ? paragraph(`${caption}.`, width) : tableText(recordTable(caption, entries), width);
  return [table, ...problems.map(({ message }) => paragraph(message, width))].join("\n");
}

function recordTable(caption: string, entries: readonly RecordEntry[]) {
  return tableOf({
    caption,
    rows: entries.map(({ id, record, amendedBy }) => ({
      "written (UTC)": record.at.slice(0, 16).replace("T", " "),
      kind: record.kind,
      about: "formulation" in record ? record.formulation : record.amends.slice(0, 12),
      statement: `${record.statement}${amendedBy.map((one) => ` [amended by ${one.slice(0, 12)}]`).join("")}`,
      from: record.from,
      id: id.slice(0, 12),
    })),
    columns: [
      { key: "written (UTC)", name: "written (UTC)" },
      ...["kind", "about", "statement", "from", "id"].map((key) => ({ key })),
    ],
  });
}
