// How warm a resin has to be to print: the temperature at which its viscosity has fallen to a limit.
import { checkNumber, checkNumbers, InputError, positive } from "../../door.js";
import { findRoot } from "../../numerics/root.js";
import { celsius } from "../ranges.js";

/** What is asked: a viscosity that falls with temperature, a limit, and how cold and how warm the vat can be. */
export interface TemperatureQuestion {
  /** Viscosity in mPa s at a temperature in degrees Celsius: a law, a blend, a filled resin, whatever falls with it. */
  readonly viscosityAt: (temperature_C: number) => number;
  readonly limit_mPas: number;
  readonly coolest_C: number;
  readonly warmest_C: number;
}

/** The temperature, or why there is none between the coolest and the warmest. */
export type TemperatureAnswer =
  | { readonly outcome: "warm-to"; readonly temperature_C: number }
  | { readonly outcome: "thin-enough"; readonly viscosity_mPas: number }
  | { readonly outcome: "too-thick"; readonly viscosity_mPas: number };

/**
 * How warm a resin must be for its viscosity to reach a limit.
 *
 * - `viscosityAt`: mPa s as a function of degrees Celsius, falling between the two temperatures.
 * - `limit_mPas`: above 0, mPa s.
 * - `coolest_C`, `warmest_C`: the temperatures the vat can have, degrees Celsius, the first below the second.
 *
 * Solves ln eta(T) = ln limit between the two by Brent's method. `thin-enough`: already at the coolest temperature, whose
 * viscosity is given; `too-thick`: not even at the warmest, whose viscosity is given.
 *
 * For a worst case pass the upper end of a prediction interval as `viscosityAt`. It says nothing of what warmth does to
 * the resin's shelf life or its oxygen.
 * @throws InputError when a number is out of range, the temperatures are not in order, the viscosity is not a finite
 * number above 0, or it is higher at the warmest temperature than at the coolest.
 * @source Identity.
 * @example
 * ```ts
 * import { andradeFromReference, andradeViscosity, temperatureForViscosity } from "resinwright";
 * const law = andradeFromReference({ viscosity_mPas: 2400, referenceTemperature_C: 25, activation_K: 5200 });
 * const answer = temperatureForViscosity({
 *   viscosityAt: (temperature_C) => andradeViscosity({ ...law, temperature_C }),
 *   limit_mPas: 1000,
 *   coolest_C: 20,
 *   warmest_C: 60,
 * });
 * answer.outcome === "warm-to" && answer.temperature_C; // → 40.76
 * ```
 */
export function temperatureForViscosity(question: TemperatureQuestion): TemperatureAnswer {
  const { viscosityAt, limit_mPas, coolest_C, warmest_C } = question;
  checkNumbers(
    where,
    { limit_mPas, coolest_C, warmest_C },
    { limit_mPas: positive, coolest_C: celsius, warmest_C: celsius },
  );
  if (coolest_C >= warmest_C) {
    throw new InputError(
      `${where}: coolest_C is ${coolest_C} and warmest_C is ${warmest_C}; the first must be below the second`,
    );
  }
  const eta = (temperature_C: number): number =>
    checkNumber(viscosityAt(temperature_C), {
      where,
      field: `the viscosity at ${temperature_C} °C in mPas`,
      ...positive,
    });
  const [atCoolest, atWarmest] = [eta(coolest_C), eta(warmest_C)];
  if (atWarmest > atCoolest) {
    throw new InputError(
      `${where}: the viscosity rises from ${atCoolest} mPas at ${coolest_C} °C to ${atWarmest} mPas at ${warmest_C} °C; ` +
        "it must fall with temperature",
    );
  }
  if (atCoolest <= limit_mPas) return { outcome: "thin-enough", viscosity_mPas: atCoolest };
  if (atWarmest > limit_mPas) return { outcome: "too-thick", viscosity_mPas: atWarmest };
  const f = (temperature_C: number): number => Math.log(eta(temperature_C) / limit_mPas);
  return { outcome: "warm-to", temperature_C: findRoot({ f, low: coolest_C, high: warmest_C, where }) };
}

const where = "temperatureForViscosity";
