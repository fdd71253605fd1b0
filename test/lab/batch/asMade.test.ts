import { describe, expect, it } from "vitest";
import { asMade, massFractionUncertainties, weighOut, type Weighing } from "../../../lib/lab/batch.js";
import { brief, formulationOf, shelf } from "../../fixtures.js";

const balance = { readability_g: 0.01, repeatability_g: 0.005, capacity_g: 2000 };
const formulation = formulationOf({ THICK: 40, THIN: 58, PI: 2 });
const sheet = weighOut({ formulation, batch_g: 1000, balance });
const work = { brief: { ...brief, targets: { viscosity_mPas: { max: 260 } } }, shelf };
const weighed = (masses: Record<number, number> = {}): Weighing[] =>
  sheet.portions.map(({ line, target_g }) => ({ line, mass_g: masses[line] ?? target_g }));
const bySheet = asMade({ sheet, weighings: weighed() });

describe("asMade", () => {
  it("of the targets is the recipe", () => {
    expect(sheet.portions.map(({ label }) => label)).toEqual(["THIN", "PI", "THICK"]);
    expect(bySheet.total_g).toBe(1000);
    expect(bySheet.parts.map(({ ingredient, massFraction }) => [ingredient, massFraction])).toEqual([
      ["THICK", 0.4],
      ["THIN", 0.58],
      ["PI", 0.02],
    ]);
    expect(
      bySheet.parts.every(({ within, relativeChange }) => within && Math.abs(relativeChange) < 1e-12),
    ).toBe(true);
    expect(bySheet.changes).toEqual([]);
    expect(bySheet.formulation).toMatchObject({ id: "test-as-made", title: "test, as made" });
  });

  it("is what was weighed, with the doubt of the weighings", () => {
    const made = asMade({ sheet, weighings: weighed({ 1: 480, 2: 20, 3: 500 }) });
    expect(made.formulation.components.map(({ massFraction }) => massFraction)).toEqual([0.5, 0.48, 0.02]);
    const u = Math.hypot(0.005, 0.01 / Math.sqrt(6));
    const expected = massFractionUncertainties({ masses_g: [500, 480, 20], uncertainties_g: [u, u, u] });
    made.parts.forEach((part, i) => expect(part.u).toBeCloseTo(expected[i]!, 15));
    expect(made.parts.map(({ within }) => within)).toEqual([false, false, true]);
    expect(made.parts[0]!.relativeChange).toBeCloseTo(0.25, 12);
  });

  it("takes a master batch apart into what it holds, and counts its doubt", () => {
    const small = weighOut({ formulation, batch_g: 300, balance });
    expect(small.portions.map(({ label }) => label)).toEqual(["THIN", "master batch of PI in THIN", "THICK"]);
    const weighings = small.portions.map(({ line, exact_g }) => ({ line, mass_g: exact_g }));
    const made = asMade({ sheet: small, weighings });
    made.parts.forEach(({ massFraction, plannedMassFraction }) =>
      expect(massFraction).toBeCloseTo(plannedMassFraction, 12),
    );
    const initiator = made.parts[2]!;
    const [master] = small.masterBatches;
    const dose = Math.hypot(0.005, 0.01 / Math.sqrt(6)) / master!.dose_g;
    // The share of the initiator is known no better than its share in the master batch and the dose of that.
    expect(initiator.u / initiator.massFraction).toBeGreaterThan(master!.relativeU);
    expect(initiator.u / initiator.massFraction).toBeLessThan(1.01 * Math.hypot(master!.relativeU, dose));
  });

  it("says which properties change, by how much, and to which verdict", () => {
    const { changes } = asMade({ sheet, weighings: weighed({ 3: 440 }), work, draws: 200 });
    const viscosity = changes.find(({ property }) => property === "viscosity_mPas")!;
    expect(viscosity.changed).toBe(true);
    expect(viscosity.relativeChange).toBeGreaterThan(0.05);
    expect(viscosity).toMatchObject({ title: "viscosity at print temperature", unit: "mPa s" });
    expect([viscosity.verdictBefore, viscosity.verdictAfter].every((one) => one !== null)).toBe(true);
    expect(changes.find(({ property }) => property === "layerTime_s")!.verdictBefore).toBeNull();
  });

  it("says that nothing changes where nothing does", () => {
    const { changes } = asMade({ sheet, weighings: weighed(), work, draws: 200 });
    expect(changes.length).toBeGreaterThanOrEqual(7);
    expect(changes.filter(({ changed }) => changed)).toEqual([]);
    for (const { relativeChange } of changes) expect(Math.abs(relativeChange!)).toBeLessThan(1e-9);
  });

  it("is not misled by a formulation that comes with the brief", () => {
    const withAnother = { ...work, formulation: formulationOf({ THICK: 90, THIN: 8, PI: 2 }) };
    const { changes } = asMade({ sheet, weighings: weighed(), work: withAnother, draws: 200 });
    expect(changes.filter(({ changed }) => changed)).toEqual([]);
  });

  it("uses what was measured on the lot that went in", () => {
    const weighings = weighed().map((one) =>
      one.line === 3 ? { ...one, lot: "T-7" } : { ...one, lot: "X" },
    );
    const made = asMade({ sheet, weighings, work, draws: 200 });
    expect(made.formulation.components[0]!.ingredient.viscosity_mPas!.value).toBe(12000);
    expect(made.formulation.components[1]!.ingredient.lot).toBeUndefined();
    expect(made.lines.map(({ ingredient, lot, actual_g }) => [ingredient, lot, actual_g])).toEqual([
      ["THIN", "X", 580],
      ["PI", "X", 20],
      ["THICK", "T-7", 400],
    ]);
    expect(made.changes.find(({ property }) => property === "viscosity_mPas")!.changed).toBe(true);
  });

  it("refuses the lot of another ingredient", () => {
    const weighings = weighed().map((one) => ({ ...one, lot: "T-7" }));
    expect(() => asMade({ sheet, weighings, work })).toThrow(
      'batch of "test": lot "T-7" is a lot of THICK, not of THIN; name one of its own lots or none',
    );
  });

  it.each<[string, Weighing[], string]>([
    [
      "a missing line",
      weighed().slice(1),
      'batch of "test": line 1 (THIN) has no weighing; give its mass_g, 0 if it was left out',
    ],
    [
      "a line given twice",
      [...weighed(), { line: 1, mass_g: 3 }],
      "line 1 is weighed twice; add the two masses up",
    ],
    [
      "a line unknown",
      [...weighed(), { line: 4, mass_g: 3 }],
      'batch of "test": weighings[3].line is 4; the sheet has lines 1 to 3',
    ],
    [
      "a mass that is none",
      weighed({ 2: NaN }),
      'batch of "test": weighings[1].mass_g is NaN; it must be a finite number of at least 0',
    ],
    [
      "nothing",
      weighed({ 1: 0, 2: 0, 3: 0 }),
      'batch of "test": the sum of mass_g is 0; it must be a finite number above 0',
    ],
  ])("refuses %s", (_, weighings, message) => {
    expect(() => asMade({ sheet, weighings })).toThrow(message);
  });
});
