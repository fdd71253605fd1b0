// Solves the small symmetric systems in which readings are weighed against what was known before.

/**
 * Solves A x = b for a symmetric, positive definite A of a few rows, by Cholesky's factors A = L L'.
 *
 * Only the lower half of A is read. An A that is not positive definite gives NaN.
 * @source A.-L. Cholesky, in G. H. Golub, C. F. Van Loan, Matrix Computations, 4th ed. 2013, section 4.2 (from memory).
 */
export function solveDefinite(A: readonly (readonly number[])[], b: readonly number[]): number[] {
  const L: number[][] = [];
  for (let i = 0; i < b.length; i++) {
    const row: number[] = [];
    for (let j = 0; j < i; j++) row.push((A[i]![j]! - dot(row, L[j]!, j)) / L[j]![j]!);
    row.push(Math.sqrt(A[i]![i]! - dot(row, row, i)));
    L.push(row);
  }
  const x: number[] = [];
  for (let i = 0; i < b.length; i++) x.push((b[i]! - dot(L[i]!, x, i)) / L[i]![i]!);
  for (let i = b.length - 1; i >= 0; i--) {
    for (let k = i + 1; k < b.length; k++) x[i]! -= L[k]![i]! * x[k]!;
    x[i]! /= L[i]![i]!;
  }
  return x;
}

/** Sum over the first `count` products. */
function dot(a: readonly number[], b: readonly number[], count: number): number {
  let sum = 0;
  for (let k = 0; k < count; k++) sum += a[k]! * b[k]!;
  return sum;
}
