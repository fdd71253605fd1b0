import { describe, expect, it } from "vitest";
import { opticalDepthOf } from "../../lib/assess/light.js";
import { lightTakenOf } from "../../lib/assess/lightTaken.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const parts = { THIN: 57, THICK: 40, PI: 2, AB: 1 };
const work = { brief, shelf, formulation: formulationOf(parts) };

describe("lightTakenOf", () => {
  it("shares out all of the light", () => {
    const { takers, transmitted } = lightTakenOf({ ...work, draws: 100 });
    const all = [...takers.map(({ share }) => share.value), transmitted.share.value];
    expect(all.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12);
    expect(Math.min(...all)).toBeGreaterThan(0);
  });

  it("lets through what Beer and Lambert do where absorption is the same at every wavelength", () => {
    // The fixtures' spectra are flat, so one optical depth says it all.
    const { transmitted, depth_um } = lightTakenOf({ ...work, draws: 40 });
    const opticalDepth_um = opticalDepthOf({ ...work, draws: 40 }).value;
    expect(depth_um).toBe(75);
    expect(transmitted.share.value).toBeCloseTo(Math.exp(-depth_um / opticalDepth_um), 12);
  });

  it("shares in proportion to absorption: ln 10 times coefficient and concentration of each", () => {
    const { takers } = lightTakenOf({ ...work, draws: 40 });
    const [initiator, absorber, resin] = takers;
    expect([initiator!.name, absorber!.name, resin!.name]).toEqual(["PI", "AB", "the resin itself"]);
    const absorption = (one: typeof initiator) => one!.napierianAbsorptions_percm[0]!;
    expect(absorption(resin)).toBe(shelf.constants.backgroundAbsorption_percm.value);
    for (const one of [initiator, absorber]) {
      const ratio = absorption(one) / absorption(resin);
      expect(one!.share.value / resin!.share.value / ratio).toBeCloseTo(1, 10);
    }
    const twice = lightTakenOf({
      ...work,
      formulation: formulationOf({ ...parts, THIN: 56, AB: 2 }),
      draws: 40,
    });
    // The density of the blend moves a little with what is taken out for it.
    expect(absorption(twice.takers[1]) / absorption(absorber)).toBeCloseTo(2, 2);
  });

  it("takes more through a deeper layer, and says how deep it looked", () => {
    const deep = lightTakenOf({ ...work, brief: { ...brief, layerThickness_um: 100 }, draws: 40 });
    const thin = lightTakenOf({ ...work, draws: 40 });
    expect(deep.depth_um).toBe(150);
    expect(deep.transmitted.share.value).toBeCloseTo(thin.transmitted.share.value ** 2, 12);
  });

  it("reads a nominal wavelength as one node", () => {
    const light = { wavelength_nm: sure(405, 4), irradiance_mWcm2: brief.light.irradiance_mWcm2 };
    const { engine } = lightTakenOf({ ...work, brief: { ...brief, light }, draws: 40 });
    expect(engine.shares).toEqual([1]);
  });

  it("refuses an absorber without a spectrum as the optical depth does", () => {
    const components = work.formulation.components.map((one) => ({
      ...one,
      ingredient: { ...one.ingredient, spectrum: undefined },
    }));
    expect(() => lightTakenOf({ ...work, formulation: { ...work.formulation, components } })).toThrow(
      'formulation "test": PI has no absorption spectrum; add one to spectra/ and name it in the ingredient',
    );
  });
});
