import { FWHM_PER_SIGMA } from '../units/index.ts';
import { addLocalContinuum, addProfiles } from './addProfiles.ts';
import { fitGroup, type GroupFit } from './fitGroup.ts';
import type { Component, FitSamples, Stretch, WidthPrior } from './fitSamples.ts';
import { groupPeaks, type Window } from './groups.ts';
import { growGroup } from './growGroup.ts';
import { startOfPeak } from './learnLineSpread.ts';
import { sigmaInSamples } from './lineSpread.ts';
import { matchedFilter } from './matchedFilter.ts';
import { addMisfit, misfitOf } from './misfit.ts';
import { findPeaks, type Peak } from './peaks.ts';
import { withoutPlateaus } from './plateau.ts';
import { firstAtLeast } from './profile.ts';

/** What the passes need beside the samples. */
export interface PassSettings {
  readonly width: WidthPrior;
  readonly threshold: number;
  readonly absorption: boolean;
  /** S/N map of the samples as they come, where there is one. */
  readonly snr?: Float64Array;
  /** Told the share done, and asked to stop by throwing. */
  readonly between: (share: number) => void;
}

/** A place to start a component from: a peak of the S/N map, or a component of an earlier pass. */
interface Seed extends Peak {
  readonly start: Component;
}

/** Later passes find what a neighbour's wing hid; one more finds next to nothing. */
const PASSES = 3;
/** Less than this share of a strong line's peak left over is not told from noise. */
const LEAST_MISFIT = 0.0005;
/** A residual peak this near to a component, in FWHM, is that component's misfit, not another line. */
const OWN_FWHM = 0.7;

/**
 * Finds and fits all components: peaks of the S/N map are grouped and fitted; then what is left is searched once more, and groups that gained a component or a
 * neighbour are fitted anew.
 *
 * @param spikes found on the way are added; their samples are marked unusable
 * @param misfit told the share of strong lines that Gaussians leave over, when that is more than noise: it has then been added to `samples.noise`
 */
export function fitPasses(samples: FitSamples, settings: PassSettings, spikes: number[], misfit: (share: number) => void): GroupFit[] {
  const { width, threshold } = settings;
  const sigma = sigmaInSamples(samples, width);
  const fwhmAt = (i: number) => FWHM_PER_SIGMA * sigma[i];
  const n = samples.x.length;
  let found = settings.snr ? seedsOf(settings.snr, samples, samples.y, settings, []) : seedsIn(samples, samples.y, settings, sigma, []);
  const alone = forgiveMisfit(samples, groupPeaks(found, fwhmAt, n), width, misfit);
  if (!alone) found = seedsIn(samples, samples.y, settings, sigma, []);
  let fits: GroupFit[] = [];
  let known = new Map<string, GroupFit>();
  let seeds: Seed[] = [];
  for (let pass = 0; pass < PASSES; pass++) {
    if (pass > 0) {
      found = seedsIn(samples, residualOf(samples, fits), settings, sigma, seeds, fits);
      if (found.length === 0) break;
    }
    seeds = [...seeds, ...found].sort((a, b) => a.start.centre - b.start.centre);
    const windows = groupPeaks(seeds, fwhmAt, n);
    fits = windows.map((window, k) => {
      if (k % 16 === 0) settings.between((pass + k / windows.length) / PASSES);
      const fit = known.get(keyOf(window));
      if (fit) return fit;
      const begun = pass === 0 && window.peaks.length === 1 ? alone?.get(window.peaks[0]) : undefined;
      return growGroup(samples, window.first, window.last, startsOf(window), width, threshold, spikes, begun);
    });
    // what was fitted under a key may have gained components: the next pass knows it by them
    seeds = fits.flatMap((fit) => fit.components.map((c) => seedOf(samples, c)));
    const byStretch = new Map(fits.map((fit) => [stretchKey(fit), fit]));
    known = new Map(
      groupPeaks(seeds, fwhmAt, n).flatMap((window): [string, GroupFit][] => {
        const fit = byStretch.get(stretchKey(window));
        return fit && fit.components.length === window.peaks.length ? [[keyOf(window), fit]] : [];
      }),
    );
  }
  return fits.map((fit) => withoutPlateaus(samples, fit, width)).filter((fit) => fit.components.length > 0);
}

/**
 * Peaks of the S/N map of a residual that no seed stands for yet.
 *
 * @param where only there has anything changed since the last search; absent = everywhere
 */
function seedsIn(
  samples: FitSamples,
  residual: Float64Array,
  settings: PassSettings,
  sigma: Float64Array,
  known: readonly Seed[],
  where?: readonly Stretch[],
): Seed[] {
  const snr = matchedFilter(residual, samples.noise, samples.usable, sigma, settings.threshold, where);
  return seedsOf(snr, samples, residual, settings, known);
}

/** The same from a map at hand. */
function seedsOf(
  snr: Float64Array,
  samples: FitSamples,
  residual: Float64Array,
  { width, threshold, absorption }: PassSettings,
  known: readonly Seed[],
): Seed[] {
  return findPeaks(snr, threshold, absorption)
    .filter((peak) => isFree(known, samples.x[peak.at], OWN_FWHM * FWHM_PER_SIGMA * width.sigmaAt(samples.x[peak.at])))
    .map((peak) => ({ ...peak, start: startOfPeak(samples, residual, peak, width) }));
}

/** Whether no seed (ascending) stands nearer than `reach`, Angstrom. */
function isFree(seeds: readonly Seed[], at: number, reach: number): boolean {
  let low = 0;
  let high = seeds.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (seeds[mid].start.centre < at - reach) low = mid + 1;
    else high = mid;
  }
  return low === seeds.length || seeds[low].start.centre > at + reach;
}

/** Another peak of a window below this share of the strongest one's S/N may be its wing. */
const WING_SHARE = 0.08;

/**
 * Fits the lines that stand alone, but for what may be their own wings, by one Gaussian each, and takes into the noise what that leaves over.
 *
 * @returns when nothing is left over: the fit of every peak that is alone in its window; absent when the noise has changed
 */
function forgiveMisfit(
  samples: FitSamples,
  windows: readonly Window<Seed>[],
  width: WidthPrior,
  misfit: (share: number) => void,
): Map<Seed, GroupFit> | undefined {
  const strongest = ({ peaks }: Window<Seed>) => peaks.reduce((a, b) => (Math.abs(b.snr) > Math.abs(a.snr) ? b : a));
  const isAlone = (window: Window<Seed>) =>
    window.peaks.every((p) => p === strongest(window) || Math.abs(p.snr) < WING_SHARE * Math.abs(strongest(window).snr));
  const fitOf = (window: Window<Seed>, starts: readonly Component[]) => fitGroup(samples, window.first, window.last, starts, width);
  const windowsAlone = windows.filter(isAlone);
  const alone = windowsAlone.map((window) => fitOf(window, [strongest(window).start]));
  const left = misfitOf(samples, alone);
  if (Math.max(left.core, left.wing) <= LEAST_MISFIT) return new Map(windowsAlone.map((window, k) => [strongest(window), alone[k]]));
  const crowds = windows.filter((window) => !isAlone(window)).map((window) => fitOf(window, startsOf(window)));
  addMisfit(samples, [...alone, ...crowds], left);
  misfit(Math.max(left.core, left.wing));
  return undefined;
}

const stretchKey = ({ first, last }: Stretch) => `${first} ${last}`;

const startsOf = (window: Window<Seed>) => window.peaks.map((peak) => peak.start);

/** A window with its starts, told from every other. */
const keyOf = (window: Window<Seed>) =>
  `${window.first} ${window.last} ${startsOf(window)
    .map((s) => `${s.centre} ${s.flux} ${s.sigma}`)
    .join(' ')}`;

/** Width in samples of a line that is broader than usual. */
function broadWidth({ x, sampleWidth }: FitSamples, { isBroad, centre, sigma }: Component): Pick<Peak, 'fwhm'> {
  return isBroad ? { fwhm: (FWHM_PER_SIGMA * sigma) / sampleWidth[Math.min(x.length - 1, firstAtLeast(x, centre))] } : {};
}

const seedOf = (samples: FitSamples, component: Component): Seed => ({
  at: Math.min(samples.x.length - 1, firstAtLeast(samples.x, component.centre)),
  snr: Math.sign(component.flux) || 1,
  start: component,
  ...broadWidth(samples, component),
});

function residualOf(samples: FitSamples, fits: readonly GroupFit[]): Float64Array {
  const residual = new Float64Array(samples.x.length);
  for (const fit of fits) {
    addProfiles(samples, fit.components, residual);
    addLocalContinuum(samples, fit, residual);
  }
  for (let i = 0; i < residual.length; i++) residual[i] = samples.y[i] - residual[i];
  return residual;
}
