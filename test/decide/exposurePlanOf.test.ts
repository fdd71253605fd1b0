import { describe, expect, it } from "vitest";
import type { Case } from "../../lib/assess/case.js";
import { workingCurveOf } from "../../lib/assess/cure.js";
import { opticalDepthOf } from "../../lib/assess/light.js";
import { deadZoneOf } from "../../lib/assess/oxygen.js";
import { exposurePlanOf, type PlannedLayers } from "../../lib/decide/exposurePlanOf.js";
import { printThrough } from "../../lib/models/cure.js";
import type { Brief } from "../../lib/recipe/brief.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const work: Case = { formulation: formulationOf({ THIN: 98.9, PI: 1, AB: 0.1 }), brief, shelf };
const layers: PlannedLayers = { layers: 100, baseLayers: 4, baseFactor: 8, transitionLayers: 2 };
const plan = (change: Partial<Brief> = {}, options: Partial<PlannedLayers> = {}) =>
  exposurePlanOf({ ...work, brief: { ...brief, ...change }, ...layers, ...options, draws: 200 });

describe("exposurePlanOf", () => {
  it("sets the layer's time of the working curve, base layers longer by their factor and steps between", () => {
    const { rows, totalTime_s } = plan();
    const { layerTime_s, layerExposure_mJcm2 } = workingCurveOf({ ...work, draws: 40 });
    expect(rows.map(({ part, fromLayer, toLayer }) => [part, fromLayer, toLayer])).toEqual([
      ["base", 1, 4],
      ["transition", 5, 5],
      ["transition", 6, 6],
      ["normal", 7, 100],
    ]);
    const factors = rows.map(({ time_s }) => time_s.value / layerTime_s.value);
    [8, 4, 2, 1].forEach((factor, i) => expect(factors[i]).toBeCloseTo(factor, 9));
    expect(rows[3]!.exposure_mJcm2).toBeCloseTo(layerExposure_mJcm2.value, 9);
    expect(totalTime_s / layerTime_s.value).toBeCloseTo(4 * 8 + 4 + 2 + 94, 8);
  });

  it("gives a normal layer the depth that the brief asks for, and its interval", () => {
    const { rows, cureDepthPerLayer } = plan();
    expect(rows[3]!.cureDepth_um.value).toBeCloseTo(75, 9);
    expect(cureDepthPerLayer.value).toBeCloseTo(1.5, 9);
    expect(cureDepthPerLayer.low).toBeLessThan(1.2);
    expect(cureDepthPerLayer.high).toBeGreaterThan(1.8);
    expect(rows[0]!.cureDepth_um.value).toBeGreaterThan(75 * 2);
  });

  it("has the print-through of the published sum, and it is the smallest open channel", () => {
    const { roof, channel } = plan();
    const curve = workingCurveOf({ ...work, draws: 40 });
    const { printThrough_um, drift_um } = printThrough({
      layerExposure_mJcm2: curve.layerExposure_mJcm2.value,
      layerThickness_um: 50,
      penetrationDepth_um: curve.penetrationDepth_um.value,
      criticalExposure_mJcm2: curve.criticalExposure_mJcm2.value,
    });
    expect(roof.printThrough_um.value).toBeCloseTo(printThrough_um, 8);
    expect(roof.drift_um.value).toBeCloseTo(drift_um, 8);
    expect(channel.smallest_um).toEqual(roof.printThrough_um);
    const depth = opticalDepthOf({ ...work, draws: 200 });
    const { low_um, high_um } = channel.foundToClog;
    for (const end of ["value", "low", "high"] as const) {
      expect(low_um[end]).toBeCloseTo(3.5 * depth[end], 8);
      expect(high_um[end]).toBeCloseTo(5.5 * depth[end], 8);
    }
  });

  it("names the study behind the height below which channels clog", () => {
    expect(plan().sources.find(({ figure }) => figure === "height below which channels clog")).toMatchObject({
      source: expect.stringContaining("10.1039/C5RA23855B") as string,
      status: "published",
    });
  });

  it("takes the liquid on the window off what a layer reaches, and off the light that makes the bond", () => {
    const { liquid_um, reach_um, bond, rows } = plan();
    const zone = deadZoneOf({ ...work, draws: 40 });
    expect(zone.outcome === "value" && zone.value).toBeCloseTo(liquid_um.value, 9);
    expect(reach_um.value).toBeCloseTo(rows.at(-1)!.cureDepth_um.value - liquid_um.value - 50, 9);
    // By Beer-Lambert, the bond has gelled where the layer reaches the one before, in the very same draws.
    expect(bond.newSide.conversion.value > shelf.constants.gelConversion.value).toBe(reach_um.value > 0);
    const oxygen = plan({ window: { ...brief.window, gasOxygenFraction: 1 } });
    expect(oxygen.liquid_um.value).toBeGreaterThan(liquid_um.value);
    expect(oxygen.bond.newSide.conversion.value).toBeLessThan(bond.newSide.conversion.value);
    expect(oxygen.roof).toEqual(plan().roof);
  });

  it("counts a resin that never cures on this window as one whose light never reaches the part", () => {
    const dim = { ...brief.light, irradiance_mWcm2: sure(1e-6) };
    const { bond, liquid_um, reach_um } = plan({ light: dim });
    expect(liquid_um.value).toBeGreaterThan(1000);
    expect(reach_um.high).toBeLessThan(0);
    expect(bond.newSide.conversion.high).toBe(0);
    expect(bond.gelsShare).toBe(0);
  });

  // Nitrogen below the film: no liquid. At the stated figures the exposure at the cure depth is then the critical one, and the layer
  // before is reached by half a layer: the new side of the bond has gelled, and the old side is ahead of it.
  it("bonds at a conversion above the gel's, the old side ahead of the new one", () => {
    const { bond } = plan({ window: { ...brief.window, gasOxygenFraction: 0 } });
    expect(bond.newSide.conversion.value).toBeGreaterThan(shelf.constants.gelConversion.value);
    expect(bond.oldSide.conversion.value).toBeGreaterThan(bond.newSide.conversion.value);
    expect(bond.gelsShare).toBeGreaterThan(0.5);
    const tighter = plan({ cureDepthPerLayer: 3, window: { ...brief.window, gasOxygenFraction: 0 } });
    expect(tighter.bond.gelsShare).toBeGreaterThan(bond.gelsShare);
    expect(tighter.roof.printThrough_um.value).toBeGreaterThan(plan().roof.printThrough_um.value);
  });

  it("says in how many draws a layer does not hold, and what the plan itself warns of", () => {
    const { warnings, bond } = plan();
    const share = Math.ceil(100 * (1 - bond.gelsShare));
    expect(warnings.find(({ code }) => code === "layer-may-not-hold")!.message).toBe(
      `In ${share} % of the draws a normal layer does not reach the one before it with the time that is set. Measure a cure-depth series, or cure deeper.`,
    );
    expect(plan({ layerThickness_um: 400 }).warnings.map(({ code }) => code)).toContain(
      "layer-thick-for-depth",
    );
  });

  it("shows the last layers through, six at the most", () => {
    const { stack } = plan();
    expect(stack.map(({ layer }) => layer)).toEqual(
      [1, 2, 3, 4, 5, 6].flatMap((k) => Array<number>(11).fill(k)),
    );
    expect(plan({}, { layers: 7 }).stack).toHaveLength(66);
    expect(plan({}, { layers: 3, baseLayers: 0, transitionLayers: 0 }).stack).toHaveLength(33);
    const { conversion } = stack.at(-1)!;
    expect(conversion).toBeGreaterThan(0);
  });

  it("moves with the light: twice the irradiance, less than or about half the time", () => {
    const bright = plan({ light: { ...brief.light, irradiance_mWcm2: sure(16, 1.6) } }).rows[3]!.time_s.value;
    // Half for the oxygen, more for the gel, whose rate goes with the root of the light.
    expect(bright / plan().rows[3]!.time_s.value).toBeGreaterThan(0.5);
    expect(bright / plan().rows[3]!.time_s.value).toBeLessThan(Math.SQRT1_2);
  });

  it.each<[Partial<PlannedLayers>, string]>([
    [
      { layers: 6 },
      "exposurePlanOf: all 6 layers are base or transition layers; a part needs at least one normal layer",
    ],
    [
      { layers: 5 },
      "exposurePlan: 4 base and 2 transition layers are more than the 5 of the part; take fewer",
    ],
    [{ baseFactor: 0.5 }, "exposurePlan: baseFactor is 0.5; it must be a number from 1 to 100"],
  ])("refuses %j", (options, message) => {
    expect(() => plan({}, options)).toThrow(message);
  });
});
