import { describe, expect, it } from "vitest";
import { bleachingOf } from "../../lib/assess/bleaching.js";
import type { Case } from "../../lib/assess/case.js";
import { workingCurveOf } from "../../lib/assess/cure.js";
import { spotPlanOf, type SpotPlan, type SpotQuestion } from "../../lib/decide/spotPlanOf.js";
import { fitWorkingCurve, planCureDepths } from "../../lib/models/cure.js";
import { normalQuantile } from "../../lib/numerics/distributions.js";
import { seededUniform } from "../../lib/numerics/sampling.js";
import { brief, formulationOf, shelf } from "../fixtures.js";

const work: Case = { formulation: formulationOf({ THIN: 98.9, PI: 1, AB: 0.1 }), brief, shelf };
const films: SpotQuestion = {
  thinnestFilm_um: 40,
  thickestFilm_um: 120,
  scatter_um: 6,
  relativeU: 0.1,
  longestTime_s: 1e6,
};
const ask = (change: Partial<SpotQuestion> = {}, of: Case = work): SpotPlan =>
  spotPlanOf({ ...of, ...films, ...change, draws: 100 });
const planned = (plan: SpotPlan): SpotPlan & { outcome: "planned" } => {
  if (plan.outcome !== "planned") throw new Error(plan.reason);
  return plan;
};
const codesOf = ({ warnings }: SpotPlan): string[] => warnings.map(({ code }) => code);
const longest = ({ spots }: { spots: readonly { exposure_mJcm2: number }[] }): number =>
  Math.max(...spots.map(({ exposure_mJcm2 }) => exposure_mJcm2));

const curve = workingCurveOf({ ...work, draws: 40 });
const guess = {
  penetrationDepth_um: curve.penetrationDepth_um.value,
  criticalExposure_mJcm2: curve.criticalExposure_mJcm2.value,
};

describe("spotPlanOf", () => {
  it("is the plan on the guessed working curve, with its two ends cured again", () => {
    const { spots } = planned(ask());
    const { exposures_mJcm2, cureDepths_um } = planCureDepths({ ...guess, ...films });
    const first = spots.filter(({ repeat }) => !repeat);
    first.forEach(({ exposure_mJcm2, cureDepth_um, time_s }, i) => {
      expect(exposure_mJcm2).toBeCloseTo(exposures_mJcm2[i]!, 9);
      expect(cureDepth_um).toBeCloseTo(cureDepths_um[i]!, 9);
      expect(time_s).toBeCloseTo(exposure_mJcm2 / brief.light.irradiance_mWcm2.value, 12);
    });
    const again = spots.slice(first.length);
    expect(again).toEqual([first[0]!, first.at(-1)!].map((one) => ({ ...one, repeat: true })));
  });

  it("has six spots or more, however little is wanted", () => {
    expect(planned(ask({ relativeU: 0.5 })).spots.length).toBeGreaterThanOrEqual(6);
  });

  it("stops where half of the initiator is gone, and says so", () => {
    const plan = planned(ask({ thickestFilm_um: 600 }));
    const { bleachedShare } = bleachingOf({ ...work, exposure_mJcm2: longest(plan), draws: 100 });
    expect(bleachedShare.value).toBeCloseTo(0.5, 9);
    expect(plan.bleachedShare).toEqual(bleachedShare);
    expect(codesOf(plan)).toContain("held-by-bleaching");
    expect(plan.warnings[0]!.message).toMatch(
      /^A film of 600 µm would take [\d.e+]+ mJ\/cm², after which \d+ % of the initiator at the window is gone\. The spots stop at [\d.]+ mJ\/cm², \d+ µm, where half of it is: beyond, depths bend away from a straight working curve\.$/,
    );
  });

  it("takes no spot longer than allowed, and says so", () => {
    const free = planned(ask());
    expect(codesOf(free)).not.toContain("held-by-time");
    const longestTime_s = 0.6 * Math.max(...free.spots.map(({ time_s }) => time_s));
    const plan = planned(ask({ longestTime_s }));
    expect(Math.max(...plan.spots.map(({ time_s }) => time_s))).toBeCloseTo(longestTime_s, 9);
    expect(plan.warnings[0]).toEqual({
      code: "held-by-time",
      message: expect.stringMatching(
        /^A film of 120 µm would take [\d.]+ s\. The spots stop at [\d.]+ mJ\/cm², [\d.]+ µm, after [\d.]+ s, the longest time allowed\.$/,
      ) as string,
    });
  });

  it("says when no film reaches as deep as a layer is to cure", () => {
    const thick = { ...work, brief: { ...brief, layerThickness_um: 100 } };
    const { warnings } = ask({}, thick);
    expect(warnings.find(({ code }) => code === "short-of-layer")!.message).toBe(
      "A layer is to cure 150 µm deep, and the thickest film is 120 µm: the curve is extended beyond its readings.",
    );
    expect(codesOf(ask())).not.toContain("short-of-layer");
  });

  it("plans nothing where not even the thinnest film comes in time", () => {
    const plan = ask({ longestTime_s: 0.01 });
    expect(plan.outcome === "impossible" && plan.reason).toBe(
      "No film of 40 µm is expected before that: take more light or initiator, or less absorber.",
    );
    expect(codesOf(plan)).toEqual(["held-by-time"]);
  });

  it("promises what repeated series then show", () => {
    const { spots, penetrationDepth, criticalExposure } = planned(ask());
    const uniform = seededUniform({ seed: 5 });
    const fits = Array.from({ length: 1500 }, () =>
      fitWorkingCurve({
        exposures_mJcm2: spots.map(({ exposure_mJcm2 }) => exposure_mJcm2),
        cureDepths_um: spots.map(
          ({ cureDepth_um }) => cureDepth_um + films.scatter_um * normalQuantile({ probability: uniform() }),
        ),
        level: 0.95,
      }),
    );
    const spread = (values: readonly number[]): number => {
      const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
      return Math.sqrt(values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / values.length);
    };
    const Dp = spread(fits.map((fit) => fit.penetrationDepth_um.value / guess.penetrationDepth_um));
    const lnEc = spread(fits.map((fit) => Math.log(fit.criticalExposure_mJcm2.value)));
    // A standard deviation from 1500 runs is known to 1.8 %.
    expect(Math.abs(Dp / penetrationDepth.relativeU - 1)).toBeLessThan(0.06);
    expect(Math.abs(lnEc / criticalExposure.relativeU - 1)).toBeLessThan(0.06);
  });

  it.each([
    [{ longestTime_s: 0 }, "spotPlanOf: longestTime_s is 0; it must be a finite number above 0"],
    [{ thickestFilm_um: 40 }, "planCureDepths: thickestFilm_um is 40; it must be above thinnestFilm_um, 40"],
    [{ relativeU: 5 }, "planCureDepths: relativeU is 5; it must be a number above 0 and at most 0.5"],
  ])("refuses %j", (change, message) => {
    expect(() => ask(change)).toThrow(message);
  });
});
