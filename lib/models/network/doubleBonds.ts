// How many polymerisable double bonds a resin holds: the count that heat, shrinkage and crosslinks start from.
// Everything here follows from masses, molar masses and functionalities; nothing is fitted.
import { checkNumber } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { checkFractions } from "../fractions.js";
import { density, molarMass } from "../ranges.js";

/** What the count of double bonds depends on; one element a component, in the same order. */
export interface DoubleBondInput {
  /** w: 0 to 1 each, adding up to 1 within 1e-9; solutes and fillers included. */
  readonly massFractions: NumberList;
  /** f: double bonds in a molecule, 0 to 12; 0 for what does not polymerise. */
  readonly functionalities: NumberList;
  /** M: 1 to 1e7 g/mol; number average for an oligomer. */
  readonly molarMasses_gmol: NumberList;
}

/**
 * Concentration of double bonds in a resin before cure, mol/L.
 *
 * - `massFractions` w, `functionalities` f, `molarMasses_gmol` M of each component; `density_gcm3` of the blend, 0.1 to 25.
 *
 * [C=C] = 1000 rho sum_i (w_i f_i / M_i).
 * @throws InputError when the fractions do not add up, the lists differ in length, or a number is out of range.
 * @source Identity; amount concentration as IUPAC Green Book, 3rd ed. 2007, section 2.10 (from memory).
 * @example
 * ```ts
 * import { doubleBondConcentration } from "resinwright";
 * doubleBondConcentration({
 *   massFractions: [0.6, 0.4],
 *   functionalities: [2, 2],
 *   molarMasses_gmol: [470.56, 286.32],
 *   density_gcm3: 1.10273,
 * }); // → 5.8932
 * ```
 */
export function doubleBondConcentration(input: DoubleBondInput & { readonly density_gcm3: number }): number {
  const where = "doubleBondConcentration";
  const perGram_molg = doubleBondsPerGram(where, input).reduce((sum, one) => sum + one, 0);
  return 1000 * checkNumber(input.density_gcm3, { where, field: "density_gcm3", ...density }) * perGram_molg;
}

/** w_i f_i / M_i of each component, mol of double bonds in a gram of resin. @internal */
export function doubleBondsPerGram(where: string, input: DoubleBondInput): number[] {
  const { massFractions, functionalities, molarMasses_gmol } = input;
  checkFractions(where, "massFractions", massFractions);
  checkList(where, "functionalities", functionalities, { min: 0, max: 12 });
  checkList(where, "molarMasses_gmol", molarMasses_gmol, molarMass);
  checkSameLength(where, { massFractions, functionalities, molarMasses_gmol });
  return Array.from(massFractions, (w, i) => (w * functionalities[i]!) / molarMasses_gmol[i]!);
}
