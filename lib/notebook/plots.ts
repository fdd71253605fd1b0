// The figures notebooks share: an assessment against its targets, where doubt sits, a fitted blend, the pull of a lift.

import { isDeepStrictEqual } from "node:util";
import type { Assessment } from "../assess/assess.js";
import type { Case } from "../assess/case.js";
import type { DeadZoneEstimate } from "../assess/oxygen.js";
import type { NeverCures, Property } from "../assess/property.js";
import { viscosityOf } from "../assess/viscosity.js";
import { blendRule, interactionFrom } from "../decide/calibrate.js";
import { evenSteps, type Curve } from "../decide/sweep.js";
import { stefanForce, suctionLimit } from "../models/separation.js";
import type { BlendReadings } from "../recipe/readings.js";
import type { FigureContent } from "./content.js";
import { numberText } from "./digits.js";
import { spanOf } from "./figure/axis.js";
import { intervalFigure, type IntervalRow } from "./figure/interval.js";
import { lineFigure, type LineFigure, type Series } from "./figure/line.js";
import { shareFigure } from "./figure/share.js";

/**
 * Every property with a target, as a multiple of the target's limit (the upper one where there are two); undefined where
 * there is nothing to draw, because no target is set or the resin never cures.
 * @example
 * ```ts
 * import { assess } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { targetFigure } from "resinwright/notebook";
 * const figure = targetFigure(assess(openBrief("data/briefs/flow-cell.json")))!;
 * figure.caption; // → "Each property against its target. Formulation flow-cell-a under the brief flow-cell."
 * figure.table.rows[2][4]; // → "at most 1"
 * ```
 */
export function targetFigure(assessment: Assessment): FigureContent | undefined {
  const rows = assessment.verdicts.flatMap(
    ({ property: name, title, target: { min, max } }): IntervalRow[] => {
      const property = assessment.properties[name];
      const limit = max ?? min;
      if (property.outcome === "never-cures" || limit === undefined || limit === 0) return [];
      const { value, low, high, level } = property;
      const target: IntervalRow["target"] = [
        min === undefined ? undefined : min / limit,
        max === undefined ? undefined : 1,
      ];
      return [{ label: title, value: value / limit, low: low / limit, high: high / limit, level, target }];
    },
  );
  if (rows.length === 0) return undefined;
  return intervalFigure({
    caption: "Each property against its target",
    conditions: `Formulation ${assessment.formulation} under the brief ${assessment.brief}`,
    axis: { label: "multiple of the target's limit" },
    rows,
  });
}

/**
 * The target that is hardest to call; viscosity where the brief sets no target.
 * @example
 * ```ts
 * import { assess } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { hardestToCall } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const brief = { ...work.brief, targets: { deadZone_um: { min: 5, max: 50 } } };
 * const property = hardestToCall(assess({ ...work, brief }));
 * property.title; // → "dead-zone thickness"
 * ```
 */
export function hardestToCall({ verdicts, properties }: Assessment): Property | NeverCures {
  const [hardest] = [...verdicts].sort((a, b) => Math.abs(a.share - 0.5) - Math.abs(b.share - 0.5));
  return properties[hardest?.property ?? "viscosity_mPas"];
}

/**
 * Which inputs carry the doubt in a property, the eight largest; undefined where there is no doubt to share out.
 * @example
 * ```ts
 * import { viscosityOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { doubtFigure } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const figure = doubtFigure(viscosityOf(work), "Flow-cell resin at 28 °C")!;
 * figure.caption; // → "What carries the doubt in the viscosity at print temperature. Flow-cell resin at 28 °C."
 * ```
 */
export function doubtFigure(property: Property | NeverCures, conditions: string): FigureContent | undefined {
  const rows = property.doubt.slice(0, 8);
  if (rows.length === 0) return undefined;
  return shareFigure({ caption: `What carries the doubt in the ${property.title}`, conditions, rows });
}

/**
 * Readings of two liquids' blends with the fitted mixing rule and the log-ideal one.
 * @example
 * ```ts
 * import { readShelf } from "resinwright/files";
 * import { blendFigure } from "resinwright/notebook";
 * const readings = readShelf(["data"]).readings.find(({ id }) => id === "udma-iboa-25C")!;
 * const figure = blendFigure(readings);
 * figure.table.columns[1].name; // → "mass fraction of UDMA"
 * figure.table.rows[0]; // → ["readings", 1, 9640]
 * ```
 */
export function blendFigure(readings: BlendReadings): FigureContent {
  const [first, second] = readings.pair;
  const { G } = interactionFrom(readings);
  const x = evenSteps({ from: 0, to: 1, count: 41 });
  const rule = (value: number) => x.map(blendRule(readings, value));
  return lineFigure({
    caption: `Blends of ${first} with ${second}: read and fitted`,
    conditions: `${numberText(readings.temperature_C)} °C, ${readings.source}`,
    x: { label: `mass fraction of ${first}` },
    y: { label: "viscosity", unit: "mPa s", logarithmic: true },
    series: [
      { name: "readings", x: readings.massFractions, y: readings.viscosities_mPas, style: "points" },
      { name: `Grunberg–Nissan, G = ${numberText(G.value, 3)}`, x, y: rule(G.value) },
      { name: "log-ideal, G = 0", x, y: rule(0) },
    ],
  });
}

/**
 * A property along a variable before and after readings, each with its interval; where the readings change nothing, or there are none,
 * one curve, and the caption says so.
 * @param figure - A line figure without its series; `before` and `after`, curves of one sweep; `level` of their intervals.
 * @throws InputError as {@link lineFigure}.
 * @example
 * ```ts
 * import { calibrate, sweep, viscosityOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { beforeAfterFigure } from "resinwright/notebook";
 * const opened = openBrief("data/briefs/flow-cell.json");
 * const along = (work: typeof opened) =>
 *   sweep({ over: [20, 30], at: (temperature_C) => ({ ...work, brief: { ...work.brief, temperature_C } }), of: viscosityOf });
 * const figure = beforeAfterFigure({
 *   caption: "Viscosity against temperature", conditions: opened.formulation.title,
 *   x: { label: "temperature", unit: "°C" }, y: { label: "viscosity", unit: "mPa s" },
 *   before: along(opened), after: along(calibrate(opened)), level: 0.95,
 * });
 * figure.table.columns.length; // → 7
 * ```
 */
export function beforeAfterFigure({
  before,
  after,
  level,
  ...figure
}: Omit<LineFigure, "series"> & {
  readonly before: Curve;
  readonly after: Curve;
  readonly level: number;
}): FigureContent {
  const series = (name: string, { x, y, low, high }: Curve): Series => ({ name, x, y, low, high, level });
  const measured = !isDeepStrictEqual(before, after);
  return lineFigure({
    ...figure,
    caption: `${figure.caption}, ${measured ? "before and after the readings" : "from the shelf: no reading changes it"}`,
    series: [series("from the shelf", before), ...(measured ? [series("with the readings", after)] : [])],
  });
}

/**
 * The pull of the brief's largest cross-section against the gap it is lifted from, and the most the window can hold.
 * @example
 * ```ts
 * import { deadZoneOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { liftFigure } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const figure = liftFigure(work, deadZoneOf(work));
 * figure.alternativeText.includes("more than one atmosphere holds (32.4 N)"); // → true
 * ```
 */
export function liftFigure(work: Case, zone: DeadZoneEstimate): FigureContent {
  const { crossSection_mm2, liftSpeed_mms, temperature_C } = work.brief;
  const { value, low, high, level } = viscosityOf(work);
  const zone_um = zone.outcome === "value" && zone.value > 0 ? zone.value : undefined;
  const x = evenSteps({ from: Math.min(5, (zone_um ?? 5) / 2), to: 1000, count: 30, logarithmic: true });
  const pullFrom = (gap_um: number, viscosity_mPas: number) =>
    stefanForce({ viscosity_mPas, crossSection_mm2, gap_um, liftSpeed_mms });
  const pull = (viscosity_mPas: number) => x.map((gap_um) => pullFrom(gap_um, viscosity_mPas));
  const limit_N = suctionLimit({ crossSection_mm2, pressure_Pa: 101325 });
  // The curve must be seen where it is read: at the dead zone.
  const atZone = zone_um === undefined ? [] : [pullFrom(zone_um, low) / 3, 3 * pullFrom(zone_um, high)];
  return lineFigure({
    caption: "Pull on the largest cross-section against the gap it starts from",
    conditions: `Rigid disc of ${numberText(crossSection_mm2)} mm² lifted at ${numberText(liftSpeed_mms)} mm/s, ${work.formulation.title} at ${numberText(temperature_C)} °C`,
    x: { label: "gap", unit: "µm", logarithmic: true },
    y: {
      label: "pull",
      unit: "N",
      logarithmic: true,
      range: spanOf([limit_N / 1000, 30 * limit_N, ...atZone]),
    },
    bands: [
      { label: `more than one atmosphere holds (${numberText(limit_N, 3)} N)`, axis: "y", from: limit_N },
    ],
    series: [{ name: "rigid disc", x, y: pull(value), low: pull(low), high: pull(high), level }],
    marks: zone_um === undefined ? [] : [{ label: "dead zone", x: zone_um }],
  });
}
