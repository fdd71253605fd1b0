// How fast oxygen diffuses in a resin nobody has measured: an estimate from the viscosity.
import { checkNumber, checkNumbers, positive } from "../../door.js";
import { celsius } from "../ranges.js";
import { kelvin } from "../scales.js";

/**
 * Diffusivity of oxygen in m2/s, estimated from the viscosity of the liquid.
 *
 * - `viscosity_mPas`: at the same temperature, above 0, mPa s.
 * - `temperature_C`: above -273.15, degrees Celsius.
 *
 * D = D_w (eta_w / eta)^(2/3) (T / 298.15 K), anchored on oxygen in water: D_w = 2.1e-9 m2/s, eta_w = 0.89 mPa s.
 *
 * Doubt: a factor of 2 to 3. The two-thirds power was found for small solutes at 25 C in liquids of 0.5 to 5000 mPa s;
 * the factor T is added here after Stokes and Einstein. Oligomer raises the viscosity more than it slows oxygen, so a
 * blend rich in oligomer has a higher D than this. A measured dead zone and induction time are better than any estimate.
 * @throws InputError when an argument is out of range.
 * @source T. G. Hiss, E. L. Cussler, AIChE J. 19 (1973) 698-703, doi 10.1002/aic.690190404 (abstract: the power);
 * 2.1e-9 m2/s in water at 25 C from memory.
 * @example
 * ```ts
 * import { diffusivityFromViscosity } from "resinwright";
 * diffusivityFromViscosity({ viscosity_mPas: 300, temperature_C: 25 }); // → 4.336e-11
 * ```
 */
export function diffusivityFromViscosity(input: {
  readonly viscosity_mPas: number;
  readonly temperature_C: number;
}): number {
  const where = "diffusivityFromViscosity";
  checkNumbers(where, input, { viscosity_mPas: positive, temperature_C: celsius });
  const T_K = kelvin(input.temperature_C);
  return checkNumber(
    waterDiffusivity_m2s * (waterViscosity_mPas / input.viscosity_mPas) ** (2 / 3) * (T_K / 298.15),
    {
      where,
      field: "the diffusivity",
      ...positive,
      advice: "the viscosity is beyond any liquid",
    },
  );
}

const waterDiffusivity_m2s = 2.1e-9;
const waterViscosity_mPas = 0.89;
