import { describe, expect, it } from "vitest";
import { deadZone, fitScalingLaw, scalingLawDeadZone } from "../../../lib/models/oxygen.js";

const reading = (curingRate_pers: number, factor = 1, relativeU = 0.1) => ({
  curingRate_pers,
  thickness_um: factor * scalingLawDeadZone({ scalingConstant_umsqrts: 30, curingRate_pers }),
  relativeU,
});

describe("fitScalingLaw", () => {
  it("finds the constant that made the readings, and the exponent of the law", () => {
    const { scalingConstant_umsqrts, exponent, surprises } = fitScalingLaw({
      readings: [0.25, 1, 4].map((rate) => reading(rate)),
    });
    expect(scalingConstant_umsqrts.value).toBeCloseTo(30, 12);
    expect(exponent!.value).toBeCloseTo(-0.5, 12);
    // Without scatter the doubt of the exponent is that of the readings: sigma over the spread of ln rate, ln 4 either way.
    expect(exponent!.u).toBeCloseTo(Math.sqrt(Math.log1p(0.01) / (2 * Math.log(4) ** 2)), 12);
    for (const surprise of surprises) expect(surprise).toBeCloseTo(0, 12);
    // Three readings of 10 % each, without scatter: the mean is known to 10 % over root 3.
    expect(scalingConstant_umsqrts.u / 30).toBeCloseTo(Math.sqrt(Math.log1p(0.01) / 3), 12);
  });

  it("follows the surer reading, and all the way where the other says nothing", () => {
    const fit = (relativeU: number) =>
      fitScalingLaw({ readings: [reading(1, 1, 0.01), reading(4, 2, relativeU)] }).scalingConstant_umsqrts
        .value;
    expect(fit(0.01)).toBeCloseTo(30 * Math.SQRT2, 10);
    expect(fit(0.1)).toBeLessThan(31);
    expect(fit(1e100)).toBeCloseTo(30, 1);
  });

  it("widens the doubt where readings scatter more than they say", () => {
    const calm = fitScalingLaw({ readings: [reading(1), reading(4)] });
    const wild = fitScalingLaw({ readings: [reading(1, 3), reading(4, 1 / 3)] });
    expect(wild.scalingConstant_umsqrts.u).toBeGreaterThan(5 * calm.scalingConstant_umsqrts.u);
    expect(wild.surprises[0]).toBeGreaterThan(3);
  });

  it("shows by its exponent that a film resists, where the law does not hold", () => {
    const readings = [0.25, 0.5, 1, 2].map((radicalGeneration_molm3s) => {
      const zone = deadZone({
        diffusivity_m2s: 1e-10,
        saturation_molm3: 1,
        radicalGeneration_molm3s,
        oxygenPerRadical: 1,
        napierianAbsorption_percm: 0,
        filmEquivalentThickness_um: 300,
      });
      const thickness_um = zone.outcome === "dead-zone" ? zone.thickness_um : NaN;
      return { curingRate_pers: radicalGeneration_molm3s, thickness_um, relativeU: 0.05 };
    });
    expect(fitScalingLaw({ readings }).exponent!.value).toBeLessThan(-0.98);
  });

  it("gives no exponent where the readings cannot show one", () => {
    expect(fitScalingLaw({ readings: [reading(1)] }).exponent).toBeUndefined();
    expect(fitScalingLaw({ readings: [reading(2), reading(2), reading(2)] }).exponent).toBeUndefined();
  });

  it("says what is wrong", () => {
    expect(() => fitScalingLaw({ readings: [] })).toThrow(
      "fitScalingLaw: readings is empty; give at least one dead zone with its light",
    );
    expect(() => fitScalingLaw({ readings: [reading(1), { ...reading(1), thickness_um: 0 }] })).toThrow(
      "fitScalingLaw: readings[1]: thickness_um is 0; it must be a finite number above 0",
    );
  });
});
