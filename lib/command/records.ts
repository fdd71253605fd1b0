// What the commands of the lab record share: the folder it is in.

import { existsSync } from "node:fs";
import { relative, resolve } from "node:path";
import { InputError } from "../door.js";
import type { Given, Surroundings } from "./act.js";

/** The folder of the record: as the call names it, or the environment, or `records`. */
export function recordsFolder({ text }: Given, { folder, environment }: Surroundings): string {
  return resolve(folder, text["records"] ?? (environment["RESINWRIGHT_RECORDS"] || "records"));
}

/**
 * As {@link recordsFolder}, for what is to be read: a misspelt folder is not a sound record of nothing.
 * @throws InputError when it does not exist.
 */
export function standingRecords(act: string, given: Given, around: Surroundings): string {
  const folder = recordsFolder(given, around);
  if (existsSync(folder)) return folder;
  const shown = relative(around.folder, folder);
  throw new InputError(`${act}: the folder ${shown} does not exist; name that of the record with --records`);
}
