import { describe, expect, it } from "vitest";
import { exposeLayer, type LayerInput } from "../../../lib/models/oxygen.js";
import {
  allowedAtQuarterMicrometre,
  named,
  P0,
  transientCase,
} from "../../reference/oxygen/readTransient.js";

const noFilm = { film: "resists", filmEquivalentThickness_um: 0 } as const;
const film = { film: "resists", filmEquivalentThickness_um: 10 } as const;
const cases: readonly (readonly [string, Partial<LayerInput> & Pick<LayerInput, "window">])[] = [
  ["T1a_qss_kappaInf", { window: noFilm }],
  ["T1b_qss_kappa1e-5", { window: film }],
  ["T1e_qss_nitrogen_kappa1e-5_Cgas0", { window: film, saturation_molm3: 0 }],
  ["T1g_qss_uniformlight_kappaInf", { window: noFilm, napierianAbsorption_percm: 0 }],
];

function run(name: string, change: Partial<LayerInput> & Pick<LayerInput, "window">) {
  const { times_s, at } = transientCase(name);
  const duration_s = times_s.at(-1)!;
  const layer = exposeLayer({ ...P0, schedule: [{ duration_s, relativeIrradiance: 1 }], times_s, ...change });
  return { layer, at, readings: layer.readings };
}

/** Distance from the reference: relative, but to no less than `floor` for oxygen and conversion. */
const distance = (found: number, expected: number, floor: number): number =>
  Math.abs(found - expected) / Math.max(Math.abs(expected), floor);

/** One reference point lies between two cells on the resting edge itself, where conversion goes from 0.05 to 0.9 within 1 um. */
const onTheEdge = (name: string, field: string): boolean => name.startsWith("T1g") && field === "X@20";

// Reference: solutions of an independent program, converged in the grid to 1e-8 or better (see the note in the file).
describe("exposeLayer against grid-converged solutions", () => {
  it.each(cases)("%s on even cells of 0.25 um", (name, change) => {
    const { readings, at } = run(name, { ...change, grid: "even", cells: 400, tolerance: 1e-6 });
    let compared = 0;
    for (const reading of readings) {
      for (const [field, { value }] of Object.entries(at(reading.time_s))) {
        expect(Math.abs(named(reading, field) - value), `${field} at ${reading.time_s} s`).toBeLessThan(
          onTheEdge(name, field) ? 1e-2 : allowedAtQuarterMicrometre(field, value),
        );
        compared++;
      }
    }
    expect(compared).toBeGreaterThan(70);
  });

  it.each(cases)(
    "%s to 1e-6 when refined and extrapolated, with errors falling by 4 per halving",
    (name, change) => {
      const times_s = [5, 10];
      const [coarse, middle, fine] = [320, 640, 1280].map(
        (cells) =>
          exposeLayer({
            ...P0,
            schedule: [{ duration_s: 10, relativeIrradiance: 1 }],
            times_s,
            tolerance: 1e-9,
            cells,
            ...change,
          }).readings,
      );
      const { at } = transientCase(name);
      times_s.forEach((time_s, k) => {
        for (const field of ["meanX", "meanC", "C@10", "X@50", "zX=0.2#0", "zC=0.01#0"]) {
          const reference = at(time_s)[field];
          if (reference === undefined) continue;
          const [a, b, c] = [coarse![k]!, middle![k]!, fine![k]!].map((reading) => named(reading, field)) as [
            number,
            number,
            number,
          ];
          const place = `${field} at ${time_s} s`;
          const richardson = c + (c - b) / 3;
          expect(distance(richardson, reference.value, 0), place).toBeLessThan(2e-6);
          // The ratio says something only where the error is well above the error of time and of reading between cells.
          if (Math.abs(b - c) > 1e-6 * Math.abs(c) && field.startsWith("mean")) {
            expect((a - b) / (b - c), place).toBeGreaterThan(3.5);
            expect((a - b) / (b - c), place).toBeLessThan(4.5);
          }
        }
      });
    },
  );

  it("holds what it says of its own error, at the defaults", () => {
    for (const [name, change] of cases) {
      const { layer, at } = run(name, change);
      const { time_s } = layer.end;
      const { meanConversion, meanOxygen_molm3, deadZone_um } = layer.errorEstimate;
      const error = (field: string): number => Math.abs(named(layer.end, field) - at(time_s)[field]!.value);
      expect(error("meanX"), name).toBeLessThan(meanConversion);
      expect(meanConversion, name).toBeLessThan(1e-3);
      if (at(time_s)["meanC"] !== undefined) expect(error("meanC"), name).toBeLessThan(meanOxygen_molm3);
      if (at(time_s)["zX=0.2#0"] !== undefined) expect(error("zX=0.2#0"), name).toBeLessThan(deadZone_um!);
    }
  });

  // Same program, 10 digits: three exposures of 3 s with 10 s of dark between, film worth 10 um; oxygen at 0, 10, 20, 30, 50, 100 um.
  it("follows pulses and dark, with oxygen coming back in between", () => {
    const schedule = [3, 10, 3, 10, 3].map((duration_s, k) => ({
      duration_s,
      relativeIrradiance: (k + 1) % 2,
    }));
    const { readings } = exposeLayer({
      ...P0,
      window: film,
      schedule,
      times_s: [3, 4, 8, 13, 16, 26, 29],
      cells: 1000,
      tolerance: 1e-8,
    });
    const oxygen: Record<number, (number | undefined)[]> = {
      3: [0.4573645393, 0.08387051113, undefined, undefined, 0.0834489413, 0.3670558939],
      4: [0.6177880811, 0.2948714836, 0.1109661734, 0.0453205987, 0.09846293394, 0.3356802116],
      8: [0.7851382803, 0.5838178562, 0.4200202066, 0.3029930073, 0.2033227062, 0.2584530668],
      13: [0.8507472418, 0.7069819298, 0.5788661872, 0.4716207796, 0.3267084218, 0.2403331011],
      16: [0.3949158484, 0.02369626474, undefined, undefined, undefined, undefined],
      26: [0.8312171215, 0.6674456282, 0.5180323148, 0.3879993383, 0.1948024305, 0.03395104395],
      29: [0.3931388975, 0.02264106652, undefined, undefined, undefined, undefined],
    };
    const conversion: Record<number, number[]> = {
      3: [2.135557625e-4, 0.03722270578, 0.03438995978, 1.234841093e-4, 4.312034606e-5],
      16: [1.075600856e-3, 0.2886385757, 0.3192529466, 0.3031362854, 0.2362061946],
      29: [2.073309495e-3, 0.4931467284, 0.542248457, 0.5532550769, 0.501414364],
    };
    // 1000 graded cells: 1e-6 in the open, up to 3e-5 close to the edge, where oxygen is a few hundredths.
    for (const reading of readings) {
      [0, 10, 20, 30, 50, 100].forEach((depth, i) => {
        const expected = oxygen[reading.time_s]![i];
        const found = named(reading, `C@${depth}`);
        if (expected === undefined) expect(found).toBeLessThan(1e-8);
        else expect(distance(found, expected, 0.01), `C@${depth} at ${reading.time_s}`).toBeLessThan(5e-5);
      });
      [10, 20, 30, 50, 100].forEach((depth, i) => {
        const expected = conversion[reading.time_s]?.[i];
        if (expected === undefined) return;
        const found = named(reading, `X@${depth}`);
        expect(distance(found, expected, 0.01), `X@${depth} at ${reading.time_s}`).toBeLessThan(1e-4);
      });
    }
    // What a second and a third exposure add is far from the first: the layer never gets all its oxygen back.
    expect(named(readings[4]!, "zX=0.2#0") / 15.62704 - 1).toBeLessThan(1e-5);
    expect(named(readings[6]!, "zX=0.2#0") / 13.5997 - 1).toBeLessThan(1e-5);
  });

  // Same program, 9 digits: a film of 100 um that stores oxygen, D 3.4e-9 m2/s, K 1.68, air below.
  it("follows a film that stores oxygen, open to the gas", () => {
    const { readings, end } = exposeLayer({
      ...P0,
      window: {
        film: "stores",
        filmThickness_um: 100,
        filmDiffusivity_m2s: 3.4e-9,
        filmPartition: 1.68,
        sealed: false,
      },
      schedule: [{ duration_s: 30, relativeIrradiance: 1 }],
      times_s: [1, 5, 30],
      cells: 800,
      tolerance: 1e-7,
    });
    const expected = [
      [0.95720022, 4.70334884e-6, 0.983528741],
      [0.854742968, 8.86645058e-6, 0.928719285],
      [0.84416487, 8.90130263e-6, 0.922082435],
    ] as const;
    readings.forEach((reading, k) => {
      const [wall, flux, mean] = expected[k]!;
      // 800 cells: 1e-6 for the film; the flux is a difference over half a cell, 1e-5.
      expect(distance(reading.wallOxygen_molm3, wall, 0)).toBeLessThan(1e-6);
      expect(distance(reading.flux_molm2s, flux, 0)).toBeLessThan(1e-5);
      expect(distance(reading.meanFilmOxygen_molm3!, mean, 0)).toBeLessThan(1e-6);
    });
    expect(distance(named(end, "zC=0.1#0"), 12.71305036, 0)).toBeLessThan(1e-5);
    expect(distance(named(end, "zC=0.01#0"), 17.42004615, 0)).toBeLessThan(1e-5);
  });
});
