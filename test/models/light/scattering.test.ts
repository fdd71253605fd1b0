import { describe, expect, it } from "vitest";
import { filledPenetrationDepth, opticalDepth, scatteringCoefficient } from "../../../lib/models/light.js";

// Round numbers for checking, not a material.
const resin = {
  particleDiameter_um: 0.5,
  refractiveIndex: 1.5,
  particleRefractiveIndex: 1.6,
  scatteringEfficiency: 0.4,
};
const depth = (change: Partial<typeof resin>, napierianAbsorption_percm = 0): number =>
  filledPenetrationDepth({ ...resin, ...change, napierianAbsorption_percm });

describe("scattering", () => {
  it("alone is the printed form Dp = (2 d / (3 Q)) (n0 / dn)^2", () => {
    expect(depth({}) / (((2 * 0.5) / (3 * 0.4)) * (1.5 / 0.1) ** 2)).toBeCloseTo(1, 12);
  });

  it("gives four times the depth at half the index difference, and a depth as the particle diameter", () => {
    expect(depth({ particleRefractiveIndex: 1.55 }) / depth({})).toBeCloseTo(4, 10);
    expect(depth({ particleDiameter_um: 1 }) / depth({})).toBeCloseTo(2, 12);
    expect(depth({ scatteringEfficiency: 0.8 }) / depth({})).toBeCloseTo(0.5, 12);
    // The sign of the difference does not matter.
    expect(depth({ particleRefractiveIndex: 1.4 }) / depth({})).toBeCloseTo(1, 12);
  });

  it("leaves the absorption alone when the filler is index-matched, and adds to it otherwise", () => {
    const matched = depth({ particleRefractiveIndex: 1.5 }, 80);
    expect(matched).toBe(opticalDepth({ napierianAbsorption_percm: 80 }));
    expect(1 / depth({}, 80)).toBeCloseTo(1 / depth({}) + 1 / matched, 12);
    expect(scatteringCoefficient({ ...resin, particleRefractiveIndex: 1.5 })).toBe(0);
  });

  it("says what is wrong", () => {
    expect(() => depth({ particleRefractiveIndex: 1.5 })).toThrow(
      "filledPenetrationDepth: scattering and absorption together is 0; it must be a finite number above 0; " +
        "light that is neither scattered nor absorbed has no depth; include the background of the resin",
    );
    expect(() => scatteringCoefficient({ ...resin, refractiveIndex: 0.9 })).toThrow(
      "scatteringCoefficient: refractiveIndex is 0.9; it must be a number from 1 to 4",
    );
    expect(() => scatteringCoefficient({ ...resin, particleDiameter_um: 0 })).toThrow(
      "scatteringCoefficient: particleDiameter_um is 0; it must be a finite number above 0",
    );
    expect(() => depth({}, -1)).toThrow(
      "filledPenetrationDepth: napierianAbsorption_percm is -1; it must be a finite number of at least 0",
    );
    expect(() => scatteringCoefficient({ ...resin, particleDiameter_um: 1e-320 })).toThrow(
      "scatteringCoefficient: the scattering in 1/cm is Infinity; it must be a finite number",
    );
  });
});
