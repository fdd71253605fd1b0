import { describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import { cureModel, workingCurveOf } from "../../lib/assess/cure.js";
import { propagate, startDraws } from "../../lib/assess/doubt.js";
import type { Case } from "../../lib/assess/case.js";
import { calibrate } from "../../lib/decide/calibrate.js";
import { fitCureDepths, workingCurveFrom } from "../../lib/decide/workingCurveFrom.js";
import type { CureDepthSeries } from "../../lib/recipe/cureDepths.js";
import { massFractionOf, withMassFraction } from "../../lib/recipe/formulation.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const parts = { THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 };
const exposures = [8, 12, 12, 20, 35, 35, 60, 100];
/** Depths of a curve with Dp 100 um and Ec 5 mJ/cm2, off by the given um. */
const spotsOff = (errors: readonly number[]) =>
  exposures.map((exposure_mJcm2, i) => ({
    exposure_mJcm2,
    cureDepth_um: 100 * Math.log(exposure_mJcm2 / 5) + errors[i]!,
    reading: "measured" as const,
  }));
// Drawn once from a normal distribution with a standard deviation of 4 um.
const scatter = [2.1, -4.7, 3.3, 0.8, -2.9, 5.6, -3.8, 1.4];
const series: CureDepthSeries = {
  id: "s1",
  kind: "cure depths",
  formulation: "test",
  parts: Object.entries(parts).map(([ingredient, mass_pct]) => ({ ingredient, mass_pct })),
  light: { spectrum: "lamp", irradiance_mWcm2: sure(8, 0.8) },
  depthU_um: 1,
  spots: spotsOff(scatter),
  source: "constructed for a test",
  status: "invented for the demo",
};
const bare: Case = { formulation: formulationOf(parts), brief, shelf };
const withSeries = (change: Partial<CureDepthSeries> = {}): Case => ({
  ...bare,
  shelf: { ...shelf, cureDepths: [{ ...series, ...change }] },
});
const codes = (work: Case) =>
  workingCurveOf({ ...work, draws: 50 }).layerTime_s.warnings.map(({ code }) => code);
const width = ({ low, high }: { low: number; high: number }) => high / low;

describe("cure depths against what their ingredients let expect", () => {
  const warned = (change: Partial<CureDepthSeries>) =>
    workingCurveOf({ ...calibrate(withSeries(change)), draws: 50 }).layerTime_s.warnings.flatMap(
      ({ code, message }) => (code === "reading-contradicts" ? [message] : []),
    );

  it("says that exposures in joule, or depths far too small, stand far off, with both values", () => {
    expect(warned({})).toEqual([]);
    const inJoule = series.spots.map((one) => ({ ...one, exposure_mJcm2: one.exposure_mJcm2 / 1000 }));
    expect(warned({ spots: inJoule })).toEqual([
      expect.stringMatching(
        /^0\.0049\d* mJ\/cm² of critical exposure measured by s1 stands against [\d.]+ \([\d.]+ to [\d.]+\) mJ\/cm², which its ingredients let expect\. Check the unit of exposure_mJcm2 and the irradiance before you trust/,
      ),
    ]);
    // A hundredth: depths in millimetre are refused where they are read.
    const shallow = series.spots.map((one) => ({ ...one, cureDepth_um: one.cureDepth_um! / 100 }));
    expect(warned({ spots: shallow, depthU_um: 0.01 })).toEqual([
      expect.stringMatching(
        /^[\d.]+ µm of penetration depth measured by s1 stands against .* µm, which its ingredients let expect\. Check the unit of cureDepth_um/,
      ),
    ]);
  });

  it("says nothing of a curve that is not used", () => {
    const inJoule = series.spots.map((one) => ({ ...one, exposure_mJcm2: one.exposure_mJcm2 / 1000 }));
    expect(warned({ spots: inJoule, light: { ...series.light, spectrum: "other" } })).toEqual([]);
  });

  it("refuses depths whose doubt leaves the critical exposure open", () => {
    const spots = series.spots.map((one) => ({ ...one, cureDepth_um: one.cureDepth_um! / 1000 }));
    expect(() => workingCurveFrom({ ...series, spots, depthU_um: 4 })).toThrow(
      "s1: with depthU_um 4 its depths leave the critical exposure open without bound; check the unit of depthU_um and cureDepth_um, or measure deeper spots",
    );
  });
});

describe("workingCurveFrom", () => {
  it.each([3, 4])("refuses %d depths: a doubt needs more", (count) => {
    expect(() => workingCurveFrom({ ...series, spots: series.spots.slice(0, count) })).toThrow(
      `s1: ${count} depths leave ${count - 2} degrees of freedom; a working curve with its doubt needs 3: measure at least 5 depths`,
    );
  });

  // Constructed without scatter: the curve that made the depths comes back, with no doubt of its own.
  it("finds the curve that made the depths", () => {
    const { penetrationDepth_um, criticalExposure_mJcm2 } = workingCurveFrom({
      ...series,
      spots: spotsOff(exposures.map(() => 0)),
    });
    expect(penetrationDepth_um.value).toBeCloseTo(100, 9);
    expect(criticalExposure_mJcm2.value).toBeCloseTo(5, 9);
    expect(penetrationDepth_um.source).toBe("working curve through 8 spots of s1: constructed for a test");
    expect(penetrationDepth_um.status).toBe("invented for the demo");
  });

  it("leaves floated films out, whatever they say, and takes bounds for bounds", () => {
    const odd = { exposure_mJcm2: 200, cureDepth_um: 30, reading: "floated" as const };
    const bound = { exposure_mJcm2: 6, cureDepth_um: 30, reading: "at-most" as const };
    const plain = workingCurveFrom(series).penetrationDepth_um;
    expect(workingCurveFrom({ ...series, spots: [...series.spots, odd] }).penetrationDepth_um).toEqual(plain);
    expect(fitCureDepths({ ...series, spots: [...series.spots, bound] }).points).toBe(9);
  });

  it("does not trust the slope further than the gauge: scatter below its u counts as u", () => {
    const uOf = (depthU_um: number) => workingCurveFrom({ ...series, depthU_um }).penetrationDepth_um.u;
    const seen = fitCureDepths(series).residualStandardDeviation_um;
    expect(uOf(seen / 2)).toBe(uOf(seen / 4));
    expect(uOf(2 * seen) / uOf(seen)).toBeCloseTo(2, 12);
  });

  it("names the series when its depths cannot be fitted, and in what the fit warns of", () => {
    const falling = series.spots.map((spot) => ({ ...spot, cureDepth_um: 400 - spot.cureDepth_um! }));
    expect(() => workingCurveFrom({ ...series, spots: falling })).toThrow(
      "s1: fitWorkingCurve: the cure depth does not rise with exposure",
    );
    const narrow = spotsOff(scatter).map((spot, i) => ({ ...spot, exposure_mJcm2: 20 + i }));
    const warning = workingCurveFrom({ ...series, spots: narrow }).warnings[0]!;
    expect(warning.message).toMatch(/^s1: the exposures span a factor of 1\.4/);
  });
});

describe("calibrate with cure depths", () => {
  it("puts the measured curve in the place of the estimate", () => {
    const {
      penetrationDepth_um: Dp,
      criticalExposure_mJcm2: Ec,
      layerExposure_mJcm2: E,
    } = workingCurveOf(calibrate(withSeries()));
    const fit = fitCureDepths(series);
    expect(Dp.value).toBeCloseTo(fit.penetrationDepth_um.value, 12);
    expect(Ec.value).toBeCloseTo(fit.criticalExposure_mJcm2.value, 12);
    expect(E.value).toBeCloseTo(Ec.value * Math.exp(75 / Dp.value), 10);
    expect(E.sources.map(({ figure }) => figure)).toEqual([
      "critical exposure of s1",
      "irradiance at the window",
      "penetration depth of s1",
    ]);
    expect(E.warnings).toEqual([]);
  });

  it("covers the truth, in an interval much narrower than the estimate's", () => {
    const [before, after] = [workingCurveOf(bare), workingCurveOf(calibrate(withSeries()))];
    for (const [name, truth] of [
      ["penetrationDepth_um", 100],
      ["criticalExposure_mJcm2", 5],
    ] as const) {
      expect(after[name].low).toBeLessThan(truth);
      expect(after[name].high).toBeGreaterThan(truth);
      expect(Math.log(width(after[name]))).toBeLessThan(0.5 * Math.log(width(before[name])));
    }
  });

  // Six degrees of freedom: the normal draws are widened by sqrt(6/4) = 1.22, where Student's quantile over the normal one is
  // 2.447/1.960 = 1.25; 2000 draws place the ends within a few percent.
  it("has the interval of the fit for the penetration depth", () => {
    const { penetrationDepth_um: fit } = fitCureDepths(series);
    const { penetrationDepth_um: drawn } = workingCurveOf(calibrate(withSeries()));
    expect(Math.abs((drawn.high - drawn.low) / (fit.high - fit.low) - 1)).toBeLessThan(0.07);
  });

  // In the middle of the measured exposures depth and exposure are known best, because the errors of Dp and Ec go together:
  // by the delta method u(ln E)^2 = varE + (z/Dp^2)^2 varD - 2 (z/Dp^2) cov, z the cure depth. Without cov it is larger.
  it("carries the covariance: the exposure for a measured depth is known better than its parts", () => {
    const sureLight = {
      ...brief,
      light: { ...brief.light, irradiance_mWcm2: sure(8) },
      cureDepthPerLayer: 3,
    };
    const work = { ...calibrate(withSeries()), brief: sureLight };
    const { covariance, penetrationDepth_um: Dp } = fitCureDepths(series);
    const [[varD, cov], [, varE]] = covariance;
    const lever = 150 / Dp.value ** 2;
    const together = varE + lever ** 2 * varD - 2 * lever * cov;
    const apart = varE + lever ** 2 * varD;
    const { outcomes } = propagate(cureModel(work), startDraws({ draws: 4000 }));
    const logs = outcomes.map(({ layerExposure_mJcm2 }) => Math.log(layerExposure_mJcm2));
    const mean = logs.reduce((a, b) => a + b, 0) / logs.length;
    const variance = logs.reduce((sum, one) => sum + (one - mean) ** 2, 0) / (logs.length - 1);
    // 6/4 is the widening for six degrees of freedom; ten percent for 4000 draws of two inputs and the bend of the exponential.
    expect(Math.abs(variance / (1.5 * together) - 1)).toBeLessThan(0.1);
    expect(apart).toBeGreaterThan(5 * together);
  });

  it("takes an error of the meter out of the layer time, for the same meter set the exposures", () => {
    const doubtful = { ...brief, light: { ...brief.light, irradiance_mWcm2: sure(8, 3) } };
    const { layerTime_s, layerExposure_mJcm2 } = workingCurveOf({
      ...calibrate(withSeries()),
      brief: doubtful,
    });
    expect(width(layerExposure_mJcm2)).toBeGreaterThan(3);
    expect(width(layerTime_s)).toBeLessThan(1.2);
  });

  it("changes nothing without a series, and nothing before calibrate", () => {
    const input = { ...bare, draws: 100 };
    const { shelf: stocked } = withSeries();
    expect(assess({ ...calibrate(bare), draws: 100 })).toEqual(assess(input));
    expect(assess({ ...input, shelf: stocked })).toEqual(assess(input));
  });

  it.each<[string, Partial<CureDepthSeries>, string]>([
    [
      "engine",
      { light: { ...series.light, spectrum: "lamp-2" } },
      "Cure depths on the shelf are not of this resin under this light and are not used: s1 (another light, lamp-2).",
    ],
    [
      "nominal wavelength",
      { light: { wavelength_nm: sure(405), irradiance_mWcm2: sure(8) } },
      "Cure depths on the shelf are not of this resin under this light and are not used: s1 (another light, 405 nm).",
    ],
    [
      "resin",
      { parts: [...series.parts.slice(1), { ingredient: "MID", mass_pct: 60 }] },
      "Cure depths on the shelf are not of this resin under this light and are not used: s1 (another resin).",
    ],
  ])("does not use a series of another %s, and says why", (_, change, message) => {
    const work = calibrate(withSeries(change));
    const { layerTime_s } = workingCurveOf({ ...work, draws: 100 });
    expect(layerTime_s.value).toBe(workingCurveOf({ ...bare, draws: 100 }).layerTime_s.value);
    expect(layerTime_s.warnings.map(({ code }) => code)).toEqual([
      "working-curve-estimated",
      "cure-depths-of-another",
    ]);
    expect(layerTime_s.warnings[1]!.message).toBe(message);
  });

  it("is carried over to other amounts by the ratio of the estimates, and says so", () => {
    const more = (work: Case) => ({
      ...work,
      formulation: withMassFraction(work.formulation, { id: "AB", massFraction: 0.002 }),
    });
    const work = calibrate(withSeries());
    const [here, there] = [workingCurveOf(work), workingCurveOf(more(work))];
    const [plainHere, plainThere] = [workingCurveOf(bare), workingCurveOf(more(bare))];
    const ratio = (a: { value: number }, b: { value: number }) => a.value / b.value;
    for (const name of ["penetrationDepth_um", "criticalExposure_mJcm2"] as const)
      expect(ratio(there[name], here[name])).toBeCloseTo(ratio(plainThere[name], plainHere[name]), 12);
    expect(width(there.penetrationDepth_um)).toBeGreaterThan(width(here.penetrationDepth_um));
    expect(width(there.penetrationDepth_um)).toBeLessThan(width(plainThere.penetrationDepth_um));
    expect(there.layerTime_s.warnings[0]).toEqual({
      code: "working-curve-carried-over",
      message:
        "The working curve was measured with 0.1 % AB (s1) and is carried over by the models. Measure again before printing.",
    });
  });

  // Oxygen costs the same exposure whatever the irradiance and the way to the gel costs its root more, so the ratio of the
  // critical exposures at two irradiances lies between 1 and the root of their ratio.
  it("is carried over to another irradiance", () => {
    const at = (value: number) => ({ ...brief, light: { ...brief.light, irradiance_mWcm2: sure(value, 0) } });
    const work = calibrate(withSeries());
    const Ec = (value: number) =>
      workingCurveOf({ ...work, brief: at(value), draws: 50 }).criticalExposure_mJcm2;
    const change = Ec(32).value / Ec(8).value;
    expect(change).toBeGreaterThan(1.001);
    expect(change).toBeLessThan(2);
    expect(Ec(32).warnings[0]!.message).toContain("measured with 8 in place of 32 mW/cm²");
    expect(Ec(8.1).warnings).toEqual([]);
  });

  it("takes the series of these amounts before one of others, and the latest of equals", () => {
    const other = {
      ...series,
      id: "other",
      parts: series.parts.map((one, i) => ({ ...one, mass_pct: one.mass_pct + [0.5, -0.5, 0, 0][i]! })),
    };
    const again = { ...series, id: "again", spots: spotsOff(scatter.map((one) => -one)) };
    const work = (cureDepths: CureDepthSeries[]) => calibrate({ ...bare, shelf: { ...shelf, cureDepths } });
    const used = (cureDepths: CureDepthSeries[]) =>
      workingCurveOf({ ...work(cureDepths), draws: 50 }).penetrationDepth_um.sources[0]!.figure;
    expect(used([series, other])).toBe("penetration depth of s1");
    expect(used([series, again])).toBe("penetration depth of again");
  });

  it("warns when the layer lies beyond the measured depths, and passes on what the fit warns of", () => {
    const deep = { ...calibrate(withSeries()), brief: { ...brief, layerThickness_um: 300 } };
    expect(codes(deep)).toEqual(["beyond-measured-depths"]);
    expect(workingCurveOf({ ...deep, draws: 50 }).layerTime_s.warnings[0]!.message).toBe(
      "A layer is to cure 450 µm deep; s1 measured 49.1 to 301 µm. The curve is extended beyond its readings: add spots there.",
    );
    const far = series.spots.map((spot) => ({ ...spot, exposure_mJcm2: 100 * spot.exposure_mJcm2 ** 0.5 }));
    expect(codes(calibrate(withSeries({ spots: far })))).toContain("narrow-exposure-range");
  });

  it("knows its own resin when lots of one ingredient stand in it, or when an amount is gone", () => {
    const work = calibrate(withSeries());
    const none = { ...work, formulation: withMassFraction(work.formulation, { id: "AB", massFraction: 0 }) };
    expect(massFractionOf(none.formulation, "AB")).toBe(0);
    expect(codes(none)).toEqual(["working-curve-carried-over"]);
    const halves = work.formulation.components.flatMap((one) => {
      const half = { ...one, massFraction: one.massFraction / 2 };
      return one.ingredient.id === "THICK" ? [half, half] : [one];
    });
    expect(codes({ ...work, formulation: { ...work.formulation, components: halves } })).toEqual([]);
  });
});
