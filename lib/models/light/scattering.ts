// Filled resins: particles of another refractive index scatter the light, which shortens the depth it cures.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { um_per_cm } from "../scales.js";

/** What the scattering of a filled resin depends on. */
export interface ScatteringResin {
  /** d: mean particle diameter, above 0, um. */
  readonly particleDiameter_um: number;
  /** n0: of the liquid at the wavelength of the light, 1 to 4. */
  readonly refractiveIndex: number;
  /** Of the particles at the same wavelength, 1 to 4. */
  readonly particleRefractiveIndex: number;
  /** Q: dimensionless, above 0; falls with the ratio of particle spacing to wavelength, so it is fitted to the resin. */
  readonly scatteringEfficiency: number;
}

/**
 * What scattering adds to the slope of the working curve, 1/cm; add it to the Napierian absorption.
 *
 * - `particleDiameter_um` d, `refractiveIndex` n0, `particleRefractiveIndex` n0 + dn, `scatteringEfficiency` Q.
 *
 * 1/Dp = (3 Q / (2 d)) (dn / n0)^2 + alpha; this function gives the first term, 0 for an index-matched filler.
 *
 * Assumes a dense suspension in which light is scattered many times. Q holds for one filler, one loading and one
 * wavelength: take it from a measured working curve.
 * @throws InputError when an argument is out of range.
 * @source M. L. Griffith, J. W. Halloran, J. Appl. Phys. 81 (1997) 2538, doi 10.1063/1.364311 (form and doi from memory).
 * Sum with absorption: 1/Dp is linear in initiator and dye, abstract of V. Tomeckova, J. W. Halloran, J. Eur. Ceram. Soc.
 * 30 (2010) 3023-3033.
 * @example
 * ```ts
 * import { scatteringCoefficient } from "resinwright";
 * scatteringCoefficient({
 *   particleDiameter_um: 0.5,
 *   refractiveIndex: 1.46,
 *   particleRefractiveIndex: 1.56,
 *   scatteringEfficiency: 0.5,
 * }); // → 70.4
 * ```
 */
export function scatteringCoefficient(input: ScatteringResin): number {
  const where = "scatteringCoefficient";
  const index = { min: 1, max: 4 };
  checkNumbers(where, input, {
    particleDiameter_um: positive,
    refractiveIndex: index,
    particleRefractiveIndex: index,
    scatteringEfficiency: positive,
  });
  const { particleDiameter_um: d, refractiveIndex: n0, scatteringEfficiency: Q } = input;
  const dn = input.particleRefractiveIndex - n0;
  return checkNumber(((3 * Q) / (2 * (d / um_per_cm))) * (dn / n0) ** 2, {
    where,
    field: "the scattering in 1/cm",
  });
}

/**
 * Slope of the working curve of a filled resin, Dp in um: scattering beside absorption.
 *
 * - the fields of `scatteringCoefficient`;
 * - `napierianAbsorption_percm`: of everything that absorbs in the filled resin, at least 0, 1/cm.
 *
 * 1/Dp = (3 Q / (2 d)) (dn / n0)^2 + alpha. It is a working-curve depth, not an optical one: scattered light is not lost.
 *
 * Assumes what `scatteringCoefficient` does.
 * @throws InputError when an argument is out of range, or there is neither scattering nor absorption.
 * @source As `scatteringCoefficient`.
 * @example
 * ```ts
 * import { filledPenetrationDepth } from "resinwright";
 * filledPenetrationDepth({
 *   particleDiameter_um: 0.5,
 *   refractiveIndex: 1.46,
 *   particleRefractiveIndex: 1.56,
 *   scatteringEfficiency: 0.5,
 *   napierianAbsorption_percm: 30,
 * }); // → 99.6
 * ```
 */
export function filledPenetrationDepth(
  input: ScatteringResin & { readonly napierianAbsorption_percm: number },
): number {
  const where = "filledPenetrationDepth";
  const { napierianAbsorption_percm, ...resin } = input;
  checkNumber(napierianAbsorption_percm, { where, field: "napierianAbsorption_percm", ...notNegative });
  const total_percm = checkNumber(scatteringCoefficient(resin) + napierianAbsorption_percm, {
    where,
    field: "scattering and absorption together",
    ...positive,
    advice: "light that is neither scattered nor absorbed has no depth; include the background of the resin",
  });
  return um_per_cm / total_percm;
}
