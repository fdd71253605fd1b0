// Checks shared by the functions that take lists of numbers: every element is named by its place,
// so that the message points at the one reading that is wrong.
import { checkNumber, InputError, show, type NumberRule } from "../door.js";

/** A list of numbers as callers may hold it: a plain array or a typed one. */
export type NumberList = ArrayLike<number> & Iterable<number>;

/** The rule each element obeys, and how many elements there must be at least (1 unless given). */
export interface ListRule extends Omit<NumberRule, "where" | "field"> {
  readonly atLeast?: number;
}

/**
 * Refuses a list that is too short or holds a number outside the rule.
 * @throws InputError naming the list and the place of the element, counted from 0: `fractions[2]`.
 */
export function checkList(where: string, field: string, values: NumberList, rule: ListRule = {}): void {
  const { atLeast = 1, ...numberRule } = rule;
  if (typeof values !== "object" || values === null || typeof values.length !== "number") {
    throw new InputError(`${where}: ${field} is ${show(values)}; it must be a list of numbers`);
  }
  if (values.length < atLeast) {
    const held = values.length === 1 ? "1 number" : `${values.length} numbers`;
    throw new InputError(`${where}: ${field} holds ${held}; at least ${atLeast} must be given`);
  }
  const { min = -Infinity, max = Infinity, above } = numberRule;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    // Most elements pass here, without the cost of a name: means over spectra check millions of them.
    if (Number.isFinite(value) && (above ? value > min : value >= min) && value <= max) continue;
    checkNumber(value, { where, field: `${field}[${i}]`, ...numberRule });
  }
}

/**
 * Refuses lists of different lengths.
 * @throws InputError naming every list with its length.
 */
export function checkSameLength(where: string, lists: Readonly<Record<string, NumberList>>): void {
  const lengths = Object.values(lists).map((list) => list.length);
  if (lengths.every((length) => length === lengths[0])) return;
  const given = Object.entries(lists).map(([field, list]) => `${field} holds ${list.length}`);
  throw new InputError(
    `${where}: ${given.join(", ")}; the lists must be of the same length, one element each per row`,
  );
}
