import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { dataHashOf } from "../../lib/lab/dataHash.js";
import { asMade, weighOut } from "../../lib/lab/batch.js";
import { readRecords } from "../../lib/lab/record.js";
import type { TableContent } from "../../lib/notebook/content.js";
import { decide, recordBatch } from "../../lib/notebook/decision.js";
import { showMarkdown, showSummary, showTable } from "../../lib/notebook/show.js";
import { balance, brief, formulationOf, shelf, weighedBatch } from "../fixtures.js";

vi.mock("../../lib/notebook/show.js", () => ({
  showMarkdown: vi.fn(),
  showSummary: vi.fn(),
  showTable: vi.fn(),
}));

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "decisions-"));
  vi.stubEnv("RESINWRIGHT_RECORDS", folder);
});
afterEach(() => {
  vi.unstubAllEnvs();
  vi.clearAllMocks();
  rmSync(folder, { recursive: true });
});

const work = { formulation: formulationOf({ THIN: 60, THICK: 40 }), brief, shelf };
const { version } = JSON.parse(readFileSync("lib/package.json", "utf8")) as { version: string };
const statement = "Mix four parts of THICK with six of THIN.";
const figures = { share: 0.4, viscosity_mPas: 412.3456, film: "OPEN" };
const decideIt = (change = {}) => decide({ work, from: "02", statement, figures, ...change });

describe("decide", () => {
  it("appends one record: what was decided, by whom, about what, with its figures whole", () => {
    decideIt();
    const names = readdirSync(folder);
    expect(names).toHaveLength(1);
    const record = JSON.parse(readFileSync(join(folder, names[0]!), "utf8")) as {
      at: string;
      figures: object;
    };
    expect(record).toMatchObject({
      kind: "decision",
      from: "02",
      brief: "test",
      formulation: "test",
      statement,
      dataHash: dataHashOf(work),
    });
    expect(record.figures).toEqual(figures);
    expect(new Date(record.at).toISOString()).toBe(record.at);
  });

  it("shows the statement, then what was appended and to which file", () => {
    decideIt();
    const [record] = readRecords(folder);
    expect(vi.mocked(showMarkdown).mock.calls).toEqual([[`**Decided.** ${statement}`]]);
    expect(vi.mocked(showSummary).mock.calls).toEqual([[{ work, decided: statement }]]);
    expect(vi.mocked(showTable).mock.calls).toHaveLength(1);
    const [[table]] = vi.mocked(showTable).mock.calls as [[TableContent]];
    expect(table.caption).toBe("What was appended to the lab record");
    expect(table.rows).toEqual([
      ["share", "0.4"],
      ["viscosity_mPas", "412.3"],
      ["film", "OPEN"],
      ["computed by", `resinwright ${version}`],
      ["from the data", `${dataHashOf(work).slice(0, 12)}…`],
      ["written at", record!.at],
      ["in the file", expect.stringMatching(/^\d{4}-.*-[0-9a-f]{12}….json$/)],
    ]);
  });

  it("writes nothing where no notebook shows it", () => {
    vi.mocked(showMarkdown).mockImplementationOnce(() => {
      throw new Error("no notebook is running here");
    });
    expect(() => decideIt()).toThrow("no notebook is running here");
    expect(readdirSync(folder)).toEqual([]);
  });

  it("adds a record each time and leaves the earlier one alone", () => {
    decideIt();
    const [first] = readdirSync(folder);
    const before = readFileSync(join(folder, first!), "utf8");
    decideIt({ statement: "Mix half and half." });
    expect(readFileSync(join(folder, first!), "utf8")).toBe(before);
    expect(readRecords(folder)).toHaveLength(2);
  });

  it.each([
    [{ statement: " " }, "record: statement is empty; say what was decided or found"],
    [{ figures: { share: NaN } }, "record: figures.share is NaN; a record holds finite numbers or text"],
  ])("refuses %j, writes nothing and shows nothing", (change, message) => {
    expect(() => decideIt(change)).toThrow(message);
    expect(readdirSync(folder)).toEqual([]);
    expect(showMarkdown).not.toHaveBeenCalled();
    expect(showTable).not.toHaveBeenCalled();
  });

  it("keeps records beside the notebooks' folder unless told where", () => {
    vi.stubEnv("RESINWRIGHT_RECORDS", undefined);
    const started = process.cwd();
    mkdirSync(join(folder, "notebooks"));
    process.chdir(join(folder, "notebooks"));
    try {
      decideIt();
    } finally {
      process.chdir(started);
    }
    expect(readRecords(join(folder, "records"))).toHaveLength(1);
  });
});

describe("recordBatch", () => {
  const sheet = weighOut({ formulation: work.formulation, batch_g: 1000, balance });
  const weighings = [
    { line: 1, mass_g: 599.5, lot: "T-22" },
    { line: 2, mass_g: 400.25 },
  ];
  const made = asMade({ sheet, weighings });
  const plan = { outcome: "within", total_g: made.total_g } as const;
  const recordIt = (said = "Weighed as batch T-1.") =>
    recordBatch({ work, from: "06", batch: { weighed: weighedBatch, sheet, made, plan }, statement: said });

  it("appends the batch portion by portion with its lots, and shows that it did", () => {
    recordIt();
    const [record, ...others] = readRecords(folder);
    expect(others).toEqual([]);
    expect(record).toMatchObject({
      kind: "batch",
      from: "06",
      brief: "test",
      formulation: "test",
      batch: "T-1",
      statement: "Weighed as batch T-1.",
      lines: [
        { ingredient: "THIN", lot: "T-22", target_g: 600, actual_g: 599.5 },
        { ingredient: "THICK", lot: "", target_g: 400, actual_g: 400.25 },
      ],
    });
    expect(vi.mocked(showMarkdown).mock.calls).toEqual([["Weighed as batch T-1."]]);
    const [[table]] = vi.mocked(showTable).mock.calls as [[TableContent]];
    expect(table.rows.slice(0, 3)).toEqual([
      ["batch", "T-1"],
      ["portions", "2"],
      ["total_g", "999.8"],
    ]);
  });

  it("appends a batch once, however often its notebook runs, and again where a weighing was corrected", () => {
    recordIt();
    vi.mocked(showMarkdown).mockClear();
    recordIt();
    expect(readRecords(folder)).toHaveLength(1);
    expect(vi.mocked(showMarkdown).mock.calls).toEqual([
      ["Weighed as batch T-1. It stands in the lab record already."],
    ]);
    const corrected = asMade({ sheet, weighings: [{ line: 1, mass_g: 600, lot: "T-22" }, weighings[1]!] });
    recordBatch({
      work,
      from: "06",
      batch: { weighed: weighedBatch, sheet, made: corrected, plan },
      statement: "Read again.",
    });
    expect(readRecords(folder)).toHaveLength(2);
  });

  it("writes nothing that says nothing", () => {
    expect(() => recordIt(" ")).toThrow("record: statement is empty; say what was decided or found");
    expect(readdirSync(folder)).toEqual([]);
  });
});
