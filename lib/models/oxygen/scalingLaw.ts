// The published scaling law of the dead zone in continuous printing, and what its constant means.
import { checkNumber, checkNumbers, positive } from "../../door.js";

/**
 * Dead-zone thickness in um by the scaling law of continuous printing.
 *
 * - `scalingConstant_umsqrts`: C_s, above 0, um s^(-1/2), the root of a diffusivity; 30 was found for a 100 um window
 *   of amorphous fluoropolymer with air below.
 * - `curingRate_pers`: Phi0 alpha_PI / Dc0, above 0, 1/s: photons absorbed by the initiator per volume and time over
 *   the photons absorbed per volume that cure the resin.
 *
 * thickness = C_s (Phi0 alpha_PI / Dc0)^(-1/2).
 *
 * Assumes a window that hardly resists oxygen, light that hardly decays across the dead zone, and a steady state.
 * `deadZone` does without these.
 * @throws InputError when an argument is out of range.
 * @source J. R. Tumbleston et al., Science 347 (2015) 1349-1352, doi 10.1126/science.aaa2397, equation 1 (read in
 * secondary sources).
 * @example
 * ```ts
 * import { scalingLawDeadZone } from "resinwright";
 * scalingLawDeadZone({ scalingConstant_umsqrts: 30, curingRate_pers: 2.25 }); // → 20
 * ```
 */
export function scalingLawDeadZone(input: {
  readonly scalingConstant_umsqrts: number;
  readonly curingRate_pers: number;
}): number {
  const where = "scalingLawDeadZone";
  checkNumbers(where, input, { scalingConstant_umsqrts: positive, curingRate_pers: positive });
  return checkNumber(input.scalingConstant_umsqrts / Math.sqrt(input.curingRate_pers), {
    where,
    field: "the thickness in um",
  });
}

/**
 * The constant of the scaling law from the diffusivity of oxygen, in um s^(-1/2).
 *
 * - `diffusivity_m2s`: of oxygen in the resin, above 0, m2/s.
 *
 * C_s = sqrt(2 D). Derivation: with uniform light and no film the dead zone is sqrt(2 D C* / (s Ri)), and
 * Ri = phi alpha_PI Phi0; if the dose that cures is the dose that uses up the oxygen, Dc0 = C* / (s phi), this is
 * sqrt(2 D) (Phi0 alpha_PI / Dc0)^(-1/2). A dose that holds more than oxygen makes the constant smaller.
 * @throws InputError when the diffusivity is not above 0.
 * @source Derived for this library. The published 30 um s^(-1/2) corresponds to D = 4.5e-10 m2/s.
 * @example
 * ```ts
 * import { scalingConstantFromDiffusivity } from "resinwright";
 * scalingConstantFromDiffusivity({ diffusivity_m2s: 4.5e-10 }); // → 30
 * ```
 */
export function scalingConstantFromDiffusivity(input: { readonly diffusivity_m2s: number }): number {
  const where = "scalingConstantFromDiffusivity";
  checkNumbers(where, input, { diffusivity_m2s: positive });
  return Math.sqrt(2 * input.diffusivity_m2s * 1e12);
}
