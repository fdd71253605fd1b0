import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  conversionAfterExposure,
  criticalExposureFromConversion,
  cureDepth,
  irradianceExponent,
  steadyConversionTime,
} from "../../../lib/models/cure.js";

const part = fc.double({ min: 0.01, max: 0.95, noNaN: true });

describe("the bridge between exposure and conversion", () => {
  it("is at the gel conversion at the critical exposure, and undone by its inverse", () => {
    fc.assert(
      fc.property(
        part,
        part,
        fc.double({ min: 0.1, max: 500, noNaN: true }),
        (gelConversion, conversion, exposure_mJcm2) => {
          const criticalExposure_mJcm2 = criticalExposureFromConversion({
            exposure_mJcm2,
            conversion,
            gelConversion,
          });
          const X = (E: number): number =>
            conversionAfterExposure({ exposure_mJcm2: E, criticalExposure_mJcm2, gelConversion });
          expect(X(exposure_mJcm2) / conversion).toBeCloseTo(1, 10);
          expect(X(criticalExposure_mJcm2) / gelConversion).toBeCloseTo(1, 12);
          expect(X(0)).toBe(0);
        },
      ),
    );
  });

  it("waits for the oxygen: nothing up to the induction exposure, the gel conversion at the critical one all the same", () => {
    const resin = { criticalExposure_mJcm2: 5, gelConversion: 0.1, inductionExposure_mJcm2: 4 };
    const X = (exposure_mJcm2: number, change = {}) =>
      conversionAfterExposure({ ...resin, exposure_mJcm2, ...change });
    expect([X(0), X(3.9), X(4)]).toEqual([0, 0, 0]);
    expect(X(5)).toBeCloseTo(0.1, 14);
    expect(X(10, { inductionExposure_mJcm2: 0 })).toBe(X(10, { inductionExposure_mJcm2: undefined }));
    expect(X(10)).toBeGreaterThan(X(10, { inductionExposure_mJcm2: 2 }));
  });

  // Reference: 0-D conversion with oxygen 1 mol/m3, Ri 0.5 mol/(m3 s), kp 25 and kt 2500 m3/(mol s), by an independent program, 10 digits;
  // oxygen lasts 2 s, and 10 % are reached 0.4214 s later. Within what the last of the oxygen rounds off: 1e-3.
  it.each([
    [2.5, 0.1178923756],
    [3, 0.2215427537],
    [5, 0.5278418129],
  ])("follows a resin whose oxygen is used up first: at %d s", (time_s, conversion) => {
    const found = conversionAfterExposure({
      exposure_mJcm2: time_s,
      criticalExposure_mJcm2: 2 - Math.log(0.9) / 0.25,
      gelConversion: 0.1,
      inductionExposure_mJcm2: 2,
    });
    expect(Math.abs(found - conversion)).toBeLessThan(1e-3);
  });

  it("puts the gel where the working curve does: the front of Vitale and Cabral with Dp = 1 / mu", () => {
    const curve = { penetrationDepth_um: 100, criticalExposure_mJcm2: 5 };
    const depth = cureDepth({ ...curve, exposure_mJcm2: 30 });
    const X = conversionAfterExposure({
      exposure_mJcm2: 30 * Math.exp(-depth / 100),
      criticalExposure_mJcm2: 5,
      gelConversion: 0.1,
    });
    expect(X).toBeCloseTo(0.1, 12);
  });

  it("adds in the linear range: two small exposures convert what one of their sum does", () => {
    const X = (exposure_mJcm2: number): number =>
      conversionAfterExposure({ exposure_mJcm2, criticalExposure_mJcm2: 5, gelConversion: 0.1 });
    expect((X(0.001) + X(0.002)) / X(0.003)).toBeCloseTo(1, 4);
    // Of what is still there, at any exposure.
    expect((1 - X(7)) * (1 - X(11))).toBeCloseTo(1 - X(18), 12);
  });

  it("says what is wrong", () => {
    const good = { exposure_mJcm2: 1, criticalExposure_mJcm2: 5, gelConversion: 0.1 };
    expect(() => conversionAfterExposure({ ...good, gelConversion: 10 })).toThrow(
      "conversionAfterExposure: gelConversion is 10; it must be a number above 0 and at most 0.9999999999999999; give it as a fraction",
    );
    expect(() => conversionAfterExposure({ ...good, inductionExposure_mJcm2: 5 })).toThrow(
      "conversionAfterExposure: inductionExposure_mJcm2 is 5; it must be below criticalExposure_mJcm2, 5, of which it is a part",
    );
    expect(() => conversionAfterExposure({ ...good, exposure_mJcm2: -1 })).toThrow(
      "conversionAfterExposure: exposure_mJcm2 is -1; it must be a finite number of at least 0",
    );
    expect(() =>
      criticalExposureFromConversion({ exposure_mJcm2: 1, conversion: 0, gelConversion: 0.1 }),
    ).toThrow("criticalExposureFromConversion: conversion is 0; it must be a number above 0");
  });
});

describe("irradianceExponent", () => {
  it("is 0.5 for the classical steady state and 1 where only the exposure counts", () => {
    const time = (radicalGeneration_molm3s: number): number =>
      steadyConversionTime({
        conversion: 0.1,
        propagation_m3mols: 25,
        termination_m3mols: 2500,
        radicalGeneration_molm3s,
      });
    expect(irradianceExponent({ irradiances_mWcm2: [2, 8], times_s: [time(0.2), time(0.8)] })).toBeCloseTo(
      0.5,
      12,
    );
    expect(irradianceExponent({ irradiances_mWcm2: [2, 8], times_s: [12, 3] })).toBeCloseTo(1, 12);
  });

  it("says what is wrong", () => {
    expect(() => irradianceExponent({ irradiances_mWcm2: [5, 5], times_s: [1, 2] })).toThrow(
      "irradianceExponent: both irradiances are 5 mW/cm2; measure at two, best a factor of 4 apart",
    );
    expect(() => irradianceExponent({ irradiances_mWcm2: [5, 6], times_s: [1, 0] })).toThrow(
      "irradianceExponent: times_s[1] is 0; it must be a finite number above 0",
    );
  });
});
