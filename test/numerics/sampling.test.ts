import { describe, expect, it } from "vitest";
import { latinHypercube, seededUniform, xoshiro128 } from "../../lib/numerics/sampling.js";

describe("xoshiro128", () => {
  it("gives the output of the authors' C program", () => {
    // Blackman and Vigna, xoshiro128starstar.c 1.1, state { 1, 2, 3, 4 }; the first ten outputs, as several
    // independent ports publish them.
    const next = xoshiro128({ state: [1, 2, 3, 4] });
    expect(Array.from({ length: 10 }, next)).toEqual([
      11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597, 4258142804,
    ]);
  });

  it("refuses a state it cannot leave", () => {
    expect(() => xoshiro128({ state: [0, 0, 0, 0] })).toThrow(
      "xoshiro128: state is all zeros; at least one word must differ from 0",
    );
    expect(() => xoshiro128({ state: [0, 0, 0.5, 0] })).toThrow(
      "xoshiro128: state[2] is 0.5; it must be a whole number",
    );
  });
});

describe("seededUniform", () => {
  const draw = (seed: number, count: number): number[] =>
    Array.from({ length: count }, seededUniform({ seed }));

  it("repeats with the seed and differs between seeds", () => {
    expect(draw(42, 100)).toEqual(draw(42, 100));
    expect(draw(42, 100)).not.toEqual(draw(43, 100));
    expect(draw(0, 4)).not.toEqual(draw(4294967295, 4));
  });

  it("is uniform in its moments and has no memory from one draw to the next", () => {
    const n = 100_000;
    const u = draw(1, n);
    const mean = (f: (x: number, i: number) => number): number =>
      u.reduce((sum, x, i) => sum + f(x, i), 0) / n;
    // Five standard errors: of the mean 1/sqrt(12 n), of the variance 1/sqrt(180 n), of the lag-1 product 1/(12 sqrt n).
    expect(Math.abs(mean((x) => x) - 1 / 2)).toBeLessThan(5 / Math.sqrt(12 * n));
    expect(Math.abs(mean((x) => (x - 0.5) ** 2) - 1 / 12)).toBeLessThan(5 / Math.sqrt(180 * n));
    expect(Math.abs(mean((x, i) => (x - 0.5) * (u[(i + 1) % n]! - 0.5)))).toBeLessThan(
      5 / (12 * Math.sqrt(n)),
    );
    expect(Math.min(...u.slice(0, 1000))).toBeGreaterThan(0);
    expect(Math.max(...u.slice(0, 1000))).toBeLessThan(1);
  });

  it.each([
    [-1, "seededUniform: seed is -1; it must be a number from 0 to 4294967295"],
    [1.5, "seededUniform: seed is 1.5; it must be a whole number"],
    [NaN, "seededUniform: seed is NaN; it must be a number from 0 to 4294967295"],
  ])("refuses seed %d", (seed, message) => {
    expect(() => seededUniform({ seed })).toThrow(message);
  });
});

describe("latinHypercube", () => {
  it.each([1, 2, 7, 1000, 65_537])("holds exactly one number in each of %d strata", (draws) => {
    for (const column of latinHypercube({ dimensions: 3, draws, seed: 5 })) {
      const strata = column.map((u) => Math.floor(u * draws)).sort();
      expect([...strata]).toEqual(Array.from({ length: draws }, (_, k) => k));
    }
  });

  it("repeats with the seed and not without", () => {
    const sample = { dimensions: 2, draws: 50, seed: 9 };
    expect(latinHypercube(sample)).toEqual(latinHypercube(sample));
    expect(latinHypercube(sample)).not.toEqual(latinHypercube({ ...sample, seed: 10 }));
  });

  it("shuffles its columns independently", () => {
    const draws = 2000;
    const columns = latinHypercube({ dimensions: 12, draws, seed: 3 });
    // The correlation of two independently shuffled columns has standard deviation 1/sqrt(n - 1); of 66 pairs of
    // normal numbers the largest exceeds 4.5 of them once in 2000 seeds.
    const bound = 4.5 / Math.sqrt(draws - 1);
    columns.forEach((a, i) => {
      for (const b of columns.slice(i + 1)) {
        const r = a.reduce((sum, x, k) => sum + (x - 0.5) * (b[k]! - 0.5), 0) / (draws / 12);
        expect(Math.abs(r)).toBeLessThan(bound);
      }
    });
  });

  it("integrates a smooth sum far better than plain draws", () => {
    const draws = 1000;
    const [a, b] = latinHypercube({ dimensions: 2, draws, seed: 11 });
    const mean = a!.reduce((sum, x, k) => sum + Math.exp(x) + b![k]! ** 2, 0) / draws;
    // Plain draws would be off by about 0.02; stratified columns of an additive function by about 1/draws^1.5.
    expect(Math.abs(mean - (Math.E - 1 + 1 / 3))).toBeLessThan(2e-4);
  });

  it.each([
    [
      { dimensions: 0, draws: 1, seed: 1 },
      "latinHypercube: dimensions is 0; it must be a number from 1 to 1000",
    ],
    [{ dimensions: 1, draws: 2.5, seed: 1 }, "latinHypercube: draws is 2.5; it must be a whole number"],
    [
      { dimensions: 1, draws: 1e7, seed: 1 },
      "latinHypercube: draws is 10000000; it must be a number from 1 to 1000000",
    ],
    [
      { dimensions: 1, draws: 2, seed: -1 },
      "latinHypercube: seed is -1; it must be a number from 0 to 4294967295",
    ],
  ])("refuses %j", (input, message) => {
    expect(() => latinHypercube(input)).toThrow(message);
  });
});
