// `npm start [-- brief.json]`: see program.ts for what it does.
// Run from the folder of the workbench.

import { start } from "./program.js";

process.exitCode = await start({
  words: process.argv.slice(2),
  folder: process.cwd(),
  print: (line) => console.log(line),
  printError: (line) => console.error(line),
});
