// Does the viscosity depend on how fast the liquid is sheared, and was it measured near the shear rate of the printer?
import { checkNumbers, InputError, positive } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import type { Warning } from "../../result.js";

/** Viscosities of one liquid at one temperature and several shear rates. */
export interface ShearReadings {
  readonly shearRates_pers: NumberList;
  readonly viscosities_mPas: NumberList;
  /** Standard uncertainty of a reading as a fraction of it. */
  readonly relativeU: number;
  /** Shear rate of use. */
  readonly printShearRate_pers: number;
}

/** The slope on logarithmic axes, and what to mind. */
export interface ShearThinning {
  /** n: 1 for a Newtonian liquid, below 1 for one that thins with shear. */
  readonly flowIndex: number;
  readonly u: number;
  /** Codes: `shear-thinning`, `shear-thickening`, `other-shear-rate`. */
  readonly warnings: readonly Warning[];
}

/**
 * Compares viscosities measured at several shear rates.
 *
 * - `shearRates_pers`: 2 or more, not all equal, above 0, 1/s.
 * - `viscosities_mPas`: one per shear rate, above 0, mPa s, at one temperature.
 * - `relativeU`: standard uncertainty of a reading as a fraction of it, above 0 and at most 0.5.
 * - `printShearRate_pers`: above 0, 1/s; in the gap under a part that is lifted, about speed over gap, 10 to 50 1/s.
 *
 * Straight line ln eta = k + (n - 1) ln rate with equal weights, u(n) = relativeU / sqrt(sum (ln rate - mean)^2). More
 * than 2 u away from n = 1 the liquid is called thinning or thickening: mixing rules and temperature laws hold for its
 * Newtonian plateau only. `other-shear-rate`: the shear rate of use lies outside those measured.
 * @throws InputError when fewer than 2 readings are given, all at one shear rate, or a number is out of range.
 * @source W. Ostwald, Kolloid-Zeitschrift 36 (1925) 99-117 (from memory): the power law; uncertainty as JCGM 100:2008.
 * @example
 * ```ts
 * import { shearThinning } from "resinwright";
 * const found = shearThinning({
 *   shearRates_pers: [1, 10, 100],
 *   viscosities_mPas: [1900, 1400, 1050],
 *   relativeU: 0.03,
 *   printShearRate_pers: 30,
 * });
 * found.flowIndex; // → 0.871
 * found.warnings[0].code; // → "shear-thinning"
 * ```
 */
export function shearThinning(readings: ShearReadings): ShearThinning {
  checkReadings(readings);
  const { shearRates_pers, viscosities_mPas, relativeU, printShearRate_pers } = readings;
  const lnRate = Array.from(shearRates_pers, Math.log);
  const mean = lnRate.reduce((sum, x) => sum + x, 0) / lnRate.length;
  const Sxx = lnRate.reduce((sum, x) => sum + (x - mean) ** 2, 0);
  const slope = lnRate.reduce((sum, x, i) => sum + (x - mean) * Math.log(viscosities_mPas[i]!), 0) / Sxx;
  const u = relativeU / Math.sqrt(Sxx);
  const [slowest, fastest] = [Math.min(...shearRates_pers), Math.max(...shearRates_pers)];
  const warnings: Warning[] = [];
  if (Math.abs(slope) > 2 * u) {
    const [code, verb] = slope < 0 ? ["shear-thinning", "falls"] : ["shear-thickening", "rises"];
    const factor = Math.exp(Math.abs(slope) * Math.log(fastest / slowest)).toPrecision(2);
    warnings.push({
      code,
      message:
        `the viscosity ${verb} by a factor of ${factor} from ${slowest} to ${fastest} 1/s; compare readings at one shear rate, ` +
        `best ${printShearRate_pers} 1/s, and do not put them into a mixing rule with others`,
    });
  }
  if (printShearRate_pers < slowest || printShearRate_pers > fastest) {
    warnings.push({
      code: "other-shear-rate",
      message: `measured at ${slowest} to ${fastest} 1/s and used at ${printShearRate_pers} 1/s; measure there`,
    });
  }
  return { flowIndex: 1 + slope, u, warnings };
}

const where = "shearThinning";

function checkReadings(readings: ShearReadings): void {
  const { shearRates_pers, viscosities_mPas, relativeU, printShearRate_pers } = readings;
  checkList(where, "shearRates_pers", shearRates_pers, { ...positive, atLeast: 2 });
  checkList(where, "viscosities_mPas", viscosities_mPas, positive);
  checkSameLength(where, { shearRates_pers, viscosities_mPas });
  checkNumbers(
    where,
    { relativeU, printShearRate_pers },
    { relativeU: { ...positive, max: 0.5 }, printShearRate_pers: positive },
  );
  if (Array.from(shearRates_pers).every((rate) => rate === shearRates_pers[0])) {
    throw new InputError(
      `${where}: all readings are at ${shearRates_pers[0]} 1/s; measure at two shear rates or more`,
    );
  }
}
