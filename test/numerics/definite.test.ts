import { describe, expect, it } from "vitest";
import { solveDefinite } from "../../lib/numerics/definite.js";

describe("solveDefinite", () => {
  it("solves what was put together from a known answer", () => {
    const A = [[4], [2, 5], [-1, 0.5, 3]];
    const full = (i: number, j: number) => (j <= i ? A[i]![j]! : A[j]![i]!);
    const x = [1, -2, 0.5];
    const b = x.map((_, i) => x.reduce((sum, value, j) => sum + full(i, j) * value, 0));
    solveDefinite(A, b).forEach((value, i) => expect(value).toBeCloseTo(x[i]!, 14));
  });

  it("divides, for one row", () => {
    expect(solveDefinite([[4]], [2])).toEqual([0.5]);
  });

  it("gives NaN for what is not positive definite", () => {
    expect(solveDefinite([[1], [2, 1]], [1, 1])[0]).toBeNaN();
  });
});
