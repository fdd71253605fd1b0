// Viscosity of two liquids whose interaction changes along the line: Grunberg and Nissan's G as a short polynomial.
import { checkNumber, checkNumbers, fraction, InputError, positive } from "../../door.js";
import { checkList } from "../../numerics/lists.js";
import { checkBasis, type MixingBasis } from "./grunbergNissan.js";

/** The interaction of two liquids as a polynomial in x1 - x2; only true on its basis. */
export interface BinaryInteraction {
  /** G0, or G0 and G1, or G0, G1 and G2; dimensionless. G0 alone is the G of Grunberg and Nissan. */
  readonly terms: readonly number[];
  readonly basis: MixingBasis;
}

/** Two liquids and the fraction of the first. */
export interface BinaryBlend {
  readonly fraction: number;
  readonly viscosities_mPas: readonly [number, number];
  readonly basis: MixingBasis;
  readonly interaction: BinaryInteraction;
}

/**
 * Viscosity in mPa s of a blend of two liquids whose interaction depends on composition.
 *
 * - `fraction`: x1 of the first liquid, 0 to 1, counted on `basis`.
 * - `viscosities_mPas`: of the first and the second liquid at the temperature of the blend, above 0.
 * - `basis`: `mole`, `mass` or `volume`: what the fraction counts.
 * - `interaction`: one to three terms, on the same basis.
 *
 * ln eta = x1 ln eta1 + x2 ln eta2 + x1 x2 [G0 + G1 (x1 - x2) + G2 (x1 - x2)^2].
 *
 * Exchanging the liquids changes the sign of G1. Assumes Newtonian liquids without filler, at one temperature.
 * @throws InputError when the fraction is not 0 to 1, a viscosity is not above 0, there are no or more than three terms,
 * or the interaction is on another basis.
 * @source O. Redlich, A. T. Kister, Ind. Eng. Chem. 40 (1948) 345-348, doi 10.1021/ie50458a036 (from memory): the
 * polynomial; L. Grunberg, A. H. Nissan, Nature 164 (1949) 799-800, doi 10.1038/164799b0 (doi from memory): the rule it extends.
 * @example
 * ```ts
 * import { redlichKisterViscosity } from "resinwright";
 * redlichKisterViscosity({
 *   fraction: 0.7,
 *   viscosities_mPas: [900, 9],
 *   basis: "mass",
 *   interaction: { terms: [-1, -0.5], basis: "mass" },
 * }); // → 175.71
 * ```
 */
export function redlichKisterViscosity(blend: BinaryBlend): number {
  checkBlend(blend);
  const { fraction: x1, viscosities_mPas, interaction } = blend;
  const x2 = 1 - x1;
  const G = interaction.terms.reduce((sum, Gk, k) => sum + Gk * (x1 - x2) ** k, 0);
  const [lnEta1, lnEta2] = viscosities_mPas.map(Math.log) as [number, number];
  return checkNumber(Math.exp(x1 * lnEta1 + x2 * lnEta2 + x1 * x2 * G), {
    where,
    field: "the viscosity of the mixture in mPas",
    ...positive,
    advice: "check the terms of the interaction",
  });
}

/**
 * Refuses a number of terms other than 1, 2 and 3.
 * @throws InputError saying how many are given.
 */
export function checkTermCount(where: string, field: string, count: number): void {
  if (count === 1 || count === 2 || count === 3) return;
  throw new InputError(`${where}: ${field} is ${count}; it must be 1, 2 or 3`);
}

/**
 * Refuses an interaction on another basis than the fractions.
 * @throws InputError naming both.
 */
export function checkSameBasis(where: string, fractions: MixingBasis, interaction: MixingBasis): void {
  checkBasis(where, fractions);
  checkBasis(where, interaction);
  if (fractions === interaction) return;
  throw new InputError(
    `${where}: the interaction was found on the ${interaction} basis and the fraction is on the ${fractions} basis; ` +
      `convert the fraction or fit the interaction again on the ${fractions} basis`,
  );
}

const where = "redlichKisterViscosity";

function checkBlend(blend: BinaryBlend): void {
  checkNumbers(where, { fraction: blend.fraction }, { fraction });
  checkList(where, "viscosities_mPas", blend.viscosities_mPas, { ...positive, atLeast: 2 });
  checkTermCount(where, "the number of interaction terms", blend.interaction.terms.length);
  checkList(where, "interaction.terms", blend.interaction.terms);
  checkSameBasis(where, blend.basis, blend.interaction.basis);
}
