// `npm run lab [-- brief.json] [-- options of Jupyter]`: see jupyter/open.ts for what it does.
// Run from the folder of the workbench.

import { thisCall } from "./call.js";
import { openNotebooks } from "./jupyter/open.js";

process.exitCode = await openNotebooks(thisCall());
