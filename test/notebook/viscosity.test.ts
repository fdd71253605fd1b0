import { describe, expect, it } from "vitest";
import { warmthText, type WarmthQuestion } from "../../lib/notebook/viscosity.js";

// Ends that are round numbers over the temperature: high meets 400 mPa s at 22.5 °C, low meets 100 at 40.
const question: WarmthQuestion = {
  viscosityAt: (temperature_C) => ({ low: 4000 / temperature_C, high: 9000 / temperature_C }),
  target: { min: 100, max: 400 },
  coolest_C: 15,
  warmest_C: 45,
};
const say = (change: Partial<WarmthQuestion>) => warmthText({ ...question, ...change });

describe("warmthText", () => {
  it("names both ends, in whole degrees within them", () => {
    expect(say({})).toBe("From 23 to 40 °C the whole interval is within the target (100 to 400 mPa s).");
    expect(say({ target: { min: 101, max: 400 } })).toContain("From 23 to 39 °C");
  });

  it("says of an end that it is only where the looking stopped", () => {
    expect(say({ target: { max: 400 } })).toBe(
      "From 23 to 45 °C, the warmest looked at, the whole interval is within the target (at most 400 mPa s).",
    );
    expect(say({ target: { min: 100 } })).toBe(
      "From 15 °C, the coolest looked at, to 40 °C the whole interval is within the target (at least 100 mPa s).",
    );
  });

  it.each([
    ["too thick at all of them", { max: 150 }],
    ["too thin at all of them", { min: 300 }],
    ["too wide an interval", { min: 130, max: 250 }],
  ])("says that no temperature will do: %s", (_, target) => {
    expect(say({ target })).toMatch(
      /^At no temperature from 15 to 45 °C is the whole interval within the target \(.* mPa s\)\.$/,
    );
  });

  it("has nothing to say without a target", () => {
    expect(say({ target: undefined })).toBe("No target is set for the viscosity.");
  });

  it("refuses a viscosity that rises with temperature", () => {
    expect(() => say({ viscosityAt: (t) => ({ low: t, high: 10 * t }) })).toThrow(
      "it must fall with temperature",
    );
  });
});
