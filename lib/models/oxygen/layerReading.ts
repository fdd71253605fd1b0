// What the column looks like at one moment, in a chemist's terms: the layer left liquid, how deep and how far it is cured.
import { depthsAtLevel } from "../../numerics/profile.js";
import { um_per_m } from "../scales.js";
import type { ColumnBalance } from "./balance.js";
import { atClosedEnd } from "./column.js";

/** From where on a resin counts as out of the dead zone. */
export interface DeadZoneLevels {
  /** Oxygen over that of the fresh resin, above 0, below 1; 0.01 unless given. */
  readonly oxygenLevel?: number;
  /** Conversion, above 0, below 1; 0.05 unless given. */
  readonly conversionLevel?: number;
  /** Conversion at which the resin gels, above 0, below 1. */
  readonly gelConversion: number;
}

/** The thickness of the dead zone by each definition, um from the window; undefined where the level is reached at no depth. */
export interface DeadZoneReadings {
  /** First depth at which oxygen has fallen to `oxygenLevel`. */
  readonly byOxygen_um: number | undefined;
  /** First depth at which conversion reaches `conversionLevel`. */
  readonly byConversion_um: number | undefined;
  /** First depth at which the resin is gelled. */
  readonly byGel_um: number | undefined;
}

/** A column of resin at one moment. The three profiles run from the window (depth 0) to the part above. */
export interface LayerReading {
  readonly time_s: number;
  readonly depths_um: readonly number[];
  readonly oxygen_molm3: readonly number[];
  readonly conversion: readonly number[];
  readonly radicals_molm3: readonly number[];
  /** Initiator left at these depths over that at the start; undefined where bleaching is not followed. */
  readonly initiatorShare: readonly number[] | undefined;
  /** Oxygen in the resin at the window. */
  readonly wallOxygen_molm3: number;
  /** Oxygen entering the resin at the window; below 0 when it leaves. */
  readonly flux_molm2s: number;
  readonly deadZone: DeadZoneReadings;
  /** Greatest depth that is gelled, 0 if none is. */
  readonly cureDepth_um: number;
  readonly meanConversion: number;
  readonly meanOxygen_molm3: number;
  /** Conversion at the part above, where this layer has to bond. */
  readonly interfaceConversion: number;
  /** Mean oxygen in a film that stores it, as the concentration a resin in equilibrium would have. */
  readonly meanFilmOxygen_molm3: number | undefined;
}

/** Reads the column; `oxygenScale_molm3` is the oxygen of the fresh resin. */
export function readLayer(
  balance: ColumnBalance,
  time_s: number,
  levels: Required<DeadZoneLevels>,
  oxygenScale_molm3: number,
): LayerReading {
  const { column, oxygen, growth, initiator } = balance;
  const resin = Array.from(oxygen.subarray(column.filmCells), (C) => Math.max(C, 0));
  const inCells = Array.from(growth, (Q) => -Math.expm1(-Math.max(Q, 0)));
  const radicals = new Float64Array(growth.length);
  balance.radicalsOf(radicals);
  const window = balance.window();
  const last = resin.length - 1;
  const top_um = column.gapThickness_um;
  const centres_um = Array.from(column.depths_m, (depth) => um_per_m * depth);
  const conversion = withEnds(centres_um, inCells, top_um);
  const atTop = conversion.at(-1)!;
  const depths_um = [0, ...centres_um, top_um];
  const oxygen_molm3 = [
    window.wallOxygen_molm3,
    ...resin,
    atClosedEnd(resin[last]!, resin[last - 1]!, top_um - centres_um[last]!, top_um - centres_um[last - 1]!),
  ];
  const fromWindow = (values: readonly number[], level: number, rises: boolean): number | undefined =>
    values[0]! >= level === rises ? 0 : depthsAtLevel({ depths_um, values, level })[0];
  const gelled = depthsAtLevel({ depths_um, values: conversion, level: levels.gelConversion });
  return {
    time_s,
    depths_um,
    oxygen_molm3,
    conversion,
    radicals_molm3: withEnds(centres_um, Array.from(radicals), top_um),
    initiatorShare: initiator && withEnds(centres_um, Array.from(initiator), top_um),
    ...window,
    deadZone: {
      byOxygen_um: fromWindow(oxygen_molm3, levels.oxygenLevel * oxygenScale_molm3, false),
      byConversion_um: fromWindow(conversion, levels.conversionLevel, true),
      byGel_um: fromWindow(conversion, levels.gelConversion, true),
    },
    cureDepth_um: atTop >= levels.gelConversion ? top_um : (gelled.at(-1) ?? 0),
    meanConversion: meanOf(inCells, column.reacting.subarray(column.filmCells)),
    meanOxygen_molm3: meanOf(resin, column.reacting.subarray(column.filmCells)),
    interfaceConversion: atTop,
    meanFilmOxygen_molm3:
      column.filmCells === 0
        ? undefined
        : meanOf(oxygen.subarray(0, column.filmCells), column.capacity.subarray(0, column.filmCells)),
  };
}

/** Values at the cell centres with those at both ends: the straight line of the logarithms through the two nearest, if it can be. */
function withEnds(centres: readonly number[], values: readonly number[], top: number): number[] {
  const last = values.length - 1;
  return [end(0, 0, 1), ...values, end(top, last, last - 1)];

  function end(at: number, near: number, far: number): number {
    const [a, b] = [values[near]!, values[far]!];
    if (a <= 0 || b <= 0) return a;
    const outward = (at - centres[near]!) / (centres[near]! - centres[far]!);
    // Half a cell out the value changes by less than from cell to cell, unless the cells are too wide to say.
    return Math.min(a * Math.min(Math.max((a / b) ** outward, 0.25), 4), Math.max(1, a, b));
  }
}

function meanOf(values: ArrayLike<number>, weights: Float64Array): number {
  let [sum, all] = [0, 0];
  for (let i = 0; i < weights.length; i++) {
    sum += weights[i]! * values[i]!;
    all += weights[i]!;
  }
  return sum / all;
}
