// How oxygen at a window is shown: a map of the dead zone, what readings changed, which resistance rules, what changes would do.

import type { Case } from "../assess/case.js";
import { statedDeadZone } from "../assess/oxygen.js";
import type { ResistanceEstimate } from "../assess/resistance.js";
import type { ChangeComparison } from "../decide/changes.js";
import type { LearntOxygen } from "../decide/calibrateOxygen.js";
import { evenSteps, mapOver } from "../decide/sweep.js";
import type { Interval } from "../result.js";
import type { FigureContent, TableContent } from "./content.js";
import { intervalText, numberText } from "./digits.js";
import { contourFigure } from "./figure/contour.js";
import { intervalFigure } from "./figure/interval.js";
import { gasText, sharePercent, targetRegion } from "./phrases.js";
import { tableOf } from "./table.js";

/**
 * The dead zone over irradiance and film thickness at the stated figures, with the brief's target and the present point; blank
 * where the resin never cures.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { deadZoneMap } from "resinwright/notebook";
 * const figure = deadZoneMap(openBrief("data/briefs/flow-cell.json"));
 * figure.table.columns[0]?.name.includes("film thickness"); // → true
 * ```
 */
export function deadZoneMap(work: Case): FigureContent {
  const { brief, formulation } = work;
  const { window, light } = brief;
  const [film_um, power_mWcm2] = [window.filmThickness_um.value, light.irradiance_mWcm2.value];
  const around = (value: number) =>
    evenSteps({ from: value / 8, to: 8 * value, count: 13, logarithmic: true });
  const [x, y] = [around(power_mWcm2), around(film_um)];
  const at = (power: number, thickness: number): number | null =>
    statedDeadZone({
      ...work,
      brief: {
        ...brief,
        light: { ...light, irradiance_mWcm2: { ...light.irradiance_mWcm2, value: power } },
        window: { ...window, filmThickness_um: { ...window.filmThickness_um, value: thickness } },
      },
    });
  const values = mapOver({ x, y, at });
  const known = values.flat().filter((value) => value !== null);
  // Six lines stay readable: those nearest to what this printer has.
  const present = at(power_mWcm2, film_um) ?? 100;
  const fromPresent = (level: number) => Math.abs(Math.log(level / Math.max(present, 1e-3)));
  const levels = roundThicknesses
    .filter((level) => known.some((value) => value < level) && known.some((value) => value > level))
    .sort((a, b) => fromPresent(a) - fromPresent(b))
    .slice(0, 6)
    .sort((a, b) => a - b);
  const feasible = targetRegion(brief.targets.deadZone_um);
  return contourFigure({
    caption: "Dead zone over irradiance and film thickness",
    conditions: `${formulation.title}, ${window.film} film over ${gasText(brief)}, stated figures; blank where the resin never cures`,
    x: { label: "irradiance at the window", unit: "mW/cm²", logarithmic: true, values: x },
    y: { label: "film thickness", unit: "µm", logarithmic: true, values: y },
    z: { label: "dead-zone thickness", unit: "µm", values },
    ...(levels.length > 0 && { levels }),
    ...(feasible && { feasible }),
    marks: [{ label: "this printer", x: power_mWcm2, y: film_um }],
  });
}

const roundThicknesses = [0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100, 200, 500];

/**
 * What readings on the window changed: each reading against what was expected, then each figure before and after, as a multiple of
 * what the shelf states.
 * @example
 * ```ts
 * import { learntTable } from "resinwright/notebook";
 * learntTable(undefined).rows[0]?.[0]; // → "no readings on the window"
 * ```
 */
export function learntTable(learnt: LearntOxygen | undefined): TableContent {
  const caption = "What the readings on the window say of the figures behind them";
  if (learnt === undefined) {
    const advice =
      "none on the shelf for this formulation in this light: everything here is a guess from tables until an induction time and one uncured layer are read";
    return tableOf({ caption, rows: [{ about: "no readings on the window", before: advice, after: null }] });
  }
  const readings = learnt.readings.map(({ reading, value, u, unit, surprise }) => ({
    about: reading,
    before: `${numberText(Math.abs(surprise), 2)} times its standard deviation ${surprise < 0 ? "below" : "above"} what was expected`,
    after: `read ${numberText(value)} ± ${numberText(u)} ${unit}`,
  }));
  const figures = learnt.figures.map(({ figure, before, after }) => ({
    about: figure,
    before: `× ${intervalText(before)}`,
    after: `× ${intervalText(after)}`,
  }));
  return tableOf({
    caption: `${caption}, with 95 % intervals. Source: ${learnt.source}.`,
    rows: [...readings, ...figures],
    columns: [
      { key: "about", name: "reading or figure" },
      { key: "before", name: "before", align: "left" },
      { key: "after", name: "after", align: "left" },
    ],
  });
}

/**
 * Which resistance rules, in a sentence with what follows from it.
 * @example
 * ```ts
 * import { resistanceOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { resistanceText } from "resinwright/notebook";
 * const { brief, ...work } = openBrief("data/briefs/flow-cell.json");
 * const window = { ...brief.window, film: "FEP" };
 * resistanceText(resistanceOf({ ...work, brief: { ...brief, window } })).slice(0, 15); // → "The film rules:"
 * ```
 */
export function resistanceText({
  rules,
  filmShare,
  filmRulesShare,
  neverCuresShare,
}: ResistanceEstimate): string {
  if (rules === "nothing cures" || filmShare === undefined) {
    return `Nothing cures in ${sharePercent(neverCuresShare)} % of the draws: oxygen comes in faster than this light burns it. More light, more initiator or a tighter film comes first.`;
  }
  const percent = intervalText({
    value: 100 * filmShare.value,
    low: 100 * filmShare.low,
    high: 100 * filmShare.high,
  });
  const shared = filmShare.value > 0.35 && filmShare.value < 0.65;
  const opening = shared ? "Film and resin share the resistance" : `The ${rules} rules`;
  const follows = shared
    ? "film, gas, light, viscosity and temperature all count"
    : rules === "film"
      ? "a thinner or more open film and more oxygen below thicken the zone about one to one; viscosity hardly counts"
      : "the zone thins with the square root of the light and thickens with that of the oxygen below; viscosity and temperature count, the film little";
  return `${opening}: ${percent} % of the fall in oxygen happens across the film, more than half of it in ${sharePercent(filmRulesShare)} % of the draws, so ${follows}. The gas counts as mixed; where it stands still, it adds a resistance that is not in here.`;
}

/**
 * What changes would do, the strongest effect on the dead zone first: each quantity then, and its factor.
 * @example
 * ```ts
 * import { compareChanges, usualChanges } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { changeTable } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const changes = usualChanges(work).filter(({ change }) => change.endsWith("the light"));
 * changeTable(compareChanges({ ...work, changes, draws: 200 })).rows.length; // → 2
 * ```
 */
export function changeTable({ effects, notModelled }: ChangeComparison): TableContent {
  const withGel = effects.some(({ gelTime_s }) => gelTime_s !== undefined);
  return tableOf({
    caption: `What a change would do, with 95 % intervals of its factors. ${notModelled.join(" ")}`,
    rows: effects.map(({ change, deadZone_um, inductionTime_s, gelTime_s }) => ({
      change,
      deadZone_um: deadZone_um === undefined ? "never cures" : numberText(deadZone_um.then.value, 2),
      zoneFactor: deadZone_um && factorText(deadZone_um.factor),
      inductionFactor: inductionTime_s && factorText(inductionTime_s.factor),
      gelFactor: gelTime_s && factorText(gelTime_s.factor),
    })),
    columns: [
      { key: "change" },
      { key: "deadZone_um", name: "steady zone then", align: "right" },
      { key: "zoneFactor", name: "on the dead zone", align: "right" },
      { key: "inductionFactor", name: "on the induction time", align: "right" },
      ...(withGel ? [{ key: "gelFactor", name: "on the time to first gel", align: "right" as const }] : []),
    ],
  });
}

/** A factor with its interval, in two digits, near 1 in three; no interval where it is the same in every draw. */
function factorText({ value, low, high }: Interval): string {
  if (low === 1 && high === 1) return "unchanged";
  const [v, l, h] = [value, low, high].map((one) => numberText(one, one > 0.8 && one < 1.25 ? 3 : 2));
  return l === h ? `× ${v}` : `× ${v} (${l} to ${h})`;
}

/** So many named rows fit on a printed page. */
const onePage = 12;

/**
 * The factors on the dead zone as a figure, the twelve strongest, without the changes after which there is no zone; undefined where none is left.
 * @example
 * ```ts
 * import { compareChanges, usualChanges } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { changeFigure } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const changes = usualChanges(work).filter(({ change }) => change.endsWith("the light"));
 * const figure = changeFigure(compareChanges({ ...work, changes, draws: 200 }), "Flow-cell resin");
 * figure?.table.rows.length; // → 2
 * ```
 */
export function changeFigure({ effects }: ChangeComparison, conditions: string): FigureContent | undefined {
  const rows = effects.flatMap(({ change, deadZone_um }) =>
    deadZone_um === undefined || deadZone_um.factor.low <= 0
      ? []
      : [{ label: change.replace(/: .*/, ""), ...deadZone_um.factor }],
  );
  if (rows.length === 0) return undefined;
  return intervalFigure({
    caption: `Factor on the dead zone, change by change, the strongest first; changes after which there is none are left out${rows.length > onePage ? ", and the weaker ones: the table holds them" : ""}`,
    conditions,
    axis: { label: "factor on the dead zone", logarithmic: true },
    rows: rows.slice(0, onePage),
    reference: { label: "no change", at: 1 },
  });
}
