import { FWHM_PER_SIGMA, SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import type { Feature, FitEnd, Group } from './feature.ts';
import type { GroupFit } from './fitGroup.ts';
import type { Component, FitSamples } from './fitSamples.ts';
import { isFlatTopped } from './flatTop.ts';
import { fwhmAt, type LineSpread } from './lineSpread.ts';
import { firstAtLeast, gaussianInto, isUnderSampled, PROFILE_REACH } from './profile.ts';
import type { ShapeFit } from './shapes.ts';

/** A fitted line narrower than this share of the usual width is no line of the instrument ... */
const TOO_NARROW = 0.5;
/** ... nor one below this share that is narrower by so many of its own errors (two neighbouring samples hit by one cosmic ray). */
const RATHER_NARROW = 0.8;
const NARROW_SIGMA = 5;
/** A line is called resolved when it is wider than the instrument by this many of its own errors. */
const RESOLVED_SIGMA = 2;

interface FitFacts {
  readonly continuum: Float64Array;
  readonly group: number;
  readonly spread: LineSpread;
  readonly threshold: number;
  readonly masked: Uint8Array;
  /** Sample numbers, ascending. */
  readonly saturated: readonly number[];
  /** n, flux minus model. */
  readonly left: Float64Array;
  /** The feature in another shape, where the user asked for one. */
  readonly shapes: ReadonlyMap<Component, ShapeFit>;
}

/** The components of a fit that stand above the threshold, as features (their `index` is given later). */
export function featuresOfFit(samples: FitSamples, fit: GroupFit, facts: FitFacts): Feature[] {
  const size = fit.parameters.length;
  const covariance = fit.end.ended === 'converged' ? fit.end.covariance : undefined;
  const inflation = Math.max(1, fit.chi2 / fit.dof);
  const err = (i: number) => (covariance ? Math.sqrt(Math.max(0, covariance[i * size + i]) * inflation) : Number.NaN);
  return fit.components.flatMap((component, k): Feature[] => {
    const { flux, centre, sigma } = component;
    const snr = Math.abs(flux) / amplitudeErr(samples, fit, centre, sigma);
    if (component.byHand === undefined && component.shape === undefined && (flux === 0 || snr < facts.threshold)) return [];
    const at = Math.min(samples.x.length - 1, firstAtLeast(samples.x, centre));
    const continuum = facts.continuum[at] + offsetAt(samples, fit, centre);
    const fwhm = FWHM_PER_SIGMA * sigma;
    const fwhmErr = fwhm * err(3 * k + 2);
    const fluxErr = err(3 * k);
    // the error of the continuum is that of the fit's offset: the noise under the line's own peak has no part in it
    const ew = continuum > 0 ? flux / continuum : Number.NaN;
    const narrow = component.byHand === undefined && isTooNarrow(fwhm, fwhmErr, centre, facts.spread);
    const shaped = facts.shapes.get(component);
    return [
      {
        index: 0,
        kind: flux > 0 ? 'emission' : 'absorption',
        ...(narrow ? { artefact: 'narrower than the instrument' } : {}),
        centroid: centre,
        centroidErr: err(3 * k + 1),
        flux,
        fluxErr,
        fwhm,
        fwhmErr,
        ...intrinsicWidth(centre, fwhm, fwhmErr, facts.spread),
        ew,
        ewErr: Math.abs(ew) * Math.hypot(fluxErr / flux, err(size - 2) / continuum),
        snr,
        continuum,
        group: facts.group,
        fit: fitEnd(fit, component),
        ...(component.byHand ? { byHand: component.byHand } : {}),
        notes: notesOf(samples, fit, k, facts),
        ...(shaped ? inShape(shaped, continuum, err(size - 2), facts.spread) : {}),
      },
    ];
  });
}

/** What another shape measures in place of the Gaussian. */
function inShape(
  { as, centroid, centroidErr, flux, fluxErr, fwhm, fwhmErr }: ShapeFit,
  continuum: number,
  continuumErr: number,
  spread: LineSpread,
) {
  const ew = continuum > 0 ? flux / continuum : Number.NaN;
  return {
    ...{ centroid, centroidErr, flux, fluxErr, fwhm, fwhmErr, ew },
    ewErr: Math.abs(ew) * Math.hypot(fluxErr / flux, continuumErr / continuum),
    ...intrinsicWidth(centroid, fwhm, fwhmErr, spread),
    byHand: as === 'voigt' ? 'measured as a Voigt profile' : 'measured as two Gaussians',
  };
}

function isTooNarrow(fwhm: number, fwhmErr: number, centre: number, spread: LineSpread): boolean {
  const share = fwhm / fwhmAt(spread.usual, centre);
  return share < TOO_NARROW || (share < RATHER_NARROW && -Math.log(share) > NARROW_SIGMA * Math.hypot(fwhmErr / fwhm, spread.spread));
}

/** One sigma of the flux at fixed shape: the noise under the profile. */
function amplitudeErr(samples: FitSamples, fit: GroupFit, centre: number, sigma: number): number {
  const profile = { value: 0, byCentre: 0, bySigma: 0 };
  let information = 0;
  const to = centre + (PROFILE_REACH + 1) * sigma;
  for (
    let i = firstAtLeast(samples.x, centre - (PROFILE_REACH + 1) * sigma, fit.first, fit.last + 1);
    i <= fit.last && samples.x[i] <= to;
    i++
  ) {
    if (!samples.usable[i]) continue;
    gaussianInto(profile, samples.x[i], isUnderSampled(sigma, samples.sampleWidth[i]) ? samples.sampleWidth[i] : 0, centre, sigma);
    information += (profile.value / samples.noise[i]) ** 2;
  }
  return 1 / Math.sqrt(information);
}

function offsetAt(samples: FitSamples, fit: GroupFit, wavelength: number): number {
  const { parameters: p, first, last } = fit;
  const middle = 0.5 * (samples.x[first] + samples.x[last]);
  const half = Math.max(1e-9, 0.5 * (samples.x[last] - samples.x[first]));
  return p[p.length - 2] + (p[p.length - 1] * (wavelength - middle)) / half;
}

/** km/s with the instrument removed, where the instrument is known apart from the lines. */
function intrinsicWidth(centre: number, fwhm: number, fwhmErr: number, spread: LineSpread): { intrinsicFwhmKms?: number } {
  if (!spread.instrument) return {};
  const instrument = fwhmAt(spread.instrument, centre);
  const square = fwhm * fwhm - instrument * instrument;
  const resolved = fwhm - instrument > RESOLVED_SIGMA * fwhmErr;
  return { intrinsicFwhmKms: square > 0 && resolved ? (Math.sqrt(square) / centre) * SPEED_OF_LIGHT_KMS : 0 };
}

function fitEnd(fit: GroupFit, { atBound }: Component): FitEnd {
  if (fit.end.ended === 'converged') return atBound ? { ended: 'at-bound', which: atBound } : { ended: 'converged' };
  if (fit.end.ended === 'singular') return { ended: 'no-uncertainty' };
  return { ended: 'failed', reason: `no convergence in ${fit.end.steps} steps` };
}

/** Errors grow by more than this share through a neighbour: the two are blended. */
const BLENDED_FWHM = 1.5;

function notesOf(samples: FitSamples, fit: GroupFit, k: number, facts: FitFacts): string[] {
  const notes: string[] = [];
  const { centre, sigma } = fit.components[k];
  const fwhm = FWHM_PER_SIGMA * sigma;
  if (fit.components.some((other, j) => j !== k && other.flux !== 0 && Math.abs(other.centre - centre) < BLENDED_FWHM * fwhm))
    notes.push('blended');
  const from = firstAtLeast(samples.x, centre - fwhm);
  let missing = from === 0 || samples.x[samples.x.length - 1] < centre + fwhm;
  for (let i = from; i < samples.x.length && samples.x[i] <= centre + fwhm; i++) missing ||= facts.masked[i] === 1;
  if (missing) notes.push('cut by missing samples');
  if (facts.saturated.some((i) => Math.abs(samples.x[i] - centre) < fwhm)) notes.push('saturated: measured by what is left of its flanks');
  else if (isFlatTopped(samples, fit.components[k], facts.left)) notes.push('flat-topped: saturated, or an unresolved pair or shell');
  return notes;
}

/** A spike as a feature that is shown but never named. */
export function artefactFeature(samples: FitSamples, at: number, continuum: Float64Array, groups: readonly Group[]): Feature {
  const flux = samples.y[at] * samples.sampleWidth[at];
  const fluxErr = samples.noise[at] * samples.sampleWidth[at];
  return {
    index: 0,
    kind: flux > 0 ? 'emission' : 'absorption',
    artefact: 'a spike of one sample, narrower than the instrument',
    centroid: samples.x[at],
    centroidErr: samples.sampleWidth[at] / 2,
    flux,
    fluxErr,
    fwhm: samples.sampleWidth[at],
    fwhmErr: Number.NaN,
    ew: continuum[at] > 0 ? flux / continuum[at] : Number.NaN,
    ewErr: Number.NaN,
    snr: Math.abs(flux) / fluxErr,
    continuum: continuum[at],
    group: groups.findIndex((group) => group.first <= at && at <= group.last),
    fit: { ended: 'failed', reason: 'spikes are not fitted' },
    notes: [],
  };
}
