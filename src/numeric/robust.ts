/** Standard deviation of a normal distribution over its median absolute deviation: 1 / Phi^-1(3/4). */
const SIGMA_PER_MAD = 1.482_602_218_505_602;

/** Median of the finite values; NaN when there are none. Leaves `values` as it is. */
export function median(values: ArrayLike<number>): number {
  return quantile(values, 0.5);
}

/** Quantile `q` in [0, 1] of the finite values, linear between order statistics; NaN when there are none. Leaves `values` as it is. */
export function quantile(values: ArrayLike<number>, q: number): number {
  const all = new Float64Array(values.length);
  let n = 0;
  for (let i = 0; i < values.length; i++) if (Number.isFinite(values[i])) all[n++] = values[i];
  if (n === 0) return Number.NaN;
  const at = q * (n - 1);
  const low = Math.floor(at);
  const value = select(all, n, low);
  if (at === low || low + 1 >= n) return value;
  let next = all[low + 1];
  for (let i = low + 2; i < n; i++) if (all[i] < next) next = all[i];
  return value + (at - low) * (next - value);
}

/** Standard deviation estimated from the median absolute deviation about the median; NaN when there are no finite values. */
export function robustSigma(values: ArrayLike<number>): number {
  const centre = median(values);
  const away = new Float64Array(values.length);
  for (let i = 0; i < values.length; i++) away[i] = Math.abs(values[i] - centre);
  return SIGMA_PER_MAD * median(away);
}

/**
 * The value that sorting would bring to place `k` of the first `n`, found in O(n): Hoare 1961, Comm. ACM 4, 321. Reorders `into` so that nothing before `k` is larger and
 * nothing after it smaller.
 */
function select(into: Float64Array, n: number, k: number): number {
  let left = 0;
  let right = n - 1;
  while (left < right) {
    const pivot = into[(left + right) >> 1];
    let i = left;
    let j = right;
    while (i <= j) {
      while (into[i] < pivot) i++;
      while (into[j] > pivot) j--;
      if (i <= j) {
        const swapped = into[i];
        into[i++] = into[j];
        into[j--] = swapped;
      }
    }
    if (k <= j) right = j;
    else if (k >= i) left = i;
    else break;
  }
  return into[k];
}
