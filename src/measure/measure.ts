import { median, normalTail, robustSigma } from '../numeric/index.ts';
import { ProblemError, type Remark } from '../problems/index.ts';
import { countUsable, type Spectrum } from '../spectrum/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import { addLocalContinuum, addProfiles } from './addProfiles.ts';
import { fitContinuum } from './continuum.ts';
import type { Feature, Group, Measurement, MeasureSettings } from './feature.ts';
import { artefactFeature, featuresOfFit } from './featuresOfFit.ts';
import { fitGroup } from './fitGroup.ts';
import { fitPasses } from './fitPasses.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { groupPeaks } from './groups.ts';
import { type LineSpread, sigmaAt, spreadOfLines, widthOfTallPeaks } from './lineSpread.ts';
import { matchedFilter } from './matchedFilter.ts';
import { scatterNoise } from './noise.ts';
import { findPeaks, type Peak } from './peaks.ts';
import { regularAxis } from './regularAxis.ts';
import { findSpikes } from './spikes.ts';

/** Progress is told as a share in [0, 1] of the named stage; a run is cancelled between groups. */
export interface MeasureControl {
  readonly progress?: (stage: string, share: number) => void;
  readonly signal?: AbortSignal;
}

const FEWEST_SAMPLES = 20;
/** The file's errors are taken as they are when the scatter agrees with them this well. */
const NOISE_AGREES = 0.1;
/** Width is free within this before the lines have shown what is usual. */
const FREE_SPREAD = 0.5;
/** S/N of an isolated line whose width tells of the instrument. */
const TELLING_SNR = 25;
const MOST_TELLING = 60;
/** Anything above this near it means that a line is not isolated. */
const ISOLATED_SNR = 5;

/**
 * Measures every emission and absorption feature of a spectrum.
 *
 * @returns features by ascending centroid, with continuum, model and noise one value a sample
 * @throws ProblemError when fewer than 20 samples can be used
 * Checked in tests/measure/measure.test.ts on seeded spectra with known truth; `npm run bench` scores it beside a script.
 */
export function measure(spectrum: Spectrum, settings: MeasureSettings, control: MeasureControl = {}): Measurement {
  if (countUsable(spectrum) < FEWEST_SAMPLES) {
    throw new ProblemError({
      code: 'too-few-samples',
      where: { file: spectrum.name },
      found: `${countUsable(spectrum)} usable samples`,
      expected: `at least ${FEWEST_SAMPLES}`,
      doThis: 'Choose another column or another part of the file.',
    });
  }
  const remarks: Remark[] = [];
  const state = prepare(spectrum, settings, remarks);
  const spread = learnLineSpread(state, settings, spectrum);
  control.progress?.('detecting', 0);
  const width: WidthPrior = { sigmaAt: (w) => sigmaAt(spread.resolvingPower, w), spread: spread.spread };
  const spikes = [...state.spikes];
  const fits = fitPasses(
    state.samples,
    {
      width,
      threshold: settings.thresholdSigma,
      absorption: settings.absorption,
      between: (share) => {
        control.signal?.throwIfAborted();
        control.progress?.('fitting', share);
      },
    },
    spikes,
    (share) =>
      remarks.push({
        code: 'not-gaussian',
        weight: 'note',
        where: { file: spectrum.name },
        found: `strong lines are not Gaussian: ${(100 * share).toFixed(1)} % of them is left over by the fits, and was added to the noise near them`,
      }),
  );
  const groups = fits.map((fit): Group => ({ first: fit.first, last: fit.last, chi2: fit.chi2, dof: fit.dof }));
  const model = Float64Array.from(state.continuum);
  for (const fit of fits) {
    addProfiles(state.samples, fit.components, model);
    addLocalContinuum(state.samples, fit, model);
  }
  const features = fits.flatMap((fit, group): Feature[] =>
    featuresOfFit(state.samples, fit, {
      continuum: state.continuum,
      group,
      spread,
      threshold: settings.thresholdSigma,
      masked: spectrum.masked,
    }),
  );
  for (const spike of new Set(spikes)) features.push(artefactFeature(state.samples, spike, state.continuum, groups));
  features.sort((a, b) => a.centroid - b.centroid);
  return {
    features: features.map((feature, index) => ({ ...feature, index })),
    groups,
    continuum: state.continuum,
    model,
    noise: state.samples.noise,
    noiseFactor: state.noiseFactor,
    resolvingPower: spread.resolvingPower,
    resolvingPowerFrom: spread.from,
    expectedFalse: expectedFalse(state.samples, spread.resolvingPower, settings),
    remarks,
  };
}

interface Prepared {
  readonly samples: FitSamples;
  readonly continuum: Float64Array;
  readonly noiseFactor?: number;
  /** lambda / FWHM, first idea. */
  readonly resolvingPower: number;
  readonly resolvingPowerFrom: LineSpread['from'];
  readonly spikes: readonly number[];
}

/** Noise, first line width, continuum and spikes. */
function prepare(spectrum: Spectrum, settings: MeasureSettings, remarks: Remark[]): Prepared {
  const { flux } = spectrum;
  const regular = regularAxis(spectrum.wavelength);
  const x = regular ?? spectrum.wavelength;
  if (regular)
    remarks.push({
      code: 'axis-unrounded',
      weight: 'note',
      where: { file: spectrum.name },
      found: 'the wavelengths are a regular axis printed with few digits; fits use the regular one',
    });
  const n = x.length;
  const noise = spectrum.fluxErr ? Float64Array.from(spectrum.fluxErr) : scatterNoise(spectrum);
  const usable = Uint8Array.from(spectrum.masked, (m, i) =>
    m === 0 && Number.isFinite(flux[i]) && noise[i] > 0 && Number.isFinite(noise[i]) ? 1 : 0,
  );
  const sampleWidth = Float64Array.from(x, (_, i) => (x[Math.min(n - 1, i + 1)] - x[Math.max(0, i - 1)]) / (i > 0 && i < n - 1 ? 2 : 1));
  const told = settings.resolvingPower ?? spectrum.resolvingPower;
  const rough = roughContinuum(flux, usable);
  const first = widthOfTallPeaks(
    x,
    flux.map((f, i) => f - rough[i]),
    noise,
    usable,
  );
  const resolvingPower = told ?? first.resolvingPower;
  const fwhm = Float64Array.from(x, (w, i) => Math.max(1.5, w / resolvingPower / sampleWidth[i]));
  let continuum = fitContinuum(flux, noise, usable, fwhm, sampleWidth);
  const noiseFactor = spectrum.fluxErr ? scatterOverNoise(flux, continuum, noise, usable) : undefined;
  if (noiseFactor !== undefined && Math.abs(noiseFactor - 1) > NOISE_AGREES) {
    for (let i = 0; i < n; i++) noise[i] *= noiseFactor;
    continuum = fitContinuum(flux, noise, usable, fwhm, sampleWidth);
    remarks.push({
      code: 'errors-rescaled',
      weight: noiseFactor > 2 || noiseFactor < 0.5 ? 'warning' : 'note',
      where: { file: spectrum.name },
      found: `the scatter about the continuum is ${noiseFactor.toFixed(2)} times the errors of the file; errors were multiplied by it`,
    });
  }
  if (!spectrum.fluxErr) {
    remarks.push({
      code: 'no-errors',
      weight: 'note',
      where: { file: spectrum.name },
      found: 'the file has no errors; the noise is estimated from the scatter of neighbouring samples (Stoehr et al. 2008)',
    });
  }
  const y = Float64Array.from(flux, (f, i) => f - continuum[i]);
  const samples: FitSamples = { x, y, noise, usable, sampleWidth };
  const spikes = findSpikes(y, noise, usable, sigmaInSamples(samples, resolvingPower));
  for (const spike of spikes) usable[spike] = 0;
  return {
    samples,
    continuum,
    noiseFactor,
    resolvingPower,
    resolvingPowerFrom: told === undefined ? first.from : settings.resolvingPower ? 'user' : 'file',
    spikes,
  };
}

/** Running median of every hundredth of the spectrum, held between: enough to see tall peaks. */
function roughContinuum(flux: Float64Array, usable: Uint8Array): Float64Array {
  const n = flux.length;
  const rough = new Float64Array(n);
  const stretch = Math.max(30, Math.min(2000, Math.ceil(n / 60)));
  for (let from = 0; from < n; from += stretch) {
    const to = Math.min(n, from + stretch);
    const level = median(flux.subarray(from, to).filter((_, i) => usable[from + i] === 1));
    rough.fill(level, from, to);
  }
  return rough;
}

/** Robust scatter of the residuals in units of the file's errors; the bulk of the samples holds no line. */
function scatterOverNoise(flux: Float64Array, continuum: Float64Array, noise: Float64Array, usable: Uint8Array): number {
  const residuals: number[] = [];
  const step = Math.max(1, Math.floor(flux.length / 50_000));
  for (let i = 0; i < flux.length; i += step) {
    const r = (flux[i] - continuum[i]) / noise[i];
    // only the lower half: emission lines push the upper one
    if (usable[i] && r < 0) residuals.push(r, -r);
  }
  return residuals.length < FEWEST_SAMPLES ? 1 : robustSigma(residuals);
}

const sigmaInSamples = (samples: FitSamples, resolvingPower: number) =>
  samples.x.map((w, i) => sigmaAt(resolvingPower, w) / samples.sampleWidth[i]);

/** The width of lines and how much it varies, from fits of strong isolated ones. */
function learnLineSpread(state: Prepared, settings: MeasureSettings, spectrum: Spectrum): LineSpread {
  const told = settings.resolvingPower ?? spectrum.resolvingPower;
  let power = state.resolvingPower;
  let learned: { resolvingPower: number; spread: number } | undefined;
  for (let round = 0; round < 2; round++) {
    learned = spreadOfLines(fitTellingLines(state, power));
    if (!learned) break;
    power = learned.resolvingPower;
  }
  if (told !== undefined) {
    // the instrument is known, the lines may be wider: what is usual for a line is what the lines show, never less than the instrument
    const usual = learned && learned.resolvingPower < told ? learned.resolvingPower : told;
    return { resolvingPower: usual, from: settings.resolvingPower ? 'user' : 'file', spread: learned?.spread ?? FREE_SPREAD / 2 };
  }
  return { resolvingPower: power, from: learned ? 'lines' : state.resolvingPowerFrom, spread: learned?.spread ?? FREE_SPREAD / 2 };
}

function fitTellingLines(state: Prepared, power: number): { power: number; relativeErr: number }[] {
  const { samples } = state;
  const snr = matchedFilter(samples.y, samples.noise, samples.usable, sigmaInSamples(samples, power), ISOLATED_SNR);
  const peaks = findPeaks(snr, TELLING_SNR, false);
  const fwhmAt = (i: number) => (FWHM_PER_SIGMA * sigmaAt(power, samples.x[i])) / samples.sampleWidth[i];
  const isolated = groupPeaks(findPeaks(snr, ISOLATED_SNR, false), fwhmAt, samples.x.length).filter((w) => w.peaks.length === 1);
  const telling = isolated.filter((w) => peaks.some((p) => p.at === w.peaks[0].at)).sort((a, b) => b.peaks[0].snr - a.peaks[0].snr);
  const width: WidthPrior = { sigmaAt: (w) => sigmaAt(power, w), spread: FREE_SPREAD };
  return telling.slice(0, MOST_TELLING).flatMap((w) => {
    const fit = fitGroup(samples, w.first, w.last, [startOf(samples, w.peaks[0], width)], width);
    if (fit.end.ended !== 'converged') return [];
    const [line] = fit.components;
    const relativeErr = Math.sqrt(fit.end.covariance[2 * 5 + 2] * Math.max(1, fit.chi2 / fit.dof));
    return relativeErr < 0.15 ? [{ power: line.centre / (FWHM_PER_SIGMA * line.sigma), relativeErr }] : [];
  });
}

function startOf(samples: FitSamples, peak: Peak, width: WidthPrior): Component {
  const centre = samples.x[peak.at];
  const sigma = width.sigmaAt(centre);
  const height = samples.usable[peak.at] ? samples.y[peak.at] : peak.snr * samples.noise[peak.at];
  const sure = Math.sign(height) === Math.sign(peak.snr) ? height : Math.sign(peak.snr) * samples.noise[peak.at];
  return { flux: sure * sigma * Math.sqrt(2 * Math.PI), centre, sigma };
}

/** Features from noise alone: independent places (two sigma of the profile apart) times the tail beyond the threshold. */
function expectedFalse(samples: FitSamples, resolvingPower: number, settings: MeasureSettings): number {
  let places = 0;
  for (let i = 0; i < samples.x.length; i++)
    if (samples.usable[i]) places += samples.sampleWidth[i] / (2 * sigmaAt(resolvingPower, samples.x[i]));
  return places * normalTail(settings.thresholdSigma) * (settings.absorption ? 2 : 1);
}
