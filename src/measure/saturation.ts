/** Samples that repeat one value at the top of a line, at the least. */
const FEWEST_REPEATS = 3;
/** The top must stand this far above the noise. */
const TALL_SIGMA = 20;
/** A Gaussian would have fallen by so many of the smallest steps seen nearby over as many samples. */
const STEPS_FALLEN = 5;
/** Samples to either side in which the smallest step between values is sought: a file that prints few digits repeats values, too. */
const NEARBY = 20;

/**
 * Samples where the detector was full: a line's top repeats one value where a line of this width could not.
 *
 * @param flux  n, as read
 * @param y     n, flux above the continuum
 * @param sigma n, of a line, in samples
 * @returns sample numbers, ascending
 */
export function saturatedSamples(flux: Float64Array, y: Float64Array, noise: Float64Array, sigma: Float64Array): number[] {
  const saturated: number[] = [];
  let first = 0;
  for (let i = 1; i <= flux.length; i++) {
    if (i < flux.length && flux[i] === flux[first]) continue;
    const length = i - first;
    if (length >= FEWEST_REPEATS && first > 0 && i < flux.length && flux[first - 1] < flux[first] && flux[i] < flux[first]) {
      const fallen = (y[first] * length * length) / (8 * sigma[first] * sigma[first]);
      if (y[first] > TALL_SIGMA * noise[first] && fallen > STEPS_FALLEN * smallestStep(flux, first - NEARBY, i + NEARBY))
        for (let k = first; k < i; k++) saturated.push(k);
    }
    first = i;
  }
  return saturated;
}

function smallestStep(flux: Float64Array, from: number, to: number): number {
  let smallest = Number.POSITIVE_INFINITY;
  for (let i = Math.max(1, from); i < Math.min(flux.length, to); i++) {
    const step = Math.abs(flux[i] - flux[i - 1]);
    if (step > 0 && step < smallest) smallest = step;
  }
  return smallest;
}
