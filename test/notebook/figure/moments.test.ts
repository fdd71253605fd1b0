import { describe, expect, it } from "vitest";
import { embed } from "../../../lib/notebook/content.js";
import { momentsFigure, type MomentsFigure } from "../../../lib/notebook/figure/moments.js";

const curve = (y: number[], name = "conversion") => ({ name, x: [0, 25, 50], y });
const plain: MomentsFigure = {
  caption: "Conversion from the window up",
  conditions: "Invented resin",
  x: { label: "distance from the window", unit: "µm" },
  y: { label: "conversion" },
  by: { label: "light", unit: "s" },
  moments: [
    { at: 1, series: [curve([0, 0.1, 0.05])] },
    { at: 2, series: [curve([0, 0.3, 0.2])] },
    { at: 3.3333, series: [curve([0, 0.8, 0.6])] },
  ],
};
const many = (count: number) =>
  Array.from({ length: count }, (_, i) => ({ at: i, series: [curve([0, i / count, 0])] }));

describe("momentsFigure", () => {
  it("has a step for each moment, shows the last, and keeps the axes where all moments fit", () => {
    const { moments, data, layout } = momentsFigure(plain);
    expect(moments!.steps.map(({ name }) => name)).toEqual(["light 1 s", "light 2 s", "light 3.33 s"]);
    expect(moments!.shown).toBe(2);
    expect(data).toEqual(moments!.steps[2]!.data);
    expect((moments!.steps[0]!.data[0] as { y: number[] }).y).toEqual([0, 0.1, 0.05]);
    const { range } = (layout as { yaxis: { range: [number, number] } }).yaxis;
    expect(range[1]).toBeGreaterThan(0.8);
    expect(() => embed(momentsFigure(plain))).not.toThrow();
  });

  it("shows another moment first on request", () => {
    const { moments, data } = momentsFigure({ ...plain, shown: 0 });
    expect([moments!.shown, data]).toEqual([0, moments!.steps[0]!.data]);
  });

  it("tells the first, the shown and the last moment in words, and holds the numbers", () => {
    const { alternativeText, table } = momentsFigure({ ...plain, shown: 1 });
    expect(alternativeText).toMatch(
      /^Curves at 3 moments, light 1 s to light 3\.33 s\. At light 1 s: Drawn:/,
    );
    expect(alternativeText.match(/At light/g)).toHaveLength(3);
    expect(table.rows).toHaveLength(9);
    expect(table.rows[1]).toEqual(["1", 25, 0.1]);
    expect(table.caption).toBe("Conversion from the window up. All moments, at up to 13 places each.");
  });

  it("thins the table and says so", () => {
    const { table } = momentsFigure({ ...plain, moments: many(30) });
    expect(table.rows).toHaveLength(27);
    expect(table.caption).toContain("9 of 30 moments");
  });

  it.each<[Partial<MomentsFigure>, string]>([
    [{ moments: many(1) }, "moments holds 1; give 2 to 40"],
    [{ moments: many(41) }, "moments holds 41; give 2 to 40"],
    [
      { moments: [...plain.moments].reverse() },
      "moments[1].at is 2 after 3.3333; each must be above the one before",
    ],
    [
      { moments: [plain.moments[0]!, { at: 9, series: [curve([0, 1, 0], "oxygen")] }] },
      "moments[1] shows oxygen and the one before conversion; all must show the same curves",
    ],
    [{ shown: 3 }, "shown is 3; it must be a number from 0 to 2"],
    [{ shown: 0.5 }, "shown is 0.5; it must be a whole number"],
    [{ x: { label: "" } }, 'momentsFigure "Conversion from the window up": x axis: label is ""'],
  ])("refuses %j", (change, message) => {
    expect(() => momentsFigure({ ...plain, ...change })).toThrow(message);
  });
});
