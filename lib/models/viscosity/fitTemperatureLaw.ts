// A temperature law from viscosities of one liquid measured at several temperatures, and what it then predicts.
import { checkNumber, checkNumbers, InputError, positive, unknownName } from "../../door.js";
import { dot } from "../../numerics/dot.js";
import { studentQuantile } from "../../numerics/distributions.js";
import { levenbergMarquardt } from "../../numerics/levenbergMarquardt.js";
import { linearLeastSquares, type LinearFit } from "../../numerics/linear.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import type { Interval, Warning } from "../../result.js";
import { celsius } from "../ranges.js";
import { kelvin } from "../scales.js";
import { andradeViscosity, checkTwoTemperatures, findRise, type AndradeParameters } from "./andrade.js";
import { vogelViscosity, type VogelParameters } from "./vogel.js";

/** A temperature law with its parameters. */
export type TemperatureLaw =
  ({ readonly law: "andrade" } & AndradeParameters) | ({ readonly law: "vogel" } & VogelParameters);

/** The fitted law and how well it is known. */
export interface TemperatureLawFit {
  readonly law: TemperatureLaw;
  /** Of A and B, and of T0 with the Vogel law, in that order; B and T0 in K. */
  readonly standardErrors: readonly number[];
  /** In the same order. */
  readonly covariance: readonly (readonly number[])[];
  /** Of ln(viscosity), so a relative deviation: 0.01 is one percent. */
  readonly residualStandardDeviation: number;
  /** ln(measured / fitted) of each reading, in the order given. */
  readonly residuals: readonly number[];
  readonly degreesOfFreedom: number;
  readonly points: number;
  /** The lowest and the highest temperature measured, degrees Celsius. */
  readonly temperatures_C: readonly [number, number];
  /** Codes: `not-falling`, `vogel-temperature-unclear`. */
  readonly warnings: readonly Warning[];
}

/**
 * Viscosity in mPa s at a temperature, by whichever law is given.
 *
 * - `law`: `andrade` or `vogel` with its parameters, as {@link fitTemperatureLaw} returns it.
 * - `temperature_C`: above absolute zero, and above T0 with the Vogel law, degrees Celsius.
 *
 * ln eta = A + B / T, or A + B / (T - T0).
 *
 * Assumes what {@link andradeViscosity} and {@link vogelViscosity} assume.
 * @throws InputError as those two, or when the law is neither.
 * @source As those two.
 * @example
 * ```ts
 * import { viscosityByLaw } from "resinwright";
 * viscosityByLaw({
 *   law: { law: "andrade", lnPrefactor: -4.52173, activation_K: 1286.287 },
 *   temperature_C: 30,
 * }); // → 0.7568
 * ```
 */
export function viscosityByLaw({
  law,
  temperature_C,
}: {
  readonly law: TemperatureLaw;
  readonly temperature_C: number;
}): number {
  checkLaw("viscosityByLaw", law.law);
  return law.law === "andrade"
    ? andradeViscosity({ ...law, temperature_C })
    : vogelViscosity({ ...law, temperature_C });
}

/**
 * Fits a temperature law to viscosities of one liquid.
 *
 * - `temperatures_C`: above -273.15, degrees Celsius, in any order; at least 3 readings for `andrade` and 4 for `vogel`,
 *   at two and three temperatures or more.
 * - `viscosities_mPas`: one per temperature, above 0, mPa s.
 * - `law`: `andrade` (two parameters) or `vogel` (three).
 *
 * Least squares of ln eta with equal weights: Andrade's law is linear in 1/T; the Vogel law is started from the best of
 * eleven T0 between 0 and the coldest reading and refined by Levenberg and Marquardt. A viscosity that rises with
 * temperature is named in the warning `not-falling`; the fit uses it all the same.
 *
 * Assumes one relative error for all readings and none in the temperatures. B and T0 of the Vogel law go together: quote
 * both, and use the covariance.
 * @throws InputError on too few readings or temperatures, a viscosity not above 0, or readings that curve the other way
 * than the Vogel law.
 * @source As {@link andradeViscosity} and {@link vogelViscosity}; covariance as G. A. F. Seber, C. J. Wild, Nonlinear
 * Regression, Wiley 1989, section 2.1 (from memory).
 * @example
 * ```ts
 * import { fitTemperatureLaw } from "resinwright";
 * const fit = fitTemperatureLaw({
 *   temperatures_C: [20, 30, 40, 50, 60],
 *   viscosities_mPas: [1810, 760, 362, 192, 111],
 *   law: "vogel",
 * });
 * fit.law.law === "vogel" && fit.law.vogelTemperature_K; // → 181.67
 * fit.residualStandardDeviation; // → 0.0022
 * ```
 */
export function fitTemperatureLaw(readings: {
  readonly temperatures_C: NumberList;
  readonly viscosities_mPas: NumberList;
  readonly law: "andrade" | "vogel";
}): TemperatureLawFit {
  const { temperatures_C, viscosities_mPas, law } = readings;
  checkReadings(readings);
  const T = Array.from(temperatures_C, kelvin);
  const lnEta = Array.from(viscosities_mPas, Math.log);
  const fit = law === "andrade" ? fitAndradeLaw(T, lnEta) : fitVogelLaw(T, lnEta);
  const rise = findRise(temperatures_C, viscosities_mPas);
  const warnings = [...fit.warnings];
  if (rise !== undefined) {
    warnings.push({
      code: "not-falling",
      message: `${rise}; check both, or leave out the one that is wrong`,
    });
  }
  return {
    ...fit,
    points: T.length,
    temperatures_C: [Math.min(...temperatures_C), Math.max(...temperatures_C)],
    warnings,
  };
}

/**
 * What a fitted law predicts at a temperature: the viscosity, and the interval in which a new reading would fall.
 *
 * - `fit`: from {@link fitTemperatureLaw}.
 * - `temperature_C`: above T0 with the Vogel law, degrees Celsius.
 * - `level`: coverage of the interval, 0.5 to 0.999.
 *
 * With g the derivatives of ln eta by the parameters and C their covariance, var = s^2 + g' C g; the interval is
 * eta exp(-+ t sqrt(var)), t Student's. More than 10 K outside the temperatures measured the warning `extrapolated` is
 * given: the interval takes the law for true, and there it may not be.
 *
 * Assumes a new reading of the same instrument and the same lot.
 * @throws InputError when the temperature or the level is out of range.
 * @source JCGM 100:2008, clause 5.2, equation 13.
 * @example
 * ```ts
 * import { fitTemperatureLaw, viscosityAtTemperature } from "resinwright";
 * const fit = fitTemperatureLaw({
 *   temperatures_C: [20, 30, 40],
 *   viscosities_mPas: [0.8763, 0.7568, 0.6609],
 *   law: "andrade",
 * });
 * viscosityAtTemperature({ fit, temperature_C: 25, level: 0.95 }).value; // → 0.8135
 * ```
 */
export function viscosityAtTemperature(input: {
  readonly fit: TemperatureLawFit;
  readonly temperature_C: number;
  readonly level: number;
}): Interval & { readonly warnings: readonly Warning[] } {
  const { fit, temperature_C, level } = input;
  checkNumbers(
    "viscosityAtTemperature",
    { temperature_C, level },
    { temperature_C: celsius, level: { min: 0.5, max: 0.999 } },
  );
  const value = viscosityByLaw({ law: fit.law, temperature_C });
  const g = gradient(fit.law, kelvin(temperature_C));
  const variance = g.reduce(
    (sum, gj, j) => sum + gj * dot(fit.covariance[j]!, g),
    fit.residualStandardDeviation ** 2,
  );
  const t = studentQuantile({ probability: (1 + level) / 2, degreesOfFreedom: fit.degreesOfFreedom });
  const high = checkNumber(value * Math.exp(t * Math.sqrt(variance)), {
    where: "viscosityAtTemperature",
    field: "the upper end of the interval in mPas",
    advice: "the readings hardly fix the law here; measure closer to this temperature, or more often",
  });
  return {
    value,
    low: value * Math.exp(-t * Math.sqrt(variance)),
    high,
    level,
    warnings: reach(fit, temperature_C),
  };
}

const where = "fitTemperatureLaw";
/** Beyond this a law fitted to readings is not to be trusted without a word. */
const REACH_K = 10;

function checkReadings(readings: Parameters<typeof fitTemperatureLaw>[0]): void {
  const { temperatures_C, viscosities_mPas, law } = readings;
  checkLaw(where, law);
  const parameters = law === "andrade" ? 2 : 3;
  checkList(where, "temperatures_C", temperatures_C, { ...celsius, atLeast: parameters + 1 });
  checkList(where, "viscosities_mPas", viscosities_mPas, positive);
  checkSameLength(where, { temperatures_C, viscosities_mPas });
  checkTwoTemperatures(where, temperatures_C);
  const different = new Set(temperatures_C).size;
  if (different < parameters) {
    throw new InputError(
      `${where}: ${different} different temperatures for the three parameters of the Vogel law; measure at three or more, or use law "andrade"`,
    );
  }
}

function checkLaw(asked: string, law: string): void {
  const laws = ["andrade", "vogel"];
  if (!laws.includes(law)) throw new InputError(unknownName(asked, "law", String(law), laws));
}

type LawFit = Omit<TemperatureLawFit, "points" | "temperatures_C">;

function fitAndradeLaw(T: readonly number[], lnEta: readonly number[]): LawFit {
  const fit = linearLeastSquares({ design: T.map((Ti) => [1, 1 / Ti]), response: lnEta });
  const [lnPrefactor, activation_K] = fit.coefficients as [number, number];
  checkFall(activation_K);
  return { law: { law: "andrade", lnPrefactor, activation_K }, ...doubtOf(fit), warnings: [] };
}

function fitVogelLaw(T: readonly number[], lnEta: readonly number[]): LawFit {
  const coldest = Math.min(...T);
  const fit = levenbergMarquardt({
    where,
    model: ([A, B, T0]) => T.map((Ti) => (T0! < coldest ? A! + B! / (Ti - T0!) : NaN)),
    jacobian: ([, B, T0]) => T.map((Ti) => [1, 1 / (Ti - T0!), B! / (Ti - T0!) ** 2]),
    response: lnEta,
    start: bestStart(T, lnEta),
  });
  const [lnPrefactor, vogelConstant_K, vogelTemperature_K] = fit.parameters as [number, number, number];
  if (!fit.converged || vogelTemperature_K < 0 || vogelConstant_K <= 0) {
    throw new InputError(
      `${where}: the readings do not curve as the Vogel law does; use law "andrade", or measure over a wider range`,
    );
  }
  const u = fit.standardErrors[2]!;
  const unclear: Warning = {
    code: "vogel-temperature-unclear",
    message:
      `the Vogel temperature is ${vogelTemperature_K.toFixed(0)} K with a standard error of ${u.toFixed(0)} K; ` +
      'these readings hardly show a curve, and law "andrade" describes them as well',
  };
  return {
    law: { law: "vogel", lnPrefactor, vogelConstant_K, vogelTemperature_K },
    ...doubtOf(fit),
    warnings: vogelTemperature_K < 2 * u ? [unclear] : [],
  };
}

function doubtOf(fit: Omit<LinearFit, "coefficients">) {
  const { standardErrors, covariance, residualStandardDeviation, residuals, degreesOfFreedom } = fit;
  return { standardErrors, covariance, residualStandardDeviation, residuals, degreesOfFreedom };
}

/** With T0 held the law is linear, so the best of a few T0 is found without iteration. */
function bestStart(T: readonly number[], lnEta: readonly number[]): readonly number[] {
  const coldest = Math.min(...T);
  const shares = [0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 0.97];
  const tries = shares.map((share) => {
    const T0 = share * coldest;
    const fit = linearLeastSquares({ design: T.map((Ti) => [1, 1 / (Ti - T0)]), response: lnEta });
    return { start: [...fit.coefficients, T0], s: fit.residualStandardDeviation };
  });
  return tries.reduce((best, one) => (one.s < best.s ? one : best)).start;
}

function checkFall(activation_K: number): void {
  if (activation_K > 0) return;
  throw new InputError(
    `${where}: the viscosity does not fall with temperature (B is ${activation_K.toPrecision(3)} K); ` +
      "check that temperatures and viscosities are listed in the same order",
  );
}

/** Of ln eta by A and B, and by T0 with the Vogel law. */
function gradient(law: TemperatureLaw, T: number): number[] {
  if (law.law === "andrade") return [1, 1 / T];
  const { vogelConstant_K: B, vogelTemperature_K: T0 } = law;
  return [1, 1 / (T - T0), B / (T - T0) ** 2];
}

function reach({ temperatures_C: [coldest, warmest] }: TemperatureLawFit, temperature_C: number): Warning[] {
  if (temperature_C >= coldest - REACH_K && temperature_C <= warmest + REACH_K) return [];
  const message =
    `${temperature_C} °C is more than ${REACH_K} K outside the ${coldest} to ${warmest} °C measured; ` +
    "the interval takes the law for true there";
  return [{ code: "extrapolated", message }];
}
