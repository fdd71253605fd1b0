import { readdirSync, readFileSync, unlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterEach, describe, expect, it, vi } from "vitest";
import { appendRecord, listRecords, readRecords, type NewRecord } from "../../../lib/lab/record.js";
import { decision, freshFolder, oneOfEach } from "./fixtures.js";

const folder = freshFolder();
const append = (record: NewRecord) => appendRecord({ folder: folder.path, record });
afterEach(() => vi.useRealTimers());

describe("appendRecord", () => {
  it("adds one file a record, leaves what stands alone, and leaves nothing else behind", () => {
    const first = append(decision("one", { share: 0.6 }));
    const before = readFileSync(join(folder.path, first.file), "utf8");
    append(decision("two"));
    expect(readFileSync(join(folder.path, first.file), "utf8")).toBe(before);
    expect(readRecords(folder.path).map(({ statement }) => statement)).toEqual(["one", "two"]);
    expect(readdirSync(folder.path).filter((name) => !name.endsWith(".json"))).toEqual([]);
  });

  it("gives back what it wrote, of every kind", () => {
    const written = oneOfEach.map((record) => append(record).record);
    expect(readRecords(folder.path)).toEqual(written);
    expect(written.map(({ kind }) => kind)).toEqual(["recipe", "batch", "measurement", "print", "decision"]);
  });

  it("names the version of the library, and keeps the hash of the data where one is given", () => {
    const { version } = JSON.parse(readFileSync("lib/package.json", "utf8")) as { version: string };
    const dataHash = "0123456789abcdef".repeat(4);
    for (const record of [decision("one"), oneOfEach[1]!])
      expect(append({ ...record, dataHash } as NewRecord).record).toMatchObject({
        libraryVersion: version,
        dataHash,
      });
    expect(append(decision("no data")).record).not.toHaveProperty("dataHash");
  });

  it("names the file by time and hash, and is written on the newest records", () => {
    vi.useFakeTimers({ now: new Date("2026-01-02T03:04:05.006Z") });
    const first = append(decision("one"));
    expect(first.record.after).toEqual([]);
    expect(first.file).toBe(`2026-01-02T03-04-05-006Z-${first.id}.json`);
    const second = append(decision("two"));
    expect(second.record.after).toEqual([first.id]);
    expect(append(decision("three")).record.after).toEqual([second.id]);
  });

  it("is written on what is there, also when a record was taken away or came from elsewhere", () => {
    const first = append(decision("one"));
    const second = append(decision("two"));
    const path = join(folder.path, second.file);
    const text = readFileSync(path, "utf8");
    unlinkSync(path);
    const third = append(decision("three"));
    expect(third.record.after).toEqual([first.id]);
    writeFileSync(path, text);
    expect(append(decision("four")).record.after).toEqual([second.id, third.id].sort());
  });

  it("keeps two records that say the same at the same time", () => {
    vi.useFakeTimers({ now: new Date("2026-01-01T00:00:00Z") });
    append(decision("same"));
    append(decision("same"));
    expect(readRecords(folder.path)).toHaveLength(2);
  });

  it("makes the folder", () => {
    const deep = join(folder.path, "a", "b");
    appendRecord({ folder: deep, record: decision("one") });
    expect(readRecords(deep)).toHaveLength(1);
  });

  it("amends without touching what it amends", () => {
    const { id, file } = append(oneOfEach[1]!);
    const before = readFileSync(join(folder.path, file), "utf8");
    const amendment = append({
      kind: "amendment",
      from: "bench 2",
      statement: "Misread the display.",
      amends: id,
      corrections: { "lines[0].actual_g": 60.2 },
    });
    expect(readFileSync(join(folder.path, file), "utf8")).toBe(before);
    expect(listRecords(folder.path).entries.map(({ amendedBy }) => amendedBy)).toEqual([[amendment.id], []]);
  });

  it("refuses to amend what is not there", () => {
    const amends = "0".repeat(64);
    const record = { kind: "amendment", from: "x", statement: "y", amends, corrections: { a: 1 } } as const;
    expect(() => append(record)).toThrow(
      `record: amends is "${amends}", which is no record of this folder; take the id from listRecords`,
    );
    expect(readdirSync(folder.path)).toEqual([]);
  });

  const [recipe, batch, measurement, print, plain] = oneOfEach;
  it.each<[string, object, string]>([
    ["an empty statement", { ...plain, statement: " " }, "record: statement is empty; say what was decided"],
    ["no author", { ...plain, from: "" }, 'record: from is ""; it must be text that is not empty'],
    [
      "no brief",
      { ...plain, brief: undefined },
      "record: brief is missing; it must be text that is not empty",
    ],
    [
      "a figure that is not finite",
      decision("x", { eta: NaN }),
      "record: figures.eta is NaN; a record holds finite numbers or text",
    ],
    [
      "a list for a figure",
      decision("x", { eta: [1] }),
      "record: figures.eta is a list; a record holds finite numbers or text",
    ],
    ["no figures", { ...plain, figures: 3 }, "record: figures is 3; it must hold named numbers or text"],
    [
      "a kind unknown",
      { ...plain, kind: "note" },
      'record: kind is "note"; it must be one of recipe, batch, measurement, print, decision, amendment',
    ],
    [
      "a key unknown",
      { ...measurement, repeat: [1] },
      'record: unknown field "repeat"; did you mean "repeats"?',
    ],
    [
      "a kind that every object has",
      { ...plain, kind: "toString" },
      'record: kind is "toString"; it must be',
    ],
    ["no record", [plain], "record: this is a list; it must be one record, an object with its kind"],
    ["a version of its own", { ...plain, libraryVersion: "9" }, 'record: unknown field "libraryVersion"'],
    [
      "a hash that is none",
      { ...plain, dataHash: "abc" },
      'record: dataHash is "abc"; it must be 64 hex digits, as dataHashOf gives them',
    ],
    ["a time of its own", { ...plain, at: "2020-01-01" }, 'record: unknown field "at"'],
    [
      "a quantity without unit",
      { ...measurement, quantity: "viscosity" },
      'record: quantity is "viscosity"; it must be a name that ends in its unit, such as viscosity_mPas',
    ],
    [
      "a measurement without readings",
      { ...measurement, repeats: [] },
      "record: repeats is an empty list; it must be a list of at least one",
    ],
    [
      "a reading that is not finite",
      { ...measurement, repeats: [1, Infinity] },
      "record: repeats[1] is Infinity; it must be a finite number",
    ],
    [
      "a reading that nature does not allow",
      { ...measurement, repeats: [301, -316] },
      "record: repeats[1] (viscosity_mPas) is -316; it must be a finite number above 0; a record is never changed, so check sign and unit before it is written",
    ],
    [
      "a density in kg/m³",
      { ...measurement, quantity: "density_gcm3", repeats: [1012] },
      "record: repeats[0] (density_gcm3) is 1012; it must be a number above 0 and at most 25",
    ],
    [
      "a condition below absolute zero",
      { ...measurement, conditions: { plateTemperature_C: -300, gap: "0.5 mm" } },
      "record: conditions.plateTemperature_C (plateTemperature_C) is -300; it must be a finite number of at least -273.15",
    ],
    [
      "a negative mass",
      { ...batch, lines: [{ ingredient: "A", lot: "", target_g: 1, actual_g: -1 }] },
      "record: lines[0].actual_g is -1; it must be a finite number of at least 0",
    ],
    [
      "a line without lot",
      { ...batch, lines: [{ ingredient: "A", target_g: 1, actual_g: 1 }] },
      'record: lines[0].lot is missing; it must be text, "" where there is none',
    ],
    [
      "a line that is no line",
      { ...batch, lines: [5] },
      "record: lines[0] is 5; it must hold ingredient, lot, target_g, actual_g",
    ],
    [
      "a key unknown in a line",
      { ...batch, lines: [{ ingredient: "A", lot: "", target_g: 1, actual_g: 1, actual: 1 }] },
      'record: lines[0]: unknown field "actual"; did you mean "actual_g"?',
    ],
    [
      "parts that are not whole",
      { ...recipe, parts: [{ ingredient: "A", massFraction: 0.9 }] },
      "record: massFraction of the parts adds up to 0.9; it must add up to 1 ± 1e-6",
    ],
    [
      "an outcome unknown",
      { ...print, outcome: "good" },
      'record: outcome is "good"; it must be one of "printed", "printed with faults", "failed"',
    ],
    [
      "an amendment of no id",
      { kind: "amendment", from: "x", statement: "y", amends: "first", corrections: { a: 1 } },
      'record: amends is "first"; it must be the id of a record, 64 hex digits',
    ],
    [
      "an amendment of nothing",
      { kind: "amendment", from: "x", statement: "y", amends: "0".repeat(64), corrections: {} },
      "record: corrections is empty; name what is corrected and give the right value",
    ],
  ])("refuses %s, and writes nothing", (_, record, message) => {
    expect(() => append(record as NewRecord)).toThrow(message);
    expect(readdirSync(folder.path)).toEqual([]);
  });
});
