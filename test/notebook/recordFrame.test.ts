import { describe, expect, it } from "vitest";
import { appendRecord, listRecords, type LabRecord, type NewRecord } from "../../lib/lab/record.js";
import { recordFrame } from "../../lib/notebook/recordFrame.js";
import { decision, freshFolder, oneOfEach } from "../lab/record/fixtures.js";

const folder = freshFolder();
const append = (record: NewRecord) => appendRecord({ folder: folder.path, record });
const rowsOf = (kind: LabRecord["kind"]) => {
  const { columns, values } = recordFrame(listRecords(folder.path).entries, kind);
  return (values as unknown[][]).map((cells) =>
    Object.fromEntries(columns.map((name, i) => [name, cells[i]])),
  );
};

describe("recordFrame", () => {
  it("has one row a record of the kind, in the order given, and one column a figure", () => {
    const first = append(decision("one", { share: 0.6, film: "PDMS" }));
    append(oneOfEach[0]!);
    append(decision("two", { share: 0.5, viscosity_mPas: 220 }));
    const [one, two] = rowsOf("decision");
    expect(one).toEqual({
      id: first.id.slice(0, 12),
      amendedBy: "",
      at: first.record.at,
      from: "02",
      statement: "one",
      brief: "b",
      libraryVersion: first.record.libraryVersion,
      formulation: "f",
      share: 0.6,
      film: "PDMS",
      viscosity_mPas: NaN,
    });
    expect(two).toMatchObject({ statement: "two", share: 0.5, film: null, viscosity_mPas: 220 });
    expect(rowsOf("decision")).toHaveLength(2);
  });

  it("has the hash of the data where a record holds one", () => {
    const dataHash = "0123456789abcdef".repeat(4);
    append({ ...decision("one"), dataHash });
    expect(rowsOf("decision")[0]).toMatchObject({ dataHash });
  });

  it("has the figures of every kind", () => {
    for (const record of oneOfEach) append(record);
    const [recipe] = rowsOf("recipe");
    expect(recipe).toMatchObject({ formulation: "f", THIN_pct: 60, THICK_pct: 40 });
    expect(rowsOf("batch")[0]).toMatchObject({ batch: "B-1", THIN_g: 60.02, THICK_g: 39.99 });
    expect(rowsOf("measurement")[0]).toMatchObject({
      instrument: "cone and plate",
      repeats: 3,
      viscosity_mPas: (301 + 299 + 300.5) / 3,
      temperature_C: 25,
    });
    expect(rowsOf("print")[0]).toMatchObject({
      outcome: "printed with faults",
      layerThickness_um: 50,
      film: "PDMS",
      adhesionFailures_pct: 10,
    });
  });

  it("says which records are amended, and shows what by", () => {
    const batch = append(oneOfEach[1]!);
    const amendment = append({
      kind: "amendment",
      from: "bench 2",
      statement: "Misread.",
      amends: batch.id,
      corrections: { THIN_g: 60.2 },
    });
    expect(rowsOf("batch")[0]).toMatchObject({ amendedBy: amendment.id.slice(0, 12), THIN_g: 60.02 });
    expect(rowsOf("amendment")[0]).toMatchObject({ amends: batch.id.slice(0, 12), THIN_g: 60.2 });
  });

  it("adds up the lines of one ingredient, as two lots of it", () => {
    const line = { ingredient: "THIN", target_g: 30 };
    const lines = [
      { ...line, lot: "T-7", actual_g: 30.1 },
      { ...line, lot: "T-8", actual_g: 29.7 },
    ];
    append({ kind: "batch", from: "b", statement: "Two lots.", formulation: "f", batch: "B-2", lines });
    expect(rowsOf("batch")[0]!["THIN_g"]).toBeCloseTo(59.8, 12);
  });

  it("keeps a figure whose name is taken, under its place", () => {
    append(decision("one", { from: "a trial", formulation: 3 }));
    expect(rowsOf("decision")[0]).toMatchObject({
      from: "02",
      formulation: "f",
      "figures.from": "a trial",
      "figures.formulation": 3,
    });
  });

  it("holds text where a figure is a number in one record and text in another", () => {
    append(decision("one", { film: 3 }));
    append(decision("two", { film: "PDMS" }));
    expect(rowsOf("decision").map(({ film }) => film)).toEqual(["3", "PDMS"]);
  });

  it.each([
    [[], "there are none at all"],
    [oneOfEach.slice(0, 2), "there are recipe, batch"],
  ])("refuses to make a frame of nothing (%#)", (records, there) => {
    for (const record of records) append(record);
    expect(() => rowsOf("decision")).toThrow(
      `recordFrame: no record of the kind "decision" among those given; ${there}`,
    );
  });
});
