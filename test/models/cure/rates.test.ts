import { describe, expect, it } from "vitest";
import {
  polymerisationRate,
  rateConstant,
  steadyConversionTime,
  terminationConstant,
} from "../../../lib/models/cure.js";

// Round numbers for checking: [R] = sqrt(0.5 / 5000) = 0.01 mol/m3.
const P0 = { propagation_m3mols: 25, termination_m3mols: 2500, radicalGeneration_molm3s: 0.5 };

describe("polymerisationRate", () => {
  it("is kp [M] [R], and grows by 1.414214 when the light doubles", () => {
    const rate = (radicalGeneration_molm3s: number): number =>
      polymerisationRate({ ...P0, doubleBonds_molm3: 8000, radicalGeneration_molm3s });
    expect(rate(0.5)).toBeCloseTo(25 * 8000 * 0.01, 9);
    expect(rate(1) / rate(0.5)).toBeCloseTo(1.414214, 6);
    expect(rate(0)).toBe(0);
  });

  it("is the usual kp [M] sqrt(phi Ia / kt) for two radicals a cleavage", () => {
    const phiIa = 0.3;
    const rate = polymerisationRate({ ...P0, doubleBonds_molm3: 8000, radicalGeneration_molm3s: 2 * phiIa });
    expect(rate / (25 * 8000 * Math.sqrt(phiIa / 2500))).toBeCloseTo(1, 12);
  });

  it("is the beginning of the conversion that steadyConversionTime follows", () => {
    const conversion = 1e-6;
    const time_s = steadyConversionTime({ ...P0, conversion });
    const rate = polymerisationRate({ ...P0, doubleBonds_molm3: 8000 });
    expect((rate * time_s) / (8000 * conversion)).toBeCloseTo(1, 5);
  });

  it("converts half as much at four times the irradiance and equal exposure", () => {
    const rate = (radicalGeneration_molm3s: number): number =>
      polymerisationRate({ ...P0, doubleBonds_molm3: 8000, radicalGeneration_molm3s });
    expect((rate(2) * 1) / (rate(0.5) * 4)).toBeCloseTo(0.5, 12);
  });

  it("says what is wrong", () => {
    expect(() => polymerisationRate({ ...P0, doubleBonds_molm3: -1 })).toThrow(
      "polymerisationRate: doubleBonds_molm3 is -1; it must be a finite number of at least 0",
    );
    expect(() => polymerisationRate({ ...P0, doubleBonds_molm3: 1, termination_m3mols: 0 })).toThrow(
      "polymerisationRate: termination_m3mols is 0; it must be a finite number above 0",
    );
    expect(() => polymerisationRate({ ...P0, doubleBonds_molm3: 1e308 })).toThrow(
      "polymerisationRate: the rate in mol/(m3 s) is Infinity; it must be a finite number",
    );
  });
});

describe("terminationConstant", () => {
  it("halves a constant of the other convention: rates move by sqrt 2", () => {
    expect(terminationConstant({ termination_m3mols: 5000, convention: "-2kt" })).toBe(5000);
    const halved = terminationConstant({ termination_m3mols: 5000, convention: "-kt" });
    const rate = (termination_m3mols: number): number =>
      polymerisationRate({ ...P0, termination_m3mols, doubleBonds_molm3: 1 });
    expect(rate(halved) / rate(5000)).toBeCloseTo(Math.SQRT2, 12);
  });

  it("says what is wrong", () => {
    expect(() => terminationConstant({ termination_m3mols: 1, convention: "-3kt" as "-kt" })).toThrow(
      'terminationConstant: unknown convention "-3kt"; did you mean "-2kt"?',
    );
    expect(() => terminationConstant({ termination_m3mols: 0, convention: "-kt" })).toThrow(
      "terminationConstant: termination_m3mols is 0; it must be a finite number above 0",
    );
  });
});

describe("rateConstant", () => {
  // Arrhenius pairs in L/(mol s) and J/mol. Butyl acrylate: Asua et al., Macromol. Chem. Phys. 2004, doi 10.1002/macp.200400355;
  // vinyl acetate and methacrylic acid (15 mass % in water): IUPAC, Pure Appl. Chem. 79 (2007), doi 10.1351/pac200779081463 for
  // the acid. Values worked out from the pairs by an independent program, printed to 4 or 5 digits: 0.2 %.
  it.each([
    ["butyl acrylate", 2.21e7, 17900, 20, 14288],
    ["butyl acrylate", 2.21e7, 17900, 0, 8345],
    ["vinyl acetate", 1.35e7, 20400, 25, 3601],
    ["methacrylic acid", 1.54e6, 15000, 25, 3628],
    ["butyl acrylate dimer", 1.08e7, 34200, 25, 11.0],
  ])("%s", (_, prefactor_Lmols, activationEnergy_Jmol, temperature_C, kp_Lmols) => {
    const k = rateConstant({
      prefactor_m3mols: prefactor_Lmols / 1000,
      activationEnergy_Jmol,
      temperature_C,
    });
    expect(Math.abs((1000 * k) / kp_Lmols - 1)).toBeLessThan(kp_Lmols === 11.0 ? 5e-3 : 2e-3);
  });

  it("says what is wrong", () => {
    const good = { prefactor_m3mols: 1e4, activationEnergy_Jmol: 17900, temperature_C: 20 };
    expect(rateConstant({ ...good, activationEnergy_Jmol: 0 })).toBe(1e4);
    expect(() => rateConstant({ ...good, temperature_C: -300 })).toThrow(
      "rateConstant: temperature_C is -300; it must be a finite number above -273.15; give it in degrees Celsius",
    );
    expect(() => rateConstant({ ...good, prefactor_m3mols: NaN })).toThrow(
      "rateConstant: prefactor_m3mols is NaN; it must be a finite number above 0",
    );
  });
});
