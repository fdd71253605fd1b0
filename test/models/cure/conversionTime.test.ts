import { describe, expect, it } from "vitest";
import { steadyConversionTime } from "../../../lib/models/cure.js";

// Round numbers for checking, not a material: [R] = sqrt(0.5 / 5000) = 0.01 mol/m3, kp [R] = 0.25 1/s.
const P0 = { propagation_m3mols: 25, termination_m3mols: 2500, radicalGeneration_molm3s: 0.5 };

describe("steadyConversionTime", () => {
  it("is ln 2 / (kp R) to half conversion, and nothing to none", () => {
    expect(steadyConversionTime({ ...P0, conversion: 0.5 })).toBeCloseTo(Math.LN2 / 0.25, 12);
    expect(steadyConversionTime({ ...P0, conversion: 0 })).toBe(0);
    // -ln(1 - X) for small X without loss of digits.
    expect(steadyConversionTime({ ...P0, conversion: 1e-12 }) / 4e-12).toBeCloseTo(1, 11);
  });

  it("halves with four times the light, doubles with four times the termination, falls as 1/kp", () => {
    const t = (change: Partial<typeof P0>): number =>
      steadyConversionTime({ ...P0, ...change, conversion: 0.3 });
    expect(t({}) / t({ radicalGeneration_molm3s: 2 })).toBeCloseTo(2, 12);
    expect(t({ termination_m3mols: 10000 }) / t({})).toBeCloseTo(2, 12);
    expect(t({}) / t({ propagation_m3mols: 75 })).toBeCloseTo(3, 12);
  });

  it("meets a computed polymerisation once its oxygen is gone", () => {
    // Independent integration of oxygen (1 mol/m3, capture 5e5 m3/(mol s)) and quasi-steady radicals: induction 2 s, then
    // X = 0.1178923756, 0.2215427537, 0.5278418129 at 2.5, 3 and 5 s. The handover around 2 s costs some milliseconds.
    for (const [time_s, conversion] of [
      [2.5, 0.1178923756],
      [3, 0.2215427537],
      [5, 0.5278418129],
    ] as const) {
      expect(Math.abs(2 + steadyConversionTime({ ...P0, conversion }) - time_s)).toBeLessThan(0.005);
    }
  });

  it.each([
    [
      { conversion: 1 },
      "steadyConversionTime: conversion is 1; it must be a number from 0 to 0.9999999999999999; full conversion is never reached",
    ],
    [
      { radicalGeneration_molm3s: 0 },
      "steadyConversionTime: radicalGeneration_molm3s is 0; it must be a finite number above 0",
    ],
    [
      { termination_m3mols: NaN },
      "steadyConversionTime: termination_m3mols is NaN; it must be a finite number above 0",
    ],
    [
      { propagation_m3mols: 1e-320 },
      "steadyConversionTime: the time in s is Infinity; it must be a finite number; the light is too weak, or a rate constant is not in m3/(mol s)",
    ],
  ])("refuses %j", (change, message) => {
    expect(() => steadyConversionTime({ ...P0, conversion: 0.3, ...change })).toThrow(message);
  });
});
