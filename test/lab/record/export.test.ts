import Papa from "papaparse";
import { describe, expect, it } from "vitest";
import { appendRecord, exportRecords, listRecords } from "../../../lib/lab/record.js";
import { decision, freshFolder, oneOfEach } from "./fixtures.js";

const folder = freshFolder();

describe("exportRecords", () => {
  it("keeps everything in JSON Lines", () => {
    for (const record of oneOfEach) appendRecord({ folder: folder.path, record });
    const text = exportRecords({ folder: folder.path, format: "jsonl" });
    const back = text
      .trimEnd()
      .split("\n")
      .map((line) => JSON.parse(line) as unknown);
    expect(back).toEqual(
      listRecords(folder.path).entries.map(({ record, ...rest }) => ({ ...rest, ...record })),
    );
    expect(text.endsWith("}\n")).toBe(true);
  });

  it("gives every record a row in CSV, with every field under its name", () => {
    for (const record of oneOfEach) appendRecord({ folder: folder.path, record });
    const text = exportRecords({ folder: folder.path, format: "csv" });
    const { data, errors } = Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true });
    expect(errors).toEqual([]);
    expect(data.map(({ kind }) => kind)).toEqual(oneOfEach.map(({ kind }) => kind));
    const [recipe, batch, measurement, print, decided] = data;
    expect(JSON.parse(recipe!["parts"]!)).toEqual((oneOfEach[0] as { parts: unknown }).parts);
    expect(JSON.parse(batch!["lines"]!)).toHaveLength(2);
    expect(measurement).toMatchObject({ repeats: "301 299 300.5", "conditions.temperature_C": "25" });
    expect(print).toMatchObject({ "conditions.film": "PDMS", "figures.adhesionFailures_pct": "10" });
    expect(decided).toMatchObject({ "figures.share": "0.6", after: print!["id"] });
  });

  it("keeps commas, quotes and lines within a cell, and lets no text run as a formula", () => {
    const statement = '=1+1, "so\nit is"';
    appendRecord({ folder: folder.path, record: decision(statement, { change_K: -5 }) });
    const text = exportRecords({ folder: folder.path, format: "csv" });
    const { data } = Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true });
    expect(data).toHaveLength(1);
    expect(data[0]).toMatchObject({ statement: `'${statement}`, "figures.change_K": "-5" });
  });

  it("gives an empty text for an empty folder, and refuses another format", () => {
    expect(exportRecords({ folder: folder.path, format: "csv" })).toBe("");
    expect(exportRecords({ folder: folder.path, format: "jsonl" })).toBe("");
    expect(() => exportRecords({ folder: folder.path, format: "xml" as never })).toThrow(
      'exportRecords: format is "xml"; it must be "csv" or "jsonl"',
    );
  });
});
