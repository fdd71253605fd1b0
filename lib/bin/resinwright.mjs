#!/usr/bin/env node
// The command. It is a file of its own because npm links it at install, and what it starts is built after that.

import { existsSync } from "node:fs";

const program = new URL("../dist/command/main.js", import.meta.url);
if (existsSync(program)) {
  await import(program.href);
} else {
  console.error("resinwright: it is not built yet; run `npm run build` in the folder of the workbench first");
  process.exitCode = 2;
}
