/** Profiles wider than this are cut, samples. */
const REACH_SAMPLES = 400;

/**
 * Signal to noise of a Gaussian line centred on each sample: matched filter with the line-spread function.
 *
 * @param residual n, flux minus model
 * @param noise    n, one sigma
 * @param usable   n, 1 = may be used
 * @param sigma    n, of the profile, in samples
 * @returns n; positive for emission; 0 where less than two fifths of the profile's information is usable
 */
export function matchedFilter(
  residual: Float64Array,
  noise: Float64Array,
  usable: Uint8Array,
  sigma: Float64Array,
  from = 0,
  to = residual.length,
): Float64Array {
  const n = residual.length;
  const snr = new Float64Array(to - from);
  // weights and weighted residuals once, with nothing where a sample cannot be used
  const low = Math.max(0, from - REACH_SAMPLES);
  const high = Math.min(n, to + REACH_SAMPLES);
  const ivar = new Float64Array(high - low);
  const pull = new Float64Array(high - low);
  for (let j = low; j < high; j++) {
    if (!usable[j]) continue;
    const w = 1 / (noise[j] * noise[j]);
    ivar[j - low] = w;
    pull[j - low] = w * residual[j];
  }
  let kernel = new Float64Array(0);
  let squares = new Float64Array(0);
  let kernelSigma = 0;
  let whole = 0;
  for (let i = from; i < to; i++) {
    if (Math.abs(sigma[i] - kernelSigma) > 0.02 * kernelSigma) {
      kernelSigma = sigma[i];
      kernel = Float64Array.from({ length: Math.min(REACH_SAMPLES, Math.ceil(3 * kernelSigma)) + 1 }, (_, k) =>
        Math.exp((-0.5 * k * k) / kernelSigma ** 2),
      );
      squares = kernel.map((g) => g * g);
      whole = squares.reduce((sum, g, k) => sum + (k === 0 ? g : 2 * g), 0);
    }
    const centre = i - low;
    let signal = pull[centre];
    let weight = ivar[centre];
    const inside = centre >= kernel.length - 1 && centre + kernel.length <= ivar.length;
    for (let k = 1; k < kernel.length; k++) {
      const left = inside || centre - k >= 0;
      const right = inside || centre + k < ivar.length;
      signal += kernel[k] * ((left ? pull[centre - k] : 0) + (right ? pull[centre + k] : 0));
      weight += squares[k] * ((left ? ivar[centre - k] : 0) + (right ? ivar[centre + k] : 0));
    }
    // with less than half of the profile's information left, a peak is an edge effect
    snr[i - from] = weight * noise[i] * noise[i] > 0.4 * whole ? signal / Math.sqrt(weight) : 0;
  }
  return snr;
}
