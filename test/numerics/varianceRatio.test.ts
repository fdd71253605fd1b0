import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { studentQuantile } from "../../lib/numerics/distributions.js";
import { varianceRatioProbability } from "../../lib/numerics/varianceRatio.js";

const chance = (ratio: number, degreesAbove: number, degreesBelow: number): number =>
  varianceRatioProbability({ ratio, degreesAbove, degreesBelow });
const ratio = fc.double({ min: 1e-3, max: 200, noNaN: true });
const degrees = fc.integer({ min: 1, max: 300 });

describe("varianceRatioProbability", () => {
  it("has the closed forms of 2 degrees of freedom, above and below the line", () => {
    fc.assert(
      fc.property(ratio, degrees, (F, d) => {
        // P = (1 + 2F/d)^(-d/2), and its mirror image.
        expect(chance(F, 2, d)).toBeCloseTo((1 + (2 * F) / d) ** (-d / 2), 11);
        expect(chance(F, d, 2)).toBeCloseTo(1 - (1 + 2 / (F * d)) ** (-d / 2), 11);
      }),
    );
  });

  it("is the mirror image of itself with the two variances exchanged", () => {
    fc.assert(
      fc.property(ratio, degrees, degrees, (F, a, b) => {
        expect(chance(F, a, b) + chance(1 / F, b, a)).toBeCloseTo(1, 11);
      }),
    );
  });

  it("is the two-sided chance of Student's t for one degree of freedom above", () => {
    for (const degreesOfFreedom of [1, 3, 10, 40]) {
      const t = studentQuantile({ probability: 0.975, degreesOfFreedom });
      expect(chance(t * t, 1, degreesOfFreedom)).toBeCloseTo(0.05, 7);
    }
  });

  it("agrees with printed 5 and 1 % points of F", () => {
    // Tables of M. Merrington and C. M. Thompson, Biometrika 33 (1943) 73-88 (from memory), printed to 3 or 4 digits.
    expect(chance(3.708, 3, 10)).toBeCloseTo(0.05, 4);
    expect(chance(6.552, 3, 10)).toBeCloseTo(0.01, 5);
    expect(chance(2.711, 5, 20)).toBeCloseTo(0.05, 4);
  });

  it("is 1 for no variance above the line, and refuses what is no ratio", () => {
    expect(chance(0, 3, 4)).toBe(1);
    expect(() => chance(-1, 3, 4)).toThrow(
      "varianceRatioProbability: ratio is -1; it must be a finite number of at least 0",
    );
    expect(() => chance(1, 0, 4)).toThrow(
      "varianceRatioProbability: degreesAbove is 0; it must be a number from 1 to 100000",
    );
  });
});
