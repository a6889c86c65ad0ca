import { median } from '../numeric/index.ts';
import type { Remark } from '../problems/index.ts';
import type { Spectrum } from '../spectrum/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import { type Continuum, type ContinuumInput, fitContinuum, typical } from './continuum.ts';
import { noiseCorrelation } from './correlation.ts';
import type { MeasureSettings, WidthLaw } from './feature.ts';
import type { FitSamples } from './fitSamples.ts';
import { toldWidth } from './learnLineSpread.ts';
import { constantResolvingPower, sigmaInSamples, widthPrior } from './lineSpread.ts';
import { scatterNoise, scatterOverNoise } from './noise.ts';
import { regularAxis } from './regularAxis.ts';
import { saturatedSamples } from './saturation.ts';
import { findSpikes } from './spikes.ts';
import { widthOfTallPeaks } from './tallPeaks.ts';

/** Errors are taken as they are when the scatter agrees with them this well. */
const NOISE_AGREES = 0.1;
/** A line is at least this wide where the continuum is drawn, samples. */
const LEAST_FWHM = 1.5;
/** Samples of a stretch that give its rough level. */
const ENOUGH_FOR_MEDIAN = 500;
/** Neighbours share their noise when it counts more than this. */
const NOISE_SHARED = 1.1;

/** A spectrum ready for the search: noise, first line width, continuum, spikes. */
export interface Prepared {
  readonly samples: FitSamples;
  readonly continuum: Continuum;
  readonly noiseFactor?: number;
  readonly noiseCorrelation: number;
  /** First idea of the line width. */
  readonly width: { readonly law: WidthLaw; readonly from: 'user' | 'file' | 'lines' | 'sampling' };
  readonly told: ReturnType<typeof toldWidth>;
  readonly spikes: readonly number[];
  /** Sample numbers where the detector was full: not used. */
  readonly saturated: readonly number[];
}

/** @param remarks what is assumed on the way is added */
export function prepare(spectrum: Spectrum, settings: MeasureSettings, remarks: Remark[]): Prepared {
  const { flux } = spectrum;
  const note = (code: string, found: string, weight: Remark['weight'] = 'note') =>
    remarks.push({ code, weight, where: { file: spectrum.name }, found });
  const regular = regularAxis(spectrum.wavelength);
  const x = regular ?? spectrum.wavelength;
  if (regular) note('axis-unrounded', 'the wavelengths are a regular axis printed with few digits; fits use the regular one');
  const noise = spectrum.fluxErr ? spectrum.fluxErr.slice() : scatterNoise(spectrum);
  const usable = usableSamples(spectrum, noise);
  const sampleWidth = widthsOfSamples(x);
  const told = toldWidth(spectrum, settings);
  const width = told ?? widthByPeaks(x, flux, noise, usable);
  const fwhm = sigmaInSamples({ x, sampleWidth }, widthPrior(width.law, 0));
  for (let i = 0; i < fwhm.length; i++) fwhm[i] = Math.max(LEAST_FWHM, FWHM_PER_SIGMA * fwhm[i]);
  const input: ContinuumInput = { x, flux, noise, usable, fwhm, sampleWidth };
  let continuum = fitContinuum(input, settings.continuum);
  const factor = scatterOverNoise(flux, continuum.level, noise, usable);
  if (Math.abs(factor - 1) > NOISE_AGREES) {
    for (let i = 0; i < noise.length; i++) noise[i] *= factor;
    continuum = fitContinuum(input, settings.continuum);
    if (spectrum.fluxErr)
      note(
        'errors-rescaled',
        `the scatter about the continuum is ${factor.toFixed(2)} times the errors of the file; errors were multiplied by it`,
        factor > 2 || factor < 0.5 ? 'warning' : 'note',
      );
  }
  if (!spectrum.fluxErr)
    note('no-errors', 'the file has no errors; the noise is estimated from the scatter of neighbouring samples (Stoehr et al. 2008)');
  const y = new Float64Array(x.length);
  for (let i = 0; i < y.length; i++) y[i] = flux[i] - continuum.level[i];
  const samples: FitSamples = { x, y, noise, usable, sampleWidth };
  const sigma = sigmaInSamples(samples, widthPrior(width.law, 0));
  const saturated = saturatedSamples(flux, y, noise, sigma);
  for (const full of saturated) usable[full] = 0;
  const spikes = findSpikes(y, noise, usable, sigma);
  for (const spike of spikes) usable[spike] = 0;
  const shared = sharedNoise(samples, continuum, typical(sigma));
  if (shared > 1)
    note(
      'noise-correlated',
      `neighbouring samples share their noise (resampled or smoothed): errors under a line are ${shared.toFixed(2)} times what independent samples would give, and were taken so`,
    );
  const noiseFactor = spectrum.fluxErr ? { noiseFactor: factor } : {};
  return { samples, continuum, ...noiseFactor, noiseCorrelation: shared, width, told, spikes, saturated };
}

function usableSamples({ flux, masked }: Spectrum, noise: Float64Array): Uint8Array {
  const usable = new Uint8Array(flux.length);
  for (let i = 0; i < usable.length; i++)
    if (!masked[i] && Number.isFinite(flux[i]) && noise[i] > 0 && noise[i] < Number.POSITIVE_INFINITY) usable[i] = 1;
  return usable;
}

function widthsOfSamples(x: Float64Array): Float64Array {
  const n = x.length;
  const widths = new Float64Array(n);
  for (let i = 1; i < n - 1; i++) widths[i] = (x[i + 1] - x[i - 1]) / 2;
  widths[0] = x[1] - x[0];
  widths[n - 1] = x[n - 1] - x[n - 2];
  return widths;
}

function widthByPeaks(x: Float64Array, flux: Float64Array, noise: Float64Array, usable: Uint8Array) {
  const { resolvingPower, from } = widthOfTallPeaks(x, flux, roughContinuum(flux, usable), noise, usable);
  return { law: constantResolvingPower(resolvingPower, 0.5 * (x[0] + x[x.length - 1])), from };
}

/** Running median of every hundredth of the spectrum, held between: enough to see tall peaks. */
function roughContinuum(flux: Float64Array, usable: Uint8Array): Float64Array {
  const n = flux.length;
  const rough = new Float64Array(n);
  const stretch = Math.max(30, Math.min(2000, Math.ceil(n / 60)));
  const step = Math.ceil(stretch / ENOUGH_FOR_MEDIAN);
  const values = new Float64Array(stretch);
  for (let from = 0; from < n; from += stretch) {
    const to = Math.min(n, from + stretch);
    let count = 0;
    for (let i = from; i < to; i += step) if (usable[i]) values[count++] = flux[i];
    rough.fill(median(values.subarray(0, count)), from, to);
  }
  return rough;
}

/** Takes the noise that neighbours share into the noise of single samples, so that lines get their true errors; returns the factor. */
function sharedNoise({ y, noise, usable }: FitSamples, continuum: Continuum, sigma: number): number {
  const residual = new Float64Array(y.length);
  const free = new Uint8Array(y.length);
  for (let i = 0; i < y.length; i++) {
    residual[i] = y[i] / noise[i];
    free[i] = usable[i] && !continuum.isLine[i] ? 1 : 0;
  }
  const { factor } = noiseCorrelation(residual, free, sigma);
  if (!(factor > NOISE_SHARED)) return 1;
  for (let i = 0; i < noise.length; i++) noise[i] *= factor;
  return factor;
}
