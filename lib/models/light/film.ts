// What a spectrophotometer says about a film of resin: its optical depth, and whether absorbance follows concentration.
import { checkNumber, checkNumbers, fraction, InputError, positive } from "../../door.js";
import { linearLeastSquares } from "../../numerics/linear.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import type { Warning } from "../../result.js";

/** A measured film. */
export interface FilmReading {
  /** Decadic, as the instrument shows it. */
  readonly absorbance: number;
  /** Decadic absorbance where nothing absorbs, taken off; scattering and reflection leave it. */
  readonly baselineAbsorbance: number;
  /** Above 0, um. */
  readonly filmThickness_um: number;
}

/**
 * Optical depth in um from the absorbance of a film of known thickness.
 *
 * - `absorbance`: decadic, above `baselineAbsorbance`; `filmThickness_um`: above 0, um.
 *
 * 1/alpha = d / (ln 10 (A - A0)) = 0.434294 / (absorbance per um).
 *
 * The thickness is the weak point: published films differ by a third from their nominal path.
 * @throws InputError when an argument is out of range or the absorbance is not above its baseline.
 * @source IUPAC Gold Book, entries A00037 and B00626.
 * @example
 * ```ts
 * import { opticalDepthOfFilm } from "resinwright";
 * opticalDepthOfFilm({ absorbance: 0.69, baselineAbsorbance: -0.03, filmThickness_um: 80 }); // → 48.25
 * ```
 */
export function opticalDepthOfFilm(input: FilmReading): number {
  const where = "opticalDepthOfFilm";
  const { absorbance, baselineAbsorbance, filmThickness_um } = input;
  checkNumber(baselineAbsorbance, { where, field: "baselineAbsorbance" });
  checkNumber(filmThickness_um, { where, field: "filmThickness_um", ...positive });
  checkNumber(absorbance, {
    where,
    field: "absorbance",
    min: baselineAbsorbance,
    above: true,
    advice: "a film that absorbs no more than its baseline shows no depth; measure a thicker one",
  });
  return checkNumber(filmThickness_um / (Math.LN10 * (absorbance - baselineAbsorbance)), {
    where,
    field: "the optical depth in um",
  });
}

/** Absorbance against concentration: a straight line through the dilute films, and how far each film is from it. */
export interface AbsorbanceSeries {
  /** Absorbance without the substance. */
  readonly intercept: number;
  /** Absorbance gained per unit of mass fraction. */
  readonly slope: number;
  /** Of each film, (A - line) / line, in the order given; below 0 where light is missing from the line. */
  readonly deviations: readonly number[];
  /** Codes: `below-line`, `above-line`. */
  readonly warnings: readonly Warning[];
}

/**
 * Fits absorbance against mass fraction on the dilute films and says how far the others stray from that line.
 *
 * - `massFractions`: of the substance, 0 to 1, one per film.
 * - `absorbances`: decadic, baseline taken off, all of one thickness.
 * - `linearUpTo`: mass fraction up to which films are taken to be on the line, at least three of them.
 *
 * Least squares of A = a + b w on those films. A film more than 5 % off the line gets a warning: below it stray light or
 * saturation of the detector, or a substance that did not all dissolve; above it association. No average hides it.
 * @throws InputError when fewer than three films are dilute, lists differ in length, or a value is out of range.
 * @source Beer-Lambert law, IUPAC Gold Book B00626; least squares.
 * @example
 * ```ts
 * import { absorbanceSeries } from "resinwright";
 * const series = absorbanceSeries({
 *   massFractions: [0.001, 0.002, 0.003, 0.006],
 *   absorbances: [0.31, 0.6, 0.91, 1.5],
 *   linearUpTo: 0.003,
 * });
 * series.deviations[3]; // → -0.1697
 * ```
 */
export function absorbanceSeries(input: {
  readonly massFractions: NumberList;
  readonly absorbances: NumberList;
  readonly linearUpTo: number;
}): AbsorbanceSeries {
  const where = "absorbanceSeries";
  const { massFractions: w, absorbances: A, linearUpTo } = input;
  checkList(where, "massFractions", w, fraction);
  checkList(where, "absorbances", A);
  checkSameLength(where, { massFractions: w, absorbances: A });
  checkNumbers(where, { linearUpTo }, { linearUpTo: fraction });
  const dilute = Array.from(w, (_, i) => i).filter((i) => w[i]! <= linearUpTo);
  if (dilute.length < 3) {
    throw new InputError(
      `${where}: ${dilute.length} films up to linearUpTo ${linearUpTo}; at least 3 must be dilute to show a line`,
    );
  }
  const fit = linearLeastSquares({
    design: dilute.map((i) => [1, w[i]!]),
    response: dilute.map((i) => A[i]!),
  });
  const [intercept, slope] = fit.coefficients as [number, number];
  const deviations = Array.from(w, (x, i) => A[i]! / (intercept + slope * x) - 1);
  checkList(where, "deviations", deviations, { advice: "the line passes through 0; check the baseline" });
  return { intercept, slope, deviations, warnings: deviations.flatMap((d, i) => strayWarning(d, w[i]!)) };
}

function strayWarning(deviation: number, massFraction: number): Warning[] {
  if (Math.abs(deviation) <= 0.05) return [];
  const off = `the film of mass fraction ${massFraction} lies ${(100 * Math.abs(deviation)).toFixed(0)} %`;
  return deviation < 0
    ? [
        {
          code: "below-line",
          message: `${off} below the line of the dilute films: stray light, saturation, or not all dissolved; measure a thinner film`,
        },
      ]
    : [
        {
          code: "above-line",
          message: `${off} above the line of the dilute films: association, or a thicker film; measure its thickness`,
        },
      ];
}
