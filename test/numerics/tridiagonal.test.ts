import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { solveTridiagonal } from "../../lib/numerics/tridiagonal.js";

const list = (length: number, min: number, max: number) =>
  fc.array(fc.double({ min, max, noNaN: true }), { minLength: length, maxLength: length });

describe("solveTridiagonal", () => {
  it("gives x with A x = b for rows whose diagonal outweighs the rest", () => {
    const problem = fc.integer({ min: 1, max: 40 }).chain((n) =>
      fc.record({
        lower: list(n, -1, 1),
        extra: list(n, 0.01, 3),
        upper: list(n, -1, 1),
        x: list(n, -1e3, 1e3),
      }),
    );
    fc.assert(
      fc.property(problem, ({ lower, extra, upper, x }) => {
        const diagonal = extra.map((more, i) => more + Math.abs(lower[i]!) + Math.abs(upper[i]!));
        const right = x.map(
          (xi, i) => lower[i]! * (x[i - 1] ?? 0) + diagonal[i]! * xi + upper[i]! * (x[i + 1] ?? 0),
        );
        const solution = Float64Array.from(right);
        solveTridiagonal({
          lower: Float64Array.from(lower),
          diagonal: Float64Array.from(diagonal),
          upper: Float64Array.from(upper),
          right: solution,
        });
        // The diagonal outweighs the rest by 0.01 at least: rounding of 1e3 grows by no more than 1 / 0.01, twice over.
        solution.forEach((found, i) => expect(Math.abs(found - x[i]!)).toBeLessThan(1e-9));
      }),
    );
  });

  it("solves the second difference of a parabola exactly: -x'' = 2 between two zeros", () => {
    const n = 9;
    const right = new Float64Array(n).fill(2 / 100);
    const all = (value: number) => new Float64Array(n).fill(value);
    solveTridiagonal({ lower: all(-1), diagonal: all(2), upper: all(-1), right });
    right.forEach((x, i) => {
      const z = (i + 1) / 10;
      expect(x).toBeCloseTo(z * (1 - z), 14);
    });
  });
});
