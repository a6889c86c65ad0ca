import type { Points } from './decimate.ts';
import { type Profile, profileAt } from './profileCurve.ts';
import { sampleAt } from './sampleAt.ts';

/** Profiles are counted this many FWHM away from their centre. */
const WINGS_FWHM = 4;

/** The continuum between the samples, from its values at them; NaN outside. */
export function continuumAt(continuum: Points, at: number): number {
  const k = sampleAt(continuum.x, at);
  if (k === 0) return continuum.x[0] === at ? continuum.y[0] : Number.NaN;
  if (k >= continuum.x.length) return Number.NaN;
  const share = (at - continuum.x[k - 1]) / (continuum.x[k] - continuum.x[k - 1]);
  return continuum.y[k - 1] + share * (continuum.y[k] - continuum.y[k - 1]);
}

/** Continuum plus all profiles on `count` + 1 even places: the fit between the samples, where they are sparse. */
export function fitCurve(profiles: readonly Profile[], continuum: Points, from: number, to: number, count: number): Points {
  const x = Array.from({ length: count + 1 }, (_, k) => from + ((to - from) * k) / count);
  const y = x.map((at) => continuumAt(continuum, at));
  const step = (to - from) / count;
  for (const profile of profiles) {
    const reach = WINGS_FWHM * profile.fwhm;
    const first = Math.max(0, Math.ceil((profile.centre - reach - from) / step));
    const last = Math.min(count, Math.floor((profile.centre + reach - from) / step));
    for (let k = first; k <= last; k++) y[k] += profileAt(profile, x[k]);
  }
  return { x, y };
}
