import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  fitTemperatureLaw,
  glycerolWaterViscosity,
  temperatureForViscosity,
  viscosityAtTemperature,
  vogelViscosity,
} from "../../../lib/models/viscosity.js";

const law = { lnPrefactor: -3, vogelConstant_K: 1100, vogelTemperature_K: 185 };
const viscosityAt = (temperature_C: number): number => vogelViscosity({ ...law, temperature_C });
const vat = { coolest_C: 20, warmest_C: 60 };

describe("temperatureForViscosity", () => {
  it("gives back the temperature a viscosity belongs to", () => {
    fc.assert(
      fc.property(fc.double({ min: 20.001, max: 60, noNaN: true }), (temperature_C) => {
        const found = temperatureForViscosity({
          viscosityAt,
          limit_mPas: viscosityAt(temperature_C),
          ...vat,
        });
        expect(found.outcome).toBe("warm-to");
        // ln eta changes by 0.07 per kelvin, and is good to 1e-15 of 8.
        if (found.outcome === "warm-to") expect(found.temperature_C).toBeCloseTo(temperature_C, 10);
      }),
    );
  });

  it("has the closed form B / (ln eta - A) + T0 for the Vogel law", () => {
    const found = temperatureForViscosity({ viscosityAt, limit_mPas: 500, ...vat });
    const closed = 1100 / (Math.log(500) + 3) + 185 - 273.15;
    expect(found).toEqual({ outcome: "warm-to", temperature_C: expect.closeTo(closed, 10) as number });
  });

  it("takes any viscosity that falls with temperature: 80 % glycerol down to 30 mPa s", () => {
    const found = temperatureForViscosity({
      viscosityAt: (temperature_C) => glycerolWaterViscosity({ glycerolMassFraction: 0.8, temperature_C }),
      limit_mPas: 30,
      ...vat,
    });
    // The equation gives 34.5 at 30 °C and 21.1 at 40 °C.
    expect(found.outcome === "warm-to" && found.temperature_C).toBeCloseTo(32.75, 1);
  });

  it("warms further for the upper end of a prediction interval", () => {
    const temperatures_C = [20, 30, 40, 50, 60];
    const viscosities_mPas = [1.03, 0.99, 1, 0.98, 1.01].map((f, i) => f * viscosityAt(temperatures_C[i]!));
    const fit = fitTemperatureLaw({ temperatures_C, viscosities_mPas, law: "andrade" });
    const [middle, upper] = (["value", "high"] as const).map((end) =>
      temperatureForViscosity({
        viscosityAt: (temperature_C) => viscosityAtTemperature({ fit, temperature_C, level: 0.9 })[end],
        limit_mPas: 500,
        ...vat,
      }),
    );
    expect(middle!.outcome === "warm-to" && upper!.outcome === "warm-to").toBe(true);
    expect((upper as { temperature_C: number }).temperature_C).toBeGreaterThan(
      (middle as { temperature_C: number }).temperature_C + 0.5,
    );
  });

  it("says when the vat need not be warm, and when it cannot be warm enough", () => {
    expect(temperatureForViscosity({ viscosityAt, limit_mPas: 1e4, ...vat })).toEqual({
      outcome: "thin-enough",
      viscosity_mPas: viscosityAt(20),
    });
    expect(temperatureForViscosity({ viscosityAt, limit_mPas: 1, ...vat })).toEqual({
      outcome: "too-thick",
      viscosity_mPas: viscosityAt(60),
    });
  });

  it.each([
    [
      { viscosityAt, limit_mPas: 0, ...vat },
      "temperatureForViscosity: limit_mPas is 0; it must be a finite number above 0",
    ],
    [
      { viscosityAt, limit_mPas: 500, coolest_C: 60, warmest_C: 20 },
      "temperatureForViscosity: coolest_C is 60 and warmest_C is 20; the first must be below the second",
    ],
    [
      { viscosityAt: (t: number) => t, limit_mPas: 30, ...vat },
      "temperatureForViscosity: the viscosity rises from 20 mPas at 20 °C to 60 mPas at 60 °C; it must fall with temperature",
    ],
    [
      { viscosityAt: () => NaN, limit_mPas: 30, ...vat },
      "temperatureForViscosity: the viscosity at 20 °C in mPas is NaN; it must be a finite number above 0",
    ],
  ])("refuses %j", (question, message) => {
    expect(() => temperatureForViscosity(question)).toThrow(message);
  });
});
