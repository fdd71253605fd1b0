import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { shearThinning } from "../../../lib/models/viscosity.js";

const rates = [1, 5, 20, 100];
const powerLaw = (n: number, k = 2000) => ({
  shearRates_pers: rates,
  viscosities_mPas: rates.map((rate) => k * rate ** (n - 1)),
  relativeU: 0.02,
  printShearRate_pers: 30,
});

describe("shearThinning", () => {
  it("finds the index of a power law, whatever its level", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.3, max: 1.6, noNaN: true }),
        fc.double({ min: 1, max: 1e5, noNaN: true }),
        (n, k) => {
          expect(shearThinning(powerLaw(n, k)).flowIndex).toBeCloseTo(n, 9);
        },
      ),
    );
  });

  it("does not call scatter thinning, and knows the doubt of a slope", () => {
    const found = shearThinning({
      shearRates_pers: [10, 50],
      viscosities_mPas: [1000, 960],
      relativeU: 0.02,
      printShearRate_pers: 30,
    });
    // Two readings: u = relativeU sqrt(2) / ln(5).
    expect(found.u).toBeCloseTo((0.02 * Math.SQRT2) / Math.log(5), 12);
    expect(found.flowIndex).toBeCloseTo(1 + Math.log(0.96) / Math.log(5), 12);
    expect(found.warnings).toEqual([]);
  });

  it("warns of thinning, thickening and a shear rate of use that was not measured", () => {
    expect(shearThinning(powerLaw(0.8)).warnings).toEqual([
      {
        code: "shear-thinning",
        message:
          "the viscosity falls by a factor of 2.5 from 1 to 100 1/s; compare readings at one shear rate, best 30 1/s, " +
          "and do not put them into a mixing rule with others",
      },
    ]);
    expect(shearThinning(powerLaw(1.2)).warnings[0]!.code).toBe("shear-thickening");
    expect(shearThinning({ ...powerLaw(1), printShearRate_pers: 500 }).warnings).toEqual([
      { code: "other-shear-rate", message: "measured at 1 to 100 1/s and used at 500 1/s; measure there" },
    ]);
    expect(shearThinning({ ...powerLaw(1), printShearRate_pers: 0.5 }).warnings).toHaveLength(1);
  });

  const good = powerLaw(1);
  it.each([
    [
      { ...good, shearRates_pers: [10], viscosities_mPas: [1] },
      "shearThinning: shearRates_pers holds 1 number; at least 2 must be given",
    ],
    [
      { ...good, shearRates_pers: [10, 10, 10, 10] },
      "shearThinning: all readings are at 10 1/s; measure at two shear rates or more",
    ],
    [
      { ...good, viscosities_mPas: [1, 2, 3] },
      "shearThinning: shearRates_pers holds 4, viscosities_mPas holds 3; the lists must be of the same length",
    ],
    [
      { ...good, shearRates_pers: [0, 1, 2, 3] },
      "shearThinning: shearRates_pers[0] is 0; it must be a finite number above 0",
    ],
    [{ ...good, relativeU: 0 }, "shearThinning: relativeU is 0; it must be a number above 0 and at most 0.5"],
    [
      { ...good, printShearRate_pers: -1 },
      "shearThinning: printShearRate_pers is -1; it must be a finite number above 0",
    ],
    [
      { ...good, viscosities_mPas: [1, 2, 3, -4] },
      "shearThinning: viscosities_mPas[3] is -4; it must be a finite number above 0",
    ],
  ])("refuses %j", (readings, message) => {
    expect(() => shearThinning(readings)).toThrow(message);
  });
});
