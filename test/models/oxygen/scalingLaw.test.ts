import { describe, expect, it } from "vitest";
import { deadZone, scalingConstantFromDiffusivity, scalingLawDeadZone } from "../../../lib/models/oxygen.js";

describe("scalingLawDeadZone", () => {
  // Tumbleston et al., Science 347 (2015) 1349, doi 10.1126/science.aaa2397, equation 1 with the published constant of
  // 30 um s^(-1/2) (both second hand); the thicknesses follow, printed to 0.01 um.
  it.each([
    [0.1, 94.87],
    [0.25, 60],
    [1, 30],
    [2.25, 20],
    [4, 15],
    [9, 10],
  ])("at %d 1/s is %d um", (curingRate_pers, thickness) => {
    expect(
      Math.abs(scalingLawDeadZone({ scalingConstant_umsqrts: 30, curingRate_pers }) - thickness),
    ).toBeLessThan(0.005);
  });

  it("says what is wrong", () => {
    expect(() => scalingLawDeadZone({ scalingConstant_umsqrts: 30, curingRate_pers: 0 })).toThrow(
      "scalingLawDeadZone: curingRate_pers is 0; it must be a finite number above 0",
    );
    expect(() => scalingLawDeadZone({ scalingConstant_umsqrts: 1e300, curingRate_pers: 1e-300 })).toThrow(
      "scalingLawDeadZone: the thickness in um is Infinity; it must be a finite number",
    );
    expect(() => scalingConstantFromDiffusivity({ diffusivity_m2s: -1 })).toThrow(
      "scalingConstantFromDiffusivity: diffusivity_m2s is -1; it must be a finite number above 0",
    );
  });
});

describe("scalingConstantFromDiffusivity", () => {
  it("turns the published constant into an ordinary diffusivity, 4.5e-10 m2/s", () => {
    expect(scalingConstantFromDiffusivity({ diffusivity_m2s: 4.5e-10 })).toBeCloseTo(30, 10);
  });

  it("makes the scaling law the dead zone in even light without film, when the dose that cures is that of oxygen", () => {
    const diffusivity_m2s = 1.3e-10;
    const [saturation_molm3, radicalGeneration_molm3s, oxygenPerRadical] = [0.8, 0.37, 1.6];
    const zone = deadZone({
      diffusivity_m2s,
      saturation_molm3,
      radicalGeneration_molm3s,
      oxygenPerRadical,
      napierianAbsorption_percm: 0,
      filmEquivalentThickness_um: 0,
    });
    const law = scalingLawDeadZone({
      scalingConstant_umsqrts: scalingConstantFromDiffusivity({ diffusivity_m2s }),
      curingRate_pers: (oxygenPerRadical * radicalGeneration_molm3s) / saturation_molm3,
    });
    expect(zone.outcome === "dead-zone" && zone.thickness_um / law).toBeCloseTo(1, 13);
  });
});
