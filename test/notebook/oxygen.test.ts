import { describe, expect, it } from "vitest";
import { resistanceOf } from "../../lib/assess/resistance.js";
import { compareChanges, usualChanges } from "../../lib/decide/changes.js";
import { embed } from "../../lib/notebook/content.js";
import {
  changeFigure,
  changeTable,
  deadZoneMap,
  learntTable,
  resistanceText,
} from "../../lib/notebook/oxygen.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const work = { formulation, brief, shelf };
const dim = { ...work, brief: { ...brief, light: { ...brief.light, irradiance_mWcm2: sure(1e-6) } } };

describe("deadZoneMap", () => {
  it("thins with light and film, holds the present point, and is blank where nothing cures", () => {
    const figure = deadZoneMap(work);
    expect(figure.caption).toContain("OPEN film over air");
    const rows = figure.table.rows as (string | number | null)[][];
    const [row] = rows;
    expect(Number(row!.at(-1))).toBeLessThan(Number(row![3]));
    expect(Number(rows.at(-1)!.at(-1))).toBeLessThan(Number(row!.at(-1)));
    expect(figure.alternativeText).toContain("this printer");
    expect(() => embed(figure)).not.toThrow();
  });
});

describe("learntTable", () => {
  it("says what to do where there are no readings", () => {
    expect(learntTable(undefined).rows[0]![1]).toMatch(
      /until an induction time and one uncured layer are read$/,
    );
  });

  it("has a row for each reading and each figure", () => {
    const interval = { value: 1, low: 0.5, high: 2, level: 0.95 };
    const table = learntTable({
      id: "w",
      source: "A test.",
      readings: [{ reading: "uncured layer", value: 12, u: 1, unit: "µm", surprise: -1.234 }],
      figures: [
        { figure: "oxygen diffusivity", before: interval, after: { ...interval, low: 0.9, high: 1.1 } },
      ],
    });
    expect(table.rows).toEqual([
      ["uncured layer", "1.2 times its standard deviation below what was expected", "read 12 ± 1 µm"],
      ["oxygen diffusivity", "× 1.00 (0.50 to 2.00)", "× 1.00 (0.90 to 1.10)"],
    ]);
  });
});

describe("resistanceText", () => {
  it("says which rules and what follows, or that nothing cures", () => {
    const on = (thickness: number) => {
      const window = { ...brief.window, filmThickness_um: sure(thickness) };
      return resistanceText(resistanceOf({ ...work, brief: { ...brief, window }, draws: 100 }));
    };
    expect(on(1)).toMatch(/^The resin rules: .* % of the fall in oxygen happens across the film/);
    expect(on(1e5)).toMatch(/^The film rules: .*viscosity hardly counts/);
    const between = { value: 0.5, low: 0.4, high: 0.6, level: 0.95 };
    const shared = {
      rules: "film" as const,
      filmShare: between,
      filmRulesShare: 0.5,
      neverCuresShare: 0,
      warnings: [],
    };
    expect(resistanceText(shared)).toMatch(
      /^Film and resin share the resistance: 50 \(40 to 60\) %.*all count/,
    );
    expect(resistanceText(resistanceOf({ ...dim, draws: 100 }))).toMatch(
      /^Nothing cures in 100 % of the draws: .* comes first\.$/,
    );
  });
});

describe("changeTable and changeFigure", () => {
  const effects = compareChanges({
    ...work,
    draws: 60,
    gelTimes: 40,
    changes: usualChanges(work).slice(0, 4),
  });

  it("give each change its zone and its factors, and the figure leaves nitrogen out", () => {
    const table = changeTable(effects);
    expect(table.columns.map(({ name }) => name)).toEqual([
      "change",
      "steady zone then",
      "on the dead zone",
      "on the induction time",
      "on the time to first gel",
    ]);
    expect(table.rows.map(([change]) => change)).toContain("nitrogen under the film");
    const nitrogen = table.rows.find(([change]) => change === "nitrogen under the film")!;
    expect(nitrogen.slice(1, 4)).toEqual(["0", "× 0", "unchanged"]);
    const figure = changeFigure(effects, "A test")!;
    expect(figure.table.rows.map(([change]) => change)).not.toContain("nitrogen under the film");
    expect(figure.table.rows).toHaveLength(3);
    expect(figure.alternativeText).toContain("Line at 1: no change.");
  });

  it("draw no more changes than one page holds, the strongest, and say so", () => {
    const factor = (value: number) => ({ value, low: value, high: value, level: 0.95 });
    const many = Array.from({ length: 14 }, (_, i) => ({
      change: `change ${i}: as told`,
      deadZone_um: { then: factor(1), factor: factor(20 - i) },
      inductionTime_s: undefined,
      gelTime_s: undefined,
      neverCuresShare: 0,
    }));
    const drawn = changeFigure({ effects: many, notModelled: [] }, "A test")!;
    expect(drawn.table.rows.map(([label]) => label)).toEqual(
      Array.from({ length: 12 }, (_, i) => `change ${i}`),
    );
    expect(drawn.caption).toContain("and the weaker ones: the table holds them");
    expect(changeFigure({ effects: many.slice(2), notModelled: [] }, "A test")!.caption).not.toContain(
      "weaker",
    );
  });

  it("say that a resin never cures, and draw nothing of it", () => {
    const never = compareChanges({
      ...work,
      draws: 60,
      changes: [{ change: "hardly any light", then: dim }],
    });
    expect(changeTable(never).rows[0]!.slice(0, 3)).toEqual(["hardly any light", "never cures", null]);
    expect(changeTable(never).columns).toHaveLength(4);
    expect(changeFigure(never, "A test")).toBeUndefined();
  });
});

describe("deadZoneMap, where hardly anything cures", () => {
  it("is drawn all the same", () => {
    const light = { ...brief.light, irradiance_mWcm2: sure(0.4) };
    const { table } = deadZoneMap({ ...work, brief: { ...brief, light } });
    const cells = table.rows.flatMap((row) => row.slice(1));
    expect(cells).toContain(null);
    expect(cells.some((cell) => typeof cell === "number")).toBe(true);
  });
});
