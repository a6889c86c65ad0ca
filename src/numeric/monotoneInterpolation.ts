/**
 * Monotone piecewise cubic interpolation (Fritsch & Carlson 1980, SIAM J. Numer. Anal. 17, 238, with the harmonic-mean slopes of Fritsch & Butland 1984).
 * Outside the nodes the end value is held.
 *
 * @param x nodes, strictly ascending, at least 1
 * @param y values at the nodes
 */
export function interpolateMonotone(x: ArrayLike<number>, y: ArrayLike<number>, at: number): number {
  const last = x.length - 1;
  if (at <= x[0]) return y[0];
  if (at >= x[last]) return y[last];
  let k = 0;
  while (at > x[k + 1]) k++;
  const h = x[k + 1] - x[k];
  const secant = (y[k + 1] - y[k]) / h;
  const t = (at - x[k]) / h;
  const slopeLeft = k > 0 ? slopeAt(x, y, k) : secant;
  const slopeRight = k + 1 < last ? slopeAt(x, y, k + 1) : secant;
  const t2 = t * t;
  const t3 = t2 * t;
  return (2 * t3 - 3 * t2 + 1) * y[k] + (t3 - 2 * t2 + t) * h * slopeLeft + (3 * t2 - 2 * t3) * y[k + 1] + (t3 - t2) * h * slopeRight;
}

function slopeAt(x: ArrayLike<number>, y: ArrayLike<number>, k: number): number {
  const h0 = x[k] - x[k - 1];
  const h1 = x[k + 1] - x[k];
  const d0 = (y[k] - y[k - 1]) / h0;
  const d1 = (y[k + 1] - y[k]) / h1;
  if (d0 * d1 <= 0) return 0;
  const w0 = 2 * h1 + h0;
  const w1 = h1 + 2 * h0;
  return (w0 + w1) / (w0 / d0 + w1 / d1);
}
