import { describe, expect, it } from "vitest";
import { cureDepth, fitWorkingCurve } from "../../../lib/models/cure.js";
import { normalQuantile } from "../../../lib/numerics/distributions.js";
import { seededUniform } from "../../../lib/numerics/sampling.js";

const exposures_mJcm2 = [8, 12, 20, 35, 60, 100];
const truth = { penetrationDepth_um: 100, criticalExposure_mJcm2: 5 };
const exactDepths = exposures_mJcm2.map((exposure_mJcm2) => cureDepth({ ...truth, exposure_mJcm2 }));

describe("fitWorkingCurve", () => {
  it("returns the curve a constructed set was made from", () => {
    // Constructed: Dp 100 um, Ec 5 mJ/cm2; printed depths 47.0004 ... 299.5732 um.
    expect(exactDepths[0]).toBeCloseTo(47.0004, 4);
    expect(exactDepths[5]).toBeCloseTo(299.5732, 4);
    const fit = fitWorkingCurve({ exposures_mJcm2, cureDepths_um: exactDepths, level: 0.95 });
    expect(fit.penetrationDepth_um.value / 100).toBeCloseTo(1, 10);
    expect(fit.criticalExposure_mJcm2.value / 5).toBeCloseTo(1, 10);
    expect(fit.residualStandardDeviation_um).toBeLessThan(1e-10);
    expect(fit.points).toBe(6);
    expect(fit.warnings).toEqual([]);
  });

  it("scales: exposures in another unit scale Ec alone, depths in another unit Dp alone", () => {
    const cureDepths_um = [45, 90, 137, 196, 248, 299];
    const fit = fitWorkingCurve({ exposures_mJcm2, cureDepths_um, level: 0.95 });
    const brighter = fitWorkingCurve({
      exposures_mJcm2: exposures_mJcm2.map((E) => 10 * E),
      cureDepths_um,
      level: 0.95,
    });
    const deeper = fitWorkingCurve({
      exposures_mJcm2,
      cureDepths_um: cureDepths_um.map((d) => 3 * d),
      level: 0.95,
    });
    for (const end of ["value", "low", "high"] as const) {
      expect(brighter.criticalExposure_mJcm2[end] / (10 * fit.criticalExposure_mJcm2[end])).toBeCloseTo(
        1,
        11,
      );
      expect(brighter.penetrationDepth_um[end] / fit.penetrationDepth_um[end]).toBeCloseTo(1, 11);
      expect(deeper.penetrationDepth_um[end] / (3 * fit.penetrationDepth_um[end])).toBeCloseTo(1, 11);
      expect(deeper.criticalExposure_mJcm2[end] / fit.criticalExposure_mJcm2[end]).toBeCloseTo(1, 11);
    }
  });

  it("has an interval of Ec that is symmetric in its logarithm only, and wider for a higher level", () => {
    const cureDepths_um = [40, 95, 130, 200, 240, 305];
    const fit = fitWorkingCurve({ exposures_mJcm2, cureDepths_um, level: 0.95 });
    const { value, low, high, level } = fit.criticalExposure_mJcm2;
    expect(value / low).toBeCloseTo(high / value, 10);
    expect(high - value).toBeGreaterThan(value - low);
    expect(level).toBe(0.95);
    // t(0.975, 4 degrees) = 2.776445 (tables), u from the covariance.
    expect(Math.log(high / value) / Math.sqrt(fit.covariance[1][1])).toBeCloseTo(2.776445, 5);
    const wide = fitWorkingCurve({ exposures_mJcm2, cureDepths_um, level: 0.99 });
    expect(wide.penetrationDepth_um.high).toBeGreaterThan(fit.penetrationDepth_um.high);
    expect(wide.criticalExposure_mJcm2.low).toBeLessThan(low);
  });

  it("states the doubt that repeated measurement shows", () => {
    const sigma_um = 3;
    const uniform = seededUniform({ seed: 20 });
    const runs = Array.from({ length: 6000 }, () => {
      const cureDepths_um = exactDepths.map((d) => d + sigma_um * normalQuantile({ probability: uniform() }));
      return fitWorkingCurve({ exposures_mJcm2, cureDepths_um, level: 0.95 });
    });
    const mean = (f: (run: (typeof runs)[number]) => number): number =>
      runs.reduce((sum, run) => sum + f(run), 0) / runs.length;
    const lnEc = (run: (typeof runs)[number]): number => Math.log(run.criticalExposure_mJcm2.value);
    const Dp = (run: (typeof runs)[number]): number => run.penetrationDepth_um.value;
    const [meanE, meanD] = [mean(lnEc), mean(Dp)];
    const spreadE = Math.sqrt(mean((run) => (lnEc(run) - meanE) ** 2));
    const spreadD = Math.sqrt(mean((run) => (Dp(run) - meanD) ** 2));
    const together = mean((run) => (lnEc(run) - meanE) * (Dp(run) - meanD)) / (spreadE * spreadD);
    // A standard deviation from 6000 runs is known to 1/sqrt(12000), 0.9 %; the delta method itself errs by the square
    // of the relative error of Dp, far less. 5 % holds both five times over.
    expect(Math.abs(spreadE / Math.sqrt(mean((run) => run.covariance[1][1])) - 1)).toBeLessThan(0.05);
    expect(Math.abs(spreadD / Math.sqrt(mean((run) => run.covariance[0][0])) - 1)).toBeLessThan(0.05);
    const stated = mean(
      (run) => run.covariance[0][1] / Math.sqrt(run.covariance[0][0] * run.covariance[1][1]),
    );
    expect(stated).toBeGreaterThan(0.5);
    expect(Math.abs(together - stated)).toBeLessThan(0.02);
    // Coverage of a 95 % interval in 6000 runs: standard deviation 0.28 %.
    const covered = mean(({ criticalExposure_mJcm2: { low, high } }) => (low < 5 && 5 < high ? 1 : 0));
    expect(Math.abs(covered - 0.95)).toBeLessThan(0.015);
  });

  it.each([
    [
      "narrow-exposure-range",
      [8, 12, 16, 20, 30],
      "the exposures span a factor of 3.8; below a factor of 5 the slope is poorly fixed",
    ],
    [
      "far-from-critical",
      [30, 50, 90, 160, 300],
      "the lowest exposure is 6.0 times the critical exposure, which is extrapolated from there; add exposures within 5 times of it",
    ],
    ["few-points", [8, 20, 60, 100], "4 points; with fewer than 5 a curved line passes for a straight one"],
  ])("warns of %s", (code, exposures, message) => {
    const cureDepths_um = exposures.map((exposure_mJcm2) => cureDepth({ ...truth, exposure_mJcm2 }));
    const { warnings } = fitWorkingCurve({ exposures_mJcm2: exposures, cureDepths_um, level: 0.95 });
    expect(warnings).toEqual([{ code, message }]);
  });

  it("warns when the scatter is as large as the slope", () => {
    const { warnings } = fitWorkingCurve({
      exposures_mJcm2,
      cureDepths_um: [150, 60, 200, 90, 210, 180],
      level: 0.95,
    });
    expect(warnings).toContainEqual({
      code: "slope-uncertain",
      message: "the interval of the penetration depth reaches zero; these readings do not show a slope",
    });
  });

  const good = { exposures_mJcm2: [8, 20, 60], cureDepths_um: [47, 139, 248], level: 0.95 };
  it.each([
    [
      { ...good, exposures_mJcm2: [8, 20], cureDepths_um: [47, 139] },
      "fitWorkingCurve: exposures_mJcm2 holds 2 numbers; at least 3 must be given",
    ],
    [
      { ...good, cureDepths_um: [0, 139, 248] },
      "fitWorkingCurve: cureDepths_um[0] is 0; it must be a finite number above 0; leave out exposures that cured nothing: they lie below the critical exposure, not on the line",
    ],
    [
      { ...good, exposures_mJcm2: [20, 20, 20] },
      "fitWorkingCurve: all exposures are 20 mJ/cm2; expose to at least two, better five, different ones",
    ],
    [
      { ...good, cureDepths_um: [248, 139, 47] },
      "fitWorkingCurve: the cure depth does not rise with exposure (-99.2 um per factor e); check that exposures and depths are listed in the same order",
    ],
    [
      { ...good, cureDepths_um: [47, 139] },
      "fitWorkingCurve: exposures_mJcm2 holds 3, cureDepths_um holds 2; the lists must be of the same length",
    ],
    [{ ...good, level: 95 }, "fitWorkingCurve: level is 95; it must be a number from 0.5 to 0.999"],
    [
      { ...good, exposures_mJcm2: [8, NaN, 60] },
      "fitWorkingCurve: exposures_mJcm2[1] is NaN; it must be a finite number above 0",
    ],
    [
      { ...good, cureDepths_um: [100, 100.001, 100.002] },
      "fitWorkingCurve: criticalExposure_mJcm2 is 0; it must be a finite number above 0; the depth hardly rises with exposure, so the line cannot be followed to depth zero; widen the exposures",
    ],
  ])("refuses %j", (readings, message) => {
    expect(() => fitWorkingCurve(readings)).toThrow(message);
  });
});
