/**
 * Signal to noise of a Gaussian line centred on each sample: matched filter with the line-spread function.
 *
 * @param residual n, flux minus model
 * @param noise    n, one sigma
 * @param usable   n, 1 = may be used
 * @param sigma    n, of the profile, in samples
 * @returns n; positive for emission; 0 where less than half of the profile's weight is usable
 */
export function matchedFilter(
  residual: Float64Array,
  noise: Float64Array,
  usable: Uint8Array,
  sigma: Float64Array,
  from = 0,
  to = residual.length,
): Float64Array {
  const snr = new Float64Array(to - from);
  const kernel: number[] = [];
  let kernelSigma = 0;
  for (let i = from; i < to; i++) {
    if (Math.abs(sigma[i] - kernelSigma) > 0.02 * kernelSigma) {
      kernelSigma = sigma[i];
      kernel.length = 0;
      for (let k = 0; k <= Math.ceil(3 * kernelSigma); k++) kernel.push(Math.exp((-0.5 * k * k) / kernelSigma ** 2));
    }
    let signal = 0;
    let weight = 0;
    let whole = 0;
    let seen = 0;
    for (let k = -kernel.length + 1; k < kernel.length; k++) {
      const g = kernel[Math.abs(k)];
      whole += g;
      const j = i + k;
      if (j < 0 || j >= residual.length || !usable[j]) continue;
      const ivar = 1 / (noise[j] * noise[j]);
      signal += g * residual[j] * ivar;
      weight += g * g * ivar;
      seen += g;
    }
    snr[i - from] = weight > 0 && seen > 0.5 * whole ? signal / Math.sqrt(weight) : 0;
  }
  return snr;
}
