// How the viscosity of a glass-forming liquid falls with temperature: the three-parameter law of Vogel, Fulcher and Tammann.
import { checkNumber, checkNumbers, InputError, notNegative, positive } from "../../door.js";
import { celsius } from "../ranges.js";
import { kelvin, zeroCelsius_K } from "../scales.js";

/** The three parameters of ln(eta / mPa s) = lnPrefactor + vogelConstant_K / (T - vogelTemperature_K). */
export interface VogelParameters {
  /** A: ln of the viscosity in mPa s that the law extrapolates to at infinite temperature. */
  readonly lnPrefactor: number;
  /** B, K. */
  readonly vogelConstant_K: number;
  /** T0, K: where the law puts an endless viscosity, some tens of kelvin below the glass transition. */
  readonly vogelTemperature_K: number;
}

/**
 * Viscosity in mPa s at a temperature, by the law of Vogel, Fulcher and Tammann.
 *
 * - `lnPrefactor`: A, dimensionless, for viscosities in mPa s.
 * - `vogelConstant_K`: B, above 0, K.
 * - `vogelTemperature_K`: T0, 0 or more, K; with T0 = 0 it is Andrade's law.
 * - `temperature_C`: above T0, degrees Celsius.
 *
 * ln eta = A + B / (T - T0), T in K.
 *
 * Assumes a Newtonian liquid above its glass transition. Diols over 35 K follow it to 0.03 % where Andrade's law misses by
 * 1.5 to 3 %; glycerol over 90 K to 4 %, where Andrade's law misses by a factor of 1.6.
 * @throws InputError when an argument is out of range, the temperature is not above T0, or the viscosity is beyond the
 * range of numbers.
 * @source H. Vogel, Physikalische Zeitschrift 22 (1921) 645-646; G. S. Fulcher, J. Am. Ceram. Soc. 8 (1925) 339-355; G.
 * Tammann, W. Hesse, Z. Anorg. Allg. Chem. 156 (1926) 245-257 (all three from memory).
 * @example
 * ```ts
 * import { vogelViscosity } from "resinwright";
 * vogelViscosity({
 *   lnPrefactor: -3.7188,
 *   vogelConstant_K: 578.919,
 *   vogelTemperature_K: 137.546,
 *   temperature_C: 25,
 * }); // → 0.8921
 * ```
 */
export function vogelViscosity(input: VogelParameters & { readonly temperature_C: number }): number {
  const { lnPrefactor: A, vogelConstant_K: B, vogelTemperature_K: T0, temperature_C } = input;
  checkNumbers(where, input, {
    lnPrefactor: {},
    vogelConstant_K: positive,
    vogelTemperature_K: notNegative,
    temperature_C: celsius,
  });
  const T = kelvin(temperature_C);
  if (T <= T0) {
    throw new InputError(
      `${where}: temperature_C is ${temperature_C}, at or below the Vogel temperature of ${+(T0 - zeroCelsius_K).toFixed(2)} °C; ` +
        "the law holds above it, and the liquid is a glass there",
    );
  }
  return checkNumber(Math.exp(A + B / (T - T0)), {
    where,
    field: "the viscosity in mPas",
    ...positive,
    advice: "check the parameters and the temperature",
  });
}

const where = "vogelViscosity";
