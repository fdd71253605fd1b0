// A layer of resin between window and part, exposed: whether it cures, when, how deep, and how much stays liquid at the window.
// One layer, or many in a row with what each leaves for the next. Radicals are taken to adjust at once.
import { checkNumbers, fraction, InputError, positive, show } from "../../door.js";
import { checkRates, type CureRates } from "./balance.js";
import { checkBleaching, type Bleaching } from "./bleaching.js";
import { columnOf } from "./column.js";
import { checkLayer, edgesOf, layerDefaults, type LayerConditions } from "./layerInput.js";
import { exposureOf, type LayerExposure } from "./layerExposure.js";
import { freshStart, runInput, runLayer, type LayerRun, type Leftover, type StartState } from "./layerRun.js";
import { quasiSteadyBalance } from "./quasiSteady.js";

/** A layer to be exposed. */
export interface LayerInput extends CureRates, LayerConditions {
  /** Oxygen molecules used up per radical, s, above 0; 1 unless measured. */
  readonly oxygenPerRadical: number;
  /** Follow an initiator that loses its colour; it keeps it unless given. */
  readonly bleaching?: Bleaching | undefined;
}

/** Layers to be exposed one after the other. */
export interface LayersInput extends LayerInput {
  /** Number of layers, a whole number of at least 1. */
  readonly layers: number;
  /** How far the part rises between layers, above 0, um. */
  readonly layerThickness_um: number;
  /** Share of the liquid left at the window that the lift exchanges for fresh resin, 0 to 1. */
  readonly freshFraction: number;
}

/**
 * Exposes one layer of resin between a window and the part above it.
 *
 * - `CureRates`: Ri, alpha, D, kO, kp, kt, and how D falls with conversion; `oxygenPerRadical` s.
 * - `gapThickness_um` L from window to part; `oxygen_molm3` of the fresh resin; `saturation_molm3` C* of the gas below.
 * - `window`: a film that resists, a tight plate, or a film that stores oxygen.
 * - `schedule`: steps of light, dark and gas; `times_s`: when to read the column besides the end.
 * - `gelConversion`, `oxygenLevel`, `conversionLevel`: what counts as cured, and as out of the dead zone.
 * - `bleaching`: the initiator's part of the absorption and how fast it fades; it does not fade unless given.
 * - `cells`, `grid`, `tolerance`, `stepLimit`: how finely it is computed; the defaults hold 1e-3 in mean conversion.
 *
 * dC/dt = d/dz(D dC/dz) - s kO C R, R = 2 Ri / (kO C + sqrt((kO C)^2 + 8 kt Ri)), Ri falling as exp(-alpha z),
 * X = 1 - exp(-kp int R dt), D = D_liquid share^X; flux at the window (C* - C) / (l/D), none at the part.
 * Finite volumes; linearly implicit Euler, extrapolated, with controlled steps.
 *
 * With `bleaching` the initiator c fades, dc/dt = -b m c I / I0 with its rate b, and the light with it: dI/dz = -(alpha - alpha_PI
 * (1 - c)) I, Ri falling as c I; products do not absorb, and initiator does not diffuse.
 *
 * Assumes no flow during the schedule, no heat, and radicals that adjust at once: with the usual rate constants
 * that is good to 0.1 % in the edge of the dead zone and 1 % in conversion, not for pulses under 0.1 s or cure in the dark.
 * @throws InputError when a field is out of range, or the steps allowed do not reach the end.
 * @source Rate law: C. Decker, A. D. Jenkins, Macromolecules 18 (1985) 1241-1244, doi 10.1021/ma00148a034 (from memory).
 * Equations as in D. Dendukuri et al., Macromolecules 41 (2008) 8547-8556, doi 10.1021/ma801219w (from memory).
 * @example
 * ```ts
 * import { exposeLayer } from "resinwright";
 * const layer = exposeLayer({
 *   radicalGeneration_molm3s: 0.5,
 *   napierianAbsorption_percm: 100,
 *   diffusivity_m2s: 1e-10,
 *   oxygenPerRadical: 1,
 *   oxygenCapture_m3mols: 5e5,
 *   propagation_m3mols: 25,
 *   termination_m3mols: 2500,
 *   gapThickness_um: 100,
 *   oxygen_molm3: 1,
 *   saturation_molm3: 1,
 *   window: { film: "resists", filmEquivalentThickness_um: 10 },
 *   schedule: [{ duration_s: 5, relativeIrradiance: 1 }],
 *   gelConversion: 0.2,
 * });
 * layer.end.meanConversion; // → 0.20
 * layer.end.deadZone.byGel_um ?? NaN; // → 13.2
 * ```
 */
export function exposeLayer(input: LayerInput): LayerExposure {
  return exposeSeries("exposeLayer", {
    ...input,
    layers: 1,
    layerThickness_um: input.gapThickness_um,
    freshFraction: 1,
  })[0]!;
}

/**
 * Exposes layers one after the other, each with the same schedule, and follows what changes from the first to the steady ones.
 *
 * - all fields of `exposeLayer`, with `gapThickness_um` the gap of the first layer;
 * - `layers`, `layerThickness_um`, `freshFraction`.
 *
 * After each layer the part rises by the layer thickness and the gelled resin with it. The new gap is the liquid left at the
 * window plus the layer thickness. What flows in is fresh, and so is the share `freshFraction` of the liquid that was left; the rest
 * of that liquid is mixed into the gap with what it has of oxygen, conversion and initiator. A film that stores oxygen keeps its profile. Time for diffusion between layers is a dark step of the schedule.
 *
 * Assumes that the lift mixes the resin at once and that the window stays flat.
 * @throws InputError as `exposeLayer`.
 * @source As `exposeLayer`; the hand-over from layer to layer is derived for this library.
 * @example
 * ```ts
 * import { exposeLayers } from "resinwright";
 * const layers = exposeLayers({
 *   radicalGeneration_molm3s: 0.5,
 *   napierianAbsorption_percm: 100,
 *   diffusivity_m2s: 1e-10,
 *   oxygenPerRadical: 1,
 *   oxygenCapture_m3mols: 5e5,
 *   propagation_m3mols: 25,
 *   termination_m3mols: 2500,
 *   gapThickness_um: 50,
 *   oxygen_molm3: 1,
 *   saturation_molm3: 1,
 *   window: { film: "resists", filmEquivalentThickness_um: 10 },
 *   schedule: [
 *     { duration_s: 4, relativeIrradiance: 0 },
 *     { duration_s: 5, relativeIrradiance: 1 },
 *   ],
 *   gelConversion: 0.2,
 *   layers: 3,
 *   layerThickness_um: 50,
 *   freshFraction: 0.8,
 * });
 * layers.map((layer) => Math.round(layer.gapThickness_um)).join(" "); // → "50 63 63"
 * ```
 */
export function exposeLayers(input: LayersInput): LayerExposure[] {
  return exposeSeries("exposeLayers", input);
}

function exposeSeries(where: string, input: LayersInput): LayerExposure[] {
  checkRates(where, input, "above 0");
  checkLayer(where, input);
  const { oxygenPerRadical, layerThickness_um, freshFraction, bleaching } = input;
  if (bleaching !== undefined) checkBleaching(where, bleaching, input.napierianAbsorption_percm);
  checkNumbers(
    where,
    { oxygenPerRadical, layerThickness_um, freshFraction },
    { oxygenPerRadical: positive, layerThickness_um: positive, freshFraction: fraction },
  );
  if (!Number.isInteger(input.layers) || input.layers < 1) {
    throw new InputError(
      `${where}: layers is ${show(input.layers)}; it must be a whole number of at least 1`,
    );
  }
  const { cells, tolerance } = { ...layerDefaults, ...input };
  const fine = runSeries(where, input, cells, tolerance);
  const endOnly = { ...input, times_s: [] };
  const coarse = runSeries(where, endOnly, Math.ceil(cells / 2), Math.min(10 * tolerance, 0.1));
  return fine.map((run, k) => exposureOf(run, coarse[k]!, tolerance));
}

function runSeries(where: string, input: LayersInput, cells: number, tolerance: number): LayerRun[] {
  const { grid } = { ...layerDefaults, ...input };
  const run = runInput(where, input);
  const oxygenScale = run.oxygenScale_molm3;
  const edges_um = edgesOf(input);
  const runs: LayerRun[] = [];
  let gapThickness_um = input.gapThickness_um;
  let start = freshStart(input);
  for (let k = 0; k < input.layers; k++) {
    const column = columnOf({ ...input, gapThickness_um, grid, cells, edges_um });
    const balance = quasiSteadyBalance(column, input, { tolerance, oxygenScale });
    const layer = runLayer(balance, start, run);
    runs.push(layer);
    gapThickness_um = layer.leftover.liquid_um + input.layerThickness_um;
    start = nextStart(layer.leftover, input);
  }
  return runs;
}

/** What the lift leaves of the liquid, mixed into the new gap; all else in it is fresh. */
function nextStart(
  left: Leftover,
  { freshFraction, oxygen_molm3, layerThickness_um }: LayersInput,
): StartState {
  const stale = ((1 - freshFraction) * left.liquid_um) / (left.liquid_um + layerThickness_um);
  return {
    oxygen: (1 - stale) * oxygen_molm3 + stale * left.oxygen,
    growth: stale * left.growth,
    initiator: 1 - stale + stale * left.initiator,
    film: left.film,
  };
}
