// The interaction of two liquids, with one to three terms, from viscosities along their line; the neat liquids are held.
import { fraction, InputError, positive } from "../../door.js";
import type { Scatter } from "../../numerics/extraScatter.js";
import { linearLeastSquares, type LinearFit } from "../../numerics/linear.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import type { Warning } from "../../result.js";
import { percent } from "../percent.js";
import { judge, type Adequacy } from "./adequacy.js";
import { checkBasis, type MixingBasis } from "./grunbergNissan.js";
import { checkTermCount, type BinaryInteraction } from "./redlichKister.js";

/** Viscosities of blends of two liquids, and of the two liquids themselves. */
export interface BinaryViscosities {
  readonly fractions: NumberList;
  readonly viscosities_mPas: NumberList;
  readonly pureViscosities_mPas: readonly [number, number];
  readonly basis: MixingBasis;
}

/** The fitted terms, how well they are known, and whether they are enough. */
export interface RedlichKisterFit extends BinaryInteraction {
  readonly standardErrors: readonly number[];
  readonly covariance: readonly (readonly number[])[];
  /** Of ln(viscosity), so a relative deviation: 0.01 is one percent. */
  readonly residualStandardDeviation: number;
  /** Mean of |fitted / measured - 1| over the points used, as a fraction. */
  readonly averageDeviation: number;
  /** ln(measured / fitted) of each blend used, in the order of composition. */
  readonly residuals: readonly number[];
  /** How many blends were used: those strictly between the pure ends. */
  readonly points: number;
  readonly adequacy: Adequacy;
  /** Codes: `ends-swapped`. */
  readonly warnings: readonly Warning[];
}

/**
 * Fits one to three interaction terms of a binary mixture, with the pure liquids held at their own values.
 *
 * - `fractions`: of the first liquid in each blend, 0 to 1, counted on `basis`; 0 and 1 themselves are passed over.
 * - `viscosities_mPas`: of each blend, above 0, all at one temperature.
 * - `pureViscosities_mPas`: of the first and the second liquid at that temperature, above 0.
 * - `basis`: what the fractions count; it goes with the terms from here on.
 * - `terms`: 1, 2 or 3; at least one reading more, at two or more compositions and as many as there are terms.
 *
 * Least squares with equal weights of ln eta - x1 ln eta1 - x2 ln eta2 = x1 x2 [G0 + G1 (x1 - x2) + G2 (x1 - x2)^2].
 * The verdict `adequacy` looks for runs of sign in the residuals along the line (chance below 5 %) and for further terms that
 * would lower the scatter (chance below 1 %). When the readings fit much better
 * with the pure viscosities exchanged, the warning `ends-swapped` says so.
 *
 * Assumes one relative error for all readings and none in the pure viscosities; where those are in doubt, use `fitBlend`.
 * @throws InputError on too few blends between the pure ends, too few different compositions, a fraction outside 0 to
 * 1, a viscosity not above 0, or lists of different lengths.
 * @source O. Redlich, A. T. Kister, Ind. Eng. Chem. 40 (1948) 345-348, doi 10.1021/ie50458a036 (from memory).
 * @example
 * ```ts
 * import { fitRedlichKister } from "resinwright";
 * const fit = fitRedlichKister({
 *   fractions: [0.2, 0.4, 0.6, 0.8],
 *   viscosities_mPas: [20, 40, 94, 260],
 *   pureViscosities_mPas: [1000, 10],
 *   basis: "mass",
 *   terms: 2,
 * });
 * fit.terms[0]; // → -2.0396
 * fit.adequacy.verdict; // → "too few readings to tell"
 * ```
 */
export function fitRedlichKister(
  blends: BinaryViscosities & { readonly terms: 1 | 2 | 3 },
): RedlichKisterFit {
  const { basis, terms, pureViscosities_mPas } = blends;
  const where = "fitRedlichKister";
  const interior = interiorOf(where, blends, terms);
  const fit = fitTerms(interior, pureViscosities_mPas, terms);
  const residuals = inOrder(interior, fit.residuals);
  return {
    terms: fit.coefficients,
    basis,
    standardErrors: fit.standardErrors,
    covariance: fit.covariance,
    residualStandardDeviation: fit.residualStandardDeviation,
    averageDeviation: averageDeviation(fit.residuals),
    residuals,
    points: interior.length,
    adequacy: judge({
      residuals: averagedByComposition(interior, fit.residuals),
      scatter: scatterOf(fit),
      moreTerms: moreTerms(interior, pureViscosities_mPas, terms),
      withinStatedDoubt: false,
      fullModel: terms === 3,
    }),
    warnings: swapWarnings(interior, pureViscosities_mPas, terms, fit.residualStandardDeviation),
  };
}

/** A blend strictly between the pure liquids. @internal */
export interface Interior {
  readonly x1: number;
  readonly lnEta: number;
}

/** The blends between the pure ends, checked. @internal */
export function interiorOf(where: string, blends: BinaryViscosities, terms: number): Interior[] {
  const { fractions, viscosities_mPas, pureViscosities_mPas, basis } = blends;
  checkBasis(where, basis);
  checkTermCount(where, "terms", terms);
  checkList(where, "fractions", fractions, fraction);
  checkList(where, "viscosities_mPas", viscosities_mPas, positive);
  checkSameLength(where, { fractions, viscosities_mPas });
  checkList(where, "pureViscosities_mPas", pureViscosities_mPas, { ...positive, atLeast: 2 });
  const all = Array.from(fractions, (x1, k) => ({ x1, lnEta: Math.log(viscosities_mPas[k]!) }));
  const interior = all.filter(({ x1 }) => x1 > 0 && x1 < 1);
  checkSpread(where, interior, terms);
  return interior;
}

/** Least squares of the terms, ends held. @internal */
export function fitTerms(
  interior: readonly Interior[],
  pureViscosities_mPas: readonly [number, number],
  terms: number,
): LinearFit {
  const [lnEta1, lnEta2] = pureViscosities_mPas.map(Math.log) as [number, number];
  return linearLeastSquares({
    design: interior.map(({ x1 }) =>
      Array.from({ length: terms }, (_, k) => x1 * (1 - x1) * (2 * x1 - 1) ** k),
    ),
    response: interior.map(({ x1, lnEta }) => lnEta - x1 * lnEta1 - (1 - x1) * lnEta2),
  });
}

/** Mean of |fitted / measured - 1| from residuals of ln(viscosity). @internal */
export function averageDeviation(residuals: readonly number[]): number {
  return residuals.reduce((sum, r) => sum + Math.abs(Math.exp(-r) - 1), 0) / residuals.length;
}

function checkSpread(where: string, interior: readonly Interior[], terms: number): void {
  if (interior.length < terms + 1) {
    throw new InputError(
      `${where}: ${interior.length} of the fractions lie between 0 and 1; at least ${terms + 1} blends must be measured`,
    );
  }
  const different = new Set(interior.map(({ x1 }) => x1)).size;
  if (different === 1) {
    throw new InputError(
      `${where}: all blends have the fraction ${interior[0]!.x1}; measure at least two different compositions`,
    );
  }
  if (different < terms) {
    throw new InputError(
      `${where}: ${different} different compositions for ${terms} terms; measure more of them or fit fewer terms`,
    );
  }
}

function moreTerms(interior: readonly Interior[], ends: readonly [number, number], terms: number) {
  const different = new Set(interior.map(({ x1 }) => x1)).size;
  return [2, 3]
    .filter((more) => more > terms && more < interior.length && more <= different)
    .map((more) => ({ terms: more, ...scatterOf(fitTerms(interior, ends, more)) }));
}

/** Sum of squares about a fit without weights. */
function scatterOf({ residuals, degreesOfFreedom }: LinearFit): Scatter {
  return { sum: residuals.reduce((sum, r) => sum + r * r, 0), degrees: degreesOfFreedom };
}

function swapWarnings(
  interior: readonly Interior[],
  [eta1, eta2]: readonly [number, number],
  terms: number,
  s: number,
): Warning[] {
  const swapped = fitTerms(interior, [eta2, eta1], terms).residualStandardDeviation;
  if (swapped * SWAP_GAIN >= s || s < SMALLEST_SWAP) return [];
  const message =
    `with the two pure viscosities exchanged the scatter falls from ${percent(s)} to ${percent(swapped)}; ` +
    "check which liquid the fractions count and which viscosity is whose";
  return [{ code: "ends-swapped", message }];
}

/** Exchanged ends have to fit three times better, and the given ones badly, before they are suspected. */
export const SWAP_GAIN = 3;
export const SMALLEST_SWAP = 0.02;

function inOrder(interior: readonly Interior[], residuals: readonly number[]): number[] {
  const rows = interior.map(({ x1 }, k) => ({ x1, r: residuals[k]! }));
  return rows.sort((a, b) => a.x1 - b.x1).map(({ r }) => r);
}

function averagedByComposition(interior: readonly Interior[], residuals: readonly number[]): number[] {
  const groups = new Map<number, number[]>();
  interior.forEach(({ x1 }, k) => groups.set(x1, [...(groups.get(x1) ?? []), residuals[k]!]));
  const rows = [...groups].sort(([a], [b]) => a - b);
  return rows.map(([, group]) => group.reduce((sum, r) => sum + r, 0) / group.length);
}
