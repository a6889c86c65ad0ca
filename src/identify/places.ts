import type { Mark } from './naming.ts';

/** Where marks stand, ascending, and how far from its centre a mark can hide an unresolved line. */
export interface Places {
  readonly at: readonly number[];
  readonly hides: readonly number[];
  readonly widest: number;
}

/** A line this far from the centre of a feature, in FWHM, is a part of it. */
const HIDES_FWHM = 0.7;

export function placesOf(marks: readonly Mark[]): Places {
  const sorted = marks.filter((m) => !m.artefact).sort((a, b) => a.wavelength - b.wavelength);
  const hides = sorted.map((m) => HIDES_FWHM * (m.fwhm ?? 0));
  return { at: sorted.map((m) => m.wavelength), hides, widest: Math.max(0, ...hides) };
}

export function hasWithin({ at: places, hides, widest }: Places, at: number, reach: number): boolean {
  const far = Math.max(reach, widest);
  let low = 0;
  let high = places.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (places[mid] < at - far) low = mid + 1;
    else high = mid;
  }
  for (let k = low; k < places.length && places[k] <= at + far; k++) if (Math.abs(places[k] - at) <= Math.max(reach, hides[k])) return true;
  return false;
}
