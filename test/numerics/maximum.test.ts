import { describe, expect, it } from "vitest";
import { findMaximum } from "../../lib/numerics/maximum.js";

const find = (f: (x: number) => number, low = 0, high = 10) =>
  findMaximum({ f, low, high, tolerance: 1e-6, where: "test" });

describe("findMaximum", () => {
  it("finds the top of a hump, round or pointed", () => {
    expect(Math.abs(find((x) => -((x - 3) ** 2)) - 3)).toBeLessThan(1e-6);
    expect(Math.abs(find((x) => -Math.abs(x - 7.25)) - 7.25)).toBeLessThan(1e-6);
    // ln(x)/x is greatest at e.
    expect(Math.abs(find((x) => Math.log(x) / x, 1, 50) - Math.E)).toBeLessThan(2e-6);
  });

  it("goes to the end of what only rises or only falls", () => {
    expect(find((x) => x)).toBeGreaterThan(10 - 1e-6);
    expect(find((x) => -x)).toBeLessThan(1e-6);
  });

  it("refuses ends out of order, no tolerance, and a function that is no number", () => {
    expect(() => find((x) => x, 3, 3)).toThrow("test: high is 3; it must be a finite number above 3");
    expect(() => findMaximum({ f: (x) => x, low: 0, high: 1, tolerance: 0, where: "test" })).toThrow(
      "test: tolerance is 0; it must be a finite number above 0",
    );
    expect(() => find(() => NaN)).toThrow("test: the function to be maximised is NaN at");
  });
});
