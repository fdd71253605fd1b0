import { describe, expect, it } from "vitest";
import {
  cureDepth,
  exposureForDepth,
  exposurePlan,
  type ExposureQuestion,
} from "../../../lib/models/cure.js";

const question: ExposureQuestion = {
  penetrationDepth_um: 100,
  criticalExposure_mJcm2: 5,
  layerThickness_um: 50,
  cureDepthPerLayer: 1.5,
  irradiance_mWcm2: { value: 4, u: 0.2 },
  layers: 200,
  baseLayers: 4,
  baseFactor: 8,
  transitionLayers: 2,
  level: 0.95,
};
const plan = (change: Partial<ExposureQuestion> = {}) => exposurePlan({ ...question, ...change });

describe("exposurePlan", () => {
  it("covers every layer once, in order", () => {
    const { rows } = plan();
    expect(rows.map(({ part, fromLayer, toLayer }) => [part, fromLayer, toLayer])).toEqual([
      ["base", 1, 4],
      ["transition", 5, 5],
      ["transition", 6, 6],
      ["normal", 7, 200],
    ]);
    expect(plan({ baseLayers: 0, transitionLayers: 0 }).rows).toHaveLength(1);
    expect(plan({ layers: 6 }).rows.at(-1)!.part).toBe("transition");
  });

  it("cures a normal layer as deep as wanted, and base layers by their factor", () => {
    const { rows } = plan();
    const normal = rows.at(-1)!;
    expect(normal.exposure_mJcm2).toBeCloseTo(exposureForDepth({ ...question, cureDepth_um: 75 }), 12);
    expect(normal.cureDepth_um).toBeCloseTo(75, 10);
    expect(rows[0]!.exposure_mJcm2 / normal.exposure_mJcm2).toBeCloseTo(8, 12);
    expect(rows[0]!.cureDepth_um).toBeCloseTo(75 + 100 * Math.log(8), 9);
  });

  it("comes down in equal factors", () => {
    const steps = plan().rows.map(({ exposure_mJcm2 }) => exposure_mJcm2);
    for (let k = 1; k < steps.length; k++) expect(steps[k - 1]! / steps[k]!).toBeCloseTo(2, 12);
  });

  it("turns exposure into seconds, with the interval of the irradiance", () => {
    const normal = plan().rows.at(-1)!;
    expect(normal.time_s * 4).toBeCloseTo(normal.exposure_mJcm2, 12);
    // z(0.975) = 1.959964 (tables): irradiance 4 -+ 0.391993.
    expect(normal.exposure_mJcm2 / normal.timeLow_s).toBeCloseTo(4.391993, 5);
    expect(normal.exposure_mJcm2 / normal.timeHigh_s).toBeCloseTo(3.608007, 5);
    const depthAt = (irradiance: number): number =>
      cureDepth({ ...question, exposure_mJcm2: irradiance * normal.time_s });
    expect(normal.cureDepthLow_um).toBeCloseTo(depthAt(3.608007), 4);
    expect(normal.cureDepthHigh_um).toBeCloseTo(depthAt(4.391993), 4);
    const sure = plan({ irradiance_mWcm2: { value: 4, u: 0 } }).rows.at(-1)!;
    expect([sure.timeLow_s, sure.timeHigh_s]).toEqual([sure.time_s, sure.time_s]);
  });

  it("sums the time with the light on", () => {
    const { rows, totalTime_s } = plan();
    const [base, first, second, normal] = rows.map(({ time_s }) => time_s);
    expect(totalTime_s).toBeCloseTo(4 * base! + first! + second! + 194 * normal!, 9);
  });

  it("warns of layers that do not suit the depth, and of a bond that the irradiance may not give", () => {
    expect(plan().warnings).toEqual([]);
    expect(plan({ layerThickness_um: 120 }).warnings.map(({ code }) => code)).toEqual([
      "layer-thick-for-depth",
    ]);
    expect(plan({ layerThickness_um: 20, cureDepthPerLayer: 3 }).warnings).toEqual([
      {
        code: "layer-thin-for-depth",
        message:
          "the layer is 0.20 penetration depths thick; below 0.3 the light prints through many layers: add absorber if holes have to stay open",
      },
    ]);
    expect(plan({ irradiance_mWcm2: { value: 4, u: 1 } }).warnings.map(({ code }) => code)).toEqual([
      "layer-may-not-hold",
    ]);
  });

  it.each([
    [
      { cureDepthPerLayer: 0.8 },
      "exposurePlan: cureDepthPerLayer is 0.8; it must be a number from 1 to 10; below 1 a layer does not reach the one before it",
    ],
    [{ baseFactor: 0.5 }, "exposurePlan: baseFactor is 0.5; it must be a number from 1 to 100"],
    [{ layers: 10.5 }, "exposurePlan: layers is 10.5; it must be a whole number"],
    [
      { layers: 5 },
      "exposurePlan: 4 base and 2 transition layers are more than the 5 of the part; take fewer",
    ],
    [{ baseLayers: 0 }, "exposurePlan: transitionLayers is 2 without base layers; set it to 0"],
    [
      { irradiance_mWcm2: { value: 4, u: 3 } },
      "exposurePlan: the lower end of the irradiance is -1.879891953620163; it must be a finite number above 0; an irradiance so uncertain sets no time; measure it",
    ],
    [
      { irradiance_mWcm2: { value: 0, u: 0 } },
      "exposurePlan: irradiance_mWcm2.value is 0; it must be a finite number above 0",
    ],
    [{ level: 95 }, "exposurePlan: level is 95; it must be a number from 0.5 to 0.999"],
  ])("refuses %j", (change, message) => {
    expect(() => plan(change)).toThrow(message);
  });
});
