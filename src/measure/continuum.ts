import { quantile, whittaker, whittakerVariance } from '../numeric/index.ts';
import type { ContinuumSettings } from './feature.ts';
import { linearBetween } from './noise.ts';
import { firstAtLeast } from './profile.ts';

/**
 * Samples this many sigma above or below the last continuum are lines, not continuum, pass by pass ... The first passes are lenient: what is clipped against a
 * poor first estimate would never come back.
 */
const CLIP_SIGMA = [8, 5.5, 4, 3.2, 2.7, 2.7];
/** ... and so are their neighbours to either side, in line widths (FWHM). */
const GROW_FWHM = 1.2;
/** The stretch of the first estimate, in FWHM: longer than any crowd of lines. */
const FIRST_STRETCH_FWHM = 40;
/** Emission crowds a stretch from above: the first estimate takes a quantile below the median. */
const FIRST_QUANTILE = 0.4;
/** Period that the continuum follows by half, in FWHM: slower than any line, faster than dust bands and wiggles of the flat field. */
const HALF_PERIOD_FWHM = 35;
/** ... but at low resolution the wiggles of continua and flat fields set the pace, down to a few lines' width. */
const MOST_HALF_PERIOD_A = 110;
const LEAST_HALF_PERIOD_FWHM = 14;
/** Only the last passes are solved sample by sample, the others in bins of a half-period over this: they only tell lines from continuum. */
const FINE_PASSES = 2;
const BINS_A_PERIOD = 24;
/** A pin weighs as much as so many half-periods of good samples. */
const PIN_WEIGHT = 100;

/** What the continuum is sought in; all arrays one value a sample. */
export interface ContinuumInput {
  /** Angstrom, ascending. */
  readonly x: Float64Array;
  readonly flux: Float64Array;
  /** One sigma. */
  readonly noise: Float64Array;
  /** 1 = may be used. */
  readonly usable: Uint8Array;
  /** Line width (FWHM) in samples. */
  readonly fwhm: Float64Array;
  /** Angstrom. */
  readonly sampleWidth: Float64Array;
}

export interface Continuum {
  readonly level: Float64Array;
  /** One sigma of the level from the noise alone: what a straight or a bent continuum would make of it is not in it. */
  readonly levelErr: Float64Array;
  /** 1 = taken for part of a line, or excluded. */
  readonly isLine: Uint8Array;
  /** Detail of this period is followed by half, Angstrom. */
  readonly halfPeriodA: number;
}

/**
 * Continuum under emission and absorption lines: penalised least squares over the samples that are not taken for lines, which are found anew in every pass. O(n).
 */
export function fitContinuum(input: ContinuumInput, settings: ContinuumSettings = {}): Continuum {
  const { flux, noise, usable, fwhm, sampleWidth } = input;
  const n = flux.length;
  const pins = pinsOf(input, settings);
  const excluded = excludedOf(input, settings);
  // one stiffness in a frame stretched to constant line width: sample spacing varies slowly against it
  const width = typical(fwhm);
  const spacing = typical(sampleWidth);
  const own = Math.max(LEAST_HALF_PERIOD_FWHM * width, Math.min(HALF_PERIOD_FWHM * width, MOST_HALF_PERIOD_A / spacing));
  const period = settings.halfPeriodA === undefined ? own : Math.max(4, settings.halfPeriodA / spacing);
  const stiffness = (period / (2 * Math.PI)) ** 4;
  const unit = typical(noise);
  const weight = new Float64Array(n);
  const inverse = new Float64Array(n);
  const whole = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    inverse[i] = 1 / noise[i];
    if (usable[i] && !excluded?.[i] && noise[i] > 0) whole[i] = Math.min(1e6, (unit * inverse[i]) ** 2);
  }
  const y = flux.slice();
  for (const { at, level } of pins) y[at] = level;
  const bin = Math.max(1, Math.floor(period / BINS_A_PERIOD));
  let level = firstEstimate(flux, usable, fwhm);
  let isLine: Uint8Array = new Uint8Array(0);
  CLIP_SIGMA.forEach((clip, pass) => {
    isLine = markLines(flux, inverse, level, fwhm, clip);
    for (let i = 0; i < n; i++) weight[i] = isLine[i] ? 0 : whole[i];
    for (const { at } of pins) weight[at] = PIN_WEIGHT * period;
    const isFine = pass >= CLIP_SIGMA.length - FINE_PASSES;
    level = isFine || bin === 1 ? whittaker(y, weight, stiffness) : inBins(y, weight, stiffness, bin);
  });
  if (excluded) for (let i = 0; i < n; i++) isLine[i] |= excluded[i];
  return { level, levelErr: errorOf(weight, stiffness, bin, unit), isLine, halfPeriodA: period * spacing };
}

/** Samples nearest to the user's pins, with their level. */
const pinsOf = ({ x }: ContinuumInput, { pins = [] }: ContinuumSettings) =>
  pins
    .filter(({ wavelength }) => wavelength >= x[0] && wavelength <= x[x.length - 1])
    .map(({ wavelength, level }) => ({ at: firstAtLeast(x, wavelength), level }));

function excludedOf({ x }: ContinuumInput, { exclude = [] }: ContinuumSettings): Uint8Array | undefined {
  if (exclude.length === 0) return undefined;
  const excluded = new Uint8Array(x.length);
  for (const [from, to] of exclude) excluded.fill(1, firstAtLeast(x, from), firstAtLeast(x, to));
  return excluded;
}

/** Sums of `bin` neighbouring samples: weights, and weighted means of `y`. */
function binned(y: Float64Array, weight: Float64Array, bin: number): { y: Float64Array; weight: Float64Array } {
  const m = Math.ceil(y.length / bin);
  const sums = new Float64Array(m);
  const weights = new Float64Array(m);
  for (let i = 0, k = 0, left = bin; i < y.length; i++) {
    if (weight[i] > 0) {
      weights[k] += weight[i];
      sums[k] += weight[i] * y[i];
    }
    if (--left === 0) {
      k++;
      left = bin;
    }
  }
  for (let k = 0; k < m; k++) if (weights[k] > 0) sums[k] /= weights[k];
  return { y: sums, weight: weights };
}

/** Second differences of bins `bin` wide: the same curve pays `bin`^-3 of what it pays sample by sample. */
const stiffnessInBins = (stiffness: number, bin: number) => stiffness / bin ** 3;

function inBins(y: Float64Array, weight: Float64Array, stiffness: number, bin: number): Float64Array {
  const coarse = binned(y, weight, bin);
  return between(whittaker(coarse.y, coarse.weight, stiffnessInBins(stiffness, bin)), bin, y.length);
}

function errorOf(weight: Float64Array, stiffness: number, bin: number, unit: number): Float64Array {
  const coarse = binned(weight, weight, bin);
  const variance = whittakerVariance(coarse.weight, stiffnessInBins(stiffness, bin));
  for (let k = 0; k < variance.length; k++) variance[k] = unit * Math.sqrt(Math.max(0, variance[k]));
  return between(variance, bin, weight.length);
}

/** Values at the middles of bins, straight lines between them, held at the ends. */
function between(values: Float64Array, bin: number, n: number): Float64Array {
  const fine = new Float64Array(n);
  const last = values.length - 1;
  for (let i = 0; i < n; i++) {
    const at = (i + 0.5) / bin - 0.5;
    const k = Math.min(last, Math.max(0, Math.floor(at)));
    const next = Math.min(last, k + 1);
    const share = Math.min(1, Math.max(0, at - k));
    fine[i] = values[k] + share * (values[next] - values[k]);
  }
  return fine;
}

/** Median of a sample of the values. */
export function typical(values: Float64Array): number {
  if (values.length <= 2000) return quantile(values, 0.5);
  const step = Math.ceil(values.length / 2000);
  const thinned = new Float64Array(Math.floor((values.length - 1) / step) + 1);
  for (let k = 0; k < thinned.length; k++) thinned[k] = values[k * step];
  return quantile(thinned, 0.5);
}

function firstEstimate(flux: Float64Array, usable: Uint8Array, fwhm: Float64Array): Float64Array {
  const n = flux.length;
  const stretch = Math.max(8, Math.min(n, Math.round(FIRST_STRETCH_FWHM * typical(fwhm))));
  const step = Math.max(1, Math.floor(stretch / 60));
  const centres: number[] = [];
  const levels: number[] = [];
  for (let from = 0; from < n; from += Math.ceil(stretch / 2)) {
    const to = Math.min(n, from + stretch);
    const values: number[] = [];
    for (let i = from; i < to; i += step) if (usable[i]) values.push(flux[i]);
    if (values.length < 3) continue;
    centres.push((from + to) / 2);
    levels.push(quantile(values, FIRST_QUANTILE));
  }
  return linearBetween(centres, levels, n);
}

/** 1 = taken for part of a line: far from the continuum, or beside such samples. `inverse`: 1 / noise. */
function markLines(flux: Float64Array, inverse: Float64Array, continuum: Float64Array, fwhm: Float64Array, clip: number): Uint8Array {
  const n = flux.length;
  const line = new Uint8Array(n);
  let until = -1;
  // a running mean of three samples finds faint wings that single samples hide
  const clipOfThree = clip * Math.sqrt(3);
  let before = Number.NaN;
  let here = n > 0 ? (flux[0] - continuum[0]) * inverse[0] : 0;
  for (let i = 0; i < n; i++) {
    const after = i < n - 1 ? (flux[i + 1] - continuum[i + 1]) * inverse[i + 1] : Number.NaN;
    const three = before + here + after;
    if (here > clip || here < -clip || three > clipOfThree || three < -clipOfThree) {
      const reach = Math.ceil(GROW_FWHM * fwhm[i]);
      const to = Math.min(n - 1, i + reach);
      for (let j = Math.max(until + 1, i - reach, 0); j <= to; j++) line[j] = 1;
      until = Math.max(until, to);
    }
    before = here;
    here = after;
  }
  return line;
}
