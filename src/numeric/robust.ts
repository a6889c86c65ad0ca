/** Standard deviation of a normal distribution over its median absolute deviation: 1 / Phi^-1(3/4). */
const SIGMA_PER_MAD = 1.482_602_218_505_602;

/** Median of the finite values; NaN when there are none. Leaves `values` as it is. */
export function median(values: ArrayLike<number>): number {
  return quantile(values, 0.5);
}

/** Quantile `q` in [0, 1] of the finite values, linear between order statistics; NaN when there are none. */
export function quantile(values: ArrayLike<number>, q: number): number {
  const finite = Float64Array.from(values as ArrayLike<number>).filter((v) => Number.isFinite(v));
  if (finite.length === 0) return Number.NaN;
  finite.sort();
  const at = q * (finite.length - 1);
  const low = Math.floor(at);
  const high = Math.min(low + 1, finite.length - 1);
  return finite[low] + (at - low) * (finite[high] - finite[low]);
}

/** Standard deviation estimated from the median absolute deviation about the median; NaN when there are no finite values. */
export function robustSigma(values: ArrayLike<number>): number {
  const centre = median(values);
  return SIGMA_PER_MAD * median(Float64Array.from(values as ArrayLike<number>, (v) => Math.abs(v - centre)));
}
