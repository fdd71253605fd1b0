import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { normalQuantile } from "../../lib/numerics/distributions.js";
import { latinHypercube } from "../../lib/numerics/sampling.js";
import { coverageInterval, drawsNeeded, quantile, rankCorrelation } from "../../lib/numerics/summary.js";

const oneTo = (n: number): number[] => Array.from({ length: n }, (_, i) => i + 1);

describe("quantile", () => {
  it("is Hyndman and Fan's definition 7: mode of F at the k-th of n values is (k - 1)/(n - 1)", () => {
    const values = [2, 3, 5, 11];
    values.forEach((value, k) => expect(quantile(values, k / 3)).toBeCloseTo(value, 12));
    expect(quantile(values, 0.5)).toBe(4);
    expect(quantile([7], 0.3)).toBe(7);
    // The default of R's quantile(): quantile(1:10, 0.1) is 1.9.
    expect(quantile(oneTo(10), 0.1)).toBeCloseTo(1.9, 12);
  });

  it.each([
    [[], 0.5, "quantile: sortedValues holds 0 numbers; at least 1 must be given"],
    [[1, 3, 2], 0.5, "quantile: sortedValues[2] is 2, below the 3 before it; sort the values first"],
    [[1, NaN], 0.5, "quantile: sortedValues[1] is NaN; it must be a finite number"],
    [[1, 2], 1.1, "quantile: probability is 1.1; it must be a number from 0 to 1"],
  ])("refuses %j at %d", (values, probability, message) => {
    expect(() => quantile(values, probability)).toThrow(message);
  });
});

describe("drawsNeeded", () => {
  it("expects one draw beyond each end", () => {
    expect([0.5, 0.9, 0.95, 0.99].map(drawsNeeded)).toEqual([4, 20, 40, 200]);
    expect(drawsNeeded(0.1)).toBe(10);
    expect(() => drawsNeeded(1)).toThrow("drawsNeeded: level is 1; it must be a number above 0 and at most");
    expect(() => coverageInterval(oneTo(39), 0.95)).toThrow("draw at least 40");
    expect(coverageInterval(oneTo(40), 0.95).level).toBe(0.95);
  });
});

describe("coverageInterval", () => {
  it("takes the order statistics JCGM 101 names", () => {
    // Clause 7.7 with M = 100 000 and p = 0.95: q = 95 000, r = 2 500, so y(2500) and y(97500).
    const interval = coverageInterval(oneTo(100_000).reverse(), 0.95);
    expect(interval).toEqual({ value: 50_000.5, low: 2500, high: 97_500, level: 0.95 });
  });

  it("holds the share asked for, with the median inside, whatever the draws", () => {
    const draws = fc.array(fc.double({ min: -1e3, max: 1e3, noNaN: true }), {
      minLength: 40,
      maxLength: 200,
    });
    fc.assert(
      fc.property(draws, fc.double({ min: 0.1, max: 0.95, noNaN: true }), (values, level) => {
        const { value, low, high } = coverageInterval(values, level);
        const inside = values.filter((v) => v >= low && v <= high).length;
        expect(low <= value && value <= high).toBe(true);
        // Rounding p M to a whole number moves the share by less than one draw.
        expect(inside).toBeGreaterThanOrEqual(level * values.length - 1);
      }),
    );
  });

  it("returns the quantiles a normal sample was drawn from", () => {
    const [u] = latinHypercube({ dimensions: 1, draws: 20_000, seed: 1 });
    const { value, low, high } = coverageInterval(
      u!.map((probability) => normalQuantile({ probability })),
      0.95,
    );
    // A stratified sample fixes p to half a stratum, 2.5e-5; at 1.96 the density is 0.058, so z to 1e-3.
    expect(Math.abs(value)).toBeLessThan(1e-3);
    expect(Math.abs(low + 1.959964)).toBeLessThan(1e-3);
    expect(Math.abs(high - 1.959964)).toBeLessThan(1e-3);
  });

  it("asks for as many draws as the level needs, and then takes them", () => {
    expect(() => coverageInterval(oneTo(39), 0.95)).toThrow(
      "coverageInterval: 39 draws cannot show an interval of level 0.95; draw at least 40",
    );
    expect(coverageInterval(oneTo(40), 0.95)).toMatchObject({ low: 1, high: 39 });
    expect(() => coverageInterval(oneTo(19), 0.9)).toThrow("draw at least 20");
    expect(coverageInterval(oneTo(20), 0.9)).toMatchObject({ low: 1, high: 19 });
    expect(() => coverageInterval(oneTo(40), 1)).toThrow(
      "coverageInterval: level is 1; it must be a number above 0",
    );
    expect(() => coverageInterval([1, Infinity], 0.5)).toThrow(
      "coverageInterval: values[1] is Infinity; it must be a finite number",
    );
  });
});

describe("rankCorrelation", () => {
  it("is 1 for any rising relation, -1 for any falling one, and does not see a monotone change of scale", () => {
    const a = [3, 1, 4, 1.5, 9, 2.6];
    expect(rankCorrelation(a, a.map(Math.exp))).toBeCloseTo(1, 12);
    expect(
      rankCorrelation(
        a,
        a.map((x) => -(x ** 3)),
      ),
    ).toBeCloseTo(-1, 12);
  });

  it("is 1 - 6 sum d^2 / (n (n^2 - 1)) without ties", () => {
    // Ranks 1 2 3 4 5 against 2 1 4 3 5: sum d^2 = 4, so 1 - 24/120.
    expect(rankCorrelation([10, 20, 30, 40, 50], [2, 1, 4, 3, 5])).toBeCloseTo(0.8, 12);
  });

  it("gives ties their mean rank", () => {
    // Ranks 1.5 1.5 3 against 1 2 3: covariance 1.5, variances 1.5 and 2.
    expect(rankCorrelation([5, 5, 6], [1, 2, 3])).toBeCloseTo(1.5 / Math.sqrt(3), 12);
  });

  it.each([
    [[1], [1], "rankCorrelation: a holds 1 number; at least 2 must be given"],
    [
      [1, 2],
      [1, 2, 3],
      "rankCorrelation: a holds 2, b holds 3; the lists must be of the same length, one element each per row",
    ],
    [
      [1, 2],
      [4, 4],
      "rankCorrelation: all numbers of b are equal; a constant has no rank correlation, leave it out",
    ],
  ])("refuses %j with %j", (a, b, message) => {
    expect(() => rankCorrelation(a, b)).toThrow(message);
  });
});
