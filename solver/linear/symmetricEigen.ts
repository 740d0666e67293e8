/**
 * The largest eigenvalue of a symmetric tridiagonal matrix, and its vector.
 *
 * Bisection on the number of negative pivots of A − x I, which is the number of eigenvalues below x (Sturm's sequence);
 * then inverse iteration. Golub & Van Loan, Matrix Computations, 4th edition, sections 8.4.1 and 8.2.2 (from memory).
 */
import { BandMatrix } from './bandMatrix';

/** Symmetric and tridiagonal: `diagonal` has n entries, `beside` has n − 1 or more; beside[i] couples i and i + 1. */
export interface SymmetricTridiagonal {
  readonly diagonal: Float64Array;
  readonly beside: Float64Array;
}

/** How many eigenvalues lie below x. */
export function eigenvaluesBelow(matrix: SymmetricTridiagonal, x: number): number {
  const { diagonal, beside } = matrix;
  let count = 0;
  let pivot = 1;
  for (let i = 0; i < diagonal.length; i++) {
    const coupling = i === 0 ? 0 : beside[i - 1];
    pivot = diagonal[i] - x - (coupling === 0 ? 0 : (coupling * coupling) / pivot);
    // A pivot of exactly zero is taken as just above it; the count of the rows that follow stays right.
    if (pivot === 0) pivot = Number.MIN_VALUE ** 0.5;
    if (pivot < 0) count++;
  }
  return count;
}

/** Upper bound of the largest eigenvalue: the largest sum of a row (Gershgorin's discs). */
function rowSumBound({ diagonal, beside }: SymmetricTridiagonal): number {
  let bound = -Infinity;
  for (let i = 0; i < diagonal.length; i++) {
    const left = i > 0 ? Math.abs(beside[i - 1]) : 0;
    const right = i < diagonal.length - 1 ? Math.abs(beside[i]) : 0;
    bound = Math.max(bound, diagonal[i] + left + right);
  }
  return bound;
}

/** Largest eigenvalue to about 1e-14 of its size; for matrices without negative eigenvalues. NaN where entries are not finite. */
export function largestEigenvalue(matrix: SymmetricTridiagonal): number {
  const size = matrix.diagonal.length;
  let high = rowSumBound(matrix) * (1 + 1e-12);
  let low = matrix.diagonal.reduce((largest, value) => Math.max(largest, value), 0);
  if (!(high < Infinity)) return NaN;
  while (high - low > 1e-14 * high) {
    const middle = low + (high - low) / 2;
    if (middle <= low || middle >= high) break;
    if (eigenvaluesBelow(matrix, middle) === size) high = middle;
    else low = middle;
  }
  return high;
}

/** Unit vector of the eigenvalue nearest to `value`; entries beside its place of weight are small but not exact. */
export function eigenvectorAt({ diagonal, beside }: SymmetricTridiagonal, value: number): Float64Array {
  const size = diagonal.length;
  const shifted = new BandMatrix(size);
  // Just off the eigenvalue, so that no pivot vanishes; three iterations then leave nothing of the other vectors.
  const shift = value * (1 + 1e-12);
  for (let i = 0; i < size; i++) {
    shifted.diagonal[i] = diagonal[i] - shift;
    if (i > 0) shifted.lower[i] = beside[i - 1];
    if (i < size - 1) shifted.upper[i] = beside[i];
  }
  shifted.factorise();
  // A start that no eigenvector is orthogonal to by symmetry.
  const vector = Float64Array.from({ length: size }, (_, i) => 1 + ((i * 0.618) % 1));
  for (let iteration = 0; iteration < 3; iteration++) {
    shifted.solve(vector);
    const norm = Math.sqrt(vector.reduce((sum, entry) => sum + entry * entry, 0));
    for (let i = 0; i < size; i++) vector[i] /= norm;
  }
  return vector;
}
