import { describe, expect, it } from "vitest";
import { photonEnergy, photonFlux } from "../../../lib/models/light.js";

describe("photons", () => {
  // From the exact constants of the SI (2019), worked out by an independent program, printed to 0.001 J/mol.
  it.each([
    [365, 327744.015],
    [385, 310718.352],
    [405, 295374.236],
  ])("carry at %d nm %d J per mole", (wavelength_nm, J) => {
    expect(Math.abs(photonEnergy({ wavelength_nm }) / J - 1)).toBeLessThan(1e-8);
  });

  it.each([
    [365, 3.05116],
    [405, 3.38554],
  ])("come at %d nm as %d umol per joule", (wavelength_nm, umol) => {
    // 100 mW/cm2 is 1000 J/(m2 s).
    const perJoule = photonFlux({ irradiance_mWcm2: 100, wavelength_nm }) / 1000;
    expect(Math.abs(perJoule / (umol * 1e-6) - 1)).toBeLessThan(1e-5);
  });

  it("come with 5 mW/cm2 at 405 nm as 1.6927678e-4 mol/(m2 s)", () => {
    expect(photonFlux({ irradiance_mWcm2: 5, wavelength_nm: 405 }) / 1.6927678e-4).toBeCloseTo(1, 7);
    expect(photonFlux({ irradiance_mWcm2: 0, wavelength_nm: 405 })).toBe(0);
  });

  it("have an energy that falls as 1/wavelength and a flux that rises with both irradiance and wavelength", () => {
    expect(photonEnergy({ wavelength_nm: 200 })).toBeCloseTo(2 * photonEnergy({ wavelength_nm: 400 }), 8);
    const flux = (irradiance_mWcm2: number, wavelength_nm: number): number =>
      photonFlux({ irradiance_mWcm2, wavelength_nm });
    expect(flux(6, 800) / flux(2, 400)).toBeCloseTo(6, 12);
  });

  it("say what is wrong", () => {
    expect(() => photonEnergy({ wavelength_nm: 4.05e-7 })).toThrow(
      "photonEnergy: wavelength_nm is 4.05e-7; it must be a number from 100 to 2000; give it in nm",
    );
    expect(() => photonFlux({ irradiance_mWcm2: -1, wavelength_nm: 405 })).toThrow(
      "photonFlux: irradiance_mWcm2 is -1; it must be a finite number of at least 0",
    );
    expect(() => photonFlux({ irradiance_mWcm2: 1e308, wavelength_nm: 405 })).toThrow(
      "photonFlux: the photon flux is Infinity; it must be a finite number",
    );
  });
});
