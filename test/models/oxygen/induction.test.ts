import { describe, expect, it } from "vitest";
import { cureDepth } from "../../../lib/models/cure.js";
import { photonFlux } from "../../../lib/models/light.js";
import {
  inductionTime,
  inductionTimeAtDepth,
  oxygenCriticalExposure,
  radicalGeneration,
} from "../../../lib/models/oxygen.js";

const resin = { oxygen_molm3: 1, radicalGeneration_molm3s: 0.5, oxygenPerRadical: 1 };

describe("inductionTime", () => {
  it("is oxygen over what the radicals take", () => {
    expect(inductionTime(resin)).toBe(2);
    expect(inductionTime({ ...resin, oxygenPerRadical: 2 })).toBe(1);
    expect(inductionTime({ ...resin, radicalGeneration_molm3s: 0.1 })).toBeCloseTo(10, 12);
    expect(inductionTime({ ...resin, oxygen_molm3: 0 })).toBe(0);
  });

  it("is what is left when the capture of radicals is fast: a computed run", () => {
    // Independent integration with capture 5e5 m3/(mol s) and kt 2500 m3/(mol s): 99.9999 % of the oxygen is gone at
    // 2.00099727 s; the tail beyond 2 s is termination, of the order of 5e-4.
    expect(Math.abs(inductionTime(resin) / 2.00099727166 - 1)).toBeLessThan(1e-3);
  });
});

describe("inductionTimeAtDepth", () => {
  const at = (depth_um: number, napierianAbsorption_percm = 100): number =>
    inductionTimeAtDepth({ ...resin, napierianAbsorption_percm, depth_um });

  it("is that of the window at the window, e times that one penetration depth in, and the same everywhere in even light", () => {
    expect(at(0)).toBe(2);
    expect(at(100)).toBeCloseTo(2 * Math.E, 12);
    expect(at(5000, 0)).toBe(2);
  });

  it("is infinite nowhere: where no light comes it says so", () => {
    expect(() => at(1e5)).toThrow(
      "inductionTimeAtDepth: the induction time in s is Infinity; it must be a finite number; hardly any light arrives there",
    );
  });
});

describe("oxygenCriticalExposure", () => {
  const light = {
    oxygen_molm3: 1,
    wavelength_nm: 405,
    radicalsPerPhoton: 1,
    oxygenPerRadical: 1,
    initiatorAbsorption_percm: 20,
  };

  it("is 14.77 mJ/cm2 for a common resin: 295374 J/mol over 2000 1/m", () => {
    expect(oxygenCriticalExposure(light)).toBeCloseTo(295374.236 / 2000 / 10, 5);
  });

  it("is irradiance times induction time, at any irradiance", () => {
    for (const irradiance_mWcm2 of [0.5, 5, 50]) {
      const photonFlux_molm2s = photonFlux({ irradiance_mWcm2, wavelength_nm: 405 });
      const time_s = inductionTime({
        ...resin,
        radicalGeneration_molm3s: radicalGeneration({ ...light, photonFlux_molm2s }),
      });
      expect((irradiance_mWcm2 * time_s) / oxygenCriticalExposure(light)).toBeCloseTo(1, 12);
    }
  });

  it("makes the depth freed of oxygen a working curve", () => {
    const photonFlux_molm2s = photonFlux({ irradiance_mWcm2: 5, wavelength_nm: 405 });
    const time_s = inductionTimeAtDepth({
      ...resin,
      radicalGeneration_molm3s: radicalGeneration({ ...light, photonFlux_molm2s }),
      napierianAbsorption_percm: 100,
      depth_um: 70,
    });
    const depth = cureDepth({
      exposure_mJcm2: 5 * time_s,
      penetrationDepth_um: 100,
      criticalExposure_mJcm2: oxygenCriticalExposure(light),
    });
    expect(depth).toBeCloseTo(70, 9);
  });
});

describe("induction, refusals", () => {
  it.each([
    [
      () => inductionTime({ ...resin, radicalGeneration_molm3s: 0 }),
      "inductionTime: radicalGeneration_molm3s is 0; it must be a finite number above 0; without light oxygen is never used up",
    ],
    [
      () => inductionTime({ ...resin, oxygen_molm3: -1 }),
      "inductionTime: oxygen_molm3 is -1; it must be a finite number of at least 0",
    ],
    [
      () => inductionTimeAtDepth({ ...resin, napierianAbsorption_percm: 1, depth_um: -1 }),
      "inductionTimeAtDepth: depth_um is -1; it must be a finite number of at least 0",
    ],
    [
      () =>
        oxygenCriticalExposure({
          oxygen_molm3: 1,
          wavelength_nm: 405,
          radicalsPerPhoton: 1,
          oxygenPerRadical: 1,
          initiatorAbsorption_percm: 0,
        }),
      "oxygenCriticalExposure: initiatorAbsorption_percm is 0; it must be a finite number above 0",
    ],
    [
      () =>
        oxygenCriticalExposure({
          oxygen_molm3: 1e308,
          wavelength_nm: 405,
          radicalsPerPhoton: 1,
          oxygenPerRadical: 1,
          initiatorAbsorption_percm: 1e-9,
        }),
      "oxygenCriticalExposure: the exposure in mJ/cm2 is Infinity; it must be a finite number",
    ],
  ])("%s", (call, message) => {
    expect(call).toThrow(message);
  });
});
