// The integral that the balance of the steady dead zone turns on, without its cancellation.

/** 1 - (1 + x) e^-x; for small x by the series of e^-x (e^x - 1 - x), whose terms are all positive. */
export function burnt(x: number): number {
  if (x >= 1) return 1 - (1 + x) * Math.exp(-x);
  let sum = 0;
  for (let k = 2, term = (x * x) / 2; sum + term !== sum; k++, term *= x / k) sum += term;
  return sum * Math.exp(-x);
}
