// Reading JSON that a person may have edited: what does not parse is refused with the line it stands on.
// Used for notebooks and briefs, before anything is started.

import { InputError } from "../door.js";

/**
 * The value that `text` holds; `where` names the file in the message.
 * @throws InputError naming the file, the line and what was found there.
 */
export function parseJson({ text, where }: { text: string; where: string }): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch (error) {
    const reason = (error as Error).message;
    throw new InputError(
      `${where}: line ${lineOf(text, reason)} is not JSON (${reason.replace(/\s+/g, " ")}); correct that line`,
    );
  }
}

// The engine names a position for some errors only; for the others it is the first line with which the text fails.
function lineOf(text: string, reason: string): number {
  const position = / at position (\d+)/.exec(reason)?.[1];
  if (position !== undefined) return text.slice(0, Number(position)).split("\n").length;
  const lines = text.split("\n");
  const at = lines.findIndex((_, i) => failsBeforeItsEnd(lines.slice(0, i + 1).join("\n")));
  return at === -1 ? lines.length : at + 1;
}

function failsBeforeItsEnd(text: string): boolean {
  try {
    JSON.parse(text);
    return false;
  } catch (error) {
    const reason = (error as Error).message;
    return (
      !/end of JSON input|Unterminated string/.test(reason) && !reason.endsWith(` at position ${text.length}`)
    );
  }
}
