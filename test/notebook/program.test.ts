import { spawn } from "node:child_process";
import {
  cpSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { describe, expect, it, onTestFinished, vi } from "vitest";
import { embed } from "../../lib/notebook/content.js";
import { start } from "../../lib/notebook/program.js";
import { figure, sheet } from "./contents.js";
import { scratchFolder, writeNotebook } from "./scratch.js";
import { told } from "./told.js";

const twoNotebooks = {
  "02-light.ipynb": [
    `md: # Light\n\nHow deep.`,
    `import * as tslab from "tslab";\ntslab.display.html(${JSON.stringify(embed(figure))})`,
  ],
  "01-flow.ipynb": [
    `md: # Flow\n\nHow fast.`,
    `import { readFileSync } from "fs";\nconsole.log(readFileSync(process.env.RESINWRIGHT_BRIEF!, "utf8"))`,
    `console.log(process.env.RESINWRIGHT_BRIEF, process.env.RESINWRIGHT_RECORDS, process.cwd())`,
  ],
};

const demo = JSON.parse(readFileSync("data/briefs/flow-cell.json", "utf8")) as object;
const briefCalled = (title: string) => JSON.stringify({ ...demo, title });

const workbench = (notebooks: Record<string, string[]>, brief = briefCalled("Thin walls")) => {
  const folder = scratchFolder();
  mkdirSync(path.join(folder, "notebooks"));
  cpSync("data", path.join(folder, "data"), { recursive: true });
  writeFileSync(path.join(folder, "data", "briefs", "flow-cell.json"), brief);
  for (const [name, cells] of Object.entries(notebooks))
    writeNotebook(cells, path.join(folder, "notebooks"), name);
  return folder;
};

const run = (folder: string, ...words: string[]) => told((telling) => start({ words, folder, ...telling }));

const rendered = (folder: string, name: string) => readFileSync(path.join(folder, "rendered", name), "utf8");

describe("start", () => {
  it("leaves a page a notebook and an index, and says where", async () => {
    const folder = workbench(twoNotebooks);
    const { code, printed, errors } = await run(folder);
    expect(errors).toBe("");
    expect(code).toBe(0);
    expect(printed).toMatch(/^01-flow {2}cell 2 of 2 {2}\d+\.\d s$/m);
    expect(printed).toMatch(/^02-light {2}done {2}\d+\.\d s$/m);
    expect(printed).toMatch(
      /Pages:\n {2}rendered\/01-flow\.html\n {2}rendered\/02-light\.html\n {2}rendered\/index\.html$/,
    );
    expect(readdirSync(path.join(folder, "rendered")).sort()).toEqual([
      "01-flow.html",
      "02-light.html",
      "index.html",
    ]);
    const [flow, light, index] = ["01-flow.html", "02-light.html", "index.html"].map((name) =>
      rendered(folder, name),
    );
    expect(flow).toContain("&quot;title&quot;:&quot;Thin walls&quot;");
    expect(index).toContain("<h1>Thin walls</h1>");
    expect(flow).toContain(">flow-cell.json records notebooks</pre>");
    expect(light).toContain("<strong>Figure 1.</strong> A line");
    expect(index).toMatch(
      /href="01-flow\.html">Flow<\/a><p>How fast\.<\/p><\/li>\n<li><a href="02-light\.html">Light</,
    );
    const version = (JSON.parse(readFileSync("lib/package.json", "utf8")) as { version: string }).version;
    for (const page of [flow, light, index]) {
      expect(page).toMatch(
        new RegExp(
          `Brief flow-cell\\.json · run \\d{4}-\\d\\d-\\d\\d · resinwright ${version} · Node ${process.versions.node}<`,
        ),
      );
      expect(page).not.toContain(path.resolve("."));
    }
  });

  it("writes the sheets that a notebook shows beside its page", async () => {
    const show = `import * as tslab from "tslab";\ntslab.display.html(${JSON.stringify(embed(sheet))})`;
    const folder = workbench({ "01-a.ipynb": [show] });
    const { code, printed } = await run(folder);
    expect(code).toBe(0);
    expect(printed).toMatch(
      /rendered\/01-a\.html\n {2}rendered\/weigh-out-a4\.html\n {2}rendered\/weigh-out-letter\.html\n {2}rendered\/index\.html$/,
    );
    for (const name of ["weigh-out-a4.html", "weigh-out-letter.html"])
      expect(rendered(folder, name)).toContain("Brief flow-cell.json · run");
    expect(rendered(folder, "index.html")).toContain('href="weigh-out-letter.html"');
  });

  it("refuses two sheets of one name, and writes no page", async () => {
    const show = `import * as tslab from "tslab";\ntslab.display.html(${JSON.stringify(embed(sheet))})`;
    const folder = workbench({ "01-a.ipynb": [show], "02-b.ipynb": [show] });
    const { code, errors } = await run(folder);
    expect([code, errors]).toEqual([
      1,
      'two sheets are named "weigh-out"; give one of them another name in showSheet',
    ]);
    expect(existsSync(path.join(folder, "rendered"))).toBe(false);
  });

  it("takes the brief it is given", async () => {
    const folder = workbench({ "01-flow.ipynb": twoNotebooks["01-flow.ipynb"] });
    writeFileSync(path.join(folder, "data/briefs/other.json"), briefCalled("Clear lens"));
    expect((await run(folder, "data/briefs/other.json")).code).toBe(0);
    expect(rendered(folder, "01-flow.html")).toContain("Clear lens");
    expect(rendered(folder, "01-flow.html")).toContain("<p>Brief other.json");
  });

  it.each([
    ["a brief that is not there", ["no.json"], "{}", /no\.json: cannot be read \(ENOENT\); check the path$/],
    [
      "a brief that is not JSON",
      [],
      "{\n  name: 1\n}",
      /data\/briefs\/flow-cell\.json, line 2, column 3: this is not valid JSON: /,
    ],
    [
      "a brief with a wrong field",
      [],
      JSON.stringify({ ...demo, layerThickness_um: -5 }, null, 1),
      /flow-cell\.json, line \d+: layerThickness_um is -5; it must be at least 1$/,
    ],
    [
      "a brief whose formulation is not there",
      [],
      JSON.stringify({ ...demo, formulation: "../formulations/none.json" }),
      /data\/formulations\/none\.json: cannot be read \(ENOENT\); check the path$/,
    ],
    [
      "two briefs",
      ["a.json", "b.json"],
      "{}",
      /^npm start: 2 arguments given; it must be one brief; name one file after --$/,
    ],
  ])("refuses %s in one line, before anything runs", async (_, words, brief, message) => {
    const { code, printed, errors } = await run(workbench(twoNotebooks, brief), ...words);
    expect([code, printed]).toEqual([2, ""]);
    expect(errors).toMatch(message);
    expect(errors).not.toContain("\n");
  });

  it("refuses a batch and readings that the last notebook would stumble over, before the first has recorded anything", async () => {
    const folder = workbench(twoNotebooks);
    const file = path.join(folder, "data/measurements/batches/flow-cell-a-1.json");
    writeFileSync(file, readFileSync(file, "utf8").replace('"TEGDMA"', '"TEGDMAX"'));
    const { code, printed, errors } = await run(folder);
    expect([code, printed]).toEqual([2, ""]);
    expect(errors).toMatch(
      /flow-cell-a-1\.json: batch "flow-cell-a-1": unknown portion "TEGDMAX"; did you mean "TEGDMA"\?/,
    );
    expect(errors).not.toContain("\n");
  });

  it("refuses a folder without notebooks", async () => {
    const message = "notebooks: no .ipynb file in this folder; start in the folder of the workbench";
    expect(await run(workbench({}))).toEqual({ code: 2, printed: "", errors: message });
  });

  it("keeps the old pages, and writes none, if one notebook fails", async () => {
    const folder = workbench({ "01-a.ipynb": ["1"], "02-b.ipynb": [`throw new Error("no")`] });
    mkdirSync(path.join(folder, "rendered"));
    writeFileSync(path.join(folder, "rendered", "01-a.html"), "old");
    const { code, errors } = await run(folder);
    expect(code).toBe(1);
    expect(errors).toMatch(
      /^notebooks\/02-b\.ipynb, code cell 1 \(throw new Error\("no"\)\): the cell ended with an error\n/,
    );
    expect(readdirSync(path.join(folder, "rendered"))).toEqual(["01-a.html"]);
    expect(rendered(folder, "01-a.html")).toBe("old");
  });

  it("writes no page if one cannot be rendered", async () => {
    const folder = workbench({ "01-a.ipynb": ["1"], "02-b.ipynb": ["md: $\\frac$", "1"] });
    const { code, errors } = await run(folder);
    expect(code).toBe(1);
    expect(errors).toMatch(/^notebooks\/02-b\.ipynb, cell 1: formula "\\frac" cannot be set/);
    expect(existsSync(path.join(folder, "rendered"))).toBe(false);
  });

  it("replaces no page if one cannot be written", async () => {
    const folder = workbench({ "01-a.ipynb": ["1"] });
    mkdirSync(path.join(folder, "rendered", "index.html"), { recursive: true });
    const { code, errors } = await run(folder);
    expect(code).toBe(1);
    expect(errors).toMatch(/EISDIR|ENOTEMPTY|EEXIST|EPERM/);
    expect(readdirSync(path.join(folder, "rendered")).filter((name) => name.endsWith(".part"))).toEqual([]);
  });
});

// The built program, as npm start runs it; npm test builds it first.
describe("the program itself", () => {
  const startProgram = (folder: string, environment: Record<string, string> = {}) => {
    const program = path.resolve("lib/dist/notebook/start.js");
    const child = spawn(process.execPath, [program], {
      cwd: folder,
      env: { ...process.env, ...environment },
    });
    let printed = "";
    let errors = "";
    child.stdout.on("data", (data: Buffer) => (printed += data.toString()));
    child.stderr.on("data", (data: Buffer) => (errors += data.toString()));
    const ended = new Promise<{
      code: number | null;
      signal: string | null;
      printed: string;
      errors: string;
    }>((resolve) => child.on("close", (code, signal) => resolve({ code, signal, printed, errors })));
    return { child, ended };
  };

  it("ends with the exit code", async () => {
    const good = await startProgram(workbench({ "01-a.ipynb": ["1"] })).ended;
    expect(good).toMatchObject({ code: 0, errors: "" });
    expect(good.printed).toContain("rendered/01-a.html");
    const bad = await startProgram(workbench({ "01-a.ipynb": ["console.assert(false)"] })).ended;
    expect(bad.code).toBe(1);
    expect(bad.errors).toContain("Assertion failed");
    expect(await startProgram(workbench({})).ended).toMatchObject({ code: 2, printed: "" });
  });

  it("takes its kernels and their folders with it when it is interrupted", async () => {
    const folder = workbench({
      "01-a.ipynb": [
        `import { writeFileSync } from "fs";\nwriteFileSync("pid", String(process.pid)); for (;;) {}`,
      ],
    });
    const temporary = mkdtempSync(path.join(tmpdir(), "start-"));
    onTestFinished(() => rmSync(temporary, { recursive: true }));
    const { child, ended } = startProgram(folder, { TMPDIR: temporary });
    const pidFile = path.join(folder, "notebooks", "pid");
    const pid = await vi.waitUntil(
      () => existsSync(pidFile) && Number(readFileSync(pidFile, "utf8")),
      patience,
    );
    expect(readdirSync(temporary)).toHaveLength(1);
    child.kill("SIGINT");
    expect(await ended).toMatchObject({ code: null, signal: "SIGINT" });
    expect(readdirSync(temporary)).toEqual([]);
    await vi.waitUntil(() => hasEnded(pid), patience);
    expect(readdirSync(folder)).not.toContain("rendered");
  });
});

const patience = { timeout: 30_000, interval: 50 };

function hasEnded(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return false;
  } catch {
    return true;
  }
}
