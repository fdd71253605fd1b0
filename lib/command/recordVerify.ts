// `resinwright record verify`: whether the lab record still says what was written.

import { verifyRecords, type RecordCheck } from "../lab/record.js";
import type { Run } from "./act.js";
import { jsonText } from "./jsonText.js";
import { standingRecords } from "./records.js";
import { listText, paragraph } from "./textTable.js";

/** With `--json`: "resinwright record check 1", a {@link RecordCheck}. */
export const run: Run = (given, around) => {
  const folder = standingRecords("record verify", given, around);
  const check = verifyRecords({ folder, expected: given.texts["expect"] ?? [] });
  const text = given.isOn("json")
    ? jsonText("resinwright record check 1", check)
    : checkText(check, around.width);
  around.print(text.trimEnd());
  return check.sound ? 0 : 1;
};

/** The check as a chemist reads it. */
export function checkText({ sound, count, newest, problems }: RecordCheck, width: number): string {
  const found = count === 1 ? "1 record is as it was written" : `${count} records are as they were written`;
  const verdict = sound ? `Sound: ${found}.` : `Not sound: ${found}, but something is wrong.`;
  return [
    paragraph(verdict, width),
    ...problems.map(({ message }) => paragraph(message, width)),
    ...(newest.length === 0
      ? []
      : [
          paragraph("The newest; note elsewhere, and name with --expect next time:", width) +
            listText(
              newest.map((id) => [id, ""]),
              width,
            ),
        ]),
  ].join("\n");
}
