// The columns of a blend fit: what stands beside each coefficient for a given blend and temperature.
// Kept apart from the fit so that fitting and predicting cannot disagree.
import type { NumberList } from "../../numerics/lists.js";
import { kelvin } from "../scales.js";
import type { BlendReading } from "./blendReadings.js";

/** Which coefficients a fit has: liquids, the pairs measured together, terms a pair, and whether temperature varies. */
export interface BlendShape {
  readonly liquids: number;
  readonly pairs: readonly (readonly [number, number])[];
  readonly terms: number;
  /** K; 1/T is counted from here. */
  readonly referenceTemperature_K: number;
  readonly severalTemperatures: boolean;
}

/**
 * The row of the design for a blend: x_i, then x_i x_j (x_i - x_j)^k pair by pair, then, where temperature varies, the
 * same again times 1000 K (1/T - 1/T_ref).
 */
export function blendRow(shape: BlendShape, x: NumberList, temperature_C: number): number[] {
  const row = Array.from(x);
  for (const [i, j] of shape.pairs) {
    for (let k = 0; k < shape.terms; k++) row.push(x[i]! * x[j]! * (x[i]! - x[j]!) ** k);
  }
  if (!shape.severalTemperatures) return row;
  const tau = 1000 / kelvin(temperature_C) - 1000 / shape.referenceTemperature_K;
  return [...row, ...row.map((column) => tau * column)];
}

/** Readings this close in temperature are taken as one: the slope they would give is nothing but their scatter. */
export const ONE_TEMPERATURE_K = 2;

/** The coefficients that readings can have: a pair that no reading holds has none. */
export function shapeOf(readings: readonly BlendReading[], terms: number): BlendShape {
  const liquids = readings[0]!.fractions.length;
  const pairs = pairsOf(liquids).filter(([i, j]) =>
    readings.some(({ fractions: x }) => x[i]! > 0 && x[j]! > 0),
  );
  const T = readings.map(({ temperature_C }) => kelvin(temperature_C));
  const meanInverse = T.reduce((sum, Ti) => sum + 1 / Ti, 0) / T.length;
  return {
    liquids,
    pairs,
    terms,
    referenceTemperature_K: 1 / meanInverse,
    severalTemperatures: Math.max(...T) - Math.min(...T) > ONE_TEMPERATURE_K,
  };
}

/** The pairs of liquids that no reading holds together. */
export function unmeasuredPairs({ liquids, pairs }: BlendShape): (readonly [number, number])[] {
  return pairsOf(liquids).filter(([i, j]) => !pairs.some(([a, b]) => a === i && b === j));
}

/** Where the coefficients of a pair begin, temperature slopes aside. */
export function placeOfPair(shape: BlendShape, pair: number): number {
  return shape.liquids + pair * shape.terms;
}

function pairsOf(liquids: number): (readonly [number, number])[] {
  const places = Array.from({ length: liquids }, (_, i) => i);
  return places.flatMap((i) => places.slice(i + 1).map((j) => [i, j] as const));
}
