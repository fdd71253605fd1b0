import { describe, expect, it } from "vitest";
import { robinRoot, scaledErfc } from "../../lib/numerics/robin.js";

describe("robinRoot", () => {
  // Computed for this project by an independent program to 12 digits; 0.3111, 0.8603 and 1.4289 stand in H. S. Carslaw,
  // J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, appendix IV, table I (from memory).
  it.each([
    [0.01, 0.0998336385511],
    [0.1, 0.3110528482],
    [0.5, 0.653271187094],
    [1, 0.860333589019],
    [2, 1.07687398631],
    [10, 1.42887001121],
    [100, 1.55524512926],
  ])("has its first root for Bi %d at %d", (biot, root) => {
    expect(robinRoot(0, biot) / root - 1).toBeLessThan(2e-10);
    expect(robinRoot(0, biot) / root - 1).toBeGreaterThan(-2e-10);
  });

  it("solves b tan b = Bi in each interval, for a film that hardly resists and one that hardly passes", () => {
    for (const biot of [1e-6, 0.3, 7, 1e4]) {
      for (const n of [0, 1, 2, 30]) {
        const b = robinRoot(n, biot);
        expect(b).toBeGreaterThan(n * Math.PI);
        expect(b).toBeLessThan((n + 0.5) * Math.PI);
        expect(Math.abs(b * Math.sin(b) - biot * Math.cos(b))).toBeLessThan(
          1e-13 * (b + biot + 1 + b * biot),
        );
      }
    }
  });
});

describe("scaledErfc", () => {
  // erfc(1) = 0.15729920705028513 and erfc(3) = 2.209049699858544e-5: NIST Digital Library of Mathematical Functions,
  // table 7.23 gives them to 10 digits; here to 16, from memory, hence 1e-13.
  it.each([
    [0, 1],
    [1, Math.E * 0.15729920705028513],
    [3, Math.exp(9) * 2.209049699858544e-5],
  ])("is exp(q^2) erfc(q) at %d", (q, value) => {
    expect(Math.abs(scaledErfc(q) / value - 1)).toBeLessThan(1e-13);
  });

  it("is continuous where series and continued fraction meet, with and without its first terms", () => {
    for (const skipped of [0, 1, 2]) {
      const [below, above] = [scaledErfc(2 - 1e-9, skipped), scaledErfc(2, skipped)];
      expect(Math.abs(above - below)).toBeLessThan(3e-9);
      expect(scaledErfc(0.7, skipped)).toBeCloseTo(
        scaledErfc(0.7) - [0, 1, 1 - 1.4 / Math.sqrt(Math.PI)][skipped]!,
        14,
      );
    }
  });

  it("falls as 1 / (q sqrt(pi)) far out, and keeps its digits when the first terms are left out", () => {
    expect(scaledErfc(1e8) * 1e8 * Math.sqrt(Math.PI)).toBeCloseTo(1, 14);
    expect(scaledErfc(1e-6, 2) / 1e-12).toBeCloseTo(1, 5);
  });
});
