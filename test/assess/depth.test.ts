import { describe, expect, it } from "vitest";
import { workingCurveOf } from "../../lib/assess/cure.js";
import { penetrationDepthOf } from "../../lib/assess/depth.js";
import { opticalDepthOf } from "../../lib/assess/light.js";
import type { Brief } from "../../lib/recipe/brief.js";
import type { Shelf } from "../../lib/recipe/shelf.js";
import type { Spectrum } from "../../lib/recipe/spectrum.js";
import { brief, formulationOf, shelf } from "../fixtures.js";

const formulation = formulationOf({ THIN: 98.9, PI: 1, AB: 0.1 });
const flat = { formulation, brief, shelf };
const layers = (layerThickness_um: number): Brief => ({ ...brief, layerThickness_um, cureDepthPerLayer: 1 });

/** The test shelf with other values for an absorption on its three nodes 380, 400 and 420 nm. */
function shelfWith(changes: Record<string, number[]>): Shelf {
  const changed = (one: Spectrum): Spectrum => ({ ...one, values: changes[one.id] ?? one.values });
  return { ...shelf, spectra: new Map([...shelf.spectra].map(([id, one]) => [id, changed(one)])) };
}

describe("penetrationDepthOf", () => {
  it("is the optical depth where every wavelength is absorbed alike, whatever the layer", () => {
    for (const thickness of [10, 50, 400]) {
      const input = { ...flat, brief: layers(thickness), draws: 50 };
      expect(penetrationDepthOf(input).value / opticalDepthOf(input).value).toBeCloseTo(1, 12);
    }
  });

  // The initiator of 0.025 mol/L (1 % of 400 g/mol, density 1) absorbs alike at all three nodes, so it starts radicals in
  // proportion to power times wavelength; shares of the trapezoid rule are 1 : 2 : 1. Written out here on its own.
  it("follows the light that starts radicals down to the layer's cure depth", () => {
    const on = shelfWith({ ab: [20000, 10000, 1000] });
    const weights = [380, 2 * 400, 420];
    const alphas_perum = [20000, 10000, 1000].map(
      (eps) => (Math.LN10 * (500 * 0.025 + eps * 0.0025) + 1) / 1e4,
    );
    const left = (z: number) =>
      weights.reduce((sum, w, k) => sum + w * Math.exp(-alphas_perum[k]! * z), 0) / (380 + 800 + 420);
    for (const z of [20, 75, 300]) {
      const { value } = penetrationDepthOf({ ...flat, shelf: on, brief: layers(z), draws: 50 });
      expect(value / (-z / Math.log(left(z)))).toBeCloseTo(1, 10);
    }
  });

  it("grows with the layer under a broad engine, and lies above the optical depth", () => {
    const on = shelfWith({ ab: [20000, 10000, 1000] });
    const of = (z: number) => penetrationDepthOf({ ...flat, shelf: on, brief: layers(z), draws: 50 }).value;
    expect(of(50)).toBeGreaterThan(opticalDepthOf({ ...flat, shelf: on, draws: 50 }).value);
    expect(of(200)).toBeGreaterThan(1.05 * of(50));
  });

  it("does not count light that starts nothing", () => {
    const on = shelfWith({ pi: [500, 0, 0], ab: [20000, 0, 0] });
    const alone_percm = Math.LN10 * (500 * 0.025 + 20000 * 0.0025) + 1;
    const { value } = penetrationDepthOf({ ...flat, shelf: on, draws: 50 });
    expect(value / (1e4 / alone_percm)).toBeCloseTo(1, 10);
    expect(opticalDepthOf({ ...flat, shelf: on, draws: 50 }).value).toBeGreaterThan(3 * value);
  });

  it("carries the doubt of any slope under its own label", () => {
    const input = { ...flat, draws: 2000 };
    const [slope, optical] = [penetrationDepthOf(input), opticalDepthOf(input)];
    const label = "working-curve slope against optical depth";
    expect(slope.doubt.find((one) => one.label === label)!.share).toBeGreaterThan(0.3);
    expect(slope.sources.map(({ figure }) => figure)).toContain(label);
    expect(slope.high / slope.low).toBeGreaterThan(1.3 * (optical.high / optical.low));
    expect(slope.warnings.map(({ code }) => code)).toEqual(["working-curve-estimated"]);
  });

  it("sets the exposure of a layer: what is left at the cure depth is the critical exposure", () => {
    const on = shelfWith({ ab: [20000, 10000, 1000] });
    const curve = workingCurveOf({ ...flat, shelf: on, draws: 50 });
    const { layerExposure_mJcm2: E, criticalExposure_mJcm2: Ec, penetrationDepth_um: Dp } = curve;
    expect((E.value * Math.exp(-75 / Dp.value)) / Ec.value).toBeCloseTo(1, 12);
  });
});
