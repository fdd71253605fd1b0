// The cube-root rule for mixtures of hydrocarbons: another ideal, to see how much the choice of the ideal matters.
import { positive } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { checkFractions } from "../fractions.js";

/**
 * Viscosity of a mixture in mPa s, by the cube-root rule of Kendall and Monroe.
 *
 * - `moleFractions`: 0 to 1 each, adding up to 1 within 1e-9.
 * - `viscosities_mPas`: of each pure component at the temperature of the mixture, above 0.
 *
 * eta^(1/3) = sum_i x_i eta_i^(1/3).
 *
 * Assumes hydrocarbons, whose mixtures are close to ideal; for resins use {@link grunbergNissan} with a measured G.
 * @throws InputError on fractions that do not add up, a viscosity not above 0, or lists of different lengths.
 * @source J. Kendall, K. P. Monroe, J. Am. Chem. Soc. 39 (1917) 1787-1802 (from memory); given for hydrocarbons in Perry's
 * Chemical Engineers' Handbook, 7th ed. 1997, p. 2-367 (second hand).
 * @example
 * ```ts
 * import { kendallMonroe } from "resinwright";
 * kendallMonroe({ moleFractions: [0.5, 0.5], viscosities_mPas: [0.76, 0.59] }); // → 0.67142
 * ```
 */
export function kendallMonroe(mixture: {
  readonly moleFractions: NumberList;
  readonly viscosities_mPas: NumberList;
}): number {
  const { moleFractions, viscosities_mPas } = mixture;
  checkFractions("kendallMonroe", "moleFractions", moleFractions);
  checkList("kendallMonroe", "viscosities_mPas", viscosities_mPas, positive);
  checkSameLength("kendallMonroe", { moleFractions, viscosities_mPas });
  const root = Array.from(viscosities_mPas).reduce(
    (sum, eta, i) => sum + moleFractions[i]! * Math.cbrt(eta),
    0,
  );
  return root ** 3;
}
