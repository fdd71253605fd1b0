// Diffusion along the column as a tridiagonal system, to which each model adds its reaction. Plain functions on plain lists: they run
// thousands of times a second, and the engine compiles them best that way.
import type { TridiagonalSystem } from "../../numerics/tridiagonal.js";
import type { Column } from "./column.js";

/** The system of a column, with the conductances it is made of. */
export interface TransportSystem extends TridiagonalSystem {
  readonly column: Column;
  /** D of the fully converted resin over D of the liquid. */
  readonly curedShare: number;
  /** Conductance of each face, m/s, from the gas to the part; none at the part. */
  readonly conductance: Float64Array;
}

/** An empty system for a column; `setConductances` comes first, then `fillTransport` for each solve. */
export function transportSystem(column: Column, curedShare: number): TransportSystem {
  const list = (): Float64Array => new Float64Array(column.cells);
  return {
    column,
    curedShare,
    lower: list(),
    diagonal: list(),
    upper: list(),
    right: list(),
    conductance: new Float64Array(column.cells + 1),
  };
}

/**
 * Sets the conductances: `gasResistance` is the column's own unless the supply is cut (Infinity). `growth` holds Q of all cells from
 * the place `start` on, and D follows it as share^X.
 */
export function setConductances(
  { column, curedShare, conductance, lower, upper }: TransportSystem,
  gasResistance: number,
  growth: Float64Array,
  start: number,
): void {
  const { cells, halfResistance } = column;
  let below = gasResistance;
  for (let i = 0; i < cells; i++) {
    const half = halfResistance[i]! / diffusivityShare(curedShare, growth[start + i]!);
    conductance[i] = 1 / (below + half);
    lower[i] = -conductance[i]!;
    if (i > 0) upper[i - 1] = lower[i]!;
    below = half;
  }
}

/** share^X with X = 1 - exp(-Q). */
export const diffusivityShare = (share: number, Q: number): number =>
  share === 1 ? 1 : share ** -Math.expm1(-Math.max(Q, 0));

/** Fills diagonal and right for a step of `length` from `oxygen`, which comes first in its list, without reaction. */
export function fillTransport(
  { column, conductance, diagonal, right }: TransportSystem,
  oxygen: Float64Array,
  length: number,
  saturation: number,
): void {
  const { cells, capacity } = column;
  const perLength = 1 / length;
  let below = conductance[0]!;
  let fluxIn = below * (saturation - oxygen[0]!);
  for (let i = 0; i < cells; i++) {
    const above = conductance[i + 1]!;
    const fluxOut = i + 1 < cells ? above * (oxygen[i]! - oxygen[i + 1]!) : 0;
    diagonal[i] = capacity[i]! * perLength + below + above;
    right[i] = fluxIn - fluxOut;
    fluxIn = fluxOut;
    below = above;
  }
}
