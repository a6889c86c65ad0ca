import { FWHM_PER_SIGMA } from '../units/index.ts';
import { addLocalContinuum, addProfiles } from './addProfiles.ts';
import { withBroadLine } from './broadLine.ts';
import { fitGroup, type GroupFit } from './fitGroup.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { sigmaInSamples } from './lineSpread.ts';
import { matchedFilter } from './matchedFilter.ts';

/** Components that one group may gain beyond its peaks. */
const MOST_ADDED = 8;
/** Two components nearer than this (in expected FWHM) are one. */
const NEAREST_FWHM = 0.45;
/** A lone sample this many sigma off, whose neighbours are not, is a spike. */
const SPIKE_SIGMA = 7;
/** Samples to either side that may be the spike instead. */
const SPIKE_NEIGHBOURS = 2;
/** Nothing is added this near to the ends of a window, in sigma: there a line and the slope of the continuum are one. */
const MARGIN_SIGMA = 3;

/**
 * Fits a group and looks into its residuals for components that the peaks did not show, one at a time, as long as each improves the fit by more than
 * its price: the Bayesian information criterion (Schwarz 1978, Ann. Statist. 6, 461) and the square of the detection threshold, whichever is more.
 *
 * @param spikes sample numbers found to be spikes are added here and marked unusable
 * @param begun  the fit of `starts`, where it has been done
 */
export function growGroup(
  samples: FitSamples,
  first: number,
  last: number,
  starts: readonly Component[],
  width: WidthPrior,
  threshold: number,
  spikes: number[],
  begun?: GroupFit,
): GroupFit {
  let fit = withoutTwins(samples, begun ?? fitGroup(samples, first, last, mergeClose(starts, width), width), width);
  const used = last - first + 1;
  const price = Math.max(threshold * threshold, 3 * Math.log(used)) + 4;
  for (let round = 0; round < MOST_ADDED; round++) {
    const residual = residualOf(samples, fit);
    const spike = loneSpike(samples, fit, residual);
    const added = bestAddition(samples, fit, residual, width, threshold);
    const trial = added && fitGroup(samples, first, last, [...fit.components, added], width);
    if (spike !== undefined) {
      const cheaper = withoutSpike(samples, fit, spike, width);
      // where a second line explains the sample as well, it is no spike
      if (cheaper && !(trial && totalChi2(trial) + price < totalChi2(cheaper.fit))) {
        samples.usable[cheaper.at] = 0;
        spikes.push(cheaper.at);
        fit = cheaper.fit;
        continue;
      }
    }
    if (!trial) break;
    if (totalChi2(fit) - totalChi2(trial) < price || !holds(trial, width)) break;
    fit = trial;
  }
  const grown = fit.components.length > starts.length ? pruned(samples, fit, width, price) : fit;
  const plain = withoutHiddenSpike(samples, withoutCancelling(samples, grown, width), width, price, spikes);
  return withBroadLine(samples, plain, width, price);
}

/** Two components that end nearer than this, in FWHM, are one: their fluxes cannot be told apart. */
const TWINS_FWHM = 0.1;

/** The fit with such twins made one: starts on either flank of a saturated top meet in its middle. */
function withoutTwins(samples: FitSamples, fit: GroupFit, width: WidthPrior): GroupFit {
  const kept: Component[] = [];
  for (const component of [...fit.components].sort((a, b) => a.centre - b.centre)) {
    const last = kept.at(-1);
    const isTwin = last && component.flux * last.flux > 0 && component.centre - last.centre < TWINS_FWHM * FWHM_PER_SIGMA * component.sigma;
    if (isTwin) kept[kept.length - 1] = { ...last, flux: last.flux + component.flux };
    else kept.push(component);
  }
  return kept.length === fit.components.length ? fit : fitGroup(samples, fit.first, fit.last, kept, width);
}

/** An emission and an absorption component on top of each other, of like size, only cancel: both are artefacts of the fit. */
const CANCELLING_FWHM = 0.8;
const CANCELLING_SHARE = 0.5;

/** The fit without the absorption half of such pairs. */
function withoutCancelling(samples: FitSamples, fit: GroupFit, width: WidthPrior): GroupFit {
  const cancels = (a: Component, b: Component) =>
    a.flux < 0 &&
    b.flux > 0 &&
    Math.abs(a.centre - b.centre) < CANCELLING_FWHM * Math.max(a.sigma, b.sigma) * FWHM_PER_SIGMA &&
    Math.min(-a.flux, b.flux) > CANCELLING_SHARE * Math.max(-a.flux, b.flux);
  const kept = fit.components.filter((a) => !fit.components.some((b) => cancels(a, b)));
  return kept.length === fit.components.length || kept.length === 0 ? fit : fitGroup(samples, fit.first, fit.last, kept, width);
}

/** A component is not tried without when the square of its S/N is this many times its price. */
const SURE_TIMES = 6;

/** Lines of fewer samples than this a FWHM can hide a spike among their own ... */
const HIDING_FWHM_SAMPLES = 4;
/** ... which shows as a component this much narrower than the instrument. */
const SUSPICIOUS_WIDTH = 0.85;

/**
 * A spike in the middle of an under-sampled line makes a component narrower than the instrument, often with a second one beside it. The samples of such a
 * component are taken out one by one: when a simpler fit without one of them is better by far, that one was a spike.
 */
function withoutHiddenSpike(samples: FitSamples, fit: GroupFit, width: WidthPrior, price: number, spikes: number[]): GroupFit {
  const middle = (fit.first + fit.last) >> 1;
  if (FWHM_PER_SIGMA * width.sigmaAt(samples.x[middle]) > HIDING_FWHM_SAMPLES * samples.sampleWidth[middle]) return fit;
  const narrow = fit.components.find((c) => c.sigma < SUSPICIOUS_WIDTH * width.sigmaAt(c.centre) && c.flux !== 0);
  if (!narrow) return fit;
  const reach = FWHM_PER_SIGMA * width.sigmaAt(narrow.centre);
  const others = fit.components.filter((c) => Math.abs(c.centre - narrow.centre) > 2 * reach);
  const usual = { ...narrow, sigma: width.sigmaAt(narrow.centre) };
  const cost = (f: GroupFit) => totalChi2(f) + price * f.components.length;
  let best: { at: number; fit: GroupFit } | undefined;
  for (let at = fit.first + 1; at < fit.last; at++) {
    if (!samples.usable[at] || Math.abs(samples.x[at] - narrow.centre) > reach || Math.abs(samples.y[at]) < SPIKE_SIGMA * samples.noise[at])
      continue;
    samples.usable[at] = 0;
    for (const starts of [others, [...others, usual]]) {
      if (starts.length === 0) continue;
      const trial = fitGroup(samples, fit.first, fit.last, starts, width);
      if (!best || cost(trial) < cost(best.fit)) best = { at, fit: trial };
    }
    samples.usable[at] = 1;
  }
  if (!best || cost(best.fit) + SPIKE_SIGMA ** 2 > cost(fit)) return fit;
  samples.usable[best.at] = 0;
  spikes.push(best.at);
  return best.fit;
}

/** Takes out, faintest first, what the fit can do without: a component added early may only have stood in for one found later. */
function pruned(samples: FitSamples, fit: GroupFit, width: WidthPrior, price: number): GroupFit {
  let kept = fit;
  const size = fit.parameters.length;
  const { end } = fit;
  // a component many times its error strong is not in question
  const sure = (k: number) =>
    end.ended === 'converged' && fit.components[k].flux ** 2 > SURE_TIMES * price * end.covariance[3 * k * size + 3 * k];
  const faintestFirst = fit.components
    .filter((_, k) => !sure(k))
    .sort((a, b) => Math.abs(a.flux) - Math.abs(b.flux))
    .map((c) => c.centre);
  for (const centre of faintestFirst) {
    const rest = kept.components.filter((c) => Math.abs(c.centre - centre) > 1e-3 * width.sigmaAt(centre));
    if (rest.length === kept.components.length || rest.length === 0) continue;
    const trial = fitGroup(samples, kept.first, kept.last, rest, width);
    if (totalChi2(trial) - totalChi2(kept) < price) kept = trial;
  }
  return kept;
}

const totalChi2 = (fit: GroupFit) => fit.end.chi2;

/** Whether the last component stands on its own: not on top of another, not vanished, not at the edge of the window. */
function holds(fit: GroupFit, width: WidthPrior): boolean {
  const last = fit.components[fit.components.length - 1];
  if (last.flux === 0) return false;
  return fit.components
    .slice(0, -1)
    .every((c) => Math.abs(c.centre - last.centre) > NEAREST_FWHM * FWHM_PER_SIGMA * width.sigmaAt(last.centre));
}

function mergeClose(starts: readonly Component[], width: WidthPrior): Component[] {
  const kept: Component[] = [];
  for (const start of [...starts].sort((a, b) => Math.abs(b.flux) - Math.abs(a.flux))) {
    const reach = NEAREST_FWHM * FWHM_PER_SIGMA * width.sigmaAt(start.centre);
    if (kept.every((other) => Math.abs(other.centre - start.centre) > reach)) kept.push(start);
  }
  return kept.sort((a, b) => a.centre - b.centre);
}

/** Residual of the window, one value a sample of it. */
function residualOf(samples: FitSamples, fit: GroupFit): Float64Array {
  const window = windowOf(samples, fit);
  const model = new Float64Array(window.x.length);
  addProfiles(window, fit.components, model);
  addLocalContinuum(window, { ...fit, first: 0, last: model.length - 1 }, model);
  for (let i = 0; i < model.length; i++) model[i] = window.y[i] - model[i];
  return model;
}

const windowOf = (samples: FitSamples, { first, last }: GroupFit): FitSamples => ({
  x: samples.x.subarray(first, last + 1),
  y: samples.y.subarray(first, last + 1),
  noise: samples.noise.subarray(first, last + 1),
  usable: samples.usable.subarray(first, last + 1),
  sampleWidth: samples.sampleWidth.subarray(first, last + 1),
});

/**
 * The fit with the spike taken out. A spike on the flank of a line can pull the fit onto itself, so that a good sample of the line looks like the spike: each
 * bright sample nearby is tried, and the one whose absence leaves the best fit goes.
 */
function withoutSpike(samples: FitSamples, fit: GroupFit, spike: number, width: WidthPrior): { at: number; fit: GroupFit } | undefined {
  let best: { at: number; fit: GroupFit } | undefined;
  for (let at = spike - SPIKE_NEIGHBOURS; at <= spike + SPIKE_NEIGHBOURS; at++) {
    if (at <= fit.first || at >= fit.last || !samples.usable[at]) continue;
    if (at !== spike && Math.abs(samples.y[at]) < SPIKE_SIGMA * samples.noise[at]) continue;
    samples.usable[at] = 0;
    const trial = fitGroup(samples, fit.first, fit.last, fit.components, width);
    samples.usable[at] = 1;
    if (!best || totalChi2(trial) < totalChi2(best.fit)) best = { at, fit: trial };
  }
  return best;
}

function loneSpike(samples: FitSamples, fit: GroupFit, residual: Float64Array): number | undefined {
  const { noise, usable } = windowOf(samples, fit);
  let worst: number | undefined;
  for (let i = 1; i < residual.length - 1; i++) {
    if (!usable[i]) continue;
    const off = residual[i] / noise[i];
    if (Math.abs(off) < SPIKE_SIGMA) continue;
    const beside = Math.max(Math.abs(residual[i - 1] / noise[i - 1]), Math.abs(residual[i + 1] / noise[i + 1]));
    if (beside < 0.25 * Math.abs(off) && (worst === undefined || Math.abs(off) > Math.abs(residual[worst] / noise[worst]))) worst = i;
  }
  return worst === undefined ? undefined : fit.first + worst;
}

/** The residual of a blend taken for one line is smaller than the second line itself: less than the threshold, by this share, is tried. */
const TRIED_SHARE = 0.6;

function bestAddition(
  samples: FitSamples,
  fit: GroupFit,
  residual: Float64Array,
  width: WidthPrior,
  threshold: number,
): Component | undefined {
  const window = windowOf(samples, fit);
  const sigma = sigmaInSamples(window, width);
  const snr = matchedFilter(residual, window.noise, window.usable, sigma, TRIED_SHARE * threshold);
  let best = -1;
  const margin = Math.ceil(MARGIN_SIGMA * sigma[0]);
  for (let i = margin; i < snr.length - margin; i++) {
    const peak = snr[i] >= snr[i - 1] && snr[i] >= snr[i + 1];
    if (peak && window.usable[i] && (best < 0 || snr[i] > snr[best])) best = i;
  }
  if (best < 0 || snr[best] < TRIED_SHARE * threshold) return undefined;
  const s = width.sigmaAt(window.x[best]);
  return { flux: Math.max(residual[best], window.noise[best]) * s * Math.sqrt(2 * Math.PI), centre: window.x[best], sigma: s };
}
