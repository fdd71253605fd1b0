// The balance: how little it can weigh honestly, and how far a weighing on it can be trusted.

import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";

/** A balance as its data sheet and ten weighings of one test weight describe it. */
export interface Balance {
  /** d: the last digit it shows, above 0. */
  readonly readability_g: number;
  /** s: standard deviation of at least ten weighings of the same small load, at least 0. */
  readonly repeatability_g: number;
  /** The most it carries, vessel included, above `readability_g`. */
  readonly capacity_g: number;
}

/**
 * The smallest net weight that a balance weighs honestly, g.
 *
 * - `balance`; `weighingAccuracy` a: what two standard deviations may be of the weight, above 0 to 1; 0.001 unless given.
 *
 * M_min = 2 max(s, 0.41 d) / a; at a = 0.001 that is 2000 s, and never less than 820 d. It speaks of repeatability only: the
 * balance must also read a test weight right.
 * @throws InputError when a figure of the balance or the accuracy is out of range.
 * @source United States Pharmacopeia, general chapter 41, Balances (wording of 2019); the floor 0.41 d is from memory.
 * @example
 * ```ts
 * import { minimumWeight } from "resinwright";
 * minimumWeight({ balance: { readability_g: 0.0001, repeatability_g: 0.00015, capacity_g: 200 } }); // → 0.3
 * minimumWeight({ balance: { readability_g: 0.01, repeatability_g: 0, capacity_g: 2000 } }); // → 8.2
 * ```
 */
export function minimumWeight({
  balance,
  weighingAccuracy = 0.001,
}: {
  balance: Balance;
  weighingAccuracy?: number;
}): number {
  const where = "minimumWeight";
  checkBalance(where, balance);
  checkNumber(weighingAccuracy, { where, field: "weighingAccuracy", min: 0, above: true, max: 1 });
  const s = Math.max(balance.repeatability_g, 0.41 * balance.readability_g);
  return Number(((2 * s) / weighingAccuracy).toPrecision(12));
}

/**
 * Standard uncertainty of a net mass, g.
 *
 * - `balance`; `loads`: how many times it was loaded to make up the mass, a whole number of at least 1; 1 unless given.
 *
 * u = sqrt(loads (s² + 2 d²/12)): repeatability, and the rounding of two readings, empty and full. Assumes that the balance is
 * adjusted; the buoyancy of air (0.1 % for a resin) is left out because it is all but the same for every portion.
 * @throws InputError when a figure of the balance or the number of loads is out of range.
 * @source Rectangular distribution of a reading: JCGM 100:2008 (GUM), 4.3.7.
 * @example
 * ```ts
 * import { weighingUncertainty } from "resinwright";
 * weighingUncertainty({ balance: { readability_g: 0.01, repeatability_g: 0, capacity_g: 2000 } }); // → 0.00408248
 * ```
 */
export function weighingUncertainty({ balance, loads = 1 }: { balance: Balance; loads?: number }): number {
  const where = "weighingUncertainty";
  checkBalance(where, balance);
  checkNumber(loads, { where, field: "loads", min: 1, max: 1e6 });
  const { repeatability_g: s, readability_g: d } = balance;
  return Math.sqrt(loads * (s ** 2 + (2 * d ** 2) / 12));
}

/** Whether a mass is at least the minimum weight, rounding noise apart. */
export function isHonest(mass_g: number, minimumWeight_g: number): boolean {
  return mass_g >= minimumWeight_g * (1 - 1e-9);
}

/** The nearest mass that the balance can show; `toward` takes the next one below or above. */
export function readable(
  mass_g: number,
  { readability_g: d }: Balance,
  toward: "nearest" | "down" | "up" = "nearest",
): number {
  // A mass that is a whole number of digits but for rounding noise is one.
  const steps = Number((mass_g / d).toPrecision(12));
  const round = { nearest: Math.round, down: Math.floor, up: Math.ceil }[toward];
  return Number((round(steps) * d).toPrecision(12));
}

/** @throws InputError when a figure of the balance is out of range. */
export function checkBalance(where: string, balance: Balance): void {
  checkNumbers(where, balance, {
    readability_g: positive,
    repeatability_g: {
      ...notNegative,
      advice: "weigh one small load ten times and take the standard deviation",
    },
    capacity_g: { min: balance.readability_g, above: true },
  });
}
