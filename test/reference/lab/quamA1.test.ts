// EURACHEM/CITAC Guide CG 4, Quantifying Uncertainty in Analytical Measurement, 3rd ed. 2012, example A1: a calibration standard.
// 100.28 mg of metal (u 0.05) of purity 0.9999 (u 0.000058) made up to 100.0 mL (u 0.07): 1002.7 mg/L, u 0.9 mg/L.

import { describe, expect, it } from "vitest";
import { mixtureUncertainties } from "../../../lib/lab/batch/uncertainty.js";

describe("EURACHEM QUAM example A1", () => {
  // Solvent of 1 g/mL in place of the volume turns c = m P / V into a mass fraction of a portion that is itself a blend.
  const metal = { mass_g: 0.10028, u_g: 0.00005, fractions: [{ massFraction: 0.9999, u: 0.000058 }] };
  const solvent = (u_g: number) => ({
    mass_g: 100 - metal.mass_g,
    u_g,
    fractions: [{ massFraction: 0, u: 0 }],
  });
  const u_mgL = (volumeU_mL: number) => 1e6 * mixtureUncertainties([metal, solvent(volumeU_mL)])[0]!;

  it("gives the published uncertainty, 0.9 mg/L", () => {
    expect(Number(u_mgL(0.07).toFixed(1))).toBe(0.9);
  });

  // Calculated outside this program from c = m P / V with u(V) rounded to 0.07 as the guide has it, and unrounded. The total
  // mass holds the metal and the volume does not: 0.1 % of one term.
  it.each([
    [0.07, 0.8637],
    [0.0664730521840743, 0.83522],
  ])("with u(V) = %f mL gives %f mg/L", (volumeU_mL, expected) => {
    expect(Math.abs(u_mgL(volumeU_mL) / expected - 1)).toBeLessThan(0.001);
  });

  it("has its parts: mass, purity, volume", () => {
    const relative = [0.05 / 100.28, 0.000058 / 0.9999, 0.07 / 100];
    expect(Math.abs(u_mgL(0.07) / (1002.7 * Math.hypot(...relative)) - 1)).toBeLessThan(0.001);
  });
});
