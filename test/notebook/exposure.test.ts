import { describe, expect, it } from "vitest";
import { calibrate } from "../../lib/decide/calibrate.js";
import { exposurePlanOf } from "../../lib/decide/exposurePlanOf.js";
import { planCureDepths } from "../../lib/models/cure.js";
import {
  cureDepthFigure,
  exposureTable,
  layerFactsTable,
  spotTable,
  stackFigure,
} from "../../lib/notebook/exposure.js";
import { readWorkbench } from "../../lib/recipe/files.js";
import type { CureDepthSeries } from "../../lib/recipe/cureDepths.js";

const work = calibrate(readWorkbench("data/briefs/flow-cell.json"));
const plan = exposurePlanOf({
  ...work,
  layers: 40,
  baseLayers: 4,
  baseFactor: 8,
  transitionLayers: 1,
  draws: 100,
});
const series = work.shelf.cureDepths.find(({ id }) => id === "flow-cell-a-412")!;

describe("cureDepthFigure", () => {
  it("gives each kind of reading a mark of its own, and the line from the critical exposure up", () => {
    const { table } = cureDepthFigure(series);
    const names = [...new Set(table.rows.map(([name]) => String(name)))];
    expect(names.slice(0, 3)).toEqual(["measured", "at most: no film to lift", "floated: not used"]);
    expect(names[3]).toMatch(/^Dp .* µm, Ec .* mJ\/cm²$/);
    const line = table.rows.filter(([name]) => name === names[3]);
    expect(line[0]![2]).toBeCloseTo(0, 9);
    expect(table.rows.filter(([name]) => name === "measured")).toHaveLength(
      series.spots.filter(({ reading }) => reading === "measured").length,
    );
  });

  it("draws no mark for a floated film whose thickness was not read", () => {
    const bare: CureDepthSeries = {
      ...series,
      spots: series.spots.map((one) =>
        one.reading === "floated" ? { ...one, cureDepth_um: undefined! } : one,
      ),
    };
    expect(cureDepthFigure(bare).table.rows.map(([name]) => name)).not.toContain("floated: not used");
  });
});

describe("spotTable", () => {
  it("turns exposures into seconds of this light", () => {
    const guess = { penetrationDepth_um: 100, criticalExposure_mJcm2: 5 };
    const spots = planCureDepths({
      ...guess,
      thinnestFilm_um: 40,
      thickestFilm_um: 300,
      scatter_um: 8,
      relativeU: 0.1,
    });
    const { rows, caption } = spotTable({ plan: spots, irradiance_mWcm2: 4 });
    // Both are shown with three figures: half a unit of the last is at most 0.5 %, twice.
    for (const [, time, exposure] of rows)
      expect(Math.abs(Number(time) / (Number(exposure) / 4) - 1)).toBeLessThan(0.01);
    // Cd = 100 ln(E / 5): 40 um asks for 7.459 mJ/cm2.
    expect(rows[0]!.slice(2).map(Number)).toEqual([7.46, 40]);
    expect(caption).toContain("standard uncertainty");
  });
});

describe("exposureTable", () => {
  it("has a row a run of layers, the seconds to set with three figures, and the time in all", () => {
    const { rows, caption } = exposureTable("To set", plan);
    expect(rows.map(([layers, part]) => [layers, part])).toEqual([
      ["1 to 4", "base"],
      ["5", "transition"],
      ["6 to 40", "normal"],
    ]);
    expect(Number(rows[2]![2])).toBeCloseTo(plan.rows[2]!.time_s.value, 2);
    expect(caption).toMatch(/^To set\. Light on for [\d.]+ min in all$/);
  });
});

describe("layerFactsTable", () => {
  it("tells what light does and, beside it, what was found in practice", () => {
    const { rows } = layerFactsTable(plan);
    expect(rows).toHaveLength(4);
    expect(rows[3]![2]).toMatch(/^in practice channels below \d+ to \d+ µm were found to clog/);
  });
});

describe("stackFigure", () => {
  it("draws the newest layers one by one, each more cured at its window side", () => {
    const { table } = stackFigure(plan, "Flow-cell resin");
    const newest = table.rows.filter(([name]) => name === "newest layer").map((row) => Number(row[2]));
    expect(newest.length).toBeGreaterThan(5);
    expect([...newest].sort((a, b) => b - a)).toEqual(newest);
    expect(table.rows.map(([name]) => name)).toContain("1 before it");
    expect(table.caption).not.toContain("Window");
  });

  it("shows where the gel point is, if it is told", () => {
    const { table, alternativeText } = stackFigure(plan, "Flow-cell resin", 0.25);
    expect(table.caption).toContain("Window: gelled (conversion at least 0.25).");
    expect(alternativeText).toContain("gelled (conversion at least 0.25)");
  });
});
