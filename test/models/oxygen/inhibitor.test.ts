import { describe, expect, it } from "vitest";
import { exposeLayerFully, inhibitedOxygenPerRadical, inductionTime } from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

type Input = Parameters<typeof inhibitedOxygenPerRadical>[0];
const phenol = { peroxylCapture_m3mols: 30, radicalsCaught: 2, concentration_molm3: 0.5 };
const base: Input = {
  oxygenPerRadical: 1.3,
  radicalGeneration_molm3s: 0.5,
  selfTermination_m3mols: 500,
  oxygenReturned: 0.5,
  inhibitors: [phenol],
};
const perRadical = (change: Partial<Input>): number =>
  inhibitedOxygenPerRadical({ ...base, ...change }).oxygenPerRadical;

describe("inhibitedOxygenPerRadical", () => {
  it("leaves s as it is without inhibitor, and tends to 1 with ever more of it", () => {
    for (const oxygenPerRadical of [0.5, 1, 1.3, 8]) {
      for (const inhibitors of [[], [{ ...phenol, concentration_molm3: 0 }]])
        expect(perRadical({ oxygenPerRadical, inhibitors })).toBeCloseTo(oxygenPerRadical, 14);
      const much = [{ ...phenol, concentration_molm3: 1e9 }];
      expect(Math.abs(perRadical({ oxygenPerRadical, inhibitors: much }) - 1)).toBeLessThan(1e-6);
    }
  });

  it("keeps the balance of peroxyls: what pairs end and what inhibitors catch is what the light starts", () => {
    for (const concentration_molm3 of [1e-3, 0.1, 1, 10]) {
      const { caughtShare } = inhibitedOxygenPerRadical({
        ...base,
        inhibitors: [{ ...phenol, concentration_molm3 }],
      });
      const X = Math.sqrt(((1 - caughtShare) * 0.5) / (2 * 500));
      expect(Math.abs((2 * 500 * X * X + 2 * 30 * concentration_molm3 * X) / 0.5 - 1)).toBeLessThan(1e-9);
    }
  });

  it("knows an inhibitor only by n k c, and adds several up", () => {
    const one = perRadical({});
    const weak = { peroxylCapture_m3mols: 10, radicalsCaught: 1, concentration_molm3: 1.5 };
    expect(perRadical({ inhibitors: [weak, weak] })).toBeCloseTo(one, 13);
  });

  // The whole kinetics, with nothing taken as steady, as the reference: time until C = 0.01 in a closed cell, as above for donors.
  it.each([
    { chains_pers: 0, oxygenReturned: 0, phenol_molm3: 1 },
    { chains_pers: 0, oxygenReturned: 1, phenol_molm3: 0.3 },
    { chains_pers: 2, oxygenReturned: 1, phenol_molm3: 0.1 },
    { chains_pers: 20, oxygenReturned: 0.5, phenol_molm3: 0.5 },
    { chains_pers: 20, oxygenReturned: 0.5, phenol_molm3: 5 },
  ])("agrees with full radicals: chains %j", ({ chains_pers, oxygenReturned, phenol_molm3 }) => {
    const kxx = 1000;
    // s0 of the peroxyls themselves: pairs give rho / 2 back, chains take b X / Ri = b / sqrt(2 kxx Ri) more.
    const oxygenPerRadical = 1 - oxygenReturned / 2 + chains_pers / Math.sqrt(2 * kxx * 0.5);
    const { oxygenPerRadical: s } = inhibitedOxygenPerRadical({
      oxygenPerRadical,
      radicalGeneration_molm3s: 0.5,
      selfTermination_m3mols: kxx,
      oxygenReturned,
      inhibitors: [{ peroxylCapture_m3mols: 30, radicalsCaught: 2, concentration_molm3: phenol_molm3 }],
    });
    const time_s =
      0.9 * inductionTime({ oxygen_molm3: 1, radicalGeneration_molm3s: 0.5, oxygenPerRadical: s });
    const { readings } = exposeLayerFully({
      ...P0,
      napierianAbsorption_percm: 0,
      window: { film: "tight" },
      schedule: [{ duration_s: 5, relativeIrradiance: 1 }],
      times_s: [time_s],
      cells: 8,
      grid: "even",
      tolerance: 1e-8,
      peroxyls: {
        selfTermination_m3mols: kxx,
        oxygenReturned,
        donorTransfer_m3mols: 1e-6,
        donor_molm3: chains_pers * 1e6,
        // So much inhibitor, each molecule so slow, that none of it is used up: kI I is the rate.
        inhibitorCapture_m3mols: 30e-6,
        inhibitor_molm3: phenol_molm3 * 1e6,
      },
    });
    // Peroxyls take 0.05 s of the 2 s to build up, and hold up to 0.02 mol/m3 of oxygen: 0.005 of what was there.
    expect(Math.abs(readings[0]!.meanOxygen_molm3 - 0.1)).toBeLessThan(0.01);
  });

  it("lets one molecule end n radicals before it is gone", () => {
    const caught = (radicalsCaught: number) =>
      exposeLayerFully({
        ...P0,
        napierianAbsorption_percm: 0,
        window: { film: "tight" },
        schedule: [{ duration_s: 1, relativeIrradiance: 1 }],
        cells: 8,
        grid: "even",
        tolerance: 1e-8,
        // 0.2 mol/m3 that catch at once, then pairs that give all oxygen back at once: only what the inhibitor caught is lost.
        peroxyls: {
          inhibitorCapture_m3mols: 1e5,
          inhibitor_molm3: 0.1,
          radicalsCaught,
          selfTermination_m3mols: 1e3,
          oxygenReturned: 1,
        },
      }).end.meanOxygen_molm3;
    // 0.5 mol/m3 of radicals: n x 0.1 caught, one oxygen each; the others end in pairs, half an oxygen each; 0.016 are on their way.
    for (const n of [1, 2, 3])
      expect(Math.abs(caught(n) - (1 - 0.1 * n - (0.5 - 0.1 * n) / 2))).toBeLessThan(0.02);
  });

  it.each<[Partial<Input>, string]>([
    [
      { oxygenPerRadical: 0 },
      "inhibitedOxygenPerRadical: oxygenPerRadical is 0; it must be a finite number above 0",
    ],
    [
      { oxygenReturned: 2 },
      "inhibitedOxygenPerRadical: oxygenReturned is 2; it must be a number from 0 to 1",
    ],
    [
      { inhibitors: [phenol, { ...phenol, radicalsCaught: 20 }] },
      "inhibitedOxygenPerRadical: inhibitor 2: radicalsCaught is 20; it must be a number above 0 and at most 10",
    ],
    [
      { inhibitors: [{ ...phenol, concentration_molm3: -1 }] },
      "inhibitedOxygenPerRadical: inhibitor 1: concentration_molm3 is -1; it must be a finite number of at least 0",
    ],
  ])("refuses %j", (change, message) => {
    expect(() => inhibitedOxygenPerRadical({ ...base, ...change })).toThrow(message);
  });
});
