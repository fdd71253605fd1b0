// The Grunberg-Nissan rule for one set of liquids at one temperature, made ready once and asked millions of times.
// For searches and draws over compositions: no allocation and no logarithm per blend.
import { checkNumber, positive } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { checkFractions } from "../fractions.js";
import { checkBasis, checkInteractions, type GrunbergNissanMixture } from "./grunbergNissan.js";

/** Viscosity in mPa s of the blend with these fractions, in the order of the liquids prepared. */
export type PreparedBlend = (fractions: NumberList) => number;

/**
 * A function from fractions to viscosity in mPa s, for liquids and interactions that stay the same.
 *
 * - `viscosities_mPas`, `basis`, `interactions`: as {@link grunbergNissan} takes them.
 *
 * ln eta = sum_i x_i (ln eta_i + sum_{j<i} x_j G_ij): the same rule, with the logarithms and the table of G worked out
 * beforehand. The function checks its fractions as `grunbergNissan` does; it may be called with one array changed in place.
 * @throws InputError as {@link grunbergNissan}, here for the liquids and in the function for the fractions.
 * @source L. Grunberg, A. H. Nissan, Nature 164 (1949) 799-800, doi 10.1038/164799b0 (doi from memory).
 * @example
 * ```ts
 * import { prepareBlend } from "resinwright";
 * const viscosity = prepareBlend({
 *   viscosities_mPas: [900, 9],
 *   basis: "mass",
 *   interactions: [{ first: 0, second: 1, G: -1, basis: "mass" }],
 * });
 * viscosity([0.5, 0.5]); // → 70.09
 * viscosity([0.6, 0.4]); // → 112.2
 * ```
 */
export function prepareBlend(liquids: Omit<GrunbergNissanMixture, "fractions">): PreparedBlend {
  const { viscosities_mPas, basis, interactions } = liquids;
  checkBasis(where, basis);
  checkList(where, "viscosities_mPas", viscosities_mPas, positive);
  const n = viscosities_mPas.length;
  checkInteractions(where, interactions, { basis, components: n });
  const lnEta = Float64Array.from(viscosities_mPas, Math.log);
  const G = new Float64Array(n * n);
  for (const pair of interactions) {
    G[Math.max(pair.first, pair.second) * n + Math.min(pair.first, pair.second)] = pair.G;
  }
  return (x) => {
    let total = 0;
    let sum = 0;
    let allowed = x.length === n;
    for (let i = 0; i < n; i++) {
      const xi = x[i]!;
      // Not "xi < 0": NaN has to be caught as well.
      if (!(xi >= 0)) allowed = false;
      total += xi;
      let pull = lnEta[i]!;
      for (let j = 0; j < i; j++) pull += x[j]! * G[i * n + j]!;
      sum += xi * pull;
    }
    const eta = Math.exp(sum);
    if (allowed && Math.abs(total - 1) <= 1e-9 && eta > 0 && eta < Infinity) return eta;
    return refuse(x, viscosities_mPas, eta);
  };
}

const where = "prepareBlend";

/** Off the fast path: finds out which rule was broken, and says so. */
function refuse(fractions: NumberList, viscosities_mPas: NumberList, eta: number): number {
  checkFractions(where, "fractions", fractions);
  checkSameLength(where, { fractions, viscosities_mPas });
  return checkNumber(eta, {
    where,
    field: "the viscosity of the mixture in mPas",
    ...positive,
    advice: "check the G of each pair",
  });
}
