import { quantile, whittaker } from '../numeric/index.ts';
import { linearBetween } from './noise.ts';

/**
 * Samples this many sigma above or below the last continuum are lines, not continuum, pass by pass ... The first passes are lenient: what is clipped against a
 * poor first estimate would never come back.
 */
const CLIP_SIGMA = [8, 6, 5, 4, 3.5, 3, 2.7, 2.7];
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

/**
 * Continuum under emission and absorption lines: penalised least squares over the samples that are not taken for lines, which are found anew in every pass.
 *
 * @param flux   n
 * @param noise  n, one sigma
 * @param usable n, 1 = may be used
 * @param fwhm   line width in samples at each sample, n
 * @param sampleWidth Angstrom, n
 * @returns n values
 */
export function fitContinuum(
  flux: Float64Array,
  noise: Float64Array,
  usable: Uint8Array,
  fwhm: Float64Array,
  sampleWidth: Float64Array,
): Float64Array {
  const n = flux.length;
  let continuum = firstEstimate(flux, usable, fwhm);
  const weight = new Float64Array(n);
  // one stiffness in a frame stretched to constant line width: sample spacing varies slowly against it
  const width = typical(fwhm);
  const period = Math.max(LEAST_HALF_PERIOD_FWHM * width, Math.min(HALF_PERIOD_FWHM * width, MOST_HALF_PERIOD_A / typical(sampleWidth)));
  const stiffness = (period / (2 * Math.PI)) ** 4;
  const unit = typical(noise);
  for (const clip of CLIP_SIGMA) {
    const line = markLines(flux, noise, continuum, fwhm, clip);
    for (let i = 0; i < n; i++) weight[i] = usable[i] && !line[i] && noise[i] > 0 ? Math.min(1e6, (unit / noise[i]) ** 2) : 0;
    continuum = whittaker(flux, weight, stiffness);
  }
  return continuum;
}

const typical = (values: Float64Array) => {
  const thinned = values.length > 2000 ? values.filter((_, i) => i % Math.ceil(values.length / 2000) === 0) : values;
  return quantile(thinned, 0.5);
};

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

/** 1 = taken for part of a line: far from the continuum, or beside such samples. */
function markLines(flux: Float64Array, noise: Float64Array, continuum: Float64Array, fwhm: Float64Array, clip: number): Uint8Array {
  const n = flux.length;
  const line = new Uint8Array(n);
  let until = -1;
  for (let i = 0; i < n; i++) {
    // a running mean of three samples finds faint wings that single samples hide
    const residual = (flux[i] - continuum[i]) / noise[i];
    const mean =
      i > 0 && i < n - 1
        ? (residual + (flux[i - 1] - continuum[i - 1]) / noise[i - 1] + (flux[i + 1] - continuum[i + 1]) / noise[i + 1]) / Math.sqrt(3)
        : residual;
    if (Math.abs(residual) > clip || Math.abs(mean) > clip) {
      const reach = Math.ceil(GROW_FWHM * fwhm[i]);
      for (let j = Math.max(until + 1, i - reach, 0); j <= Math.min(n - 1, i + reach); j++) line[j] = 1;
      until = Math.max(until, Math.min(n - 1, i + reach));
    }
  }
  return line;
}
