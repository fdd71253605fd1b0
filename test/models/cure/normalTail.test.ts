import { describe, expect, it } from "vitest";
import { lnNormalBelow, normalHazard } from "../../../lib/models/cure/normalTail.js";

describe("the normal tail", () => {
  // Phi from tables (Abramowitz and Stegun, table 26.1 and 26.2; from memory), 6 digits or more.
  it.each([
    [-10, 7.619853e-24],
    [-5, 2.8665157e-7],
    [-2.5, 6.2096653e-3],
    [-1, 0.15865525],
    [0, 0.5],
    [1.959964, 0.975],
    [3, 0.99865010197],
  ])("below %d is %d", (z, Phi) => {
    expect(Math.exp(lnNormalBelow(z)) / Phi).toBeCloseTo(1, 6);
  });

  it("has the hazard as the slope of its logarithm, and no step where the formulas meet", () => {
    for (const z of [-30, -8, -2.1, -2, -1.9, -0.5, 0, 1, 1.999, 2.001, 5]) {
      const h = 1e-4 * Math.max(1, Math.abs(z));
      const slope = (lnNormalBelow(z + h) - lnNormalBelow(z - h)) / (2 * h);
      expect(Math.abs(slope - normalHazard(z))).toBeLessThan(1e-6 * Math.max(1, normalHazard(z)));
    }
    for (const end of [-2, 2]) {
      expect(lnNormalBelow(end + 1e-12) - lnNormalBelow(end - 1e-12)).toBeCloseTo(0, 11);
    }
  });

  it("tends to the parabola far below and to nothing far above", () => {
    expect(lnNormalBelow(-1000) / -500000).toBeCloseTo(1, 4);
    expect(normalHazard(-1000) / 1000).toBeCloseTo(1, 5);
    expect(lnNormalBelow(40)).toBeCloseTo(0, 100);
    expect(normalHazard(40)).toBeCloseTo(0, 100);
  });
});
