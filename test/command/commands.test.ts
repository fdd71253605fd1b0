// What every command answers, prints and refuses.

import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import { acts } from "../../lib/command/acts.js";
import { runCommand } from "../../lib/command/run.js";
import { calibrate } from "../../lib/decide/calibrate.js";
import { dataHashOf } from "../../lib/lab/dataHash.js";
import { listRecords } from "../../lib/lab/record.js";
import { readWorkbench } from "../../lib/recipe/files.js";
import { decision } from "../lab/record/fixtures.js";

const { version } = JSON.parse(readFileSync("lib/package.json", "utf8")) as { version: string };
const started = process.cwd();
let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "command-"));
  cpSync("data", join(folder, "data"), { recursive: true });
  // Messages name files from the folder one stands in.
  process.chdir(folder);
});
afterAll(() => {
  process.chdir(started);
  rmSync(folder, { recursive: true });
});
beforeEach(() => rmSync(join(folder, "records"), { recursive: true, force: true }));

interface Answer {
  code: number;
  out: string;
  err: string;
}
interface Setting {
  input?: string;
  env?: Record<string, string>;
}

/** A command in this process, as program.test.ts starts it in one of its own. */
const run = async (words: readonly string[], { input = "", env = {} }: Setting = {}): Promise<Answer> => {
  const [out, err]: [string[], string[]] = [[], []];
  const code = await runCommand(words, {
    folder,
    width: 100,
    environment: env,
    readStdin: () => Promise.resolve(input),
    print: (line) => out.push(`${line}\n`),
    printError: (line) => err.push(`${line}\n`),
  });
  return { code, out: out.join(""), err: err.join("") };
};
const document = async (words: readonly string[], code = 0) => {
  const answer = await run([...words, "--json"]);
  expect([answer.err, answer.code]).toEqual(["", code]);
  return JSON.parse(answer.out) as Record<string, unknown>;
};
/** The demo brief, changed, beside the demo briefs. */
const briefWith = (name: string, change: object) => {
  const brief = JSON.parse(readFileSync("data/briefs/flow-cell.json", "utf8")) as object;
  writeFileSync(join(folder, "data/briefs", name), JSON.stringify({ ...brief, ...change }));
  return `data/briefs/${name}`;
};

const flowCell = "data/briefs/flow-cell.json";
const balance = ["--readability", "1 mg", "--repeatability", "0.8 mg", "--capacity", "0.6 kg"];
const sheetOf = ["batch", "data/formulations/flow-cell-a.json", "--size", "0.5 kg", ...balance];

describe("help and version", () => {
  it("names every command, the exit codes and how quantities are written", async () => {
    const { code, out, err } = await run(["--help"]);
    expect([code, err]).toEqual([0, ""]);
    for (const { name, summary } of acts) {
      expect(out).toContain(`  ${name} `);
      expect(out.replace(/\s+/g, " ")).toContain(summary);
    }
    for (const [number, meaning] of ["done", "the answer is no", "no answer"].entries())
      expect(out).toContain(`  ${number}  ${meaning}`);
    expect(out).toContain('"500 g", "0.8 mg", "95 °F"');
  });

  it.each(acts.map((act) => [act.name, act] as const))("of %s names its options", async (name, act) => {
    const { code, out, err } = await run([...name.split(" "), "--help"]);
    expect([code, err]).toEqual([0, ""]);
    expect(out).toMatch(new RegExp(`^Usage: resinwright ${name} `));
    for (const option of Object.keys(act.options)) expect(out).toContain(`  --${option}`);
    expect(out).toContain(`For example:\n  ${act.example}\n`);
    const lines = out.split("\n").filter((line) => line !== `  ${act.example}`);
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(100);
  });

  it("of a group names its commands", async () => {
    const { code, out } = await run(["record", "-h"]);
    expect(code).toBe(0);
    expect(out).toContain("  record verify  ");
    expect(out).not.toContain("  assess ");
  });

  it("--version is that of the package", async () => {
    expect(await run(["--version"])).toEqual({ code: 0, out: `${version}\n`, err: "" });
  });
});

describe("bad use", () => {
  it.each<[string[], string]>([
    [[], "resinwright: name a command: assess, batch, record, render; see resinwright --help"],
    [["asess"], 'resinwright: unknown command "asess"; did you mean "assess"?; see resinwright --help'],
    [["--vresion"], 'resinwright: unknown option "--vresion"; did you mean "--version"?'],
    [["record"], "resinwright record: name a command: list, verify, export, add; see resinwright --help"],
    [
      ["record", "lst"],
      'resinwright record: unknown command "lst"; did you mean "list"?; see resinwright --help',
    ],
    [["assess", flowCell, "--drws", "9"], 'assess: unknown option "--drws"; did you mean "--draws"?'],
    [["assess"], "assess: BRIEF is missing; name one; see resinwright assess --help"],
    [["assess", "no.json"], "no.json: cannot be read (ENOENT); check the path"],
    [["assess", flowCell, "--formulation", "no.json"], "no.json: cannot be read (ENOENT); check the path"],
    [
      ["assess", flowCell, "--temperature", "30"],
      'assess: --temperature is "30" without a unit; write for instance "30 °C"',
    ],
    [
      ["assess", flowCell, "--temperature", "300 °C"],
      "assess: --temperature is 300; it must be a number from 0 to 120",
    ],
    [
      ["assess", flowCell, "--draws", "3.5"],
      'assess: --draws is "3.5"; it must be a whole number; 2000 is usual',
    ],
    [
      ["assess", flowCell, "--draws", "3"],
      "assess: draws is 3; it must be a number from 20 to 1000000; 2000 is usual",
    ],
    [
      [...sheetOf, "--accuracy", "80 %"],
      'weigh-out of "flow-cell-a": accuracy is 0.8; it must be a number above 0 and at most 0.5',
    ],
    [[...sheetOf, "--shelf", "dta"], 'dta: this shelf folder does not exist; correct "shelf" in the brief'],
    [
      ["record", "list"],
      "record list: the folder records does not exist; name that of the record with --records",
    ],
    [
      ["record", "verify", "--records", "recrods"],
      "record verify: the folder recrods does not exist; name that of the record with --records",
    ],
    [["record", "add", "no.json"], "no.json: cannot be read (ENOENT); check the path"],
    [["render", "no.json"], "no.json: cannot be read (ENOENT); check the path"],
    [
      ["render", flowCell, "--notebook", "none.ipynb"],
      "none.ipynb: is no notebook that can be read; name an .ipynb file",
    ],
  ])("%j ends with 2, one message on stderr, nothing on stdout", async (words, message) => {
    expect(await run(words)).toEqual({ code: 2, out: "", err: `${message}\n` });
  });
});

describe("assess", () => {
  it("prints one document: the assessment of the calibrated case, with version and hash of the data", async () => {
    const work = calibrate(readWorkbench(flowCell));
    const printed = await document(["assess", flowCell, "--draws", "100"]);
    expect(printed).toEqual({
      format: "resinwright assessment 1",
      libraryVersion: version,
      dataHash: dataHashOf(work),
      temperature_C: 28,
      calibratedBy: ["udma-iboa-25C", "flow-cell-a-412", "flow-cell-window"],
      ...assess({ ...work, draws: 100 }),
    });
    // The shape that scripts rely on; a change of it is a new version of the format.
    expect(Object.keys(printed)).toEqual(
      "format libraryVersion dataHash temperature_C calibratedBy brief formulation properties verdicts avoided warnings sources draws seed level".split(
        " ",
      ),
    );
  });

  it("takes another temperature, in any unit, and another formulation", async () => {
    const warm = await document(["assess", flowCell, "--draws", "100", "--temperature", "95 °F"]);
    expect(warm["temperature_C"]).toBe(35);
    const viscosity = (one: Record<string, unknown>) =>
      (one["properties"] as { viscosity_mPas: { value: number } }).viscosity_mPas.value;
    const usual = await document(["assess", flowCell, "--draws", "100"]);
    expect(viscosity(warm)).toBeLessThan(viscosity(usual));
    expect(warm["dataHash"]).not.toBe(usual["dataHash"]);
    const other = "data/formulations/screen-housing-a.json";
    const answer = await run(["assess", flowCell, "--draws", "100", "--formulation", other, "--json"]);
    expect(JSON.parse(answer.out)).toMatchObject({ formulation: "screen-housing-a" });
  });

  it("prints text, and ends with 0 where nothing fails, even where something cannot be told", async () => {
    const targets = { viscosity_mPas: { max: 320 } };
    const { code, out, err } = await run(["assess", briefWith("open.json", { targets }), "--draws", "100"]);
    expect([code, err]).toEqual([0, ""]);
    expect(out).toMatch(/^Assessment of flow-cell-a under /);
    expect(out).toContain("cannot tell (");
    expect(out).toContain("corrected by the readings udma-iboa-25C, flow-cell-a-412, flow-cell-window.");
  });

  it.each([
    ["a target fails", { targets: { viscosity_mPas: { max: 20 } }, avoid: [] }, "fails (0 % of draws)"],
    [
      "something avoided is in it",
      { targets: {}, avoid: [{ ingredient: "TEGDMA", reason: "for a test" }] },
      "The brief avoids what is in it",
    ],
  ])("ends with 1 where %s", async (_, change, said) => {
    const { code, out, err } = await run(["assess", briefWith("strict.json", change), "--draws", "100"]);
    expect([code, err]).toEqual([1, ""]);
    expect(out).toContain(said);
  });
});

describe("batch", () => {
  it("prints the sheet as text or as one document", async () => {
    expect(await run(sheetOf)).toMatchObject({ code: 0, err: "" });
    expect((await run(sheetOf)).out).toMatch(/^ +6 {2}UDMA +275\.000 +273\.632 +276\.368 +500\.000 /m);
    const printed = await document([...sheetOf, "--accuracy", "2 %"]);
    expect(Object.keys(printed)).toEqual(
      "format libraryVersion dataHash formulation balance batch_g accuracy tolerance minimumWeight_g portions masterBatches warnings".split(
        " ",
      ),
    );
    const { formulation } = readWorkbench(flowCell);
    expect(printed).toMatchObject({
      format: "resinwright weigh-out 1",
      dataHash: dataHashOf({ formulation }),
      balance: { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 },
      batch_g: 500,
      accuracy: 0.02,
      minimumWeight_g: 1.6,
    });
    const [first] = printed["portions"] as object[];
    expect(first).toMatchObject({
      line: 1,
      label: "IBOA",
      target_g: 147.75,
      contents: [{ ingredient: "IBOA" }],
    });
    expect(printed["masterBatches"]).toMatchObject([{ solute: "MEHQ", carrier: "IBOA" }]);
  });

  it("reads further shelves, a later one first", async () => {
    const lot = {
      id: "I-9",
      ingredient: "IBOA",
      measured: {
        viscosity_mPas: { value: 8, u: 0.1, temperature_C: 25, source: "a test", status: "measured here" },
      },
    };
    const recipe = {
      id: "lotted",
      title: "with a lot",
      parts: [{ ingredient: "IBOA", lot: "I-9", mass_pct: 100 }],
    };
    cpSync("data/constants", join(folder, "bench/constants"), { recursive: true });
    cpSync("data/films", join(folder, "bench/lots"), {
      recursive: true,
      filter: (from) => !from.endsWith(".json"),
    });
    writeFileSync(join(folder, "bench/lots/i-9.json"), JSON.stringify(lot));
    writeFileSync(join(folder, "bench/lotted.json"), JSON.stringify(recipe));
    const words = ["batch", "bench/lotted.json", "--size", "500 g", ...balance];
    expect((await run(words)).err).toMatch(
      /^bench\/lotted\.json, line 1: parts\[0\]\.lot: unknown lot "I-9"; none is known here\nThe shelf is data alone; name the folder of your own as well: --shelf data --shelf lab\n$/,
    );
    expect((await run([...words, "--shelf", "data"])).err).not.toContain("--shelf");
    expect((await run([...words, "--shelf", "data", "--shelf", "bench"])).out).toContain("IBOA (lot I-9)");
  });
});

describe("record", () => {
  const record = decision("Sixty to forty, written for a test.", { share: 0.6 });
  const add = async (statement = record.statement) => {
    const { out } = await run(["record", "add"], { input: JSON.stringify({ ...record, statement }) });
    return out.split("\n")[0]!;
  };

  it("is added to from stdin or a file, and says id and file", async () => {
    const { code, out, err } = await run(["record", "add"], { input: JSON.stringify(record) });
    expect([code, err]).toEqual([0, ""]);
    const [entry] = listRecords(join(folder, "records")).entries;
    expect(out).toBe(`${entry!.id}\n${entry!.file}\n`);
    expect(entry!.record).toMatchObject({ ...record, libraryVersion: version });
    writeFileSync(join(folder, "new.json"), JSON.stringify({ ...record, statement: "Two." }));
    const second = await document(["record", "add", "new.json"]);
    expect(second).toMatchObject({ format: "resinwright record 1", record: { after: [entry!.id] } });
  });

  it.each([
    ["{ kind: 1 }", "stdin, line 1, column 3: this is not valid JSON: "],
    ["[]", "record: this is a list; it must be one record, an object with its kind"],
    [JSON.stringify({ ...record, figure: {} }), 'record: unknown field "figure"; did you mean "figures"?'],
    [
      JSON.stringify({ ...record, statement: "" }),
      "record: statement is empty; say what was decided or found",
    ],
  ])("refuses %s and writes nothing", async (input, message) => {
    const { code, out, err } = await run(["record", "add"], { input });
    expect([code, out]).toEqual([2, ""]);
    expect(err).toContain(message);
    expect(readdirSync(folder)).not.toContain("records");
  });

  it("is listed, whole or by kind", async () => {
    await add();
    expect(await run(["record", "list"])).toMatchObject({ code: 0, err: "" });
    expect((await run(["record", "list"])).out).toMatch(
      / decision +f +Sixty to forty, written for a test\. +02 /,
    );
    expect((await run(["record", "list", "--kind", "batch"])).out).toBe("The lab record: 0 records.\n");
    expect(await document(["record", "list"])).toMatchObject({
      format: "resinwright records 1",
      entries: [{ record }],
      problems: [],
    });
    expect(await run(["record", "list", "--kind", "dcision"])).toEqual({
      code: 2,
      out: "",
      err: 'record list: unknown kind "dcision"; did you mean "decision"?\n',
    });
  });

  it("is verified: 0 where it is sound, 1 where a record was edited or an expected one is gone", async () => {
    const id = await add();
    expect(await run(["record", "verify", "--expect", id])).toMatchObject({ code: 0, err: "" });
    expect(await document(["record", "verify"])).toEqual({
      format: "resinwright record check 1",
      sound: true,
      count: 1,
      newest: [id],
      problems: [],
    });
    const gone = await run(["record", "verify", "--expect", "0".repeat(64)]);
    expect([gone.code, gone.err]).toEqual([1, ""]);
    expect(gone.out).toContain("Not sound");
    const [name] = readdirSync(join(folder, "records"));
    const file = join(folder, "records", name!);
    writeFileSync(file, readFileSync(file, "utf8").replace("0.6", "0.7"));
    expect(await document(["record", "verify"], 1)).toMatchObject({
      sound: false,
      problems: [{ code: "edited" }],
    });
  });

  it("is exported as JSON Lines or CSV, and names on stderr what it left out", async () => {
    await add("One.");
    await add("Two.");
    const lines = (await run(["record", "export"])).out.trim().split("\n");
    expect(lines.map((line) => (JSON.parse(line) as { statement: string }).statement)).toEqual([
      "One.",
      "Two.",
    ]);
    const csv = (await run(["record", "export", "--format", "csv"])).out.split(/\r?\n/);
    expect(csv).toHaveLength(4);
    expect(csv[0]).toMatch(/^id,file,amendedBy,/);
    const [name] = readdirSync(join(folder, "records"));
    writeFileSync(join(folder, "records", name!), "{}");
    const { code, out, err } = await run(["record", "export"]);
    expect([code, out.trim().split("\n").length]).toEqual([0, 1]);
    expect(err).toContain(`${name!}: is not what was written`);
    expect(await run(["record", "export", "--format", "xml"])).toMatchObject({ code: 2, out: "" });
  });

  it("is kept where the option says, or else the environment", async () => {
    const input = JSON.stringify(record);
    const env = { RESINWRIGHT_RECORDS: "by-environment" };
    await run(["record", "add"], { input, env });
    await run(["record", "add", "--records", "by-option"], { input, env });
    for (const place of ["by-environment", "by-option"])
      expect(listRecords(join(folder, place)).entries).toHaveLength(1);
    expect(readdirSync(folder)).not.toContain("records");
  });
});
