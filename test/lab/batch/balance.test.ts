import { describe, expect, it } from "vitest";
import { massFractionUncertainties, minimumWeight, weighingUncertainty } from "../../../lib/lab/batch.js";
import { readable } from "../../../lib/lab/batch/balance.js";

const balance = { readability_g: 0.01, repeatability_g: 0, capacity_g: 2000 };

describe("minimumWeight", () => {
  // United States Pharmacopeia, chapter 41 (wording of 2019): s = 0.00015 g gives 0.300 g; the floor is 820 d.
  it("is 2000 standard deviations, and never below 820 digits", () => {
    const fine = { readability_g: 0.0001, repeatability_g: 0.00015, capacity_g: 200 };
    expect(minimumWeight({ balance: fine })).toBeCloseTo(0.3, 12);
    expect(minimumWeight({ balance })).toBeCloseTo(8.2, 12);
    expect(minimumWeight({ balance: { ...balance, repeatability_g: 0.0041 } })).toBeCloseTo(8.2, 12);
    expect(minimumWeight({ balance: { ...balance, repeatability_g: 0.005 } })).toBeCloseTo(10, 12);
  });

  it("is in inverse proportion to the accuracy asked of a weighing", () => {
    expect(minimumWeight({ balance, weighingAccuracy: 0.01 })).toBeCloseTo(0.82, 12);
  });

  it.each([
    [{ readability_g: 0 }, "minimumWeight: readability_g is 0; it must be a finite number above 0"],
    [
      { repeatability_g: -1 },
      "minimumWeight: repeatability_g is -1; it must be a finite number of at least 0; weigh one small load ten times",
    ],
    [{ capacity_g: 0.01 }, "minimumWeight: capacity_g is 0.01; it must be a finite number above 0.01"],
  ])("refuses a balance with %j", (change, message) => {
    expect(() => minimumWeight({ balance: { ...balance, ...change } })).toThrow(message);
  });

  it("refuses an accuracy of nothing", () => {
    expect(() => minimumWeight({ balance, weighingAccuracy: 0 })).toThrow(
      "minimumWeight: weighingAccuracy is 0; it must be a number above 0 and at most 1",
    );
  });
});

describe("weighingUncertainty", () => {
  // Rectangular reading d/sqrt(12) twice, calculated outside this program: 0.01 g gives 4.08248 mg.
  it("is that of two readings, and of the repeatability where that is known", () => {
    expect(weighingUncertainty({ balance })).toBeCloseTo(4.08248e-3, 8);
    const repeatable = { ...balance, repeatability_g: 0.03 };
    expect(weighingUncertainty({ balance: repeatable })).toBeCloseTo(Math.hypot(0.03, 4.0824829e-3), 9);
  });

  it("grows with the root of the loads", () => {
    expect(weighingUncertainty({ balance, loads: 4 })).toBeCloseTo(2 * weighingUncertainty({ balance }), 14);
    expect(() => weighingUncertainty({ balance, loads: 0 })).toThrow(
      "weighingUncertainty: loads is 0; it must be",
    );
  });
});

describe("readable", () => {
  it.each([
    [1.234, "nearest", 1.23],
    [1.235, "nearest", 1.24],
    [1.239, "down", 1.23],
    [1.231, "up", 1.24],
    // A whole number of digits but for rounding noise.
    [0.1 + 0.2, "up", 0.3],
    [0.29 * 100, "down", 29],
  ] as const)("%f %s is %f", (mass, toward, expected) => {
    expect(readable(mass, balance, toward)).toBe(expected);
  });
});

describe("massFractionUncertainties", () => {
  // Calculated outside this program: 60 + 39 + 1 g, each to 0.01 sqrt(2) g; six digits stated.
  it("gives the worked values", () => {
    const u = 0.01 * Math.SQRT2;
    const given = massFractionUncertainties({ masses_g: [60, 39, 1], uncertainties_g: [u, u, u] });
    [1.32665e-4, 1.16301e-4, 1.40021e-4].forEach((expected, i) =>
      expect(Math.abs(given[i]! / expected - 1)).toBeLessThan(5e-6),
    );
  });

  it("of one component is nothing, of two the same for both", () => {
    expect(massFractionUncertainties({ masses_g: [5], uncertainties_g: [1] })).toEqual([0]);
    const [first, second] = massFractionUncertainties({ masses_g: [1, 9], uncertainties_g: [0.1, 0.2] });
    expect(first).toBeCloseTo(second!, 15);
    expect(first).toBeCloseTo(Math.hypot(0.9 * 0.1, 0.1 * 0.2) / 10, 15);
  });

  it.each([
    [
      [1, -1],
      [0, 0],
      "massFractionUncertainties: masses_g[1] is -1; it must be a finite number of at least 0",
    ],
    [[1], [0, 0], "massFractionUncertainties: masses_g holds 1, uncertainties_g holds 2; the lists must be"],
    [
      [0, 0],
      [0, 0],
      "massFractionUncertainties: the sum of masses_g is 0; it must be a finite number above 0",
    ],
  ])("refuses %j with %j", (masses_g, uncertainties_g, message) => {
    expect(() => massFractionUncertainties({ masses_g, uncertainties_g })).toThrow(message);
  });
});
