import type { Telling } from "../../lib/notebook/call.js";

/** The exit code of a program, and all it printed. */
export async function told(program: (telling: Telling) => Promise<number>) {
  const [printed, errors]: [string[], string[]] = [[], []];
  const code = await program({
    print: (line) => printed.push(line),
    printError: (line) => errors.push(line),
  });
  return { code, printed: printed.join("\n"), errors: errors.join("\n") };
}
