// Glass transition of a cured blend from those of its homopolymers. One homopolymer is listed 5 to 40 K apart by different
// methods, so the answer is a rank or a range, never one digit.
import { checkNumber, InputError, positive } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { checkFractions } from "../fractions.js";
import { celsius } from "../ranges.js";
import { kelvin, zeroCelsius_K } from "../scales.js";

/** What a mixing rule of glass transitions takes; one element a component, in the same order. */
export interface GlassTransitionInput {
  /** w: 0 to 1 each, adding up to 1 within 1e-9; of what ends up in the network. */
  readonly massFractions: NumberList;
  /** Tg of each homopolymer, above -273.15, degrees Celsius. */
  readonly glassTransitions_C: NumberList;
}

/**
 * Glass transition of a copolymer by Fox's equation, degrees Celsius.
 *
 * - `massFractions` w and `glassTransitions_C` Tg of the homopolymers.
 *
 * 1/Tg = sum_i (w_i / Tg_i), in kelvin. Assumes a random copolymer of full conversion without crosslinks; a network lies
 * higher, an incomplete cure lower.
 * @throws InputError when the fractions do not add up, the lists differ in length, or a temperature is not above absolute zero.
 * @source T. G. Fox, Bulletin of the American Physical Society 1 (1956) 123 (from memory).
 * @example
 * ```ts
 * import { foxTemperature } from "resinwright";
 * foxTemperature({ massFractions: [0.5, 0.5], glassTransitions_C: [94, -50] }); // → 4.436
 * ```
 */
export function foxTemperature(input: GlassTransitionInput): number {
  const { w, T } = kelvins("foxTemperature", input);
  return 1 / w.reduce((sum, wi, i) => sum + wi / T[i]!, 0) - zeroCelsius_K;
}

/**
 * Glass transition of a copolymer of two monomers by the Gordon–Taylor equation, degrees Celsius.
 *
 * - `massFractions` w and `glassTransitions_C` Tg of the two homopolymers; `k`: above 0, fitted to measured blends; k = 1 is
 *   the straight line, k = Tg1/Tg2 (in kelvin) is Fox's equation.
 *
 * Tg = (w1 Tg1 + k w2 Tg2) / (w1 + k w2).
 * @throws InputError when there are not two components, the fractions do not add up, or a number is out of range.
 * @source M. Gordon, J. S. Taylor, Journal of Applied Chemistry 2 (1952) 493-500, doi 10.1002/jctb.5010020901 (from memory).
 * @example
 * ```ts
 * import { gordonTaylorTemperature } from "resinwright";
 * gordonTaylorTemperature({ massFractions: [0.5, 0.5], glassTransitions_C: [94, -50], k: 0.5 }); // → 46
 * ```
 */
export function gordonTaylorTemperature(input: GlassTransitionInput & { readonly k: number }): number {
  const where = "gordonTaylorTemperature";
  const { w, T } = kelvins(where, input);
  const k = checkNumber(input.k, { where, field: "k", ...positive, max: 1e3 });
  if (w.length !== 2) {
    throw new InputError(
      `${where}: massFractions holds ${w.length}; the equation is for 2 components; use foxTemperature for more`,
    );
  }
  return (w[0]! * T[0]! + k * w[1]! * T[1]!) / (w[0]! + k * w[1]!) - zeroCelsius_K;
}

function kelvins(where: string, { massFractions, glassTransitions_C }: GlassTransitionInput) {
  checkFractions(where, "massFractions", massFractions);
  checkList(where, "glassTransitions_C", glassTransitions_C, celsius);
  checkSameLength(where, { massFractions, glassTransitions_C });
  return { w: Array.from(massFractions), T: Array.from(glassTransitions_C, kelvin) };
}
