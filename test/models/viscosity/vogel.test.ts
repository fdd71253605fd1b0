import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { andradeViscosity, vogelViscosity, waterViscosity } from "../../../lib/models/viscosity.js";

describe("vogelViscosity", () => {
  it("is Andrade's law with a Vogel temperature of 0 K", () => {
    const lnPrefactor = fc.double({ min: -12, max: 0, noNaN: true });
    const constant = fc.double({ min: 500, max: 6000, noNaN: true });
    const temperature = fc.double({ min: -20, max: 120, noNaN: true });
    fc.assert(
      fc.property(lnPrefactor, constant, temperature, (A, B, temperature_C) => {
        const vogel = vogelViscosity({
          lnPrefactor: A,
          vogelConstant_K: B,
          vogelTemperature_K: 0,
          temperature_C,
        });
        expect(vogel / andradeViscosity({ lnPrefactor: A, activation_K: B, temperature_C })).toBeCloseTo(
          1,
          13,
        );
      }),
    );
  });

  it("follows water within 0.6 % from 293 to 373 K, with published parameters", () => {
    // A = -3.7188, B = 578.919 K, T0 = 137.546 K from an open compilation (primary source unknown) against the IAPWS
    // equation; 0.6 % is how far the two were found apart by an independent program.
    const law = { lnPrefactor: -3.7188, vogelConstant_K: 578.919, vogelTemperature_K: 137.546 };
    for (const [temperature_C, printed_uPas] of [
      [20, 1001.6649],
      [30, 800.1174],
      [50, 548.9809],
      [80, 355.6896],
      [100, 283.192],
    ] as const) {
      const eta = vogelViscosity({ ...law, temperature_C });
      expect(Math.abs((1000 * eta) / printed_uPas - 1)).toBeLessThan(1e-6);
      expect(Math.abs(eta / waterViscosity({ temperature_C }) - 1)).toBeLessThan(6e-3);
    }
  });

  const good = { lnPrefactor: -5, vogelConstant_K: 1200, vogelTemperature_K: 150, temperature_C: 25 };
  it.each([
    [
      { ...good, vogelTemperature_K: 300 },
      "vogelViscosity: temperature_C is 25, at or below the Vogel temperature of 26.85 °C; the law holds above it, and the liquid is a glass there",
    ],
    [
      { ...good, vogelTemperature_K: -1 },
      "vogelViscosity: vogelTemperature_K is -1; it must be a finite number of at least 0",
    ],
    [
      { ...good, vogelConstant_K: 0 },
      "vogelViscosity: vogelConstant_K is 0; it must be a finite number above 0",
    ],
    [
      { ...good, vogelTemperature_K: 298.1499 },
      "vogelViscosity: the viscosity in mPas is Infinity; it must be a finite number above 0; check the parameters and the temperature",
    ],
  ])("refuses %j", (input, message) => {
    expect(() => vogelViscosity(input)).toThrow(message);
  });
});
