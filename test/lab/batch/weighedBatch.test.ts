import { describe, expect, it } from "vitest";
import { readWeighedBatch, weighingsOn, weighOut } from "../../../lib/lab/batch.js";
import { parseJson } from "../../../lib/recipe/document.js";
import { formulationOf } from "../../fixtures.js";

const balance = { readability_g: 0.01, repeatability_g: 0, capacity_g: 2000 };
const file = {
  id: "T-1",
  formulation: "test",
  batch_g: 1000,
  balance,
  weighings: [
    { portion: "THIN", lot: "T-22", mass_g: 599.5 },
    { portion: "THICK", mass_g: 400.25 },
  ],
  source: "round numbers chosen for a test",
  status: "invented for the demo",
};
const read = (change: object = {}) =>
  readWeighedBatch(parseJson(JSON.stringify({ ...file, ...change }, null, 1), "t-1.json"));

describe("readWeighedBatch", () => {
  it("gives what the file says", () => {
    expect(read()).toEqual(file);
  });

  it("reads quantities with their units into grams", () => {
    const { batch_g, balance, weighings } = read({
      batch_g: "1 kg",
      balance: { readability_g: "10 mg", repeatability_g: "0 mg", capacity_g: "2 kg" },
      weighings: [{ portion: "THIN", mass_g: "0.5 kg" }],
    });
    expect([batch_g, weighings[0]!.mass_g]).toEqual([1000, 500]);
    expect(balance).toEqual(file.balance);
  });

  it("keeps the accuracies that the sheet was asked for", () => {
    expect(read({ accuracy: 0.02, weighingAccuracy: 0.002 })).toMatchObject({
      accuracy: 0.02,
      weighingAccuracy: 0.002,
    });
  });

  it.each([
    [{ batch_g: 0 }, "t-1.json, line 4: batch_g is 0; it must be above 0"],
    [
      { balance: { ...balance, readability_g: -0.01 } },
      "t-1.json, line 6: balance.readability_g is -0.01; it must be above 0",
    ],
    [
      { weighings: [{ portion: "THIN", mass: 5 }] },
      't-1.json, line 13: weighings[0] has an unknown field "mass"; did you mean "mass_g"?',
    ],
    [
      { weighings: [{ portion: "THIN", mass_g: "12 mL" }] },
      't-1.json, line 13: weighings[0].mass_g is "12 mL"; it must be a quantity that converts to g',
    ],
    [{ weighings: [] }, "t-1.json, line 10: weighings is a list; it must be at least 1 entries long"],
    [{ accuracy: 0.6 }, "t-1.json, line 23: accuracy is 0.6; it must be at most 0.5"],
    [{ lot: "T-22" }, 't-1.json, line 23: the file has an unknown field "lot"'],
    [
      { status: "measured" },
      't-1.json, line 22: status is "measured"; it must be one of "published", "computed from published data", "measured here"',
    ],
    [
      { weighings: [file.weighings[0], file.weighings[0]] },
      't-1.json: portion "THIN" is weighed twice; add the two masses up and keep one',
    ],
  ])("refuses %j", (change, message) => {
    expect(() => read(change)).toThrow(message);
  });
});

describe("weighingsOn", () => {
  const sheet = weighOut({ formulation: formulationOf({ THIN: 60, THICK: 40 }), batch_g: 1000, balance });

  it("finds the line of each portion, and keeps lots that were written down", () => {
    expect(weighingsOn({ sheet, weighed: read() })).toEqual([
      { line: 1, mass_g: 599.5, lot: "T-22" },
      { line: 2, mass_g: 400.25 },
    ]);
  });

  it("takes a mass for a slip that is ten times off, unless the file says that the balance showed it", () => {
    const of = (mass_g: number, said: object = {}) =>
      weighingsOn({ sheet, weighed: read({ weighings: [{ portion: "THIN", mass_g, ...said }] }) });
    expect(() => of(599500)).toThrow(
      'batch "T-1": weighings[0].mass_g of THIN is 599500, and the sheet says 600 g; check the unit (g), or say "asShown": true beside it if the balance did show that',
    );
    expect(() => of(0.5995)).toThrow("weighings[0].mass_g of THIN is 0.5995, and the sheet says 600 g");
    expect(of(0)).toEqual([{ line: 1, mass_g: 0 }]);
    expect(of(6000)).toEqual([{ line: 1, mass_g: 6000 }]);
    expect(of(6001, { asShown: true })).toEqual([{ line: 1, mass_g: 6001 }]);
  });

  it.each([
    [
      { weighings: [{ portion: "THIM", mass_g: 1 }] },
      'batch "T-1": unknown portion "THIM"; did you mean "THIN"? (a changed formulation, balance or solubility makes another sheet)',
    ],
    [
      { batch_g: 900 },
      'batch "T-1": weighed as 900 g of "test", and the sheet is 1000 g of "test"; make the sheet it was weighed by',
    ],
    [
      { formulation: "other" },
      'batch "T-1": weighed as 1000 g of "other", and the sheet is 1000 g of "test"; make the sheet it was weighed by',
    ],
  ])("refuses %j", (change, message) => {
    expect(() => weighingsOn({ sheet, weighed: read(change) })).toThrow(message);
  });
});
