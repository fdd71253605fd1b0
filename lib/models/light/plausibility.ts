// Catches the commonest slip in a table of absorption coefficients: a value per gram that is labelled as one per mole.
import { checkNumber, checkNumbers, InputError, notNegative, unknownName } from "../../door.js";
import type { Warning } from "../../result.js";
import { molarMass } from "../ranges.js";
import { molarAbsorptionFromMassAbsorption } from "./absorption.js";

/** What absorbs. `monobenzoyl`: one benzoyl group and nothing larger; `organic`: any organic substance. */
export type Chromophore = "monobenzoyl" | "organic";

/**
 * Warnings about a molar absorption coefficient that its chromophore cannot have; empty when it can.
 *
 * - `molarAbsorption_Lmolcm`: the highest of the spectrum, decadic, L/(mol cm), at least 0.
 * - `molarMass_gmol`: 1 to 1e7 g/mol.
 * - `chromophore`: `monobenzoyl` (most 2e4) or `organic` (most 3e5).
 *
 * Code `mass-value-as-molar`: above the limit, but possible if the figure is read as mL/(g cm); code `beyond-chromophore`:
 * above the limit either way.
 *
 * A value within the limit can still be wrong: a weak band labelled wrongly stays below it.
 * @throws InputError when an argument is out of range or the chromophore is not known.
 * @source Limit of one benzoyl group: acetophenone reaches 12 800 L/(mol cm) at 242 nm (ethanol; Mariella 1952, in an open
 * spectra collection) and benzophenone 19 400 at 248 to 252 nm (Ito 1984, same collection). Any organic substance: the
 * strongest cyanine dyes reach about 2.5e5 (from memory).
 * @example
 * ```ts
 * import { molarAbsorptionWarnings } from "resinwright";
 * const warnings = molarAbsorptionWarnings({
 *   molarAbsorption_Lmolcm: 33170,
 *   molarMass_gmol: 204.26,
 *   chromophore: "monobenzoyl",
 * });
 * warnings[0]?.code; // → "mass-value-as-molar"
 * ```
 */
export function molarAbsorptionWarnings(input: {
  readonly molarAbsorption_Lmolcm: number;
  readonly molarMass_gmol: number;
  readonly chromophore: Chromophore;
}): Warning[] {
  const { molarAbsorption_Lmolcm: eps, molarMass_gmol, chromophore } = input;
  checkNumber(eps, { where, field: "molarAbsorption_Lmolcm", ...notNegative });
  checkNumbers(where, { molarMass_gmol }, { molarMass_gmol: molarMass });
  if (!(chromophore in ceilings))
    throw new InputError(unknownName(where, "chromophore", String(chromophore), Object.keys(ceilings)));
  const { most, named } = ceilings[chromophore];
  if (eps <= most) return [];
  const asMass = molarAbsorptionFromMassAbsorption({ massAbsorption_mLgcm: eps, molarMass_gmol });
  const beyond = `${eps} L/(mol cm) is more than ${named} can have (${most})`;
  if (asMass > most) {
    return [
      { code: "beyond-chromophore", message: `${beyond}; check the figure, its unit and the chromophore` },
    ];
  }
  const reading = `read as mL/(g cm) it is ${Math.round(asMass)} L/(mol cm)`;
  return [
    {
      code: "mass-value-as-molar",
      message: `${beyond}; ${reading}, which it can: the label in the source is probably wrong`,
    },
  ];
}

const where = "molarAbsorptionWarnings";

const ceilings = {
  monobenzoyl: { most: 2e4, named: "one benzoyl group" },
  organic: { most: 3e5, named: "any organic substance" },
} as const satisfies Record<Chromophore, object>;
