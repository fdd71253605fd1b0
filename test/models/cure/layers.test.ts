import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  channelHeightRule,
  conversionAfterExposure,
  cureDepth,
  interfaceConversion,
  openChannel,
  overcureRatio,
  printThrough,
  stackedExposure,
  stackProfile,
} from "../../../lib/models/cure.js";

const layer = { layerExposure_mJcm2: 12, layerThickness_um: 50 };
const curve = { penetrationDepth_um: 100, criticalExposure_mJcm2: 5 };

describe("layers on layers", () => {
  // Geometric series worked out by an independent program, printed to 4 decimals.
  it.each([
    [0.3, 3.8583, 2.8583, 1.3502],
    [0.5, 2.5415, 1.5415, 0.9328],
    [0.8, 1.816, 0.816, 0.5966],
    [1, 1.582, 0.582, 0.4587],
    [2, 1.1565, 0.1565, 0.1454],
  ])(
    "of %d depths collect %d at the window side, %d at the far side, and print %d depths further",
    (zeta, near, far, extra) => {
      const stack = stackedExposure({
        layerExposure_mJcm2: 1,
        layerThickness_um: 100 * zeta,
        opticalDepth_um: 100,
      });
      expect(Math.abs(stack.windowSide_mJcm2 - near)).toBeLessThan(1e-4);
      expect(Math.abs(stack.farSide_mJcm2 - far)).toBeLessThan(1e-4);
      expect(stack.windowSide_mJcm2 / stack.farSide_mJcm2).toBeCloseTo(Math.exp(zeta), 10);
      const roof = { layerExposure_mJcm2: 1000, layerThickness_um: 100 * zeta, ...curve };
      expect(Math.abs(printThrough(roof).drift_um / 100 - extra)).toBeLessThan(1e-4);
    },
  );

  it("add up one by one", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 5, noNaN: true }),
        fc.integer({ min: 1, max: 300 }),
        (zeta, layers) => {
          const stack = stackedExposure({
            layerExposure_mJcm2: 3,
            layerThickness_um: 100 * zeta,
            opticalDepth_um: 100,
            layers,
          });
          let sum = 0;
          for (let k = layers - 1; k >= 0; k--) sum += 3 * Math.exp(-k * zeta);
          expect(Math.abs(stack.windowSide_mJcm2 / sum - 1)).toBeLessThan(1e-12);
        },
      ),
    );
  });

  it("tend to the limit of very many", () => {
    const many = { ...layer, opticalDepth_um: 80 };
    const limit = stackedExposure(many).windowSide_mJcm2;
    let before = 0;
    for (const layers of [1, 2, 5, 20, 100]) {
      const { windowSide_mJcm2 } = stackedExposure({ ...many, layers });
      expect(windowSide_mJcm2).toBeGreaterThan(before);
      before = windowSide_mJcm2;
    }
    expect(before / limit).toBeCloseTo(1, 12);
    expect(stackedExposure({ ...many, layers: 1 }).windowSide_mJcm2).toBeCloseTo(12, 12);
    const roof = { ...layer, ...curve };
    expect(printThrough({ ...roof, layers: 200 }).printThrough_um).toBeCloseTo(
      printThrough(roof).printThrough_um,
      9,
    );
  });

  it("collect twice the exposure at twice the exposure a layer", () => {
    const stack = (layerExposure_mJcm2: number): number =>
      stackedExposure({ ...layer, layerExposure_mJcm2, opticalDepth_um: 70 }).farSide_mJcm2;
    expect(stack(5) + stack(7)).toBeCloseTo(stack(12), 12);
  });
});

describe("printThrough", () => {
  it("of one layer is the cure depth beyond the layer, and does not drift", () => {
    const { printThrough_um, drift_um } = printThrough({ ...layer, ...curve, layers: 1 });
    expect(printThrough_um).toBeCloseTo(cureDepth({ ...curve, exposure_mJcm2: 12 }) - 50, 10);
    expect(drift_um).toBe(0);
  });

  it("ends where the summed exposure is the critical one", () => {
    const { printThrough_um } = printThrough({ ...layer, ...curve, layers: 7 });
    let exposure = 0;
    for (let k = 1; k <= 7; k++) exposure += 12 * Math.exp(-(k * 50 + printThrough_um) / 100);
    expect(exposure / 5).toBeCloseTo(1, 12);
  });

  it("is 0 where even all layers stay below the critical exposure, and drifts only once there is any", () => {
    const dim = { layerExposure_mJcm2: 6, layerThickness_um: 150, ...curve };
    expect(printThrough(dim)).toEqual({ printThrough_um: 0, drift_um: 0 });
    const late = { layerExposure_mJcm2: 7.5, layerThickness_um: 50, ...curve };
    expect(printThrough({ ...late, layers: 1 }).printThrough_um).toBe(0);
    const all = printThrough(late);
    expect(all.drift_um).toBe(all.printThrough_um);
    expect(all.drift_um).toBeGreaterThan(0);
  });
});

describe("channels", () => {
  it("stay open by what the roof does not print through, and close below that", () => {
    const roof = { ...layer, ...curve, layers: 30 };
    const { printThrough_um } = printThrough(roof);
    expect(openChannel({ ...roof, channelHeight_um: 400 })).toEqual({
      outcome: "open",
      openHeight_um: 400 - printThrough_um,
    });
    expect(openChannel({ ...roof, channelHeight_um: 100 })).toEqual({
      outcome: "closed",
      smallestHeight_um: printThrough_um,
    });
  });

  it("were found to need 3.5 to 5.5 optical depths", () => {
    // Gong et al., RSC Adv. 5 (2015) 106621 (abstract): smallest channel 60 um high; 60 um lies in the range for 10.9 to 17.1 um.
    expect(channelHeightRule({ opticalDepth_um: 15 })).toEqual({ low_um: 52.5, high_um: 82.5 });
    expect(() => channelHeightRule({ opticalDepth_um: 0 })).toThrow(
      "channelHeightRule: opticalDepth_um is 0; it must be a finite number above 0",
    );
  });
});

describe("stackProfile", () => {
  const stack = {
    ...layer,
    opticalDepth_um: 100,
    criticalExposure_mJcm2: 5,
    gelConversion: 0.1,
    layers: 4,
    pointsPerLayer: 11,
  };
  const profile = stackProfile(stack);

  it("sums what each exposure left at a place when it was there", () => {
    expect(profile).toHaveLength(44);
    for (const { layer: n, depth_um, exposure_mJcm2, conversion } of profile) {
      let sum = 0;
      for (let k = 0; k < n; k++) sum += 12 * Math.exp(-(depth_um - (n - 1 - k) * 50) / 100);
      expect(exposure_mJcm2 / sum).toBeCloseTo(1, 12);
      expect(conversion).toBeCloseTo(conversionAfterExposure({ ...stack, exposure_mJcm2 }), 12);
    }
  });

  it("has the two sides of the bond where the newest layer meets the one before it", () => {
    const { newSide, oldSide } = interfaceConversion(stack);
    expect(profile[10]!.conversion).toBeCloseTo(newSide.conversion, 12);
    expect(profile[11]!.conversion).toBeCloseTo(oldSide.conversion, 12);
  });

  it("says what is wrong", () => {
    expect(() => stackProfile({ ...stack, pointsPerLayer: 2.5 })).toThrow(
      "stackProfile: pointsPerLayer is 2.5; it must be a whole number",
    );
    expect(() => stackProfile({ ...stack, layers: 20_000 })).toThrow(
      "stackProfile: layers is 20000; it must be a number from 1 to 10000",
    );
    expect(() => stackProfile({ ...stack, opticalDepth_um: 0 })).toThrow(
      "stackedExposure: opticalDepth_um is 0; it must be a finite number above 0",
    );
  });
});

describe("the bond between layers", () => {
  const bond = { ...layer, opticalDepth_um: 100, criticalExposure_mJcm2: 5, gelConversion: 0.1 };

  it("has on each side the conversion of the exposure there, the old side more", () => {
    const { newSide, oldSide } = interfaceConversion(bond);
    const left = Math.exp(-0.5);
    expect(newSide.exposure_mJcm2).toBeCloseTo(12 * left, 12);
    expect(oldSide.exposure_mJcm2).toBeCloseTo(12 * (1 + left), 12);
    for (const side of [newSide, oldSide]) {
      expect(side.conversion).toBeCloseTo(conversionAfterExposure({ ...bond, ...side }), 12);
    }
    expect(oldSide.conversion).toBeGreaterThan(newSide.conversion);
  });

  it("is gelled on the new side when the layer is overcured", () => {
    for (const layerExposure_mJcm2 of [6, 8, 8.3, 12]) {
      const overcure = overcureRatio({ ...layer, ...curve, layerExposure_mJcm2 });
      expect(interfaceConversion({ ...bond, layerExposure_mJcm2 }).newSide.gelled).toBe(overcure >= 1);
    }
    expect(overcureRatio({ ...layer, ...curve, layerExposure_mJcm2: 4 })).toBe(0);
  });

  it.each([
    [
      () => stackedExposure({ ...layer, opticalDepth_um: 50, layers: 2.5 }),
      "stackedExposure: layers is 2.5; it must be a whole number, or left out for very many",
    ],
    [
      () => stackedExposure({ ...layer, opticalDepth_um: 50, layers: 0 }),
      "stackedExposure: layers is 0; it must be a finite number of at least 1",
    ],
    [
      () => stackedExposure({ ...layer, opticalDepth_um: 0 }),
      "stackedExposure: opticalDepth_um is 0; it must be a finite number above 0",
    ],
    [
      () => printThrough({ ...layer, ...curve, penetrationDepth_um: NaN }),
      "printThrough: penetrationDepth_um is NaN; it must be a finite number above 0",
    ],
    [
      () => printThrough({ ...layer, ...curve, layerThickness_um: 0 }),
      "printThrough: layerThickness_um is 0; it must be a finite number above 0",
    ],
    [
      () => openChannel({ ...layer, ...curve, channelHeight_um: -1 }),
      "openChannel: channelHeight_um is -1; it must be a finite number above 0",
    ],
    [
      () => interfaceConversion({ ...bond, gelConversion: 0 }),
      "interfaceConversion: gelConversion is 0; it must be a number above 0 and at most 1",
    ],
    [
      () => overcureRatio({ ...layer, ...curve, layerExposure_mJcm2: 0 }),
      "overcureRatio: layerExposure_mJcm2 is 0; it must be a finite number above 0",
    ],
  ])("%s", (call, message) => {
    expect(call).toThrow(message);
  });
});
