// The command `resinwright`, as a process: bin/resinwright.mjs starts it.

import { text } from "node:stream/consumers";
import { InputError } from "../door.js";
import { runCommand } from "./run.js";

/** Where the output is no terminal, lines are as wide as this. */
const WIDTH_IN_FILES = 100;
const NARROWEST = 40;

// Whoever reads may stop early, as `head` does; the answer and its exit code stand all the same.
for (const stream of [process.stdout, process.stderr]) {
  stream.on("error", (error: NodeJS.ErrnoException) => {
    if (error.code !== "EPIPE") throw error;
  });
}

process.exitCode = await runCommand(process.argv.slice(2), {
  folder: process.cwd(),
  // A terminal without a size says 0; narrower than a few words nothing can be set.
  width: Math.max(NARROWEST, process.stdout.columns || WIDTH_IN_FILES),
  environment: process.env,
  readStdin: () => {
    if (process.stdin.isTTY) throw new InputError("stdin is a keyboard; name a file or pipe one in");
    return text(process.stdin);
  },
  print: (line) => console.log(line),
  printError: (line) => console.error(line),
});
