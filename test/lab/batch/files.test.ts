import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join, resolve } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { openBatch } from "../../../lib/lab/batch/files.js";
import { readWorkbench } from "../../../lib/recipe/files.js";

const demo = readWorkbench("data/briefs/flow-cell.json");
const shipped = JSON.parse(readFileSync("data/measurements/batches/flow-cell-a-1.json", "utf8")) as object;

let shelf: string;
beforeEach(() => {
  shelf = mkdtempSync(join(tmpdir(), "shelf-"));
  mkdirSync(join(shelf, "measurements", "batches"), { recursive: true });
});
afterEach(() => rmSync(shelf, { recursive: true }));

const put = (name: string, change: object) =>
  writeFileSync(join(shelf, "measurements", "batches", name), JSON.stringify({ ...shipped, ...change }));
/** The demo brief with the folder of this test as its shelf; `resolve` keeps the path absolute under any brief. */
const open = (...before: string[]) =>
  openBatch({
    ...demo,
    file: "/brief.json",
    brief: { ...demo.brief, shelf: [...before.map((one) => resolve(one)), shelf] },
    draws: 50,
  });

describe("openBatch", () => {
  it("is undefined where the shelf has no batch of the formulation", () => {
    expect(open()).toBeUndefined();
    put("other.json", { id: "B-1", formulation: "other" });
    mkdirSync(join(shelf, "formulations"));
    writeFileSync(join(shelf, "formulations", "o.json"), JSON.stringify({ id: "other" }));
    expect(open()).toBeUndefined();
  });

  it("refuses a batch of a formulation that is nowhere, with the nearest", () => {
    put("a.json", { id: "B-1", formulation: "flow-cel-a" });
    expect(() => open()).toThrow(
      /a\.json, line 1: formulation: unknown formulation "flow-cel-a"; did you mean "flow-cell-a"\? \(the formulation's file belongs into formulations\/ of a shelf folder\)$/,
    );
  });

  it("refuses a table among the batches, which it would not read", () => {
    writeFileSync(join(shelf, "measurements", "batches", "sheet.csv"), "portion,mass");
    expect(() => open()).toThrow(/batches\/sheet\.csv: only \.json files are read here/);
  });

  it("names the file of a portion that the sheet does not have", () => {
    put("a.json", { id: "B-1", weighings: [{ portion: "IBOAX", mass_g: 141 }] });
    expect(() => open()).toThrow(/a\.json: batch "B-1": unknown portion "IBOAX"; did you mean "IBOA"\?/);
  });

  it("takes the last by file name, of the last folder that has one", () => {
    expect(open("data")?.weighed.id).toBe("flow-cell-a-1");
    put("b.json", { id: "B-2" });
    put("a.json", { id: "B-1" });
    expect(open("data")?.weighed.id).toBe("B-2");
  });

  it("weighs by the sheet the file names, and says what was made and what puts it right", () => {
    put("a.json", { id: "B-1", accuracy: 0.2 });
    const { sheet, made, plan } = open()!;
    expect([sheet.batch_g, sheet.accuracy, sheet.portions.length]).toEqual([500, 0.2, 6]);
    // IBOA 147.771, master batch 2.503, TEGDMA 76.415, BBOT 0.749, BAPO 6.012, UDMA 274.61.
    expect(made.total_g).toBeCloseTo(508.06, 9);
    expect(made.lines[2]).toEqual({
      ingredient: "TEGDMA",
      lot: "TEGDMA-0119",
      target_g: 68,
      actual_g: 76.415,
    });
    expect(made.changes).toHaveLength(8);
    expect(plan).toEqual({ outcome: "within", total_g: made.total_g });
  });

  it("needs every portion of the sheet", () => {
    put("a.json", { id: "B-1", weighings: [{ portion: "IBOA", mass_g: 141 }] });
    expect(() => open()).toThrow(
      'batch of "flow-cell-a": line 2 (master batch of MEHQ in IBOA) has no weighing; give its mass_g, 0 if it was left out',
    );
  });

  it("refuses two bottles of one name, and a file that cannot be used", () => {
    put("a.json", {});
    expect(() => open("data")).toThrow(
      /a\.json: batch "flow-cell-a-1" stands in .*flow-cell-a-1\.json too; a bottle has one name, rename one of them$/,
    );
    put("a.json", { batch_g: "0.5 L" });
    expect(() => open()).toThrow(/a\.json, line 1: batch_g is "0.5 L"; it must be a quantity/);
  });
});
