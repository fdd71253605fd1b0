// Viscosity of a liquid mixture from its pure components: the Grunberg-Nissan rule, any number of components.
import { checkNumber, InputError, positive, show, unknownName } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { checkFractions } from "../fractions.js";

/** What the fractions of a mixing rule count. */
export type MixingBasis = "mole" | "mass" | "volume";

/** How two components, named by their place in the list, depart from the ideal mixture; only true on its basis. */
export interface PairInteraction {
  readonly first: number;
  readonly second: number;
  /** Dimensionless; negative when the mixture is thinner than the ideal one. */
  readonly G: number;
  readonly basis: MixingBasis;
}

/** A mixture as `grunbergNissan` takes it. */
export interface GrunbergNissanMixture {
  readonly fractions: NumberList;
  readonly viscosities_mPas: NumberList;
  readonly basis: MixingBasis;
  readonly interactions: readonly PairInteraction[];
}

/**
 * Viscosity of a mixture in mPa s, by Grunberg and Nissan.
 *
 * - `fractions`: 0 to 1 each, adding up to 1 within 1e-9, counted on `basis`.
 * - `viscosities_mPas`: of each pure component at the temperature of the mixture, above 0.
 * - `basis`: `mole` (as published), `mass` or `volume`: what the fractions count.
 * - `interactions`: G of each pair that has one, on the same basis; a pair left out counts as ideal, G = 0.
 *
 * ln eta = sum_i x_i ln eta_i + sum_{i<j} x_i x_j G_ij.
 *
 * Assumes Newtonian liquids without filler, one temperature, and a G that does not depend on composition. Over 460
 * published binaries one fitted G leaves 2 % (median); no G at all leaves 8 % (median) and 35 % in one case of ten.
 * @throws InputError on fractions that do not add up, a viscosity not above 0, lists of different lengths, an
 * interaction on another basis, of a component with itself, given twice, or naming a component that is not there.
 * @source L. Grunberg, A. H. Nissan, Nature 164 (1949) 799-800, doi 10.1038/164799b0 (doi from memory); the sum over pairs as B. E.
 * Poling, J. M. Prausnitz, J. P. O'Connell, The Properties of Gases and Liquids, 5th ed. 2001, chapter 9 (from memory).
 * @example
 * ```ts
 * import { grunbergNissan } from "resinwright";
 * grunbergNissan({
 *   fractions: [0.5, 0.5],
 *   viscosities_mPas: [900, 9],
 *   basis: "mass",
 *   interactions: [{ first: 0, second: 1, G: -1, basis: "mass" }],
 * }); // → 70.09
 * ```
 */
export function grunbergNissan(mixture: GrunbergNissanMixture): number {
  checkMixture(mixture);
  const { fractions: x, viscosities_mPas, interactions } = mixture;
  const ideal = Array.from(viscosities_mPas).reduce((sum, eta, i) => sum + x[i]! * Math.log(eta), 0);
  const excess = interactions.reduce((sum, { first: i, second: j, G }) => sum + x[i]! * x[j]! * G, 0);
  return checkNumber(Math.exp(ideal + excess), {
    where,
    field: "the viscosity of the mixture in mPas",
    ...positive,
    advice: "check the G of each pair",
  });
}

/**
 * Refuses a basis other than mole, mass and volume.
 * @throws InputError with the nearest known name.
 */
export function checkBasis(where: string, basis: MixingBasis): void {
  if (!bases.includes(basis)) throw new InputError(unknownName(where, "basis", String(basis), bases));
}

const where = "grunbergNissan";
const bases: readonly MixingBasis[] = ["mole", "mass", "volume"];

function checkMixture({ fractions, viscosities_mPas, basis, interactions }: GrunbergNissanMixture): void {
  checkBasis(where, basis);
  checkFractions(where, "fractions", fractions);
  checkList(where, "viscosities_mPas", viscosities_mPas, positive);
  checkSameLength(where, { fractions, viscosities_mPas });
  checkInteractions(where, interactions, { basis, components: fractions.length });
}

/**
 * Refuses interactions that do not belong to the mixture.
 * @throws InputError on one that is on another basis, of a component with itself, given twice, or of none that is there.
 */
export function checkInteractions(
  where: string,
  interactions: readonly PairInteraction[],
  { basis, components }: { readonly basis: MixingBasis; readonly components: number },
): void {
  const seen = new Set<string>();
  interactions.forEach((pair, k) => {
    const field = `${where}: interactions[${k}]`;
    checkNumber(pair.G, { where, field: `interactions[${k}].G` });
    checkPair(field, pair, components);
    if (pair.basis !== basis) {
      throw new InputError(
        `${field} was found on the ${pair.basis} basis and the fractions are on the ${basis} basis; ` +
          `convert the fractions or fit G again on the ${basis} basis`,
      );
    }
    const key = [pair.first, pair.second].sort((a, b) => a - b).join(" and ");
    if (seen.has(key)) {
      throw new InputError(`${field} gives components ${key} a second time; give each pair once`);
    }
    seen.add(key);
  });
}

function checkPair(field: string, { first, second }: PairInteraction, components: number): void {
  for (const [end, index] of Object.entries({ first, second })) {
    if (!Number.isInteger(index) || index < 0 || index >= components) {
      throw new InputError(
        `${field}.${end} is ${show(index)}; it must be the place of a component, 0 to ${components - 1}`,
      );
    }
  }
  if (first === second) {
    throw new InputError(
      `${field} pairs component ${first} with itself; a component has no interaction with itself`,
    );
  }
}
