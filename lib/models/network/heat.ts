// Heat of polymerisation of a resin, and how hot it gets when none of that heat can leave.
// The upper limit of what a forgotten cup in the light can do.
import { checkNumber, checkNumbers, fraction, notNegative, positive } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { doubleBondsPerGram, type DoubleBondInput } from "./doubleBonds.js";

/**
 * Heat that a gram of resin gives off when all its double bonds react, J/g.
 *
 * - `massFractions` w, `functionalities` f, `molarMasses_gmol` M of each component;
 *   `heatsOfPolymerisation_Jmol` dH: per mole of double bonds, 0 to 2e5, counted as given off; 0 where f is 0.
 *
 * q = sum_i (w_i f_i dH_i / M_i).
 * @throws InputError when the fractions do not add up, the lists differ in length, or a number is out of range.
 * @source Identity: heat adds up over the bonds that react.
 * @example
 * ```ts
 * import { polymerisationHeat } from "resinwright";
 * polymerisationHeat({
 *   massFractions: [0.6, 0.4],
 *   functionalities: [2, 2],
 *   molarMasses_gmol: [470.56, 286.32],
 *   heatsOfPolymerisation_Jmol: [56000, 56000],
 * }); // → 299
 * ```
 */
export function polymerisationHeat(
  input: DoubleBondInput & { readonly heatsOfPolymerisation_Jmol: NumberList },
): number {
  const where = "polymerisationHeat";
  const { massFractions, heatsOfPolymerisation_Jmol } = input;
  const bonds_molg = doubleBondsPerGram(where, input);
  checkList(where, "heatsOfPolymerisation_Jmol", heatsOfPolymerisation_Jmol, {
    ...notNegative,
    max: 2e5,
    advice: "give it in J/mol of double bonds, as heat given off",
  });
  checkSameLength(where, { massFractions, heatsOfPolymerisation_Jmol });
  return bonds_molg.reduce((q, bonds, i) => q + bonds * heatsOfPolymerisation_Jmol[i]!, 0);
}

/**
 * Temperature rise of a resin that polymerises without losing heat, K.
 *
 * - `heat_Jg` q: heat at full conversion, at least 0; `conversion` X: 0 to 1; `heatCapacity_JgK` cp: above 0.
 *
 * dT = X q / cp. Assumes a heat capacity that does not change with temperature or conversion, and no evaporation: a rise of
 * hundreds of kelvin means fumes or fire, not that temperature.
 * @throws InputError when a field is out of range.
 * @source Identity: heat balance without losses.
 * @example
 * ```ts
 * import { adiabaticRise } from "resinwright";
 * adiabaticRise({ heat_Jg: 707.12, conversion: 1, heatCapacity_JgK: 1.8 }); // → 392.8
 * ```
 */
export function adiabaticRise(input: {
  readonly heat_Jg: number;
  readonly conversion: number;
  readonly heatCapacity_JgK: number;
}): number {
  const where = "adiabaticRise";
  checkNumbers(where, input, { heat_Jg: notNegative, conversion: fraction, heatCapacity_JgK: positive });
  const rise_K = (input.conversion * input.heat_Jg) / input.heatCapacity_JgK;
  return checkNumber(rise_K, { where, field: "the rise in K", advice: "give heatCapacity_JgK in J/(g K)" });
}
