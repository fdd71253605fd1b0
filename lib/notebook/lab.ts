// `npm run lab [-- brief.json] [-- options of Jupyter]`: see jupyter/open.ts for what it does.
// Run from the folder of the workbench.

import { openNotebooks } from "./jupyter/open.js";

process.exitCode = await openNotebooks({
  words: process.argv.slice(2),
  folder: process.cwd(),
  environment: process.env,
  print: (line) => console.log(line),
  printError: (line) => console.error(line),
});
