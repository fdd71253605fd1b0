import { describe, expect, it } from "vitest";
import { doubtShares, intervalOf, propagate, startDraws, type Uncertain } from "../../lib/assess/doubt.js";
import { sure } from "../fixtures.js";

const input = (
  label: string,
  value: number,
  u: number,
  spread: Uncertain["spread"] = "signed",
): Uncertain => ({
  ...sure(value, u),
  label,
  spread,
});
const run = (inputs: Uncertain[], model: (values: number[]) => number, seed = 1, draws = 20000) => {
  const started = startDraws({ draws, seed });
  const { stated, outcomes } = propagate((read) => model(inputs.map(read)), started);
  return intervalOf({ stated, values: outcomes, level: 0.95 });
};
const add = (values: number[]) => values.reduce((a, b) => a + b, 0);
const four = (spread: Uncertain["spread"]) => ["a", "b", "c", "d"].map((label) => input(label, 0, 1, spread));

describe("propagate", () => {
  // JCGM 101:2008, 9.2.2 (from memory; the figure is 1.96 times 2): four normal inputs with u = 1 add up to a 95 % interval of ±3.92.
  // 20 000 draws place a 97.5 % quantile of a standard deviation of 2 within 0.06 (two standard errors).
  it("gives the additive normal example of JCGM 101", () => {
    const { low, high } = run(four("signed"), add);
    expect(Math.abs(high - 3.92)).toBeLessThan(0.06);
    expect(Math.abs(low + 3.92)).toBeLessThan(0.06);
  });

  // JCGM 101:2008, 9.2.3 (from memory; the closed form is exact): the same with uniform inputs, exactly ±2√3 (2 - (3/5)^(1/4)) = ±3.88.
  it("gives the additive uniform example of JCGM 101", () => {
    const exact = 2 * Math.sqrt(3) * (2 - 0.6 ** 0.25);
    const { low, high } = run(four("flat"), add);
    expect(Math.abs(high - exact)).toBeLessThan(0.06);
    expect(Math.abs(low + exact)).toBeLessThan(0.06);
  });

  // Log-normal with median m and relative u: its 97.5 % quantile is m exp(1.95996 sqrt(ln(1 + u²))).
  it("spreads a positive quantity about its median and never below zero", () => {
    const { value, low, high } = run([input("p", 10, 10, "positive")], ([p]) => p!);
    const factor = Math.exp(1.959964 * Math.sqrt(Math.log(2)));
    expect(value).toBe(10);
    expect(Math.abs(high / (10 * factor) - 1)).toBeLessThan(0.05);
    expect(Math.abs((low * factor) / 10 - 1)).toBeLessThan(0.05);
    expect(low).toBeGreaterThan(0);
  });

  it("moves two uses of one label together", () => {
    const twice = run([input("x", 5, 1), input("x", 5, 1)], ([a, b]) => a! - b!);
    expect([twice.low, twice.high]).toEqual([0, 0]);
  });

  it("stops at what the quantity cannot exceed", () => {
    const { high } = run([{ ...input("x", 1, 1, "positive"), max: 2 }], ([x]) => x!);
    expect(high).toBe(2);
  });

  it("leaves a sure input where it is", () => {
    expect(run([input("x", 5, 0)], ([x]) => x!)).toEqual({ value: 5, low: 5, high: 5, level: 0.95 });
  });

  it("gives the same answer for the same seed and another for another", () => {
    expect(run(four("signed"), add, 7, 100)).toEqual(run(four("signed"), add, 7, 100));
    expect(run(four("signed"), add, 7, 100)).not.toEqual(run(four("signed"), add, 8, 100));
  });
});

describe("doubtShares", () => {
  it("gives each input its part of the variance of a linear model, and leaves out what has none", () => {
    const inputs = [input("large", 0, 3), input("small", 0, 1), input("idle", 0, 1)];
    const draws = startDraws({ draws: 5000 });
    const { outcomes } = propagate(
      (read) => read(inputs[0]!) + read(inputs[1]!) + 0 * read(inputs[2]!),
      draws,
    );
    const shares = doubtShares(outcomes, inputs, draws);
    expect(shares.map(({ label }) => label)).toEqual(["large", "small"]);
    // Variances are 9 and 1; ranks and 5000 draws blur the shares by about 0.01.
    expect(Math.abs(shares[0]!.share - 0.9)).toBeLessThan(0.02);
    expect(shares[0]!.share + shares[1]!.share).toBeCloseTo(1, 12);
  });
});

describe("startDraws", () => {
  it.each([
    [{ draws: 5 }, "assess: draws is 5; it must be a number from 20 to 1000000; 2000 is usual"],
    [{ level: 95 }, "assess: level is 95; it must be a number from 0.5 to 0.999"],
    [{ seed: -1 }, "assess: seed is -1; it must be a number from 0 to 4294967295"],
    [{ draws: NaN }, "assess: draws is NaN"],
  ])("refuses %j", (options, message) => {
    expect(() => startDraws(options)).toThrow(message);
  });
});
