/** A sample must stand this far above the continuum to be called a spike ... */
const SPIKE_SIGMA = 6;
/** ... and the profile of a line must explain it worse than a lone sample by this much in chi2. */
const WORSE_BY = 16;
const OFFSETS = [-0.5, -0.4, -0.3, -0.2, -0.1, 0, 0.1, 0.2, 0.3, 0.4, 0.5];
const WIDTHS = [0.85, 1, 1.2];

/**
 * Samples that no line of the instrument can make: narrower than the line-spread function (cosmic rays, hot pixels). Each lone sample is compared with
 * the best line profile through it and its two neighbours on either side.
 *
 * @param residual n, flux minus continuum
 * @param sigma    n, of the line-spread function in samples
 * @returns sample numbers, ascending
 */
export function findSpikes(residual: Float64Array, noise: Float64Array, usable: Uint8Array, sigma: Float64Array): number[] {
  const spikes: number[] = [];
  for (let i = 2; i < residual.length - 2; i++) {
    const height = residual[i] / noise[i];
    if (!usable[i] || Math.abs(height) < SPIKE_SIGMA) continue;
    const size = Math.abs(residual[i]);
    if (Math.abs(residual[i - 1]) > size || Math.abs(residual[i + 1]) > size) continue;
    // neighbours may stand on the wing of another line: a spike is judged above a straight line through its surroundings
    const base = Math.min(Math.max(0, residual[i - 1]), Math.max(0, residual[i + 1]));
    if (base > 0.35 * size) continue;
    let alone = 0;
    for (const j of [i - 2, i - 1, i + 1, i + 2]) if (usable[j]) alone += (residual[j] / noise[j]) ** 2;
    const asLine = bestLineChi2(residual, noise, usable, i, sigma[i]);
    if (asLine > alone + WORSE_BY) spikes.push(i);
  }
  return spikes;
}

function bestLineChi2(residual: Float64Array, noise: Float64Array, usable: Uint8Array, at: number, sigma: number): number {
  let best = Number.POSITIVE_INFINITY;
  for (const width of WIDTHS) {
    for (const offset of OFFSETS) {
      let gg = 0;
      let gr = 0;
      let rr = 0;
      for (let j = at - 2; j <= at + 2; j++) {
        if (!usable[j]) continue;
        // the profile averaged over a sample is a little wider than itself
        const g = Math.exp(-0.5 * ((j - at - offset) ** 2 / ((sigma * width) ** 2 + 1 / 12)));
        const w = 1 / (noise[j] * noise[j]);
        gg += w * g * g;
        gr += w * g * residual[j];
        rr += w * residual[j] * residual[j];
      }
      best = Math.min(best, rr - (gr * gr) / gg);
    }
  }
  return best;
}
