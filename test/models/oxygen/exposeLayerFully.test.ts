import { describe, expect, it } from "vitest";
import {
  exposeLayer,
  exposeLayerFully,
  type FullLayerInput,
  type LayerReading,
} from "../../../lib/models/oxygen.js";
import {
  allowedAtQuarterMicrometre,
  named,
  P0,
  transientCase,
} from "../../reference/oxygen/readTransient.js";

const noFilm = { film: "resists", filmEquivalentThickness_um: 0 } as const;
const light = [{ duration_s: 5, relativeIrradiance: 1 }];
const sealed: FullLayerInput = {
  ...P0,
  napierianAbsorption_percm: 0,
  window: { film: "tight" },
  schedule: light,
  cells: 8,
  grid: "even",
  tolerance: 1e-9,
};
const Q = (reading: LayerReading): number => -Math.log1p(-reading.meanConversion);

describe("exposeLayerFully against a grid-converged solution", () => {
  // Reference: an independent program, converged in the grid to 3e-9 (see the note in the file). At 3 s the front passes 30 um, where
  // radicals multiply within one cell: there 1e-5 of the 8e-3 mol/m3 that are left behind it.
  it("on even cells of 0.25 um", () => {
    const { times_s, at } = transientCase("T2a_full_kappaInf");
    const { readings } = exposeLayerFully({
      ...P0,
      window: noFilm,
      schedule: [{ duration_s: 10, relativeIrradiance: 1 }],
      times_s,
      grid: "even",
      cells: 400,
      tolerance: 1e-5,
    });
    for (const reading of readings) {
      for (const [field, { value }] of Object.entries(at(reading.time_s))) {
        const passing = field === "R@30" && reading.time_s === 3;
        expect(Math.abs(named(reading, field) - value), `${field} at ${reading.time_s} s`).toBeLessThan(
          passing ? 1e-5 : allowedAtQuarterMicrometre(field, value),
        );
      }
    }
  });

  it("to 3e-6 when refined and extrapolated", () => {
    const [coarse, fine] = [640, 1280].map(
      (cells) =>
        exposeLayerFully({
          ...P0,
          window: noFilm,
          schedule: [{ duration_s: 10, relativeIrradiance: 1 }],
          times_s: [5, 10],
          cells,
          tolerance: 1e-8,
        }).readings,
    );
    const { at } = transientCase("T2a_full_kappaInf");
    [5, 10].forEach((time_s, k) => {
      for (const field of ["meanX", "meanC", "C@10", "X@50", "R@50", "zX=0.2#0", "zC=0.01#0"]) {
        const [a, b] = [named(coarse![k]!, field), named(fine![k]!, field)];
        const found = b + (b - a) / 3;
        expect(Math.abs(found / at(time_s)[field]!.value - 1), `${field} at ${time_s} s`).toBeLessThan(3e-6);
      }
    });
  });
});

describe("exposeLayerFully without diffusion", () => {
  it("keeps -ln(1 - X) = (kp / kO) ln(C0 / C) at every moment, whatever the radicals do", () => {
    const times_s = [0.2, 0.8, 1.5, 1.9, 1.99];
    for (const change of [
      {},
      { termination_m3mols: 0 },
      { radicalGeneration_molm3s: 0.4, oxygenCapture_m3mols: 3e4 },
    ]) {
      const kO = change.oxygenCapture_m3mols ?? 5e5;
      const { readings } = exposeLayerFully({ ...sealed, times_s, ...change });
      for (const reading of readings) {
        const C = reading.meanOxygen_molm3;
        expect(Math.abs(Q(reading) - (25 / kO) * -Math.log(C))).toBeLessThan(1e-8);
      }
    }
  });

  // By an independent program, 10 digits: conversion at 2.1, 2.5, 3 and 5 s with full radicals.
  it.each([
    [5e5, [0.02167669332, 0.1147762633, 0.2187927943, 0.5261738781]],
    [5e3, [0.04148701979, 0.132613561, 0.2345341543, 0.5357214956]],
  ])("converts as stated for kO %d", (oxygenCapture_m3mols, conversions) => {
    const { readings } = exposeLayerFully({ ...sealed, oxygenCapture_m3mols, times_s: [2.1, 2.5, 3, 5] });
    readings.forEach((reading, k) =>
      expect(Math.abs(reading.meanConversion - conversions[k]!)).toBeLessThan(1e-7),
    );
  });

  it("lags the quasi-steady conversion by (kp / 2 kt) ln 2 in -ln(1 - X), within 5 %", () => {
    const quick = exposeLayer({ ...P0, ...sealed, oxygenPerRadical: 1 });
    const lag = Q(quick.end) - Q(exposeLayerFully(sealed).end);
    expect(Math.abs(lag / ((25 / 5000) * Math.LN2) - 1)).toBeLessThan(0.05);
  });

  it("cures on in the dark: Q grows by (kp / 2 kt) ln(1 + 2 kt R t)", () => {
    const none = { oxygen_molm3: 0, saturation_molm3: 0 };
    const schedule = [
      { duration_s: 1, relativeIrradiance: 1 },
      { duration_s: 3, relativeIrradiance: 0 },
    ];
    const { readings } = exposeLayerFully({ ...sealed, ...none, schedule, times_s: [1, 4] });
    // After 1 s, fifty radical lives, R stands at sqrt(Ri / 2 kt) = 0.01.
    const grown = Q(readings[1]!) - Q(readings[0]!);
    expect(Math.abs(grown / ((25 / 5000) * Math.log1p(5000 * 0.01 * 3)) - 1)).toBeLessThan(1e-6);
    // And from the start: Q = (kp / 2 kt) ln cosh(2 kt R t).
    const start = (25 / 5000) * Math.log(Math.cosh(50));
    expect(Math.abs(Q(readings[0]!) / start - 1)).toBeLessThan(1e-6);
  });

  it("without termination lets radicals grow with the light: Q = kp Ri t^2 / 2 once oxygen is gone", () => {
    const none = { oxygen_molm3: 0, saturation_molm3: 0, termination_m3mols: 0 };
    const { end } = exposeLayerFully({
      ...sealed,
      ...none,
      schedule: [{ duration_s: 0.3, relativeIrradiance: 1 }],
    });
    expect(Math.abs(Q(end) / ((25 * 0.5 * 0.09) / 2) - 1)).toBeLessThan(1e-6);
  });

  // Oxygen per radical from 0-D runs of an independent program: time to C = 0.01 with kxx 1e3, kx 2.5e3: 1.98092, 3.92881, 3.49029
  // and 1.74757 s, 6 digits.
  it.each([
    [0, 0, 1.98092],
    [0, 1, 3.92881],
    [2, 1, 3.49029],
    [20, 1, 1.74757],
  ])(
    "uses oxygen as peroxyls do: kpx M %d per second, %d oxygen returned",
    (rate_pers, oxygenReturned, time_s) => {
      const peroxyls = {
        crossTermination_m3mols: 2500,
        selfTermination_m3mols: 1000,
        oxygenReturned,
        donorTransfer_m3mols: 1e-6,
        // So much donor that it does not run out: kH DH is the rate.
        donor_molm3: rate_pers * 1e6,
      };
      const { readings } = exposeLayerFully({ ...sealed, peroxyls, times_s: [time_s] });
      expect(Math.abs(readings[0]!.meanOxygen_molm3 - 0.01)).toBeLessThan(1e-5);
    },
  );

  it("runs out of donor, and counts growth through peroxyls", () => {
    const run = (peroxyls: FullLayerInput["peroxyls"]) =>
      exposeLayerFully({ ...sealed, schedule: [{ duration_s: 1, relativeIrradiance: 1 }], peroxyls }).end;
    const plenty = run({ selfTermination_m3mols: 1000, donorTransfer_m3mols: 0.1, donor_molm3: 1000 });
    const little = run({ selfTermination_m3mols: 1000, donorTransfer_m3mols: 100, donor_molm3: 1 });
    expect(little.meanOxygen_molm3).toBeGreaterThan(plenty.meanOxygen_molm3);
    const chains = run({ selfTermination_m3mols: 1000, propagation_m3mols: 0.01, doubleBonds_molm3: 5000 });
    const none = run({ selfTermination_m3mols: 1000 });
    expect(chains.meanConversion).toBeGreaterThan(10 * none.meanConversion);
    expect(chains.meanOxygen_molm3).toBeLessThan(none.meanOxygen_molm3);
  });
});

describe("exposeLayerFully with diffusion", () => {
  it("closes the oxygen balance with everything on, and stands flashes, hours and fast rates", () => {
    const peroxyls = {
      crossTermination_m3mols: 2500,
      selfTermination_m3mols: 1000,
      oxygenReturned: 1,
      propagation_m3mols: 1e-3,
      doubleBonds_molm3: 5000,
      donorTransfer_m3mols: 0.1,
      donor_molm3: 50,
    };
    const base = { ...P0, window: noFilm, schedule: light, cells: 60, curedDiffusivityShare: 0.1 };
    for (const change of [
      { peroxyls },
      { peroxyls, oxygenCapture_m3mols: 1e7, termination_m3mols: 0 },
      { schedule: [{ duration_s: 1e-3, relativeIrradiance: 1e4 }] },
      { schedule: [{ duration_s: 1e4, relativeIrradiance: 1 }] },
      {
        window: {
          film: "stores",
          filmThickness_um: 50,
          filmDiffusivity_m2s: 1e-9,
          filmPartition: 2,
          sealed: true,
        } as const,
      },
    ]) {
      const layer = exposeLayerFully({ ...base, ...change });
      expect(layer.oxygenImbalance).toBeLessThan(1e-10);
      expect(
        [...layer.end.oxygen_molm3, ...layer.end.conversion, ...layer.end.radicals_molm3].every(
          Number.isFinite,
        ),
      ).toBe(true);
    }
  });

  it.each<[Partial<FullLayerInput>, string]>([
    [
      { termination_m3mols: -1 },
      "exposeLayerFully: termination_m3mols is -1; it must be a finite number of at least 0",
    ],
    [
      { peroxyls: { oxygenReturned: 2 } },
      "exposeLayerFully: peroxyls: oxygenReturned is 2; it must be a number from 0 to 1",
    ],
    [
      { peroxyls: { donors_molm3: 2 } as FullLayerInput["peroxyls"] },
      'exposeLayerFully: peroxyls: unknown field "donors_molm3"; did you mean "donor_molm3"?',
    ],
    [{ stepLimit: 3 }, "exposeLayerFully: stopped at"],
  ])("refuses %j", (change, message) => {
    expect(() => exposeLayerFully({ ...sealed, ...change })).toThrow(message);
  });
});
