import { describe, expect, it } from "vitest";
import { calibrate } from "../../lib/decide/calibrate.js";
import { exposurePlanOf } from "../../lib/decide/exposurePlanOf.js";
import { spotPlanOf } from "../../lib/decide/spotPlanOf.js";
import {
  cureDepthFigure,
  exposureTable,
  exposureText,
  layerFactsTable,
  spotTable,
  stackFigure,
} from "../../lib/notebook/exposure.js";
import { intervalText, numberText, settingText } from "../../lib/notebook/digits.js";
import type { Target } from "../../lib/recipe/brief.js";
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
  const films = {
    thinnestFilm_um: 40,
    thickestFilm_um: 200,
    scatter_um: 6,
    relativeU: 0.1,
    longestTime_s: 300,
  };
  const ask = (change: Partial<typeof films> = {}) =>
    spotPlanOf({ ...work, ...films, ...change, draws: 100 });

  it("has a row a spot in the order to cure them, and marks the repeats", () => {
    const spots = ask();
    if (spots.outcome !== "planned") throw new Error(spots.reason);
    const { rows } = spotTable(spots);
    expect(rows.map(([spot]) => spot)).toEqual(spots.spots.map((_, i) => i + 1));
    expect(rows.map(([, , , , note]) => note)).toEqual(
      spots.spots.map(({ repeat }) => (repeat ? "repeat" : null)),
    );
    // Shown with two figures: half a unit of the last is at most 5 %.
    rows.forEach(([, time], i) =>
      expect(Math.abs(Number(time) / spots.spots[i]!.time_s - 1)).toBeLessThan(0.05),
    );
  });

  it("says what is promised and under which conditions, and how much initiator the longest spot uses up", () => {
    expect(spotTable(ask()).caption).toMatch(
      /^Spots to expose on a glass slide\. If the guess holds and the curve is straight, penetration depth comes out to [\d.]+ % and critical exposure to [\d.]+ % \(standard uncertainty, repeats counted\)\. The longest spot uses up [\d.]+ \([\d.]+ to [\d.]+\) % of the initiator at the window$/,
    );
  });

  it("gives the reason in place of rows where there is no spot to cure", () => {
    const { rows, caption } = spotTable(ask({ longestTime_s: 0.01 }));
    expect(rows).toEqual([]);
    expect(caption).toContain("No film of 40 µm is expected before that");
  });
});

describe("exposureTable", () => {
  it("has a row a run of layers, the seconds to set, and the time in all", () => {
    const { rows, caption } = exposureTable("To set", plan);
    expect(rows.map(([layers, part]) => [layers, part])).toEqual([
      ["1 to 4", "base"],
      ["5", "transition"],
      ["6 to 40", "normal"],
    ]);
    // The measured curve is known to some percent, which leaves three figures.
    expect(rows[2]![2]).toBe(plan.rows[2]!.time_s.value.toPrecision(3));
    expect(caption).toMatch(/^To set\. Light on for [\d.]+ min in all$/);
  });
});

describe("layerFactsTable", () => {
  it("tells what light does and, beside it, what was found in practice", () => {
    const { rows } = layerFactsTable(plan);
    expect(rows).toHaveLength(6);
    expect(rows[5]![2]).toMatch(
      /^Gong and others \(2015\) found channels to clog below 3\.5 to 5\.5 optical depths: here \d+ \(\d+ to \d+\) µm to \d+ \(\d+ to \d+\) µm$/,
    );
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

describe("exposureText", () => {
  const { value } = plan.rows.at(-1)!.time_s;
  const say = (target: Target | undefined, measured?: CureDepthSeries): string =>
    exposureText({
      plan,
      irradiance_mWcm2: 8,
      verdict: target === undefined ? undefined : { target, share: 0.31 },
      series: measured,
    });

  it("sets what the plan sets, with the digits that the doubt leaves", () => {
    const [base, normal] = [plan.rows[0]!, plan.rows.at(-1)!].map(({ time_s }) => settingText(time_s));
    expect(say(undefined)).toMatch(
      new RegExp(
        `^Set ${normal} s a layer \\(right time .* s\\) and ${base} s for the base layers, at 8 mW/cm²\\. The brief sets no target for the time of a layer\\. `,
      ),
    );
    const { rows, ...rest } = plan;
    const noBase = exposureText({
      plan: { ...rest, rows: rows.filter(({ part }) => part !== "base") },
      irradiance_mWcm2: 8,
      verdict: undefined,
      series: undefined,
    });
    expect(noBase).not.toContain("base layers");
  });

  it("says when the time misses the target, and what to do", () => {
    expect(say({ max: value / 2 })).toContain(
      `That is longer than the brief's ${numberText(value / 2)} s; the time of a layer is within its target (at most ${numberText(value / 2)}) in 31 % of the draws: take more light or more initiator, or thinner layers, before printing.`,
    );
    expect(say({ min: 2 * value })).toContain("That is shorter than the brief's");
    expect(say({ max: 2 * value })).toContain(". The time of a layer is within its target (at most");
  });

  it("carries the doubt of the optical depth into the height of channels, and names the study", () => {
    const { high_um } = plan.channel.foundToClog;
    expect(say(undefined)).toContain(
      `Channels lower than 5.5 optical depths, here ${intervalText(high_um)} µm, may clog (Gong and others, RSC Adv. 5 (2015) 106621, another resin): draw them higher than ${numberText(high_um.high, 2)} µm, or print a row of heights first.`,
    );
  });

  it("says what it rests on", () => {
    const spots = series.spots.filter(({ reading }) => reading !== "floated").length;
    expect(say(undefined, series)).toMatch(new RegExp(`It rests on ${spots} spots of flow-cell-a-412\\.$`));
    expect(say(undefined)).toMatch(
      /It rests on a guess: measure the series above under this light before printing\.$/,
    );
  });
});
