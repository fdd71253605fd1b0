// The built command as a user starts it; npm test builds it first.

import { spawn, spawnSync } from "node:child_process";
import { cpSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join, resolve } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { runCommand } from "../../lib/command/run.js";
import { decision } from "../lab/record/fixtures.js";
import { scratchFolder, writeNotebook } from "../notebook/scratch.js";

const program = resolve("lib/bin/resinwright.mjs");
const flowCell = resolve("data/briefs/flow-cell.json");
let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "command-"));
});
afterAll(() => rmSync(folder, { recursive: true }));

// The brief that a call names comes before that of the environment.
const environment = { ...process.env, RESINWRIGHT_RECORDS: "records", RESINWRIGHT_BRIEF: "elsewhere.json" };
const start = (words: readonly string[], { input = "", cwd = folder, file = program } = {}) => {
  const { status, stdout, stderr } = spawnSync(process.execPath, [file, ...words], {
    cwd,
    env: environment,
    input,
    encoding: "utf8",
  });
  return { code: status, out: stdout, err: stderr };
};

describe("the program itself", () => {
  it("ends with 0 and JSON on stdout", () => {
    const { code, out, err } = start(["assess", flowCell, "--draws", "40", "--json"]);
    expect([code, err]).toEqual([0, ""]);
    expect(JSON.parse(out)).toMatchObject({ format: "resinwright assessment 1", brief: "flow-cell" });
  });

  it("ends with 2, a message on stderr and nothing on stdout", () => {
    expect(start(["assess", "no.json"])).toEqual({
      code: 2,
      out: "",
      err: "no.json: cannot be read (ENOENT); check the path\n",
    });
  });

  it("reads a record from stdin, and ends with 1 where one was edited", () => {
    const record = decision("Sixty to forty.", { share: 0.6 });
    expect(start(["record", "add"], { input: JSON.stringify(record) })).toMatchObject({ code: 0, err: "" });
    const [name] = readdirSync(join(folder, "records"));
    const file = join(folder, "records", name!);
    writeFileSync(file, readFileSync(file, "utf8").replace("0.6", "0.7"));
    const { code, out, err } = start(["record", "verify"]);
    expect([code, err]).toEqual([1, ""]);
    expect(out).toContain("Not sound");
  });

  it("ends quietly, with its exit code, when whoever reads has gone", async () => {
    const child = spawn(process.execPath, [program, "record", "verify"], { cwd: folder, env: environment });
    child.stdout.destroy();
    let errors = "";
    child.stderr.on("data", (data: Buffer) => (errors += data.toString()));
    const code = await new Promise((done) => child.on("close", done));
    expect([code, errors]).toEqual([1, ""]);
  });

  it("says so where it is not built", () => {
    mkdirSync(join(folder, "bin"));
    cpSync(program, join(folder, "bin/resinwright.mjs"));
    expect(start(["--version"], { file: join(folder, "bin/resinwright.mjs") })).toEqual({
      code: 2,
      out: "",
      err: "resinwright: it is not built yet; run `npm run build` in the folder of the workbench first\n",
    });
  });
});

describe("render", () => {
  it("runs the notebooks named and writes their pages where it is told", { timeout: 60_000 }, () => {
    const cwd = scratchFolder();
    writeNotebook(["console.log(6 * 7)"], cwd, "one.ipynb");
    writeNotebook([`throw new Error("no")`], cwd, "bad.ipynb");
    const words = ["render", flowCell, "--to", "pages/new"];
    const done = start([...words, "--notebook", "one.ipynb"], { cwd });
    expect([done.code, done.err]).toEqual([0, ""]);
    expect(done.out).toMatch(/Pages:\n {2}pages\/new\/one\.html\n {2}pages\/new\/index\.html\n$/);
    expect(readFileSync(join(cwd, "pages/new/one.html"), "utf8")).toContain("42");
    const failed = start([...words, "--notebook", "one.ipynb", "--notebook", "bad.ipynb"], { cwd });
    expect(failed.code).toBe(1);
    expect(failed.err).toMatch(/^bad\.ipynb, code cell 1/);
    expect(start([...words, "--notebook", "one.ipynb", "--notebook", "./one.ipynb"], { cwd })).toEqual({
      code: 2,
      out: "",
      err: "./one.ipynb: there would be two pages one.html; rename the notebook or leave it out\n",
    });
  });
});

describe("what goes wrong outside the input", () => {
  const told = async (error: Error) => {
    const errors: string[] = [];
    const around = {
      folder,
      width: 80,
      environment: {},
      readStdin: () => Promise.reject(error),
      print: (line: string) => errors.push(`printed ${line}`),
      printError: (line: string) => errors.push(line),
    };
    expect(await runCommand(["record", "add"], around)).toBe(2);
    return errors.join("\n");
  };

  it("is told by its message where the system says it, with its place where it is a fault of the program", async () => {
    const refused = Object.assign(new Error("EIO: i/o error, read"), { code: "EIO", syscall: "read" });
    expect(await told(refused)).toBe("EIO: i/o error, read");
    expect(await told(new Error("a fault"))).toMatch(/^Error: a fault\n +at .*program\.test/);
  });
});
