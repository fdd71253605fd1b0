// The constant of the scaling law from measured dead zones, and whether the law holds for them at all.
import { checkNumber, checkNumbers, InputError, positive } from "../../door.js";
import { linearLeastSquares } from "../../numerics/linear.js";

/** A dead zone measured in one light. */
export interface DeadZoneReading {
  /** Phi0 alpha_PI / Dc0 of the light it was measured in, above 0, 1/s. */
  readonly curingRate_pers: number;
  /** Above 0, um. */
  readonly thickness_um: number;
  /** Standard uncertainty of the thickness as a fraction of it, above 0. */
  readonly relativeU: number;
}

/** The constant and its standard uncertainty, and what speaks for the law. */
export interface ScalingLawFit {
  readonly scalingConstant_umsqrts: { readonly value: number; readonly u: number };
  /** Of each reading: how far it lies above the law, in its standard deviations. */
  readonly surprises: readonly number[];
  /**
   * n of thickness ~ rate^n as the readings have it: -1/2 is the law, towards -1 the film resists. Undefined for fewer than three
   * readings, or all in the same light.
   */
  readonly exponent: { readonly value: number; readonly u: number } | undefined;
}

/**
 * Fits the constant of the scaling law to dead zones measured at several photon fluxes.
 *
 * - `readings`: at least one, each with curing rate, thickness and its relative standard uncertainty.
 *
 * ln C_s is the mean of ln thickness + ln(rate) / 2, weighted by 1 / ln(1 + u^2). Its u is that of the weights, or larger by
 * sqrt(chi^2 / (n - 1)) where the readings scatter more than they say. The exponent is the slope of ln thickness with ln rate;
 * its u is that of the fit, or that of the readings where they agree better than they were read.
 *
 * Assumes errors of the thickness only, log-normal and independent; a common error of all curing rates goes into the constant.
 * @throws InputError when no reading is given or a number is out of range.
 * @source Law: `scalingLawDeadZone`. Weighted mean, widened by the ratio of external to internal consistency: R. T. Birge,
 * Physical Review 40 (1932) 207-227, doi 10.1103/PhysRev.40.207 (from memory).
 * @example
 * ```ts
 * import { fitScalingLaw } from "resinwright";
 * const fit = fitScalingLaw({
 *   readings: [
 *     { curingRate_pers: 1, thickness_um: 31, relativeU: 0.1 },
 *     { curingRate_pers: 2.25, thickness_um: 19, relativeU: 0.1 },
 *     { curingRate_pers: 4, thickness_um: 15.5, relativeU: 0.1 },
 *   ],
 * });
 * fit.scalingConstant_umsqrts.value; // → 30.1
 * fit.exponent?.value ?? NaN; // → -0.51
 * ```
 */
export function fitScalingLaw({
  readings,
}: {
  readonly readings: readonly DeadZoneReading[];
}): ScalingLawFit {
  if (!Array.isArray(readings) || readings.length === 0)
    throw new InputError(`${where}: readings is empty; give at least one dead zone with its light`);
  readings.forEach((reading: DeadZoneReading, i) =>
    checkNumbers(`${where}: readings[${i}]`, reading, {
      curingRate_pers: positive,
      thickness_um: positive,
      relativeU: positive,
    }),
  );
  const rows = readings.map(({ curingRate_pers, thickness_um, relativeU }) => ({
    lnRate: Math.log(curingRate_pers),
    lnThickness: Math.log(thickness_um),
    weight: 1 / Math.log1p(relativeU ** 2),
  }));
  const all = rows.reduce((sum, { weight }) => sum + weight, 0);
  const lnC = rows.reduce((sum, row) => sum + (row.weight / all) * constantOf(row), 0);
  const surprises = rows.map((row) => (constantOf(row) - lnC) * Math.sqrt(row.weight));
  const scatter = surprises.reduce((sum, one) => sum + one * one, 0) / Math.max(rows.length - 1, 1);
  const value = checkNumber(Math.exp(lnC), { where, field: "the constant in um s^-1/2", ...positive });
  const u = value * Math.sqrt(Math.max(scatter, 1) / all);
  return { scalingConstant_umsqrts: { value, u }, surprises, exponent: exponentOf(rows) };
}

const where = "fitScalingLaw";

interface Row {
  readonly lnRate: number;
  readonly lnThickness: number;
  readonly weight: number;
}

const constantOf = ({ lnRate, lnThickness }: Row): number => lnThickness + lnRate / 2;

function exponentOf(rows: readonly Row[]): ScalingLawFit["exponent"] {
  if (rows.length < 3 || rows.every(({ lnRate }) => lnRate === rows[0]!.lnRate)) return undefined;
  const { coefficients, standardErrors } = linearLeastSquares({
    design: rows.map(({ lnRate }) => [1, lnRate]),
    response: rows.map(({ lnThickness }) => lnThickness),
    weights: rows.map(({ weight }) => weight),
  });
  // Three readings can agree by chance better than they were read: the doubt of the readings is the least.
  const total = rows.reduce((sum, { weight }) => sum + weight, 0);
  const mean = rows.reduce((sum, { weight, lnRate }) => sum + weight * lnRate, 0) / total;
  const spread = rows.reduce((sum, { weight, lnRate }) => sum + weight * (lnRate - mean) ** 2, 0);
  return { value: coefficients[1]!, u: Math.max(standardErrors[1]!, 1 / Math.sqrt(spread)) };
}
