import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { Component, FitSamples } from './fitSamples.ts';
import { firstAtLeast, ROOT_2PI } from './profile.ts';

/** A line must stand this far above the noise to show the shape of its top. */
const TELLING_PEAK = 20;
/** A Gauss-Hermite coefficient h4 below this, and by so many of its errors, is a flat top. */
const FLAT_H4 = -0.04;
const CLEAR_SIGMA = 6;
/** The shape is judged over this many FWHM about the centre. */
const CORE_FWHM = 1.2;

/**
 * Whether the top of a line is flatter than a Gaussian's, by the fourth Gauss-Hermite moment of what its fit leaves over
 * (van der Marel & Franx 1993, ApJ 407, 525).
 *
 * @param left n, flux minus model
 */
export function isFlatTopped({ x, noise, usable }: FitSamples, { centre, sigma, flux }: Component, left: Float64Array): boolean {
  const peak = flux / (sigma * ROOT_2PI);
  const middle = Math.min(x.length - 1, firstAtLeast(x, centre));
  if (Math.abs(peak) < TELLING_PEAK * noise[middle]) return false;
  const reach = CORE_FWHM * FWHM_PER_SIGMA * sigma;
  let overlap = 0;
  let information = 0;
  for (let i = firstAtLeast(x, centre - reach); i < x.length && x[i] <= centre + reach; i++) {
    if (!usable[i]) continue;
    const z = (x[i] - centre) / sigma;
    const shape = (peak * Math.exp(-0.5 * z * z) * (4 * z ** 4 - 12 * z * z + 3)) / Math.sqrt(24);
    const weight = 1 / (noise[i] * noise[i]);
    overlap += weight * shape * left[i];
    information += weight * shape * shape;
  }
  const h4 = overlap / information;
  return h4 < FLAT_H4 && h4 * Math.sqrt(information) < -CLEAR_SIGMA;
}
