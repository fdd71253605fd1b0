// What series for diffusion through a surface that resists are made of: the roots of b tan b = Bi, and exp(q^2) erfc(q).
import { findRoot } from "./root.js";

/**
 * The n-th positive root (n from 0) of b tan b = Bi, with Bi above 0; it lies between n pi and (n + 1/2) pi.
 * @source H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, appendix IV (from memory).
 */
export function robinRoot(n: number, biot: number): number {
  const f = (b: number): number => b * Math.sin(b) - biot * Math.cos(b);
  return findRoot({ f, low: n * Math.PI, high: (n + 0.5) * Math.PI, where: "robinRoot" });
}

/**
 * exp(q^2) erfc(q) for q of at least 0, without the first `skipped` terms (0 to 2) of its series sum of (-q)^n / Gamma(n/2 + 1).
 * @source Series and continued fraction 7.9.2 of the NIST Digital Library of Mathematical Functions (from memory).
 */
export function scaledErfc(q: number, skipped = 0): number {
  const first = [1, (-2 * q) / Math.sqrt(Math.PI)] as const;
  if (q >= 2) {
    const leading = first.slice(0, skipped).reduce((sum, term) => sum + term, 0);
    return continuedFraction(q) - leading;
  }
  const terms: [number, number] = [...first];
  let sum = 0;
  for (let n = 0; n < 120; n++) {
    const term = terms[n % 2]!;
    if (n >= skipped) sum += term;
    terms[n % 2] = (term * q * q) / (n / 2 + 1);
  }
  return sum;
}

/** (1 / sqrt(pi)) / (q + (1/2) / (q + 1 / (q + (3/2) / (q + ...)))), from the far end. */
function continuedFraction(q: number): number {
  let tail = q;
  for (let k = 120; k >= 1; k--) tail = q + k / 2 / tail;
  return 1 / (Math.sqrt(Math.PI) * tail);
}
