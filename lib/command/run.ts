// From the words of a call to its exit code.

import { InputError, unknownName } from "../door.js";
import { libraryVersion } from "../lab/record/version.js";
import type { Act, ExitCode, Surroundings } from "./act.js";
import { acts } from "./acts.js";
import { helpOn, helpOnAll } from "./help.js";
import { readWords } from "./words.js";

/** Runs a command. Whatever goes wrong is told in one message and ends with 2. */
export async function runCommand(words: readonly string[], around: Surroundings): Promise<ExitCode> {
  try {
    return await answered(words, around);
  } catch (error) {
    around.printError(messageOf(error));
    return 2;
  }
}

async function answered(words: readonly string[], around: Surroundings): Promise<ExitCode> {
  const { print, width } = around;
  const [first] = words;
  if (first === "--version") {
    print(libraryVersion());
    return 0;
  }
  const act = acts.find(({ name }) => name === words.slice(0, name.split(" ").length).join(" "));
  if (act === undefined) {
    const within = acts.filter(({ name }) => name.startsWith(`${first} `));
    const [, last] = within.length > 0 ? words : [undefined, first];
    if (!isHelp(last)) throw unknownCommand(words, within);
    print(helpOnAll(within.length > 0 ? within : acts, width).trimEnd());
    return 0;
  }
  const rest = words.slice(act.name.split(" ").length);
  const end = rest.indexOf("--");
  if (rest.slice(0, end === -1 ? undefined : end).some(isHelp)) {
    print(helpOn(act, width).trimEnd());
    return 0;
  }
  const given = readWords(act, rest);
  const { run } = await act.load();
  return run(given, around);
}

function isHelp(word: string | undefined): boolean {
  return word === "--help" || word === "-h";
}

/** `within`: the commands that share the first word, if any do. */
function unknownCommand([first, second]: readonly string[], within: readonly Act[]): InputError {
  const [where, given, known] =
    within.length > 0
      ? [`resinwright ${first!}`, second, within.map(({ name }) => name.split(" ")[1]!)]
      : ["resinwright", first, [...new Set(acts.map(({ name }) => name.split(" ")[0]!))]];
  if (given?.startsWith("-"))
    return new InputError(
      unknownName(where, "option", given, within.length > 0 ? ["--help"] : ["--help", "--version"]),
    );
  return given === undefined
    ? new InputError(`${where}: name a command: ${known.join(", ")}; see resinwright --help`)
    : new InputError(`${unknownName(where, "command", given, known)}; see resinwright --help`);
}

function messageOf(error: unknown): string {
  if (error instanceof InputError) return error.message;
  // The system's own message names the file; anything else is a fault of this program, and its place helps whoever mends it.
  if (error instanceof Error) return "syscall" in error ? error.message : (error.stack ?? error.message);
  return String(error);
}
