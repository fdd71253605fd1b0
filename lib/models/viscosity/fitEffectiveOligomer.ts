// What an oligomer too thick to measure counts for in a blend: its effective viscosity and its interaction, from dilutions.
import { checkNumber, fraction, InputError, positive } from "../../door.js";
import { studentQuantile } from "../../numerics/distributions.js";
import { linearLeastSquares, type LinearFit } from "../../numerics/linear.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import type { Interval, Warning } from "../../result.js";
import { checkBasis, type MixingBasis } from "./grunbergNissan.js";

/** Viscosities of dilutions of an oligomer with one diluent. */
export interface Dilutions {
  /** Of the oligomer in each dilution. */
  readonly fractions: NumberList;
  readonly viscosities_mPas: NumberList;
  readonly diluentViscosity_mPas: number;
  readonly basis: MixingBasis;
  readonly level: number;
}

/** The two numbers the oligomer counts for, and how much each dilution decides them. */
export interface EffectiveOligomer {
  /** What the dilutions say the neat oligomer would have; not a measurement of it. */
  readonly oligomerViscosity_mPas: Interval;
  readonly G: Interval;
  readonly basis: MixingBasis;
  /** Of (ln of the oligomer's viscosity, G), in that order; the two errors go together. */
  readonly covariance: readonly [readonly [number, number], readonly [number, number]];
  /** 0 to 1 per dilution, in the order given: how much a reading decides its own fitted value. */
  readonly leverage: readonly number[];
  /** ln(measured / fitted) of each dilution, in the order given. */
  readonly residuals: readonly number[];
  /** Of ln(viscosity), so a relative deviation: 0.01 is one percent. */
  readonly residualStandardDeviation: number;
  readonly points: number;
  /** Codes: `far-from-neat`, `few-points`, `decided-by-one`. */
  readonly warnings: readonly Warning[];
}

/**
 * Fits the effective viscosity of an oligomer and its interaction with a diluent to dilutions.
 *
 * - `fractions`: of the oligomer, above 0 and at most 1, counted on `basis`; 3 or more, at two or more compositions.
 * - `viscosities_mPas`: of each dilution, above 0, all at one temperature.
 * - `diluentViscosity_mPas`: of the neat diluent at that temperature, above 0; held.
 * - `basis`: what the fractions count; `mass` where the oligomer has no one molar mass.
 * - `level`: coverage of the intervals, 0.5 to 0.999.
 *
 * Least squares with equal weights of ln eta - x2 ln eta2 = x1 ln eta1 + x1 x2 G, linear in ln eta1 and G; intervals
 * value -+ t u with n - 2 degrees of freedom, for the viscosity in ln eta1.
 *
 * Assumes one relative error for all readings. The two numbers belong together and to the range diluted: they predict
 * blends within it, not the neat oligomer.
 * @throws InputError on fewer than 3 dilutions, all at one composition, a fraction outside 0 to 1, a viscosity not above 0,
 * or lists of different lengths.
 * @source L. Grunberg, A. H. Nissan, Nature 164 (1949) 799-800, doi 10.1038/164799b0 (doi from memory); linear regression.
 * @example
 * ```ts
 * import { fitEffectiveOligomer } from "resinwright";
 * const fit = fitEffectiveOligomer({
 *   fractions: [0.4, 0.5, 0.6, 0.7],
 *   viscosities_mPas: [190, 420, 990, 2480],
 *   diluentViscosity_mPas: 10,
 *   basis: "mass",
 *   level: 0.95,
 * });
 * fit.G.value; // → -1.8077
 * fit.oligomerViscosity_mPas.value; // → 44634
 * ```
 */
export function fitEffectiveOligomer(dilutions: Dilutions): EffectiveOligomer {
  checkDilutions(dilutions);
  const { fractions, viscosities_mPas, diluentViscosity_mPas, basis, level } = dilutions;
  const lnEta2 = Math.log(diluentViscosity_mPas);
  const x = Array.from(fractions);
  const fit = linearLeastSquares({
    design: x.map((x1) => [x1, x1 * (1 - x1)]),
    response: x.map((x1, k) => Math.log(viscosities_mPas[k]!) - (1 - x1) * lnEta2),
  });
  const [lnEta1, G] = fit.coefficients as [number, number];
  const t = studentQuantile({ probability: (1 + level) / 2, degreesOfFreedom: fit.degreesOfFreedom });
  const [spreadEta, spreadG] = fit.standardErrors.map((u) => t * u) as [number, number];
  return {
    oligomerViscosity_mPas: {
      value: stated(lnEta1),
      low: stated(lnEta1 - spreadEta),
      high: stated(lnEta1 + spreadEta),
      level,
    },
    G: { value: G, low: G - spreadG, high: G + spreadG, level },
    basis,
    covariance: fit.covariance as EffectiveOligomer["covariance"],
    leverage: fit.leverage,
    residuals: fit.residuals,
    residualStandardDeviation: fit.residualStandardDeviation,
    points: x.length,
    warnings: warningsOf(x, fit),
  };
}

const where = "fitEffectiveOligomer";

function checkDilutions(dilutions: Dilutions): void {
  const { fractions, viscosities_mPas, diluentViscosity_mPas, basis, level } = dilutions;
  checkBasis(where, basis);
  checkList(where, "fractions", fractions, {
    ...fraction,
    above: true,
    atLeast: 3,
    advice: "give the neat diluent as diluentViscosity_mPas",
  });
  checkList(where, "viscosities_mPas", viscosities_mPas, positive);
  checkSameLength(where, { fractions, viscosities_mPas });
  checkNumber(diluentViscosity_mPas, { where, field: "diluentViscosity_mPas", ...positive });
  checkNumber(level, { where, field: "level", min: 0.5, max: 0.999 });
  if (Array.from(fractions).every((x1) => x1 === fractions[0])) {
    throw new InputError(
      `${where}: all dilutions have the fraction ${fractions[0]}; measure at least two different compositions, better four`,
    );
  }
}

function stated(lnViscosity: number): number {
  return checkNumber(Math.exp(lnViscosity), {
    where,
    field: "the viscosity of the oligomer in mPas",
    ...positive,
    advice: "the dilutions are too thin or too alike to say; add some with more oligomer",
  });
}

function warningsOf(x: readonly number[], { leverage }: LinearFit): Warning[] {
  const warnings: Warning[] = [];
  const most = Math.max(...x);
  if (most < 0.8) {
    warnings.push({
      code: "far-from-neat",
      message: `the thickest dilution holds ${most} of the oligomer; its viscosity is an extrapolation, good for blends of ${Math.min(...x)} to ${most} only`,
    });
  }
  if (x.length < 5) {
    warnings.push({
      code: "few-points",
      message: `${x.length} dilutions for two numbers; with fewer than 5 the intervals are wide and a third term would not show`,
    });
  }
  const decisive = leverage.findIndex((h) => h > 0.9);
  if (decisive >= 0) {
    warnings.push({
      code: "decided-by-one",
      message: `dilution ${decisive} (fraction ${x[decisive]}) all but decides its own fitted value (leverage ${leverage[decisive]!.toFixed(2)}); measure another near it`,
    });
  }
  return warnings;
}
