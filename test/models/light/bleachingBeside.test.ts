import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { bleachedBesideAbsorber, bleachedFractions } from "../../../lib/models/light.js";

// Round numbers for checking: kappa = 100 m2/mol, so Z = 1e-3 per um at 10 mol/m3 and tau = 0.01 a second.
const kappa_m2mol = 100;
const P0 = {
  concentration_molL: 0.01,
  molarAbsorption_Lmolcm: kappa_m2mol / (0.1 * Math.LN10),
  quantumYield: 0.5,
  photonFlux_molm2s: 2e-4,
};
const at = (Z: number, tau: number, b: number) => {
  const left = bleachedBesideAbsorber({
    ...P0,
    otherAbsorption_percm: 10 * b,
    depth_um: Z / 1e-3,
    time_s: tau / 0.01,
  });
  return { C: left.initiator.share, I: left.light.share };
};

describe("bleachedBesideAbsorber", () => {
  // The closed form whose travelling front Terrones and Pearlstein published, Macromolecules 34 (2001) 3195 (abstract). 1e-9:
  // what eight-point panels and the root leave.
  it("is the closed form without absorber", () => {
    for (const Z of [0, 0.01, 1, 3, 8, 20]) {
      for (const tau of [1e-6, 0.1, 1, 3, 30]) {
        const left = bleachedFractions({ ...P0, depth_um: Z / 1e-3, time_s: tau / 0.01 });
        expect(Math.abs(at(Z, tau, 0).C - left.initiator.share)).toBeLessThan(1e-9);
        expect(Math.abs(at(Z, tau, 0).I / left.light.share - 1)).toBeLessThan(1e-9);
      }
    }
  });

  it("is Beer-Lambert before anything has bleached, and by the absorber alone once all has", () => {
    expect(at(2, 0, 0.7).C).toBe(1);
    expect(at(2, 0, 0.7).I / Math.exp(-1.7 * 2)).toBeCloseTo(1, 12);
    expect(at(2, 1e-9, 0.7).I / Math.exp(-1.7 * 2)).toBeCloseTo(1, 8);
    // The front still takes photons as it moves on, a share of 1 / (b tau) of them.
    expect(at(2, 4e5, 0.7).C).toBe(0);
    expect(at(2, 4e5, 0.7).I / Math.exp(-0.7 * 2)).toBeCloseTo(1, 4);
  });

  // The two equations marched in depth and time by a scheme of second order: Heun along depth for the light, midpoint in time
  // for the initiator. With 400 x 400 steps its own error is below 1e-4, seen by halving the steps.
  it("satisfies the equations", () => {
    const b = 0.8;
    const [cells, steps, deep, late] = [400, 400, 3, 4];
    const [dZ, dtau] = [deep / cells, late / steps];
    const lightIn = (C: Float64Array): Float64Array => {
      const I = new Float64Array(cells + 1);
      I[0] = 1;
      for (let k = 0; k < cells; k++) I[k + 1] = I[k]! * Math.exp(-((C[k]! + C[k + 1]!) / 2 + b) * dZ);
      return I;
    };
    let C = new Float64Array(cells + 1).fill(1);
    for (let step = 0; step < steps; step++) {
      const before = lightIn(C);
      const middle = lightIn(C.map((c, k) => c * Math.exp((-before[k]! * dtau) / 2)));
      C = C.map((c, k) => c * Math.exp(-middle[k]! * dtau));
    }
    const I = lightIn(C);
    for (let k = 0; k <= cells; k += 40) {
      const exact = at(k * dZ, late, b);
      expect(Math.abs(C[k]! - exact.C)).toBeLessThan(1e-4);
      expect(Math.abs(I[k]! - exact.I)).toBeLessThan(1e-4);
    }
  });

  it("leaves less light and more initiator the more absorber stands beside it", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 6, noNaN: true }),
        fc.double({ min: 0.01, max: 6, noNaN: true }),
        fc.double({ min: 0, max: 3, noNaN: true }),
        (Z, tau, b) => {
          const [less, more] = [at(Z, tau, b), at(Z, tau, b + 0.1)];
          expect(more.I).toBeLessThan(less.I);
          expect(more.C).toBeGreaterThanOrEqual(less.C);
        },
      ),
      { numRuns: 50 },
    );
  });

  it.each([
    [
      { otherAbsorption_percm: -1 },
      "bleachedBesideAbsorber: otherAbsorption_percm is -1; it must be a finite number of at least 0",
    ],
    [
      { quantumYield: 5 },
      "bleachedBesideAbsorber: quantumYield is 5; it must be a number above 0 and at most 4",
    ],
    [{ depth_um: NaN }, "bleachedBesideAbsorber: depth_um is NaN; it must be a finite number of at least 0"],
  ])("refuses %j", (change, message) => {
    const good = { ...P0, otherAbsorption_percm: 10, depth_um: 100, time_s: 10 };
    expect(() => bleachedBesideAbsorber({ ...good, ...change })).toThrow(message);
  });
});
