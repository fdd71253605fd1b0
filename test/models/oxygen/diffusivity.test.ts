import { describe, expect, it } from "vitest";
import { diffusivityFromViscosity } from "../../../lib/models/oxygen.js";

describe("diffusivityFromViscosity", () => {
  it("is oxygen in water at its anchor", () => {
    expect(diffusivityFromViscosity({ viscosity_mPas: 0.89, temperature_C: 25 })).toBeCloseTo(2.1e-9, 20);
  });

  // The two-thirds power of Hiss and Cussler, AIChE J. 19 (1973) 698-703, on that anchor, worked out by an independent
  // program and printed to 4 digits.
  it.each([
    [1, 1.943e-9],
    [10, 4.186e-10],
    [100, 9.019e-11],
    [300, 4.336e-11],
    [1000, 1.943e-11],
    [3000, 9.341e-12],
  ])("at %d mPa s is %d m2/s", (viscosity_mPas, D) => {
    expect(Math.abs(diffusivityFromViscosity({ viscosity_mPas, temperature_C: 25 }) / D - 1)).toBeLessThan(
      3e-4,
    );
  });

  it("falls by four for eight times the viscosity and rises with absolute temperature", () => {
    const D = (viscosity_mPas: number, temperature_C: number): number =>
      diffusivityFromViscosity({ viscosity_mPas, temperature_C });
    expect(D(50, 25) / D(400, 25)).toBeCloseTo(4, 12);
    expect(D(50, 54.815) / D(50, 25)).toBeCloseTo(1.1, 12);
  });

  it("says what is wrong", () => {
    expect(() => diffusivityFromViscosity({ viscosity_mPas: 0, temperature_C: 25 })).toThrow(
      "diffusivityFromViscosity: viscosity_mPas is 0; it must be a finite number above 0",
    );
    expect(() => diffusivityFromViscosity({ viscosity_mPas: 1, temperature_C: -273.15 })).toThrow(
      "diffusivityFromViscosity: temperature_C is -273.15; it must be a finite number above -273.15; give it in degrees Celsius",
    );
  });
});
