// From a table of blend readings to neat viscosities and interactions, with a verdict on the model and on each reading.
import { InputError } from "../../door.js";
import { deletedResidualLimit, deletedResiduals } from "../../numerics/deletedResiduals.js";
import type { Scatter } from "../../numerics/extraScatter.js";
import { linearLeastSquares, type LinearFit } from "../../numerics/linear.js";
import { robustScores } from "../../numerics/runs.js";
import type { Interval, Warning } from "../../result.js";
import { zeroCelsius_K } from "../scales.js";
import { judge, type Adequacy } from "./adequacy.js";
import { blendRow, placeOfPair, shapeOf, type BlendShape } from "./blendDesign.js";
import { blendInterval } from "./blendInterval.js";
import { blendWarnings } from "./blendWarnings.js";
import { checkTable, compositionKey, groupsOf, sampleKey, type BlendReading } from "./blendReadings.js";
import type { MixingBasis } from "./grunbergNissan.js";

export type { BlendReading } from "./blendReadings.js";

/** The interaction of a pair at the reference temperature, as {@link redlichKisterViscosity} takes its terms. */
export interface FittedPair {
  readonly first: number;
  readonly second: number;
  readonly basis: MixingBasis;
  /** G0, or with more terms G0, G1, G2 of (x_first - x_second)^k. */
  readonly terms: readonly number[];
  readonly standardErrors: readonly number[];
}

/** What a table of readings says about its liquids, and what it says about itself. */
export interface BlendFit {
  readonly basis: MixingBasis;
  /** Where the neat viscosities and interactions below hold, degrees Celsius: the middle of the readings in 1/T. */
  readonly referenceTemperature_C: number;
  /** Of each neat liquid, with its interval; an extrapolation where no reading is near it. */
  readonly neatViscosities_mPas: readonly Interval[];
  /** Of each pair measured together; a pair left out counts as ideal. */
  readonly pairs: readonly FittedPair[];
  /** Every coefficient in the order of {@link blendViscosity}'s equation, with their covariance. */
  readonly coefficients: readonly number[];
  readonly covariance: readonly (readonly number[])[];
  /** ln(measured / fitted), 0 to 1, and robust standard deviations, per reading in the order given. */
  readonly residuals: readonly number[];
  readonly leverage: readonly number[];
  readonly scores: readonly number[];
  /** Places of readings that lie far from the fit: a score beyond 5. */
  readonly outliers: readonly number[];
  /** Of ln(viscosity) without weights; with weights, in stated uncertainties, so 1 is as good as stated. */
  readonly residualStandardDeviation: number;
  /** Standard deviation of ln(viscosity) of a new reading of the average kind. */
  readonly readingStandardDeviation: number;
  readonly degreesOfFreedom: number;
  readonly points: number;
  readonly adequacy: Adequacy;
  /** The lowest and the highest temperature measured, degrees Celsius. */
  readonly temperatures_C: readonly [number, number];
  /** Largest variance of a fitted value among the readings, over that of the residuals: beyond it is an extrapolation. */
  readonly reach: number;
  /** Which coefficients there are. */
  readonly shape: BlendShape;
  /**
   * Codes: `outlier`, `neat-extrapolated`, `pair-not-measured`, `ends-swapped`, `not-falling`, `shear-thinning`,
   * `shear-thickening`, `mixed-shear-rates`, `temperatures-differ`, `few-degrees`.
   */
  readonly warnings: readonly Warning[];
}

/**
 * Fits neat viscosities and interactions of two or more liquids to a table of readings.
 *
 * - `readings`: `fractions` of all liquids, adding up to 1 within 1e-6; `temperature_C`; `viscosity_mPas`, above 0; and
 *   where known `shearRate_pers`, above 0, `relativeU`, the standard uncertainty as a fraction (of all readings or of
 *   none: they become weights), and `repeat`, the number of the repeat.
 * - `basis`: what the fractions count.
 * - `terms`: 1, 2 or 3 a pair.
 * - `level`: coverage of the intervals, 0.5 to 0.999.
 *
 * Least squares in ln eta = sum_i x_i L_i + sum_{i<j} x_i x_j [G0 + G1 (x_i - x_j) + G2 (x_i - x_j)^2]. Readings at
 * temperatures more than 2 K apart: every L and G is linear in 1/T. Neat liquids are readings like the others, not held.
 * Readings of one blend at one temperature, to the degree, are repeats.
 *
 * `adequacy`: too few runs of sign along the composition or a lack of fit beyond the repeats (chance below 5 %), or further
 * terms that would lower the scatter (chance below 1 %), is a misfit; residuals within the stated uncertainty are adequate;
 * where so few readings could not show a misfit, that is said. Outliers are residuals over sqrt(1 - leverage) more than 5
 * robust standard deviations from their median, or too far from the fit of all other readings (chance below 0.1 % for the
 * whole table, Bonferroni): the second finds one bad reading among ten. They stay in the fit until you take them out.
 *
 * Assumes independent relative errors, a Newtonian liquid, no filler, and repeats that were weighed again.
 * @throws InputError on a table that is not one: see the message; on fewer readings than coefficients plus one, or
 * compositions and temperatures that do not tell the coefficients apart.
 * @source O. Redlich, A. T. Kister, Ind. Eng. Chem. 40 (1948) 345-348, doi 10.1021/ie50458a036; lack of fit as N. R. Draper,
 * H. Smith, Applied Regression Analysis, 3rd ed. 1998, chapter 2 (both from memory); runs and outliers as
 * {@link runsTest} and {@link robustScores}.
 * @example
 * ```ts
 * import { blendViscosity, fitBlend } from "resinwright";
 * const table = [[1, 2400], [0.8, 690], [0.6, 222], [0.5, 128], [0.4, 77], [0.2, 27.5], [0, 10.2]];
 * const readings = table.map(([x, eta]) => ({ fractions: [x, 1 - x], temperature_C: 25, viscosity_mPas: eta }));
 * const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
 * fit.pairs[0].terms[0]; // → -0.7696
 * fit.residualStandardDeviation; // → 0.0201
 * blendViscosity({ fit, fractions: [0.7, 0.3], temperature_C: 25, level: 0.95 }).value; // → 394.2
 * ```
 */
export function fitBlend(table: {
  readonly readings: readonly BlendReading[];
  readonly basis: MixingBasis;
  readonly terms: 1 | 2 | 3;
  readonly level: number;
}): BlendFit {
  checkTable(where, table);
  const { readings, basis, terms, level } = table;
  const shape = shapeOf(readings, terms);
  const weights = weightsOf(readings);
  const fit = solve(shape, readings, weights);
  const weighted = fit.residuals.map((r, i) => r * Math.sqrt(weights?.[i] ?? 1));
  const scores = robustScores(weighted.map((r, i) => r / Math.sqrt(Math.max(1 - fit.leverage[i]!, 1e-6))));
  const alone = deletedResiduals({ ...fit, residuals: weighted });
  const allowed = deletedResidualLimit({
    points: readings.length,
    degreesOfFreedom: fit.degreesOfFreedom,
    chance: 0.001,
  });
  const outliers = scores.flatMap((score, i) =>
    Math.abs(score) > OUTLIER || Math.abs(alone[i]!) > allowed ? [i] : [],
  );
  const temperatures = readings.map(({ temperature_C }) => temperature_C);
  const common = {
    basis,
    referenceTemperature_C: shape.referenceTemperature_K - zeroCelsius_K,
    coefficients: fit.coefficients,
    covariance: fit.covariance,
    residuals: fit.residuals,
    leverage: fit.leverage,
    scores,
    outliers,
    residualStandardDeviation: fit.residualStandardDeviation,
    readingStandardDeviation: fit.residualStandardDeviation * typicalU(weights),
    degreesOfFreedom: fit.degreesOfFreedom,
    points: readings.length,
    temperatures_C: [Math.min(...temperatures), Math.max(...temperatures)] as const,
    reach: Math.max(...fit.leverage.map((h, i) => h / (weights?.[i] ?? 1))),
    shape,
  };
  return {
    ...common,
    neatViscosities_mPas: neatOf(shape, fit, level),
    pairs: pairsOf(shape, fit, basis),
    adequacy: judge({
      residuals: alongComposition(readings, fit.residuals),
      scatter: scatterOf(fit),
      ...repeatsOf(readings, fit.residuals, weights),
      moreTerms: moreTerms(readings, weights, terms),
      withinStatedDoubt: weights !== undefined && fit.residualStandardDeviation <= 1,
      fullModel: terms === 3,
    }),
    warnings: blendWarnings({
      readings,
      fit: common,
      swapped: () => solve(shape, readings.map(withEndsExchanged), weights).residualStandardDeviation,
    }),
  };
}

const where = "fitBlend";
const OUTLIER = 5;

function weightsOf(readings: readonly BlendReading[]): number[] | undefined {
  if (readings[0]!.relativeU === undefined) return undefined;
  return readings.map(({ relativeU }) => 1 / relativeU! ** 2);
}

/** Standard deviation of an average reading, in units of the residual standard deviation. */
function typicalU(weights: readonly number[] | undefined): number {
  if (weights === undefined) return 1;
  return Math.sqrt(weights.reduce((sum, w) => sum + 1 / w, 0) / weights.length);
}

function solve(
  shape: BlendShape,
  readings: readonly BlendReading[],
  weights: readonly number[] | undefined,
): LinearFit {
  const design = readings.map(({ fractions, temperature_C }) => blendRow(shape, fractions, temperature_C));
  const coefficients = design[0]!.length;
  if (readings.length <= coefficients) {
    const slopes = shape.severalTemperatures ? ", each with its slope in 1/T" : "";
    throw new InputError(
      `${where}: ${readings.length} readings for ${coefficients} coefficients (${shape.liquids} neat liquids and ` +
        `${shape.pairs.length * shape.terms} interaction terms${slopes}); give at least ${coefficients + 1} readings, ` +
        "fewer terms or one temperature",
    );
  }
  const response = readings.map(({ viscosity_mPas }) => Math.log(viscosity_mPas));
  try {
    return linearLeastSquares({ design, response, ...(weights && { weights }) });
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    const compositions = new Set(readings.map(compositionKey)).size;
    throw new InputError(
      `${where}: the readings do not tell the ${coefficients} coefficients apart: ${compositions} different compositions ` +
        `of ${shape.liquids} liquids; measure other compositions${shape.severalTemperatures ? ", each at two temperatures," : ""} or fit fewer terms`,
    );
  }
}

function neatOf(shape: BlendShape, fit: LinearFit, level: number): Interval[] {
  const { degreesOfFreedom } = fit;
  return Array.from({ length: shape.liquids }, (_, i) => {
    const [lnViscosity, standardError] = [fit.coefficients[i]!, fit.standardErrors[i]!];
    return blendInterval({ where, lnViscosity, standardError, degreesOfFreedom, level });
  });
}

function pairsOf(shape: BlendShape, fit: LinearFit, basis: MixingBasis): FittedPair[] {
  return shape.pairs.map(([first, second], k) => {
    const from = placeOfPair(shape, k);
    const part = (list: readonly number[]): number[] => list.slice(from, from + shape.terms);
    return { first, second, basis, terms: part(fit.coefficients), standardErrors: part(fit.standardErrors) };
  });
}

/** Residuals averaged over each composition, along the first liquid, so that repeats do not pass for runs. */
function alongComposition(readings: readonly BlendReading[], residuals: readonly number[]): number[] {
  const groups = groupsOf(readings, compositionKey);
  const rows = groups.map((places) => ({
    x: readings[places[0]!]!.fractions,
    mean: places.reduce((sum, i) => sum + residuals[i]!, 0) / places.length,
  }));
  rows.sort((a, b) => a.x[0]! - b.x[0]! || a.x[1]! - b.x[1]!);
  return rows.map(({ mean }) => mean);
}

/** Fits with more terms, as far as the readings are enough for them. */
function moreTerms(readings: readonly BlendReading[], weights: readonly number[] | undefined, terms: number) {
  return [2, 3]
    .filter((more) => more > terms)
    .flatMap((more) => {
      const fit = solvable(() => solve(shapeOf(readings, more), readings, weights));
      return fit === undefined ? [] : [{ terms: more, ...scatterOf(fit) }];
    });
}

function solvable(fit: () => LinearFit): LinearFit | undefined {
  try {
    return fit();
  } catch (error) {
    if (error instanceof InputError) return undefined;
    throw error;
  }
}

const scatterOf = ({ residualStandardDeviation: s, degreesOfFreedom: degrees }: LinearFit): Scatter => ({
  sum: s * s * degrees,
  degrees,
});

function repeatsOf(
  readings: readonly BlendReading[],
  residuals: readonly number[],
  weights: readonly number[] | undefined,
): { readonly repeats?: Scatter } {
  const groups = groupsOf(readings, sampleKey);
  if (groups.length === readings.length) return {};
  const w = (i: number): number => weights?.[i] ?? 1;
  const within = groups.map((places) => {
    const total = places.reduce((sum, i) => sum + w(i), 0);
    const mean = places.reduce((sum, i) => sum + w(i) * residuals[i]!, 0) / total;
    return places.reduce((sum, i) => sum + w(i) * (residuals[i]! - mean) ** 2, 0);
  });
  const sum = within.reduce((total, one) => total + one, 0);
  return { repeats: { sum, degrees: readings.length - groups.length } };
}

/** For two liquids: a neat reading counted for the other liquid; blends as they are. */
function withEndsExchanged(reading: BlendReading): BlendReading {
  const [x1, x2] = [reading.fractions[0]!, reading.fractions[1]!];
  return x1 === 0 || x2 === 0 ? { ...reading, fractions: [x2, x1] } : reading;
}
