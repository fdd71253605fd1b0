import { describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import { deadZoneOf } from "../../lib/assess/oxygen.js";
import { viscosityOf } from "../../lib/assess/viscosity.js";
import { stefanForce } from "../../lib/models/separation.js";
import { embed, type FigureContent } from "../../lib/notebook/content.js";
import {
  beforeAfterFigure,
  blendFigure,
  doubtFigure,
  hardestToCall,
  liftFigure,
  targetFigure,
} from "../../lib/notebook/plots.js";
import type { Brief } from "../../lib/recipe/brief.js";
import { blendLaw, brief, exactReadings as readings, formulationOf, shelf, sure } from "../fixtures.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const caseUnder = (change: Partial<Brief> = {}) => ({ formulation, brief: { ...brief, ...change }, shelf });
const run = (change: Partial<Brief> = {}) => assess({ ...caseUnder(change), draws: 100 });
const dark = { ...brief.light, irradiance_mWcm2: sure(0.001) };
const { viscosity_mPas: viscosity, penetrationDepth_um: depth } = run().properties;
const wide = { viscosity_mPas: { min: 1, max: 1e6 } };

const trace = (figure: FigureContent, name: string) =>
  (figure.data as { name: string; x: number[]; y: number[] }[]).find((one) => one.name.startsWith(name))!;
const shapes = (figure: FigureContent) =>
  (
    figure.layout as {
      shapes: { type: string; x0: number; x1: number; y0: number; label?: { text: string } }[];
    }
  ).shapes;

describe("every figure", () => {
  const figures: [string, FigureContent][] = [
    ["target", targetFigure(run({ targets: wide }))!],
    ["doubt", doubtFigure(viscosity, "A test at 25 °C")!],
    ["blend", blendFigure(readings)],
    ["lift", liftFigure(caseUnder(), deadZoneOf({ ...caseUnder(), draws: 100 }))],
  ];

  it.each(figures)("the %s figure says what it shows, and holds only finite numbers", (_, figure) => {
    expect(() => embed(figure)).not.toThrow();
    expect(figure.alternativeText.length).toBeGreaterThan(60);
    expect(figure.table.rows.length).toBeGreaterThan(0);
    for (const row of figure.table.rows) expect(row).toHaveLength(figure.table.columns.length);
  });

  it.each([
    ["target", "Each property against its target. Formulation test under the brief test."],
    ["doubt", "What carries the doubt in the viscosity at print temperature. A test at 25 °C."],
    ["blend", "Blends of THICK with THIN: read and fitted. 25 °C, constructed for a test."],
    [
      "lift",
      "Pull on the largest cross-section against the gap it starts from. Rigid disc of 100 mm² lifted at 1 mm/s, test at 25 °C.",
    ],
  ])("the %s figure says its conditions", (name, caption) => {
    expect(new Map(figures).get(name)!.caption).toBe(caption);
  });
});

describe("targetFigure", () => {
  const rowsOf = (targets: Brief["targets"], change: Partial<Brief> = {}) =>
    targetFigure(run({ targets, ...change }))!.table.rows;

  it("shows each value and its interval over the upper limit of its target", () => {
    const [row] = rowsOf({ viscosity_mPas: { min: 50, max: 2000 } });
    const { title, value, low, high } = viscosity;
    expect(row!.slice(0, 5)).toEqual([title, value / 2000, low / 2000, high / 2000, "0.025 to 1"]);
  });

  it("shows it over the lower limit where there is no upper one", () => {
    const [row] = rowsOf({ penetrationDepth_um: { min: 20 } });
    expect(row!.slice(0, 5)).toEqual([
      "penetration depth",
      depth.value / 20,
      depth.low / 20,
      depth.high / 20,
      "at least 1",
    ]);
  });

  it("says whether a value lies inside", () => {
    const places = rowsOf({
      viscosity_mPas: { min: viscosity.low / 2, max: 2 * viscosity.high },
      penetrationDepth_um: { max: depth.low / 2 },
    }).map((row) => row[5]);
    expect(places).toEqual(["inside", "outside"]);
  });

  it("leaves out what never cures: it has no place on the axis", () => {
    const rows = rowsOf({ ...wide, deadZone_um: { max: 50 } }, { light: dark });
    expect(rows.map(([title]) => title)).toEqual(["viscosity at print temperature"]);
  });

  it("draws nothing where there is nothing to draw: no target, one that never cures, one of nothing", () => {
    expect(targetFigure(run())).toBeUndefined();
    expect(targetFigure(run({ targets: { deadZone_um: { max: 50 } }, light: dark }))).toBeUndefined();
    expect(targetFigure(run({ targets: { deadZone_um: { min: 0 } } }))).toBeUndefined();
  });
});

describe("hardestToCall", () => {
  it("is the target whose share of draws is nearest to a half", () => {
    const targets = {
      ...wide,
      penetrationDepth_um: { max: depth.value },
      layerTime_s: { max: 1e-9 },
    };
    const assessment = run({ targets });
    expect(hardestToCall(assessment)).toBe(assessment.properties.penetrationDepth_um);
  });

  it("does not disturb the order of the verdicts", () => {
    const assessment = run({ targets: { ...wide, penetrationDepth_um: { max: depth.value } } });
    const before = [...assessment.verdicts];
    hardestToCall(assessment);
    expect(assessment.verdicts).toEqual(before);
  });

  it("is the viscosity where there is no target", () => {
    expect(hardestToCall(run()).property).toBe("viscosity_mPas");
  });
});

describe("doubtFigure", () => {
  it("holds the shares of the property, in percent, with its inputs", () => {
    const { table, alternativeText } = doubtFigure(viscosity, "test")!;
    expect(viscosity.doubt.length).toBeGreaterThan(1);
    expect(table.rows).toEqual(viscosity.doubt.map(({ label, share }) => [label, 100 * share]));
    expect(table.columns[1]).toMatchObject({ name: "share of the doubt", unit: "%" });
    expect(alternativeText).toContain(viscosity.doubt[0]!.label);
  });

  it("keeps the eight largest", () => {
    const doubt = Array.from({ length: 10 }, (_, i) => ({ label: `input ${i}`, share: (10 - i) / 55 }));
    const { table } = doubtFigure({ ...viscosity, doubt }, "test")!;
    expect(table.rows.map(([label]) => label)).toEqual(doubt.slice(0, 8).map(({ label }) => label));
  });

  it("draws nothing where there is no doubt to share out", () => {
    expect(doubtFigure({ ...viscosity, doubt: [] }, "test")).toBeUndefined();
  });

  it("also tells what carries the doubt in whether a resin cures at all", () => {
    const edge = { ...brief.light, irradiance_mWcm2: sure(0.1, 0.03) };
    const zone = run({ light: edge }).properties.deadZone_um;
    expect(doubtFigure(zone, "test")!.caption).toBe(
      "What carries the doubt in the dead-zone thickness. test.",
    );
  });
});

describe("blendFigure", () => {
  const figure = blendFigure(readings);

  it("shows the readings as they were read", () => {
    const { x, y } = trace(figure, "readings");
    expect([x, y]).toEqual([readings.massFractions, readings.viscosities_mPas]);
    expect(figure.table.rows[1]).toEqual(["readings", 0.25, readings.viscosities_mPas[1]]);
  });

  it("draws the rule it fitted through them, and the log-ideal line, from neat to neat", () => {
    const fitted = trace(figure, "Grunberg–Nissan, G = −1.5");
    const ideal = trace(figure, "log-ideal, G = 0");
    expect([fitted.x.length, fitted.x[0], fitted.x.at(-1)]).toEqual([41, 0, 1]);
    // Constructed readings without scatter: only rounding of the fit stands between.
    fitted.x.forEach((w, i) => {
      expect(fitted.y[i]! / blendLaw(w, -1.5)).toBeCloseTo(1, 10);
      expect(ideal.y[i]! / blendLaw(w, 0)).toBeCloseTo(1, 10);
    });
  });

  it("says what stands on its axes", () => {
    expect(figure.table.columns.map(({ name, unit }) => [name, unit])).toEqual([
      ["series", undefined],
      ["mass fraction of THICK", undefined],
      ["viscosity", "mPa s"],
    ]);
    expect(figure.alternativeText).toMatch(
      /^Drawn: viscosity \(mPa s, .*, logarithmic\) against mass fraction of THICK/,
    );
  });
});

describe("beforeAfterFigure", () => {
  const before = { x: [0, 1], y: [10, 20], low: [5, 10], high: [20, 40], never: [] };
  const figure = (after: typeof before) =>
    beforeAfterFigure({
      caption: "Viscosity",
      conditions: "A test",
      x: { label: "share" },
      y: { label: "viscosity", unit: "mPa s" },
      before,
      after,
      level: 0.95,
    });

  it("shows both curves where readings changed something", () => {
    const { caption, table } = figure({ ...before, low: [8, 16] });
    expect(caption).toBe("Viscosity, before and after the readings. A test.");
    expect(table.columns.map(({ name }) => name)).toContain("viscosity: with the readings");
  });

  it("shows one where nothing was measured, and says so", () => {
    const { caption, table } = figure(structuredClone(before));
    expect(caption).toBe("Viscosity, from the shelf: no reading changes it. A test.");
    expect(table.columns.map(({ name }) => name)).toEqual([
      "share",
      "viscosity: from the shelf",
      "viscosity: from the shelf, low",
      "viscosity: from the shelf, high",
    ]);
  });
});

describe("liftFigure", () => {
  const work = caseUnder();
  const zone = deadZoneOf({ ...work, draws: 100 });
  const figure = liftFigure(work, zone);
  // 100 mm² under one atmosphere.
  const limit_N = 10.1325;

  it("shows the pull of the brief's cross-section at the brief's speed, with the interval of the viscosity", () => {
    const { value, low, high } = viscosityOf(work);
    const lift = { crossSection_mm2: 100, liftSpeed_mms: 1 };
    expect(figure.table.rows).toHaveLength(30);
    for (const [gap, ...pulls] of figure.table.rows as number[][]) {
      const expected = [value, low, high].map((viscosity_mPas) =>
        stefanForce({ ...lift, viscosity_mPas, gap_um: gap! }),
      );
      expect(pulls).toEqual(expected);
    }
    expect(figure.table.columns.map(({ unit }) => unit)).toEqual(["µm", "N", "N", "N"]);
  });

  it("marks the dead zone", () => {
    const thickness = zone.outcome === "value" ? zone.value : NaN;
    const mark = shapes(figure).find(({ label }) => label?.text === "dead zone")!;
    expect([mark.x0, mark.x1]).toEqual([thickness, thickness]);
    expect(figure.alternativeText).toMatch(/Mark dead zone at gap [\d.]+ µm\./);
  });

  it("shows the curve where the dead zone is, however thin, and its label away from the mark", () => {
    const thin = { ...zone, outcome: "value", value: 0.5 } as Parameters<typeof liftFigure>[1];
    const drawn = liftFigure(work, thin);
    const { yaxis } = drawn.layout as { yaxis: { range: [number, number] } };
    const pull_N = stefanForce({
      viscosity_mPas: viscosityOf(work).high,
      crossSection_mm2: 100,
      liftSpeed_mms: 1,
      gap_um: 0.5,
    });
    expect(10 ** yaxis.range[1]).toBeGreaterThan(pull_N);
    expect((drawn.table.rows as number[][])[0]![0]).toBeLessThan(0.5);
    const strip = shapes(drawn).find(({ label }) => label?.text.startsWith("more than"))!;
    expect(strip.label).toMatchObject({ textposition: "top right" });
  });

  it("marks the most a window can hold", () => {
    const words = "more than one atmosphere holds (10.1 N)";
    const [strip, limit] = shapes(figure).filter(({ label }) => label?.text !== "dead zone");
    expect(strip!.label!.text.replaceAll("<br>", " ")).toBe(words);
    expect(limit!.type).toBe("line");
    expect(limit!.y0).toBeCloseTo(limit_N, 12);
    expect(figure.alternativeText).toContain(`Window ${words} (pull at least 10.13 N)`);
    expect(figure.table.caption).toContain(words);
  });

  it.each([
    ["never cures", { light: dark }, "never-cures"],
    ["has no dead zone", { window: { ...brief.window, gasOxygenFraction: 0 } }, "value"],
  ] as const)("has no dead zone to mark where the resin %s", (_, change, outcome) => {
    const none = deadZoneOf({ ...caseUnder(change), draws: 100 });
    expect(none.outcome).toBe(outcome);
    expect(liftFigure(caseUnder(change), none).alternativeText).not.toContain("Mark");
  });
});
