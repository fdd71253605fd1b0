import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { cureDepth, exposureForDepth } from "../../../lib/models/cure.js";

const curve = fc.record({
  penetrationDepth_um: fc.double({ min: 5, max: 2000, noNaN: true }),
  criticalExposure_mJcm2: fc.double({ min: 0.1, max: 500, noNaN: true }),
});

describe("the working curve", () => {
  it("is undone by its inverse", () => {
    fc.assert(
      fc.property(curve, fc.double({ min: 0, max: 20, noNaN: true }), (given, depths) => {
        const depth = depths * given.penetrationDepth_um;
        const exposure_mJcm2 = exposureForDepth({ ...given, cureDepth_um: depth });
        // ln E is good to 1e-15 of itself, at most 30: 1e-13 of Dp.
        expect(Math.abs(cureDepth({ ...given, exposure_mJcm2 }) - depth)).toBeLessThan(
          1e-13 * given.penetrationDepth_um * 30,
        );
      }),
    );
  });

  it("gains one penetration depth each time the exposure grows by e, and starts at the critical exposure", () => {
    fc.assert(
      fc.property(curve, (given) => {
        const depth = (exposure_mJcm2: number): number => cureDepth({ ...given, exposure_mJcm2 });
        const { penetrationDepth_um: Dp, criticalExposure_mJcm2: Ec } = given;
        expect(depth(Ec)).toBe(0);
        expect(depth(Ec / 2)).toBe(0);
        expect(depth(0)).toBe(0);
        expect(depth(Math.E * Ec) / Dp).toBeCloseTo(1, 12);
        expect((depth(Math.E * 7 * Ec) - depth(7 * Ec)) / Dp).toBeCloseTo(1, 12);
        expect(exposureForDepth({ ...given, cureDepth_um: 0 })).toBe(Ec);
      }),
    );
  });

  it("needs 22.4084 mJ/cm2 for 1.5 penetration depths from 5: 5 e^1.5", () => {
    const given = { penetrationDepth_um: 100, criticalExposure_mJcm2: 5 };
    expect(exposureForDepth({ ...given, cureDepth_um: 150 })).toBeCloseTo(22.4084, 4);
  });

  it("follows the hatch example of Gibson, Rosen and Stucker", () => {
    // Additive Manufacturing Technologies, chapter 4, p. 92-93, equations 4.23-4.29: hatch spacing 6 mil and beam radius
    // 5 mil give Ep/Emax = 1.1123; with Dp = 5.8 mil a hatched depth of 3 mil needs single lines 2.383 mil deep.
    // Printed to 4 and 3 decimals.
    const r = 6 / 5;
    const ratio = 1 + [1, 2, 3, 4].reduce((sum, n) => sum + 2 * Math.exp(-2 * (n * r) ** 2), 0);
    expect(Math.abs(ratio - 1.1123)).toBeLessThan(5e-5);
    const um_per_mil = 25.4;
    const given = { penetrationDepth_um: 5.8 * um_per_mil, criticalExposure_mJcm2: 4 };
    const hatched = exposureForDepth({ ...given, cureDepth_um: 3 * um_per_mil });
    const line = cureDepth({ ...given, exposure_mJcm2: hatched / ratio });
    expect(Math.abs(line / um_per_mil - 2.383)).toBeLessThan(5e-4);
  });

  const good = { penetrationDepth_um: 100, criticalExposure_mJcm2: 5 };
  it.each([
    [
      () => cureDepth({ ...good, exposure_mJcm2: -1 }),
      "cureDepth: exposure_mJcm2 is -1; it must be a finite number of at least 0",
    ],
    [
      () => cureDepth({ ...good, penetrationDepth_um: 0, exposure_mJcm2: 9 }),
      "cureDepth: penetrationDepth_um is 0; it must be a finite number above 0",
    ],
    [
      () => cureDepth({ ...good, criticalExposure_mJcm2: NaN, exposure_mJcm2: 9 }),
      "cureDepth: criticalExposure_mJcm2 is NaN; it must be a finite number above 0",
    ],
    [
      () => exposureForDepth({ ...good, cureDepth_um: -1 }),
      "exposureForDepth: cureDepth_um is -1; it must be a finite number of at least 0",
    ],
    [
      () => exposureForDepth({ ...good, cureDepth_um: 1e5 }),
      "exposureForDepth: the exposure in mJ/cm2 is Infinity; it must be a finite number; the depth is 1.00e+3 penetration depths; no light reaches that far",
    ],
    [
      () => cureDepth({ exposure_mJcm2: 1e300, penetrationDepth_um: 1e308, criticalExposure_mJcm2: 1 }),
      "cureDepth: the cure depth in um is Infinity; it must be a finite number",
    ],
  ])("%s", (call, message) => {
    expect(call).toThrow(message);
  });
});
