// The chance that two estimates of one variance differ as much as they do: the upper tail of Fisher's F distribution.
import { checkNumbers, notNegative } from "../door.js";

/**
 * The chance, 0 to 1, of a ratio of two variances at least this large if both estimate the same variance.
 *
 * - `ratio`: F, the variance suspected to be larger over the other, 0 or more.
 * - `degreesAbove`, `degreesBelow`: degrees of freedom of the variance above and below the line, 1 to 100 000.
 *
 * P(F > ratio) = I_z(d2/2, d1/2), z = d2 / (d2 + d1 ratio), I the regularised incomplete beta function by its continued
 * fraction; good to 10 digits or better for up to a few hundred degrees of freedom.
 * @throws InputError when an argument is outside its range.
 * @source M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions, NBS 1964, 26.6.2 and 26.5.8; evaluated as W. J.
 * Lentz, Applied Optics 15 (1976) 668-671, doi 10.1364/AO.15.000668 (all from memory).
 * @example
 * ```ts
 * import { varianceRatioProbability } from "resinwright";
 * varianceRatioProbability({ ratio: 3.708, degreesAbove: 3, degreesBelow: 10 }); // → 0.0500
 * ```
 */
export function varianceRatioProbability(input: {
  readonly ratio: number;
  readonly degreesAbove: number;
  readonly degreesBelow: number;
}): number {
  const degrees = { min: 1, max: 100_000 };
  checkNumbers("varianceRatioProbability", input, {
    ratio: notNegative,
    degreesAbove: degrees,
    degreesBelow: degrees,
  });
  const { ratio: F, degreesAbove: d1, degreesBelow: d2 } = input;
  return incompleteBeta({ z: d2 / (d2 + d1 * F), rest: (d1 * F) / (d2 + d1 * F), a: d2 / 2, b: d1 / 2 });
}

/** I_z(a, b) with rest = 1 - z; the fraction converges fast below the mean of the distribution, so it is used there. */
function incompleteBeta(given: Readonly<Record<"z" | "rest" | "a" | "b", number>>): number {
  const { z, rest, a, b } = given;
  if (z > (a + 1) / (a + b + 2)) return 1 - incompleteBeta({ z: rest, rest: z, a: b, b: a });
  if (z === 0) return 0;
  const lnFront = a * Math.log(z) + b * Math.log(rest) - lnBeta(a, b);
  return (Math.exp(lnFront) / a) * betaFraction(z, a, b);
}

/** 1 / (1 + c1 / (1 + c2 / (1 + ...))) by Lentz; the denominators of this fraction do not vanish for these arguments. */
function betaFraction(z: number, a: number, b: number): number {
  let [upper, lower] = [1, 1 / (1 - ((a + b) * z) / (a + 1))];
  let value = lower;
  for (let m = 1; m < 100_000; m++) {
    const even = (m * (b - m) * z) / ((a + 2 * m - 1) * (a + 2 * m));
    const odd = (-(a + m) * (a + b + m) * z) / ((a + 2 * m) * (a + 2 * m + 1));
    let change = 1;
    for (const c of [even, odd]) {
      [upper, lower] = [1 + c / upper, 1 / (1 + c * lower)];
      change = upper * lower;
      value *= change;
    }
    if (Math.abs(change - 1) < 1e-15) break;
  }
  return value;
}

const lnBeta = (a: number, b: number): number => lnGamma(a) + lnGamma(b) - lnGamma(a + b);

/** Stirling's series, after raising x to 15 or more by the recurrence: 15 digits. */
function lnGamma(x: number): number {
  let shift = 0;
  for (; x < 15; x++) shift -= Math.log(x);
  const s = 1 / (x * x);
  const tail = (1 / 12 - s * (1 / 360 - s * (1 / 1260 - s * (1 / 1680 - s / 1188)))) / x;
  return shift + (x - 0.5) * Math.log(x) - x + Math.log(2 * Math.PI) / 2 + tail;
}
