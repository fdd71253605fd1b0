// The normal distribution far out: how likely a value below z is, and the hazard there, without losing digits in the tail.

/** ln Phi(z), Phi the standard normal distribution. @internal */
export function lnNormalBelow(z: number): number {
  if (z < -SERIES_END) return -0.5 * z * z - LN_ROOT_TAU - Math.log(tailFraction(-z));
  return z <= SERIES_END ? Math.log(0.5 + seriesPart(z)) : Math.log1p(-density(z) / tailFraction(z));
}

/** phi(z) / Phi(z), the mean of a standard normal value cut off above -z is this much above 0. @internal */
export function normalHazard(z: number): number {
  if (z < -SERIES_END) return tailFraction(-z);
  return density(z) / (z <= SERIES_END ? 0.5 + seriesPart(z) : 1 - density(z) / tailFraction(z));
}

const SERIES_END = 2;
const LN_ROOT_TAU = Math.log(2 * Math.PI) / 2;

const density = (z: number): number => Math.exp(-0.5 * z * z - LN_ROOT_TAU);

/** Phi(z) - 1/2 = phi(z) sum z^(2k+1) / (2k+1)!!; Abramowitz and Stegun 26.2.11 (from memory). */
function seriesPart(z: number): number {
  let sum = 0;
  for (let k = 0, term = z; sum + term !== sum; k++, term *= (z * z) / (2 * k + 1)) sum += term;
  return density(z) * sum;
}

/** phi(x) / (1 - Phi(x)) = x + 1/(x + 2/(x + 3/(x + ...))) for x of at least 2; ibid. 26.2.14 (from memory). */
function tailFraction(x: number): number {
  let value = x;
  for (let k = 200; k >= 1; k--) value = x + k / value;
  return value;
}
