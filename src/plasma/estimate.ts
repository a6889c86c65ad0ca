import { quantile } from '../numeric/index.ts';

/** A quantity found from draws of the noise, or a limit of it. */
export type Estimate =
  /** `low` and `high`: one sigma, the 16th and 84th of 100 draws. */
  | { readonly ended: 'value'; readonly value: number; readonly low: number; readonly high: number }
  /** Below or above `limit`, two sigma. */
  | { readonly ended: 'below' | 'above'; readonly limit: number }
  | { readonly ended: 'none'; readonly reason: string };

const ONE_SIGMA_LOW = 0.1587;
const TWO_SIGMA_LOW = 0.0228;

/** Interval of the draws about a value; the value stays inside it, and without draws it is all of it. */
export function estimateOf(value: number, draws: ArrayLike<number>): Estimate {
  if (draws.length === 0) return { ended: 'value', value, low: value, high: value };
  const low = quantile(draws, ONE_SIGMA_LOW);
  const high = quantile(draws, 1 - ONE_SIGMA_LOW);
  return { ended: 'value', value, low: Math.min(low, value), high: Math.max(high, value) };
}

/**
 * Value or limit of a quantity that a table bounds.
 *
 * @param value undefined when the measured ratio itself lies beyond the table, on the side `beyond`
 * @param draws of the noise; draws beyond the table stand at its ends
 * @param range the ends of the table
 * More than a sixth of the draws at an end make a limit: the one-sigma interval is open there.
 */
export function boundedEstimate(
  value: number | undefined,
  beyond: 'below' | 'above' | undefined,
  draws: ArrayLike<number>,
  [first, last]: readonly [number, number],
): Estimate {
  const n = draws.length;
  let atFirst = 0;
  let atLast = 0;
  for (let k = 0; k < n; k++) {
    if (draws[k] <= first) atFirst++;
    if (draws[k] >= last) atLast++;
  }
  if (beyond === 'below' || atFirst > ONE_SIGMA_LOW * n) {
    const limit = quantile(draws, 1 - TWO_SIGMA_LOW);
    return limit > first
      ? { ended: 'below', limit }
      : { ended: 'none', reason: 'the ratio lies more than two sigma beyond its thin or cool end' };
  }
  if (beyond === 'above' || atLast > ONE_SIGMA_LOW * n) {
    const limit = quantile(draws, TWO_SIGMA_LOW);
    return limit < last
      ? { ended: 'above', limit }
      : { ended: 'none', reason: 'the ratio lies more than two sigma beyond its dense or hot end' };
  }
  return value === undefined ? { ended: 'none', reason: 'no solution' } : estimateOf(value, draws);
}
