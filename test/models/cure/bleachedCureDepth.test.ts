import { describe, expect, it } from "vitest";
import { bleachedCureDepth } from "../../../lib/models/cure.js";
import { bleachedBesideAbsorber, bleachingExposure, photonFlux } from "../../../lib/models/light.js";

const P0 = {
  concentration_molL: 0.03,
  molarAbsorption_Lmolcm: 500,
  quantumYield: 0.6,
  wavelength_nm: 405,
  otherAbsorption_percm: 60,
  exposure_mJcm2: 200,
  criticalExposure_mJcm2: 10,
};
const depthOf = (change: Partial<typeof P0> = {}): number => {
  const depth = bleachedCureDepth({ ...P0, ...change });
  return depth.outcome === "cures" ? depth.cureDepth_um : NaN;
};
const straight = ({ otherAbsorption_percm, exposure_mJcm2, criticalExposure_mJcm2 }: typeof P0): number =>
  (1e4 * Math.log(exposure_mJcm2 / criticalExposure_mJcm2)) /
  (Math.LN10 * 500 * 0.03 + otherAbsorption_percm);

describe("bleachedCureDepth", () => {
  // The error of the straight curve is of the order of E / Hb, here below 1e-7.
  it("is the straight working curve where nothing bleaches", () => {
    expect(depthOf({ quantumYield: 1e-8 }) / straight(P0)).toBeCloseTo(1, 6);
  });

  // Without absorber the closed form: s = ln(1 + (e^tau - 1) e^-Z), so Z = ln((e^tau - 1) / (e^s - 1)) with e^-s = 1 - Ec / Hb.
  it("is the closed form without absorber", () => {
    const Hb = bleachingExposure(P0);
    const Z = Math.log(Math.expm1(200 / Hb) / (1 / (1 - 10 / Hb) - 1));
    const alpha_percm = Math.LN10 * 500 * 0.03;
    expect(depthOf({ otherAbsorption_percm: 0 }) / ((1e4 * Z) / alpha_percm)).toBeCloseTo(1, 9);
  });

  // At the depth found, the initiator that is left shows that the radicals of the critical exposure have been started there:
  // C0 - C = C0 Ec / Hb.
  it("lies where the critical exposure's radicals have been started", () => {
    const photonFlux_molm2s = photonFlux({ irradiance_mWcm2: 10, wavelength_nm: 405 });
    const left = bleachedBesideAbsorber({ ...P0, photonFlux_molm2s, time_s: 20, depth_um: depthOf() });
    expect((1 - left.initiator.share) / (10 / bleachingExposure(P0))).toBeCloseTo(1, 8);
  });

  it("bends upward: bleaching deepens more the longer the exposure", () => {
    const gain = (exposure_mJcm2: number) =>
      depthOf({ exposure_mJcm2 }) / straight({ ...P0, exposure_mJcm2 });
    expect(gain(2000)).toBeGreaterThan(gain(400));
    expect(gain(400)).toBeGreaterThan(gain(50));
  });

  it("says when nothing cures and when the initiator is used up first", () => {
    const Hb = bleachingExposure(P0);
    expect(bleachedCureDepth({ ...P0, exposure_mJcm2: 9 })).toEqual({ outcome: "does-not-cure" });
    expect(bleachedCureDepth({ ...P0, criticalExposure_mJcm2: Hb })).toEqual({
      outcome: "initiator-used-up",
    });
  });

  it.each([
    [
      { exposure_mJcm2: -1 },
      "bleachedCureDepth: exposure_mJcm2 is -1; it must be a finite number of at least 0",
    ],
    [
      { criticalExposure_mJcm2: 0 },
      "bleachedCureDepth: criticalExposure_mJcm2 is 0; it must be a finite number above 0",
    ],
    [{ wavelength_nm: 3 }, "wavelength_nm is 3"],
  ])("refuses %j", (change, message) => {
    expect(() => bleachedCureDepth({ ...P0, ...change })).toThrow(message);
  });
});
