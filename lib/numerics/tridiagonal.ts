// Solves systems whose unknowns couple only to their two neighbours: layers of a column, one after the other.
// It works in place on arrays the caller keeps, because transient models solve thousands of such systems.

/** A tridiagonal system: row i reads lower[i] x[i-1] + diagonal[i] x[i] + upper[i] x[i+1] = right[i]. */
export interface TridiagonalSystem {
  /** `lower[0]` is not used. */
  readonly lower: Float64Array;
  readonly diagonal: Float64Array;
  /** The last element is not used. */
  readonly upper: Float64Array;
  readonly right: Float64Array;
}

/**
 * Solves a tridiagonal system in place: `right` holds the solution afterwards; `diagonal` is used up.
 *
 * Elimination without exchange of rows, from both ends to the middle: the two halves do not wait for each other, which nearly halves
 * the time. Safe for systems in which each diagonal outweighs the rest of its row or column, as balances of diffusion and consumption
 * do; others may lose digits.
 * @source L. H. Thomas 1949, in G. H. Golub, C. F. Van Loan, Matrix Computations, 4th ed. 2013, section 4.3 (from memory); from both
 * ends derived for this library.
 */
export function solveTridiagonal(system: TridiagonalSystem): void {
  const { lower, diagonal, upper, right } = system;
  const last = right.length - 1;
  if (last < 2) return solveOneOrTwo(system);
  const middle = last >> 1;
  // i counts up from the first row, k down from the last; of an even number of rows the upper half has one more.
  let k = last;
  let inverse = 1 / diagonal[0]!;
  let reached = right[0]!;
  let inverseAbove = 1 / diagonal[last]!;
  let reachedAbove = right[last]!;
  diagonal[0] = inverse;
  diagonal[last] = inverseAbove;
  if (last % 2 === 1) {
    k--;
    const factorAbove = upper[k]! * inverseAbove;
    inverseAbove = 1 / (diagonal[k]! - factorAbove * lower[last]!);
    reachedAbove = right[k]! - factorAbove * reachedAbove;
    diagonal[k] = inverseAbove;
    right[k] = reachedAbove;
  }
  for (let i = 1; i < middle; i++) {
    k--;
    const factor = lower[i]! * inverse;
    const factorAbove = upper[k]! * inverseAbove;
    inverse = 1 / (diagonal[i]! - factor * upper[i - 1]!);
    inverseAbove = 1 / (diagonal[k]! - factorAbove * lower[k + 1]!);
    reached = right[i]! - factor * reached;
    reachedAbove = right[k]! - factorAbove * reachedAbove;
    diagonal[i] = inverse;
    diagonal[k] = inverseAbove;
    right[i] = reached;
    right[k] = reachedAbove;
  }
  const factor = lower[middle]! * inverse;
  const factorAbove = upper[middle]! * inverseAbove;
  const pivot = diagonal[middle]! - factor * upper[middle - 1]! - factorAbove * lower[middle + 1]!;
  let x = (right[middle]! - factor * reached - factorAbove * reachedAbove) / pivot;
  let xAbove = x;
  right[middle] = x;
  k = middle;
  for (let i = middle - 1; i >= 0; i--) {
    k++;
    x = (right[i]! - upper[i]! * x) * diagonal[i]!;
    xAbove = (right[k]! - lower[k]! * xAbove) * diagonal[k]!;
    right[i] = x;
    right[k] = xAbove;
  }
  if (k < last) right[last] = (right[last]! - lower[last]! * xAbove) * diagonal[last]!;
}

function solveOneOrTwo({ lower, diagonal, upper, right }: TridiagonalSystem): void {
  if (right.length === 1) {
    right[0]! /= diagonal[0]!;
    return;
  }
  const factor = lower[1]! / diagonal[0]!;
  right[1] = (right[1]! - factor * right[0]!) / (diagonal[1]! - factor * upper[0]!);
  right[0] = (right[0]! - upper[0]! * right[1]!) / diagonal[0]!;
}
