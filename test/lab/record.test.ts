import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { appendRecord, readRecords } from "../../lib/lab/record.js";

let folder: string;
beforeEach(() => (folder = mkdtempSync(join(tmpdir(), "records-"))));
afterEach(() => rmSync(folder, { recursive: true }));

const decision = (statement: string, figures = {}) => ({
  kind: "decision" as const,
  from: "02",
  brief: "b",
  formulation: "f",
  statement,
  figures,
});

describe("appendRecord", () => {
  it("adds one file a record and leaves what stands alone", () => {
    const first = appendRecord({ folder, record: decision("one", { share: 0.6 }) });
    const before = readFileSync(join(folder, first.file), "utf8");
    appendRecord({ folder, record: decision("two") });
    expect(readFileSync(join(folder, first.file), "utf8")).toBe(before);
    expect(readRecords(folder).map(({ statement }) => statement)).toEqual(["one", "two"]);
    expect(readdirSync(folder).filter((name) => !name.endsWith(".json"))).toEqual([]);
  });

  it("does not overwrite a record with the same name, and says so", () => {
    vi.useFakeTimers({ now: new Date("2026-01-01T00:00:00Z") });
    appendRecord({ folder, record: decision("same") });
    expect(() => appendRecord({ folder, record: decision("same") })).toThrow("EEXIST");
    vi.useRealTimers();
    expect(readRecords(folder)).toHaveLength(1);
    expect(readdirSync(folder)).toHaveLength(1);
  });

  it("refuses an empty statement and a figure that is not finite, and writes nothing", () => {
    expect(() => appendRecord({ folder, record: decision(" ") })).toThrow(
      "record: statement is empty; say what was decided",
    );
    expect(() => appendRecord({ folder, record: decision("x", { eta: NaN }) })).toThrow(
      "record: figures.eta is NaN; a record holds finite numbers or text",
    );
    expect(readdirSync(folder)).toEqual([]);
  });
});

describe("readRecords", () => {
  it("finds none in a folder that does not exist", () => {
    expect(readRecords(join(folder, "none"))).toEqual([]);
  });

  it.each(["{", "{}", "[]"])("names a file that is no record: %s", (text) => {
    writeFileSync(join(folder, "stray.json"), text);
    expect(() => readRecords(folder)).toThrow(
      "stray.json: this is not a lab record; move it out of the records folder",
    );
  });
});
