// How much diluent hits a viscosity: the Grunberg-Nissan rule of two liquids solved for the fraction.
import { checkNumber, checkNumbers, InputError, positive } from "../../door.js";
import { checkList } from "../../numerics/lists.js";
import type { MixingBasis } from "./grunbergNissan.js";
import { checkSameBasis } from "./redlichKister.js";

/** A viscosity wanted, the two liquids to mix and their interaction. */
export interface FractionQuestion {
  readonly viscosity_mPas: number;
  readonly viscosities_mPas: readonly [number, number];
  readonly basis: MixingBasis;
  readonly interaction: { readonly G: number; readonly basis: MixingBasis };
}

/** A fraction of the first liquid that gives the viscosity wanted. */
export interface FractionRoot {
  readonly fraction: number;
  /** d ln(eta) / d fraction there: 0.05 times this is the relative error from a weighing slip of 0.05. */
  readonly slope: number;
  /** The root with more of the thicker liquid; true for the only root as well. */
  readonly oligomerRich: boolean;
}

/** The one or two fractions, rising, or the viscosities that can be reached. */
export type FractionAnswer =
  | { readonly outcome: "reached"; readonly roots: readonly FractionRoot[] }
  | { readonly outcome: "out-of-reach"; readonly lowest_mPas: number; readonly highest_mPas: number };

/**
 * The fractions of the first liquid at which a blend of two has a given viscosity.
 *
 * - `viscosity_mPas`: wanted, above 0, mPa s.
 * - `viscosities_mPas`: of the first and the second liquid at the temperature of use, above 0, mPa s.
 * - `basis`: what the fraction counts.
 * - `interaction`: G, on the same basis.
 *
 * Roots in 0 to 1 of -G x^2 + (L + G) x - ln(eta / eta2) = 0, L = ln(eta1 / eta2); slope = L + G (1 - 2x). Two roots occur
 * where |G| > |L|: the line then has an extremum inside. Take the oligomer-rich one unless strength does not matter, and
 * mind the slope: near the extremum it is 0 and a fit of the viscosity says little about the fraction.
 *
 * Assumes a G that does not depend on composition.
 * @throws InputError when a viscosity is not above 0, the bases differ, or every fraction gives the viscosity wanted.
 * @source L. Grunberg, A. H. Nissan, Nature 164 (1949) 799-800, doi 10.1038/164799b0 (doi from memory), solved for x.
 * @example
 * ```ts
 * import { fractionForViscosity } from "resinwright";
 * const answer = fractionForViscosity({
 *   viscosity_mPas: 800,
 *   viscosities_mPas: [12000, 10],
 *   basis: "mass",
 *   interaction: { G: -1.2, basis: "mass" },
 * });
 * answer.outcome === "reached" && answer.roots[0].fraction; // → 0.6562
 * ```
 */
export function fractionForViscosity(question: FractionQuestion): FractionAnswer {
  const { viscosity_mPas, viscosities_mPas, basis, interaction } = question;
  checkNumbers(where, { viscosity_mPas }, { viscosity_mPas: positive });
  checkList(where, "viscosities_mPas", viscosities_mPas, { ...positive, atLeast: 2 });
  checkSameBasis(where, basis, interaction.basis);
  const G = checkNumber(interaction.G, { where, field: "interaction.G" });
  const [eta1, eta2] = viscosities_mPas;
  const L = Math.log(eta1) - Math.log(eta2);
  const wanted = Math.log(viscosity_mPas) - Math.log(eta2);
  if (L === 0 && G === 0 && wanted === 0) {
    throw new InputError(
      `${where}: both liquids have ${viscosity_mPas} mPas and mix ideally, so every fraction gives it; choose the fraction by another property`,
    );
  }
  const fractions = rootsOf(-G, L + G, -wanted);
  if (fractions.length === 0) return { outcome: "out-of-reach", ...rangeOf(eta2, L, G) };
  const richest = L >= 0 ? Math.max(...fractions) : Math.min(...fractions);
  const roots = fractions.map((x) => ({
    fraction: x,
    slope: L + G * (1 - 2 * x),
    oligomerRich: x === richest,
  }));
  return { outcome: "reached", roots };
}

const where = "fractionForViscosity";

/** Real roots of a x^2 + b x + c in 0 to 1, rising; two within 1e-6 count once. Rounding may put a root a hair outside. */
function rootsOf(a: number, b: number, c: number): number[] {
  const hair = 1e-12;
  const size = Math.abs(a) + Math.abs(b);
  const discriminant = b * b - 4 * a * c;
  // At the extremum rounding decides the sign of the discriminant, so a hair below zero still touches.
  if (discriminant < -hair * size * size) return [];
  const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(Math.max(discriminant, 0))) / 2;
  const both = [q / a, c / q].filter((x) => x >= -hair && x <= 1 + hair);
  const inside = both.map((x) => Math.min(Math.max(x, 0), 1)).sort((x, y) => x - y);
  return inside.filter((x, k) => k === 0 || x - inside[k - 1]! > 1e-6);
}

/** Between the neat liquids, and to the extremum where the line has one. */
function rangeOf(eta2: number, L: number, G: number) {
  const x = 0.5 + L / (2 * G);
  const reached = [0, L];
  if (x > 0 && x < 1) reached.push(x * L + x * (1 - x) * G);
  const [low, high] = [Math.min(...reached), Math.max(...reached)];
  return { lowest_mPas: stated(eta2 * Math.exp(low)), highest_mPas: stated(eta2 * Math.exp(high)) };
}

const stated = (viscosity_mPas: number): number =>
  checkNumber(viscosity_mPas, {
    where,
    field: "a viscosity in reach in mPas",
    ...positive,
    advice: "check G",
  });
