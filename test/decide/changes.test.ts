import { describe, expect, it } from "vitest";
import { deadZoneOf } from "../../lib/assess/oxygen.js";
import { compareChanges, usualChanges, type Change } from "../../lib/decide/changes.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const work = { formulation, brief, shelf };
const width = ({ low, high }: { low: number; high: number }) => Math.log(high / low);
const named = (name: string) => usualChanges(work).filter(({ change }) => change === name);
const effectOf = (name: string, more: { gelTimes?: number } = {}) =>
  compareChanges({ ...work, changes: named(name), draws: 200, ...more }).effects[0]!;

describe("compareChanges", () => {
  it("asks for as many gel times as an interval of its level needs", () => {
    const changes: Change[] = [{ change: "nothing", then: work }];
    expect(() => compareChanges({ ...work, changes, draws: 400, level: 0.99, gelTimes: 40 })).toThrow(
      "compareChanges: gelTimes is 40; it must be a number from 200 to 10000",
    );
  });

  it("finds nothing in no change: a factor of 1 without width", () => {
    const changes: Change[] = [{ change: "nothing", then: work }];
    const [same] = compareChanges({ ...work, changes, draws: 100, gelTimes: 40 }).effects;
    for (const effect of [same!.deadZone_um, same!.inductionTime_s, same!.gelTime_s])
      expect(effect!.factor).toEqual({ value: 1, low: 1, high: 1, level: 0.95 });
  });

  // Exact: the induction time goes with one over the light, whatever else is in doubt.
  it("knows a factor that is certain, though the figures are not", () => {
    const { inductionTime_s, deadZone_um } = effectOf("twice the light");
    expect(inductionTime_s!.factor.value).toBeCloseTo(0.5, 12);
    expect(width(inductionTime_s!.factor)).toBeLessThan(1e-9);
    expect(width(inductionTime_s!.then)).toBeGreaterThan(0.5);
    // Between the root (resin rules) and one to one (film rules); decaying light lets the factor fall below neither.
    expect(deadZone_um!.factor.low).toBeGreaterThan(0.3);
    expect(deadZone_um!.factor.high).toBeLessThan(1 / Math.SQRT2);
    expect(width(deadZone_um!.factor)).toBeLessThan(0.3 * width(deadZone_um!.then));
  });

  it("moves each way as it must", () => {
    const factor = (name: string) => effectOf(name).deadZone_um?.factor.value ?? NaN;
    expect(factor("film half as thick")).toBeGreaterThan(1);
    expect(factor("film twice as thick")).toBeLessThan(1);
    expect(factor("oxygen under the film")).toBeGreaterThan(1.5);
    expect(factor("nitrogen under the film")).toBe(0);
    expect(factor("10 K warmer")).toBeGreaterThan(1);
    expect(factor("10 K cooler")).toBeLessThan(1);
    expect(factor("twice the PI")).toBeLessThan(1);
    expect(effectOf("twice the PI").inductionTime_s!.factor.value).toBeLessThan(0.55);
    expect(effectOf("nitrogen under the film").inductionTime_s!.factor.value).toBe(1);
  });

  // Two oxygen per radical without inhibitor, one with very much of it: no change of its level can do more than a factor of two.
  it("says what an inhibitor does: lengthens the induction where chains use oxygen up, never beyond their length", () => {
    const constants = { ...shelf.constants, oxygenPerRadical: sure(2, 0.1) };
    const kept = {
      formulation: formulationOf({ THIN: 60, THICK: 38.89, PI: 1, AB: 0.1, KEEP: 0.01 }),
      brief,
      shelf: { ...shelf, constants },
    };
    const changes = usualChanges(kept).filter(({ change }) => change.endsWith("the KEEP"));
    expect(changes.map(({ change }) => change)).toEqual(["twice the KEEP", "half the KEEP"]);
    const { effects } = compareChanges({ ...kept, changes, draws: 200 });
    const induction = (name: string) =>
      effects.find(({ change }) => change === name)!.inductionTime_s!.factor;
    expect(induction("twice the KEEP").low).toBeGreaterThan(1.02);
    expect(induction("twice the KEEP").high).toBeLessThan(2);
    expect(induction("half the KEEP").high).toBeLessThan(0.98);
    expect(usualChanges(work).some(({ change }) => change.includes("KEEP"))).toBe(false);
  });

  it("follows layers in time when asked: twice the light halves the time to the first gel, or nearly", () => {
    expect(effectOf("twice the light").gelTime_s).toBeUndefined();
    const { gelTime_s } = effectOf("twice the light", { gelTimes: 40 });
    expect(gelTime_s!.factor.value).toBeGreaterThan(0.4);
    expect(gelTime_s!.factor.value).toBeLessThan(0.6);
  });

  it("names the viscosity that comes of another ratio, and thickens the zone where it falls", () => {
    const ratios = usualChanges(work).filter(({ change }) => change.includes("times the viscosity"));
    expect(ratios.map(({ change }) => change.replace(/[\d.]+/, "x"))).toEqual([
      "more THICK: x times the viscosity",
      "less THICK: x times the viscosity",
    ]);
    const { effects } = compareChanges({ ...work, changes: ratios, draws: 100 });
    const less = effects.find(({ change }) => change.startsWith("less"))!;
    expect(less.deadZone_um!.factor.value).toBeGreaterThan(1);
  });

  it("puts the strongest first, and says what it cannot answer", () => {
    const { effects, notModelled } = compareChanges({ ...work, draws: 60 });
    const strengths = effects.map(({ deadZone_um }) => Math.abs(Math.log(deadZone_um!.factor.value || 1e-9)));
    expect(strengths).toEqual([...strengths].sort((a, b) => b - a));
    expect(notModelled[0]).toMatch(/^Inhibitors: counted as catchers of peroxyl radicals/);
    expect(notModelled[1]).toMatch(/^Storage: .* Stay at the suppliers' levels\.$/);
  });

  it("leaves a zone out that no light ever makes, and counts the draws that never cure", () => {
    const dark: Change = {
      change: "hardly any light",
      then: { ...work, brief: { ...brief, light: { ...brief.light, irradiance_mWcm2: sure(1e-6) } } },
    };
    expect(deadZoneOf(dark.then).outcome).toBe("never-cures");
    const [effect] = compareChanges({ ...work, changes: [dark], draws: 60 }).effects;
    expect(effect!.deadZone_um).toBeUndefined();
    expect(effect!.neverCuresShare).toBe(1);
  });

  it.each([
    [{ changes: [] }, "compareChanges: changes is empty; give at least one, or leave it out"],
    [{ gelTimes: 10 }, "compareChanges: gelTimes is 10; it must be a number from 40 to 1000"],
  ])("refuses %j", (change, message) => {
    expect(() => compareChanges({ ...work, ...change })).toThrow(message);
  });
});

describe("usualChanges", () => {
  it("tries every other film, and only other gases", () => {
    const other = { ...shelf.films.get("OPEN")!, id: "OTHER" };
    const films = new Map([...shelf.films, ["OTHER", other]]);
    const changes = usualChanges({ ...work, shelf: { ...shelf, films } }).map(({ change }) => change);
    expect(changes).toContain("OTHER film as thick");
    expect(changes).not.toContain("OPEN film as thick");
    expect(changes).not.toContain("air under the film");
  });
});
