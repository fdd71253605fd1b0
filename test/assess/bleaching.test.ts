import { describe, expect, it } from "vitest";
import { bleachingOf } from "../../lib/assess/bleaching.js";
import type { Case } from "../../lib/assess/case.js";
import { workingCurveOf } from "../../lib/assess/cure.js";
import { bleachedCureDepth } from "../../lib/models/cure.js";
import { bleachingExposure } from "../../lib/models/light.js";
import { openBrief } from "../../lib/recipe/files.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const work: Case = { formulation: formulationOf({ THIN: 98.9, PI: 1, AB: 0.1 }), brief, shelf };
const of = (exposure_mJcm2?: number, change: Partial<Case> = {}) =>
  bleachingOf({
    ...work,
    ...change,
    draws: 200,
    ...(exposure_mJcm2 === undefined ? {} : { exposure_mJcm2 }),
  });
const yielding = (bleachingYield: number, u = 0) => ({
  shelf: { ...shelf, constants: { ...shelf.constants, bleachingYield: sure(bleachingYield, u) } },
});

describe("bleachingOf", () => {
  // 0.025 mol/L of 500 L/(mol cm) beside 0.0025 mol/L of 10000 and a background of 1 per cm, alike at all wavelengths; the mean
  // wavelength of the flat engine by photons is (380^2 + 2 400^2 + 420^2) / (380 + 800 + 420) nm.
  it("compares the model's two depths at the stated figures", () => {
    const exposure_mJcm2 = 400;
    const criticalExposure_mJcm2 = workingCurveOf({ ...work, draws: 40 }).criticalExposure_mJcm2.value;
    const otherAbsorption_percm = Math.LN10 * 10000 * 0.0025 + 1;
    const bleaching = {
      concentration_molL: 0.025,
      molarAbsorption_Lmolcm: 500,
      quantumYield: 0.6,
      wavelength_nm: (380 ** 2 + 2 * 400 ** 2 + 420 ** 2) / 1600,
    };
    const depth = bleachedCureDepth({
      ...bleaching,
      otherAbsorption_percm,
      exposure_mJcm2,
      criticalExposure_mJcm2,
    });
    const straight =
      (1e4 * Math.log(exposure_mJcm2 / criticalExposure_mJcm2)) /
      (Math.LN10 * 500 * 0.025 + otherAbsorption_percm);
    const { depthChange_um, bleachedShare } = of(exposure_mJcm2);
    expect(depth.outcome === "cures" && depth.cureDepth_um - straight).toBeCloseTo(depthChange_um.value, 7);
    expect(bleachedShare.value).toBeCloseTo(1 - Math.exp(-exposure_mJcm2 / bleachingExposure(bleaching)), 9);
  });

  it("takes the exposure of the brief's layer unless another is given", () => {
    const { layerExposure_mJcm2 } = workingCurveOf({ ...work, draws: 40 });
    expect(of().exposure_mJcm2).toBeCloseTo(layerExposure_mJcm2.value, 9);
  });

  // A layer of 75 µm: 5 % are 3.75 µm.
  it("does not matter where hardly any initiator is lost, and does after a long exposure", () => {
    expect(of(undefined, yielding(0.01)).outcome).toBe("does not matter");
    const long = of(2000, yielding(1));
    expect(long.outcome).toBe("matters");
    expect(long.depthChange_um.low).toBeGreaterThan(3.75);
    const edge = of(200);
    expect(edge.outcome).toBe("may matter");
    expect(edge.depthChange_um.low).toBeLessThan(3.75);
    expect(edge.depthChange_um.high).toBeGreaterThan(3.75);
  });

  it("is a loss where the initiator is used up before the resin gels, and nothing where nothing cures", () => {
    const slow = { ...shelf.constants, propagation_m3mols: sure(0.05), bleachingYield: sure(1) };
    const spent = of(5000, { shelf: { ...shelf, constants: slow } });
    expect(spent.outcome).toBe("matters");
    expect(spent.depthChange_um.high).toBeLessThan(-100);
    expect(of(0.01).depthChange_um).toMatchObject({ value: 0, low: 0, high: 0 });
  });

  it("has the yield among its sources and passes on what the light warns of", () => {
    expect(of().sources.map(({ figure }) => figure)).toContain("initiator lost per photon absorbed");
    const light = { wavelength_nm: sure(400, 2), irradiance_mWcm2: brief.light.irradiance_mWcm2 };
    expect(of(50, { brief: { ...brief, light } }).warnings.map(({ code }) => code)).toEqual([
      "nominal-wavelength",
    ]);
  });

  it("answers for the demo briefs", () => {
    for (const id of ["flow-cell", "screen-housing"]) {
      const { depthChange_um, bleachedShare } = bleachingOf({
        ...openBrief(`data/briefs/${id}.json`),
        draws: 100,
      });
      expect(Math.abs(depthChange_um.value)).toBeLessThan(10);
      expect(bleachedShare.value).toBeGreaterThan(0.01);
    }
  });

  it("refuses an exposure that is none", () => {
    expect(() => of(0)).toThrow("bleachingOf: exposure_mJcm2 is 0; it must be a finite number above 0");
  });
});
