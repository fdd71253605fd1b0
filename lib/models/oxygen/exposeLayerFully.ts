// A layer exposed with radicals that take time: for short pulses, for cure that goes on in the dark, and for what peroxyls,
// thiols and amines do. Slower than exposeLayer, and asks for rate constants hardly anyone has measured.
import { checkNumbers, fraction, notNegative, positive, refuseUnknownKeys } from "../../door.js";
import { checkRates, type CureRates } from "./balance.js";
import { columnOf } from "./column.js";
import { fullRadicalBalance, inertPeroxyls, type PeroxylRates } from "./fullRadicals.js";
import { exposureOf, type LayerExposure } from "./layerExposure.js";
import { checkLayer, edgesOf, layerDefaults, type LayerConditions } from "./layerInput.js";
import { freshStart, runInput, runLayer, type LayerRun } from "./layerRun.js";

/** A layer to be exposed, with what its peroxyl radicals do; nothing unless given. */
export interface FullLayerInput extends CureRates, LayerConditions {
  readonly peroxyls?: Partial<PeroxylRates>;
}

/**
 * Exposes one layer of resin with full radical kinetics.
 *
 * - all fields of `exposeLayer` but `oxygenPerRadical`, which follows from the kinetics here; `termination_m3mols` may be 0;
 * - `peroxyls`: rate constants of the peroxyl radicals, hydrogen donor, double bonds and inhibitor; nothing of
 *   them unless given.
 *
 * dR/dt = Ri - 2 kt R^2 - kO R C - kx R X + b X, dX/dt = kO R C - kx R X - 2 kxx X^2 - (b + n kI I) X,
 * b = kpx M + kH DH, dI/dt = -kI I X, dC/dt = d/dz(D dC/dz) - kO R C + rho kxx X^2,
 * X_conv = 1 - exp(-int (kp R + kpx X) dt). Start: no radicals.
 *
 * Assumes radicals and peroxyls that do not move, rate constants that do not change with conversion, and no bleaching.
 * @throws InputError as `exposeLayer`.
 * @source Reactions: C. Decker, A. D. Jenkins, Macromolecules 18 (1985) 1241-1244, doi 10.1021/ma00148a034 (from memory); oxygen
 * given back: P. D. Bartlett, T. G. Traylor, J. Am. Chem. Soc. 85 (1963) 2407-2410 (abstract; pages from memory).
 * @example
 * ```ts
 * import { exposeLayerFully } from "resinwright";
 * const layer = exposeLayerFully({
 *   radicalGeneration_molm3s: 0.5,
 *   napierianAbsorption_percm: 100,
 *   diffusivity_m2s: 1e-10,
 *   oxygenCapture_m3mols: 5e5,
 *   propagation_m3mols: 25,
 *   termination_m3mols: 2500,
 *   gapThickness_um: 100,
 *   oxygen_molm3: 1,
 *   saturation_molm3: 1,
 *   window: { film: "resists", filmEquivalentThickness_um: 0 },
 *   schedule: [{ duration_s: 5, relativeIrradiance: 1 }],
 *   gelConversion: 0.2,
 * });
 * layer.end.deadZone.byGel_um ?? NaN; // → 22.06
 * ```
 */
export function exposeLayerFully(input: FullLayerInput): LayerExposure {
  checkRates(where, input, "from 0");
  checkLayer(where, input);
  const peroxyls = { ...inertPeroxyls, ...input.peroxyls };
  refuseUnknownKeys(`${where}: peroxyls`, peroxyls, Object.keys(inertPeroxyls));
  checkNumbers(`${where}: peroxyls`, peroxyls, {
    crossTermination_m3mols: notNegative,
    selfTermination_m3mols: notNegative,
    oxygenReturned: fraction,
    propagation_m3mols: notNegative,
    doubleBonds_molm3: notNegative,
    donorTransfer_m3mols: notNegative,
    donor_molm3: notNegative,
    inhibitorCapture_m3mols: notNegative,
    inhibitor_molm3: notNegative,
    radicalsCaught: { ...positive, max: 10 },
  });
  const { cells, tolerance, grid } = { ...layerDefaults, ...input };
  const run = runInput(where, input);
  const edges_um = edgesOf({ ...input, oxygenPerRadical: 1 });
  const runOn = (cellCount: number, stepTolerance: number, times_s = run.times_s): LayerRun => {
    const column = columnOf({ ...input, grid, cells: cellCount, edges_um });
    const options = { tolerance: stepTolerance, oxygenScale: run.oxygenScale_molm3 };
    return runLayer(fullRadicalBalance(column, { ...input, peroxyls }, options), freshStart(input), {
      ...run,
      times_s,
    });
  };
  const coarse = runOn(Math.ceil(cells / 2), Math.min(10 * tolerance, 0.1), []);
  return exposureOf(runOn(cells, tolerance), coarse, tolerance);
}

const where = "exposeLayerFully";
