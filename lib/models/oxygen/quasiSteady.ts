// The balance of oxygen in a column of resin whose radicals adjust at once, as one linearly implicit Euler step.
import { solveTridiagonal } from "../../numerics/tridiagonal.js";
import { differenceIn, type ColumnBalance, type CureRates } from "./balance.js";
import { bleach, bleachedLight, shineThrough, type Bleaching } from "./bleaching.js";
import { atWindow, type Column } from "./column.js";
import {
  diffusivityShare,
  fillTransport,
  setConductances,
  transportSystem,
  type TransportSystem,
} from "./transport.js";

/** Rate constants with the oxygen used per radical. */
export type QuasiSteadyConstants = CureRates & {
  readonly oxygenPerRadical: number;
  readonly bleaching?: Bleaching | undefined;
};

/** R and the oxygen use s kO C R of each cell with its slope in C, as `ratesAt` leaves them, and the light they are for. */
export interface QuasiSteadyRates {
  readonly constants: QuasiSteadyConstants;
  readonly relativeLight: Float64Array;
  readonly twiceRi: Float64Array;
  readonly eightktRi: Float64Array;
  /** R without oxygen, sqrt(Ri / 2 kt), and one over it; 0 in the dark. */
  readonly free: Float64Array;
  readonly perFree: Float64Array;
  readonly radicals: Float64Array;
  readonly use: Float64Array;
  readonly slope: Float64Array;
}

/** Keeps 0/0 out of the rates of cells that hold neither light nor oxygen; far below any concentration. */
const tiny = 1e-300;

/** Lists for the rates of a column in the dark. */
export function quasiSteadyRates(
  { cells, relativeLight }: Column,
  constants: QuasiSteadyConstants,
): QuasiSteadyRates {
  const list = (): Float64Array => new Float64Array(cells);
  return {
    constants,
    relativeLight,
    twiceRi: list(),
    eightktRi: list(),
    free: list(),
    perFree: list(),
    radicals: list(),
    use: list(),
    slope: list(),
  };
}

/** Sets the light. */
export function setLight(rates: QuasiSteadyRates, relativeIrradiance: number): void {
  const { constants, relativeLight, twiceRi, eightktRi, free, perFree } = rates;
  for (let i = 0; i < twiceRi.length; i++) {
    twiceRi[i] = 2 * constants.radicalGeneration_molm3s * relativeIrradiance * relativeLight[i]!;
    eightktRi[i] = 4 * constants.termination_m3mols * twiceRi[i]!;
    free[i] = Math.sqrt(twiceRi[i]! / (4 * constants.termination_m3mols));
    perFree[i] = free[i]! > 0 ? 1 / free[i]! : 0;
  }
}

/**
 * R = 2 Ri / (y + w), y = kO C, w = sqrt(y^2 + 8 kt Ri); use = s y R; slope = 4 s kO kt R^2 / w. Oxygen comes first in its list.
 *
 * Below C = 0, where only rounding and extrapolation lead, R stays as it is at C = 0 and the use is continued as a straight line:
 * the same value and slope at 0, and a pull back to 0 instead of ever more radicals.
 */
export function ratesAt(
  { constants, twiceRi, eightktRi, radicals, use, slope }: QuasiSteadyRates,
  oxygen: Float64Array,
): void {
  const { termination_m3mols: kt, oxygenCapture_m3mols: kO, oxygenPerRadical: s } = constants;
  for (let i = 0; i < twiceRi.length; i++) {
    const y = kO * oxygen[i]!;
    const positive = y > 0 ? y : 0;
    const w = Math.sqrt(positive * positive + eightktRi[i]!) + tiny;
    const R = twiceRi[i]! / (positive + w);
    radicals[i] = R;
    use[i] = s * y * R;
    slope[i] = y > 0 ? (4 * s * kO * kt * R * R) / w : s * kO * R;
  }
}

/** Adds the use of oxygen to a system filled with the transport: -use on the right, its slope on the diagonal. */
export function addUse({ column, diagonal, right }: TransportSystem, { use, slope }: QuasiSteadyRates): void {
  const { reacting } = column;
  for (let i = 0; i < right.length; i++) {
    diagonal[i]! += reacting[i]! * slope[i]!;
    right[i]! -= reacting[i]! * use[i]!;
  }
}

/**
 * A column with quasi-steady radicals, ready to be followed. State: oxygen and Q of all cells, oxygen taken up, oxygen used.
 *
 * capacity dC/dt = flux in - flux out - s kO C R, dQ/dt = kp R. Oxygen is stepped with the slope of the use, D with the
 * conversion at the start of the part-step. For Q, with Rf = sqrt(Ri / 2 kt) and R^2 / Rf^2 = 1 - use / (s Ri),
 *
 * R = Rf (1 - use / (s Ri)) + R (1 - R / Rf):
 *
 * the first term takes the use as the oxygen was stepped with it, so that a cell that empties within a step starts to cure as much
 * later as it had oxygen; the second, which is small but for that moment, is taken at the end of the part-step.
 *
 * With bleaching the state goes on with the initiator left in each cell; the light stands as at the start of the part-step.
 */
export function quasiSteadyBalance(
  column: Column,
  constants: QuasiSteadyConstants,
  options: { readonly tolerance: number; readonly oxygenScale: number },
): ColumnBalance {
  const { cells, filmCells } = column;
  const { curedDiffusivityShare: share = 1 } = constants;
  const { bleaching } = constants;
  const bleaches = bleaching !== undefined && bleaching.rate_pers > 0;
  const atInitiator = 2 * cells + 2;
  const state = new Float64Array(bleaches ? atInitiator + cells : atInitiator);
  const light = bleaches ? bleachedLight(column, bleaching, constants.napierianAbsorption_percm) : undefined;
  const rates = quasiSteadyRates(
    light === undefined ? column : { ...column, relativeLight: new Float64Array(cells) },
    constants,
  );
  const system = transportSystem(column, share);
  const conditions = { saturation: 0, gasResistance: 0, relativeIrradiance: 0 };
  const plainDifference = differenceIn(column, options.oxygenScale);
  /** Lets the light follow the initiator left in `u`. */
  function follow(u: Float64Array): void {
    if (light === undefined || conditions.relativeIrradiance === 0) return;
    shineThrough(light, u, atInitiator, rates.relativeLight);
    setLight(rates, conditions.relativeIrradiance);
  }
  return {
    column,
    state,
    oxygen: state.subarray(0, cells),
    growth: state.subarray(cells + filmCells, 2 * cells),
    ledger: state.subarray(2 * cells, atInitiator),
    initiator: light === undefined ? undefined : state.subarray(atInitiator + filmCells),
    tolerance: options.tolerance,
    difference:
      light === undefined
        ? plainDifference
        : (better, worse) =>
            Math.hypot(plainDifference(better, worse), greatestDistance(better, worse, atInitiator)),
    start(u) {
      follow(u);
      ratesAt(rates, u);
    },
    partStep(u, h) {
      if (share < 1) setConductances(system, conditions.gasResistance, u, cells);
      stepQuasiSteady(system, rates, u, h, conditions.saturation);
      if (light === undefined || conditions.relativeIrradiance === 0) return;
      bleach(light, u, atInitiator, conditions.relativeIrradiance, h);
      follow(u);
      ratesAt(rates, u);
    },
    setConditions({ relativeIrradiance, saturation_molm3, supplyCut }) {
      conditions.relativeIrradiance = relativeIrradiance;
      conditions.saturation = saturation_molm3;
      conditions.gasResistance = supplyCut ? Infinity : column.gasResistance;
      setConductances(system, conditions.gasResistance, state, cells);
      setLight(rates, relativeIrradiance);
      follow(state);
    },
    window: () =>
      atWindow(column, state, { ...conditions, share: diffusivityShare(share, state[cells + filmCells]!) }),
    radicalsOf(out) {
      follow(state);
      ratesAt(rates, state);
      out.set(rates.radicals.subarray(filmCells));
    },
  };
}

/** The greatest difference of two states from a place on. */
function greatestDistance(a: Float64Array, b: Float64Array, from: number): number {
  let most = 0;
  for (let i = from; i < a.length; i++) most = Math.max(most, Math.abs(a[i]! - b[i]!));
  return most;
}

/** One part-step of the state `u` in place; `rates` stand at its oxygen before and after. */
function stepQuasiSteady(
  system: TransportSystem,
  rates: QuasiSteadyRates,
  u: Float64Array,
  h: number,
  saturation: number,
): void {
  const { column, right, conductance } = system;
  const { cells, reacting } = column;
  const { radicals, use, slope, free, perFree, constants } = rates;
  const { propagation_m3mols: kp, termination_m3mols: kt, oxygenPerRadical: s } = constants;
  fillTransport(system, u, h, saturation);
  addUse(system, rates);
  solveTridiagonal(system);
  let used = 0;
  for (let i = 0; i < cells; i++) {
    const stepped = use[i]! + slope[i]! * right[i]!;
    used += reacting[i]! * stepped;
    u[i]! += right[i]!;
    u[cells + i]! += h * kp * (free[i]! - (stepped * perFree[i]!) / (2 * s * kt));
  }
  ratesAt(rates, u);
  for (let i = 0; i < cells; i++) u[cells + i]! += h * kp * radicals[i]! * (1 - radicals[i]! * perFree[i]!);
  u[2 * cells]! += h * conductance[0]! * (saturation - u[0]!);
  u[2 * cells + 1]! += h * used;
}
