// `npm run pdf [-- --paper Letter]`: see pdf/print.ts for what it does.
// Run from the folder of the workbench.

import { printPages } from "./pdf/print.js";

process.exitCode = await printPages({
  words: process.argv.slice(2),
  folder: process.cwd(),
  environment: process.env,
  print: (line) => console.log(line),
  printError: (line) => console.error(line),
});
