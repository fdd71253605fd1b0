// `npm start [-- brief.json]`: see program.ts for what it does.
// Run from the folder of the workbench.

import { thisCall } from "./call.js";
import { start } from "./program.js";

process.exitCode = await start(thisCall());
