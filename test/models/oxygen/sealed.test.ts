import { describe, expect, it } from "vitest";
import {
  conversionAtOxygen,
  inductionTimeAtDepth,
  oxygenFreeDepth,
  sealedConversion,
  sealedDepletionTime,
} from "../../../lib/models/oxygen.js";

const P0 = {
  startOxygen_molm3: 1,
  radicalGeneration_molm3s: 0.5,
  oxygenPerRadical: 1,
  oxygenCapture_m3mols: 5e5,
  termination_m3mols: 2500,
};
const relative = (found: number, expected: number): number => Math.abs(found / expected - 1);

describe("oxygenFreeDepth", () => {
  it("turns inductionTimeAtDepth round", () => {
    const light = { ...P0, oxygen_molm3: 1, napierianAbsorption_percm: 130 };
    for (const depth_um of [0.1, 40, 700]) {
      const time_s = inductionTimeAtDepth({ ...light, depth_um });
      expect(
        relative(oxygenFreeDepth({ inductionTime_s: 2, time_s, napierianAbsorption_percm: 130 }), depth_um),
      ).toBeLessThan(1e-11);
    }
    expect(oxygenFreeDepth({ inductionTime_s: 2, time_s: 1.9, napierianAbsorption_percm: 130 })).toBe(0);
  });

  it("refuses even light", () => {
    expect(() => oxygenFreeDepth({ inductionTime_s: 2, time_s: 4, napierianAbsorption_percm: 0 })).toThrow(
      "oxygenFreeDepth: napierianAbsorption_percm is 0; it must be a finite number above 0; in even light all depths are freed at once",
    );
  });
});

describe("a sealed cell", () => {
  // By an independent program, to 12 digits: time in s at C / C0.
  it.each([
    [5e5, [1.00000002, 1.80000018, 1.98000197993, 1.99801991412, 2.00099727166]],
    [5e3, [1.00019995336, 1.8017934186, 1.99631203639, 2.05256509965, 2.19173170132]],
  ])("with kO %d loses its oxygen in time", (oxygenCapture_m3mols, times) => {
    [0.5, 0.1, 0.01, 1e-3, 1e-6].forEach((oxygen_molm3, k) =>
      expect(
        relative(sealedDepletionTime({ ...P0, oxygenCapture_m3mols, oxygen_molm3 }), times[k]!),
      ).toBeLessThan(1e-8),
    );
  });

  // As above: conversion at 2.1, 2.5, 3 and 5 s, 10 digits.
  it.each([
    [5e5, [0.02512030691, 0.1178923756, 0.2215427537, 0.5278418129]],
    [5e3, [0.04511926245, 0.1359670527, 0.2374936003, 0.5375164903]],
  ])("with kO %d converts in time", (oxygenCapture_m3mols, conversions) => {
    [2.1, 2.5, 3, 5].forEach((time_s, k) =>
      expect(
        relative(
          sealedConversion({ ...P0, oxygenCapture_m3mols, propagation_m3mols: 25, time_s }),
          conversions[k]!,
        ),
      ).toBeLessThan(1e-9),
    );
  });

  it("takes (C0 - C) / (s Ri) while oxygen is plenty, and decays at s kO sqrt(Ri / 2 kt) once it is scarce", () => {
    const s = { ...P0, oxygenPerRadical: 1.5, oxygenCapture_m3mols: 1e9 };
    expect(relative(sealedDepletionTime({ ...s, oxygen_molm3: 0.4 }), 0.6 / (1.5 * 0.5))).toBeLessThan(1e-6);
    const later =
      sealedDepletionTime({ ...P0, oxygen_molm3: 1e-20 }) -
      sealedDepletionTime({ ...P0, oxygen_molm3: 1e-10 });
    expect(relative(later, (10 * Math.LN10) / 5000)).toBeLessThan(1e-6);
  });

  it("links conversion to oxygen by a power, and to time by the two together", () => {
    const link = { ...P0, propagation_m3mols: 25, oxygen_molm3: 1e-6 };
    expect(conversionAtOxygen(link)).toBeCloseTo(-Math.expm1(5e-5 * Math.log(1e-6)), 15);
    const time_s = sealedDepletionTime({ ...P0, oxygen_molm3: 1e-6 });
    expect(
      relative(sealedConversion({ ...P0, propagation_m3mols: 25, time_s }), conversionAtOxygen(link)),
    ).toBeLessThan(1e-9);
    expect(conversionAtOxygen({ ...link, oxygen_molm3: 1 })).toBe(0);
  });

  it("starts at 0, ends at 1, and stands hours of light", () => {
    const at = (time_s: number) => sealedConversion({ ...P0, propagation_m3mols: 25, time_s });
    expect(at(0)).toBe(0);
    expect(at(1e-9)).toBeLessThan(1e-12);
    expect(at(1e5)).toBe(1);
  });

  it("refuses more oxygen than at the start, and no termination", () => {
    expect(() => sealedDepletionTime({ ...P0, oxygen_molm3: 2 })).toThrow(
      "sealedDepletionTime: oxygen_molm3 is 2; it must be a number above 0 and at most 1",
    );
    expect(() =>
      sealedConversion({ ...P0, termination_m3mols: 0, propagation_m3mols: 25, time_s: 1 }),
    ).toThrow("sealedConversion: termination_m3mols is 0; it must be a finite number above 0");
    expect(() => conversionAtOxygen({ ...P0, propagation_m3mols: 25, oxygen_molm3: 0 })).toThrow(
      "conversionAtOxygen: oxygen_molm3 is 0; it must be a number above 0 and at most 1",
    );
  });
});
