/**
 * Solves A x = b by LU decomposition with partial pivoting (Golub & Van Loan 2013, Matrix Computations 4th ed., section 3.4). Both arguments are overwritten.
 *
 * @param into n x n, row by row
 * @param rhs  n; holds x afterwards
 * @returns false when the matrix is singular to working precision
 */
export function solveLinear(into: Float64Array, rhs: Float64Array): boolean {
  const n = rhs.length;
  for (let k = 0; k < n; k++) {
    let pivot = k;
    for (let i = k + 1; i < n; i++) if (Math.abs(into[i * n + k]) > Math.abs(into[pivot * n + k])) pivot = i;
    const top = into[pivot * n + k];
    if (!(Math.abs(top) > 0)) return false;
    if (pivot !== k) {
      for (let j = k; j < n; j++) {
        const kept = into[k * n + j];
        into[k * n + j] = into[pivot * n + j];
        into[pivot * n + j] = kept;
      }
      const kept = rhs[k];
      rhs[k] = rhs[pivot];
      rhs[pivot] = kept;
    }
    for (let i = k + 1; i < n; i++) {
      const factor = into[i * n + k] / top;
      if (factor === 0) continue;
      for (let j = k + 1; j < n; j++) into[i * n + j] -= factor * into[k * n + j];
      rhs[i] -= factor * rhs[k];
    }
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = rhs[i];
    for (let j = i + 1; j < n; j++) sum -= into[i * n + j] * rhs[j];
    rhs[i] = sum / into[i * n + i];
  }
  return true;
}
