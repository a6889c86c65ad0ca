/**
 * Whittaker smoothing with second differences: minimises sum w (y - z)^2 + stiffness * sum (second difference of z)^2, in O(n) by banded Cholesky (LDL^T).
 * Eilers 2003, Anal. Chem. 75, 3631. Detail of a period of P samples is halved at stiffness (P / 2 pi)^4.
 *
 * @param y         n values; ignored where the weight is 0 (may be NaN there)
 * @param weight    n, >= 0, at least two of them positive
 * @returns n smoothed values
 */
export function whittaker(y: Float64Array, weight: Float64Array, stiffness: number): Float64Array {
  const n = y.length;
  const d = new Float64Array(n);
  const e = new Float64Array(n);
  const f = new Float64Array(n);
  const z = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    // row i of D'D for second differences: 1 5 6 6 ... 6 5 1 on the diagonal
    const inner = i >= 2 && i < n - 2;
    const diagonal = n < 3 ? 0 : inner ? 6 : i === 0 || i === n - 1 ? 1 : n === 3 ? 4 : 5;
    const beside = n < 3 || i === n - 1 ? 0 : i === 0 || i === n - 2 ? -2 : -4;
    const beyond = i < n - 2 ? 1 : 0;
    const w = weight[i];
    let di = w + stiffness * diagonal;
    let ei = stiffness * beside;
    let zi = w > 0 ? w * y[i] : 0;
    if (i >= 1) {
      di -= e[i - 1] * e[i - 1] * d[i - 1];
      ei -= e[i - 1] * f[i - 1] * d[i - 1];
      zi -= e[i - 1] * z[i - 1];
    }
    if (i >= 2) {
      di -= f[i - 2] * f[i - 2] * d[i - 2];
      zi -= f[i - 2] * z[i - 2];
    }
    // a hair of ridge keeps long stretches of zero weight solvable
    di = Math.max(di, 1e-300);
    d[i] = di;
    e[i] = ei / di;
    f[i] = (stiffness * beyond) / di;
    z[i] = zi;
  }
  for (let i = n - 1; i >= 0; i--) {
    let zi = z[i] / d[i];
    if (i + 1 < n) zi -= e[i] * z[i + 1];
    if (i + 2 < n) zi -= f[i] * z[i + 2];
    z[i] = zi;
  }
  return z;
}
