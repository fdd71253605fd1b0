import { describe, expect, it } from "vitest";
import {
  fitGrunbergNissan,
  glycerolWaterViscosity,
  massToMoleFractions,
  waterViscosity,
} from "../../../lib/models/viscosity.js";

// Cheng, Ind. Eng. Chem. Res. 47 (2008) 3285-3288: values of its equations by an independent program, printed to 1e-4 (more
// coarsely above 100 mPa s): mass fraction, then 20, 25, 30 and 40 °C.
const table = [
  [0, 1.0049, 0.8927, 0.7995, 0.6546],
  [0.1, 1.2972, 1.1456, 1.0201, 0.8265],
  [0.2, 1.7414, 1.5245, 1.3466, 1.0751],
  [0.3, 2.455, 2.1238, 1.8553, 1.4522],
  [0.4, 3.6848, 3.1372, 2.7005, 2.0589],
  [0.5, 6.0023, 5.0037, 4.2242, 3.1113],
  [0.6, 10.9115, 8.8478, 7.2812, 5.125],
  [0.7, 23.0936, 18.0569, 14.3684, 9.5257],
  [0.8, 60.8591, 45.3504, 34.5115, 21.1227],
  [0.9, 223.746, 156.347, 112.0475, 61.5299],
  [1, 1413.8307, 905.68, 597.9223, 282.444],
] as const;

describe("glycerolWaterViscosity", () => {
  it.each(table)("is the published equation at a mass fraction of %d", (glycerolMassFraction, ...values) => {
    [20, 25, 30, 40].forEach((temperature_C, k) => {
      const eta = glycerolWaterViscosity({ glycerolMassFraction, temperature_C });
      expect(Math.abs(eta / values[k]! - 1)).toBeLessThan(1e-4);
    });
  });

  it("agrees with water within 1 %", () => {
    for (const temperature_C of [0, 20, 50, 100]) {
      const water = glycerolWaterViscosity({ glycerolMassFraction: 0, temperature_C });
      expect(Math.abs(water / waterViscosity({ temperature_C }) - 1)).toBeLessThan(0.01);
    }
  });

  // J. B. Segur, H. E. Oberstar, Ind. Eng. Chem. 43 (1951) 2117, at 20 °C (from memory).
  const handbook = [1.005, 1.31, 1.76, 2.5, 3.72, 6, 10.8, 22.5, 60.1, 219, 1410];
  const byMass = table.map(([C]) => C);

  it("agrees with a handbook table within 3 %", () => {
    byMass.forEach((glycerolMassFraction, k) => {
      const calculated = glycerolWaterViscosity({ glycerolMassFraction, temperature_C: 20 });
      expect(Math.abs(calculated / handbook[k]! - 1)).toBeLessThan(0.03);
    });
  });

  it("stands for mixtures that one G does not describe, on masses even less than on moles", () => {
    // Fits of an independent program to the handbook values: G 3.849 and 6.0 % by mole, -7.653 and 31 % by mass; molar
    // masses 92.094 and 18.015 g/mol.
    const byMole = byMass.map(
      (C) => massToMoleFractions({ massFractions: [C, 1 - C], molarMasses_gmol: [92.094, 18.015] })[0]!,
    );
    const ends = { viscosities_mPas: handbook, pureViscosities_mPas: [1410, 1.005] } as const;
    const mole = fitGrunbergNissan({ ...ends, fractions: byMole, basis: "mole" });
    const mass = fitGrunbergNissan({ ...ends, fractions: byMass, basis: "mass" });
    expect(mole.G).toBeCloseTo(3.849, 3);
    expect(100 * mole.averageDeviation).toBeCloseTo(6, 1);
    expect(mass.G).toBeCloseTo(-7.653, 3);
    expect(Math.abs(100 * mass.averageDeviation - 31)).toBeLessThan(0.5);
  });

  it("stops where the equation does", () => {
    expect(() => glycerolWaterViscosity({ glycerolMassFraction: 0.5, temperature_C: 101 })).toThrow(
      "glycerolWaterViscosity: temperature_C is 101; it must be a number from 0 to 100; the equation holds from 0 to 100 °C",
    );
    expect(() => glycerolWaterViscosity({ glycerolMassFraction: 50, temperature_C: 20 })).toThrow(
      "glycerolWaterViscosity: glycerolMassFraction is 50; it must be a number from 0 to 1",
    );
  });
});
