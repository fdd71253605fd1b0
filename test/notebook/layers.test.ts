import { describe, expect, it } from "vitest";
import { layersOf } from "../../lib/assess/layers.js";
import { embed } from "../../lib/notebook/content.js";
import { layerMoments, layerTable, settlingFigure } from "../../lib/notebook/layers.js";
import { brief, formulationOf, shelf } from "../fixtures.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const series = layersOf({
  formulation,
  brief,
  shelf,
  draws: 40,
  layers: 2,
  exposure_s: 12,
  times_s: [8, 11],
});

describe("layerTable", () => {
  it("has a row a layer, with units, and says what gels", () => {
    const table = layerTable(series);
    expect(table.caption).toBe("Layers one after the other, 12 s of light each, with 95 % intervals");
    expect(table.columns.map(({ name, unit }) => [name, unit])).toEqual([
      ["layer", undefined],
      ["gels", undefined],
      ["gels after", "s"],
      ["left liquid", "µm"],
      ["conversion at the layer before", undefined],
      ["mean conversion", undefined],
    ]);
    expect(table.rows.map(([layer]) => layer)).toEqual([1, 2]);
    expect(table.rows[0]![1]).toMatch(/^\d+ % of draws$/);
  });

  it("shows no time for what never gels", () => {
    const dim = layersOf({ formulation, brief, shelf, draws: 40, layers: 1, exposure_s: 0.01 });
    expect(layerTable(dim).rows[0]!.slice(0, 3)).toEqual([1, "0 % of draws", null]);
  });
});

describe("layerMoments", () => {
  it("has a moment for each time asked for and the end, counted in light, both shares from 0 to 1", () => {
    const { dark_s } = brief.betweenLayers;
    const figure = layerMoments({ layer: series.layers[1]!, conditions: "A test", dark_s });
    expect(figure.moments!.steps.map(({ name }) => name)).toEqual(["light 3 s", "light 6 s", "light 12 s"]);
    for (const { data } of figure.moments!.steps)
      for (const { y } of data as { y: number[] }[]) {
        expect(Math.max(...y)).toBeLessThanOrEqual(1);
        expect(Math.min(...y)).toBeGreaterThanOrEqual(0);
      }
    expect(() => embed(figure)).not.toThrow();
  });
});

describe("settlingFigure", () => {
  it("draws what each layer leaves liquid, and nothing where none gels", () => {
    const figure = settlingFigure(series, "A test")!;
    expect(figure.table.rows.map(([layer]) => layer)).toEqual([1, 2]);
    const dim = layersOf({ formulation, brief, shelf, draws: 40, layers: 1, exposure_s: 0.01 });
    expect(settlingFigure(dim, "A test")).toBeUndefined();
  });
});
