import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { findRoot } from "../../lib/numerics/root.js";

const where = "test";

describe("findRoot", () => {
  it("finds the root of a cubic anywhere in a wide bracket to the last digits", () => {
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), (root) => {
        const f = (x: number): number => (x - root) * ((x - root) ** 2 + 1);
        const found = findRoot({ f, low: -1e7, high: 2e7, where });
        expect(Math.abs(found - root)).toBeLessThanOrEqual(1e-15 * Math.abs(root) + 1e-300);
      }),
    );
  });

  it("keeps its relative precision for roots near zero", () => {
    expect(findRoot({ f: (x) => x * x - 1e-200, low: 0, high: 1, where }) / 1e-100).toBeCloseTo(1, 14);
  });

  it("is not held up by a flat or a kinked function", () => {
    let calls = 0;
    const flat = (x: number): number => {
      calls++;
      return (x - 0.3) ** 9;
    };
    // f underflows to 0 within 1e-36 of the root, and is flat to 1e-16 of its range within 0.01.
    expect(findRoot({ f: flat, low: -1, high: 4, where })).toBeCloseTo(0.3, 10);
    expect(findRoot({ f: (x) => (x < 0.7 ? -1 : 1), low: 0, high: 1, where })).toBeCloseTo(0.7, 14);
    expect(calls).toBeLessThan(300);
  });

  it("takes a root at either end", () => {
    expect(findRoot({ f: (x) => x - 1, low: 1, high: 3, where })).toBe(1);
    expect(findRoot({ f: (x) => x - 3, low: 1, high: 3, where })).toBe(3);
  });

  it("says why it cannot", () => {
    expect(() => findRoot({ f: (x) => x * x + 1, low: -1, high: 2, where })).toThrow(
      "test: no sign change between -1 (value 2) and 2 (value 5); the bracket must hold a root",
    );
    expect(() => findRoot({ f: (x) => 1 / x, low: 0, high: 2, where })).toThrow(
      "test: the function to be solved is Infinity at 0; it must be finite within the bracket",
    );
    expect(() => findRoot({ f: (x) => x, low: NaN, high: 2, where })).toThrow(
      "test: low is NaN; it must be a finite number",
    );
  });
});
