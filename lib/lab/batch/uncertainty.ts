// How the doubt of each weighing becomes the doubt of each mass fraction.

import { checkNumber, notNegative } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";

/**
 * Standard uncertainties of the mass fractions of a mixture, from those of the masses weighed together.
 *
 * - `masses_g` m: at least 0 each, not all 0; `uncertainties_g` u: standard uncertainty of each mass, at least 0.
 *
 * u(w_i)² = [((1 - w_i) u_i)² + sum over j ≠ i of (w_i u_j)²] / M², M = sum of m, w = m / M. Assumes independent weighings.
 * @throws InputError when the lists differ in length, a number is out of range, or nothing was weighed.
 * @source Law of propagation of uncertainty: JCGM 100:2008 (GUM), equation 10, of w_i = m_i / M.
 * @example
 * ```ts
 * import { massFractionUncertainties } from "resinwright";
 * massFractionUncertainties({ masses_g: [60, 39, 1], uncertainties_g: [0.0141421, 0.0141421, 0.0141421] })[2]; // → 1.40021e-4
 * ```
 */
export function massFractionUncertainties({
  masses_g,
  uncertainties_g,
}: {
  readonly masses_g: NumberList;
  readonly uncertainties_g: NumberList;
}): number[] {
  const where = "massFractionUncertainties";
  checkList(where, "masses_g", masses_g, notNegative);
  checkList(where, "uncertainties_g", uncertainties_g, notNegative);
  checkSameLength(where, { masses_g, uncertainties_g });
  const masses = Array.from(masses_g);
  const total = masses.reduce((sum, m) => sum + m, 0);
  checkNumber(total, { where, field: "the sum of masses_g", min: 0, above: true });
  return mixtureUncertainties(
    masses.map((mass_g, p) => ({
      mass_g,
      u_g: uncertainties_g[p]!,
      fractions: masses.map((_, i) => (i === p ? { massFraction: 1, u: 0 } : { massFraction: 0, u: 0 })),
    })),
  );
}

/** A portion that went into a mixture: its mass, and how much of each ingredient it holds. */
export interface WeighedPortion {
  readonly mass_g: number;
  readonly u_g: number;
  /** One element an ingredient of the mixture. */
  readonly fractions: readonly { readonly massFraction: number; readonly u: number }[];
}

/**
 * The same where a portion may itself be a mixture, c_pi of ingredient i in portion p:
 * u(w_i)² = sum over p of ((c_pi - w_i) u_p / M)² + (m_p u(c_pi) / M)².
 */
export function mixtureUncertainties(portions: readonly WeighedPortion[]): number[] {
  const M = portions.reduce((sum, { mass_g }) => sum + mass_g, 0);
  return portions[0]!.fractions.map((_, i) => {
    const w = portions.reduce(
      (sum, { mass_g, fractions }) => sum + (fractions[i]!.massFraction * mass_g) / M,
      0,
    );
    return Math.hypot(
      ...portions.flatMap(({ mass_g, u_g, fractions }) => [
        ((fractions[i]!.massFraction - w) * u_g) / M,
        (mass_g * fractions[i]!.u) / M,
      ]),
    );
  });
}
