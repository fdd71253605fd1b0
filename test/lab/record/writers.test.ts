// Many writers at once, and writers killed in the middle of a write: real processes on one folder.

import { spawn } from "node:child_process";
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join, resolve } from "node:path";
import ts from "typescript";
import { afterAll, beforeAll, expect, it } from "vitest";
import { listRecords, verifyRecords } from "../../../lib/lab/record.js";
import { seededUniform } from "../../../lib/numerics/sampling.js";

const program = resolve(".vitest", `record-writers-${process.pid}`);
const writer = join(program, "writer.mjs");
// In memory where there is such a place: the page cache outlives a killed process, so flushing to a disc would add only time.
const places = existsSync("/dev/shm") ? "/dev/shm" : tmpdir();
let folder: string;

beforeAll(() => {
  folder = mkdtempSync(join(places, "records-"));
  for (const file of [
    "lib/door.ts",
    ...readdirSync("lib/lab/record").map((name) => `lib/lab/record/${name}`),
  ])
    compile(file);
  writeFileSync(
    writer,
    `import { writeSync } from "node:fs";
     import { appendRecord } from "./lib/lab/record/append.js";
     const [folder, name, count] = process.argv.slice(2);
     for (let i = 0; i < Number(count); i++) {
       const record = { kind: "decision", from: name, brief: "b", formulation: "f", statement: name + " " + i, figures: { i } };
       writeSync(1, appendRecord({ folder, record }).id + "\\n");
     }`,
  );
});

afterAll(() => {
  rmSync(program, { recursive: true, force: true });
  rmSync(folder, { recursive: true, force: true });
});

it("eight writers of 500 records each lose nothing", { timeout: 120_000 }, async () => {
  const place = join(folder, "eight");
  const runs = await Promise.all(Array.from({ length: 8 }, (_, k) => run(place, `w${k}`, 500)));
  const ids = runs.flatMap((one) => one.acknowledged);
  expect(runs.map(({ errors }) => errors).join("")).toBe("");
  expect(new Set(ids).size).toBe(4000);
  const check = verifyRecords({ folder: place, expected: ids });
  expect(check).toMatchObject({ sound: true, count: 4000, problems: [] });
  const { entries } = listRecords(place);
  for (let k = 0; k < 8; k++) {
    const own = entries.filter(({ record }) => record.from === `w${k}`);
    expect(own.map(({ record }) => record.statement)).toEqual(
      Array.from({ length: 500 }, (_, i) => `w${k} ${i}`),
    );
  }
});

it(
  "200 writers killed at random moments lose nothing they were told is written",
  { timeout: 120_000 },
  async () => {
    const uniform = seededUniform({ seed: 20 });
    let acknowledgedInAll = 0;
    for (let round = 0; round < 10; round++) {
      const place = join(folder, `killed-${round}`);
      const runs: Run[] = [];
      for (let k = 0; k < 20; k += 4) {
        const four = [k, k + 1, k + 2, k + 3].map((name) => run(place, `k${name}`, 1e6, 25 * uniform()));
        runs.push(...(await Promise.all(four)));
      }
      expect(runs.map(({ signal }) => signal)).toEqual(Array.from({ length: 20 }, () => "SIGKILL"));
      const expected = runs.flatMap(({ acknowledged }) => acknowledged);
      const { sound, count, problems } = verifyRecords({ folder: place, expected });
      expect(sound).toBe(true);
      // A writer killed between the write and its answer leaves one record more than it told of.
      expect(count).toBeGreaterThanOrEqual(expected.length);
      expect(count).toBeLessThanOrEqual(expected.length + 20);
      expect(problems.filter(({ code }) => code !== "unfinished-write")).toEqual([]);
      acknowledgedInAll += expected.length;
    }
    expect(acknowledgedInAll).toBeGreaterThan(200);
  },
);

interface Run {
  acknowledged: string[];
  errors: string;
  signal: NodeJS.Signals | null;
}

/** Runs a writer to its end, or kills it some time after its first record. */
function run(place: string, name: string, count: number, killAfter_ms?: number): Promise<Run> {
  return new Promise((done) => {
    const child = spawn(process.execPath, [writer, place, name, String(count)]);
    let [out, errors] = ["", ""];
    child.stdout.on("data", (data) => {
      if (out === "" && killAfter_ms !== undefined) setTimeout(() => child.kill("SIGKILL"), killAfter_ms);
      out += String(data);
    });
    child.stderr.on("data", (data) => (errors += String(data)));
    child.on("close", (_, signal) => {
      // A line cut by the kill was not read by anyone as an id.
      const acknowledged = out.split("\n").filter((line) => line.length === 64);
      done({ acknowledged, errors, signal });
    });
  });
}

function compile(file: string): void {
  const { outputText } = ts.transpileModule(readFileSync(file, "utf8"), {
    compilerOptions: {
      module: ts.ModuleKind.ESNext,
      target: ts.ScriptTarget.ES2022,
      verbatimModuleSyntax: true,
    },
  });
  const target = join(program, file.replace(/\.ts$/, ".js"));
  mkdirSync(dirname(target), { recursive: true });
  writeFileSync(target, outputText);
}
