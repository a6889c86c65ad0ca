/** LDL' factor of W + stiffness D'D (second differences): unit lower triangle with two bands. */
interface Banded {
  /** n, diagonal of D. */
  readonly d: Float64Array;
  /** n, first band of L: L(i+1, i). */
  readonly e: Float64Array;
  /** n, second band of L: L(i+2, i). */
  readonly f: Float64Array;
  /** n, inverse of L applied to W y. */
  readonly z: Float64Array;
}

/**
 * Whittaker smoothing with second differences: minimises sum w (y - z)^2 + stiffness * sum (second difference of z)^2, in O(n) by banded Cholesky (LDL^T).
 * Eilers 2003, Anal. Chem. 75, 3631. Detail of a period of P samples is halved at stiffness (P / 2 pi)^4.
 *
 * @param y         n values; ignored where the weight is 0 (may be NaN there)
 * @param weight    n, >= 0, at least two of them positive
 * @returns n smoothed values
 */
export function whittaker(y: Float64Array, weight: Float64Array, stiffness: number): Float64Array {
  const { d, e, f, z } = factor(y, weight, stiffness);
  const n = y.length;
  for (let i = n - 1; i >= 0; i--) {
    let zi = z[i] / d[i];
    if (i + 1 < n) zi -= e[i] * z[i + 1];
    if (i + 2 < n) zi -= f[i] * z[i + 2];
    z[i] = zi;
  }
  return z;
}

/**
 * Variances of what `whittaker` returns when the weights are 1 / variance of each y: the diagonal of (W + stiffness D'D)^-1, in O(n) from the factor
 * (Hutchinson & de Hoog 1985, Numer. Math. 47, 99).
 *
 * @returns n
 */
export function whittakerVariance(weight: Float64Array, stiffness: number): Float64Array {
  const n = weight.length;
  const { d, e, f } = factor(new Float64Array(n), weight, stiffness);
  const variance = new Float64Array(n);
  // elements (i+1, i+1), (i+1, i+2), (i+2, i+2) of the inverse, from the last row upwards
  let below = 0;
  let beside = 0;
  let beyond = 0;
  for (let i = n - 1; i >= 0; i--) {
    const e1 = i + 1 < n ? e[i] : 0;
    const f1 = i + 2 < n ? f[i] : 0;
    const next = -e1 * below - f1 * beside;
    const afterNext = -e1 * beside - f1 * beyond;
    const own = 1 / d[i] - e1 * next - f1 * afterNext;
    variance[i] = own;
    beyond = below;
    beside = next;
    below = own;
  }
  return variance;
}

function factor(y: Float64Array, weight: Float64Array, stiffness: number): Banded {
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
  return { d, e, f, z };
}
