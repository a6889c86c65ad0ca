import type { GroupFit } from './fitGroup.ts';
import type { Component, FitSamples } from './fitSamples.ts';
import { spanOf } from './groupEquations.ts';
import { firstAtLeast, gaussianInto, isUnderSampled, PROFILE_REACH } from './profile.ts';

/** Adds the profiles of components to `into`, one value a sample of the whole spectrum. */
export function addProfiles(
  { x, sampleWidth }: Pick<FitSamples, 'x' | 'sampleWidth'>,
  components: readonly Component[],
  into: Float64Array,
): void {
  const profile = { value: 0, byCentre: 0, bySigma: 0 };
  for (const { flux, centre, sigma } of components) {
    const to = centre + (PROFILE_REACH + 1) * sigma;
    for (let i = firstAtLeast(x, centre - (PROFILE_REACH + 1) * sigma); i < x.length && x[i] <= to; i++) {
      gaussianInto(profile, x[i], isUnderSampled(sigma, sampleWidth[i]) ? sampleWidth[i] : 0, centre, sigma);
      into[i] += flux * profile.value;
    }
  }
}

/** Adds the local continuum of a fit, over the samples it was fitted to. */
export function addLocalContinuum({ x }: FitSamples, { first, last, parameters }: GroupFit, into: Float64Array): void {
  const { middle, half } = spanOf(x, first, last);
  const offset = parameters[parameters.length - 2];
  const slope = parameters[parameters.length - 1] / half;
  for (let i = first; i <= last; i++) into[i] += offset + slope * (x[i] - middle);
}
