import { describe, expect, it } from "vitest";
import { areaUnder } from "../../lib/numerics/quadrature.js";

const area = (f: (x: number) => number, low: number, high: number, panel = 10) =>
  areaUnder({ f, low, high, panel, where: "test" });

describe("areaUnder", () => {
  it("is exact for polynomials up to degree 15 on one panel, and not for 16", () => {
    for (let n = 0; n <= 15; n++) expect(area((x) => x ** n, 0, 1)).toBeCloseTo(1 / (n + 1), 14);
    expect(Math.abs(area((x) => (2 * x - 1) ** 16, 0, 1) - 1 / 17)).toBeGreaterThan(1e-7);
  });

  it("gives known areas on panels, and none over no width", () => {
    expect(area(Math.exp, -3, 4, 1)).toBeCloseTo(Math.exp(4) - Math.exp(-3), 11);
    expect(area((x) => 1 / x, 1, 100, 0.5)).toBeCloseTo(Math.log(100), 9);
    expect(area(Math.cos, 2, 2)).toBe(0);
  });

  it("refuses ends out of order, no panel, and a function that is not finite", () => {
    expect(() => area(Math.exp, 2, 1)).toThrow("test: high is 1; it must be a finite number of at least 2");
    expect(() => area(Math.exp, 0, 1, 0)).toThrow("test: panel is 0; it must be a finite number above 0");
    expect(() => area(() => NaN, 0, 1)).toThrow(
      "test: the function to be integrated is not finite between 0 and 1",
    );
  });
});
