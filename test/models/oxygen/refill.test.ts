import { describe, expect, it } from "vitest";
import { darkRefill, exposeLayer, refillTime } from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

// L = 100 um, D = 1e-10 m2/s: the time unit L^2/D is 100 s.
const gap = { gapThickness_um: 100, diffusivity_m2s: 1e-10, filmEquivalentThickness_um: 0 };
const at = (Fo: number, biot = Infinity) =>
  darkRefill({ ...gap, filmEquivalentThickness_um: 100 / biot, time_s: 100 * Fo });
const relative = (found: number, expected: number): number => Math.abs(found / expected - 1);

describe("darkRefill", () => {
  // By an independent program, to 12 digits.
  it.each([
    [0.05, 0.252313252178, 0.00313080451601],
    [0.1, 0.356823400452, 0.0506946373155],
    [0.25, 0.562233541762, 0.31455423311],
    [0.5, 0.763950330744, 0.6292225702],
    [1, 0.931259678463, 0.892022955556],
  ])("without film, Fo %d", (Fo, mean, part) => {
    expect(relative(at(Fo).mean, mean)).toBeLessThan(1e-11);
    expect(relative(at(Fo).atPart, part)).toBeLessThan(1e-11);
    expect(at(Fo).atWindow).toBe(1);
  });

  // As above.
  it.each([
    [0.1, 0.5, 0.0782210579805, 0.0320192539939, 0.0474260147618],
    [1, 0.1, 0.276422761331, 0.00689174519504, 0.0804032525006],
    [1, 1, 0.651823148338, 0.466140598591, 0.529602751135],
    [10, 0.5, 0.935671044729, 0.545359444387, 0.684983732852],
  ])("with a film, Bi %d, Fo %d", (biot, Fo, window, part, mean) => {
    const found = at(Fo, biot);
    expect(relative(found.atWindow, window)).toBeLessThan(1e-11);
    expect(relative(found.atPart, part)).toBeLessThan(1e-11);
    expect(relative(found.mean, mean)).toBeLessThan(1e-11);
  });

  it("joins its short-time law to the series without a step, from tight films to none", () => {
    for (const biot of [1e-6, 0.01, 1, 30, 1e5, 1e12, Infinity]) {
      const [before, after] = [at(0.02 - 1e-12, biot), at(0.02 + 1e-12, biot)];
      // In 2e-12 of Fo the mean moves by 1e-11 at most, the window by less than its rounding.
      expect(Math.abs(before.mean - after.mean)).toBeLessThan(2e-11);
      expect(Math.abs(before.atWindow - after.atWindow)).toBeLessThan(1e-9);
      expect(at(1e-3 - 1e-12, biot).atPart).toBe(0);
      expect(Math.abs(at(1e-3 + 1e-12, biot).atPart)).toBeLessThan(1e-14);
    }
  });

  it("starts empty and ends full", () => {
    for (const biot of [1, Infinity]) {
      expect(at(0, biot)).toEqual({ atWindow: 0, atPart: 0, mean: 0 });
      expect(at(1e3, biot).atPart).toBeCloseTo(1, 12);
    }
  });

  it("goes as the root of time without film and evenly in time with a tight one", () => {
    expect(relative(at(1e-6).mean, 2 * Math.sqrt(1e-6 / Math.PI))).toBeLessThan(1e-14);
    // kappa C* t / L = Bi Fo, less Bi / (3 sqrt(pi)) * 4 sqrt(Fo) of it.
    expect(relative(at(1e-6, 1e-3).mean, 1e-9)).toBeLessThan(1e-5);
  });

  it("is what exposeLayer does in the dark, to the grid error of 400 cells", () => {
    const { readings } = exposeLayer({
      ...P0,
      oxygen_molm3: 0,
      window: { film: "resists", filmEquivalentThickness_um: 100 },
      schedule: [{ duration_s: 100, relativeIrradiance: 0 }],
      times_s: [10, 100],
      cells: 400,
      grid: "even",
      tolerance: 1e-8,
    });
    [0.1, 1].forEach((Fo, k) => {
      expect(Math.abs(readings[k]!.meanOxygen_molm3 - at(Fo, 1).mean)).toBeLessThan(1e-6);
      expect(Math.abs(readings[k]!.wallOxygen_molm3 - at(Fo, 1).atWindow)).toBeLessThan(1e-5);
      expect(Math.abs(readings[k]!.oxygen_molm3.at(-1)! - at(Fo, 1).atPart)).toBeLessThan(1e-5);
    });
  });
});

describe("refillTime", () => {
  // As above: Fo for the mean and for the far end.
  it.each([
    [0.5, 0.196730739524, 0.378747838271],
    [0.9, 0.848085408046, 1.03110498228],
    [0.95, 1.12900737673, 1.31202695357],
    [0.99, 1.78128799387, 1.96430757072],
  ])("to %d", (refilled, mean, part) => {
    expect(relative(refillTime({ ...gap, refilled, at: "mean" }), 100 * mean)).toBeLessThan(1e-10);
    expect(relative(refillTime({ ...gap, refilled, at: "part" }), 100 * part)).toBeLessThan(1e-10);
  });

  it("turns darkRefill round, with a film", () => {
    const film = { ...gap, filmEquivalentThickness_um: 340 };
    for (const refilled of [1e-4, 0.3, 0.999]) {
      const time_s = refillTime({ ...film, refilled, at: "mean" });
      expect(relative(darkRefill({ ...film, time_s }).mean, refilled)).toBeLessThan(1e-10);
    }
    // Film-limited: L / kappa ln(1 / (1 - share)) once the gap is far thinner than the film's worth.
    const tight = { ...gap, filmEquivalentThickness_um: 1e5 };
    expect(relative(refillTime({ ...tight, refilled: 0.9, at: "mean" }), 1e5 * Math.LN10)).toBeLessThan(1e-3);
  });

  it.each([
    [{ refilled: 1 }, "refillTime: refilled is 1; it must be a number above 0 and at most 0.999999999"],
    [{ gapThickness_um: 0 }, "refillTime: gapThickness_um is 0; it must be a finite number above 0"],
    [{ at: "window" as "mean" }, 'refillTime: unknown at "window"; known: mean, part'],
  ])("refuses %j", (change, message) => {
    expect(() => refillTime({ ...gap, refilled: 0.5, at: "mean", ...change })).toThrow(message);
  });
});
