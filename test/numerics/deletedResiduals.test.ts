import { describe, expect, it } from "vitest";
import { deletedResidualLimit, deletedResiduals } from "../../lib/numerics/deletedResiduals.js";
import { linearLeastSquares } from "../../lib/numerics/linear.js";
import { seededUniform } from "../../lib/numerics/sampling.js";

const x = [0, 1, 2, 4, 5, 7, 8, 9];
const response = [1.2, 2.9, 5.1, 9.3, 10.8, 14.7, 17.4, 18.8];
const fitOf = (places: number[]) =>
  linearLeastSquares({ design: places.map((i) => [1, x[i]!]), response: places.map((i) => response[i]!) });
const all = x.map((_, i) => i);

describe("deletedResiduals", () => {
  // Identity: the prediction error of a fit without the reading, over its standard error, found by refitting.
  it("is what a fit without the reading says of it", () => {
    const t = deletedResiduals(fitOf(all));
    for (const i of all) {
      const rest = fitOf(all.filter((j) => j !== i));
      const [a, b] = rest.coefficients;
      const [[caa, cab], [, cbb]] = rest.covariance as [[number, number], [number, number]];
      const variance = rest.residualStandardDeviation ** 2 + caa + 2 * x[i]! * cab + x[i]! ** 2 * cbb;
      expect(t[i]).toBeCloseTo((response[i]! - a! - b! * x[i]!) / Math.sqrt(variance), 9);
    }
  });

  it("is 0 where nothing can be said, and where there is no scatter", () => {
    expect(deletedResiduals({ residuals: [1, -1], leverage: [0.5, 0.5], degreesOfFreedom: 1 })).toEqual([
      0, 0,
    ]);
    expect(
      deletedResiduals({ residuals: [0, 0, 0], leverage: [0.5, 0.5, 0.5], degreesOfFreedom: 2 }),
    ).toEqual([0, 0, 0]);
  });

  it("refuses lists of different length", () => {
    expect(() => deletedResiduals({ residuals: [1], leverage: [], degreesOfFreedom: 3 })).toThrow(
      "deletedResiduals",
    );
  });
});

describe("deletedResidualLimit", () => {
  // Student's t, 0.9975 quantile at 7 degrees of freedom: 4.0293 in printed tables (from memory: Fisher & Yates).
  it("is Student's t at the chance shared out over the readings", () => {
    expect(deletedResidualLimit({ points: 10, degreesOfFreedom: 8, chance: 0.05 })).toBeCloseTo(4.0293, 3);
    expect(deletedResidualLimit({ points: 3, degreesOfFreedom: 1, chance: 0.05 })).toBe(Infinity);
  });

  // 400 tables of uniform errors at a chance of 5 %: about 20 alarms, at most 40 (over four standard deviations), for a bound
  // that Bonferroni makes from above.
  it("raises false alarms as rarely as it says", () => {
    const uniform = seededUniform({ seed: 5 });
    const limit = deletedResidualLimit({ points: x.length, degreesOfFreedom: x.length - 2, chance: 0.05 });
    let alarms = 0;
    for (let k = 0; k < 400; k++) {
      const noisy = x.map((one) => 1 + 2 * one + uniform() + uniform() + uniform());
      const fit = linearLeastSquares({ design: x.map((one) => [1, one]), response: noisy });
      if (deletedResiduals(fit).some((t) => Math.abs(t) > limit)) alarms++;
    }
    expect(alarms).toBeLessThanOrEqual(40);
  });

  it("refuses a chance that is none", () => {
    expect(() => deletedResidualLimit({ points: 5, degreesOfFreedom: 3, chance: 2 })).toThrow(
      "deletedResidualLimit: chance is 2; it must be a number from 0 to 1",
    );
  });
});
