import { erfc } from '../numeric/index.ts';

const ROOT_2PI = Math.sqrt(2 * Math.PI);
/** Beyond this many sigma a profile is nothing. */
export const PROFILE_REACH = 6;

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
    const value = Math.exp(-0.5 * z * z) / (sigma * ROOT_2PI);
    into.value = value;
    into.byCentre = (value * z) / sigma;
    into.bySigma = (value * (z * z - 1)) / sigma;
    return;
  }
  const half = width / 2 / sigma;
  const low = z - half;
  const high = z + half;
  const densityLow = Math.exp(-0.5 * low * low) / ROOT_2PI;
  const densityHigh = Math.exp(-0.5 * high * high) / ROOT_2PI;
  into.value = (0.5 * (erfc(low / Math.SQRT2) - erfc(high / Math.SQRT2))) / width;
  into.byCentre = (densityLow - densityHigh) / (sigma * width);
  into.bySigma = (low * densityLow - high * densityHigh) / (sigma * width);
}
