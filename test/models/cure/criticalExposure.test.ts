import { describe, expect, it } from "vitest";
import { criticalExposureParts } from "../../../lib/models/cure.js";

// Round numbers for checking, not a material.
const P0 = {
  irradiance_mWcm2: 5,
  wavelength_nm: 405,
  initiatorAbsorption_percm: 20,
  radicalsPerPhoton: 1,
  oxygen_molm3: 1,
  oxygenPerRadical: 1,
  gelConversion: 0.05,
  propagation_m3mols: 25,
  termination_m3mols: 2500,
};
const parts = (change: Partial<typeof P0> = {}) => criticalExposureParts({ ...P0, ...change });

describe("criticalExposureParts", () => {
  it("is what the two equations give, written out", () => {
    // N_A h c / lambda = 295374.236 J/mol at 405 nm (SI constants, an independent program).
    const E_photon = 295374.236;
    const alpha_perm = 2000;
    const Ri = (alpha_perm * 50) / E_photon;
    const gelTime_s = -Math.log(0.95) / (25 * Math.sqrt(Ri / 5000));
    expect(parts().oxygenExposure_mJcm2 / (E_photon / alpha_perm / 10)).toBeCloseTo(1, 8);
    expect(parts().gelExposure_mJcm2 / (5 * gelTime_s)).toBeCloseTo(1, 8);
  });

  it("adds up, and says which part is oxygen", () => {
    const { criticalExposure_mJcm2, oxygenExposure_mJcm2, gelExposure_mJcm2, oxygen } = parts();
    expect(oxygenExposure_mJcm2 + gelExposure_mJcm2).toBeCloseTo(criticalExposure_mJcm2, 12);
    expect(oxygen.share).toBeCloseTo(oxygenExposure_mJcm2 / criticalExposure_mJcm2, 12);
    expect(parts({ oxygen_molm3: 0 })).toMatchObject({ oxygenExposure_mJcm2: 0, oxygen: { share: 0 } });
  });

  it("has an oxygen part that does not depend on the irradiance and a gel part that grows with its root", () => {
    const [dim, bright] = [parts(), parts({ irradiance_mWcm2: 20 })];
    expect(bright.oxygenExposure_mJcm2).toBe(dim.oxygenExposure_mJcm2);
    expect(bright.gelExposure_mJcm2 / dim.gelExposure_mJcm2).toBeCloseTo(2, 12);
  });

  it("falls with the initiator: as 1/c for oxygen, as 1/sqrt(c) for the gel", () => {
    const [little, much] = [parts(), parts({ initiatorAbsorption_percm: 80 })];
    expect(little.oxygenExposure_mJcm2 / much.oxygenExposure_mJcm2).toBeCloseTo(4, 12);
    expect(little.gelExposure_mJcm2 / much.gelExposure_mJcm2).toBeCloseTo(2, 12);
  });

  it.each([
    [
      { irradiance_mWcm2: 0 },
      "criticalExposureParts: irradiance_mWcm2 is 0; it must be a finite number above 0",
    ],
    [
      { gelConversion: 0 },
      "criticalExposureParts: gelConversion is 0; it must be a number above 0 and at most 1",
    ],
    [
      { gelConversion: 1 },
      "steadyConversionTime: conversion is 1; it must be a number from 0 to 0.9999999999999999",
    ],
    [
      { initiatorAbsorption_percm: 0 },
      "oxygenCriticalExposure: initiatorAbsorption_percm is 0; it must be a finite number above 0",
    ],
  ])("refuses %j", (change, message) => {
    expect(() => parts(change)).toThrow(message);
  });
});
