// What the transient models share: the state of a column of resin under light, and the rates a chemist gives for it.
import { checkNumbers, fraction, notNegative, positive } from "../../door.js";
import type { EulerProblem } from "../../numerics/extrapolation.js";
import type { AtWindow, Column } from "./column.js";

/** Light, oxygen and rate constants of a resin at the window. */
export interface CureRates {
  /** Ri at the window at relative irradiance 1, at least 0, mol/(m3 s); proportional to the irradiance. */
  readonly radicalGeneration_molm3s: number;
  /** alpha of the whole resin, 0 to 1e6, 1/cm; 0 for even light. */
  readonly napierianAbsorption_percm: number;
  /** D of oxygen in the liquid resin, above 0, m2/s. */
  readonly diffusivity_m2s: number;
  /** D of oxygen in the fully converted resin over D in the liquid, above 0, at most 1; 1 unless given. */
  readonly curedDiffusivityShare?: number;
  /** kO of radical + oxygen, above 0, m3/(mol s). */
  readonly oxygenCapture_m3mols: number;
  /** kp of chain growth, at least 0, m3/(mol s). */
  readonly propagation_m3mols: number;
  /** kt with d[R]/dt = -2 kt [R]^2, above 0 (at least 0 for `exposeLayerFully`), m3/(mol s). */
  readonly termination_m3mols: number;
}

/** What acts on the column during one stretch of time. */
export interface Conditions {
  readonly relativeIrradiance: number;
  readonly saturation_molm3: number;
  readonly supplyCut: boolean;
}

/** A column followed through time. The lists are windows into `state` and move with it. */
export interface ColumnBalance extends EulerProblem {
  readonly column: Column;
  /** Oxygen per cell, film first, mol/m3. */
  readonly oxygen: Float64Array;
  /** Q = kp int R dt per resin cell; conversion is 1 - exp(-Q). */
  readonly growth: Float64Array;
  /** Oxygen that came in through the lowest face, and oxygen used up, since the start, mol/m2. */
  readonly ledger: Float64Array;
  /** Initiator left per resin cell, over that at the start; undefined where it is not followed. */
  readonly initiator: Float64Array | undefined;
  readonly setConditions: (conditions: Conditions) => void;
  readonly window: () => AtWindow;
  /** Writes the chain radicals per resin cell, mol/m3. */
  readonly radicalsOf: (out: Float64Array) => void;
}

/** Refuses rates that are out of range. */
export function checkRates(where: string, rates: CureRates, termination: "above 0" | "from 0"): void {
  const { radicalGeneration_molm3s, napierianAbsorption_percm, diffusivity_m2s } = rates;
  const { curedDiffusivityShare = 1, oxygenCapture_m3mols, propagation_m3mols, termination_m3mols } = rates;
  checkNumbers(
    where,
    {
      radicalGeneration_molm3s,
      napierianAbsorption_percm,
      diffusivity_m2s,
      curedDiffusivityShare,
      oxygenCapture_m3mols,
      propagation_m3mols,
      termination_m3mols,
    },
    {
      radicalGeneration_molm3s: notNegative,
      napierianAbsorption_percm: { ...notNegative, max: 1e6 },
      diffusivity_m2s: positive,
      curedDiffusivityShare: { ...fraction, above: true },
      oxygenCapture_m3mols: positive,
      propagation_m3mols: notNegative,
      termination_m3mols:
        termination === "from 0"
          ? notNegative
          : {
              ...positive,
              advice: "without termination radicals have no steady level; use exposeLayerFully",
            },
    },
  );
}

/** Oxygen held by the column, mol/m2. */
export function contentOf({ column, oxygen }: ColumnBalance): number {
  let sum = 0;
  for (let i = 0; i < oxygen.length; i++) sum += column.capacity[i]! * oxygen[i]!;
  return sum;
}

/**
 * The difference of two states that step control goes by: the root mean square over the column of the differences in oxygen,
 * over `scale`, and in Q, over 1 + Q. A state begins with the oxygen of all cells; their Q follows.
 */
export function differenceIn(
  { cells, capacity, reacting }: Column,
  scale: number,
): EulerProblem["difference"] {
  const held = capacity.reduce((sum, width) => sum + width, 0) * scale * scale;
  const reactive = reacting.reduce((sum, width) => sum + width, 0);
  return (better, worse) => {
    let oxygen = 0;
    let growth = 0;
    for (let i = 0; i < cells; i++) {
      const dC = better[i]! - worse[i]!;
      const Q = better[cells + i]!;
      const dQ = (Q - worse[cells + i]!) / (1 + Math.abs(Q));
      oxygen += capacity[i]! * dC * dC;
      growth += reacting[i]! * dQ * dQ;
    }
    return Math.sqrt(oxygen / held + growth / reactive);
  };
}
