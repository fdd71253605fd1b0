import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { robustScores, runsTest } from "../../lib/numerics/runs.js";

const signsOf = (text: string): number[] => [...text].map((sign) => (sign === "+" ? 1 : -1));

describe("runsTest", () => {
  it("gives the chance found by writing out every order of the signs", () => {
    const count = fc.integer({ min: 1, max: 5 });
    fc.assert(
      fc.property(count, count, fc.integer({ min: 0, max: 1023 }), (positive, negative, seed) => {
        const n = positive + negative;
        const orders = Array.from({ length: 2 ** n }, (_, bits) =>
          Array.from({ length: n }, (_, i) => ((bits >> i) & 1 ? 1 : -1)),
        ).filter((signs) => signs.filter((sign) => sign > 0).length === positive);
        const runsOf = (signs: readonly number[]): number =>
          1 + signs.filter((sign, i) => i > 0 && sign !== signs[i - 1]).length;
        const chosen = orders[seed % orders.length]!;
        const found = runsTest(chosen);
        const share = orders.filter((signs) => runsOf(signs) <= runsOf(chosen)).length / orders.length;
        expect(found.runs).toBe(runsOf(chosen));
        expect(found.probability).toBeCloseTo(share, 12);
        const mean = orders.reduce((sum, signs) => sum + runsOf(signs), 0) / orders.length;
        expect(found.expectedRuns).toBeCloseTo(mean, 10);
        expect(found.leastProbability).toBeCloseTo(2 / orders.length, 12);
      }),
      { numRuns: 60 },
    );
  });

  it("agrees with the table of F. S. Swed and C. Eisenhart (1943; from memory)", () => {
    // Ten signs of each kind: 6 runs are the most that stay below a chance of 0.025, and 7 are above 0.05.
    expect(runsTest(signsOf("+++----+++---++++---")).runs).toBe(6);
    expect(runsTest(signsOf("+++----+++---++++---")).probability).toBeCloseTo(0.0185, 3);
    expect(runsTest(signsOf("+++---+++---+++----+")).probability).toBeCloseTo(0.0513, 3);
  });

  it("counts many readings without running out of numbers", () => {
    const waves = Array.from({ length: 3000 }, (_, i) => Math.sin(i / 100));
    expect(runsTest(waves).probability).toBeLessThan(1e-10);
    const alternating = Array.from({ length: 3000 }, (_, i) => (-1) ** i);
    expect(runsTest(alternating).probability).toBeCloseTo(1, 9);
  });

  it("passes over zeros, and says nothing from signs of one kind", () => {
    expect(runsTest([1, 0, 2, -1])).toMatchObject({ runs: 2, positive: 2, negative: 1 });
    expect(runsTest([1, 2, 3])).toMatchObject({
      runs: 1,
      probability: 1,
      leastProbability: 1,
      expectedRuns: 1,
    });
    expect(runsTest([0])).toMatchObject({ runs: 0, positive: 0, negative: 0, probability: 1 });
  });

  it("refuses what is not a number", () => {
    expect(() => runsTest([1, NaN])).toThrow("runsTest: residuals[1] is NaN; it must be a finite number");
    expect(() => runsTest([])).toThrow("runsTest: residuals holds 0 numbers; at least 1 must be given");
  });
});

describe("robustScores", () => {
  const values = fc.array(fc.double({ min: -10, max: 10, noNaN: true }), { minLength: 5, maxLength: 12 });

  it("does not see a shift, and sees a change of sign as one", () => {
    fc.assert(
      fc.property(values, fc.double({ min: -5, max: 5, noNaN: true }), (list, shift) => {
        const rounded = list.map((x) => Math.round(1000 * x) / 1024);
        const moved = Math.round(1024 * shift) / 1024;
        const scores = robustScores(rounded);
        robustScores(rounded.map((x) => x + moved)).forEach((z, i) => expect(z).toBeCloseTo(scores[i]!, 6));
        robustScores(rounded.map((x) => -x)).forEach((z, i) => expect(z).toBeCloseTo(-scores[i]!, 9));
      }),
    );
  });

  it("is not moved by how far out the outlier lies", () => {
    const [near, far] = [5, 5000].map((x) => robustScores([-2, -1, 0, 1, 2, x]));
    expect(near!.slice(0, 5)).toEqual(far!.slice(0, 5));
  });

  it("scores the quartiles of a symmetric sample at 0.6745", () => {
    expect(robustScores([-2, -1, 0, 1, 2])[3]).toBeCloseTo(0.6745, 4);
  });

  it("falls back on the mean distance when most readings agree, and on zero when all do", () => {
    // Mean distance 6 / 6 = 1, over sqrt(2 / pi).
    expect(robustScores([1, 1, 1, 1, 1, 7])[5]).toBeCloseTo(6 * Math.sqrt(2 / Math.PI), 12);
    expect(robustScores([3, 3, 3])).toEqual([0, 0, 0]);
  });

  it("refuses what is not a number", () => {
    expect(() => robustScores([Infinity])).toThrow(
      "robustScores: residuals[0] is Infinity; it must be a finite number",
    );
  });
});
