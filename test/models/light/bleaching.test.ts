import { describe, expect, it } from "vitest";
import {
  bleachedFractions,
  bleachingExposure,
  bleachingFrontSpeed,
  photonFlux,
} from "../../../lib/models/light.js";

// Round numbers for checking: kappa = 100 m2/mol, so Z = 1e-4 per um at 1 mol/m3 and tau = phi kappa I0 t.
const kappa_m2mol = 100;
const molarAbsorption_Lmolcm = kappa_m2mol / (0.1 * Math.LN10);
const P0 = { concentration_molL: 0.01, molarAbsorption_Lmolcm, quantumYield: 0.5, photonFlux_molm2s: 2e-4 };
const Z_perum = kappa_m2mol * 10 * 1e-6;
const tau_pers = 0.5 * kappa_m2mol * 2e-4;
const at = (Z: number, tau: number) => {
  const left = bleachedFractions({ ...P0, depth_um: Z / Z_perum, time_s: tau / tau_pers });
  return { C: left.initiator.share, I: left.light.share };
};

describe("bleachedFractions", () => {
  // The exact solution, worked out by an independent program and checked there against the equations; printed to 6 decimals.
  it.each([
    [0, 1, 0.367879, 1],
    [1, 0, 1, 0.367879],
    [1, 1, 0.6127, 0.6127],
    [2, 1, 0.81133, 0.298472],
    [3, 1, 0.921194, 0.12467],
    [1, 3, 0.12467, 0.921194],
    [2, 3, 0.2791, 0.758672],
    [3, 3, 0.512765, 0.512765],
    [5, 3, 0.886056, 0.119915],
  ])("at Z %d, tau %d are %d and %d", (Z, tau, C, I) => {
    expect(Math.abs(at(Z, tau).C - C)).toBeLessThan(1e-6);
    expect(Math.abs(at(Z, tau).I - I)).toBeLessThan(1e-6);
  });

  it("halve the initiator at Z = ln(e^tau - 1), and are Beer-Lambert before it bleaches", () => {
    expect(at(Math.log(Math.exp(4) - 1), 4).C).toBeCloseTo(0.5, 12);
    expect(at(2, 0).I).toBeCloseTo(Math.exp(-2), 12);
    expect(at(0, 0)).toEqual({ C: 1, I: 1 });
  });

  it("leave a fastest initiation that tends to one quarter of the first one", () => {
    // Published for high attenuation: Terrones, Pearlstein, Macromolecules 34 (2001) 3195 (abstract); the values at finite
    // tau are the exact solution's, printed to 5 decimals.
    for (const [tau, most] of [
      [1, 0.39549],
      [2, 0.28913],
      [5, 0.2517],
      [10, 0.25001],
    ] as const) {
      const rates = Array.from({ length: 20001 }, (_, k) => at((k * (tau + 3)) / 2e4, tau)).map(
        ({ C, I }) => C * I,
      );
      expect(Math.abs(Math.max(...rates) - most)).toBeLessThan(1e-5);
    }
  });

  it("satisfy the equations: a marching solution agrees to 1 %", () => {
    // dI/dZ = -C I, dC/dtau = -C I by the plainest explicit scheme; its error is of first order in the steps, below 1 % here.
    const [cells, steps, deep, late] = [600, 600, 6, 3];
    const [dZ, dtau] = [deep / cells, late / steps];
    const C = new Float64Array(cells).fill(1);
    const I = new Float64Array(cells);
    for (let step = 0; step < steps; step++) {
      let light = 1;
      for (let k = 0; k < cells; k++) {
        const half = light * Math.exp((-C[k]! * dZ) / 2);
        I[k] = half;
        light *= Math.exp(-C[k]! * dZ);
      }
      for (let k = 0; k < cells; k++) C[k]! *= Math.exp(-I[k]! * dtau);
    }
    for (let k = 5; k < cells; k += 35) {
      expect(Math.abs(C[k]! / at((k + 0.5) * dZ, late).C - 1)).toBeLessThan(0.01);
    }
  });

  it("stay between 0 and 1 far out", () => {
    expect(at(2000, 1)).toEqual({ C: 1, I: 0 });
    expect(at(1, 2000)).toEqual({ C: 0, I: 1 });
    expect(at(1500, 1500).C).toBeCloseTo(0.5, 9);
  });
});

describe("bleachingFrontSpeed", () => {
  it("is how fast the half-bleached depth moves, whatever the absorption", () => {
    const speed = bleachingFrontSpeed(P0);
    const half = (change: object, time_s: number): number => {
      // Bisection on depth.
      let [low, high] = [0, 1e6];
      for (let k = 0; k < 100; k++) {
        const depth_um = (low + high) / 2;
        if (bleachedFractions({ ...P0, ...change, depth_um, time_s }).initiator.share < 0.5) low = depth_um;
        else high = depth_um;
      }
      return low;
    };
    for (const change of [{}, { molarAbsorption_Lmolcm: 2 * molarAbsorption_Lmolcm }]) {
      expect((half(change, 4000) - half(change, 3000)) / 1000 / speed).toBeCloseTo(1, 6);
    }
  });

  it("is 5.31 um/s for 1 mass % of TPO in a diacrylate under 5 mW/cm2 at 405 nm with a yield of 1", () => {
    // Worked out by an independent program from M 348.37 g/mol and 1.11 g/cm3, printed to 3 digits.
    const photonFlux_molm2s = photonFlux({ irradiance_mWcm2: 5, wavelength_nm: 405 });
    const speed = bleachingFrontSpeed({
      concentration_molL: 11.1 / 348.37,
      quantumYield: 1,
      photonFlux_molm2s,
    });
    expect(Math.abs(speed - 5.31)).toBeLessThan(0.006);
  });
});

describe("bleachingExposure", () => {
  it("is 34.4 J/cm2 for camphorquinone at 469 nm", () => {
    // eps 46 L/(mol cm) and yield 0.07 measured by Chen, Ferracane, Prahl, Dent. Mater. 23 (2007) 655-664; the dose worked out
    // from them by an independent program, printed to 3 digits (0.3 %). Without ln 10 it would be 79.2.
    const camphorquinone = { molarAbsorption_Lmolcm: 46, quantumYield: 0.07, wavelength_nm: 469 };
    expect(Math.abs(bleachingExposure(camphorquinone) / 34400 - 1)).toBeLessThan(3e-3);
    // 46 +- 2 and 0.07 +- 0.01 span 28.8 to 42.0 J/cm2.
    expect(
      bleachingExposure({ ...camphorquinone, molarAbsorption_Lmolcm: 48, quantumYield: 0.08 }) / 28800,
    ).toBeCloseTo(1, 2);
    expect(
      bleachingExposure({ ...camphorquinone, molarAbsorption_Lmolcm: 44, quantumYield: 0.06 }) / 42000,
    ).toBeCloseTo(1, 2);
  });

  it("is the exposure after which bleachedFractions leaves 1/e at the window", () => {
    const exposure_mJcm2 = bleachingExposure({
      molarAbsorption_Lmolcm: 500,
      quantumYield: 0.6,
      wavelength_nm: 405,
    });
    const photonFlux_molm2s = photonFlux({ irradiance_mWcm2: 10, wavelength_nm: 405 });
    const left = bleachedFractions({
      concentration_molL: 0.03,
      molarAbsorption_Lmolcm: 500,
      quantumYield: 0.6,
      photonFlux_molm2s,
      depth_um: 0,
      time_s: exposure_mJcm2 / 10,
    });
    expect(left.initiator.share).toBeCloseTo(Math.exp(-1), 12);
  });
});

describe("bleaching, refusals", () => {
  it.each([
    [
      () => bleachedFractions({ ...P0, quantumYield: 0, depth_um: 1, time_s: 1 }),
      "bleachedFractions: quantumYield is 0; it must be a number above 0 and at most 4",
    ],
    [
      () => bleachedFractions({ ...P0, depth_um: -1, time_s: 1 }),
      "bleachedFractions: depth_um is -1; it must be a finite number of at least 0",
    ],
    [
      () => bleachedFractions({ ...P0, depth_um: 1, time_s: NaN }),
      "bleachedFractions: time_s is NaN; it must be a finite number of at least 0",
    ],
    [
      () => bleachedFractions({ ...P0, molarAbsorption_Lmolcm: 1e300, depth_um: 1e30, time_s: 1 }),
      "bleachedFractions: Z is Infinity; it must be a finite number",
    ],
    [
      () => bleachingFrontSpeed({ ...P0, concentration_molL: 0 }),
      "bleachingFrontSpeed: concentration_molL is 0; it must be a finite number above 0",
    ],
    [
      () => bleachingExposure({ ...P0, wavelength_nm: 4.69e-7 }),
      "bleachingExposure: wavelength_nm is 4.69e-7; it must be a number from 100 to 2000; give it in nm",
    ],
    [
      () => bleachingExposure({ molarAbsorption_Lmolcm: 1e-320, quantumYield: 1, wavelength_nm: 405 }),
      "bleachingExposure: the exposure in mJ/cm2 is Infinity; it must be a finite number",
    ],
  ])("%s", (call, message) => {
    expect(call).toThrow(message);
  });
});
