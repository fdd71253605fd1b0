// Rate constants and the rate of a radical polymerisation, with the convention for termination said out loud.
import { checkNumber, checkNumbers, InputError, notNegative, positive, unknownName } from "../../door.js";
import { celsius } from "../ranges.js";
import { gasConstant_JmolK, kelvin } from "../scales.js";

/**
 * Rate at which double bonds are used up, Rp in mol/(m3 s), at steady radicals and without oxygen.
 *
 * - `doubleBonds_molm3`: [M], at least 0, mol/m3.
 * - `propagation_m3mols`: kp, above 0, m3/(mol s).
 * - `termination_m3mols`: kt with d[R]/dt = Ri - 2 kt [R]^2, above 0, m3/(mol s).
 * - `radicalGeneration_molm3s`: Ri = n phi Ia (n radicals per cleavage), at least 0, mol/(m3 s).
 *
 * Rp = kp [M] sqrt(Ri / (2 kt)). With n = 2 it is the usual kp [M] sqrt(phi Ia / kt).
 *
 * Assumes constant rate constants and radicals that end each other in pairs. Exposure and irradiance are then not
 * exchangeable: at four times the irradiance equal exposure converts half as much.
 * @throws InputError when an argument is out of range.
 * @source P. J. Flory, Principles of Polymer Chemistry, Cornell 1953, chapter 4 (from memory).
 * @example
 * ```ts
 * import { polymerisationRate } from "resinwright";
 * polymerisationRate({
 *   doubleBonds_molm3: 8200,
 *   propagation_m3mols: 25,
 *   termination_m3mols: 2500,
 *   radicalGeneration_molm3s: 0.5,
 * }); // → 2050
 * ```
 */
export function polymerisationRate(input: {
  readonly doubleBonds_molm3: number;
  readonly propagation_m3mols: number;
  readonly termination_m3mols: number;
  readonly radicalGeneration_molm3s: number;
}): number {
  const where = "polymerisationRate";
  checkNumbers(where, input, {
    doubleBonds_molm3: notNegative,
    propagation_m3mols: positive,
    termination_m3mols: positive,
    radicalGeneration_molm3s: notNegative,
  });
  const { doubleBonds_molm3: M, propagation_m3mols: kp } = input;
  const R = Math.sqrt(input.radicalGeneration_molm3s / 2 / input.termination_m3mols);
  return checkNumber(kp * M * R, { where, field: "the rate in mol/(m3 s)" });
}

/** How a source writes termination: `-2kt`: d[R]/dt = -2 kt [R]^2, as this library does; `-kt`: d[R]/dt = -kt [R]^2. */
export type TerminationConvention = "-2kt" | "-kt";

/**
 * A termination constant in this library's convention, d[R]/dt = Ri - 2 kt [R]^2, in m3/(mol s).
 *
 * - `termination_m3mols`: as printed, above 0, m3/(mol s).
 * - `convention`: of the source; `-kt` is halved. Taken for the other, it moves every rate by sqrt 2.
 * @throws InputError when the constant is not above 0 or the convention is not known.
 * @source Definition.
 * @example
 * ```ts
 * import { terminationConstant } from "resinwright";
 * terminationConstant({ termination_m3mols: 5000, convention: "-kt" }); // → 2500
 * ```
 */
export function terminationConstant(input: {
  readonly termination_m3mols: number;
  readonly convention: TerminationConvention;
}): number {
  const where = "terminationConstant";
  const { termination_m3mols, convention } = input;
  checkNumber(termination_m3mols, { where, field: "termination_m3mols", ...positive });
  if (!(convention in divisors))
    throw new InputError(unknownName(where, "convention", String(convention), Object.keys(divisors)));
  return termination_m3mols / divisors[convention];
}

const divisors = { "-2kt": 1, "-kt": 2 } as const satisfies Record<TerminationConvention, number>;

/**
 * A rate constant at a temperature by Arrhenius, in m3/(mol s).
 *
 * - `prefactor_m3mols`: A, above 0, m3/(mol s); 1 L/(mol s) is 1e-3 m3/(mol s).
 * - `activationEnergy_Jmol`: Ea, at least 0, J/mol.
 * - `temperature_C`: above -273.15.
 *
 * k = A exp(-Ea / (R T)). Holds over the range of temperature it was fitted on.
 * @throws InputError when an argument is out of range.
 * @source Arrhenius; R is the molar gas constant, SI Brochure, 9th ed. 2019.
 * @example
 * ```ts
 * import { rateConstant } from "resinwright";
 * rateConstant({ prefactor_m3mols: 2.21e4, activationEnergy_Jmol: 17900, temperature_C: 20 }); // → 14.29
 * ```
 */
export function rateConstant(input: {
  readonly prefactor_m3mols: number;
  readonly activationEnergy_Jmol: number;
  readonly temperature_C: number;
}): number {
  const where = "rateConstant";
  checkNumbers(where, input, {
    prefactor_m3mols: positive,
    activationEnergy_Jmol: notNegative,
    temperature_C: celsius,
  });
  const T = kelvin(input.temperature_C);
  return input.prefactor_m3mols * Math.exp(-input.activationEnergy_Jmol / (gasConstant_JmolK * T));
}
