// How long the workbench takes: all notebooks from the built library, and one whole assessment.

import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { assess } from "resinwright";
import { openBrief } from "resinwright/files";

function state(name, value, limit, unit) {
  console.log(
    `${value <= limit ? "ok  " : "FAIL"} ${name}: ${value.toPrecision(3)} ${unit} (at most ${limit} ${unit})`,
  );
}

const records = mkdtempSync(join(tmpdir(), "resinwright-bench-"));
const before = performance.now();
const { status, stderr } = spawnSync("node", ["lib/dist/notebook/start.js"], {
  encoding: "utf8",
  env: { ...process.env, RESINWRIGHT_RECORDS: records },
});
if (status !== 0) console.log(`FAIL the notebooks did not run: ${stderr}`);
state("all notebooks of the demo brief, two at a time", (performance.now() - before) / 1000, 90, "s");
rmSync(records, { recursive: true });

const work = openBrief("data/briefs/flow-cell.json");
assess(work);
const start = performance.now();
assess(work);
state("an assessment of eight properties from 2000 draws", performance.now() - start, 2000, "ms");
