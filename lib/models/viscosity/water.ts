// Viscosity of water, known to a percent or better: the liquid every laboratory has for checking its viscometer.
import { checkNumbers } from "../../door.js";
import { kelvin } from "../scales.js";

/**
 * Viscosity of liquid water at 0.1 MPa in mPa s.
 *
 * - `temperature_C`: -20 to 110 degrees Celsius (supercooled and superheated liquid included).
 *
 * eta / uPa s = 280.68 t^-1.9 + 511.45 t^-7.7 + 61.131 t^-19.6 + 0.45903 t^-40, t = T / 300 K.
 *
 * Assumes pure water; the release states 1 % uncertainty for 293 to 373 K at most (from memory).
 * @throws InputError outside the range of the equation.
 * @source IAPWS SR6-08(2011), Revised Supplementary Release on Properties of Liquid Water at 0.1 MPa, equation 7;
 * M. L. Huber et al., J. Phys. Chem. Ref. Data 38 (2009) 101-125, doi 10.1063/1.3088050 (doi from memory).
 * @example
 * ```ts
 * import { waterViscosity } from "resinwright";
 * waterViscosity({ temperature_C: 20 }); // → 1.0016
 * ```
 */
export function waterViscosity({ temperature_C }: { readonly temperature_C: number }): number {
  checkNumbers("waterViscosity", { temperature_C }, { temperature_C: range });
  const t = kelvin(temperature_C) / 300;
  return (280.68 * t ** -1.9 + 511.45 * t ** -7.7 + 61.131 * t ** -19.6 + 0.45903 * t ** -40) / 1000;
}

const range = {
  min: -20,
  max: 110,
  advice: "the equation holds for liquid water from -20 to 110 °C",
} as const;
