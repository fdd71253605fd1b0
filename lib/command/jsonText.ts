// One JSON document an answer, with every digit, and with the name and version of its shape in `format`.

import { InputError } from "../door.js";

/**
 * A document as JSON; `format` names its shape and the version of that: a field may join it, none changes or goes without a new
 * version.
 * @throws InputError naming a number that is not finite, for which JSON has no word.
 */
export function jsonText(format: string, document: object): string {
  const withFormat = { format, ...document };
  return `${JSON.stringify(
    withFormat,
    (key, value: unknown) => {
      if (typeof value === "number" && !Number.isFinite(value))
        throw new InputError(`${format}: ${key} is ${value}; it must be a finite number`);
      return value;
    },
    2,
  )}\n`;
}
