import { describe, expect, it } from "vitest";
import type { Case } from "../../../lib/assess/case.js";
import { calibrate } from "../../../lib/decide/calibrate.js";
import { massFractionOf } from "../../../lib/recipe/formulation.js";
import { readWorkbench } from "../../../lib/recipe/files.js";
import { controlsOf, withSettings, type Settings } from "../../../lib/notebook/panel/settings.js";
import { formulationOf } from "../../fixtures.js";

const work = readWorkbench("data/briefs/flow-cell.json");
const startOf = (controls: ReturnType<typeof controlsOf>) =>
  Object.fromEntries(controls.map(({ field, start }) => [field, start])) as Settings;
const start = startOf(controlsOf(work));
const fractions = (changes: Settings) => {
  const { formulation } = withSettings(work, { ...start, ...changes });
  return (id: string) => massFractionOf(formulation, id);
};

describe("controlsOf", () => {
  it("starts each control where the brief and its formulation have it, within its reach", () => {
    const controls = controlsOf(work);
    expect(controls.map(({ field, label, unit }) => [field, label, unit])).toEqual([
      ["share_pct", "share of UDMA in UDMA + IBOA", "%"],
      ["initiator_pct", "photoinitiator BAPO", "%"],
      ["absorber_pct", "absorber BBOT", "%"],
      ["irradiance_mWcm2", "irradiance at the window", "mW/cm²"],
      ["temperature_C", "resin temperature", "°C"],
    ]);
    expect(start.share_pct).toBeCloseTo((100 * 55) / 85, 10);
    expect([start.initiator_pct, start.irradiance_mWcm2, start.temperature_C]).toEqual([1.2, 8, 28]);
    for (const { min, max, start, step } of controls) {
      expect(min <= start && start <= max && step > 0 && step < (max - min) / 50).toBe(true);
    }
  });

  it("leaves out what the formulation has no use for, and reaches a start beyond the usual range", () => {
    const hot = { ...work.brief, temperature_C: 75 };
    const controls = controlsOf({ ...work, formulation: formulationOf({ THIN: 98, PI: 2 }), brief: hot });
    expect(controls.map(({ field }) => field)).toEqual([
      "initiator_pct",
      "irradiance_mWcm2",
      "temperature_C",
    ]);
    expect(controls[2]!.max).toBe(75);
  });
});

describe("withSettings", () => {
  it("keeps what readings on the window have corrected", () => {
    const known: Case = calibrate<Case>(work);
    expect(known.oxygenCorrection).toBeDefined();
    expect(withSettings(known, start).oxygenCorrection).toBe(known.oxygenCorrection);
  });

  it("leaves a case untouched where nothing was moved", () => {
    const same = withSettings(work, start);
    expect(same.formulation).toBe(work.formulation);
    expect(same.brief).toEqual(work.brief);
  });

  it("moves the ratio and keeps the rest", () => {
    const of = fractions({ share_pct: 50 });
    expect(of("UDMA")).toBeCloseTo(0.425, 14);
    expect(of("IBOA")).toBeCloseTo(0.425, 14);
    expect(of("BAPO")).toBe(0.012);
  });

  it("sets initiator and absorber to exactly what is shown, moved or not, and keeps the ratio of the rest", () => {
    const of = fractions({ share_pct: 50, initiator_pct: 2 });
    expect(of("BAPO")).toBe(0.02);
    expect(of("BBOT")).toBe(massFractionOf(work.formulation, "BBOT"));
    expect(of("UDMA") / of("IBOA")).toBeCloseTo(1, 12);
    expect(of("TEGDMA") / of("MEHQ")).toBeCloseTo(13.6 / 0.05, 8);
    expect(fractions({ absorber_pct: 0 })("BBOT")).toBe(0);
  });

  it("moves light with its relative uncertainty, and temperature", () => {
    const { brief } = withSettings(work, { ...start, irradiance_mWcm2: 16, temperature_C: 35 });
    expect(brief.light.irradiance_mWcm2).toEqual({
      ...work.brief.light.irradiance_mWcm2,
      value: 16,
      u: 1.2,
    });
    expect(brief.temperature_C).toBe(35);
    expect(brief.window).toBe(work.brief.window);
  });

  it("refuses what is out of reach, missing or not a number", () => {
    expect(() => withSettings(work, { ...start, temperature_C: 500 })).toThrow(
      "panel: resin temperature is 500; it must be a number from 10 to 60",
    );
    expect(() => withSettings(work, { ...start, absorber_pct: "" as unknown as number })).toThrow(
      'panel: absorber BBOT is ""; it must be a number from 0 to',
    );
    expect(() => withSettings(work, { ...start, share_pct: NaN })).toThrow(
      "panel: share of UDMA in UDMA + IBOA is NaN; it must be a number from 0 to 100",
    );
    expect(() => withSettings(work, {})).toThrow("is missing; it must be a number from 0 to 100");
  });
});
