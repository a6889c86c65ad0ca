import { median, robustSigma } from '../numeric/index.ts';
import type { Spectrum } from '../spectrum/index.ts';

/** Scale of |2 f(i) - f(i-2) - f(i+2)| to one sigma: 1.482602 / sqrt 6 (Stoehr et al. 2008, ASP Conf. 394, 505). */
const DER_SNR = 1.482602 / Math.sqrt(6);
/** Samples in one window of the local estimate. */
const WINDOW = 400;

/**
 * Local noise from the scatter of samples two apart, one value a sample: medians in windows, linear between their centres.
 * Emission lines narrower than a window do not move a median.
 */
export function scatterNoise(spectrum: Spectrum): Float64Array {
  const { flux, masked } = spectrum;
  const n = flux.length;
  const centres: number[] = [];
  const levels: number[] = [];
  const window = Math.min(WINDOW, n);
  for (let start = 0; start < n; start += window / 2) {
    const from = Math.floor(Math.min(start, n - window));
    const differences: number[] = [];
    for (let i = from + 2; i < from + window - 2; i++) {
      if (!masked[i] && !masked[i - 2] && !masked[i + 2]) differences.push(Math.abs(2 * flux[i] - flux[i - 2] - flux[i + 2]));
    }
    const level = DER_SNR * median(differences);
    if (level > 0) {
      centres.push(from + window / 2);
      levels.push(level);
    }
    if (from + window >= n) break;
  }
  return linearBetween(centres, levels, n);
}

/** Fewer samples than this say nothing of the noise. */
const FEWEST_SAMPLES = 20;
const MOST_SAMPLES = 50_000;

/** Robust scatter of the residuals in units of the errors; the bulk of the samples holds no line. 1 when there are too few. */
export function scatterOverNoise(flux: Float64Array, continuum: Float64Array, noise: Float64Array, usable: Uint8Array): number {
  const residuals: number[] = [];
  const step = Math.max(1, Math.floor(flux.length / MOST_SAMPLES));
  for (let i = 0; i < flux.length; i += step) {
    const r = (flux[i] - continuum[i]) / noise[i];
    // only the lower half: emission lines push the upper one
    if (usable[i] && r < 0) residuals.push(r, -r);
  }
  return residuals.length < FEWEST_SAMPLES ? 1 : robustSigma(residuals);
}

/** Values at the whole numbers 0 ... n-1 from nodes; held outside; NaN without nodes. */
export function linearBetween(x: readonly number[], y: readonly number[], n: number): Float64Array {
  const values = new Float64Array(n).fill(Number.NaN);
  if (x.length === 0) return values;
  let k = 0;
  for (let i = 0; i < n; i++) {
    while (k + 1 < x.length && x[k + 1] < i) k++;
    if (i <= x[0] || x.length === 1) values[i] = y[0];
    else if (i >= x[x.length - 1]) values[i] = y[y.length - 1];
    else values[i] = y[k] + ((y[k + 1] - y[k]) * (i - x[k])) / (x[k + 1] - x[k]);
  }
  return values;
}
