import { median } from '../numeric/index.ts';

/** How neighbouring samples share their noise: resampling and smoothing spread one sample's noise over several. */
export interface NoiseCorrelation {
  /** Correlation at distances 0, 1, 2 ... samples; the first is 1. */
  readonly byDistance: readonly number[];
  /** Noise under a line over what independent samples would give: the error of every flux and centroid goes up by it. */
  readonly factor: number;
}

/** Residuals beyond this many sigma are lines that were not seen as such. */
const MOST_SIGMA = 3.5;
/** The spectrum is looked at in so many stretches and their median is taken: crowds of faint lines spoil some, not all. */
const STRETCHES = 40;
const FEWEST_PAIRS = 60;
/** More samples of one stretch than this tell nothing new. */
const ENOUGH_SAMPLES = 1500;
const MOST_DISTANCE = 16;
/** Correlations below this are the smoothing of the continuum and chance. */
const LEAST_CORRELATION = 0.08;

/**
 * Correlation of the noise from line-free samples.
 *
 * @param residual n, flux minus continuum in units of its noise
 * @param free     n, 1 = usable and no line
 * @param sigma    width of a line in samples, where the factor is wanted
 */
export function noiseCorrelation(residual: Float64Array, free: Uint8Array, sigma: number): NoiseCorrelation {
  const byDistance = [1];
  for (let distance = 1; distance <= MOST_DISTANCE; distance++) {
    const rho = correlationAt(residual, free, distance);
    if (!(rho > LEAST_CORRELATION)) break;
    byDistance.push(rho);
  }
  return { byDistance, factor: Math.sqrt(varianceOf(byDistance, sigma)) };
}

function correlationAt(residual: Float64Array, free: Uint8Array, distance: number): number {
  const length = Math.max(200, Math.ceil(residual.length / STRETCHES));
  const found: number[] = [];
  for (let from = 0; from < residual.length; from += length) {
    const to = Math.min(residual.length, from + Math.min(length, ENOUGH_SAMPLES));
    let products = 0;
    let squares = 0;
    let pairs = 0;
    for (let i = from; i + distance < to; i++) {
      const a = residual[i];
      const b = residual[i + distance];
      if (!free[i] || !free[i + distance] || !(Math.abs(a) < MOST_SIGMA) || !(Math.abs(b) < MOST_SIGMA)) continue;
      products += a * b;
      squares += 0.5 * (a * a + b * b);
      pairs++;
    }
    if (pairs >= FEWEST_PAIRS && squares > 0) found.push(products / squares);
  }
  return median(found);
}

/** Variance of a matched filter of this width over that with independent samples: sum over distances of rho(d) exp(-d^2 / 4 sigma^2). */
const varianceOf = (byDistance: readonly number[], sigma: number) =>
  byDistance.reduce((sum, rho, d) => sum + (d === 0 ? 1 : 2 * rho * Math.exp((-d * d) / (4 * sigma * sigma))), 0);
