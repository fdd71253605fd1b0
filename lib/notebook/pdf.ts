// `npm run pdf [-- --paper Letter]`: see pdf/print.ts for what it does.
// Run from the folder of the workbench.

import { thisCall } from "./call.js";
import { printPages } from "./pdf/print.js";

process.exitCode = await printPages(thisCall());
