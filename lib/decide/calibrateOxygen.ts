// What was read on the window corrects what is said of oxygen: which readings fit a case, and what they change.

import { intervalOf, propagate, startDraws, type DrawOptions } from "../assess/doubt.js";
import type { Case } from "../assess/case.js";
import { asMeasured, sameIngredients } from "../assess/measuredParts.js";
import { questionOf, type OxygenCorrection } from "../assess/windowCorrection.js";
import { correctByReadings, figureNames, type PerWindowFigure } from "../models/oxygen.js";
import type { WindowReadings } from "../recipe/windowReadings.js";
import type { Interval, Warning } from "../result.js";

/** One figure behind the dead zone, as a multiple of what the shelf states: before the readings and after them. */
export interface LearntFigure {
  readonly figure: string;
  readonly before: Interval;
  readonly after: Interval;
}

/** One reading against what had been expected of it. */
export interface LearntReading {
  readonly reading: string;
  readonly value: number;
  readonly u: number;
  readonly unit: string;
  /** How far it lies from what was expected, in standard deviations of reading and expectation together. */
  readonly surprise: number;
}

/** What the readings of a calibrated case say. */
export interface LearntOxygen {
  readonly id: string;
  readonly source: string;
  readonly figures: readonly LearntFigure[];
  readonly readings: readonly LearntReading[];
}

/**
 * The case with its window readings carried into everything said of oxygen; the case itself where the shelf has none for it.
 *
 * Readings count for the ingredients they were taken on, in the light they name; of several, those of the last shelf folder. They
 * are held against the amounts that were on the window; the factors found go with every change of amounts, light, gas and
 * temperature, that of the film only with the film that was read on.
 * @source Model: `correctByReadings`.
 * @example
 * ```ts
 * import { correctOxygen, inductionTimeOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const width = ({ low, high }: { low: number; high: number }) => high / low;
 * width(inductionTimeOf(correctOxygen(work))) < width(inductionTimeOf(work)); // → true
 * ```
 */
export function correctOxygen<C extends Case>(work: C): C {
  const readings = work.shelf.windowReadings.findLast((one) => holdFor(one, work));
  if (readings === undefined) return work;
  const { brief, formulation, shelf } = work;
  const { film, filmThickness_um, temperature_C, source, status } = readings;
  const takenOn = {
    formulation: asMeasured(readings.parts, formulation),
    shelf,
    brief: {
      ...brief,
      temperature_C,
      window: { ...brief.window, film, filmThickness_um: { ...filmThickness_um, source, status } },
    },
  };
  const ask = questionOf({ takenOn, readings });
  const { stated, outcomes } = propagate(ask, startDraws({ draws: 1000 }));
  const relativeU = perFigure((name) =>
    relativeSpread(outcomes.map(({ figures }) => figures[fieldOf[name]])),
  );
  const { surprises } = correctByReadings({ ...stated, relativeU });
  const oxygenCorrection: OxygenCorrection = {
    readings,
    takenOn,
    relativeU,
    warnings: surprises.flatMap((surprise, i) =>
      contradiction(readings.id, describe(readings)[i]!, surprise),
    ),
  };
  return { ...work, oxygenCorrection };
}

/**
 * What the readings of a calibrated case changed, figure by figure, and how they lay against what was expected; undefined where
 * no readings were there for it.
 * @throws InputError as {@link correctOxygen}.
 * @example
 * ```ts
 * import { correctOxygen, learntFromWindow } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const learnt = learntFromWindow(correctOxygen(openBrief("data/briefs/flow-cell.json")));
 * learnt?.figures.map(({ figure }) => figure)[3]; // → "oxygen diffusivity"
 * ```
 */
export function learntFromWindow({
  oxygenCorrection,
  ...options
}: Case & DrawOptions): LearntOxygen | undefined {
  if (oxygenCorrection === undefined) return undefined;
  const { readings, relativeU } = oxygenCorrection;
  const ask = questionOf(oxygenCorrection);
  const draws = startDraws(options);
  const { stated, outcomes } = propagate((read) => {
    const question = ask(read);
    return { ...question, ...correctByReadings({ ...question, relativeU }) };
  }, draws);
  const interval = (of: (one: typeof stated) => number): Interval =>
    intervalOf({ stated: of(stated), values: outcomes.map(of), level: draws.level });
  const titles = describe(readings);
  return {
    id: readings.id,
    source: readings.source,
    figures: figureNames.map((name) => {
      const relative = (one: typeof stated) => one.figures[fieldOf[name]] / stated.figures[fieldOf[name]];
      return {
        figure: figureTitles[name],
        before: interval(relative),
        after: interval((one) => one.factors[name] * relative(one)),
      };
    }),
    readings: titles.map((title, i) => ({ ...title, surprise: stated.surprises[i]! })),
  };
}

const fieldOf = {
  radicalGeneration: "radicalGeneration_molm3s",
  oxygenPerRadical: "oxygenPerRadical",
  solubility: "solubility_molm3Pa",
  diffusivity: "diffusivity_m2s",
  permeance: "permeance_molm2sPa",
  propagation: "propagation_m3mols",
} as const;

const figureTitles: Readonly<Record<keyof PerWindowFigure, string>> = {
  radicalGeneration: "radicals started by the light",
  oxygenPerRadical: "oxygen used per radical",
  solubility: "oxygen solubility in the resin",
  diffusivity: "oxygen diffusivity",
  permeance: "oxygen through the film",
  propagation: "propagation rate constant",
};

function holdFor({ parts, spectrum, wavelength_nm }: WindowReadings, work: Case): boolean {
  const { light } = work.brief;
  const sameLight =
    spectrum === undefined ? wavelength_nm === light.wavelength_nm?.value : spectrum === light.spectrum;
  return sameIngredients(parts, work.formulation) && sameLight;
}

/** The readings in the order in which the model counts them. */
function describe({ inductionTimes, uncuredLayers }: WindowReadings): Omit<LearntReading, "surprise">[] {
  return [
    ...inductionTimes.map(({ until, irradiance_mWcm2, time_s }) => ({
      reading: `light until ${until === "first gel" ? "the first gel" : "oxygen is used up"} at ${irradiance_mWcm2} mW/cm²`,
      ...time_s,
      unit: "s",
    })),
    ...uncuredLayers.map(({ irradiance_mWcm2, gasOxygenFraction, thickness_um }) => ({
      reading: `uncured layer at ${irradiance_mWcm2} mW/cm² over ${Number((100 * gasOxygenFraction).toPrecision(4))} % oxygen`,
      ...thickness_um,
      unit: "µm",
    })),
  ];
}

/** One reading in 370 lies beyond three standard deviations by chance. */
function contradiction(
  id: string,
  { reading, value, unit }: Omit<LearntReading, "surprise">,
  surprise: number,
): Warning[] {
  if (Math.abs(surprise) <= 3) return [];
  const side = surprise > 0 ? "more" : "less";
  return [
    {
      code: "reading-contradicts",
      message: `${value} ${unit} of ${reading} (${id}) is ${side} than the figures allow, by ${Math.abs(surprise).toPrecision(2)} standard deviations. Check its unit, its u and the light before you trust what follows from it.`,
    },
  ];
}

/** The relative standard uncertainty of a log-normal quantity from its draws. */
function relativeSpread(values: readonly number[]): number {
  const logs = values.map(Math.log);
  const mean = logs.reduce((sum, one) => sum + one, 0) / logs.length;
  const variance = logs.reduce((sum, one) => sum + (one - mean) ** 2, 0) / (logs.length - 1);
  return Math.sqrt(Math.expm1(variance));
}

const perFigure = (of: (name: keyof PerWindowFigure) => number): PerWindowFigure =>
  Object.fromEntries(figureNames.map((name) => [name, of(name)])) as unknown as PerWindowFigure;
