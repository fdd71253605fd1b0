import { describe, expect, it } from "vitest";
import { exposeLayer, exposeLayers, type LayersInput } from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

const base: LayersInput = {
  ...P0,
  gapThickness_um: 50,
  layerThickness_um: 50,
  window: { film: "resists", filmEquivalentThickness_um: 10 },
  schedule: [
    { duration_s: 2, relativeIrradiance: 0 },
    { duration_s: 4, relativeIrradiance: 1 },
  ],
  layers: 5,
  freshFraction: 0.5,
};
const print = (change: Partial<LayersInput> = {}) => exposeLayers({ ...base, ...change });

describe("exposeLayers", () => {
  it("is exposeLayer for one layer, and for the first of many", () => {
    const [first] = print();
    expect(exposeLayer(base)).toEqual(first);
    expect(print({ layers: 1 })).toEqual([first]);
  });

  it("repeats the first layer over and over when all resin is fresh and the window keeps the gap", () => {
    const layers = print({ freshFraction: 1, window: { film: "tight" }, layers: 3 });
    // Behind a tight window the gel reaches the window: every gap is one layer thickness, every start the same.
    for (const layer of layers.slice(1)) expect(layer.end).toEqual(layers[0]!.end);
  });

  it("rises by the layer thickness from what stays liquid", () => {
    const layers = print();
    layers.slice(1).forEach((layer, k) => {
      expect(layer.gapThickness_um).toBeCloseTo(layers[k]!.end.deadZone.byGel_um! + 50, 10);
    });
    const dark = print({ schedule: [{ duration_s: 1, relativeIrradiance: 0 }], layers: 3 });
    expect(dark.map(({ gapThickness_um }) => gapThickness_um)).toEqual([50, 100, 150]);
  });

  it("starts each layer with what the lift leaves of the liquid, mixed into fresh resin", () => {
    const layers = print({ freshFraction: 0.3, layerThickness_um: 10 });
    layers.slice(1).forEach((layer, k) => {
      const { end } = layers[k]!;
      const left_um = end.deadZone.byGel_um!;
      const stale = (0.7 * left_um) / (left_um + 10);
      const liquid = end.depths_um.filter((depth) => depth < left_um);
      // Means by the trapezoid rule over the points of the profile: 1 % is enough to tell it from any other rule.
      let [sum, all] = [0, 0];
      liquid.slice(1).forEach((depth, i) => {
        const width = depth - liquid[i]!;
        sum += (width * (end.oxygen_molm3[i]! + end.oxygen_molm3[i + 1]!)) / 2;
        all += width;
      });
      expect(layer.startOxygen_molm3 / (1 - stale + (stale * sum) / all)).toBeCloseTo(1, 2);
      expect(layer.startOxygen_molm3).toBeLessThan(1);
    });
  });

  it("starts from fresh resin the nearer, the less liquid is left", () => {
    const tight = { film: "resists", filmEquivalentThickness_um: 300 } as const;
    const layers = print({ window: tight, freshFraction: 0, layers: 3 });
    layers.slice(1).forEach((layer, k) => {
      const left_um = layers[k]!.end.deadZone.byGel_um!;
      expect(left_um).toBeLessThan(2);
      expect(1 - layer.startOxygen_molm3).toBeLessThan(left_um / 50);
    });
  });

  it("gels later in fresh resin than with resin left over, and settles", () => {
    const series = [1, 0.9, 0].map((freshFraction) => print({ freshFraction, layers: 10 }));
    const gelTimes = series.map((layers) => layers.at(-1)!.gelTime_s!);
    expect(gelTimes[1]).toBeLessThan(gelTimes[0]!);
    expect(gelTimes[2]).toBeLessThan(gelTimes[1]!);
    for (const layers of series) {
      const [before, end] = layers.slice(-2).map(({ end: { meanConversion } }) => meanConversion);
      expect(Math.abs(end! / before! - 1)).toBeLessThan(1e-3);
    }
  });

  it("drains a film on glass from layer to layer, and hands its oxygen on exactly", () => {
    const layers = print({
      window: {
        film: "stores",
        filmThickness_um: 50,
        filmDiffusivity_m2s: 3e-9,
        filmPartition: 1.5,
        sealed: true,
      },
    });
    const film = layers.map(({ end }) => end.meanFilmOxygen_molm3!);
    film.slice(1).forEach((mean, k) => expect(mean).toBeLessThan(film[k]!));
    const zones = layers.map(({ end }) => end.deadZone.byGel_um!);
    expect(zones.at(-1)!).toBeLessThan(zones[0]!);
    layers.slice(1).forEach((layer, k) => {
      // Oxygen in film and resin at the start of a layer, less what is used, is what is there at its end.
      const gap = layer.gapThickness_um;
      const before = 1.5 * 50 * film[k]! + gap * layer.startOxygen_molm3;
      const after = 1.5 * 50 * film[k + 1]! + gap * layer.end.meanOxygen_molm3;
      expect(Math.abs(before - after - gap * layer.oxygenUsed_molm3) / before).toBeLessThan(1e-10);
    });
  });

  it("starts a film with the oxygen given", () => {
    const window = {
      film: "stores",
      filmThickness_um: 50,
      filmDiffusivity_m2s: 3e-9,
      filmPartition: 1.5,
      sealed: true,
    } as const;
    const times_s = [0];
    const [full] = print({ window, layers: 1, times_s });
    const [empty] = print({ window, layers: 1, times_s, filmOxygen_molm3: 0 });
    expect(full!.readings[0]!.meanFilmOxygen_molm3).toBeCloseTo(1, 12);
    expect(empty!.readings[0]!.meanFilmOxygen_molm3).toBe(0);
    expect(empty!.gelTime_s!).toBeLessThan(full!.gelTime_s!);
  });

  it.each<[Partial<LayersInput>, string]>([
    [{ layers: 0 }, "exposeLayers: layers is 0; it must be a whole number of at least 1"],
    [{ layers: 2.5 }, "exposeLayers: layers is 2.5; it must be a whole number of at least 1"],
    [{ freshFraction: 1.1 }, "exposeLayers: freshFraction is 1.1; it must be a number from 0 to 1"],
    [{ layerThickness_um: 0 }, "exposeLayers: layerThickness_um is 0; it must be a finite number above 0"],
  ])("refuses %j", (change, message) => {
    expect(() => print(change)).toThrow(message);
  });
});
