// One isotherm of a published binary table in test/reference/viscosity, with the two pure viscosities picked out.
import { readTable } from "../../reference/readTable.js";

export interface Isotherm {
  /** Mole fraction of the first liquid. */
  readonly x1: readonly number[];
  readonly eta: readonly number[];
  readonly pure: readonly [number, number];
}

export function readIsotherm(file: string, temperature_K: string): Isotherm {
  const { x1, [`eta_${temperature_K}`]: eta } = readTable(`viscosity/${file}.csv`);
  return { x1: x1!, eta: eta!, pure: [eta![x1!.indexOf(1)]!, eta![x1!.indexOf(0)]!] };
}
