// What a fitted table of readings predicts for a blend that was not measured, and how far to trust it.
import { checkNumber, InputError } from "../../door.js";
import { dot } from "../../numerics/dot.js";
import type { NumberList } from "../../numerics/lists.js";
import type { Interval, Warning } from "../../result.js";
import { checkFractions } from "../fractions.js";
import { celsius } from "../ranges.js";
import { blendRow, unmeasuredPairs } from "./blendDesign.js";
import { blendInterval } from "./blendInterval.js";
import type { BlendFit } from "./fitBlend.js";

/**
 * What a fitted table predicts for a blend: the viscosity, and the interval in which a new reading would fall.
 *
 * - `fit`: from {@link fitBlend}.
 * - `fractions`: of all its liquids, 0 to 1 each, adding up to 1 within 1e-9.
 * - `temperature_C`: degrees Celsius; within 1 K of the readings where they are all at one temperature.
 * - `level`: coverage of the interval, 0.5 to 0.999.
 *
 * With a the row of the design, C the covariance and s the standard deviation of a reading: eta exp(-+ t sqrt(s^2 +
 * a' C a)). `extrapolated` is given where a' C a / s^2 is larger than for any reading, or the temperature is outside.
 * @throws InputError when the fractions are not a whole mixture of the liquids fitted, a number is out of range, or the
 * readings cannot tell about the temperature.
 * @source JCGM 100:2008, clause 5.2, equation 13.
 * @example
 * ```ts
 * import { blendViscosity, fitBlend } from "resinwright";
 * const table = [[1, 2400], [0.75, 540], [0.5, 128], [0.25, 36], [0, 10.2]];
 * const readings = table.map(([x, eta]) => ({ fractions: [x, 1 - x], temperature_C: 25, viscosity_mPas: eta }));
 * const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
 * blendViscosity({ fit, fractions: [0.7, 0.3], temperature_C: 25, level: 0.95 }).value; // → 401.6
 * ```
 */
export function blendViscosity(input: {
  readonly fit: BlendFit;
  readonly fractions: NumberList;
  readonly temperature_C: number;
  readonly level: number;
}): Interval & { readonly warnings: readonly Warning[] } {
  checkPrediction(input);
  const { fit, fractions, temperature_C, level } = input;
  const a = blendRow(fit.shape, fractions, temperature_C);
  const lnEta = dot(a, fit.coefficients);
  const ofFit = a.reduce((sum, ai, i) => sum + ai * dot(fit.covariance[i]!, a), 0);
  const interval = blendInterval({
    where,
    lnViscosity: lnEta,
    standardError: Math.sqrt(fit.readingStandardDeviation ** 2 + ofFit),
    degreesOfFreedom: fit.degreesOfFreedom,
    level,
  });
  return { ...interval, warnings: extrapolations(fit, ofFit, temperature_C, fractions) };
}

const where = "blendViscosity";

function checkPrediction(input: Parameters<typeof blendViscosity>[0]): void {
  const { fit, fractions, temperature_C, level } = input;
  checkFractions(where, "fractions", fractions);
  if (fractions.length !== fit.shape.liquids) {
    throw new InputError(
      `${where}: fractions holds ${fractions.length}; the fit has ${fit.shape.liquids} liquids, give one fraction each`,
    );
  }
  checkNumber(temperature_C, { where, field: "temperature_C", ...celsius });
  checkNumber(level, { where, field: "level", min: 0.5, max: 0.999 });
  if (!fit.shape.severalTemperatures && Math.abs(temperature_C - fit.referenceTemperature_C) > 1) {
    throw new InputError(
      `${where}: all readings are near ${+fit.referenceTemperature_C.toFixed(2)} °C, and they do not say what happens at ${temperature_C} °C; ` +
        "measure at a second temperature",
    );
  }
}

function extrapolations(
  fit: BlendFit,
  ofFit: number,
  temperature_C: number,
  fractions: NumberList,
): Warning[] {
  const warnings: Warning[] = [];
  const [coldest, warmest] = fit.temperatures_C;
  if (fit.shape.severalTemperatures && (temperature_C < coldest || temperature_C > warmest)) {
    warnings.push({
      code: "extrapolated",
      message: `${temperature_C} °C lies outside the ${coldest} to ${warmest} °C measured`,
    });
  }
  const unmeasured = unmeasuredPairs(fit.shape).filter(([i, j]) => fractions[i]! > 0 && fractions[j]! > 0);
  for (const [i, j] of unmeasured) {
    warnings.push({
      code: "pair-not-measured",
      message: `no reading holds both liquid ${i} and liquid ${j}; the pair counts as ideal here and the interval leaves that out`,
    });
  }
  if (ofFit > fit.reach * fit.residualStandardDeviation ** 2 * (1 + 1e-9)) {
    warnings.push({
      code: "extrapolated",
      message: "this blend lies further out than any reading; the interval takes the rule for true there",
    });
  }
  return warnings;
}
