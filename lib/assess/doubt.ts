// Doubt carried through a model: every uncertain input is drawn, the model runs once a draw, the outcomes are summed up.
// JCGM 101:2008 (Monte Carlo propagation of distributions), with Latin hypercube draws instead of plain random ones.

import { checkNumber } from "../door.js";
import { normalQuantile } from "../numerics/distributions.js";
import { latinHypercube } from "../numerics/sampling.js";
import { coverageInterval, drawsNeeded, rankCorrelation } from "../numerics/summary.js";
import type { Interval, SourcedValue, UsedSource } from "../result.js";

/**
 * An input with its doubt. The label tells inputs apart: two uses of one label are the same physical quantity and move together,
 * also where two values are stated of it (two settings read with one meter).
 * `positive`: log-normal with `value` as its median; `signed`: normal; `flat`: uniform over value ± √3 u.
 */
export interface Uncertain extends SourcedValue {
  readonly label: string;
  readonly spread: "positive" | "signed" | "flat";
  /** What the quantity cannot exceed by its nature; draws stop there. */
  readonly max?: number;
}

/** Gives a model the number to use for an input: its stated value, or the one of the present draw. */
export type Read = (input: Uncertain) => number;

/** How many draws are taken, from which seed, and the probability that intervals hold. */
export interface DrawOptions {
  readonly draws?: number;
  readonly seed?: number;
  readonly level?: number;
}

/** The draws of one run: an input has the same column wherever it is used, and inputs of one label the same ranks. */
export interface Draws {
  readonly count: number;
  readonly seed: number;
  readonly level: number;
  readonly column: (input: Uncertain) => Float64Array;
}

/** What came of a model: its answer at the stated values, one outcome a draw, and the inputs it read. */
export interface Ensemble<T> {
  readonly stated: T;
  readonly outcomes: readonly T[];
  readonly inputs: readonly Uncertain[];
}

/** How much of a result's doubt one input carries, 0 to 1; the shares of a result add up to 1. */
export interface DoubtShare {
  readonly label: string;
  readonly share: number;
}

/** Sets up draws; columns are made when an input is first read. @throws InputError for a count, seed or level out of range. */
export function startDraws({ draws = 2000, seed = 1, level = 0.95 }: DrawOptions = {}): Draws {
  const where = "assess";
  checkNumber(draws, { where, field: "draws", min: 20, max: 1e6, advice: "2000 is usual" });
  checkNumber(seed, { where, field: "seed", min: 0, max: 2 ** 32 - 1 });
  checkNumber(level, { where, field: "level", min: 0.5, max: 0.999 });
  const streams = new Map<string, Float64Array>();
  const columns = new Map<Uncertain, Float64Array>();
  const stream = (label: string) => {
    const made = streams.get(label) ?? drawStream(draws, (seed ^ hash(label)) >>> 0);
    streams.set(label, made);
    return made;
  };
  const column = (input: Uncertain) => {
    const made = columns.get(input) ?? columnOf(input, stream(input.label));
    columns.set(input, made);
    return made;
  };
  return { count: draws, seed, level, column };
}

/** Runs a model at the stated values and once a draw. */
export function propagate<T>(model: (read: Read) => T, draws: Draws): Ensemble<T> {
  const columns = new Map<Uncertain, Float64Array | undefined>();
  const columnOf = (input: Uncertain) => {
    if (!columns.has(input)) columns.set(input, input.u === 0 ? undefined : draws.column(input));
    return columns.get(input);
  };
  const stated = model((input) => {
    columnOf(input);
    return input.value;
  });
  const outcomes = Array.from({ length: draws.count }, (_, k) =>
    model((input) => columnOf(input)?.[k] ?? input.value),
  );
  return { stated, outcomes, inputs: [...columns.keys()] };
}

/** The answer at the stated values, the drawn ones, and the probability that an interval of them is to hold. */
export interface StatedDraws {
  readonly stated: number;
  readonly values: readonly number[];
  readonly level: number;
}

/** The coverage interval of drawn numbers around the answer at the stated values. */
export function intervalOf({ stated, values, level }: StatedDraws): Interval {
  const { low, high } = coverageInterval(values, level);
  // A model that bends can put the stated answer outside the middle of its own draws; the interval never excludes it.
  return { value: stated, low: Math.min(low, stated), high: Math.max(high, stated), level };
}

/**
 * As {@link intervalOf}, of the draws that have the quantity at all. Where these are fewer than the level needs, none can be left out
 * at either end.
 */
export function intervalAmong({ stated, values, level }: StatedDraws): Interval {
  if (values.length >= drawsNeeded(level)) return intervalOf({ stated, values, level });
  return { value: stated, low: Math.min(stated, ...values), high: Math.max(stated, ...values), level };
}

/**
 * Which inputs carry the doubt: squared rank correlation of input and outcome, brought to a sum of 1, largest first.
 * Inputs that explain less than chance would are left out.
 */
export function doubtShares(
  values: readonly number[],
  inputs: readonly Uncertain[],
  draws: Draws,
): DoubtShare[] {
  if (values.every((value) => value === values[0])) return [];
  const chance = 9 / draws.count;
  const raw = [...new Map(inputs.map((input) => [input.label, input])).values()]
    .filter((input) => input.u > 0)
    .map((input) => ({ label: input.label, share: rankCorrelation(draws.column(input), values) ** 2 }))
    .filter(({ share }) => share > chance);
  const total = raw.reduce((sum, { share }) => sum + share, 0);
  return raw.map(({ label, share }) => ({ label, share: share / total })).sort((a, b) => b.share - a.share);
}

/** The sources of the inputs a run read, by figure. */
export function sourcesOf(inputs: readonly Uncertain[]): UsedSource[] {
  return distinctSources(inputs.map(({ label, source, status }) => ({ figure: label, source, status })));
}

/** Each source of each figure once, by figure. */
export function distinctSources(sources: readonly UsedSource[]): UsedSource[] {
  const distinct = new Map(sources.map((one) => [`${one.figure}: ${one.source}`, one]));
  return [...distinct].sort(([a], [b]) => (a < b ? -1 : 1)).map(([, one]) => one);
}

/** Probabilities of one label: whatever is stated of it, its draws keep their ranks. */
function drawStream(count: number, seed: number): Float64Array {
  return latinHypercube({ dimensions: 1, draws: count, seed })[0]!;
}

function columnOf(input: Uncertain, stream: Float64Array): Float64Array {
  return stream.map((p) => Math.min(quantileOf(input, p), input.max ?? Infinity));
}

function quantileOf({ value, u, spread }: Uncertain, probability: number): number {
  if (spread === "flat") return value + Math.sqrt(3) * u * (2 * probability - 1);
  const z = normalQuantile({ probability });
  if (spread === "signed") return value + u * z;
  return value * Math.exp(z * logarithmicSpread({ value, u }));
}

/** Standard deviation of the logarithm of a positive quantity that is log-normal. */
export function logarithmicSpread({ value, u }: Pick<SourcedValue, "value" | "u">): number {
  return Math.sqrt(Math.log1p((u / value) ** 2));
}

/** FNV-1a (Fowler, Noll, Vo), 32 bit: gives each label its own stream. */
function hash(text: string): number {
  let h = 0x811c9dc5;
  for (const character of text) h = Math.imul(h ^ character.codePointAt(0)!, 0x01000193);
  return h >>> 0;
}
