import type { Spectrum } from '../spectrum/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { MeasureSettings, WidthLaw } from './feature.ts';
import { fitGroup } from './fitGroup.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { groupPeaks } from './groups.ts';
import { constantResolvingPower, fwhmAt, type LineSpread, sigmaInSamples, widthPrior } from './lineSpread.ts';
import { matchedFilter } from './matchedFilter.ts';
import { findPeaks, type Peak } from './peaks.ts';
import { type TellingLine, widthLawOf } from './widthLaw.ts';

/** Width is free within this before the lines have shown what is usual. */
const FREE_SPREAD = 0.5;
/** S/N of an isolated line whose width tells of the instrument. */
const TELLING_SNR = 25;
const MOST_TELLING = 60;
/** Anything above this near it means that a line is not isolated. */
const ISOLATED_SNR = 5;
const MOST_RELATIVE_ERR = 0.15;
/** The lines are looked at again when they turn out this much wider or narrower than was thought. */
const LOOK_AGAIN = 0.05;

/** The instrument as the user or the file knows it. */
export function toldWidth(spectrum: Spectrum, settings: MeasureSettings): { law: WidthLaw; from: 'user' | 'file' } | undefined {
  const { wavelength } = spectrum;
  const middle = 0.5 * (wavelength[0] + wavelength[wavelength.length - 1]);
  if (settings.resolvingPower !== undefined) return { law: constantResolvingPower(settings.resolvingPower, middle), from: 'user' };
  if (settings.instrumentFwhmA !== undefined) {
    const slope = settings.instrumentFwhmSlope ?? 0;
    const form = slope === 0 ? 'constant-width' : 'linear';
    return { law: { form, at: middle, fwhmA: settings.instrumentFwhmA, slope }, from: 'user' };
  }
  return spectrum.resolvingPower === undefined ? undefined : { law: constantResolvingPower(spectrum.resolvingPower, middle), from: 'file' };
}

/**
 * The width of lines and how much it varies, from fits of strong isolated ones.
 *
 * @param first first idea of the width, and whence
 * @param threshold S/N above which `snr` holds every place
 * @returns the spread, and the S/N map made on the way where its width is near enough to serve the search, too
 */
export function learnLineSpread(
  samples: FitSamples,
  first: { readonly law: WidthLaw; readonly from: LineSpread['from'] },
  told: ReturnType<typeof toldWidth>,
  threshold: number,
): { readonly spread: LineSpread; readonly snr?: Float64Array } {
  let learned: ReturnType<typeof widthLawOf>;
  let law = first.law;
  let snr: Float64Array = new Float64Array(0);
  let mapped = law;
  for (let round = 0; round < 2; round++) {
    const before = law;
    const sigma = sigmaInSamples(samples, widthPrior(law, 0));
    snr = matchedFilter(samples.y, samples.noise, samples.usable, sigma, Math.min(threshold, ISOLATED_SNR));
    mapped = law;
    learned = widthLawOf(fitTellingLines(samples, law, snr, sigma));
    if (!learned) break;
    law = learned.law;
    if (Math.abs(Math.log(fwhmAt(before, law.at) / law.fwhmA)) < LOOK_AGAIN) break;
  }
  const spread = spreadOf(first, told, law, learned);
  const { x } = samples;
  const isNear = (at: number) => Math.abs(Math.log(fwhmAt(mapped, at) / fwhmAt(spread.usual, at))) < LOOK_AGAIN;
  return { spread, ...(isNear(x[0]) && isNear(x[x.length - 1]) ? { snr } : {}) };
}

function spreadOf(
  first: { readonly from: LineSpread['from'] },
  told: ReturnType<typeof toldWidth>,
  law: WidthLaw,
  learned: ReturnType<typeof widthLawOf>,
): LineSpread {
  const spread = learned?.spread ?? FREE_SPREAD / 2;
  if (!told) return { usual: law, from: learned ? 'lines' : first.from, spread };
  // the instrument is known, the lines may be wider: what is usual for a line is what the lines show, never less than the instrument
  const wider = learned !== undefined && learned.law.fwhmA > fwhmAt(told.law, learned.law.at);
  return { usual: wider ? law : told.law, instrument: told.law, from: told.from, spread };
}

function fitTellingLines(samples: FitSamples, law: WidthLaw, snr: Float64Array, sigma: Float64Array): TellingLine[] {
  const width = widthPrior(law, FREE_SPREAD);
  const telling = groupPeaks(findPeaks(snr, ISOLATED_SNR, false), (i) => FWHM_PER_SIGMA * sigma[i], samples.x.length)
    .filter((w) => w.peaks.length === 1 && w.peaks[0].snr >= TELLING_SNR)
    .sort((a, b) => b.peaks[0].snr - a.peaks[0].snr);
  return telling.slice(0, MOST_TELLING).flatMap((w) => {
    const fit = fitGroup(samples, w.first, w.last, [startOfPeak(samples, samples.y, w.peaks[0], width)], width);
    if (fit.end.ended !== 'converged') return [];
    const [line] = fit.components;
    const relativeErr = Math.sqrt(fit.end.covariance[2 * 5 + 2] * Math.max(1, fit.chi2 / fit.dof));
    return relativeErr < MOST_RELATIVE_ERR ? [{ centre: line.centre, fwhm: FWHM_PER_SIGMA * line.sigma, relativeErr }] : [];
  });
}

/** Start of a fit from a peak of the S/N map of `residual`. */
export function startOfPeak(samples: FitSamples, residual: Float64Array, peak: Peak, width: WidthPrior): Component {
  const centre = samples.x[peak.at];
  const sigma = width.sigmaAt(centre);
  const height = residual[peak.at];
  const sure = samples.usable[peak.at] && Math.sign(height) === Math.sign(peak.snr) ? height : Math.sign(peak.snr) * samples.noise[peak.at];
  return { flux: sure * sigma * Math.sqrt(2 * Math.PI), centre, sigma };
}
