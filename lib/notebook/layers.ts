// How a series of layers is shown: one row a layer, and profiles from the window up.

import type { LayerEstimate, LayerSeries } from "../assess/layers.js";
import type { FigureContent, TableContent } from "./content.js";
import { numberText } from "./digits.js";
import { lineFigure } from "./figure/line.js";
import { momentsFigure } from "./figure/moments.js";
import { sharePercent } from "./phrases.js";
import { tableOf } from "./table.js";

/**
 * A series as a table: whether each layer gels, when, what stays liquid, how far it is cured where it meets the one before.
 * @example
 * ```ts
 * import { layersOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { layerTable } from "resinwright/notebook";
 * const table = layerTable(layersOf({ ...openBrief("data/briefs/flow-cell.json"), layers: 2, exposure_s: 8 }));
 * table.rows.map(([layer]) => layer); // → [1, 2]
 * ```
 */
export function layerTable({ exposure_s, layers }: LayerSeries): TableContent {
  return tableOf({
    caption: `Layers one after the other, ${numberText(exposure_s, 3)} s of light each, with 95 % intervals`,
    rows: layers.map((one) => ({
      layer: one.layer,
      gels: `${sharePercent(one.gelsShare)} % of draws`,
      gelTime_s: one.gelTime_s,
      deadZone_um: one.deadZone_um,
      meeting: one.interfaceConversion,
      mean: one.meanConversion,
    })),
    columns: [
      { key: "layer", align: "left" },
      { key: "gels" },
      { key: "gelTime_s", name: "gels after" },
      { key: "deadZone_um", name: "left liquid" },
      { key: "meeting", name: "conversion at the layer before" },
      { key: "mean", name: "mean conversion" },
    ],
  });
}

/**
 * Oxygen and conversion of one layer from the window up, moment by moment in the light, at the stated figures: oxygen over its
 * highest at any of the moments, so that both run from 0 to 1.
 * @param layer - One layer of a series run with `times_s`, 1 to 39 of them.
 * @param conditions - What stands under the figure.
 * @param dark_s - Dark time before the light, taken off the times so that they count light.
 * @example
 * ```ts
 * import { layersOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { layerMoments } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const { dark_s } = work.brief.betweenLayers;
 * const { layers } = layersOf({ ...work, layers: 1, exposure_s: 6, times_s: [dark_s + 2, dark_s + 4] });
 * const figure = layerMoments({ layer: layers[0]!, conditions: "Flow-cell resin", dark_s });
 * figure.moments?.steps.map(({ name }) => name); // → ["light 2 s", "light 4 s", "light 6 s"]
 * ```
 */
export function layerMoments({
  layer,
  conditions,
  dark_s,
}: {
  layer: LayerEstimate;
  conditions: string;
  dark_s: number;
}): FigureContent {
  const { readings, end, startOxygen_molm3 } = layer.stated;
  const all = readings.at(-1)?.time_s === end.time_s ? readings : [...readings, end];
  const most = Math.max(startOxygen_molm3, ...all.flatMap(({ oxygen_molm3 }) => oxygen_molm3));
  const moments = all.map((reading) => {
    const kept = placesOf(reading.depths_um);
    const curve = (name: string, values: readonly number[], scale: number) => ({
      name,
      x: kept.map((i) => digits(reading.depths_um[i]!)),
      y: kept.map((i) => digits(values[i]! / scale)),
    });
    return {
      at: reading.time_s - dark_s,
      series: [
        curve("oxygen over its highest", reading.oxygen_molm3, most),
        curve("conversion", reading.conversion, 1),
      ],
    };
  });
  return momentsFigure({
    caption: `Oxygen and conversion in layer ${layer.layer} from the window up`,
    conditions: `${conditions}; oxygen over ${numberText(most, 2)} mol/m³`,
    x: { label: "distance from the window", unit: "µm" },
    y: { label: "share", range: [0, 1] },
    by: { label: "light", unit: "s" },
    moments,
  });
}

/**
 * How layers settle: what stays liquid and when each gels, layer by layer.
 * @example
 * ```ts
 * import { layersOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { settlingFigure } from "resinwright/notebook";
 * const series = layersOf({ ...openBrief("data/briefs/flow-cell.json"), layers: 3, exposure_s: 8 });
 * settlingFigure(series, "Flow-cell resin")?.table.rows.length; // → 3
 * ```
 */
export function settlingFigure({ layers }: LayerSeries, conditions: string): FigureContent | undefined {
  const known = layers.flatMap(({ layer, deadZone_um }) =>
    deadZone_um === undefined ? [] : [{ layer, ...deadZone_um }],
  );
  const [first] = known;
  if (first === undefined) return undefined;
  return lineFigure({
    caption: "Resin left liquid on the window, layer by layer",
    conditions,
    x: { label: "layer", range: [0.5, layers.length + 0.5] },
    y: { label: "left liquid", unit: "µm" },
    series: [
      {
        name: "left liquid when the light goes off",
        x: known.map(({ layer }) => layer),
        y: known.map(({ value }) => value),
        low: known.map(({ low }) => low),
        high: known.map(({ high }) => high),
        level: first.level,
        style: "points",
      },
    ],
  });
}

/** Places enough to draw a profile by: every third cell, and both ends. */
function placesOf(depths_um: readonly number[]): number[] {
  const last = depths_um.length - 1;
  return depths_um.flatMap((_, i) => (i % 3 === 0 || i === last ? [i] : []));
}

const digits = (value: number): number => Number(value.toPrecision(4));
