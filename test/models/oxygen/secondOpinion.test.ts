import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import {
  exposeLayer,
  exposeLayerFully,
  type LayerConditions,
  type LayerReading,
  type OxygenWindow,
} from "../../../lib/models/oxygen.js";

// The same finite-volume equations on the same cells, written in Python and followed by SciPy's LSODA at rtol 1e-11: what
// differs is the program and the way through time. Script, versions and parameters stand beside the fixture.
interface Case {
  readonly parameters: Readonly<
    Record<"Ri" | "alpha" | "D" | "s" | "kO" | "kp" | "kt" | "L" | "C0" | "Cg" | "l" | "share", number>
  > & {
    readonly film?: { readonly h: number; readonly D: number; readonly K: number; readonly sealed: boolean };
    readonly peroxyls?: Readonly<
      Record<"kx" | "kxx" | "rho" | "kpx" | "M" | "kH" | "DH" | "kI" | "I" | "n", number>
    >;
  };
  readonly cells: number;
  readonly schedule: readonly { readonly duration: number; readonly light?: number; readonly gas?: number }[];
  readonly states: readonly {
    readonly time: number;
    readonly oxygen: readonly number[];
    readonly conversion: readonly number[];
    readonly radicals?: readonly number[];
    readonly film?: number | null;
  }[];
}

const { cases } = JSON.parse(
  readFileSync(new URL("../../reference/oxygen/second-opinion.json", import.meta.url), "utf8"),
) as { readonly cases: Readonly<Record<string, Case>> };

function windowOf({ film, l }: Case["parameters"]): OxygenWindow {
  if (film === undefined) return { film: "resists", filmEquivalentThickness_um: 1e6 * l };
  return {
    film: "stores",
    filmThickness_um: 1e6 * film.h,
    filmDiffusivity_m2s: film.D,
    filmPartition: film.K,
    sealed: film.sealed,
  };
}

function readingsOf({ parameters: p, cells, schedule, states }: Case): readonly LayerReading[] {
  const input: LayerConditions & Parameters<typeof exposeLayer>[0] = {
    radicalGeneration_molm3s: p.Ri,
    napierianAbsorption_percm: p.alpha / 100,
    diffusivity_m2s: p.D,
    curedDiffusivityShare: p.share,
    oxygenPerRadical: p.s,
    oxygenCapture_m3mols: p.kO,
    propagation_m3mols: p.kp,
    termination_m3mols: p.kt,
    gapThickness_um: 1e6 * p.L,
    oxygen_molm3: p.C0,
    saturation_molm3: p.Cg,
    window: windowOf(p),
    schedule: schedule.map(({ duration, light = 1, gas = p.Cg }) => ({
      duration_s: duration,
      relativeIrradiance: light,
      saturation_molm3: gas,
    })),
    times_s: states.map(({ time }) => time),
    gelConversion: 0.2,
    cells,
    grid: "even",
    tolerance: 1e-9,
  };
  const x = p.peroxyls;
  if (x === undefined) return exposeLayer(input).readings;
  return exposeLayerFully({
    ...input,
    peroxyls: {
      crossTermination_m3mols: x.kx,
      selfTermination_m3mols: x.kxx,
      oxygenReturned: x.rho,
      propagation_m3mols: x.kpx,
      doubleBonds_molm3: x.M,
      donorTransfer_m3mols: x.kH,
      donor_molm3: x.DH,
      inhibitorCapture_m3mols: x.kI,
      inhibitor_molm3: x.I,
      radicalsCaught: x.n,
    },
  }).readings;
}

describe("a second opinion by another program", () => {
  it.each(Object.entries(cases))("%s", (_, one) => {
    const readings = readingsOf(one);
    // Both ways through time are held to about 1e-9 in a step; at a front, where a cell empties in a few ms, 1e-6 is left.
    one.states.forEach((state, k) => {
      const reading = readings[k]!;
      const inCells = (values: readonly number[]): readonly number[] => values.slice(1, -1);
      inCells(reading.oxygen_molm3).forEach((C, i) =>
        expect(Math.abs(C - state.oxygen[i]!), `oxygen in cell ${i} at ${state.time} s`).toBeLessThan(2e-6),
      );
      inCells(reading.conversion).forEach((X, i) =>
        expect(Math.abs(X - state.conversion[i]!), `conversion in cell ${i} at ${state.time} s`).toBeLessThan(
          2e-6,
        ),
      );
      if (state.radicals !== undefined) {
        inCells(reading.radicals_molm3).forEach((R, i) =>
          expect(Math.abs(R - state.radicals![i]!), `radicals in cell ${i} at ${state.time} s`).toBeLessThan(
            1e-6,
          ),
        );
      }
      if (typeof state.film === "number")
        expect(Math.abs(reading.meanFilmOxygen_molm3! - state.film)).toBeLessThan(1e-7);
    });
  });

  it("covers films that resist and store, gas, s, falling diffusion, pulses, full radicals and an inhibitor", () => {
    expect(Object.keys(cases)).toHaveLength(6);
  });
});
