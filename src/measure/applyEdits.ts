import { FWHM_PER_SIGMA } from '../units/index.ts';
import { addProfiles } from './addProfiles.ts';
import type { FeatureEdit } from './feature.ts';
import { fitGroup, type GroupFit } from './fitGroup.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { fitTied, type Tie } from './fitTied.ts';
import { spanOf } from './groupEquations.ts';
import { groupPeaks } from './groups.ts';
import { firstAtLeast } from './profile.ts';

/** What stands on a spectrum: fits of groups, and samples that are spikes. */
export interface Fits {
  readonly fits: readonly GroupFit[];
  readonly spikes: readonly number[];
}

/** Fits after the edits, and the edits that found no feature any more. */
export interface EditedFits extends Fits {
  readonly lost: readonly FeatureEdit[];
}

/** A feature is meant when it is this near, in its own FWHM. */
const MEANT_FWHM = 1;
/** The halves of a split line start this far apart, in FWHM. */
const SPLIT_FWHM = 0.8;

export type TieEdit = Extract<FeatureEdit, { edit: 'tie' }>;

/**
 * Does to fits what was done by hand, in order; only the groups concerned are fitted anew, without any search for further components.
 *
 * @param ties further ties, from named pairs; they yield to what was done by hand
 */
export function applyEdits(
  samples: FitSamples,
  width: WidthPrior,
  start: Fits,
  edits: readonly FeatureEdit[],
  ties: readonly TieEdit[] = [],
): EditedFits {
  const lost: FeatureEdit[] = [];
  let now = start;
  for (const edit of edits) {
    if (edit.edit === 'tie') continue;
    const next = applyEdit(samples, width, now, edit);
    if (next) now = next;
    else lost.push(edit);
  }
  // a tie holds whatever was done after it
  const byHand = edits.filter((edit): edit is TieEdit => edit.edit === 'tie');
  for (const tie of [...byHand, ...ties]) {
    const next = applyTie(samples, width, now, tie, byHand.includes(tie) ? 'tied by hand' : 'tied');
    if (next) now = next;
    else if (byHand.includes(tie)) lost.push(tie);
  }
  return { ...now, lost };
}

/** The component meant by a wavelength, as the fit and its place in it. */
function meant(fits: readonly GroupFit[], at: number): { fit: GroupFit; line: number } | undefined {
  let best: { fit: GroupFit; line: number; away: number } | undefined;
  for (const fit of fits) {
    fit.components.forEach((component, line) => {
      const away = Math.abs(component.centre - at);
      if (away <= MEANT_FWHM * FWHM_PER_SIGMA * component.sigma && (!best || away < best.away)) best = { fit, line, away };
    });
  }
  return best;
}

/** The state after one edit; undefined when the edit finds nothing. */
function applyEdit(samples: FitSamples, width: WidthPrior, now: Fits, edit: Exclude<FeatureEdit, TieEdit>): Fits | undefined {
  if (edit.edit === 'add') {
    if (!hasSamples(samples, width, edit.at)) return undefined;
    const added = startAt(samples, now.fits, edit.at, width, edit.absorption ? -1 : 1, 'added by hand');
    return { ...now, fits: refit(samples, width, now.fits, [], [added]) };
  }
  const found = meant(now.fits, edit.at);
  if (!found) return edit.edit === 'delete' ? withoutSpikeAt(samples, now, edit.at) : undefined;
  const { fit, line } = found;
  const component = fit.components[line];
  const replace = (by: readonly Component[]) => ({ ...now, fits: refit(samples, width, now.fits, [component], by) });
  switch (edit.edit) {
    case 'delete':
      return replace([]);
    case 'split': {
      const apart = 0.5 * SPLIT_FWHM * FWHM_PER_SIGMA * component.sigma;
      return replace([-apart, apart].map((by) => ({ ...halfOf(component), centre: component.centre + by, byHand: 'split by hand' })));
    }
    case 'move': {
      if (!hasSamples(samples, width, edit.to)) return undefined;
      const others = withoutComponent(now.fits, fit, component);
      const sign = Math.sign(component.flux) || 1;
      return replace([startAt(samples, others, edit.to, width, sign, 'moved by hand')]);
    }
    case 'profile': {
      const { shape: _, ...plain } = component;
      const shaped = edit.as === 'gaussian' ? plain : { ...plain, shape: edit.as };
      const changed = { ...fit, components: fit.components.map((c) => (c === component ? shaped : c)) };
      return { ...now, fits: now.fits.map((f) => (f === fit ? changed : f)) };
    }
  }
}

/** A line needs this many usable samples within three sigma of its place. */
const FEWEST_SAMPLES = 3;

function hasSamples({ x, usable }: FitSamples, width: WidthPrior, at: number): boolean {
  const reach = Math.max(3 * width.sigmaAt(at), x[1] - x[0]);
  let count = 0;
  for (let i = firstAtLeast(x, at - reach); i < x.length && x[i] <= at + reach; i++) count += usable[i];
  return count >= FEWEST_SAMPLES;
}

const halfOf = (component: Component) => ({ flux: component.flux / 2, sigma: component.sigma });

const withoutComponent = (fits: readonly GroupFit[], fit: GroupFit, component: Component) =>
  fits.map((f) => (f === fit ? { ...f, components: f.components.filter((c) => c !== component) } : f));

function withoutSpikeAt(samples: FitSamples, now: Fits, at: number): Fits | undefined {
  const spike = now.spikes.find((s) => Math.abs(samples.x[s] - at) <= samples.sampleWidth[s]);
  return spike === undefined ? undefined : { ...now, spikes: now.spikes.filter((s) => s !== spike) };
}

/** A component at a wavelength, as high as what the other components leave over there, and no less than the noise. */
function startAt(samples: FitSamples, fits: readonly GroupFit[], at: number, width: WidthPrior, sign: number, byHand: string): Component {
  const sigma = width.sigmaAt(at);
  const i = Math.min(samples.x.length - 1, firstAtLeast(samples.x, at));
  const left = samples.usable[i] ? samples.y[i] - modelAt(samples, fits, i) : 0;
  return { flux: sign * Math.max(sign * left, samples.noise[i]) * sigma * Math.sqrt(2 * Math.PI), centre: at, sigma, byHand };
}

/** What the fits that reach a sample give there, above the continuum of the whole spectrum. */
function modelAt({ x, sampleWidth }: FitSamples, fits: readonly GroupFit[], i: number): number {
  const one = { x: x.subarray(i, i + 1), sampleWidth: sampleWidth.subarray(i, i + 1) };
  const model = new Float64Array(1);
  for (const fit of fits) {
    if (i < fit.first || i > fit.last) continue;
    addProfiles(one, fit.components, model);
    const { middle, half } = spanOf(x, fit.first, fit.last);
    const { parameters: p } = fit;
    model[0] += p[p.length - 2] + (p[p.length - 1] * (x[i] - middle)) / half;
  }
  return model[0];
}

/** The fits with some components taken out and others put in: groups are formed anew where that matters, all others stay as they are. */
function refit(
  samples: FitSamples,
  width: WidthPrior,
  fits: readonly GroupFit[],
  removed: readonly Component[],
  added: readonly Component[],
): GroupFit[] {
  const fwhmAt = (i: number) => (FWHM_PER_SIGMA * width.sigmaAt(samples.x[i])) / samples.sampleWidth[i];
  const home = new Map(fits.flatMap((fit) => fit.components.map((c) => [c, fit] as const)));
  const touched = new Set<Component>(added);
  for (const fit of fits)
    if (fit.components.some((c) => removed.includes(c))) for (const c of fit.components) if (!removed.includes(c)) touched.add(c);
  const all = [...home.keys(), ...added].filter((c) => !removed.includes(c)).sort((a, b) => a.centre - b.centre);
  const seeds = all.map((component) => ({
    at: Math.min(samples.x.length - 1, firstAtLeast(samples.x, component.centre)),
    snr: Math.sign(component.flux) || 1,
    component,
    ...(component.isBroad
      ? {
          fwhm:
            (FWHM_PER_SIGMA * component.sigma) /
            samples.sampleWidth[Math.min(samples.x.length - 1, firstAtLeast(samples.x, component.centre))],
        }
      : {}),
  }));
  const windows = groupPeaks(seeds, fwhmAt, samples.x.length);
  // whoever shares a window or a fit with a touched component is touched
  for (let size = -1; size !== touched.size; ) {
    size = touched.size;
    for (const { peaks } of windows)
      if (peaks.some((p) => touched.has(p.component)))
        for (const { component } of peaks) {
          touched.add(component);
          for (const c of home.get(component)?.components ?? []) if (!removed.includes(c)) touched.add(c);
        }
  }
  const kept = fits.filter((fit) => !fit.components.some((c) => touched.has(c) || removed.includes(c)));
  const anew = windows
    .filter(({ peaks }) => peaks.some((p) => touched.has(p.component)))
    .map(({ peaks, first, last }) =>
      fitGroup(
        samples,
        first,
        last,
        peaks.map((p) => p.component),
        width,
      ),
    );
  return [...kept, ...anew].sort((a, b) => a.first - b.first);
}

/** The fits of both groups with one component tied to another; undefined when one of them is not there or cannot be tied. */
function applyTie(samples: FitSamples, width: WidthPrior, now: Fits, tie: TieEdit, byHand: string): Fits | undefined {
  const line = meant(now.fits, tie.at);
  const to = meant(now.fits, tie.to);
  if (!line || !to || (line.fit === to.fit && line.line === to.line)) return undefined;
  if (Math.sign(line.fit.components[line.line].flux) !== Math.sign(to.fit.components[to.line].flux)) return undefined;
  const together = line.fit === to.fit ? [line.fit] : [line.fit, to.fit].sort((a, b) => a.first - b.first);
  const numberOf = (fit: GroupFit, place: number) => (together[0] === fit ? 0 : together[0].components.length) + place;
  const ties: Tie[] = [
    {
      line: numberOf(line.fit, line.line),
      to: numberOf(to.fit, to.line),
      wavelengthRatio: tie.restAt / tie.restTo,
      ...(tie.ratio === undefined ? {} : { ratio: tie.ratio }),
    },
  ];
  const words = `${byHand} to ${to.fit.components[to.line].centre.toFixed(2)}`;
  const tied = fitTied(samples, together, ties, width).map((fit) => ({
    ...fit,
    components: fit.components.map((c, k) => (fit.first === line.fit.first && k === line.line ? { ...c, byHand: words } : c)),
  }));
  if (tied.some((fit) => fit.end.ended !== 'converged')) return undefined;
  return { ...now, fits: now.fits.map((fit) => tied[together.indexOf(fit)] ?? fit) };
}
