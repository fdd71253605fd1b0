import { describe, expect, it } from "vitest";
import { hasCasCheckDigit, molarMassOfFormula } from "../../lib/recipe/identity.js";

describe("hasCasCheckDigit", () => {
  it.each(["7732-18-5", "58-08-2", "75980-60-8"])("accepts %s", (cas) => {
    expect(hasCasCheckDigit(cas)).toBe(true);
  });

  it.each(["77332-18-5", "10287-53-5", "7732-18-4", "7732185", "", "7732-18-55"])("refuses %s", (cas) => {
    expect(hasCasCheckDigit(cas)).toBe(false);
  });

  it("notices any single wrong digit", () => {
    const cas = "75980-60-8";
    for (const [index, digit] of [...cas].entries()) {
      if (digit === "-") continue;
      const wrong = cas.slice(0, index) + String((Number(digit) + 1) % 10) + cas.slice(index + 1);
      expect(hasCasCheckDigit(wrong), wrong).toBe(false);
    }
  });
});

describe("molarMassOfFormula", () => {
  // Water from the standard atomic weights: Prohaska et al., Pure Appl. Chem. 94 (2022) 573; abridged to five digits.
  it.each([
    ["H2O", 18.015],
    ["K2Cr2O7", 294.185],
    ["C13H20O2", 208.301],
    ["TiO2", 79.865],
  ])("%s is %d g/mol", (formula, expected) => {
    expect(Math.abs(molarMassOfFormula(formula) - expected)).toBeLessThan(0.005);
  });

  it("refuses what is no formula", () => {
    expect(() => molarMassOfFormula("c6h6")).toThrow(
      'formula is "c6h6"; it must be element symbols and counts',
    );
    expect(() => molarMassOfFormula("C6Xx2")).toThrow('formula "C6Xx2": no atomic weight for "Xx"');
  });
});
