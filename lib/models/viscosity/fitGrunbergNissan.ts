// The Grunberg-Nissan interaction of two liquids from viscosities measured along their binary line.
import { fraction, InputError, positive } from "../../door.js";
import { linearLeastSquares } from "../../numerics/linear.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { checkBasis, type MixingBasis } from "./grunbergNissan.js";

/** Viscosities of blends of two liquids, and of the two liquids themselves. */
export interface BinaryViscosities {
  readonly fractions: NumberList;
  readonly viscosities_mPas: NumberList;
  readonly pureViscosities_mPas: readonly [number, number];
  readonly basis: MixingBasis;
}

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
 * apart. When the deviations change sign slowly along the line, one G is not enough: look at `averageDeviation`.
 * @throws InputError on fewer than 2 blends between the pure ends, all blends at one composition, a fraction outside
 * 0 to 1, a viscosity not above 0, or lists of different lengths.
 * @source L. Grunberg, A. H. Nissan, Nature 164 (1949) 799-800, doi 10.1038/164799b0; least squares of one
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
  checkBlends(blends);
  const { basis, pureViscosities_mPas, viscosities_mPas } = blends;
  const [lnEta1, lnEta2] = pureViscosities_mPas.map(Math.log) as [number, number];
  const interior = Array.from(blends.fractions, (x1, k) => ({
    x1,
    lnEta: Math.log(viscosities_mPas[k]!),
  })).filter(({ x1 }) => x1 > 0 && x1 < 1);
  checkSpread(interior.map(({ x1 }) => x1));
  const fit = linearLeastSquares({
    design: interior.map(({ x1 }) => [x1 * (1 - x1)]),
    response: interior.map(({ x1, lnEta }) => lnEta - x1 * lnEta1 - (1 - x1) * lnEta2),
  });
  const deviations = fit.residuals.map((r) => Math.abs(Math.exp(-r) - 1));
  return {
    G: fit.coefficients[0]!,
    u: fit.standardErrors[0]!,
    basis,
    residualStandardDeviation: fit.residualStandardDeviation,
    averageDeviation: deviations.reduce((sum, d) => sum + d, 0) / deviations.length,
    points: interior.length,
  };
}

const where = "fitGrunbergNissan";

function checkBlends({ fractions, viscosities_mPas, pureViscosities_mPas, basis }: BinaryViscosities): void {
  checkBasis(where, basis);
  checkList(where, "fractions", fractions, fraction);
  checkList(where, "viscosities_mPas", viscosities_mPas, positive);
  checkSameLength(where, { fractions, viscosities_mPas });
  checkList(where, "pureViscosities_mPas", pureViscosities_mPas, { ...positive, atLeast: 2 });
}

function checkSpread(interior: readonly number[]): void {
  if (interior.length < 2) {
    throw new InputError(
      `${where}: ${interior.length} of the fractions lie between 0 and 1; at least 2 blends must be measured`,
    );
  }
  if (interior.every((x1) => x1 === interior[0])) {
    throw new InputError(
      `${where}: all blends have the fraction ${interior[0]}; measure at least two different compositions`,
    );
  }
}
