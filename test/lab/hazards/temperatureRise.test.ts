import { describe, expect, it } from "vitest";
import { temperatureRiseOf, type PolymerisationHeats } from "../../../lib/lab/hazards.js";
import { formulationOf, sure } from "../../fixtures.js";

const heats: PolymerisationHeats = {
  heatCapacity_JgK: sure(2),
  classes: [
    { title: "acrylates", heatOfPolymerisation_Jmol: sure(80000), ingredients: ["THIN"] },
    { title: "methacrylates", heatOfPolymerisation_Jmol: sure(50000), ingredients: ["THICK"] },
  ],
  otherHeatOfPolymerisation_Jmol: sure(70000),
};
const riseOf = (parts: Record<string, number>, change: Partial<PolymerisationHeats> = {}, draws = 200) =>
  temperatureRiseOf({ formulation: formulationOf(parts), heats: { ...heats, ...change }, draws });

describe("temperatureRiseOf", () => {
  // THIN: 2 bonds in 200 g/mol, 80 kJ/mol, 2 J/(g K): 2 / 200 × 80000 / 2 = 400 K. THICK: 2 / 500 × 50000 / 2 = 100 K.
  it("is the heat of each kind of double bond over the heat capacity", () => {
    expect(riseOf({ THIN: 100 }).value).toBeCloseTo(400, 10);
    expect(riseOf({ THICK: 100 }).value).toBeCloseTo(100, 10);
    expect(riseOf({ THIN: 50, THICK: 50 }).value).toBeCloseTo(250, 10);
    expect(riseOf({ THIN: 50, THICK: 50 }, { heatCapacity_JgK: sure(1) }).value).toBeCloseTo(500, 10);
  });

  it("is less by what has no double bond, and nothing without any", () => {
    expect(riseOf({ THIN: 90, PI: 10 }).value).toBeCloseTo(360, 10);
    expect(riseOf({ PI: 100 }).value).toBe(0);
  });

  it("takes the range of vinyl monomers for a kind that is not listed, and says so", () => {
    const rise = riseOf({ MID: 100 });
    expect(rise.value).toBeCloseTo(((2 / 300) * 70000) / 2, 10);
    expect(rise.warnings.map(({ code }) => code)).toEqual([
      "adiabatic-upper-limit",
      "heat-of-unlisted-double-bond",
    ]);
    expect(rise.warnings[1]!.message).toContain("MID: no heat of polymerisation is known here");
    expect(riseOf({ THIN: 100 }).warnings).toHaveLength(1);
  });

  it("has the doubt of heat and heat capacity", () => {
    const doubtful = { heatCapacity_JgK: sure(2, 0.2), otherHeatOfPolymerisation_Jmol: sure(70000, 7000) };
    const rise = riseOf({ MID: 100 }, doubtful, 2000);
    expect(rise).toMatchObject({ unit: "K", level: 0.95 });
    // Two factors of 10 % each: 1.96 × 14.1 % on either side, the upper side longer; draws are good to a few percent.
    expect(rise.low / rise.value).toBeCloseTo(Math.exp(-1.96 * 0.1411), 1);
    expect(rise.high / rise.value).toBeCloseTo(Math.exp(1.96 * 0.1411), 1);
    expect(rise.doubt.map(({ label }) => label).sort()).toEqual([
      "heat capacity of the liquid",
      "heat of polymerisation of other double bonds",
    ]);
    expect(rise.sources.map(({ figure }) => figure)).toContain("molar mass of MID");
  });

  it("refuses double bonds without a molar mass", () => {
    const formulation = formulationOf({ THIN: 100 });
    const ingredient = { ...formulation.components[0]!.ingredient, molarMass_gmol: undefined };
    const components = [{ ingredient, massFraction: 1 }];
    expect(() => temperatureRiseOf({ formulation: { ...formulation, components }, heats })).toThrow(
      'formulation "test": THIN has double bonds but no molarMass_gmol; add it to the ingredient with its source and u',
    );
  });
});
