import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { andradeFromReference, andradeViscosity, fitAndrade } from "../../../lib/models/viscosity.js";

const reading = fc.record({
  viscosity_mPas: fc.double({ min: 0.1, max: 1e5, noNaN: true }),
  referenceTemperature_C: fc.double({ min: 0, max: 80, noNaN: true }),
  activation_K: fc.double({ min: 500, max: 9000, noNaN: true }),
});

describe("andradeViscosity and andradeFromReference", () => {
  it("goes through the reference, and falls with temperature", () => {
    fc.assert(
      fc.property(reading, (given) => {
        const law = andradeFromReference(given);
        const at = (temperature_C: number): number => andradeViscosity({ ...law, temperature_C });
        // ln eta is the difference of two terms of up to 30, so 1e-13 is rounding.
        expect(at(given.referenceTemperature_C) / given.viscosity_mPas).toBeCloseTo(1, 12);
        expect(at(given.referenceTemperature_C + 1)).toBeLessThan(at(given.referenceTemperature_C));
      }),
    );
  });

  it("gives published readings from published parameters: butyl acrylate", () => {
    // Butyl acrylate, CAS 141-32-2: ln A = -4.52173, B = 1286.287 K published with the readings (open compilation; the
    // readings probably J. Chem. Eng. Data 43 (1998) 826-829). They fit to 0.2 %, the scatter of that fit.
    for (const [temperature_C, eta] of [
      [20, 0.8763],
      [30, 0.7568],
      [40, 0.6609],
    ] as const) {
      const calculated = andradeViscosity({ lnPrefactor: -4.52173, activation_K: 1286.287, temperature_C });
      expect(Math.abs(calculated / eta - 1)).toBeLessThan(2e-3);
    }
  });

  it.each([
    [
      { lnPrefactor: -5, activation_K: 1000, temperature_C: -300 },
      "andradeViscosity: temperature_C is -300; it must be a finite number above -273.15; give it in degrees Celsius",
    ],
    [
      { lnPrefactor: -5, activation_K: 0, temperature_C: 25 },
      "andradeViscosity: activation_K is 0; it must be a finite number above 0",
    ],
    [
      { lnPrefactor: NaN, activation_K: 1000, temperature_C: 25 },
      "andradeViscosity: lnPrefactor is NaN; it must be a finite number",
    ],
    [
      { lnPrefactor: -5, activation_K: 1000, temperature_C: -273 },
      "andradeViscosity: the viscosity in mPas is Infinity; it must be a finite number above 0; check the parameters and the temperature",
    ],
  ])("refuses %j", (input, message) => {
    expect(() => andradeViscosity(input)).toThrow(message);
  });

  it("refuses a reference it cannot start from", () => {
    expect(() =>
      andradeFromReference({ viscosity_mPas: 0, referenceTemperature_C: 25, activation_K: 4000 }),
    ).toThrow("andradeFromReference: viscosity_mPas is 0; it must be a finite number above 0");
  });
});

describe("fitAndrade", () => {
  it("returns the law that made the readings", () => {
    fc.assert(
      fc.property(reading, (given) => {
        const law = andradeFromReference(given);
        const temperatures_C = [60, 20, 35, 25];
        const viscosities_mPas = temperatures_C.map((temperature_C) =>
          andradeViscosity({ ...law, temperature_C }),
        );
        const fit = fitAndrade({ temperatures_C, viscosities_mPas });
        // 1/T spans a tenth of itself only, which costs two digits.
        expect(fit.activation_K / law.activation_K).toBeCloseTo(1, 10);
        expect(fit.residualStandardDeviation).toBeLessThan(1e-12);
        expect(fit.points).toBe(4);
      }),
    );
  });

  it("fits butyl acrylate as an independent program does", () => {
    // The readings above; A = -4.54972, B = 1294.956 K and an rms of 4e-4 by an independent least-squares program.
    const fit = fitAndrade({ temperatures_C: [20, 30, 40], viscosities_mPas: [0.8763, 0.7568, 0.6609] });
    expect(fit.lnPrefactor).toBeCloseTo(-4.54972, 4);
    expect(Math.abs(fit.activation_K / 1294.956 - 1)).toBeLessThan(1e-6);
  });

  it("states the errors of a straight line in 1/T", () => {
    const temperatures_C = [10, 20, 40, 60];
    const viscosities_mPas = [52, 30, 12, 5.6];
    const x = temperatures_C.map((t) => 1 / (t + 273.15));
    const mean = x.reduce((sum, v) => sum + v, 0) / 4;
    const Sxx = x.reduce((sum, v) => sum + (v - mean) ** 2, 0);
    const fit = fitAndrade({ temperatures_C, viscosities_mPas });
    const s = fit.residualStandardDeviation;
    expect(fit.activationStandardError_K / (s / Math.sqrt(Sxx))).toBeCloseTo(1, 10);
    expect(fit.lnPrefactorStandardError / (s * Math.sqrt(1 / 4 + mean ** 2 / Sxx))).toBeCloseTo(1, 10);
  });

  it("refuses a series that rises, and names the readings", () => {
    // n-Butyl methacrylate as an open compilation lists it, from mixed sources: 20 °C lies above 15 °C.
    const temperatures_C = [4, 15, 20, 25, 35, 50, 60];
    const viscosities_mPas = [1.3641, 1.0796, 1.0883, 0.92, 0.79334, 0.65068, 0.54616];
    expect(() => fitAndrade({ temperatures_C, viscosities_mPas })).toThrow(
      "fitAndrade: the viscosity does not fall from reading 1 (15 °C, 1.0796 mPas) to reading 2 (20 °C, 1.0883 mPas); " +
        "check both, or leave out the one that is wrong",
    );
    const without = (list: readonly number[]): number[] => list.filter((_, row) => row !== 2);
    const fit = fitAndrade({
      temperatures_C: without(temperatures_C),
      viscosities_mPas: without(viscosities_mPas),
    });
    expect(fit.points).toBe(6);
  });

  it("takes repeats that scatter at one temperature", () => {
    const fit = fitAndrade({ temperatures_C: [25, 25, 24.9, 40], viscosities_mPas: [100, 102, 101, 50] });
    expect(fit.activation_K).toBeGreaterThan(3000);
  });

  it.each([
    [[20, 30], [2, 1], "fitAndrade: temperatures_C holds 2 numbers; at least 3 must be given"],
    [[20, 20, 20], [2, 1, 1.5], "fitAndrade: all readings are at 20 °C; measure at two temperatures or more"],
    [[20, 30, 40], [2, 1, 0], "fitAndrade: viscosities_mPas[2] is 0; it must be a finite number above 0"],
    [
      [20, 30, 40],
      [2, 1],
      "fitAndrade: temperatures_C holds 3, viscosities_mPas holds 2; the lists must be of the same length",
    ],
  ])("refuses %j with %j", (temperatures_C, viscosities_mPas, message) => {
    expect(() => fitAndrade({ temperatures_C, viscosities_mPas })).toThrow(message);
  });
});
