import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { quasiSteadyRadicals, radicalGeneration } from "../../../lib/models/oxygen.js";

const rates = { termination_m3mols: 2500, oxygenCapture_m3mols: 5e5 };

const radicals = (radicalGeneration_molm3s: number, oxygen_molm3: number): number =>
  quasiSteadyRadicals({ ...rates, radicalGeneration_molm3s, oxygen_molm3 });

describe("radicalGeneration", () => {
  it("is photons times the Napierian absorption of the initiator per metre times the yield", () => {
    const light = { photonFlux_molm2s: 1e-4, initiatorAbsorption_percm: 20, radicalsPerPhoton: 0.5 };
    expect(radicalGeneration(light)).toBeCloseTo(0.5 * 2000 * 1e-4, 15);
    expect(radicalGeneration({ ...light, photonFlux_molm2s: 0 })).toBe(0);
    expect(
      radicalGeneration({ ...light, initiatorAbsorption_percm: 40 }) / radicalGeneration(light),
    ).toBeCloseTo(2, 12);
  });

  it.each([
    [
      { photonFlux_molm2s: -1 },
      "radicalGeneration: photonFlux_molm2s is -1; it must be a finite number of at least 0",
    ],
    [
      { radicalsPerPhoton: 5 },
      "radicalGeneration: radicalsPerPhoton is 5; it must be a number above 0 and at most 4",
    ],
    [
      { initiatorAbsorption_percm: NaN },
      "radicalGeneration: initiatorAbsorption_percm is NaN; it must be a finite number of at least 0",
    ],
    [
      { photonFlux_molm2s: 1e307 },
      "radicalGeneration: the radical generation is Infinity; it must be a finite number",
    ],
  ])("refuses %j", (change, message) => {
    const light = { photonFlux_molm2s: 1e-4, initiatorAbsorption_percm: 20, radicalsPerPhoton: 0.5 };
    expect(() => radicalGeneration({ ...light, ...change })).toThrow(message);
  });
});

describe("quasiSteadyRadicals", () => {
  it("has the closed values of its balance to 1e-13", () => {
    const near = (found: number, exact: number): void =>
      expect(Math.abs(found / exact - 1)).toBeLessThan(1e-13);
    // No oxygen: sqrt(Ri / 2 kt). C = 1e-4: kO C = 50, sqrt(8 kt Ri) = 100, so R = 1 / (50 (1 + sqrt 5)).
    near(radicals(0.5, 0), 1e-2);
    near(radicals(0.5, 1e-4), 1 / (50 * (1 + Math.sqrt(5))));
    // C = 1: with e = 2 kt Ri / (kO C)^2 = 1e-8, R = (Ri / kO C) (1 - e + 2 e^2 - ...).
    near(radicals(0.5, 1), 1e-6 * (1 - 1e-8 + 2e-16));
    // The same with e = 1e-11 and 1e-13.
    near(radicals(5e-4, 1), 1e-9 * (1 - 1e-11));
    near(radicals(5e-6, 1), 1e-11 * (1 - 1e-13));
  });

  it("balances: started = ended by pairs + captured by oxygen, over 20 decades", () => {
    const decades = (from: number, to: number) =>
      fc.double({ min: from, max: to, noNaN: true }).map((p) => 10 ** p);
    fc.assert(
      fc.property(decades(-12, 2), decades(-12, 3), decades(0, 6), decades(2, 7), (R, C, kt, kO) => {
        const Ri = 2 * kt * R * R + kO * C * R;
        const found = quasiSteadyRadicals({
          radicalGeneration_molm3s: Ri,
          oxygen_molm3: C,
          termination_m3mols: kt,
          oxygenCapture_m3mols: kO,
        });
        expect(Math.abs(found / R - 1)).toBeLessThan(1e-13);
      }),
    );
  });

  it("keeps the digits that the usual form of the root loses", () => {
    const usual = (Ri: number): number => (-5e5 + Math.sqrt(5e5 ** 2 + 8 * 2500 * Ri)) / (4 * 2500);
    expect(Math.abs(usual(5e-6) / 1e-11 - 1)).toBeGreaterThan(1e-7);
    expect(Math.abs(radicals(5e-6, 1) / 1e-11 - 1)).toBeLessThan(1e-12);
  });

  it("is 0 without light, also without oxygen", () => {
    expect(radicals(0, 1)).toBe(0);
    expect(radicals(0, 0)).toBe(0);
  });

  it("says what is wrong", () => {
    expect(() => radicals(-1, 1)).toThrow(
      "quasiSteadyRadicals: radicalGeneration_molm3s is -1; it must be a finite number of at least 0",
    );
    expect(() => radicals(1, NaN)).toThrow(
      "quasiSteadyRadicals: oxygen_molm3 is NaN; it must be a finite number of at least 0",
    );
    expect(() =>
      quasiSteadyRadicals({
        radicalGeneration_molm3s: 1e300,
        oxygen_molm3: 0,
        termination_m3mols: 1e-320,
        oxygenCapture_m3mols: 1,
      }),
    ).toThrow(
      "quasiSteadyRadicals: the radical concentration is Infinity; it must be a finite number; check that the rate",
    );
  });
});
