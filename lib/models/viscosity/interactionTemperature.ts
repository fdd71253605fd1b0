// How the interaction of two liquids changes with temperature: between two measured temperatures, or by Isdale's law from one.
import { checkNumber, checkNumbers, InputError, notNegative } from "../../door.js";
import type { Warning } from "../../result.js";
import { celsius } from "../ranges.js";
import { kelvin } from "../scales.js";
import { checkBasis, type MixingBasis } from "./grunbergNissan.js";

/** An interaction measured at one temperature, with its standard uncertainty. */
export interface MeasuredInteraction {
  readonly G: number;
  /** Standard uncertainty of G, 0 or more. */
  readonly u: number;
  readonly basis: MixingBasis;
  readonly temperature_C: number;
}

/**
 * The interaction at a temperature from measurements at two others.
 *
 * - `measured`: G, u, basis and temperature of two measurements on the same basis, more than 1 K apart.
 * - `temperature_C`: above -273.15, degrees Celsius.
 *
 * G = (1 - f) Ga + f Gb, f = (1/T - 1/Ta) / (1/Tb - 1/Ta), u^2 = (1 - f)^2 ua^2 + f^2 ub^2.
 *
 * Assumes that G is linear in 1/T, as it is when ln eta of both liquids and of the blend are. Outside the two temperatures
 * the warning `extrapolated` is given.
 * @throws InputError on two bases, on temperatures that are not apart, or a number out of range.
 * @source Linear interpolation; that G drifts with temperature shows in every table that has been fitted at several.
 * @example
 * ```ts
 * import { interactionAtTemperature } from "resinwright";
 * const at = interactionAtTemperature({
 *   measured: [
 *     { G: -1.85, u: 0.07, basis: "mole", temperature_C: 15 },
 *     { G: -1.27, u: 0.05, basis: "mole", temperature_C: 50 },
 *   ],
 *   temperature_C: 25,
 * });
 * at.G; // → -1.6704
 * ```
 */
export function interactionAtTemperature(input: {
  readonly measured: readonly [MeasuredInteraction, MeasuredInteraction];
  readonly temperature_C: number;
}): MeasuredInteraction & { readonly warnings: readonly Warning[] } {
  const where = "interactionAtTemperature";
  const { measured, temperature_C } = input;
  checkMeasured(where, measured);
  checkNumber(temperature_C, { where, field: "temperature_C", ...celsius });
  const [a, b] = measured;
  const [Ta, Tb, T] = [kelvin(a.temperature_C), kelvin(b.temperature_C), kelvin(temperature_C)];
  const f = (1 / T - 1 / Ta) / (1 / Tb - 1 / Ta);
  const outside: Warning = {
    code: "extrapolated",
    message: `${temperature_C} °C lies outside the measured ${a.temperature_C} and ${b.temperature_C} °C; the interaction there is an extrapolation`,
  };
  return {
    G: (1 - f) * a.G + f * b.G,
    u: Math.hypot((1 - f) * a.u, f * b.u),
    basis: a.basis,
    temperature_C,
    warnings: f < 0 || f > 1 ? [outside] : [],
  };
}

/**
 * The interaction at a temperature from one at another, by Isdale's law: every G drifts towards +1 with heating.
 *
 * - `G`, `basis`: the interaction at the reference temperature; the law was found on the `mole` basis.
 * - `referenceTemperature_C`: where it was found, below 299.85 degrees Celsius (25 °C as published).
 * - `temperature_C`: below 299.85 degrees Celsius.
 *
 * G(T) = 1 - (1 - G_ref) (573 - T) / (573 - T_ref), T in K.
 *
 * Good for weakly interacting liquids; for hydrogen-bonded ones the real change is up to three times as large, and for G
 * between 0 and 1 it went the other way (1,2-propanediol and 1,2-ethanediol): warning `law-unreliable`. Another basis than
 * mole brings the warning `basis-untested`. With two measured temperatures use {@link interactionAtTemperature}.
 * @throws InputError when a number is out of range.
 * @source J. D. Isdale, Symposium on Transport Properties of Fluids and Fluid Mixtures, NEL, East Kilbride 1979, as quoted
 * by B. E. Poling, J. M. Prausnitz, J. P. O'Connell, The Properties of Gases and Liquids, 5th ed. 2001, chapter 9 (both
 * from memory).
 * @example
 * ```ts
 * import { isdaleTemperatureLaw } from "resinwright";
 * isdaleTemperatureLaw({ G: -0.95, basis: "mole", referenceTemperature_C: 25, temperature_C: 35 }).G; // → -0.8791
 * ```
 */
export function isdaleTemperatureLaw(input: {
  readonly G: number;
  readonly basis: MixingBasis;
  readonly referenceTemperature_C: number;
  readonly temperature_C: number;
}): { readonly G: number; readonly basis: MixingBasis; readonly warnings: readonly Warning[] } {
  const { G, basis, referenceTemperature_C, temperature_C } = input;
  const range = { ...celsius, max: 299.84, advice: "the law ends at 573 K" };
  checkBasis("isdaleTemperatureLaw", basis);
  checkNumbers(
    "isdaleTemperatureLaw",
    { G, referenceTemperature_C, temperature_C },
    { G: {}, referenceTemperature_C: range, temperature_C: range },
  );
  const share = (573 - kelvin(temperature_C)) / (573 - kelvin(referenceTemperature_C));
  const warnings: Warning[] = [];
  if (G > 0 && G < 1) {
    warnings.push({
      code: "law-unreliable",
      message: `G is ${G}; between 0 and 1 the law lets it grow with heating, and hydrogen-bonded liquids did the opposite; measure at a second temperature`,
    });
  }
  if (basis !== "mole") {
    warnings.push({
      code: "basis-untested",
      message: `the law was found for G on the mole basis, and this one is on the ${basis} basis; measure at a second temperature`,
    });
  }
  return { G: 1 - (1 - G) * share, basis, warnings };
}

function checkMeasured(where: string, measured: readonly MeasuredInteraction[]): void {
  measured.forEach(({ G, u, basis, temperature_C }, k) => {
    const of = `measured[${k}]`;
    checkBasis(where, basis);
    checkNumber(G, { where, field: `${of}.G` });
    checkNumber(u, { where, field: `${of}.u`, ...notNegative });
    checkNumber(temperature_C, { where, field: `${of}.temperature_C`, ...celsius });
  });
  const [a, b] = measured as [MeasuredInteraction, MeasuredInteraction];
  if (a.basis !== b.basis) {
    throw new InputError(
      `${where}: measured[0] is on the ${a.basis} basis and measured[1] on the ${b.basis} basis; fit both on one basis`,
    );
  }
  if (Math.abs(a.temperature_C - b.temperature_C) <= 1) {
    throw new InputError(
      `${where}: both interactions were measured near ${a.temperature_C} °C; measure the second more than 1 K away, better 20 K`,
    );
  }
}
