import { type Spectrum, toVacuum } from '../spectrum/index.ts';

/** Fewer masked samples in a row hide no line. */
const FEWEST_SAMPLES = 3;
/** Neighbouring samples further apart than so many usual steps have a hole between them: the gap of two detectors. */
const HOLE_STEPS = 6;

/** Stretches inside a spectrum where nothing could be seen: vacuum Angstrom, ascending. */
export function gapsOf({ wavelength, masked, flux, medium }: Spectrum): (readonly [number, number])[] {
  const gaps: (readonly [number, number])[] = [];
  const add = (from: number, to: number) => gaps.push([toVacuum(wavelength[from], medium), toVacuum(wavelength[to], medium)]);
  const isBlind = (i: number) => masked[i] === 1 || !Number.isFinite(flux[i]);
  let first = -1;
  for (let i = 0; i < wavelength.length; i++) {
    if (i > 1 && wavelength[i] - wavelength[i - 1] > HOLE_STEPS * (wavelength[i - 1] - wavelength[i - 2])) add(i - 1, i);
    if (isBlind(i)) {
      if (first < 0) first = i;
    } else if (first >= 0) {
      if (i - first >= FEWEST_SAMPLES) add(Math.max(0, first - 1), i);
      first = -1;
    }
  }
  return gaps.sort((a, b) => a[0] - b[0]);
}
