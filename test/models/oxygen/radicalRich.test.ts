import { describe, expect, it } from "vitest";
import { radicalRichProfile, radicalRichRate, steadyOxygenProfile } from "../../../lib/models/oxygen.js";

const gap = {
  rate_pers: 1,
  diffusivity_m2s: 1e-10,
  saturation_molm3: 2,
  gapThickness_um: 20,
  filmEquivalentThickness_um: 7,
};
const profile = (depth_um: number, change: Partial<typeof gap> = {}) =>
  radicalRichProfile({ ...gap, depth_um, ...change });

describe("radicalRichRate", () => {
  it("is s kO sqrt(Ri / 2 kt): 5000 per second for round numbers, as the root of the light", () => {
    const round = {
      radicalGeneration_molm3s: 0.5,
      oxygenCapture_m3mols: 5e5,
      termination_m3mols: 2500,
      oxygenPerRadical: 1,
    };
    expect(radicalRichRate(round)).toBeCloseTo(5000, 10);
    expect(radicalRichRate({ ...round, radicalGeneration_molm3s: 2, oxygenPerRadical: 3 })).toBeCloseTo(
      30000,
      8,
    );
    expect(() => radicalRichRate({ ...round, termination_m3mols: 0 })).toThrow(
      "radicalRichRate: termination_m3mols is 0; it must be a finite number above 0",
    );
  });
});

describe("radicalRichProfile", () => {
  it("balances: the flux through the film is the flux in the resin and all that is used up", () => {
    const at = profile(0);
    expect(at.flux_molm2s).toBeCloseTo(((2 - at.wallOxygen_molm3) * 1e-10) / 7e-6, 18);
    const points = 2000;
    const used = Array.from({ length: points }, (_, i) => profile((20 * (i + 0.5)) / points).oxygen_molm3);
    // Midpoint rule over 2000 points: 1e-7.
    expect((used.reduce((sum, C) => sum + C, 0) * 20e-6) / points / at.flux_molm2s).toBeCloseTo(1, 6);
  });

  it("runs from the window to the part, and is exponential in a gap of many lengths", () => {
    expect(profile(0).oxygen_molm3).toBeCloseTo(profile(0).wallOxygen_molm3, 14);
    expect(profile(20).oxygen_molm3).toBeCloseTo(profile(0).topOxygen_molm3, 14);
    const deep = profile(30, { gapThickness_um: 1e4, filmEquivalentThickness_um: 0 });
    // sqrt(D / k) = 10 um.
    expect(deep.oxygen_molm3 / (2 * Math.exp(-3))).toBeCloseTo(1, 13);
    expect(deep.topOxygen_molm3).toBe(0);
  });

  it("is what the full rate law tends to when oxygen is scarce", () => {
    const P = {
      radicalGeneration_molm3s: 0.5,
      oxygenCapture_m3mols: 5e3,
      termination_m3mols: 2500,
      oxygenPerRadical: 1,
    };
    const scarce = { ...gap, saturation_molm3: 1e-9, rate_pers: radicalRichRate(P) };
    const full = steadyOxygenProfile({ ...P, ...scarce, napierianAbsorption_percm: 0, cells: 800 });
    const closed = radicalRichProfile({ ...scarce, depth_um: 0 });
    // The grid error of 800 cells in a gap of 14 decay lengths: 1e-5.
    expect(full.flux_molm2s / closed.flux_molm2s).toBeCloseTo(1, 4);
    expect(full.wallOxygen_molm3 / closed.wallOxygen_molm3).toBeCloseTo(1, 4);
  });

  it("refuses a depth beyond the part", () => {
    expect(() => profile(21)).toThrow("radicalRichProfile: depth_um is 21; it must be a number from 0 to 20");
    expect(() => profile(0, { rate_pers: 0 })).toThrow("rate_pers is 0; it must be a finite number above 0");
  });
});
