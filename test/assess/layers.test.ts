import { describe, expect, it } from "vitest";
import { bleachingOf } from "../../lib/assess/bleaching.js";
import { layersOf, type SeriesOptions } from "../../lib/assess/layers.js";
import { deadZoneOf } from "../../lib/assess/oxygen.js";
import type { Brief } from "../../lib/recipe/brief.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const run = (options: SeriesOptions = {}, change: Partial<Brief> = {}) =>
  layersOf({ formulation, brief: { ...brief, ...change }, shelf, draws: 40, ...options });
const window = (gasOxygenFraction: number) => ({ window: { ...brief.window, gasOxygenFraction } });

describe("layersOf", () => {
  it("refuses fewer draws than an interval of its level needs", () => {
    expect(() => run({ draws: 20 })).toThrow(
      "layersOf: draws is 20; an interval that holds 95 % needs at least 40",
    );
    expect(() => run({ draws: 60, level: 0.99 })).toThrow(
      "layersOf: draws is 60; an interval that holds 99 % needs at least 200",
    );
  });

  it("gives as many layers as asked for, the first in a gap of one layer and later ones in what was left plus one", () => {
    const { layers } = run({ layers: 3, exposure_s: 20 });
    expect(layers.map(({ layer }) => layer)).toEqual([1, 2, 3]);
    const [first, second] = layers.map(({ stated }) => stated);
    expect(first!.gapThickness_um).toBe(50);
    expect(second!.gapThickness_um).toBeCloseTo(50 + first!.end.deadZone.byGel_um!, 6);
  });

  // Limit: long light settles to the steady closed form. What has gelled by then lies above the zero-order edge; the reference
  // cases put the two within 0.4 to 16 % of each other, and conversion goes on creeping in, so a quarter is allowed.
  it("tends to the steady dead zone under long light", () => {
    const long = run({ layers: 1, exposure_s: 60 }).layers[0]!.deadZone_um!.value;
    const steady = deadZoneOf({ formulation, brief, shelf, draws: 40 });
    expect(steady.outcome === "value" && Math.abs(long / steady.value - 1)).toBeLessThan(0.25);
  });

  // The same initiator in the same light by two ways: followed in time, and exp(-E / Hb) at the window.
  it("lets the initiator fade as bleachingOf says, and hands on what the liquid has left", () => {
    const exposure_s = 30;
    const [first, second] = run({ layers: 2, exposure_s }).layers.map(
      ({ stated }) => stated.end.initiatorShare!,
    );
    const { bleachedShare } = bleachingOf({
      formulation,
      brief,
      shelf,
      draws: 40,
      exposure_mJcm2: brief.light.irradiance_mWcm2.value * exposure_s,
    });
    const [atWindow, ...deeper] = first!;
    expect(bleachedShare.value).toBeGreaterThan(0.02);
    expect(Math.abs((1 - atWindow!) / bleachedShare.value - 1)).toBeLessThan(1e-3);
    expect(deeper.every((share) => share >= atWindow!)).toBe(true);
    expect(second![0]).toBeLessThan(atWindow!);
  });

  it("cures less where the initiator fades faster", () => {
    const yields = [0.01, 1].map((bleachingYield) => {
      const constants = { ...shelf.constants, bleachingYield: sure(bleachingYield) };
      const { layers } = layersOf({
        formulation,
        brief,
        shelf: { ...shelf, constants },
        draws: 40,
        layers: 1,
        exposure_s: 30,
      });
      return layers[0]!.meanConversion.value;
    });
    expect(yields[1]).toBeLessThan(yields[0]!);
  });

  it("leaves nothing liquid over nitrogen, and more over oxygen than over air", () => {
    const left = (fraction: number) =>
      run({ layers: 1, exposure_s: 30 }, window(fraction)).layers[0]!.stated.end.deadZone.byGel_um!;
    expect(left(0)).toBe(0);
    expect(left(1)).toBeGreaterThan(left(0.2095));
  });

  it("says in how many draws a layer stays liquid, and what to do", () => {
    const short = run({ layers: 1, exposure_s: 0.01 });
    expect(short.layers[0]!.gelsShare).toBe(0);
    expect(short.layers[0]!.gelTime_s).toBeUndefined();
    expect(short.warnings[0]).toMatchObject({
      code: "may-stay-liquid",
      message: "Not every draw gels: layer 1 in 0 %. Expose longer, or measure a cure-depth series first.",
    });
    expect(run({ layers: 1, exposure_s: 600 }).warnings.map(({ code }) => code)).toEqual([
      "series-estimated",
    ]);
  });

  it("has the gel time of the draws that gel, though some of them do not", () => {
    const { gelsShare, gelTime_s } = run({ layers: 1, exposure_s: 3 }).layers[0]!;
    expect(gelsShare).toBeGreaterThan(0.5);
    expect(gelsShare).toBeLessThan(1);
    // 40 draws, the fewest that are taken: all that gel count, and none later than the light goes off.
    expect(gelTime_s!.low).toBeLessThan(gelTime_s!.value);
    expect(gelTime_s!.high).toBeLessThanOrEqual(3);
  });

  it("counts light, not dark: twice the light gels in half the time or less", () => {
    const gelTime = (irradiance: number) =>
      run({ layers: 1, exposure_s: 30 }, { light: { ...brief.light, irradiance_mWcm2: sure(irradiance) } })
        .layers[0]!.gelTime_s!.value;
    expect(gelTime(8)).toBeGreaterThan(0);
    expect(gelTime(16)).toBeLessThan(0.55 * gelTime(8));
  });

  it("reads profiles at the times asked for", () => {
    const { layers } = run({ layers: 1, exposure_s: 10, times_s: [6, 8] });
    expect(layers[0]!.stated.readings.map(({ time_s }) => time_s)).toEqual([6, 8]);
  });

  // Each field of `betweenLayers` must move the result.
  it.each([
    ["dark_s", { dark_s: 60, freshFraction: 0.7 }],
    ["freshFraction", { dark_s: 5, freshFraction: 0 }],
  ])("%s moves the second layer", (_, betweenLayers) => {
    const second = (change: Partial<Brief>) =>
      run({ layers: 2, exposure_s: 10 }, change).layers[1]!.stated.startOxygen_molm3;
    const gelTime = (change: Partial<Brief>) =>
      run({ layers: 2, exposure_s: 10 }, change).layers[1]!.gelTime_s!.value;
    expect(
      Math.abs(second({ betweenLayers }) - second({})) + Math.abs(gelTime({ betweenLayers }) - gelTime({})),
    ).toBeGreaterThan(1e-3);
  });

  it("follows what the film itself holds, where its data say how much, and says so where they do not", () => {
    const liquid = (filmStores: boolean, oxygenDiffusivity_m2s?: ReturnType<typeof sure>) => {
      const films = new Map([["OPEN", { ...shelf.films.get("OPEN")!, oxygenDiffusivity_m2s }]]);
      const series = layersOf({
        ...{ formulation, brief, shelf: { ...shelf, films }, draws: 40 },
        ...{ layers: 1, exposure_s: 30, filmStores },
      });
      return { ...series, zone: series.layers[0]!.stated.end.deadZone.byGel_um! };
    };
    const plain = liquid(false, sure(4e-9));
    expect(plain.layers[0]!.stated.end.meanFilmOxygen_molm3).toBeUndefined();
    const holding = liquid(true, sure(4e-9));
    expect(holding.layers[0]!.stated.end.meanFilmOxygen_molm3).toBeGreaterThan(0);
    expect(holding.zone).toBeGreaterThan(plain.zone);
    // Limit: a film in which oxygen runs through at once holds next to nothing and only resists.
    expect(liquid(true, sure(4e-4)).zone / plain.zone).toBeCloseTo(1, 2);
    const unknown = liquid(true);
    expect(unknown.zone).toBe(plain.zone);
    expect(unknown.warnings.map(({ code, message }) => [code, message])).toContainEqual([
      "film-store-unknown",
      "Nothing on the shelf says how much oxygen OPEN holds, so it only resists here. Add oxygenDiffusivity_m2s to the film to follow its store.",
    ]);
  });

  it("warns that a gas without oxygen starves the layers", () => {
    const { warnings } = run({ layers: 1, exposure_s: 30 }, window(0));
    expect(warnings.map(({ code }) => code)).toContain("gas-starves");
  });

  it.each([
    [{ layers: 0 }, "layersOf: layers is 0; it must be a number from 1 to 50"],
    [{ layers: 1.5 }, "layers is 1.5; it must be a whole number of at least 1"],
    [{ exposure_s: -1 }, "duration_s"],
  ])("refuses %j", (options, message) => {
    expect(() => run(options)).toThrow(message);
  });
});
