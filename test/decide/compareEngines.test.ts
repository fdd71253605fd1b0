import { describe, expect, it } from "vitest";
import { workingCurveOf } from "../../lib/assess/cure.js";
import { opticalDepthOf } from "../../lib/assess/light.js";
import { compareEngines } from "../../lib/decide/compareEngines.js";
import type { Shelf } from "../../lib/recipe/shelf.js";
import { brief, formulationOf, shelf } from "../fixtures.js";

const lamp = shelf.spectra.get("lamp")!;
const on: Shelf = {
  ...shelf,
  spectra: new Map([
    ...shelf.spectra,
    ["pi", { ...shelf.spectra.get("pi")!, values: [800, 500, 100] }],
    ["blue", { ...lamp, id: "blue", title: "a blue lamp", values: [0, 1, 3] }],
    ["far", { ...lamp, id: "far", title: "a far lamp", wavelengths_nm: [400, 420, 440] }],
  ]),
};
const work = { formulation: formulationOf({ THIN: 98.9, PI: 1, AB: 0.1 }), brief, shelf: on, draws: 50 };

describe("compareEngines", () => {
  it("says what is missing for every engine alike, and blames none of them", () => {
    const components = work.formulation.components.map((one) => ({
      ...one,
      ingredient: { ...one.ingredient, density_gcm3: undefined },
    }));
    expect(() => compareEngines({ ...work, formulation: { ...work.formulation, components } })).toThrow(
      /density_gcm3/,
    );
  });

  const engines = compareEngines(work);

  it("takes each engine on the shelf once, with what the case gives under it", () => {
    expect(engines.map(({ engine, outcome }) => [engine, outcome])).toEqual([
      ["lamp", "compared"],
      ["blue", "compared"],
      ["far", "not covered"],
    ]);
    const [own] = engines;
    expect(own).toMatchObject({ ...workingCurveOf(work), opticalDepth_um: opticalDepthOf(work) });
  });

  it("finds the engine that the initiator hardly absorbs slower", () => {
    const [own, blue] = engines;
    if (own?.outcome !== "compared" || blue?.outcome !== "compared") throw new Error("not compared");
    expect(blue.criticalExposure_mJcm2.value).toBeGreaterThan(1.3 * own.criticalExposure_mJcm2.value);
    expect(blue.opticalDepth_um.value).toBeGreaterThan(own.opticalDepth_um.value);
  });

  it("says which spectrum does not reach an engine's light", () => {
    const far = engines[2]!;
    expect(far.outcome === "not covered" && far.reason).toContain('spectrum "pi": wavelength_nm is 440');
  });

  it("replaces a nominal wavelength by the engine's spectrum", () => {
    const { irradiance_mWcm2 } = brief.light;
    const light = { wavelength_nm: { ...irradiance_mWcm2, value: 390, u: 2 }, irradiance_mWcm2 };
    expect(compareEngines({ ...work, brief: { ...brief, light } })).toEqual(engines);
  });

  it("refuses a resin without initiator", () => {
    const formulation = formulationOf({ THIN: 100 });
    expect(() => compareEngines({ ...work, formulation })).toThrow(
      'formulation "test": no photoinitiator in it',
    );
  });
});
