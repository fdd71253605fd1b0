import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  effectiveSolidFraction,
  hardSpherePacking,
  hardSphereViscosity,
  kriegerDougherty,
  maronPierce,
  massToVolumeFractions,
  solidVolumeFraction,
  sphereIntrinsicViscosity,
} from "../../../lib/models/viscosity.js";

const spheres = (solidFraction: number, packingLimit: number): number =>
  kriegerDougherty({ solidFraction, packingLimit, intrinsicViscosity: sphereIntrinsicViscosity });
const limit = fc.double({ min: 0.2, max: 1, noNaN: true });

describe("kriegerDougherty and maronPierce", () => {
  it("are 1 without solid, rise with it, and grow as [eta] phi and 2 phi / phi_m at first", () => {
    fc.assert(
      fc.property(limit, fc.double({ min: 1, max: 10, noNaN: true }), (packingLimit, intrinsicViscosity) => {
        const at = (solidFraction: number): number =>
          kriegerDougherty({ solidFraction, packingLimit, intrinsicViscosity });
        expect(at(0)).toBe(1);
        expect(maronPierce({ solidFraction: 0, packingLimit })).toBe(1);
        expect(at(0.1)).toBeGreaterThan(at(0.05));
        // Second-order terms are below 1e-6 of the first here.
        expect((at(1e-8) - 1) / 1e-8 / intrinsicViscosity).toBeCloseTo(1, 6);
        const slope = (maronPierce({ solidFraction: 1e-8, packingLimit }) - 1) / 1e-8;
        expect((slope * packingLimit) / 2).toBeCloseTo(1, 6);
      }),
    );
  });

  it("are one rule where [eta] phi_m is 2", () => {
    for (const solidFraction of [0.1, 0.3, 0.55]) {
      const same = kriegerDougherty({ solidFraction, packingLimit: 0.63, intrinsicViscosity: 2 / 0.63 });
      expect(same / maronPierce({ solidFraction, packingLimit: 0.63 })).toBeCloseTo(1, 12);
    }
  });

  // The two formulas with the packing limits of de Kruif et al. 1985, worked out by an independent program, 4 decimals.
  it.each([
    [0.05, 1.1391, 1.139, 1.1798, 1.1573],
    [0.1, 1.3129, 1.3124, 1.413, 1.3547],
    [0.2, 1.8249, 1.8212, 2.1466, 1.9381],
    [0.3, 2.7689, 2.7512, 3.6446, 2.9988],
    [0.4, 4.8892, 4.8034, 7.5028, 5.2456],
    [0.5, 12.0088, 11.3784, 23.4852, 11.4308],
    [0.55, 25.7985, 23.0728, 62.0156, 19.6914],
  ])("have the printed values at phi = %d", (phi, KD63, KD64, low, high) => {
    const { lowShear, highShear } = hardSpherePacking;
    expect(Math.abs(spheres(phi, 0.63) - KD63)).toBeLessThan(1e-4);
    expect(Math.abs(spheres(phi, 0.64) - KD64)).toBeLessThan(1e-4);
    const square = (packingLimit: number): number => maronPierce({ solidFraction: phi, packingLimit });
    expect(Math.abs(square(lowShear.value) - low)).toBeLessThan(1e-4);
    expect(Math.abs(square(highShear.value) - high)).toBeLessThan(1e-4);
  });

  it("lie on either side of silica spheres at phi = 0.2, each within two standard uncertainties", () => {
    // De Kruif, van Iersel, Vrij, Russel, J. Chem. Phys. 83 (1985) 4717-4725, doi 10.1063/1.448997: 1.996 +- 0.113.
    const measured = hardSphereViscosity({ solidFraction: 0.2, shear: "low" });
    const [KD, square] = [spheres(0.2, 0.63), maronPierce({ solidFraction: 0.2, packingLimit: 0.63 })];
    expect((measured.value - KD) / measured.u).toBeCloseTo(1.5, 1);
    expect((square - measured.value) / measured.u).toBeCloseTo(1.3, 1);
  });

  it.each([
    [
      () => spheres(0.63, 0.63),
      "kriegerDougherty: solidFraction is 0.63, at or above the packing limit of 0.63; the particles touch and the paste does not flow, " +
        "so take less solid or particles of several sizes",
    ],
    [
      () => spheres(0.7, 0.63),
      "kriegerDougherty: solidFraction is 0.7, at or above the packing limit of 0.63",
    ],
    [
      () => maronPierce({ solidFraction: 0.71, packingLimit: 0.71 }),
      "maronPierce: solidFraction is 0.71, at or above the packing limit of 0.71",
    ],
    [() => spheres(-0.1, 0.63), "kriegerDougherty: solidFraction is -0.1; it must be a number from 0 to 1"],
    [
      () => spheres(0.3, 1.2),
      "kriegerDougherty: packingLimit is 1.2; it must be a number above 0 and at most 1",
    ],
    [
      () => kriegerDougherty({ solidFraction: 0.3, packingLimit: 0.6, intrinsicViscosity: 0 }),
      "kriegerDougherty: intrinsicViscosity is 0; it must be a finite number above 0",
    ],
    [
      () => kriegerDougherty({ solidFraction: 0.6 - 1e-10, packingLimit: 0.6, intrinsicViscosity: 1e3 }),
      "kriegerDougherty: the relative viscosity is Infinity; it must be a finite number above 0; " +
        "the solid is a hair below its packing limit; take less of it",
    ],
    [() => maronPierce({ solidFraction: NaN, packingLimit: 0.6 }), "maronPierce: solidFraction is NaN"],
  ])("refuses case %#", (call, message) => {
    expect(call).toThrow(message);
  });
});

describe("hardSphereViscosity", () => {
  // The printed polynomials at printed phi, worked out by an independent program.
  it.each([
    [0.05, 1.1402, 1.1381],
    [0.1, 1.332, 1.315],
    [0.2, 1.996, 1.86],
    [0.3, 3.244, 2.785],
  ])("has the polynomials of silica spheres at phi = %d", (solidFraction, low, high) => {
    // Printed to 4 decimals, the first row cut off instead of rounded.
    expect(Math.abs(hardSphereViscosity({ solidFraction, shear: "low" }).value - low)).toBeLessThan(1e-4);
    expect(Math.abs(hardSphereViscosity({ solidFraction, shear: "high" }).value - high)).toBeLessThan(1e-4);
  });

  it("adds the errors of the coefficients in quadrature, and stops where the measurements do", () => {
    expect(hardSphereViscosity({ solidFraction: 0.2, shear: "low" }).u).toBeCloseTo(
      Math.hypot(0.08, 0.08),
      12,
    );
    expect(hardSphereViscosity({ solidFraction: 0.2, shear: "high" }).u).toBeCloseTo(
      Math.hypot(0.08, 0.056),
      12,
    );
    expect(hardSphereViscosity({ solidFraction: 0.35, shear: "low" }).warnings).toEqual([]);
    expect(hardSphereViscosity({ solidFraction: 0.4, shear: "low" }).warnings).toEqual([
      {
        code: "beyond-measured",
        message:
          "a volume fraction of 0.4 is above the 0.35 the polynomial was measured to; use kriegerDougherty or maronPierce",
      },
    ]);
    expect(() => hardSphereViscosity({ solidFraction: 0.2, shear: "fast" as "low" })).toThrow(
      'hardSphereViscosity: shear is "fast"; it must be "low" or "high"',
    );
  });
});

describe("solidVolumeFraction and effectiveSolidFraction", () => {
  const density = fc.double({ min: 0.8, max: 10, noNaN: true });

  it("counts the solid as massToVolumeFractions does, and as the mass where densities are equal", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1, noNaN: true }), density, density, (w, solid, liquid) => {
        const phi = solidVolumeFraction({
          solidMassFraction: w,
          solidDensity_gcm3: solid,
          liquidDensity_gcm3: liquid,
        });
        const both = massToVolumeFractions({ massFractions: [w, 1 - w], densities_gcm3: [solid, liquid] });
        expect(phi).toBeCloseTo(both[0]!, 12);
        const equal = { solidMassFraction: w, solidDensity_gcm3: solid, liquidDensity_gcm3: solid };
        expect(solidVolumeFraction(equal)).toBeCloseTo(w, 12);
      }),
    );
  });

  it("leaves bare particles alone, and grows with the cube of the layer", () => {
    const given = { solidFraction: 0.2, particleRadius_nm: 50 };
    expect(effectiveSolidFraction({ ...given, adsorbedLayer_nm: 0 })).toBe(0.2);
    expect(effectiveSolidFraction({ ...given, adsorbedLayer_nm: 5 })).toBeCloseTo(0.2 * 1.331, 12);
  });

  it("refuses layers that overlap, and units that are not meant", () => {
    expect(() =>
      effectiveSolidFraction({ solidFraction: 0.5, particleRadius_nm: 10, adsorbedLayer_nm: 10 }),
    ).toThrow(
      "effectiveSolidFraction: the volume fraction with the layer is 4; it must be a number from 0 to 1; " +
        "the layers of so many particles overlap; take fewer, larger or barer ones",
    );
    expect(() =>
      effectiveSolidFraction({ solidFraction: 0.5, particleRadius_nm: 10, adsorbedLayer_nm: -1 }),
    ).toThrow("effectiveSolidFraction: adsorbedLayer_nm is -1; it must be a finite number of at least 0");
    expect(() =>
      solidVolumeFraction({ solidMassFraction: 0.5, solidDensity_gcm3: 6000, liquidDensity_gcm3: 1.1 }),
    ).toThrow(
      "solidVolumeFraction: solidDensity_gcm3 is 6000; it must be a number from 0.1 to 25; give it in g/cm3",
    );
  });
});
