import { describe, expect, it } from "vitest";
import {
  gasText,
  lightText,
  sharePercent,
  targetBand,
  targetRegion,
  targetText,
  windowText,
  withinText,
} from "../../lib/notebook/phrases.js";
import { brief, sure } from "../fixtures.js";

const under = (gasOxygenFraction: number) => ({ ...brief, window: { ...brief.window, gasOxygenFraction } });

describe("lightText", () => {
  it("names the engine's spectrum, or its wavelength where that is all there is", () => {
    const nominal = { wavelength_nm: sure(405, 3), irradiance_mWcm2: sure(2.5) };
    expect(lightText(brief)).toBe("8 mW/cm² of lamp");
    expect(lightText({ ...brief, light: nominal })).toBe("2.5 mW/cm² of 405 nm");
  });
});

describe("windowText and gasText", () => {
  it("say film, thickness and gas", () => {
    expect(windowText(brief)).toBe("OPEN film of 200 µm over air");
    expect(windowText(under(0))).toBe("OPEN film of 200 µm over nitrogen");
  });

  it.each([
    [0, "nitrogen"],
    [0.2095, "air"],
    [1, "oxygen"],
    [0.05, "gas with 5 % oxygen"],
    // Not the composition of air, and not passed off as air.
    [0.21, "gas with 21 % oxygen"],
  ])("a mole fraction of oxygen of %s is %s", (fraction, words) => {
    expect(gasText(under(fraction))).toBe(words);
  });
});

describe("targetText", () => {
  it.each([
    [{ min: 100, max: 600 }, "100 to 600"],
    [{ min: 5 }, "at least 5"],
    [{ max: 6 }, "at most 6"],
    [{ min: 0 }, "at least 0"],
    [{}, "no target"],
  ])("%j is said as %s", (target, words) => {
    expect(targetText(target)).toBe(words);
  });
});

describe("withinText", () => {
  it("says target and share, or that there is no target", () => {
    expect(withinText({ min: 5, max: 50 }, 0.934)).toBe("within its target (5 to 50) in 93 % of the draws");
    expect(withinText(undefined, 1)).toBe("with no target set for it");
  });
});

describe("sharePercent", () => {
  it.each([
    [0.879, 88],
    [0.302, 30],
    [0.5, 50],
    [1, 100],
    [0, 0],
    // A verdict hangs on these limits: what does not reach one is not rounded onto it.
    [0.9496, 94],
    [0.95, 95],
    [0.9996, 99],
    [0.0504, 6],
    [0.05, 5],
    [0.0004, 1],
    // Halves go towards one half, whatever a double makes of them.
    [0.875, 87],
    [0.125, 13],
    [0.285, 29],
  ])("%s is said as %s %%", (share, percent) => {
    expect(sharePercent(share)).toBe(percent);
  });
});

describe("targetBand and targetRegion", () => {
  it("carry the limits of the target and nothing where there is none", () => {
    expect(targetBand("x", { min: 100, max: 600 })).toEqual([
      { label: "target", axis: "x", from: 100, to: 600 },
    ]);
    expect(targetBand("y", { max: 6 })).toEqual([{ label: "target", axis: "y", to: 6 }]);
    expect(targetRegion({ min: 5 })).toEqual({ label: "target", from: 5 });
    expect(targetBand("y", undefined)).toEqual([]);
    expect(targetRegion(undefined)).toBeUndefined();
  });
});
