// `resinwright record add`: appends a record that a file or stdin holds as JSON.

import { resolve } from "node:path";
import { appendRecord, type NewRecord } from "../lab/record.js";
import { parseJson } from "../recipe/document.js";
import { readText } from "../recipe/files.js";
import type { ExitCode, Given, Run, Surroundings } from "./act.js";
import { jsonText } from "./jsonText.js";
import { recordsFolder } from "./records.js";

/** With `--json`: "resinwright record 1", the id, the file and the record as written. */
export const run: Run = async (given, around): Promise<ExitCode> => {
  const { value } = parseJson(await textOf(given, around), given.operand ?? "stdin");
  const written = appendRecord({ folder: recordsFolder(given, around), record: value as NewRecord });
  const { id, file } = written;
  around.print(given.isOn("json") ? jsonText("resinwright record 1", written).trimEnd() : `${id}\n${file}`);
  return 0;
};

function textOf({ operand }: Given, { folder, readStdin }: Surroundings): Promise<string> | string {
  return operand === undefined ? readStdin() : readText(resolve(folder, operand), operand);
}
