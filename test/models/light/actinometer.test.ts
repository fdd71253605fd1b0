import { describe, expect, it } from "vitest";
import { interpolateSpectrum, irradianceFromActinometer, photonFlux } from "../../../lib/models/light.js";
import { readTable } from "../../reference/readTable.js";

describe("ferrioxalate", () => {
  // Data file behind Wriedt, Ziegenbalg, J. Flow Chem. 10 (2020) 295-306, doi 10.1007/s41981-019-00072-7.
  const table = readTable("light/ferrioxalate-quantum-yield.csv");
  const yieldAt = (wavelength_nm: number): number =>
    interpolateSpectrum({
      nodes_nm: table.nm!,
      values: table.quantum_yield!,
      wavelength_nm,
      where: "ferrioxalate",
    });

  it.each([
    [355, 1.24],
    [365, 1.223],
    [385, 1.1833],
    [405, 1.1374],
    [420, 1.1012],
  ])("has at %d nm a yield of %d", (wavelength_nm, yieldStated) => {
    expect(Math.abs(yieldAt(wavelength_nm) - yieldStated)).toBeLessThan(1e-4);
  });

  it("gives back the irradiance whose photons formed the iron", () => {
    for (const wavelength_nm of [365, 385, 405]) {
      const quantumYield = yieldAt(wavelength_nm);
      const ironFormation_molm2s = 0.95 * quantumYield * photonFlux({ irradiance_mWcm2: 7, wavelength_nm });
      const found = irradianceFromActinometer({
        ironFormation_molm2s,
        quantumYield,
        absorbed: 0.95,
        wavelength_nm,
      });
      expect(found).toBeCloseTo(7, 12);
    }
  });

  it("says what is wrong", () => {
    const good = { ironFormation_molm2s: 1e-4, quantumYield: 1.2, absorbed: 1, wavelength_nm: 365 };
    expect(() => irradianceFromActinometer({ ...good, absorbed: 0 })).toThrow(
      "irradianceFromActinometer: absorbed is 0; it must be a number above 0 and at most 1",
    );
    expect(() => irradianceFromActinometer({ ...good, quantumYield: 12 })).toThrow(
      "irradianceFromActinometer: quantumYield is 12; it must be a number above 0 and at most 2",
    );
    expect(() => irradianceFromActinometer({ ...good, ironFormation_molm2s: 1e308 })).toThrow(
      "irradianceFromActinometer: the irradiance in mW/cm2 is Infinity; it must be a finite number",
    );
  });
});
