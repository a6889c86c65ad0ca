import { quantile, robustSigma } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { FitSamples, WidthPrior } from './fitSamples.ts';

/** Line width as the fits expect it: constant resolving power, with the scatter of ln(width) seen on isolated lines. */
export interface LineSpread {
  /** lambda / FWHM. */
  readonly resolvingPower: number;
  readonly from: 'user' | 'file' | 'lines' | 'sampling';
  /** One sigma of ln(width). */
  readonly spread: number;
}

export const sigmaAt = (resolvingPower: number, wavelength: number) => wavelength / (resolvingPower * FWHM_PER_SIGMA);

/** The expected width of a line in samples, one value a sample. */
export function sigmaInSamples({ x, sampleWidth }: FitSamples, width: WidthPrior): Float64Array {
  const sigma = new Float64Array(x.length);
  for (let i = 0; i < x.length; i++) sigma[i] = width.sigmaAt(x[i]) / sampleWidth[i];
  return sigma;
}

/** Peaks must stand out this far, in units of the noise, to show their width by their half height. */
const TALL_SIGMA = 12;
const FEW_PEAKS = 3;
const MOST_PEAKS = 80;
/** Samples in one FWHM when no line says otherwise: spectrographs are built to two and a half. */
const SAMPLES_PER_FWHM = 2.5;
/** Blends widen, nothing narrows: the instrument is sought in the narrower half of the peaks. */
const NARROW_QUANTILE = 0.35;

/**
 * First idea of the line width from the half-height widths of tall peaks.
 *
 * @param x Angstrom
 * @param residual flux above a rough continuum
 */
export function widthOfTallPeaks(
  x: Float64Array,
  residual: Float64Array,
  noise: Float64Array,
  usable: Uint8Array,
): { resolvingPower: number; from: 'lines' | 'sampling' } {
  const tall: { at: number; height: number }[] = [];
  for (let i = 3; i < x.length - 3; i++) {
    if (!usable[i] || !(residual[i] > TALL_SIGMA * noise[i])) continue;
    if (residual[i] < residual[i - 1] || residual[i] <= residual[i + 1]) continue;
    // spikes have nothing beside them
    if (Math.max(residual[i - 1], residual[i + 1]) < 0.2 * residual[i]) continue;
    tall.push({ at: i, height: residual[i] / noise[i] });
  }
  tall.sort((a, b) => b.height - a.height);
  const powers = tall
    .slice(0, MOST_PEAKS)
    .map(({ at }) => x[at] / halfHeightWidth(x, residual, at))
    .filter((r) => r > 0 && Number.isFinite(r));
  if (powers.length >= FEW_PEAKS) return { resolvingPower: quantile(powers, 1 - NARROW_QUANTILE), from: 'lines' };
  const middle = x.length >> 1;
  return { resolvingPower: x[middle] / (SAMPLES_PER_FWHM * (x[middle + 1] - x[middle])), from: 'sampling' };
}

function halfHeightWidth(x: Float64Array, residual: Float64Array, at: number): number {
  const half = residual[at] / 2;
  let low = at;
  while (low > 0 && residual[low] > half) low--;
  let high = at;
  while (high < x.length - 1 && residual[high] > half) high++;
  const left = x[low] + ((half - residual[low]) / (residual[low + 1] - residual[low])) * (x[low + 1] - x[low]);
  const right = x[high] - ((half - residual[high]) / (residual[high - 1] - residual[high])) * (x[high] - x[high - 1]);
  return right - left;
}

const LEAST_SPREAD = 0.015;
const MOST_SPREAD = 0.4;

/**
 * The width and its scatter from fitted isolated lines.
 *
 * @param fits resolving power (lambda / FWHM) of each and its relative error
 */
export function spreadOfLines(
  fits: readonly { readonly power: number; readonly relativeErr: number }[],
): { resolvingPower: number; spread: number } | undefined {
  if (fits.length < FEW_PEAKS) return undefined;
  const logs = fits.map(({ power }) => Math.log(power));
  const centre = quantile(logs, 0.5);
  const measuredErr = quantile(
    fits.map((f) => f.relativeErr),
    0.5,
  );
  const scatter = Math.sqrt(Math.max(0, robustSigma(logs) ** 2 - measuredErr ** 2));
  return { resolvingPower: Math.exp(centre), spread: Math.min(MOST_SPREAD, Math.max(LEAST_SPREAD, 1.2 * scatter)) };
}
