import { describe, expect, it } from "vitest";
import { extraScatter } from "../../lib/numerics/extraScatter.js";

describe("extraScatter", () => {
  it("is what lies beyond the part, a degree, over the variance of the part", () => {
    // F = (10 / 2) / (16 / 4) = 1.25 with 2 and 4 degrees; for 2 above, P = (1 + F / 2)^-2.
    const { ratio, probability, standardDeviation } = extraScatter(
      { sum: 26, degrees: 6 },
      { sum: 16, degrees: 4 },
    );
    expect([ratio, standardDeviation]).toEqual([1.25, 2]);
    expect(probability).toBeCloseTo(1 / 1.625 ** 2, 10);
  });

  it("finds nothing where the part has all of it, even if rounding says a hair more", () => {
    const part = { sum: 3, degrees: 4 };
    for (const sum of [3, 3 - 1e-15]) {
      expect(extraScatter({ sum, degrees: 7 }, part)).toMatchObject({ ratio: 0, probability: 1 });
    }
  });
});
