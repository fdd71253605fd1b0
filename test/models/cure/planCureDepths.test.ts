import { describe, expect, it } from "vitest";
import {
  cureDepth,
  fitWorkingCurve,
  planCureDepths,
  type CureDepthQuestion,
} from "../../../lib/models/cure.js";
import { normalQuantile } from "../../../lib/numerics/distributions.js";
import { seededUniform } from "../../../lib/numerics/sampling.js";

const question: CureDepthQuestion = {
  penetrationDepth_um: 100,
  criticalExposure_mJcm2: 5,
  thinnestFilm_um: 40,
  thickestFilm_um: 300,
  scatter_um: 8,
  relativeU: 0.05,
};
const plan = (change: Partial<CureDepthQuestion> = {}) => planCureDepths({ ...question, ...change });

describe("planCureDepths", () => {
  it("spreads the exposures in equal factors between the thinnest and the thickest film", () => {
    const { exposures_mJcm2, cureDepths_um, warnings } = plan();
    expect(cureDepths_um[0]).toBe(40);
    expect(cureDepths_um.at(-1)).toBeCloseTo(300, 10);
    const factors = exposures_mJcm2.slice(1).map((E, i) => E / exposures_mJcm2[i]!);
    for (const factor of factors) expect(factor).toBeCloseTo(factors[0]!, 10);
    exposures_mJcm2.forEach((exposure_mJcm2, i) =>
      expect(cureDepth({ ...question, exposure_mJcm2 })).toBeCloseTo(cureDepths_um[i]!, 9),
    );
    expect(warnings).toEqual([]);
  });

  it("takes no more exposures than needed, and never fewer than 5", () => {
    const { exposures_mJcm2, penetrationDepth, criticalExposure } = plan();
    expect(Math.max(penetrationDepth.relativeU, criticalExposure.relativeU)).toBeLessThanOrEqual(0.05);
    const looser = plan({ relativeU: 0.055 });
    expect(looser.exposures_mJcm2.length).toBeLessThan(exposures_mJcm2.length);
    expect(Math.max(looser.penetrationDepth.relativeU, looser.criticalExposure.relativeU)).toBeGreaterThan(
      0.05,
    );
    expect(plan({ relativeU: 0.5 }).exposures_mJcm2).toHaveLength(5);
  });

  it("promises what repeated series then show", () => {
    const { exposures_mJcm2, cureDepths_um, penetrationDepth, criticalExposure } = plan();
    const uniform = seededUniform({ seed: 22 });
    const fits = Array.from({ length: 1500 }, () =>
      fitWorkingCurve({
        exposures_mJcm2,
        cureDepths_um: cureDepths_um.map((d) => d + 8 * normalQuantile({ probability: uniform() })),
        level: 0.95,
      }),
    );
    const spread = (values: readonly number[]): number => {
      const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
      return Math.sqrt(values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / values.length);
    };
    const Dp = spread(fits.map((fit) => fit.penetrationDepth_um.value / 100));
    const lnEc = spread(fits.map((fit) => Math.log(fit.criticalExposure_mJcm2.value)));
    // A standard deviation from 1500 runs is known to 1.8 %.
    expect(Math.abs(Dp / penetrationDepth.relativeU - 1)).toBeLessThan(0.06);
    expect(Math.abs(lnEc / criticalExposure.relativeU - 1)).toBeLessThan(0.06);
  });

  it("warns of films that cannot show enough", () => {
    const codes = (change: Partial<CureDepthQuestion>): string[] =>
      plan(change).warnings.map(({ code }) => code);
    expect(codes({ thickestFilm_um: 150, relativeU: 0.5 })).toEqual(["narrow-exposure-range"]);
    expect(codes({ thinnestFilm_um: 180, thickestFilm_um: 400, relativeU: 0.5 })).toEqual([
      "far-from-critical",
    ]);
    expect(plan({ scatter_um: 60 }).warnings).toEqual([
      {
        code: "wanted-not-reached",
        message: expect.stringMatching(
          /^40 exposures reach a relative uncertainty of 0.2\d, not 0.05: lower the scatter or widen the range$/,
        ) as string,
      },
    ]);
  });

  it.each([
    [{ thickestFilm_um: 40 }, "planCureDepths: thickestFilm_um is 40; it must be above thinnestFilm_um, 40"],
    [{ scatter_um: 0 }, "planCureDepths: scatter_um is 0; it must be a finite number above 0"],
    [{ relativeU: 5 }, "planCureDepths: relativeU is 5; it must be a number above 0 and at most 0.5"],
    [
      { penetrationDepth_um: NaN },
      "planCureDepths: penetrationDepth_um is NaN; it must be a finite number above 0",
    ],
  ])("refuses %j", (change, message) => {
    expect(() => plan(change)).toThrow(message);
  });
});
