import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  batchMasses,
  composition,
  formulate,
  largestOf,
  mainPair,
  massFractionOf,
  withMassFraction,
  withMassFractions,
  withRatio,
  withShares,
  type Part,
} from "../../lib/recipe/formulation.js";
import { formulationOf, shelf } from "../fixtures.js";

const make = (parts: Part[], normalise = false) =>
  formulate({ recipe: { id: "amber-3", title: "t", normalise, parts }, shelf });
const sum = (values: number[]) => values.reduce((a, b) => a + b, 0);

describe("formulate", () => {
  it("brings parts to mass fractions that add up to 1", () => {
    const { components } = make([
      { ingredient: "THIN", mass_pct: 60.02 },
      { ingredient: "THICK", mass_pct: 40 },
    ]);
    expect(sum(components.map(({ massFraction }) => massFraction))).toBeCloseTo(1, 14);
  });

  it("refuses parts that do not add up, unless told to normalise", () => {
    const parts = [
      { ingredient: "THIN", mass_pct: 57.4 },
      { ingredient: "THICK", mass_pct: 40 },
    ];
    expect(() => make(parts)).toThrow(
      'formulation "amber-3": mass_pct adds up to 97.4; parts must add up to 100 ± 0.05, or say "normalise": true',
    );
    expect(make(parts, true).components[0]!.massFraction).toBeCloseTo(57.4 / 97.4, 14);
  });

  it("takes blends of blends apart and adds up what they share", () => {
    const premix = make([
      { ingredient: "THIN", mass_pct: 90 },
      { ingredient: "PI", mass_pct: 10 },
    ]);
    const recipe = {
      id: "outer",
      title: "t",
      normalise: false,
      parts: [
        { ingredient: "THIN", mass_pct: 50 },
        { blend: "premix.json", mass_pct: 50 },
      ],
    };
    const whole = formulate({ recipe, shelf, blends: new Map([["premix.json", premix]]) });
    expect(massFractionOf(whole, "THIN")).toBeCloseTo(0.95, 14);
    expect(massFractionOf(whole, "PI")).toBeCloseTo(0.05, 14);
    expect(whole.components).toHaveLength(2);
  });

  it("uses a lot's own figure and says so", () => {
    const { ingredient } = make([{ ingredient: "THICK", lot: "T-7", mass_pct: 100 }]).components[0]!;
    expect(ingredient.viscosity_mPas!.value).toBe(12000);
    expect(ingredient.lot).toEqual({ id: "T-7", measured: ["viscosity_mPas"] });
  });

  it("refuses an ingredient, a lot or a blend that stands in two parts, and takes two lots of one", () => {
    const half = (part: object) => ({ ...part, mass_pct: 50 });
    expect(() => make([half({ ingredient: "THIN" }), half({ ingredient: "THIN" })])).toThrow(
      'formulation "amber-3": THIN stands in parts[0] and in parts[1]; add the two mass_pct up and keep one of them',
    );
    const lot = { ingredient: "THICK", lot: "T-7" };
    expect(() => make([half(lot), half(lot)])).toThrow("THICK of lot T-7 stands in parts[0] and in parts[1]");
    const blends = new Map([["a.json", formulationOf({ THIN: 100 })]]);
    const parts = [half({ blend: "a.json" }), half({ blend: "a.json" })];
    const recipe = { id: "amber-3", title: "twice a blend", normalise: false, parts };
    expect(() => formulate({ recipe, shelf, blends })).toThrow(
      'the blend "a.json" stands in parts[0] and in parts[1]',
    );
    expect(() => make([half({ blend: "a.json" }), half(lot)])).toThrow(
      'unknown blend "a.json"; none is known here',
    );
    expect(make([half(lot), half({ ingredient: "THICK" })]).components).toHaveLength(2);
  });

  it("names what it cannot find", () => {
    expect(() => make([{ ingredient: "THINN", mass_pct: 100 }])).toThrow(
      'formulation "amber-3": unknown ingredient "THINN"; did you mean "THIN"?',
    );
    expect(() => make([{ ingredient: "THIN", lot: "T-7", mass_pct: 100 }])).toThrow(
      'formulation "amber-3": lot "T-7" is a lot of THICK, not of THIN; name one of its own lots or none',
    );
    expect(() => make([{ blend: "none.json", mass_pct: 100 }])).toThrow('unknown blend "none.json"');
    expect(() => make([{ mass_pct: 100 }])).toThrow("each part names either an ingredient or a blend");
    expect(() => make([{ ingredient: "THIN", mass_pct: 0 }], true)).toThrow(
      "at least one part must be above 0",
    );
  });
});

describe("composition", () => {
  // Exact by arithmetic: 40 g of 2 g/cm³ with 60 g of 1 g/cm³ fill 20 + 60 cm³.
  it("adds volumes", () => {
    const blend = formulationOf({ THIN: 60, THICK: 40 });
    const { density_gcm3, rows } = composition(blend, (one, figure) =>
      figure === "density_gcm3" ? (one.id === "THICK" ? 2 : 1) : one.id === "THICK" ? 400 : 100,
    );
    expect(density_gcm3).toBeCloseTo(1.25, 14);
    expect(rows[1]!.volumeFraction).toBeCloseTo(0.25, 14);
    expect(rows[1]!.moleFraction).toBeCloseTo(0.1 / 0.7, 14);
    expect(rows[1]!.concentration_molL).toBeCloseTo(0.1 / 0.08, 12);
  });

  it("counts parts per hundred of the liquids only", () => {
    const { rows } = composition(formulationOf({ THIN: 49, THICK: 49, PI: 2 }));
    expect(rows[2]!.partsPerHundred).toBeCloseTo((100 * 2) / 98, 12);
  });

  it("keeps fractions of every kind adding up to 1", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 100 }), (thick) => {
        const { rows } = composition(formulationOf({ THIN: 100 - thick, THICK: thick }));
        expect(sum(rows.map((row) => row.volumeFraction))).toBeCloseTo(1, 12);
        expect(sum(rows.map((row) => row.moleFraction!))).toBeCloseTo(1, 12);
      }),
    );
  });

  it("names the ingredient without a density", () => {
    expect(() => composition(formulationOf({ THIN: 100 }), () => undefined)).toThrow(
      'formulation "test": THIN has no density_gcm3; add it to the ingredient with its source and u',
    );
  });
});

describe("what there is most of", () => {
  it("finds the largest of a role and the pair that sets the viscosity, the thicker first", () => {
    const blend = formulationOf({ THIN: 50, THICK: 28, MID: 20, PI: 2 });
    expect(largestOf(blend, "diluent").id).toBe("THIN");
    expect(mainPair(blend).map(({ id }) => id)).toEqual(["THICK", "THIN"]);
    expect(() => largestOf(blend, "absorber")).toThrow(
      'formulation "test": no absorber in it; add one (0 % will do)',
    );
    expect(() => mainPair(formulationOf({ THIN: 98, PI: 2 }))).toThrow("it has fewer than two liquids");
  });
});

describe("changing a formulation", () => {
  const base = formulationOf({ THIN: 50, THICK: 30, MID: 20 });

  it("sets one share and keeps the others in proportion", () => {
    const changed = withMassFraction(base, { id: "MID", massFraction: 0.6 });
    expect(massFractionOf(changed, "MID")).toBeCloseTo(0.6, 14);
    expect(massFractionOf(changed, "THIN") / massFractionOf(changed, "THICK")).toBeCloseTo(5 / 3, 12);
  });

  it("sets several shares at once, each exactly, and leaves the proportions of the rest", () => {
    const four = formulationOf({ THIN: 50, THICK: 30, MID: 15, PI: 5 });
    const changed = withMassFractions(four, { MID: 0.31, PI: 0.07 });
    expect(massFractionOf(changed, "MID")).toBe(0.31);
    expect(massFractionOf(changed, "PI")).toBe(0.07);
    expect(massFractionOf(changed, "THIN") / massFractionOf(changed, "THICK")).toBeCloseTo(5 / 3, 12);
    expect(sum(changed.components.map(({ massFraction }) => massFraction))).toBeCloseTo(1, 14);
    expect(() => withMassFractions(four, { MID: 0.6, PI: 0.5 })).toThrow(
      'formulation "test": the mass fractions of MID, PI add up to 1.1; together they must be at most 1',
    );
    expect(() => withMassFractions(four, { MID: -0.1, PI: 0.5 })).toThrow(
      'formulation "test": massFraction of MID is -0.1; it must be a number from 0 to 1',
    );
  });

  it("shares out two ingredients and leaves the rest", () => {
    const changed = withRatio(base, { id: "THIN", against: "THICK", share: 0.25 });
    expect(massFractionOf(changed, "THIN")).toBeCloseTo(0.2, 14);
    expect(massFractionOf(changed, "THICK")).toBeCloseTo(0.6, 14);
    expect(massFractionOf(changed, "MID")).toBeCloseTo(0.2, 14);
  });

  it("shares out three ingredients and leaves the rest", () => {
    const four = formulationOf({ THIN: 40, THICK: 30, MID: 20, PI: 10 });
    const changed = withShares(four, { THIN: 0.5, THICK: 0.3, MID: 0.2 });
    expect(
      ["THIN", "THICK", "MID", "PI"].map((id) => Number(massFractionOf(changed, id).toPrecision(12))),
    ).toEqual([0.45, 0.27, 0.18, 0.1]);
    expect(() => withShares(four, { THIN: 0.5, MID: 0.6 })).toThrow(
      'formulation "test": shares add up to 1.1; they must add up to 1',
    );
    expect(() => withShares(four, { THIN: -0.5, MID: 1.5 })).toThrow(
      "share of THIN is -0.5; it must be a number from 0 to 1",
    );
  });

  it("raises an ingredient from nothing", () => {
    const none = formulationOf({ THIN: 60, THICK: 40, MID: 0 });
    expect(massFractionOf(withMassFraction(none, { id: "MID", massFraction: 0.2 }), "MID")).toBeCloseTo(
      0.2,
      14,
    );
    expect(massFractionOf(withRatio(none, { id: "MID", against: "THIN", share: 0.5 }), "MID")).toBeCloseTo(
      0.3,
      14,
    );
  });

  it("keeps the proportions of two lots of one ingredient", () => {
    const lots = make([
      { ingredient: "THICK", lot: "T-7", mass_pct: 20 },
      { ingredient: "THICK", mass_pct: 10 },
      { ingredient: "THIN", mass_pct: 70 },
    ]);
    const changed = withMassFraction(lots, { id: "THICK", massFraction: 0.6 });
    expect(changed.components.map(({ massFraction }) => Number(massFraction.toPrecision(12)))).toEqual([
      0.4, 0.2, 0.4,
    ]);
  });

  it("refuses an ingredient that is not in it and a share out of range", () => {
    expect(() => withMassFraction(base, { id: "THINN", massFraction: 0.5 })).toThrow('did you mean "THIN"?');
    expect(() => withRatio(base, { id: "THIN", against: "THICK", share: 1.5 })).toThrow(
      'formulation "test": share is 1.5; it must be a number from 0 to 1',
    );
    expect(() => withMassFraction(formulationOf({ THIN: 100 }), { id: "THIN", massFraction: 0.5 })).toThrow(
      "THIN is alone in it",
    );
  });

  it("scales to a batch", () => {
    expect(batchMasses(base, { batch_g: 250 }).map(({ mass_g }) => mass_g)).toEqual([125, 75, 50]);
    expect(() => batchMasses(base, { batch_g: 0 })).toThrow(
      "batch_g is 0; it must be a finite number above 0",
    );
  });
});
