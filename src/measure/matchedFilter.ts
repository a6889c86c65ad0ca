import type { Stretch } from './fitSamples.ts';

/** Profiles are cut at three sigma, and never wider than this, samples. */
const CUT_SIGMA = 3;
const MOST_REACH = 400;
/** With less of the profile's information left than this share, a peak is an edge effect. */
const LEAST_INFORMATION = 0.4;
/** A boxcar of the profile's width keeps most of its S/N: places where it shows less than this share of the threshold hold no peak. */
const WORTH = 0.45;
const BOX_HALF_SIGMA = 1.4;

/**
 * Signal to noise of a Gaussian line centred on each sample: matched filter with the line-spread function.
 *
 * @param residual  n, flux minus model
 * @param noise     n, one sigma
 * @param usable    n, 1 = may be used
 * @param sigma     n, of the profile, in samples
 * @param threshold places that cannot reach this S/N may be left at 0; 0 = compute every place
 * @param where     places to compute; absent = all
 * @returns n; positive for emission; 0 where less than two fifths of the profile's information is usable
 */
export function matchedFilter(
  residual: Float64Array,
  noise: Float64Array,
  usable: Uint8Array,
  sigma: Float64Array,
  threshold = 0,
  where: readonly Stretch[] = [{ first: 0, last: residual.length - 1 }],
): Float64Array {
  const snr = new Float64Array(residual.length);
  for (const { first, last } of where)
    for (let from = first; from <= last; from += BLOCK)
      filterStretch(residual, noise, usable, sigma, threshold, from, Math.min(last, from + BLOCK - 1), snr);
  return snr;
}

/** Samples filtered at a time: their sums stay in the processor's cache. */
const BLOCK = 8192;

/** Working arrays, grown as needed and used anew by every call. */
let room = { ivar: new Float64Array(0), pull: new Float64Array(0), ivars: new Float64Array(1), pulls: new Float64Array(1) };

function roomFor(n: number): typeof room {
  if (room.ivar.length < n)
    room = { ivar: new Float64Array(n), pull: new Float64Array(n), ivars: new Float64Array(n + 1), pulls: new Float64Array(n + 1) };
  return room;
}

function filterStretch(
  residual: Float64Array,
  noise: Float64Array,
  usable: Uint8Array,
  sigma: Float64Array,
  threshold: number,
  first: number,
  last: number,
  into: Float64Array,
): void {
  // with the surroundings that the profile reaches into
  const widest = Math.min(MOST_REACH, Math.ceil(CUT_SIGMA * Math.max(sigma[first], sigma[last]))) + 1;
  const from = Math.max(0, first - widest);
  const n = Math.min(residual.length - 1, last + widest) - from + 1;
  // weights and weighted residuals once, with nothing where a sample cannot be used; their running sums for the boxcar
  const { ivar, pull, ivars, pulls } = roomFor(n);
  for (let j = 0; j < n; j++) {
    const w = usable[from + j] ? 1 / (noise[from + j] * noise[from + j]) : 0;
    ivar[j] = w;
    pull[j] = w > 0 ? w * residual[from + j] : 0;
    ivars[j + 1] = ivars[j] + ivar[j];
    pulls[j + 1] = pulls[j] + pull[j];
  }
  const least = (WORTH * threshold) ** 2;
  let { step, kernel, squares, whole } = kernelOf(kernelStep(sigma[first]));
  for (let i = first - from; i <= last - from; i++) {
    const s = sigma[from + i];
    if (least > 0) {
      const half = Math.floor(BOX_HALF_SIGMA * s);
      const low = Math.max(0, i - half);
      const high = Math.min(n, i + half + 1);
      const boxed = pulls[high] - pulls[low];
      if (!(boxed * boxed > least * (ivars[high] - ivars[low]))) continue;
    }
    if (Math.abs(kernelStep(s) - step) > 1) ({ step, kernel, squares, whole } = kernelOf(kernelStep(s)));
    let signal = pull[i];
    let weight = ivar[i];
    const left = Math.min(kernel.length - 1, i);
    const right = Math.min(kernel.length - 1, n - 1 - i);
    const both = Math.min(left, right);
    for (let k = 1; k <= both; k++) {
      signal += kernel[k] * (pull[i - k] + pull[i + k]);
      weight += squares[k] * (ivar[i - k] + ivar[i + k]);
    }
    for (let k = both + 1; k <= left; k++) {
      signal += kernel[k] * pull[i - k];
      weight += squares[k] * ivar[i - k];
    }
    for (let k = both + 1; k <= right; k++) {
      signal += kernel[k] * pull[i + k];
      weight += squares[k] * ivar[i + k];
    }
    into[from + i] = weight * noise[from + i] * noise[from + i] > LEAST_INFORMATION * whole ? signal / Math.sqrt(weight) : 0;
  }
}

/** The profile from its centre outwards, 1 at the centre; its squares; the sum of all of these. */
interface Kernel {
  readonly step: number;
  readonly kernel: Float64Array;
  readonly squares: Float64Array;
  readonly whole: number;
}

/** Widths are rounded to this share: a filter wrong by it loses nothing. */
const KERNEL_STEP = 0.02;
const kernelStep = (sigma: number) => Math.round(Math.log(sigma) / KERNEL_STEP);
/** Every width is computed once. */
const kernels = new Map<number, Kernel>();

function kernelOf(step: number): Kernel {
  const known = kernels.get(step);
  if (known) return known;
  const sigma = Math.exp(step * KERNEL_STEP);
  const kernel = new Float64Array(Math.min(MOST_REACH, Math.ceil(CUT_SIGMA * sigma)) + 1);
  for (let k = 0; k < kernel.length; k++) kernel[k] = Math.exp((-0.5 * k * k) / sigma ** 2);
  const squares = kernel.map((g) => g * g);
  const made = { step, kernel, squares, whole: squares.reduce((sum, g, k) => sum + (k === 0 ? g : 2 * g), 0) };
  kernels.set(step, made);
  return made;
}
