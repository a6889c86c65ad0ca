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
 * @returns n; positive for emission; 0 where less than two fifths of the profile's information is usable
 */
export function matchedFilter(
  residual: Float64Array,
  noise: Float64Array,
  usable: Uint8Array,
  sigma: Float64Array,
  threshold = 0,
): Float64Array {
  const n = residual.length;
  const snr = new Float64Array(n);
  // weights and weighted residuals once, with nothing where a sample cannot be used
  const ivar = new Float64Array(n);
  const pull = new Float64Array(n);
  for (let j = 0; j < n; j++) {
    if (!usable[j]) continue;
    const w = 1 / (noise[j] * noise[j]);
    ivar[j] = w;
    pull[j] = w * residual[j];
  }
  const worth = threshold > 0 ? placesWorth(pull, ivar, sigma, WORTH * threshold) : undefined;
  let kernel = new Float64Array(0);
  let squares = new Float64Array(0);
  let kernelSigma = 0;
  let whole = 0;
  for (let i = 0; i < n; i++) {
    if (worth && !worth[i]) continue;
    if (Math.abs(sigma[i] - kernelSigma) > 0.02 * kernelSigma) {
      kernelSigma = sigma[i];
      kernel = halfKernel(kernelSigma);
      squares = kernel.map((g) => g * g);
      whole = squares.reduce((sum, g, k) => sum + (k === 0 ? g : 2 * g), 0);
    }
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
    snr[i] = weight * noise[i] * noise[i] > LEAST_INFORMATION * whole ? signal / Math.sqrt(weight) : 0;
  }
  return snr;
}

/** The profile from its centre outwards, 1 at the centre. */
const halfKernel = (sigma: number) =>
  Float64Array.from({ length: Math.min(MOST_REACH, Math.ceil(CUT_SIGMA * sigma)) + 1 }, (_, k) => Math.exp((-0.5 * k * k) / sigma ** 2));

/** 1 where a boxcar about as wide as the profile shows at least `least` S/N, from running sums. */
function placesWorth(pull: Float64Array, ivar: Float64Array, sigma: Float64Array, least: number): Uint8Array {
  const n = pull.length;
  const pulls = new Float64Array(n + 1);
  const ivars = new Float64Array(n + 1);
  for (let i = 0; i < n; i++) {
    pulls[i + 1] = pulls[i] + pull[i];
    ivars[i + 1] = ivars[i] + ivar[i];
  }
  const worth = new Uint8Array(n);
  for (let i = 0; i < n; i++) {
    const half = Math.floor(BOX_HALF_SIGMA * sigma[i]);
    const from = Math.max(0, i - half);
    const to = Math.min(n, i + half + 1);
    const weight = ivars[to] - ivars[from];
    if (weight > 0 && Math.abs(pulls[to] - pulls[from]) >= least * Math.sqrt(weight)) worth[i] = 1;
  }
  return worth;
}
