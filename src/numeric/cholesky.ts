/**
 * Cholesky factor of a symmetric positive matrix, in place: the lower half (row by row, n x n) becomes L with A = L L'. The upper half is not read.
 *
 * @returns false when the matrix is not positive definite to working precision
 */
export function choleskyFactor(into: Float64Array, n: number): boolean {
  for (let j = 0; j < n; j++) {
    let diagonal = into[j * n + j];
    for (let k = 0; k < j; k++) diagonal -= into[j * n + k] * into[j * n + k];
    if (!(diagonal > 1e-14 * Math.abs(into[j * n + j]))) return false;
    const root = Math.sqrt(diagonal);
    into[j * n + j] = root;
    for (let i = j + 1; i < n; i++) {
      let sum = into[i * n + j];
      for (let k = 0; k < j; k++) sum -= into[i * n + k] * into[j * n + k];
      into[i * n + j] = sum / root;
    }
  }
  return true;
}

/** Solves L L' x = b with the factor of `choleskyFactor`; `rhs` holds x afterwards. */
export function choleskySolve(factor: Float64Array, n: number, rhs: Float64Array): void {
  for (let i = 0; i < n; i++) {
    let sum = rhs[i];
    for (let k = 0; k < i; k++) sum -= factor[i * n + k] * rhs[k];
    rhs[i] = sum / factor[i * n + i];
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = rhs[i];
    for (let k = i + 1; k < n; k++) sum -= factor[k * n + i] * rhs[k];
    rhs[i] = sum / factor[i * n + i];
  }
}
