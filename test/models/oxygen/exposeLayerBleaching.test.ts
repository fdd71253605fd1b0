import { describe, expect, it } from "vitest";
import { bleachedFractions, bleachingRate } from "../../../lib/models/light.js";
import { exposeLayer, exposeLayers, valueAtDepth, type LayerInput } from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

const base: LayerInput = {
  ...P0,
  window: { film: "resists", filmEquivalentThickness_um: 10 },
  schedule: [{ duration_s: 10, relativeIrradiance: 1 }],
  times_s: [3, 7],
};
// One bleaching absorber alone: alpha = ln 10 eps c is 100 per cm.
const initiator = { molarAbsorption_Lmolcm: 500, quantumYield: 0.5, photonFlux_molm2s: 5e-3 };
const concentration_molL = 100 / (Math.LN10 * initiator.molarAbsorption_Lmolcm);
const bleaching = { initiatorAbsorption_percm: 100, rate_pers: bleachingRate(initiator) };

describe("exposeLayer with bleaching", () => {
  it("gives the very numbers of no bleaching where the rate is 0", () => {
    const without = exposeLayer(base);
    expect(exposeLayer({ ...base, bleaching: { ...bleaching, rate_pers: 0 } })).toEqual(without);
    expect(without.end.initiatorShare).toBeUndefined();
  });

  it("tends to no bleaching as the rate does", () => {
    const without = exposeLayer({ ...base, tolerance: 1e-6 }).end;
    const slow = exposeLayer({ ...base, tolerance: 1e-6, bleaching: { ...bleaching, rate_pers: 1e-9 } }).end;
    expect(slow.meanConversion / without.meanConversion).toBeCloseTo(1, 6);
    expect(slow.initiatorShare!.every((share) => share > 1 - 1e-7)).toBe(true);
  });

  // Terrones and Pearlstein's exact solution (lib/models/light/bleaching.ts), with and without oxygen: light and initiator do not
  // know of it. 400 even cells of 0.25 um: the cell's optical thickness is 0.0025, its square over 24 far below 1e-6.
  it.each([0, 1])("fades as the closed form says, fresh oxygen %d", (oxygen) => {
    const { readings } = exposeLayer({
      ...base,
      oxygen_molm3: oxygen,
      saturation_molm3: oxygen,
      bleaching,
      cells: 400,
      grid: "even",
      tolerance: 1e-7,
    });
    expect(readings).toHaveLength(2);
    for (const { time_s, depths_um, initiatorShare } of readings) {
      for (const depth_um of [0.125, 20.125, 50.125, 99.875]) {
        const exact = bleachedFractions({ ...initiator, concentration_molL, depth_um, time_s }).initiator
          .share;
        const found = valueAtDepth({ depths_um, values: initiatorShare!, depth_um });
        expect(Math.abs(found / exact - 1), `${depth_um} um at ${time_s} s`).toBeLessThan(1e-5);
      }
    }
  });

  // Without oxygen R = sqrt(Ri / 2 kt), Ri = Ri0 c I; its integral over time by the closed form of c and I.
  it("cures as its light and initiator let it, without oxygen", () => {
    const { end } = exposeLayer({
      ...base,
      oxygen_molm3: 0,
      saturation_molm3: 0,
      bleaching,
      cells: 400,
      grid: "even",
      tolerance: 1e-6,
    });
    const depth_um = 40.125;
    const steps = 2000;
    let Q = 0;
    for (let k = 0; k < steps; k++) {
      const time_s = ((k + 0.5) * 10) / steps;
      const left = bleachedFractions({ ...initiator, concentration_molL, depth_um, time_s });
      const Ri = P0.radicalGeneration_molm3s * left.initiator.share * left.light.share;
      Q += (P0.propagation_m3mols * Math.sqrt(Ri / (2 * P0.termination_m3mols)) * 10) / steps;
    }
    const found = valueAtDepth({ depths_um: end.depths_um, values: end.conversion, depth_um });
    expect(Math.abs(found / -Math.expm1(-Q) - 1)).toBeLessThan(1e-4);
  });

  // phi photons' worth of initiator is lost for each photon it takes: with one absorber, all light that does not come out again.
  it("loses as much initiator as light is taken", () => {
    const run = (time_s: number) =>
      exposeLayer({ ...base, bleaching, cells: 400, grid: "even", tolerance: 1e-7, times_s: [time_s] })
        .readings[0]!;
    const lost = ({ depths_um, initiatorShare }: ReturnType<typeof run>) =>
      1e3 *
      concentration_molL *
      1e-6 *
      depths_um.slice(1).reduce((sum, depth, i) => {
        const width = depth - depths_um[i]!;
        return sum + width * (1 - (initiatorShare![i]! + initiatorShare![i + 1]!) / 2);
      }, 0);
    let taken = 0;
    for (let k = 0; k < 500; k++) {
      const out = bleachedFractions({
        ...initiator,
        concentration_molL,
        depth_um: 100,
        time_s: ((k + 0.5) * 7) / 500,
      });
      taken += (initiator.photonFlux_molm2s * (1 - out.light.share) * 7) / 500;
    }
    expect(lost(run(7)) / (initiator.quantumYield * taken)).toBeCloseTo(1, 4);
  });

  it("still explains all oxygen, and holds its tolerance at the defaults", () => {
    const plain = exposeLayer({ ...base, bleaching });
    expect(plain.oxygenImbalance).toBeLessThan(1e-10);
    const fine = exposeLayer({ ...base, bleaching, cells: 800, tolerance: 1e-7 });
    expect(Math.abs(plain.end.meanConversion / fine.end.meanConversion - 1)).toBeLessThan(3e-3);
  });

  it("does nothing in the dark, and leaves absorbers that do not fade", () => {
    const dark = { ...base, schedule: [{ duration_s: 10, relativeIrradiance: 0 }], bleaching };
    expect(exposeLayer(dark).end.initiatorShare!.every((share) => share === 1)).toBe(true);
    const shared = { ...bleaching, initiatorAbsorption_percm: 30 };
    const [alone, beside] = [bleaching, shared].map((one) =>
      exposeLayer({ ...base, bleaching: one }).end.initiatorShare!.at(-1)!,
    );
    expect(beside).toBeGreaterThan(alone!);
  });

  it("hands faded initiator on to the next layer, and fades it in a film that stores oxygen too", () => {
    const series = (freshFraction: number) =>
      exposeLayers({
        ...base,
        bleaching,
        window: {
          ...{ film: "stores", filmThickness_um: 100, filmDiffusivity_m2s: 3e-9, filmPartition: 1.5 },
          sealed: false,
        },
        gapThickness_um: 50,
        layers: 2,
        layerThickness_um: 50,
        freshFraction,
        times_s: [1e-6],
      })[1]!.readings[0]!.initiatorShare!;
    expect(Math.min(...series(1))).toBeGreaterThan(0.999);
    expect(Math.max(...series(0.5))).toBeLessThan(0.99);
  });

  it.each([
    [
      { ...bleaching, initiatorAbsorption_percm: 101 },
      "exposeLayer: bleaching: initiatorAbsorption_percm is 101; it must be a number above 0 and at most 100; the initiator is part of the absorption of the whole resin",
    ],
    [{ ...bleaching, rate_pers: -1 }, "bleaching: rate_pers is -1; it must be a finite number of at least 0"],
  ])("refuses %j", (given, message) => {
    expect(() => exposeLayer({ ...base, bleaching: given })).toThrow(message);
  });
});

describe("bleachingRate", () => {
  it("is the rate of tau in the closed form", () => {
    const time_s = 3;
    const exact = bleachedFractions({ ...initiator, concentration_molL, depth_um: 0, time_s }).initiator
      .share;
    expect(Math.exp(-bleachingRate(initiator) * time_s)).toBeCloseTo(exact, 12);
  });

  it("says what is wrong", () => {
    expect(() => bleachingRate({ ...initiator, quantumYield: 5 })).toThrow(
      "bleachingRate: quantumYield is 5; it must be a number above 0 and at most 4",
    );
  });
});
