// Light that changes while it bleaches the initiator: what each cell gets of it, and what it has left. The light is there at once,
// so it follows from the initiator left; the initiator is part of the state that is followed through time.
import { checkNumbers, notNegative, positive } from "../../door.js";
import { cm_per_m } from "../scales.js";
import type { Column } from "./column.js";

/** An initiator whose products do not absorb. */
export interface Bleaching {
  /** Napierian absorption of the initiator alone at the start, above 0, at most that of the whole resin, 1/cm. */
  readonly initiatorAbsorption_percm: number;
  /** Share of the initiator lost per time at the window at relative irradiance 1, at least 0, 1/s: see `bleachingRate`. */
  readonly rate_pers: number;
}

/** The light in a column, for one state of its initiator. */
export interface BleachedLight {
  readonly column: Column;
  /** Optical thickness of each cell: of the initiator at the start, and of all else. */
  readonly initiatorThickness: Float64Array;
  readonly restThickness: Float64Array;
  /** Mean light of each cell over that at the window; 0 in the film. */
  readonly meanLight: Float64Array;
  readonly rate_pers: number;
}

/** Refuses bleaching that is out of range. */
export function checkBleaching(
  where: string,
  { initiatorAbsorption_percm, rate_pers }: Bleaching,
  napierianAbsorption_percm: number,
): void {
  checkNumbers(
    `${where}: bleaching`,
    { initiatorAbsorption_percm, rate_pers },
    {
      initiatorAbsorption_percm: {
        ...positive,
        max: napierianAbsorption_percm,
        advice: "the initiator is part of the absorption of the whole resin",
      },
      rate_pers: notNegative,
    },
  );
}

/** Light for a column that has not been exposed yet. */
export function bleachedLight(
  column: Column,
  { initiatorAbsorption_percm, rate_pers }: Bleaching,
  napierianAbsorption_percm: number,
): BleachedLight {
  const { cells, reacting } = column;
  const rest_percm = napierianAbsorption_percm - initiatorAbsorption_percm;
  return {
    column,
    initiatorThickness: reacting.map((width) => cm_per_m * initiatorAbsorption_percm * width),
    restThickness: reacting.map((width) => cm_per_m * rest_percm * width),
    meanLight: new Float64Array(cells),
    rate_pers,
  };
}

/**
 * Sends the light up through the column and writes, per cell, what starts radicals: mean light times initiator left. `left` holds
 * the initiator's share of the cells from the place `start` on. What a cell takes is what enters less what leaves.
 */
export function shineThrough(
  { column, initiatorThickness, restThickness, meanLight }: BleachedLight,
  left: Float64Array,
  start: number,
  starting: Float64Array,
): void {
  let light = 1;
  for (let i = column.filmCells; i < column.cells; i++) {
    const share = left[start + i]!;
    const thickness = initiatorThickness[i]! * share + restThickness[i]!;
    const taken = -Math.expm1(-thickness);
    meanLight[i] = thickness > 0 ? (light * taken) / thickness : light;
    starting[i] = meanLight[i]! * share;
    light *= 1 - taken;
  }
}

/** Bleaches for a time `h` in the light as it stands, as one implicit step. */
export function bleach(
  { meanLight, rate_pers }: BleachedLight,
  left: Float64Array,
  start: number,
  relativeIrradiance: number,
  h: number,
): void {
  const perLight = rate_pers * relativeIrradiance * h;
  for (let i = 0; i < meanLight.length; i++) left[start + i]! /= 1 + perLight * meanLight[i]!;
}
