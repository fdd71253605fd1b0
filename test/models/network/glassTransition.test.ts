import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { foxTemperature, gordonTaylorTemperature } from "../../../lib/models/network.js";

const even = { massFractions: [0.5, 0.5], glassTransitions_C: [94, -50] };

describe("foxTemperature", () => {
  it("of one component is its own, and never outside its components'", () => {
    expect(foxTemperature({ massFractions: [1], glassTransitions_C: [94] })).toBeCloseTo(94, 12);
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1, noNaN: true }), (w) => {
        const blend = foxTemperature({ ...even, massFractions: [w, 1 - w] });
        expect(blend).toBeGreaterThanOrEqual(-50 - 1e-9);
        expect(blend).toBeLessThanOrEqual(94 + 1e-9);
        // Below the straight line: the harmonic mean is the smaller one.
        expect(blend).toBeLessThanOrEqual(w * 94 - (1 - w) * 50 + 1e-9);
      }),
    );
  });

  // Calculated outside this program, stated to 1e-5 K.
  it.each([
    [[94, -50], 277.58605],
    [[105, -54], 277.48727],
  ])("of equal masses with %j", (glassTransitions_C, kelvin) => {
    expect(Math.abs(foxTemperature({ ...even, glassTransitions_C }) + 273.15 - kelvin)).toBeLessThan(6e-6);
  });

  it.each([
    [
      { massFractions: [0.5, 0.6] },
      "foxTemperature: massFractions add up to 1.1; they must add up to 1 within",
    ],
    [
      { glassTransitions_C: [94, -300] },
      "foxTemperature: glassTransitions_C[1] is -300; it must be a finite number above -273.15; give it in degrees Celsius",
    ],
    [
      { glassTransitions_C: [94] },
      "foxTemperature: massFractions holds 2, glassTransitions_C holds 1; the lists",
    ],
  ])("refuses %j", (change, message) => {
    expect(() => foxTemperature({ ...even, ...change })).toThrow(message);
  });
});

describe("gordonTaylorTemperature", () => {
  it("is the straight line at k = 1 and Fox's equation at k = Tg1 / Tg2", () => {
    expect(gordonTaylorTemperature({ ...even, k: 1 })).toBeCloseTo(22, 10);
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1, noNaN: true }), (w) => {
        const blend = { ...even, massFractions: [w, 1 - w] };
        const k = (94 + 273.15) / (-50 + 273.15);
        expect(gordonTaylorTemperature({ ...blend, k })).toBeCloseTo(foxTemperature(blend), 9);
      }),
    );
  });

  it("at k = 0.5 leans to the first component: (0.5 × 367.15 + 0.25 × 223.15) / 0.75 = 319.15 K", () => {
    expect(gordonTaylorTemperature({ ...even, k: 0.5 })).toBeCloseTo(46, 10);
  });

  it("refuses three components and a k that is not above 0", () => {
    const three = { massFractions: [0.5, 0.3, 0.2], glassTransitions_C: [94, -50, 20], k: 1 };
    expect(() => gordonTaylorTemperature(three)).toThrow(
      "gordonTaylorTemperature: massFractions holds 3; the equation is for 2 components; use foxTemperature for more",
    );
    expect(() => gordonTaylorTemperature({ ...even, k: 0 })).toThrow(
      "gordonTaylorTemperature: k is 0; it must be a number above 0 and at most 1000",
    );
  });
});
