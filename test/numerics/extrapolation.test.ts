import { describe, expect, it } from "vitest";
import { extrapolatedEuler, type EulerProblem, type Stretch } from "../../lib/numerics/extrapolation.js";

/** dy/dt = rate (target - y) for each element: as stiff as the rates. */
function relaxation(rates: readonly number[], target: number, tolerance: number): EulerProblem {
  const state = new Float64Array(rates.length);
  return {
    state,
    start: () => undefined,
    partStep(u, h) {
      for (let i = 0; i < u.length; i++) u[i]! += (h * rates[i]! * (target - u[i]!)) / (1 + h * rates[i]!);
    },
    difference: (a, b) => Math.max(...a.map((value, i) => Math.abs(value - b[i]!))),
    tolerance,
  };
}

const stretch = (change: Partial<Stretch> = {}): Stretch => ({
  duration: 1,
  firstStep: 1e-3,
  stepLimit: 10_000,
  afterStep: () => undefined,
  ...change,
});

describe("extrapolatedEuler", () => {
  it("follows rates from 1 to 1e12 with few steps, to about the tolerance", () => {
    for (const tolerance of [1e-3, 1e-5, 1e-7, 1e-9]) {
      const problem = relaxation([1, 30, 1e4, 1e12], 2, tolerance);
      const report = extrapolatedEuler(problem)(stretch());
      expect(report.outcome).toBe("reached");
      expect(report.time).toBe(1);
      expect(report.accepted).toBeLessThan(150);
      [1, 30, 1e4, 1e12].forEach((rate, i) =>
        expect(Math.abs(problem.state[i]! - 2 * -Math.expm1(-rate))).toBeLessThan(20 * tolerance),
      );
    }
  });

  it("gains an order with each power of ten below 1e-4", () => {
    // One step for y' = 1 - y, then one of half its length: the errors stand as 2^3, 2^5, 2^7, within a third.
    for (const [tolerance, order] of [
      [1e-4, 2],
      [1e-6, 4],
      [1e-8, 6],
    ] as const) {
      const error = (duration: number): number => {
        // A huge difference allowed for, so that the one step is taken as it is: the order follows from tolerance alone.
        const problem = { ...relaxation([1], 1, tolerance), difference: () => 0 };
        extrapolatedEuler(problem)(stretch({ duration, firstStep: duration }));
        return Math.abs(problem.state[0]! + Math.expm1(-duration));
      };
      expect(Math.log2(error(0.1) / error(0.05))).toBeGreaterThan(order + 1 - 0.4);
      expect(Math.log2(error(0.1) / error(0.05))).toBeLessThan(order + 1 + 0.4);
    }
  });

  it("conserves what the part-step conserves", () => {
    const problem: EulerProblem = {
      state: Float64Array.of(1, 0),
      start: () => undefined,
      partStep(u, h) {
        const moved = (h * 50 * u[0]!) / (1 + h * 50);
        u[0]! -= moved;
        u[1]! += moved;
      },
      difference: (a, b) => Math.abs(a[0]! - b[0]!),
      tolerance: 1e-6,
    };
    extrapolatedEuler(problem)(stretch());
    expect(problem.state[0]! + problem.state[1]!).toBeCloseTo(1, 13);
  });

  it("ends exactly at the end, tells each accepted step, and takes less than the first step if that is all there is", () => {
    const times: number[] = [];
    extrapolatedEuler(relaxation([3], 1, 1e-4))(
      stretch({ duration: 0.7, afterStep: (time) => times.push(time) }),
    );
    expect(times.at(-1)).toBe(0.7);
    expect(times.every((time, i) => i === 0 || time > times[i - 1]!)).toBe(true);
    const short = extrapolatedEuler(relaxation([3], 1, 1e-4))(stretch({ duration: 1e-6 }));
    expect(short.accepted).toBe(1);
  });

  it("stops at the step limit, and where no step is short enough, and says where", () => {
    const limited = extrapolatedEuler(relaxation([3], 1, 1e-6))(stretch({ stepLimit: 5 }));
    expect(limited).toMatchObject({ outcome: "too-many-steps" });
    expect(limited.accepted + limited.rejected).toBe(5);
    expect(limited.time).toBeLessThan(1);
    const broken = { ...relaxation([3], 1, 1e-6), difference: () => NaN };
    const report = extrapolatedEuler(broken)(stretch());
    expect(report).toMatchObject({ outcome: "step-too-small", time: 0, accepted: 0 });
    expect(report.rejected).toBeLessThan(20);
  });
});
