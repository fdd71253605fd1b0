// How cure depths and an exposure plan are shown: spots against their line, the seconds to set, what a layer gets from them.

import type { Verdict } from "../assess/property.js";
import type { ExposurePlanEstimate } from "../decide/exposurePlanOf.js";
import type { SpotPlan } from "../decide/spotPlanOf.js";
import { fitCureDepths } from "../decide/workingCurveFrom.js";
import { cureDepth } from "../models/cure.js";
import type { CureDepthSeries } from "../recipe/cureDepths.js";
import type { Interval } from "../result.js";
import type { FigureContent, TableContent } from "./content.js";
import { intervalText, numberText, settingText } from "./digits.js";
import { lineFigure, type Series } from "./figure/line.js";
import { sharePercent, withinText } from "./phrases.js";
import { tableOf } from "./table.js";

/**
 * Spots of a cure-depth series with the line through them; what is only a bound, or floated, has a mark of its own.
 * @example
 * ```ts
 * import { readShelf } from "resinwright/files";
 * import { cureDepthFigure } from "resinwright/notebook";
 * const series = readShelf(["data"]).cureDepths.find(({ id }) => id === "flow-cell-a-412")!;
 * cureDepthFigure(series).table.rows[0]; // → ["measured", 16, 47]
 * ```
 */
export function cureDepthFigure(series: CureDepthSeries): FigureContent {
  const { penetrationDepth_um, criticalExposure_mJcm2 } = fitCureDepths(series);
  const kinds = [
    ["measured", "measured"],
    ["at-most", "at most: no film to lift"],
    ["at-least", "at least: cured through the gap"],
    ["floated", "floated: not used"],
  ] as const;
  const spots = kinds.flatMap(([kind, name]): Series[] => {
    const shown = series.spots.filter(
      ({ reading, cureDepth_um }) => reading === kind && cureDepth_um !== undefined,
    );
    if (shown.length === 0) return [];
    return [
      {
        name,
        x: shown.map(({ exposure_mJcm2 }) => exposure_mJcm2),
        y: shown.map(({ cureDepth_um }) => cureDepth_um!),
        style: "points",
      },
    ];
  });
  const exposures = series.spots.map(({ exposure_mJcm2 }) => exposure_mJcm2);
  const ends = [criticalExposure_mJcm2.value, Math.max(...exposures)];
  const curve = {
    penetrationDepth_um: penetrationDepth_um.value,
    criticalExposure_mJcm2: criticalExposure_mJcm2.value,
  };
  return lineFigure({
    caption: "Cure depths and the working curve through them",
    conditions: `${series.formulation}; ${series.source}`,
    x: { label: "exposure", unit: "mJ/cm²", logarithmic: true },
    y: { label: "cure depth", unit: "µm" },
    series: [
      ...spots,
      {
        name: `Dp ${intervalText(penetrationDepth_um)} µm, Ec ${intervalText(criticalExposure_mJcm2)} mJ/cm²`,
        x: ends,
        y: ends.map((exposure_mJcm2) => cureDepth({ ...curve, exposure_mJcm2 })),
      },
    ],
  });
}

/**
 * Which spots to expose before a working curve is known, in that order, and how thick they are expected to be; no rows, and the
 * reason, where none can be planned.
 * @example
 * ```ts
 * import { spotPlanOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { spotTable } from "resinwright/notebook";
 * const films = { thinnestFilm_um: 40, thickestFilm_um: 300, scatter_um: 6, relativeU: 0.1, longestTime_s: 300 };
 * const plan = spotPlanOf({ ...openBrief("data/briefs/flow-cell.json"), ...films, draws: 100 });
 * spotTable(plan).rows.at(-1)?.[4]; // → "repeat"
 * ```
 */
export function spotTable(plan: SpotPlan): TableContent {
  return tableOf({
    caption: `Spots to expose on a glass slide. ${promiseText(plan)}`,
    rows: (plan.outcome === "planned" ? plan.spots : []).map(
      ({ exposure_mJcm2, time_s, cureDepth_um, repeat }, i) => ({
        spot: i + 1,
        time_s,
        exposure_mJcm2,
        expected_um: cureDepth_um,
        note: repeat ? "repeat" : null,
      }),
    ),
    columns: [
      { key: "spot", align: "left" },
      { key: "time_s", digits: 2 },
      { key: "exposure_mJcm2", digits: 2 },
      { key: "expected_um", name: "expected thickness", digits: 2 },
      { key: "note", align: "left" },
    ],
  });
}

function promiseText(plan: SpotPlan): string {
  if (plan.outcome === "impossible") return plan.reason;
  const [depthU, exposureU] = [plan.penetrationDepth.relativeU, plan.criticalExposure.relativeU].map((u) =>
    numberText(100 * u, 2),
  );
  const { value, low, high } = plan.bleachedShare;
  const gone = intervalText({ value: 100 * value, low: 100 * low, high: 100 * high });
  return `If the guess holds and the curve is straight, penetration depth comes out to ${depthU} % and critical exposure to ${exposureU} % (standard uncertainty, repeats counted). The longest spot uses up ${gone} % of the initiator at the window`;
}

/**
 * The seconds to set for every layer of a part, with the interval in which the right time lies.
 * @example
 * ```ts
 * import { calibrate, exposurePlanOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { exposureTable } from "resinwright/notebook";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * const plan = exposurePlanOf({ ...work, layers: 400, baseLayers: 4, baseFactor: 8, transitionLayers: 3, draws: 100 });
 * exposureTable("To set on the printer", plan).rows.map(([layers]) => layers); // → ["1 to 4", "5", "6", "7", "8 to 400"]
 * ```
 */
export function exposureTable(caption: string, { rows, totalTime_s }: ExposurePlanEstimate): TableContent {
  return tableOf({
    caption: `${caption}. Light on for ${numberText(totalTime_s / 60, 2)} min in all`,
    rows: rows.map(({ part, fromLayer, toLayer, time_s, exposure_mJcm2, cureDepth_um }) => ({
      layers: fromLayer === toLayer ? String(fromLayer) : `${fromLayer} to ${toLayer}`,
      part,
      set: settingText(time_s),
      right: intervalText(time_s),
      exposure_mJcm2,
      cureDepth_um,
    })),
    columns: [
      { key: "layers" },
      { key: "part" },
      { key: "set", unit: "s", align: "right" },
      { key: "right", name: "right time lies in", unit: "s", align: "right" },
      { key: "exposure_mJcm2", digits: 2 },
      { key: "cureDepth_um" },
    ],
  });
}

/**
 * What the normal layers get from the times that are set: overcure, bond, roofs and channels.
 * @example
 * ```ts
 * import { calibrate, exposurePlanOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { layerFactsTable } from "resinwright/notebook";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * const plan = exposurePlanOf({ ...work, layers: 400, baseLayers: 4, baseFactor: 8, transitionLayers: 3, draws: 100 });
 * layerFactsTable(plan).rows[0][0]; // → "cure depth over layer thickness"
 * ```
 */
export function layerFactsTable({
  cureDepthPerLayer,
  liquid_um,
  reach_um,
  bond,
  roof,
  channel,
}: ExposurePlanEstimate): TableContent {
  const um = (one: Interval) => `${intervalText(one)} µm`;
  const { low_um, high_um } = channel.foundToClog;
  const rows: [string, string, string][] = [
    [
      "cure depth over layer thickness",
      intervalText(cureDepthPerLayer),
      "counted from the window, where the liquid of the dead zone comes first",
    ],
    ["left liquid on the window", um(liquid_um), "steady dead zone: the part hangs above it"],
    [
      "reaches into the layer before",
      um(reach_um),
      "cure depth less the liquid and the layer itself; below 0 it falls short",
    ],
    [
      "conversion where a layer meets the one before",
      intervalText(bond.newSide.conversion),
      `has gelled in ${sharePercent(bond.gelsShare)} % of draws; page 04 follows it in time; the older side stands at ${intervalText(bond.oldSide.conversion)}`,
    ],
    [
      "cured into the void behind a roof",
      um(roof.printThrough_um),
      `${um(roof.drift_um)} of it from the layers after the first`,
    ],
    [
      "channel that light alone leaves open",
      `above ${um(channel.smallest_um)}`,
      `Gong and others (2015) found channels to clog below 3.5 to 5.5 optical depths: here ${um(low_um)} to ${um(high_um)}`,
    ],
  ];
  return tableOf({
    caption: "What a normal layer gets from the time that is set, with 95 % intervals",
    rows: rows.map(([what, value, meaning]) => ({ what, value, meaning })),
    columns: [
      { key: "what" },
      { key: "value", align: "right" },
      { key: "meaning", name: "what it means", align: "left" },
    ],
  });
}

/**
 * Conversion through the newest layers of a stack, from the face of the part on, and the conversion of the gel point where it is given.
 * @example
 * ```ts
 * import { calibrate, exposurePlanOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { stackFigure } from "resinwright/notebook";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * const plan = exposurePlanOf({ ...work, layers: 400, baseLayers: 4, baseFactor: 8, transitionLayers: 3, draws: 100 });
 * const gelConversion = work.shelf.constants.gelConversion.value;
 * stackFigure(plan, "Flow-cell resin", gelConversion).caption; // → "Conversion through the newest layers. Flow-cell resin."
 * ```
 */
export function stackFigure(
  { stack }: ExposurePlanEstimate,
  conditions: string,
  gelConversion?: number,
): FigureContent {
  const layers = [...new Set(stack.map(({ layer }) => layer))];
  return lineFigure({
    caption: "Conversion through the newest layers",
    conditions,
    x: { label: "distance from the face of the part", unit: "µm" },
    y: { label: "conversion", range: [0, 1] },
    bands: gelConversion === undefined ? [] : [{ label: "gelled", axis: "y", from: gelConversion }],
    series: layers.map((layer) => {
      const points = stack.filter((point) => point.layer === layer);
      return {
        name: layer === 1 ? "newest layer" : `${layer - 1} before it`,
        x: points.map(({ depth_um }) => depth_um),
        y: points.map(({ conversion }) => conversion),
      };
    }),
  });
}

/** What a decision on the exposure says: the plan with its part, the verdict on the time of a layer, what the curve rests on. */
export interface ExposureDecision {
  readonly plan: ExposurePlanEstimate;
  readonly irradiance_mWcm2: number;
  /** On the time of a layer, where the brief has a target for it. */
  readonly verdict: Pick<Verdict, "target" | "share"> | undefined;
  /** The series behind the working curve; undefined where it is a guess. */
  readonly series: CureDepthSeries | undefined;
}

/**
 * The exposure that is decided on, in sentences: what to set, what to do where that misses the brief's target, how high to draw
 * channels, and what it rests on.
 * @example
 * ```ts
 * import { calibrate, exposurePlanOf, verdictOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { exposureText } from "resinwright/notebook";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * const plan = exposurePlanOf({ ...work, layers: 400, baseLayers: 4, baseFactor: 8, transitionLayers: 3, draws: 100 });
 * const verdict = verdictOf({ ...work, property: "layerTime_s", target: { max: 2 }, draws: 100 });
 * exposureText({ plan, irradiance_mWcm2: 8, verdict, series: undefined }).includes("longer than the brief's 2 s"); // → true
 * ```
 */
export function exposureText({ plan, irradiance_mWcm2, verdict, series }: ExposureDecision): string {
  const { rows, channel } = plan;
  const normal = rows.at(-1)!.time_s;
  const base = rows[0]!.part === "base" ? ` and ${settingText(rows[0]!.time_s)} s for the base layers` : "";
  const { high_um } = channel.foundToClog;
  return [
    `Set ${settingText(normal)} s a layer (right time ${intervalText(normal)} s)${base}, at ${numberText(irradiance_mWcm2)} mW/cm²`,
    targetSentence(normal, verdict),
    `Light fills ${intervalText(channel.smallest_um)} µm behind a roof`,
    `Channels lower than 5.5 optical depths, here ${intervalText(high_um)} µm, may clog (Gong and others, RSC Adv. 5 (2015) 106621, another resin): draw them higher than ${numberText(high_um.high, 2)} µm, or print a row of heights first`,
    restsText(series),
  ].join(". ");
}

function targetSentence({ value }: Interval, verdict: ExposureDecision["verdict"]): string {
  if (verdict === undefined) return "The brief sets no target for the time of a layer";
  const { min = 0, max = Infinity } = verdict.target;
  const within = `the time of a layer is ${withinText(verdict.target, verdict.share)}`;
  if (value > max)
    return `That is longer than the brief's ${numberText(max)} s; ${within}: take more light or more initiator, or thinner layers, before printing`;
  if (value < min)
    return `That is shorter than the brief's ${numberText(min)} s; ${within}: take less light, or more absorber`;
  return `T${within.slice(1)}`;
}

function restsText(series: CureDepthSeries | undefined): string {
  if (series === undefined)
    return "It rests on a guess: measure the series above under this light before printing.";
  const spots = series.spots.filter(({ reading }) => reading !== "floated").length;
  return `It rests on ${spots} spots of ${series.id}.`;
}
