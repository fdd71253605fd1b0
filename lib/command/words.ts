// Reading the words of a call: options strictly, with the nearest known name.

import { parseArgs } from "node:util";
import { InputError, show, unknownName } from "../door.js";
import type { Act, Given } from "./act.js";

/**
 * Reads the words after the name of a command.
 * @throws InputError for an option that is unknown, given twice, lacks its value or is needed and not there; for too many or too
 * few words.
 */
export function readWords(act: Act, words: readonly string[]): Given {
  const { values, positionals, tokens } = parsed(act, words);
  const given = tokens.flatMap((token) => (token.kind === "option" ? [token.name] : []));
  const twice = given.find((name, i) => given.indexOf(name) < i && !act.options[name]?.many);
  if (twice !== undefined) throw refusal(act, `--${twice} is given twice; give it once`);
  for (const [name, { needed, value }] of Object.entries(act.options)) {
    if (needed && values[name] === undefined)
      throw refusal(act, `--${name} is missing; give --${name} ${value!}`);
  }
  const [operand, ...others] = positionals;
  if (act.operand?.needed && operand === undefined)
    throw refusal(act, `${act.operand.name} is missing; name one`);
  const surplus = act.operand === undefined ? operand : others[0];
  if (surplus !== undefined)
    throw refusal(act, `${show(surplus)} is one word too many; quote what belongs together`);
  const entries = Object.entries(values);
  return {
    ...(operand === undefined ? {} : { operand }),
    text: Object.fromEntries(entries.filter(([, value]) => typeof value === "string")) as Given["text"],
    texts: Object.fromEntries(entries.filter(([, value]) => Array.isArray(value))) as Given["texts"],
    isOn: (option) => values[option] === true,
  };
}

function parsed(act: Act, words: readonly string[]) {
  const options = Object.fromEntries(
    Object.entries(act.options).map(([name, { value, many = false }]) => [
      name,
      { type: value === undefined ? ("boolean" as const) : ("string" as const), multiple: many },
    ]),
  );
  try {
    return parseArgs({ args: [...words], options, allowPositionals: true, strict: true, tokens: true });
  } catch (error) {
    const { code, message } = error as NodeJS.ErrnoException;
    if (!code?.startsWith("ERR_PARSE_ARGS")) throw error;
    const [, name] = /'(-[^' =]*)/.exec(message) ?? [];
    if (code !== "ERR_PARSE_ARGS_UNKNOWN_OPTION") {
      const value = act.options[name?.replace(/^--/, "") ?? ""]?.value;
      throw refusal(
        act,
        value === undefined
          ? `${name} takes no value`
          : `${name} needs a value: ${name} ${value}, or ${name}=${value} where it begins with a hyphen`,
      );
    }
    const known = Object.keys(act.options).map((option) => `--${option}`);
    throw new InputError(unknownName(act.name, "option", name ?? "", [...known, "--help"]));
  }
}

function refusal({ name }: Act, message: string): InputError {
  return new InputError(`${name}: ${message}; see resinwright ${name} --help`);
}
