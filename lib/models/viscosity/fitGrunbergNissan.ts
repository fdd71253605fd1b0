// The Grunberg-Nissan interaction of two liquids from viscosities measured along their binary line.
import { averageDeviation, fitTerms, interiorOf, type BinaryViscosities } from "./fitRedlichKister.js";
import type { MixingBasis } from "./grunbergNissan.js";

/** The fitted interaction, how well it is known, and how well one number describes the line. */
export interface GrunbergNissanFit {
  /** Dimensionless, on `basis`. */
  readonly G: number;
  /** Standard uncertainty of G, from the scatter about the fit. */
  readonly u: number;
  readonly basis: MixingBasis;
  /** Of ln(viscosity), so a relative deviation: 0.01 is one percent. */
  readonly residualStandardDeviation: number;
  /** Mean of |fitted / measured - 1| over the points used, as a fraction. */
  readonly averageDeviation: number;
  /** How many blends were used: those strictly between the pure ends. */
  readonly points: number;
}

/**
 * Fits G of a binary mixture to measured viscosities, with the pure liquids held at their own values.
 *
 * - `fractions`: of the first liquid in each blend, 0 to 1, counted on `basis`; 0 and 1 themselves are passed over.
 * - `viscosities_mPas`: of each blend, above 0, all at one temperature.
 * - `pureViscosities_mPas`: of the first and the second liquid at that temperature, above 0.
 * - `basis`: what the fractions count; it goes with G from here on.
 *
 * Least squares in ln eta with equal weights: with a = x1 x2 and b = ln eta - x1 ln eta1 - x2 ln eta2,
 * G = sum a b / sum a^2, s^2 = sum (b - G a)^2 / (n - 1), u = s / sqrt(sum a^2).
 *
 * Assumes one relative error for all readings. A fit in eta itself gives another G when the pure viscosities lie far
 * apart. When the deviations change sign slowly along the line, one G is not enough: look at `averageDeviation`, and
 * use {@link fitRedlichKister}, which looks for that.
 * @throws InputError on fewer than 2 blends between the pure ends, all blends at one composition, a fraction outside
 * 0 to 1, a viscosity not above 0, or lists of different lengths.
 * @source L. Grunberg, A. H. Nissan, Nature 164 (1949) 799-800, doi 10.1038/164799b0 (doi from memory); least squares of one
 * coefficient through the origin.
 * @example
 * ```ts
 * import { fitGrunbergNissan } from "resinwright";
 * const fit = fitGrunbergNissan({
 *   fractions: [0.25, 0.5, 0.75],
 *   viscosities_mPas: [26, 79, 260],
 *   pureViscosities_mPas: [1000, 10],
 *   basis: "mass",
 * });
 * fit.G; // → -0.9965
 * fit.averageDeviation; // → 0.0104
 * ```
 */
export function fitGrunbergNissan(blends: BinaryViscosities): GrunbergNissanFit {
  const interior = interiorOf("fitGrunbergNissan", blends, 1);
  const fit = fitTerms(interior, blends.pureViscosities_mPas, 1);
  return {
    G: fit.coefficients[0]!,
    u: fit.standardErrors[0]!,
    basis: blends.basis,
    residualStandardDeviation: fit.residualStandardDeviation,
    averageDeviation: averageDeviation(fit.residuals),
    points: interior.length,
  };
}
