// How cure depths and an exposure plan are shown: spots against their line, the seconds to set, what a layer gets from them.

import type { ExposurePlanEstimate } from "../decide/exposurePlanOf.js";
import { fitCureDepths } from "../decide/workingCurveFrom.js";
import { cureDepth, type CureDepthPlan } from "../models/cure.js";
import type { CureDepthSeries } from "../recipe/cureDepths.js";
import type { Interval } from "../result.js";
import type { FigureContent, TableContent } from "./content.js";
import { intervalText, numberText } from "./digits.js";
import { lineFigure, type Series } from "./figure/line.js";
import { sharePercent } from "./phrases.js";
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
 * Which spots to expose before a working curve is known, and how thick they are expected to be.
 * @param input - The plan; the irradiance that its times are for.
 * @example
 * ```ts
 * import { planCureDepths } from "resinwright";
 * import { spotTable } from "resinwright/notebook";
 * const guess = { penetrationDepth_um: 100, criticalExposure_mJcm2: 5 };
 * const plan = planCureDepths({ ...guess, thinnestFilm_um: 40, thickestFilm_um: 300, scatter_um: 8, relativeU: 0.1 });
 * spotTable({ plan, irradiance_mWcm2: 8 }).rows.length >= 5; // → true
 * ```
 */
export function spotTable({
  plan,
  irradiance_mWcm2,
}: {
  readonly plan: CureDepthPlan;
  readonly irradiance_mWcm2: number;
}): TableContent {
  const [depthU, exposureU] = [plan.penetrationDepth.relativeU, plan.criticalExposure.relativeU];
  return tableOf({
    caption: `Spots to expose on a glass slide: if the guess holds, penetration depth comes out to ${numberText(100 * depthU, 2)} % and critical exposure to ${numberText(100 * exposureU, 2)} % (standard uncertainty)`,
    rows: plan.exposures_mJcm2.map((exposure_mJcm2, i) => ({
      spot: i + 1,
      time_s: exposure_mJcm2 / irradiance_mWcm2,
      exposure_mJcm2,
      expected_um: plan.cureDepths_um[i],
    })),
    columns: [
      { key: "spot", align: "left" },
      { key: "time_s", digits: 3 },
      { key: "exposure_mJcm2", digits: 3 },
      { key: "expected_um", name: "expected thickness", digits: 3 },
    ],
  });
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
    caption: `${caption}. Light on for ${numberText(totalTime_s / 60, 3)} min in all`,
    rows: rows.map(({ part, fromLayer, toLayer, time_s, exposure_mJcm2, cureDepth_um }) => ({
      layers: fromLayer === toLayer ? String(fromLayer) : `${fromLayer} to ${toLayer}`,
      part,
      time_s: Number(time_s.value.toPrecision(3)),
      right: intervalText(time_s),
      exposure_mJcm2,
      cureDepth_um,
    })),
    columns: [
      { key: "layers" },
      { key: "part" },
      { key: "time_s", name: "set", unit: "s", digits: 3 },
      { key: "right", name: "right time lies in", unit: "s", align: "right" },
      { key: "exposure_mJcm2", digits: 3 },
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
      "above 1 a layer reaches into the one before",
    ],
    [
      "conversion where a layer meets the one before",
      intervalText(bond.newSide.conversion),
      `has gelled in ${sharePercent(bond.gelsShare)} % of draws; the older side stands at ${intervalText(bond.oldSide.conversion)}`,
    ],
    [
      "cured into the void behind a roof",
      um(roof.printThrough_um),
      `${um(roof.drift_um)} of it from the layers after the first`,
    ],
    [
      "channel that light alone leaves open",
      `above ${um(channel.smallest_um)}`,
      `in practice channels below ${numberText(low_um, 2)} to ${numberText(high_um, 2)} µm were found to clog at this optical depth`,
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
 * Conversion through the newest layers of a stack, from the window on, and the conversion of the gel point where it is given.
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
    x: { label: "distance from the window", unit: "µm" },
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
