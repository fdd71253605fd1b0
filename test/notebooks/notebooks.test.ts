import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join, relative, resolve } from "node:path";
import ts from "typescript";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { runNotebook, runNotebooks } from "../../lib/notebook/run.js";
import { readRecords } from "../../lib/lab/record.js";

const files = readdirSync("notebooks").filter((name) => name.endsWith(".ipynb"));
const cellsOf = (file: string) =>
  (
    JSON.parse(readFileSync(join("notebooks", file), "utf8")) as {
      cells: { cell_type: string; source: string[]; outputs?: unknown[] }[];
    }
  ).cells;

let folder: string;
beforeAll(() => {
  mkdirSync(".vitest", { recursive: true });
  folder = mkdtempSync(resolve(".vitest/notebooks-"));
});
afterAll(() => rmSync(folder, { recursive: true }));

describe("the notebooks", () => {
  it.each(files)("%s is stored without outputs and begins with its title", (file) => {
    const cells = cellsOf(file);
    expect(file).toMatch(/^\d\d-[a-z-]+\.ipynb$/);
    expect(cells[0]!.source[0]).toMatch(/^# /);
    for (const cell of cells) expect(cell.outputs ?? []).toEqual([]);
  });

  // The kernel's own compiler is older and not strict, so the cells of each notebook are checked again as one file.
  it("pass the strict compiler", () => {
    const programs = files.map((file) => {
      const code = cellsOf(file)
        .filter(({ cell_type }) => cell_type === "code")
        .map(({ source }) => source.join(""))
        .join("\n\n");
      const program = join(folder, file.replace(".ipynb", ".ts"));
      writeFileSync(program, `${code}\nexport {};\n`);
      return program;
    });
    const unchecked = { ...ts.sys, onUnRecoverableConfigFileDiagnostic: () => undefined };
    const { options } = ts.getParsedCommandLineOfConfigFile(
      "tsconfig.json",
      { verbatimModuleSyntax: false },
      unchecked,
    )!;
    const complaints = ts.getPreEmitDiagnostics(ts.createProgram(programs, { ...options, noEmit: true }));
    expect(
      complaints.map(
        ({ messageText, file }) => `${file?.fileName}: ${ts.flattenDiagnosticMessageText(messageText, "\n")}`,
      ),
    ).toEqual([]);
  });

  it.each(["flow-cell", "screen-housing"])(
    "run from end to end under the brief %s, each with its decision on record",
    async (brief) => {
      const records = join(folder, `records-${brief}`);
      const runs = await runNotebooks({
        files: files.map((file) => join("notebooks", file)),
        environment: {
          RESINWRIGHT_BRIEF: resolve(`data/briefs/${brief}.json`),
          RESINWRIGHT_RECORDS: records,
        },
      });
      expect(runs.map((run) => (run.outcome === "failed" ? run.failure.message : "passed"))).toEqual(
        files.map(() => "passed"),
      );
      const decisions = readRecords(records).filter(({ kind }) => kind === "decision");
      expect(decisions.map(({ from }) => from).sort()).toEqual(
        files.map((file) => file.replace(".ipynb", "")),
      );
      for (const decision of decisions) expect(decision.brief).toBe(brief);
      const batches = readRecords(records).filter(({ kind }) => kind === "batch");
      expect(batches.map(({ from, brief }) => [from, brief])).toEqual([["06-weigh-it-out", brief]]);
    },
    600_000,
  );

  it("06 says what to do for a formulation that nobody has weighed yet", async () => {
    const records = join(folder, "records-unweighed");
    const place = join(folder, "unweighed");
    mkdirSync(place);
    const parts = [
      { ingredient: "BisEMA", mass_pct: 60 },
      { ingredient: "HDDA", mass_pct: 38.9 },
      { ingredient: "BAPO", mass_pct: 1 },
      { ingredient: "BBOT", mass_pct: 0.1 },
    ];
    const formulation = { id: "unweighed", title: "a formulation for a test", parts };
    const demo = JSON.parse(readFileSync("data/briefs/flow-cell.json", "utf8")) as object;
    const brief = { ...demo, formulation: "formulation.json", shelf: [relative(place, "data")] };
    writeFileSync(join(place, "formulation.json"), JSON.stringify(formulation));
    writeFileSync(join(place, "brief.json"), JSON.stringify(brief));
    const run = await runNotebook({
      file: "notebooks/06-weigh-it-out.ipynb",
      environment: { RESINWRIGHT_BRIEF: join(place, "brief.json"), RESINWRIGHT_RECORDS: records },
    });
    if (run.outcome === "failed") throw new Error(run.failure.message);
    const said = JSON.stringify(run.notebook.cells);
    expect(said).toContain("No weighed batch of **unweighed** on the shelf yet. Print the sheet, weigh,");
    expect(said).toContain("Nothing has been weighed, so there is nothing to put right.");
    expect(readRecords(records).map(({ kind, statement }) => [kind, statement])).toEqual([
      [
        "decision",
        "Weigh out 500 g of a formulation for a test by this sheet: 4 portions, 1 of them master batches to be made first.",
      ],
    ]);
  }, 120_000);
});
