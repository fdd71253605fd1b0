// How the viscosity of a liquid falls with temperature: Andrade's two-parameter law, its use and its fit.
import { checkNumber, checkNumbers, InputError, positive } from "../../door.js";
import { linearLeastSquares } from "../../numerics/linear.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { celsius } from "../ranges.js";
import { kelvin } from "../scales.js";

/** The two parameters of ln(eta / mPa s) = lnPrefactor + activation_K / T. */
export interface AndradeParameters {
  /** A: ln of the viscosity in mPa s that the law extrapolates to at infinite temperature. */
  readonly lnPrefactor: number;
  /** B: activation energy over the gas constant, K. */
  readonly activation_K: number;
}

/** Fitted parameters with their standard errors. */
export interface AndradeFit extends AndradeParameters {
  readonly lnPrefactorStandardError: number;
  readonly activationStandardError_K: number;
  /** Of ln(viscosity), so a relative deviation: 0.01 is one percent. */
  readonly residualStandardDeviation: number;
  readonly points: number;
}

/**
 * Viscosity in mPa s at a temperature, by Andrade's law.
 *
 * - `lnPrefactor`: A, dimensionless, for viscosities in mPa s.
 * - `activation_K`: B, above 0, K.
 * - `temperature_C`: above -273.15, degrees Celsius.
 *
 * ln eta = A + B / T, T in K.
 *
 * Assumes a Newtonian liquid well above its glass transition. For diols and other viscous liquids it misses by
 * 1.5 to 3 % over 35 K, for glycerol by a factor of 1.6 over 90 K: use parameters fitted close to the temperature of use.
 * @throws InputError when an argument is out of range or the viscosity is beyond the range of numbers.
 * @source E. N. da C. Andrade, Nature 125 (1930) 309-310, doi 10.1038/125309b0 (from memory).
 * @example
 * ```ts
 * import { andradeViscosity } from "resinwright";
 * andradeViscosity({ lnPrefactor: -4.52173, activation_K: 1286.287, temperature_C: 30 }); // → 0.7568
 * ```
 */
export function andradeViscosity(input: AndradeParameters & { readonly temperature_C: number }): number {
  const { lnPrefactor: A, activation_K: B, temperature_C } = input;
  const where = "andradeViscosity";
  checkNumbers(where, input, { lnPrefactor: {}, activation_K: positive, temperature_C: celsius });
  return checkNumber(Math.exp(A + B / kelvin(temperature_C)), {
    where,
    field: "the viscosity in mPas",
    ...positive,
    advice: "check the parameters and the temperature",
  });
}

/**
 * Andrade parameters from one measured viscosity and an activation temperature.
 *
 * - `viscosity_mPas`: measured, above 0, mPa s.
 * - `referenceTemperature_C`: where it was measured, above -273.15, degrees Celsius.
 * - `activation_K`: B, above 0, K; activation energy over the gas constant.
 *
 * A = ln eta_ref - B / T_ref.
 * @throws InputError when an argument is out of range.
 * @source E. N. da C. Andrade, Nature 125 (1930) 309-310, doi 10.1038/125309b0 (from memory), solved for A.
 * @example
 * ```ts
 * import { andradeFromReference, andradeViscosity } from "resinwright";
 * const law = andradeFromReference({ viscosity_mPas: 450, referenceTemperature_C: 25, activation_K: 4500 });
 * andradeViscosity({ ...law, temperature_C: 35 }); // → 275.74
 * ```
 */
export function andradeFromReference(input: {
  readonly viscosity_mPas: number;
  readonly referenceTemperature_C: number;
  readonly activation_K: number;
}): AndradeParameters {
  const { viscosity_mPas, referenceTemperature_C, activation_K } = input;
  checkNumbers("andradeFromReference", input, {
    viscosity_mPas: positive,
    referenceTemperature_C: celsius,
    activation_K: positive,
  });
  return {
    lnPrefactor: Math.log(viscosity_mPas) - activation_K / kelvin(referenceTemperature_C),
    activation_K,
  };
}

/**
 * Fits Andrade's law to viscosities measured at several temperatures.
 *
 * - `temperatures_C`: at least 3 readings at 2 or more temperatures, above -273.15, degrees Celsius, in any order.
 * - `viscosities_mPas`: one per temperature, above 0, mPa s.
 *
 * Least squares of ln eta against 1/T with equal weights, so with one relative error for all readings.
 * @throws InputError when fewer than 3 readings are given, all at one temperature, one is not above 0, or the
 * viscosity rises from one temperature to the next: the message names the readings.
 * @source E. N. da C. Andrade, Nature 125 (1930) 309-310, doi 10.1038/125309b0 (from memory).
 * @example
 * ```ts
 * import { fitAndrade } from "resinwright";
 * const fit = fitAndrade({ temperatures_C: [20, 30, 40], viscosities_mPas: [0.8763, 0.7568, 0.6609] });
 * fit.activation_K; // → 1294.96
 * ```
 */
export function fitAndrade(readings: {
  readonly temperatures_C: NumberList;
  readonly viscosities_mPas: NumberList;
}): AndradeFit {
  const { temperatures_C, viscosities_mPas } = readings;
  checkList(fitWhere, "temperatures_C", temperatures_C, { ...celsius, atLeast: 3 });
  checkList(fitWhere, "viscosities_mPas", viscosities_mPas, positive);
  checkSameLength(fitWhere, { temperatures_C, viscosities_mPas });
  checkFalls(temperatures_C, viscosities_mPas);
  const fit = linearLeastSquares({
    design: Array.from(temperatures_C, (t) => [1, 1 / kelvin(t)]),
    response: Array.from(viscosities_mPas, Math.log),
  });
  return {
    lnPrefactor: fit.coefficients[0]!,
    activation_K: fit.coefficients[1]!,
    lnPrefactorStandardError: fit.standardErrors[0]!,
    activationStandardError_K: fit.standardErrors[1]!,
    residualStandardDeviation: fit.residualStandardDeviation,
    points: temperatures_C.length,
  };
}

const fitWhere = "fitAndrade";

function checkFalls(temperatures_C: NumberList, viscosities_mPas: NumberList): void {
  checkTwoTemperatures(fitWhere, temperatures_C);
  const rise = findRise(temperatures_C, viscosities_mPas);
  if (rise !== undefined) {
    throw new InputError(`${fitWhere}: ${rise}; check both, or leave out the one that is wrong`);
  }
}

/**
 * Refuses readings that are all at one temperature.
 * @throws InputError naming it.
 * @internal
 */
export function checkTwoTemperatures(where: string, temperatures_C: NumberList): void {
  const first = temperatures_C[0]!;
  if (Array.from(temperatures_C).every((t) => t === first)) {
    throw new InputError(`${where}: all readings are at ${first} °C; measure at two temperatures or more`);
  }
}

/**
 * The first place where a viscosity does not fall with temperature, in words; undefined where all fall. Repeats at one
 * temperature may scatter: only a temperature whose readings all lie above the last one's counts.
 * @internal
 */
export function findRise(temperatures_C: NumberList, viscosities_mPas: NumberList): string | undefined {
  const rows = Array.from(temperatures_C, (t, row) => ({ row, t, eta: viscosities_mPas[row]! }));
  rows.sort((a, b) => a.t - b.t || a.eta - b.eta);
  for (let i = 1; i < rows.length; i++) {
    const [before, after] = [rows[i - 1]!, rows[i]!];
    if (after.t > before.t && after.eta >= before.eta) {
      const say = ({ row, t, eta }: typeof before): string => `reading ${row} (${t} °C, ${eta} mPas)`;
      return `the viscosity does not fall from ${say(before)} to ${say(after)}`;
    }
  }
  return undefined;
}
