// The rules of the screening from their folder on disc.

import { readFileSync } from "node:fs";
import { join } from "node:path";
import { InputError } from "../../door.js";
import { parseJson, type JsonDocument } from "../../recipe/document.js";
import {
  readHandlingNotes,
  readMixtureRules,
  readPolymerisationHeats,
  readRegulatoryNotes,
  type SafetyRules,
} from "./rules.js";

/**
 * Reads the rules of the hazard screening from a folder of `mixture-limits.json`, `regulatory-notes.json`, `handling.json` and
 * `polymerisation-heat.json`.
 * @param folder - Such as `data/rules`.
 * @throws InputError naming file, line and field of whatever cannot be used.
 * @example
 * ```ts
 * import { readSafetyRules } from "resinwright/files";
 * readSafetyRules("data/rules").limits[0].statement; // → "H317"
 * ```
 */
export function readSafetyRules(folder: string): SafetyRules {
  const document = (name: string) => readJson(join(folder, name));
  return {
    limits: readMixtureRules(document("mixture-limits.json")),
    regulatory: readRegulatoryNotes(document("regulatory-notes.json")),
    handling: readHandlingNotes(document("handling.json")),
    heats: readPolymerisationHeats(document("polymerisation-heat.json")),
  };
}

function readJson(file: string): JsonDocument {
  let text: string;
  try {
    text = readFileSync(file, "utf8");
  } catch (error) {
    const { code = "unknown reason" } = error as NodeJS.ErrnoException;
    throw new InputError(`${file}: cannot be read (${code}); check the path of the rules folder`);
  }
  return parseJson(text, file);
}
