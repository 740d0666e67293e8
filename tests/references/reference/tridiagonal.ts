/** Solves a tridiagonal system by elimination without pivots (the balances are dominated by their diagonal); x in place of b. */
export function solveTridiagonal(
  lower: Float64Array,
  diagonal: Float64Array,
  upper: Float64Array,
  b: Float64Array,
  scratch: Float64Array,
): void {
  const n = b.length;
  let pivot = diagonal[0];
  b[0] /= pivot;
  for (let i = 1; i < n; i++) {
    scratch[i] = upper[i - 1] / pivot;
    pivot = diagonal[i] - lower[i] * scratch[i];
    b[i] = (b[i] - lower[i] * b[i - 1]) / pivot;
  }
  for (let i = n - 2; i >= 0; i--) b[i] -= scratch[i + 1] * b[i + 1];
}
