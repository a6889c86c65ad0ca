import { erfc, expOfNegative } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';

export const ROOT_2PI = Math.sqrt(2 * Math.PI);
/** Lines narrower than this (FWHM in samples) are fitted with the profile averaged over each sample. */
export const UNDERSAMPLED_FWHM = 4;
/** Beyond this many sigma a profile is nothing. */
export const PROFILE_REACH = 5.5;

/** A Gaussian of unit flux averaged over one sample, with its derivatives. */
export interface ProfileValue {
  value: number;
  byCentre: number;
  bySigma: number;
}

/**
 * Unit-flux Gaussian at a sample, per Angstrom, written into `into`.
 *
 * @param x      centre of the sample, Angstrom
 * @param width  of the sample, Angstrom; 0 = take the value at its centre (well-sampled lines)
 */
export function gaussianInto(into: ProfileValue, x: number, width: number, centre: number, sigma: number): void {
  const z = (x - centre) / sigma;
  if (Math.abs(z) > PROFILE_REACH + (width > 0 ? width / sigma : 0)) {
    into.value = 0;
    into.byCentre = 0;
    into.bySigma = 0;
    return;
  }
  if (width === 0) {
    const value = expOfNegative(0.5 * z * z) / (sigma * ROOT_2PI);
    into.value = value;
    into.byCentre = (value * z) / sigma;
    into.bySigma = (value * (z * z - 1)) / sigma;
    return;
  }
  const half = width / 2 / sigma;
  const low = z - half;
  const high = z + half;
  const densityLow = expOfNegative(0.5 * low * low) / ROOT_2PI;
  const densityHigh = expOfNegative(0.5 * high * high) / ROOT_2PI;
  into.value = (0.5 * (erfc(low / Math.SQRT2) - erfc(high / Math.SQRT2))) / width;
  into.byCentre = (densityLow - densityHigh) / (sigma * width);
  into.bySigma = (low * densityLow - high * densityHigh) / (sigma * width);
}

/** Whether a line must be averaged over each sample of this width, Angstrom. */
export const isUnderSampled = (sigma: number, sampleWidth: number) => sigma * FWHM_PER_SIGMA < UNDERSAMPLED_FWHM * sampleWidth;

/** Index of the first value >= `at` in an ascending array, sought in [from, to); `to` when there is none. */
export function firstAtLeast(x: Float64Array, at: number, from = 0, to = x.length): number {
  let low = from;
  let high = to;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (x[mid] < at) low = mid + 1;
    else high = mid;
  }
  return low;
}
