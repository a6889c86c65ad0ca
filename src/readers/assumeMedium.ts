import type { Medium } from '../spectrum/index.ts';
import { AIR_LIMIT } from '../units/index.ts';

/** Above this (Angstrom) spectra usually come from space or from infrared pipelines that work in vacuum: common practice, no source. */
const INFRARED = 10_000;

/** Makers whose spectra are in vacuum by their own convention: from memory. */
const VACUUM_MAKERS =
  /\b(hst|jwst|iue|fuse|hut|wuppe|euve|galex|spitzer|iso|herschel|akari|euclid|swift|sdss|boss|eboss|lamost|desi|stis|cos|nirspec|niriss|miri|ghrs|foc|nirwals)\b/i;

/** The medium to assume when neither file nor user states it, and why. */
export function assumeMedium(wavelength: Float64Array, maker: string): { readonly medium: Medium; readonly reason: string } {
  const low = wavelength[0];
  const middle = wavelength[wavelength.length >> 1];
  if (low < AIR_LIMIT)
    return {
      medium: 'vacuum',
      reason: `it reaches below ${AIR_LIMIT} Angstrom, where wavelengths are given in vacuum (common practice, no source)`,
    };
  const known = VACUUM_MAKERS.exec(maker);
  if (known) return { medium: 'vacuum', reason: `spectra of ${known[0].toUpperCase()} are in vacuum (from memory)` };
  if (middle > INFRARED)
    return { medium: 'vacuum', reason: `it lies beyond ${INFRARED} Angstrom, where vacuum is usual (common practice, no source)` };
  return { medium: 'air', reason: 'visible spectra from the ground are usually in air (common practice, no source)' };
}
