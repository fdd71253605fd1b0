import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  absorberConcentration,
  absorptionCoefficient,
  molarAbsorptionFromMassAbsorption,
  molarAbsorptionFromSpecificAbsorbance,
  opticalDepth,
  transmittedFraction,
} from "../../../lib/models/light.js";

const dichromate_gmol = 294.185;

/** Decadic absorbance over 1 cm, the figure a spectrophotometer shows. */
const absorbance_1cm = (napierianAbsorption_percm: number): number =>
  -Math.log10(transmittedFraction({ napierianAbsorption_percm, depth_um: 1e4 }));

describe("absorption, identities of base and unit", () => {
  const eps = fc.double({ min: 1, max: 1e5, noNaN: true });
  const c = fc.double({ min: 1e-4, max: 1, noNaN: true });

  it("takes decadic molar coefficients and gives a Napierian linear one: factor ln 10", () => {
    const one = { molarAbsorption_Lmolcm: 1, concentration_molL: 1 };
    expect(absorptionCoefficient({ absorbers: [one], background_percm: 0 })).toBeCloseTo(Math.LN10, 12);
    expect(absorbance_1cm(absorptionCoefficient({ absorbers: [one], background_percm: 0 }))).toBeCloseTo(
      1,
      12,
    );
  });

  it("adds absorbers and background, and does not care how a concentration is split", () => {
    fc.assert(
      fc.property(eps, c, c, fc.double({ min: 0, max: 100, noNaN: true }), (e, c1, c2, background_percm) => {
        const absorber = (concentration_molL: number) => ({ molarAbsorption_Lmolcm: e, concentration_molL });
        const split = absorptionCoefficient({ absorbers: [absorber(c1), absorber(c2)], background_percm });
        const whole = absorptionCoefficient({ absorbers: [absorber(c1 + c2)], background_percm: 0 });
        expect(split / (whole + background_percm)).toBeCloseTo(1, 12);
      }),
    );
    expect(absorptionCoefficient({ absorbers: [], background_percm: 3 })).toBe(3);
  });

  it("has 1/e left after one penetration depth, a tenth after ln 10 of them, all of it at the window", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 1e5, noNaN: true }), (napierianAbsorption_percm) => {
        const Dp = opticalDepth({ napierianAbsorption_percm });
        const left = (depth_um: number): number =>
          transmittedFraction({ napierianAbsorption_percm, depth_um });
        expect(left(Dp)).toBeCloseTo(Math.exp(-1), 12);
        expect(left(Math.LN10 * Dp)).toBeCloseTo(0.1, 12);
        expect(left(0)).toBe(1);
      }),
    );
    expect(transmittedFraction({ napierianAbsorption_percm: 0, depth_um: 1e6 })).toBe(1);
  });

  it("has a penetration depth of 0.434294 over the decadic absorbance per um", () => {
    const decadic_perum = 0.02;
    const napierianAbsorption_percm = decadic_perum * Math.LN10 * 1e4;
    expect(opticalDepth({ napierianAbsorption_percm }) / (Math.LOG10E / decadic_perum)).toBeCloseTo(1, 12);
  });

  it("reads mL/(g cm) and A(1 %, 1 cm) as the same substance", () => {
    fc.assert(
      fc.property(eps, fc.double({ min: 100, max: 1000, noNaN: true }), (e, molarMass_gmol) => {
        const massAbsorption_mLgcm = (1000 * e) / molarMass_gmol;
        const specificAbsorbance_dLgcm = (10 * e) / molarMass_gmol;
        expect(molarAbsorptionFromMassAbsorption({ massAbsorption_mLgcm, molarMass_gmol }) / e).toBeCloseTo(
          1,
          12,
        );
        expect(
          molarAbsorptionFromSpecificAbsorbance({ specificAbsorbance_dLgcm, molarMass_gmol }) / e,
        ).toBeCloseTo(1, 12);
      }),
    );
  });

  it("dissolves 1 g in a litre of blend", () => {
    expect(absorberConcentration({ massFraction: 0.001, density_gcm3: 1, molarMass_gmol: 500 })).toBeCloseTo(
      0.002,
      15,
    );
  });
});

describe("absorption, the potassium dichromate standard", () => {
  // Nominal absorbances of potassium dichromate (CAS 7778-50-9) in 0.001 mol/L perchloric acid, 1 cm, as supplied with
  // the filled cells: 60 mg/L 0.643 at 350 nm, 100 mg/L 1.074; printed to 0.001, hence 0.3 %.
  const eps350 = molarAbsorptionFromSpecificAbsorbance({
    specificAbsorbance_dLgcm: 107.2,
    molarMass_gmol: dichromate_gmol,
  });
  const solution = (mass_gL: number, molarAbsorption_Lmolcm: number): number =>
    absorptionCoefficient({
      absorbers: [{ molarAbsorption_Lmolcm, concentration_molL: mass_gL / dichromate_gmol }],
      background_percm: 0,
    });

  it("shows 0.643 at 60 mg/L and 1.074 at 100 mg/L, 350 nm", () => {
    expect(Math.abs(eps350 / 3153 - 1)).toBeLessThan(3e-3);
    expect(Math.abs(absorbance_1cm(solution(0.06, eps350)) / 0.643 - 1)).toBeLessThan(3e-3);
    expect(Math.abs(absorbance_1cm(solution(0.1, eps350)) / 1.074 - 1)).toBeLessThan(3e-3);
    const napierianAbsorption_percm = solution(0.06, eps350);
    expect(transmittedFraction({ napierianAbsorption_percm, depth_um: 1e4 })).toBeCloseTo(0.2275, 3);
  });

  it("is not followed at 235 nm, where the ion pairs up: 1.4 % too low from 20 to 100 mg/L", () => {
    const eps235 = molarAbsorptionFromSpecificAbsorbance({
      specificAbsorbance_dLgcm: 123,
      molarMass_gmol: dichromate_gmol,
    });
    const shortfall = 1 - absorbance_1cm(solution(0.1, eps235)) / 1.247;
    expect(shortfall).toBeGreaterThan(0.012);
    expect(shortfall).toBeLessThan(0.016);
  });
});

describe("absorption, refusals", () => {
  it.each([
    [
      () =>
        absorptionCoefficient({
          absorbers: [{ molarAbsorption_Lmolcm: -1, concentration_molL: 1 }],
          background_percm: 0,
        }),
      "absorptionCoefficient: absorbers[0].molarAbsorption_Lmolcm is -1; it must be a finite number of at least 0",
    ],
    [
      () =>
        absorptionCoefficient({
          absorbers: [{ molarAbsorption_Lmolcm: 1, concentration_molL: NaN }],
          background_percm: 0,
        }),
      "absorptionCoefficient: absorbers[0].concentration_molL is NaN; it must be a finite number of at least 0",
    ],
    [
      () =>
        absorptionCoefficient({
          absorbers: [{ molarAbsorption_Lmolcm: 1e200, concentration_molL: 1e200 }],
          background_percm: 0,
        }),
      "absorptionCoefficient: the absorption coefficient in 1/cm is Infinity; it must be a finite number; an input is beyond any real substance",
    ],
    [
      () => absorptionCoefficient({ absorbers: [], background_percm: -1 }),
      "absorptionCoefficient: background_percm is -1; it must be a finite number of at least 0",
    ],
    [
      () => opticalDepth({ napierianAbsorption_percm: 0 }),
      "opticalDepth: napierianAbsorption_percm is 0; it must be a finite number above 0; " +
        "without absorption light has no depth; include the background of the resin",
    ],
    [
      () => transmittedFraction({ napierianAbsorption_percm: 1, depth_um: -5 }),
      "transmittedFraction: depth_um is -5; it must be a finite number of at least 0",
    ],
    [
      () => molarAbsorptionFromMassAbsorption({ massAbsorption_mLgcm: 1000, molarMass_gmol: 0.2 }),
      "molarAbsorptionFromMassAbsorption: molarMass_gmol is 0.2; it must be a number from 1 to 10000000; give it in g/mol",
    ],
    [
      () => molarAbsorptionFromSpecificAbsorbance({ specificAbsorbance_dLgcm: -1, molarMass_gmol: 200 }),
      "molarAbsorptionFromSpecificAbsorbance: specificAbsorbance_dLgcm is -1; it must be a finite number of at least 0",
    ],
    [
      () => absorberConcentration({ massFraction: 1.5, density_gcm3: 1.1, molarMass_gmol: 348 }),
      "absorberConcentration: massFraction is 1.5; it must be a number from 0 to 1",
    ],
    [
      () => absorberConcentration({ massFraction: 0.01, density_gcm3: 1100, molarMass_gmol: 348 }),
      "absorberConcentration: density_gcm3 is 1100; it must be a number from 0.1 to 25; give it in g/cm3",
    ],
  ])("%s", (call, message) => {
    expect(call).toThrow(message);
  });
});
