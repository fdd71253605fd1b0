// How long 10,000 records take to list, to check, to export, and to add one to. Run after a build: node test/bench/record.mjs

import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { appendRecord, exportRecords, listRecords, verifyRecords } from "../../lib/dist/lab/record.js";
import { fileOf } from "../../lib/dist/lab/record/folder.js";

const count = 10000;
const folder = mkdtempSync(join(tmpdir(), "records-"));
try {
  fill();
  const listed = timed("list", 1000, () => listRecords(folder).entries.length);
  const sound = timed("check", 1000, () => verifyRecords({ folder }).sound);
  timed("export as CSV", 5000, () => exportRecords({ folder, format: "csv" }).length);
  const record = {
    kind: "decision",
    from: "bench",
    brief: "b",
    formulation: "f",
    statement: "one more",
    figures: {},
  };
  timed("append the first", 2000, () => appendRecord({ folder, record }));
  timed("append the next", 200, () => appendRecord({ folder, record }));
  if (listed !== count || !sound) throw new Error(`listed ${listed} of ${count}, sound: ${sound}`);
} finally {
  rmSync(folder, { recursive: true });
}

/** Writes the records without flushing each: only reading is measured on them. */
function fill() {
  let after = [];
  for (let i = 0; i < count; i++) {
    const at = new Date(Date.UTC(2026, 0, 1) + 60000 * i).toISOString();
    const { file, id, text } = fileOf({
      at,
      nonce: String(i).padStart(16, "0"),
      after,
      kind: "measurement",
      from: "bench",
      formulation: "f",
      quantity: "viscosity_mPas",
      repeats: [300 + (i % 7), 301, 302],
      instrument: "cone and plate",
      conditions: { temperature_C: 25 },
      statement: `Reading ${i}.`,
    });
    writeFileSync(join(folder, file), text);
    after = [id];
  }
}

function timed(what, limit_ms, run) {
  const start = performance.now();
  const result = run();
  const taken_ms = performance.now() - start;
  const outcome = taken_ms > limit_ms ? "FAIL" : "ok  ";
  console.log(`${outcome} ${what}, ${count} records: ${taken_ms.toFixed(0)} ms (limit ${limit_ms} ms)`);
  return result;
}
