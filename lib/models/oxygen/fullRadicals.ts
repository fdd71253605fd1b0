// The balance of oxygen in a column of resin with radicals that take time to form and to end, as one linearly implicit Euler
// step. Radicals do not move, so each cell's are eliminated before the column is solved for oxygen.
import { solveTridiagonal } from "../../numerics/tridiagonal.js";
import { differenceIn, type ColumnBalance, type CureRates } from "./balance.js";
import { atWindow, type Column } from "./column.js";
import { diffusivityShare, fillTransport, setConductances, transportSystem } from "./transport.js";

/** What peroxyl radicals, made by radical + oxygen, do next. All at least 0 unless stated. */
export interface PeroxylRates {
  /** kx of peroxyl + chain radical, both ending, m3/(mol s). */
  readonly crossTermination_m3mols: number;
  /** kxx with d[X]/dt = -2 kxx [X]^2 of two peroxyls, m3/(mol s). */
  readonly selfTermination_m3mols: number;
  /** Oxygen given back per pair of peroxyls that end each other, 0 to 1. */
  readonly oxygenReturned: number;
  /** kpx of peroxyl + double bond, which makes a chain radical again, m3/(mol s). */
  readonly propagation_m3mols: number;
  /** Double bonds at the start, mol/m3. */
  readonly doubleBonds_molm3: number;
  /** kH of peroxyl + hydrogen donor, which makes a chain radical again, m3/(mol s). */
  readonly donorTransfer_m3mols: number;
  /** Hydrogen donor (thiol, amine, ether) at the start, mol/m3. */
  readonly donor_molm3: number;
  /** kI of peroxyl + inhibitor, which ends the peroxyl, m3/(mol s). */
  readonly inhibitorCapture_m3mols: number;
  /** Inhibitor at the start, mol/m3. */
  readonly inhibitor_molm3: number;
  /** Radicals that one inhibitor molecule ends, n, above 0, at most 10; 2 for a simple phenol. */
  readonly radicalsCaught: number;
}

/** Peroxyls that do nothing more: each radical takes one oxygen and both are gone. */
export const inertPeroxyls: PeroxylRates = {
  crossTermination_m3mols: 0,
  selfTermination_m3mols: 0,
  oxygenReturned: 0,
  propagation_m3mols: 0,
  doubleBonds_molm3: 0,
  donorTransfer_m3mols: 0,
  donor_molm3: 0,
  inhibitorCapture_m3mols: 0,
  inhibitor_molm3: 0,
  radicalsCaught: 2,
};

/**
 * A column with full radical kinetics, ready to be followed. State: oxygen, Q, R, X (peroxyl), donor, inhibitor, oxygen taken up,
 * oxygen used.
 *
 * dR/dt = Ri - 2 kt R^2 - kO R C - kx R X + b X, dX/dt = kO R C - kx R X - 2 kxx X^2 - (b + n kI I) X,
 * b = kpx M + kH DH, dC/dt = diffusion - kO R C + rho kxx X^2, dQ/dt = kp R + kpx X, dDH/dt = -kH DH X, dI/dt = -kI I X,
 * M = M0 exp(-Q). R, X and C are stepped together with all their slopes; b, I and D stand as at the start of the part-step.
 */
export function fullRadicalBalance(
  column: Column,
  rates: CureRates & { readonly peroxyls: PeroxylRates },
  options: { readonly tolerance: number; readonly oxygenScale: number },
): ColumnBalance {
  const { cells, filmCells, reacting, relativeLight } = column;
  const { propagation_m3mols: kp, termination_m3mols: kt, oxygenCapture_m3mols: kO } = rates;
  const { curedDiffusivityShare: share = 1, peroxyls } = rates;
  const { crossTermination_m3mols: kx, selfTermination_m3mols: kxx, oxygenReturned: rho } = peroxyls;
  const { propagation_m3mols: kpx, doubleBonds_molm3: M0, donorTransfer_m3mols: kH } = peroxyls;
  const { inhibitorCapture_m3mols: kI, radicalsCaught } = peroxyls;
  const [atQ, atR, atX, atDonor, atInhibitor] = [cells, 2 * cells, 3 * cells, 4 * cells, 5 * cells];
  const atLedger = 6 * cells;
  const state = new Float64Array(atLedger + 2);
  state.fill(peroxyls.donor_molm3, atDonor, atInhibitor);
  state.fill(peroxyls.inhibitor_molm3, atInhibitor, atLedger);
  const system = transportSystem(column, share);
  const { diagonal, right } = system;
  // Per cell: change of R and X at no change of C, and per unit of it; net use of oxygen likewise.
  const list = (): Float64Array => new Float64Array(cells);
  const [r0, r1, x0, x1, use, slope] = [list(), list(), list(), list(), list(), list()];
  const conditions = { light: 0, saturation: 0, gasResistance: 0 };

  /** Eliminates the radicals of every cell: fills r0, r1, x0, x1, use and slope. */
  function eliminateRadicals(u: Float64Array, h: number): void {
    for (let i = 0; i < cells; i++) {
      const C = u[i]!;
      const R = u[atR + i]!;
      const X = u[atX + i]!;
      const b = kpx * M0 * Math.exp(-u[atQ + i]!) + kH * u[atDonor + i]!;
      const ended = b + radicalsCaught * kI * u[atInhibitor + i]!;
      const captured = kO * R * C;
      const fR = conditions.light * relativeLight[i]! - 2 * kt * R * R - captured - kx * R * X + b * X;
      const fX = captured - kx * R * X - 2 * kxx * X * X - ended * X;
      const capture = kO * Math.max(C, 0);
      const a11 = 1 / h + 4 * kt * R + capture + kx * X;
      const a12 = kx * R - b;
      const a21 = kx * X - capture;
      const a22 = 1 / h + kx * R + 4 * kxx * X + ended;
      const determinant = a11 * a22 - a12 * a21;
      const perC = kO * R;
      r0[i] = (a22 * fR - a12 * fX) / determinant;
      x0[i] = (a11 * fX - a21 * fR) / determinant;
      r1[i] = (-perC * (a22 + a12)) / determinant;
      x1[i] = (perC * (a11 + a21)) / determinant;
      const returned = 2 * rho * kxx * X;
      use[i] = captured - rho * kxx * X * X + capture * r0[i]! - returned * x0[i]!;
      slope[i] = perC + capture * r1[i]! - returned * x1[i]!;
    }
  }

  function partStep(u: Float64Array, h: number): void {
    if (share < 1) setConductances(system, conditions.gasResistance, u, atQ);
    eliminateRadicals(u, h);
    fillTransport(system, u, h, conditions.saturation);
    for (let i = 0; i < cells; i++) {
      diagonal[i]! += reacting[i]! * slope[i]!;
      right[i]! -= reacting[i]! * use[i]!;
    }
    solveTridiagonal(system);
    let used = 0;
    for (let i = 0; i < cells; i++) {
      const change = right[i]!;
      used += reacting[i]! * (use[i]! + slope[i]! * change);
      u[i]! += change;
      u[atR + i]! += r0[i]! + r1[i]! * change;
      u[atX + i]! += x0[i]! + x1[i]! * change;
      u[atQ + i]! += h * (kp * u[atR + i]! + kpx * u[atX + i]!);
      const perX = h * Math.max(u[atX + i]!, 0);
      u[atDonor + i]! /= 1 + kH * perX;
      u[atInhibitor + i]! /= 1 + kI * perX;
    }
    u[atLedger]! += h * system.conductance[0]! * (conditions.saturation - u[0]!);
    u[atLedger + 1]! += h * used;
  }

  return {
    column,
    state,
    oxygen: state.subarray(0, cells),
    growth: state.subarray(atQ + filmCells, atR),
    ledger: state.subarray(atLedger),
    initiator: undefined,
    tolerance: options.tolerance,
    start: () => undefined,
    partStep,
    difference: differenceIn(column, options.oxygenScale),
    setConditions({ relativeIrradiance, saturation_molm3, supplyCut }) {
      conditions.light = rates.radicalGeneration_molm3s * relativeIrradiance;
      conditions.saturation = saturation_molm3;
      conditions.gasResistance = supplyCut ? Infinity : column.gasResistance;
      setConductances(system, conditions.gasResistance, state, atQ);
    },
    window: () =>
      atWindow(column, state, { ...conditions, share: diffusivityShare(share, state[atQ + filmCells]!) }),
    radicalsOf(out) {
      for (let i = 0; i < out.length; i++) out[i] = Math.max(state[atR + filmCells + i]!, 0);
    },
  };
}
