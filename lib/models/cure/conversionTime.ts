// How long a radical polymerisation takes to a conversion once oxygen is gone: the classical steady state.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";

/**
 * Time in s in which double bonds convert to a given share, in steady light and without oxygen.
 *
 * - `conversion`: of the double bonds, at least 0 and below 1.
 * - `propagation_m3mols`: kp, above 0, m3/(mol s).
 * - `termination_m3mols`: kt with d[R]/dt = Ri - 2 kt [R]^2, above 0, m3/(mol s); halve a kt given for -kt [R]^2.
 * - `radicalGeneration_molm3s`: Ri, above 0, mol/(m3 s).
 *
 * [R] = sqrt(Ri / (2 kt)), t = -ln(1 - X) / (kp [R]).
 *
 * Assumes rate constants that do not change with conversion and steady radicals. Real resins speed up at first (gel
 * effect) and stop short of full conversion (vitrification): use it for low conversions.
 * @throws InputError when an argument is out of range.
 * @source P. J. Flory, Principles of Polymer Chemistry, Cornell 1953, chapter 4 (from memory).
 * @example
 * ```ts
 * import { steadyConversionTime } from "resinwright";
 * steadyConversionTime({
 *   conversion: 0.2,
 *   propagation_m3mols: 25,
 *   termination_m3mols: 2500,
 *   radicalGeneration_molm3s: 0.5,
 * }); // → 0.8926
 * ```
 */
export function steadyConversionTime(input: {
  readonly conversion: number;
  readonly propagation_m3mols: number;
  readonly termination_m3mols: number;
  readonly radicalGeneration_molm3s: number;
}): number {
  const where = "steadyConversionTime";
  checkNumbers(where, input, {
    conversion: { ...notNegative, max: 1 - Number.EPSILON / 2, advice: "full conversion is never reached" },
    propagation_m3mols: positive,
    termination_m3mols: positive,
    radicalGeneration_molm3s: positive,
  });
  const {
    conversion: X,
    propagation_m3mols: kp,
    termination_m3mols: kt,
    radicalGeneration_molm3s: Ri,
  } = input;
  const R = Math.sqrt(Ri / 2 / kt);
  return checkNumber(-Math.log1p(-X) / (kp * R), {
    where,
    field: "the time in s",
    advice: "the light is too weak, or a rate constant is not in m3/(mol s)",
  });
}
