// Steady oxygen and radicals at every depth of a gap under steady light: the profile a long exposure settles to.
import { checkNumber, checkNumbers, InputError, notNegative, positive } from "../../door.js";
import { solveTridiagonal } from "../../numerics/tridiagonal.js";
import { um_per_m } from "../scales.js";
import { atWindow, columnOf } from "./column.js";
import { deadZone, type DeadZoneInput } from "./deadZone.js";
import { addUse, quasiSteadyRates, ratesAt, setLight } from "./quasiSteady.js";
import { fillTransport, setConductances, transportSystem } from "./transport.js";

/** What a steady profile depends on. */
export interface SteadyOxygenInput extends DeadZoneInput {
  /** L, window to part, above 0, um. */
  readonly gapThickness_um: number;
  /** kO of radical + oxygen, above 0, m3/(mol s). */
  readonly oxygenCapture_m3mols: number;
  /** kt with d[R]/dt = -2 kt [R]^2, above 0, m3/(mol s). */
  readonly termination_m3mols: number;
  /** 8 to 20000; 400 unless given. */
  readonly cells?: number;
  /** Cells narrow at the window and at the edge of the dead zone, or all the same; graded unless given. */
  readonly grid?: "graded" | "even";
}

/** A steady profile from the window up. */
export interface SteadyOxygenProfile {
  /** Centres of the cells. */
  readonly depths_um: readonly number[];
  readonly oxygen_molm3: readonly number[];
  readonly radicals_molm3: readonly number[];
  readonly wallOxygen_molm3: number;
  /** Oxygen entering at the window. */
  readonly flux_molm2s: number;
  /** Newton steps it took. */
  readonly iterations: number;
}

/**
 * Steady oxygen in a gap between window and part, with the full quasi-steady rate law.
 *
 * - the fields of `deadZone`, with `filmEquivalentThickness_um` l and `napierianAbsorption_percm` alpha;
 * - `gapThickness_um` L, `oxygenCapture_m3mols` kO, `termination_m3mols` kt; `cells` and `grid`.
 *
 * D C'' = s kO C R, R = 2 Ri / (kO C + sqrt((kO C)^2 + 8 kt Ri)), Ri falling as exp(-alpha z); flux (C* - C) D / l at the window,
 * none at the part. Conservative finite volumes; Newton's method from the closed-form dead zone, whose steps can only rise to
 * the solution after the first because the sink bends downwards. Errors fall with the square of the cells.
 *
 * Assumes a steady state, no flow, no bleaching and a D that does not change.
 * @throws InputError when an argument is out of range or the method does not settle.
 * @source As `exposeLayer`; the method is derived for this library.
 * @example
 * ```ts
 * import { steadyOxygenProfile } from "resinwright";
 * const steady = steadyOxygenProfile({
 *   diffusivity_m2s: 1e-10,
 *   saturation_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   napierianAbsorption_percm: 100,
 *   filmEquivalentThickness_um: 10,
 *   gapThickness_um: 100,
 *   oxygenCapture_m3mols: 5e5,
 *   termination_m3mols: 2500,
 * });
 * steady.flux_molm2s; // → 6.107e-6
 * steady.wallOxygen_molm3; // → 0.3893
 * ```
 */
export function steadyOxygenProfile(input: SteadyOxygenInput): SteadyOxygenProfile {
  checkInput(input);
  const { cells = 400, grid = "graded", saturation_molm3: saturation } = input;
  const zone = deadZone(input);
  const edge_um = zone.outcome === "dead-zone" ? zone.thickness_um : input.gapThickness_um;
  const column = columnOf({
    ...input,
    window: { film: "resists", filmEquivalentThickness_um: input.filmEquivalentThickness_um },
    cells,
    grid,
    edges_um: [edge_um],
  });
  const rates = quasiSteadyRates(column, { ...input, propagation_m3mols: 0 });
  setLight(rates, 1);
  const system = transportSystem(column, 1);
  setConductances(system, column.gasResistance, new Float64Array(cells), 0);
  const wall = zone.outcome === "dead-zone" ? zone.wallOxygen_molm3 : saturation;
  const C = column.depths_m.map((z) => wall * Math.max(1 - (um_per_m * z) / edge_um, 0) ** 2);
  const iterations = settle();
  ratesAt(rates, C);
  const window = atWindow(column, C, { saturation, gasResistance: column.gasResistance, share: 1 });
  checkNumber(window.flux_molm2s, { where, field: "the flux", advice: "an input is beyond any real resin" });
  return {
    depths_um: Array.from(column.depths_m, (depth) => um_per_m * depth),
    oxygen_molm3: Array.from(C, (value) => Math.max(value, 0)),
    radicals_molm3: Array.from(rates.radicals),
    ...window,
    iterations,
  };

  /** Newton's method on C, in place; returns the steps taken. */
  function settle(): number {
    const { right } = system;
    for (let iteration = 1; iteration <= iterationLimit; iteration++) {
      ratesAt(rates, C);
      // A step of no end: the steady state asked for.
      fillTransport(system, C, Infinity, saturation);
      addUse(system, rates);
      solveTridiagonal(system);
      let largest = 0;
      for (let i = 0; i < cells; i++) {
        C[i]! += right[i]!;
        largest = Math.max(largest, Math.abs(right[i]!));
      }
      if (largest <= 1e-13 * saturation) return iteration;
      if (!Number.isFinite(largest)) break;
    }
    throw new InputError(
      `${where}: Newton's method did not settle in ${iterationLimit} steps; change cells, or check that the rates are in mol, m3 and s`,
    );
  }
}

const where = "steadyOxygenProfile";
const iterationLimit = 500;

function checkInput(input: SteadyOxygenInput): void {
  const { gapThickness_um, oxygenCapture_m3mols, termination_m3mols } = input;
  const { radicalGeneration_molm3s, saturation_molm3, cells = 400, grid = "graded" } = input;
  checkNumbers(
    where,
    {
      gapThickness_um,
      oxygenCapture_m3mols,
      termination_m3mols,
      radicalGeneration_molm3s,
      saturation_molm3,
      cells,
    },
    {
      gapThickness_um: positive,
      oxygenCapture_m3mols: positive,
      termination_m3mols: { ...positive, advice: "without termination radicals have no steady level" },
      radicalGeneration_molm3s: positive,
      saturation_molm3: notNegative,
      cells: { min: 8, max: 20_000 },
    },
  );
  if (grid !== "graded" && grid !== "even")
    throw new InputError(`${where}: grid is ${JSON.stringify(grid)}; it must be "graded" or "even"`);
}
