import { describe, expect, it } from "vitest";
import { waterViscosity } from "../../../lib/models/viscosity.js";

describe("waterViscosity", () => {
  // IAPWS Revised Supplementary Release on Properties of Liquid Water at 0.1 MPa, equation 7; the values were computed
  // from its coefficients by an independent program and are printed to 1e-4 uPa s, hence 1e-7.
  it.each([
    [0, 1791.7824],
    [10, 1305.9017],
    [20, 1001.5673],
    [25, 889.9968],
    [30, 797.2062],
    [40, 652.7335],
    [50, 546.5265],
    [60, 466.0393],
    [80, 354.0461],
    [100, 281.5811],
  ])("is the IAPWS value at %d °C", (temperature_C, eta_uPas) => {
    expect(Math.abs((1000 * waterViscosity({ temperature_C })) / eta_uPas - 1)).toBeLessThan(2e-7);
  });

  it("agrees with the check value of the full IAPWS formulation, 889.7351 uPa s at 998 kg/m3 and 298.15 K", () => {
    // Huber et al., J. Phys. Chem. Ref. Data 38 (2009) 101-125, table of check values; another density (997 at 0.1 MPa)
    // and another equation, so 0.05 %.
    expect(Math.abs(waterViscosity({ temperature_C: 25 }) / 0.8897351 - 1)).toBeLessThan(5e-4);
  });

  it("stops where the equation does", () => {
    expect(waterViscosity({ temperature_C: -20 })).toBeGreaterThan(4);
    expect(waterViscosity({ temperature_C: 110 })).toBeLessThan(0.26);
    expect(() => waterViscosity({ temperature_C: 111 })).toThrow(
      "waterViscosity: temperature_C is 111; it must be a number from -20 to 110; " +
        "the equation holds for liquid water from -20 to 110 °C",
    );
  });
});
