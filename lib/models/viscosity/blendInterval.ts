// The viscosity that a fit of blends gives a blend or a neat liquid, with its interval.
import { checkNumber, positive } from "../../door.js";
import { studentQuantile } from "../../numerics/distributions.js";
import type { Interval } from "../../result.js";

/** The interval of exp(`lnViscosity`) at coverage `level`, of a fit that left so many degrees of freedom. */
export function blendInterval(given: {
  readonly where: string;
  readonly lnViscosity: number;
  readonly standardError: number;
  readonly degreesOfFreedom: number;
  readonly level: number;
}): Interval {
  const { where, lnViscosity, standardError, degreesOfFreedom, level } = given;
  const spread = studentQuantile({ probability: (1 + level) / 2, degreesOfFreedom }) * standardError;
  const stated = (ln: number): number =>
    checkNumber(Math.exp(ln), {
      where,
      field: "a viscosity in mPas",
      ...positive,
      advice: "the readings do not fix it; measure more blends near it",
    });
  return {
    value: stated(lnViscosity),
    low: stated(lnViscosity - spread),
    high: stated(lnViscosity + spread),
    level,
  };
}
