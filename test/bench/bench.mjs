// Runs every benchmark of this folder, one after the other, and the time of `npm start` itself. A line that begins with
// "ok" or "FAIL" states a figure and its limit; the closing line counts them.

import { spawnSync } from "node:child_process";
import { readdirSync } from "node:fs";
import { cpus } from "node:os";
import { fileURLToPath } from "node:url";

const here = fileURLToPath(new URL(".", import.meta.url));
const others = readdirSync(here).filter((name) => name.endsWith(".mjs") && name !== "bench.mjs");
const told = [];

console.log(`${cpus().length} cores, ${cpus()[0].model}, Node ${process.version}`);
for (const name of others.sort()) {
  console.log(`\n${name}`);
  const { stdout, stderr, status } = spawnSync("node", [here + name], { encoding: "utf8" });
  process.stdout.write(stdout);
  told.push(...stdout.split("\n"));
  if (status !== 0) told.push(`FAIL ${name} ended with ${status}`, stderr);
}

const failed = told.filter((line) => line.startsWith("FAIL"));
console.log(failed.join("\n"));
console.log(
  `${told.filter((line) => line.startsWith("ok")).length} within their limits, ${failed.length} not`,
);
process.exit(failed.length === 0 ? 0 : 1);
