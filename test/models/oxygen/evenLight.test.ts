import { describe, expect, it } from "vitest";
import { deadZone, evenLightDepth, evenLightFlux, type EvenLightInput } from "../../../lib/models/oxygen.js";

// Round numbers for checking, not a material: 20 um of dead zone without film.
const P0: EvenLightInput = {
  diffusivity_m2s: 1e-10,
  saturation_molm3: 1,
  radicalGeneration_molm3s: 0.5,
  oxygenPerRadical: 1,
  filmEquivalentThickness_um: 0,
  oxygenCapture_m3mols: 5e5,
  termination_m3mols: 2500,
};
const relative = (found: number, expected: number): number => Math.abs(found / expected - 1);

describe("evenLightFlux and evenLightDepth", () => {
  // By an independent program, to 12 digits of flux and depth: kO, l in um, Ci, N, depths in um of C = 0.5 to 1e-4.
  it.each([
    [5e5, 0, 1, 9.99933336111e-6, [5.85841668133, 13.6783280565, 18.012010996, 19.4086928011, 19.9347986188]],
    [5e3, 0, 1, 9.9336129379e-6, [5.91329115449, 13.9668180507, 19.2278762274, 22.7017067714, 25.9793380425]],
    [
      5e1,
      0,
      1,
      6.02818365057e-6,
      [11.0193472139, 34.7383054398, 67.5146181512, 100.099309298, 132.664901361],
    ],
    [
      5e5,
      10,
      0.382025629613,
      6.17974370387e-6,
      [NaN, 6.03914852629, 10.3728314659, 11.7695132709, 12.2956190886],
    ],
    [5e5, 100, 9.93462136024e-3, 9.9006537864e-7, [NaN, NaN, NaN, 1.39008931131, 1.91619512898]],
  ])("kO %d, film %d um", (oxygenCapture_m3mols, filmEquivalentThickness_um, wall, flux, depths) => {
    const input = { ...P0, oxygenCapture_m3mols, filmEquivalentThickness_um };
    const found = evenLightFlux(input);
    expect(relative(found.flux_molm2s, flux)).toBeLessThan(1e-11);
    expect(relative(found.wallOxygen_molm3, wall)).toBeLessThan(1e-11);
    [0.5, 0.1, 0.01, 1e-3, 1e-4].forEach((oxygen_molm3, k) => {
      if (Number.isNaN(depths[k])) {
        expect(() => evenLightDepth({ ...input, oxygen_molm3 })).toThrow(
          "the most there is stands at the window",
        );
      } else {
        expect(relative(evenLightDepth({ ...input, oxygen_molm3 }), depths[k]!)).toBeLessThan(1e-10);
      }
    });
  });

  it("is the zero-order dead zone without termination: flux, wall and parabola", () => {
    for (const filmEquivalentThickness_um of [0, 3, 200]) {
      const input = { ...P0, termination_m3mols: 0, oxygenPerRadical: 1.7, filmEquivalentThickness_um };
      const zone = deadZone({ ...input, napierianAbsorption_percm: 0 });
      if (zone.outcome !== "dead-zone") throw new Error(zone.outcome);
      const found = evenLightFlux(input);
      expect(relative(found.flux_molm2s, zone.flux_molm2s)).toBeLessThan(1e-13);
      expect(relative(found.wallOxygen_molm3, zone.wallOxygen_molm3)).toBeLessThan(1e-12);
      // C = Ci (1 - z / delta)^2: a quarter of Ci at half the thickness.
      const half = evenLightDepth({ ...input, oxygen_molm3: found.wallOxygen_molm3 / 4 });
      expect(relative(half, zone.thickness_um / 2)).toBeLessThan(1e-10);
    }
  });

  it("falls below the zero-order flux by 2/3 sqrt(2 kt Ri) / (kO Ci) while that is small", () => {
    const loss = 1 - evenLightFlux(P0).flux_molm2s / 1e-5;
    expect(relative(loss, (2 / 3) * 1e-4)).toBeLessThan(1e-3);
  });

  it("is the radical-rich exponential when oxygen is scarce: N = C sqrt(k D), e-fold in sqrt(D / k)", () => {
    const input = { ...P0, saturation_molm3: 1e-9 };
    expect(relative(evenLightFlux(input).flux_molm2s, 1e-9 * Math.sqrt(5000 * 1e-10))).toBeLessThan(1e-5);
    const depth = evenLightDepth({ ...input, oxygen_molm3: 1e-9 / Math.E });
    expect(relative(depth, 1e6 * Math.sqrt(1e-10 / 5000))).toBeLessThan(1e-5);
  });

  it("has depth 0 at the window, and stands oxygen down to 1e-300", () => {
    expect(evenLightDepth({ ...P0, oxygen_molm3: 1 })).toBe(0);
    expect(evenLightDepth({ ...P0, oxygen_molm3: 1e-300 })).toBeGreaterThan(100);
  });

  it.each([
    [{ saturation_molm3: 0 }, "evenLightFlux: saturation_molm3 is 0; it must be a finite number above 0"],
    [
      { termination_m3mols: -1 },
      "evenLightFlux: termination_m3mols is -1; it must be a finite number of at least 0",
    ],
    [{ diffusivity_m2s: NaN }, "evenLightFlux: diffusivity_m2s is NaN; it must be a finite number above 0"],
  ])("refuses %j", (change, message) => {
    expect(() => evenLightFlux({ ...P0, ...change })).toThrow(message);
  });
});
