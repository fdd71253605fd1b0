// Viscosity of a pure liquid from the five constants of the handbooks, which list many monomers in this form.
import { checkNumber, checkNumbers, InputError, positive } from "../../door.js";
import { checkList } from "../../numerics/lists.js";
import { celsius } from "../ranges.js";
import { kelvin } from "../scales.js";

/**
 * Viscosity in mPa s at a temperature, from five handbook constants.
 *
 * - `constants`: C1 to C5 as listed for viscosities in Pa s and temperatures in K.
 * - `temperature_C`: above -273.15, degrees Celsius; keep to the range listed beside the constants.
 *
 * ln(eta / Pa s) = C1 + C2 / T + C3 ln T + C4 T^C5.
 * @throws InputError when there are not five constants, or the viscosity is beyond the range of numbers.
 * @source Perry's Chemical Engineers' Handbook, 8th ed. 2008, table 2-313.
 * @example
 * ```ts
 * import { fiveConstantViscosity } from "resinwright";
 * fiveConstantViscosity({ constants: [-0.099, 496, -1.5939, 0, 0], temperature_C: 25 }); // → 0.5439
 * ```
 */
export function fiveConstantViscosity(input: {
  readonly constants: readonly [number, number, number, number, number];
  readonly temperature_C: number;
}): number {
  const where = "fiveConstantViscosity";
  const { constants, temperature_C } = input;
  checkList(where, "constants", constants);
  if (constants.length !== 5) {
    throw new InputError(
      `${where}: constants holds ${constants.length as number} numbers; it must hold 5, C1 to C5`,
    );
  }
  checkNumbers(where, { temperature_C }, { temperature_C: celsius });
  const [C1, C2, C3, C4, C5] = constants;
  const T = kelvin(temperature_C);
  return checkNumber(1000 * Math.exp(C1 + C2 / T + C3 * Math.log(T) + C4 * T ** C5), {
    where,
    field: "the viscosity in mPas",
    ...positive,
    advice: "check the constants, their unit and the temperature",
  });
}
