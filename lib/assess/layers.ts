// Layers printed one after the other, followed in time: what the steady dead zone cannot say. Whether each layer gels, when,
// what stays liquid at the window, how far it is cured where it meets the layer before, and what the next one starts from.

import { checkNumber, InputError } from "../door.js";
import { exposeLayers, type LayerExposure, type OxygenWindow } from "../models/oxygen.js";
import { m_per_um } from "../models/scales.js";
import { drawsNeeded } from "../numerics/summary.js";
import { filmOn } from "../recipe/shelf.js";
import type { Interval, UsedSource, Warning } from "../result.js";
import { fadingModel } from "./bleaching.js";
import { constantOf, uncertain, type Case } from "./case.js";
import { cureModel } from "./cure.js";
import {
  intervalAmong,
  propagate,
  sourcesOf,
  startDraws,
  type DrawOptions,
  type Draws,
  type Read,
} from "./doubt.js";
import { oxygenModel, radicalWarnings } from "./oxygen.js";

/**
 * One layer of a series: shares and intervals over the draws, and the run at the stated figures. An interval is that of the draws that
 * have the quantity, where at least half of them do.
 */
export interface LayerEstimate {
  /** 1 for the first. */
  readonly layer: number;
  /** Share of the draws in which it gels. */
  readonly gelsShare: number;
  /** Light until conversion begins; undefined where it does not at the stated figures. */
  readonly inductionTime_s?: Interval;
  /** Light until the first resin has gelled. */
  readonly gelTime_s?: Interval;
  /** Thickness at the window that has not gelled when the light goes off. */
  readonly deadZone_um?: Interval;
  /** Conversion where the layer meets the one before: its green strength. */
  readonly interfaceConversion: Interval;
  readonly meanConversion: Interval;
  /** Profiles and times at the stated figures. */
  readonly stated: LayerExposure;
}

/** A series of layers under a brief. */
export interface LayerSeries {
  readonly exposure_s: number;
  readonly layers: readonly LayerEstimate[];
  readonly warnings: readonly Warning[];
  readonly sources: readonly UsedSource[];
}

/** What may be set for a series beside the brief. */
export interface SeriesOptions extends DrawOptions {
  /** How many layers, 1 to 50; 3 unless given. */
  readonly layers?: number;
  /** Light on each layer; the estimated time of the working curve unless given. */
  readonly exposure_s?: number;
  /** When to read profiles, counted from the start of the dark time before the light. */
  readonly times_s?: readonly number[];
  /** True to follow the oxygen that the film itself holds, where its data say how much; a film that only resists unless given. */
  readonly filmStores?: boolean;
}

/**
 * Prints layers in the model: dark, light, lift, each layer with what the one before has left in the gap.
 *
 * Oxygen diffuses in and is burnt by radicals that adjust at once, and the initiator bleaches ({@link exposeLayers}); before each
 * light the brief's dark time passes, and its fresh share of the gap is new resin. The first gap is one layer thickness. 60 draws unless more are
 * asked for: each is a whole transient run.
 * @throws InputError as {@link deadZoneOf}; when layers, exposure or times are out of range.
 * @source Models: {@link exposeLayers}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { layersOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const series = layersOf({ ...openBrief("data/briefs/flow-cell.json"), layers: 2, exposure_s: 8 });
 * series.layers.map(({ stated }) => stated.outcome).join(" "); // → "gels gels"
 * ```
 */
export function layersOf(input: Case & SeriesOptions): LayerSeries {
  const { draws = 60, layers = 3 } = input;
  checkNumber(layers, { where: "layersOf", field: "layers", min: 1, max: 50 });
  const started = startDraws({ ...input, draws });
  const least = drawsNeeded(started.level);
  if (draws < least) {
    throw new InputError(
      `layersOf: draws is ${draws}; an interval that holds ${100 * started.level} % needs at least ${least}`,
    );
  }
  const { outcomes, inputs } = propagate(seriesModel(input, coarse), started);
  const stated = seriesModel(input)(({ value }) => value);
  const estimates = stated.series.map((run, k): LayerEstimate => {
    const runs = outcomes.map(({ series }) => series[k]!);
    const interval = (of: (run: LayerExposure) => number | undefined) => {
      const [value, values] = [of(run), runs.map(of).filter((one) => one !== undefined)];
      return value === undefined || values.length < runs.length / 2
        ? undefined
        : intervalAmong({ stated: value, values, level: started.level });
    };
    return {
      layer: k + 1,
      gelsShare: runs.filter(({ outcome }) => outcome === "gels").length / runs.length,
      inductionTime_s: interval(({ inductionTime_s }) => lightTime(inductionTime_s, input)),
      gelTime_s: interval(({ gelTime_s }) => lightTime(gelTime_s, input)),
      deadZone_um: interval(({ end }) => end.deadZone.byGel_um),
      interfaceConversion: interval(({ end }) => end.interfaceConversion)!,
      meanConversion: interval(({ end }) => end.meanConversion)!,
      stated: run,
    };
  });
  return {
    exposure_s: stated.exposure_s,
    layers: estimates,
    warnings: [...seriesWarnings(estimates), ...windowWarnings(input)],
    sources: sourcesOf(inputs),
  };
}

/** For draws, which differ by far more than this leaves out; figures at the far end of their doubt may need many steps. */
const coarse = { cells: 80, tolerance: 1e-3, stepLimit: 1_000_000 };

function seriesModel(input: Case & SeriesOptions, fineness: Partial<typeof coarse> = {}) {
  const { brief, shelf, layers = 3, times_s } = input;
  const oxygen = oxygenModel(input);
  const cure = cureModel(input);
  const fading = fadingModel(input);
  const window = windowModel(input);
  const constant = (name: "termination_m3mols" | "oxygenCapture_m3mols" | "gelConversion") =>
    constantOf(shelf.constants, name);
  // The plan is one plan: every draw gets the exposure that the stated figures ask for.
  const exposure_s = input.exposure_s ?? cure(({ value }) => value).layerTime_s;
  const { dark_s, freshFraction } = brief.betweenLayers;
  const schedule = [
    ...(dark_s > 0 ? [{ duration_s: dark_s, relativeIrradiance: 0 }] : []),
    { duration_s: exposure_s, relativeIrradiance: 1 },
  ];
  return (read: Read) => {
    const drawn = oxygen(read);
    const series = exposeLayers({
      ...drawn,
      ...fineness,
      oxygen_molm3: drawn.freshOxygen_molm3,
      window: window(read, drawn),
      bleaching: fading(read),
      termination_m3mols: read(constant("termination_m3mols")),
      oxygenCapture_m3mols: read(constant("oxygenCapture_m3mols")),
      gelConversion: read(constant("gelConversion")),
      gapThickness_um: brief.layerThickness_um,
      layerThickness_um: brief.layerThickness_um,
      schedule,
      layers,
      freshFraction,
      ...(times_s === undefined ? {} : { times_s }),
    });
    return { exposure_s, series };
  };
}

/** The film as it resists, or as it also holds oxygen: S of the film is its permeability over its diffusivity. */
function windowModel({ brief, shelf, filmStores = false }: Case & SeriesOptions) {
  const film = filmOn(shelf, `brief "${brief.id}"`, brief.window.film);
  const { oxygenDiffusivity_m2s } = film;
  if (!filmStores || oxygenDiffusivity_m2s === undefined) {
    return (
      _: Read,
      { filmEquivalentThickness_um }: { filmEquivalentThickness_um: number },
    ): OxygenWindow => ({
      film: "resists",
      filmEquivalentThickness_um,
    });
  }
  const diffusivity = uncertain(`oxygen diffusivity in ${film.id}`, oxygenDiffusivity_m2s);
  const thickness = uncertain("film thickness", brief.window.filmThickness_um);
  return (
    read: Read,
    { permeance_molm2sPa, solubility_molm3Pa }: { permeance_molm2sPa: number; solubility_molm3Pa: number },
  ): OxygenWindow => {
    const filmThickness_um = read(thickness);
    const filmDiffusivity_m2s = read(diffusivity);
    const filmSolubility_molm3Pa = (permeance_molm2sPa * m_per_um * filmThickness_um) / filmDiffusivity_m2s;
    return {
      film: "stores",
      filmThickness_um,
      filmDiffusivity_m2s,
      filmPartition: filmSolubility_molm3Pa / solubility_molm3Pa,
      sealed: false,
    };
  };
}

function windowWarnings(input: Case & SeriesOptions): Warning[] {
  const { brief, shelf, filmStores = false } = input;
  const warnings = radicalWarnings(input);
  const film = filmOn(shelf, `brief "${brief.id}"`, brief.window.film);
  if (filmStores && film.oxygenDiffusivity_m2s === undefined) {
    warnings.push({
      code: "film-store-unknown",
      message: `Nothing on the shelf says how much oxygen ${film.id} holds, so it only resists here. Add oxygenDiffusivity_m2s to the film to follow its store.`,
    });
  }
  if (brief.window.gasOxygenFraction === 0) {
    warnings.push({
      code: "gas-starves",
      message:
        "The gas under the film takes oxygen out of the resin: the first layer has its own, later ones less and less, and parts stick to the window.",
    });
  }
  return warnings;
}

/** Light until the first resin of a first layer has gelled, one a draw, in seconds; NaN where none has within the light. @internal */
export function drawGelTime(
  input: Case & SeriesOptions,
  draws: Draws,
): { stated: number; values: readonly number[] } {
  const model = seriesModel({ ...input, layers: 1 }, coarse);
  const gelTime = (read: Read) => lightTime(model(read).series[0]!.gelTime_s, input) ?? NaN;
  const { stated, outcomes } = propagate(gelTime, draws);
  return { stated, values: outcomes };
}

/** Times are counted from the start of the dark; a chemist counts light. */
function lightTime(time_s: number | undefined, { brief }: Case): number | undefined {
  return time_s === undefined ? undefined : time_s - brief.betweenLayers.dark_s;
}

function seriesWarnings(layers: readonly LayerEstimate[]): Warning[] {
  const warnings: Warning[] = [];
  const liquid = layers.filter(({ gelsShare }) => gelsShare < 0.95);
  if (liquid.length > 0) {
    const named = liquid
      .map(({ layer, gelsShare }) => `layer ${layer} in ${Math.floor(100 * gelsShare)} %`)
      .join(", ");
    warnings.push({
      code: "may-stay-liquid",
      message: `Not every draw gels: ${named}. Expose longer, or measure a cure-depth series first.`,
    });
  }
  warnings.push({
    code: "series-estimated",
    message:
      "Rate constants are those of the shelf, mostly of the class and from memory: see the sources. The lift is taken to mix the gap at once; what the initiator becomes, not to absorb; no heat, no flow while the light is on.",
  });
  return warnings;
}
