/** A local extremum of the S/N map. */
export interface Peak {
  /** Sample number. */
  readonly at: number;
  /** Signed: negative for absorption. */
  readonly snr: number;
  /** Of a line that is known to be wider than usual, samples. */
  readonly fwhm?: number;
}

/**
 * Local extrema of the S/N map beyond a threshold, ascending.
 *
 * @param snr        n, of the matched filter
 * @param absorption whether negative extrema count
 */
export function findPeaks(snr: Float64Array, threshold: number, absorption: boolean): Peak[] {
  const peaks: Peak[] = [];
  for (let i = 1; i < snr.length - 1; i++) {
    if (snr[i] >= threshold && snr[i] > snr[i - 1] && snr[i] >= snr[i + 1]) peaks.push({ at: i, snr: snr[i] });
    else if (absorption && snr[i] <= -threshold && snr[i] < snr[i - 1] && snr[i] <= snr[i + 1]) peaks.push({ at: i, snr: snr[i] });
  }
  return peaks;
}
