// `resinwright record export`: the lab record for other programs.

import { InputError, unknownName } from "../door.js";
import { exportRecords, listRecords } from "../lab/record.js";
import type { Run } from "./act.js";
import { standingRecords } from "./records.js";

export const run: Run = (given, around) => {
  const folder = standingRecords("record export", given, around);
  const format = given.text["format"] ?? "jsonl";
  if (format !== "csv" && format !== "jsonl")
    throw new InputError(unknownName("record export", "format", format, ["csv", "jsonl"]));
  around.print(exportRecords({ folder, format }).replace(/\r?\n$/, ""));
  for (const { message } of listRecords(folder).problems) around.printError(message);
  return 0;
};
