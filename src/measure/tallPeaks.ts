import { quantile } from '../numeric/index.ts';

/** Peaks must stand out this far, in units of the noise, to show their width by their half height. */
const TALL_SIGMA = 12;
const FEW_PEAKS = 3;
const MOST_PEAKS = 80;
/** Samples in one FWHM when no line says otherwise: spectrographs are built to two and a half. */
const SAMPLES_PER_FWHM = 2.5;
/** Blends widen, nothing narrows: the instrument is sought in the narrower half of the peaks. */
const NARROW_QUANTILE = 0.35;

/**
 * First idea of the resolving power from the half-height widths of tall peaks.
 *
 * @param x Angstrom
 * @param flux  n
 * @param level n, a rough continuum
 */
export function widthOfTallPeaks(
  x: Float64Array,
  flux: Float64Array,
  level: Float64Array,
  noise: Float64Array,
  usable: Uint8Array,
): { resolvingPower: number; from: 'lines' | 'sampling' } {
  const tall: { at: number; height: number }[] = [];
  const above = (i: number) => flux[i] - level[i];
  for (let i = 3; i < x.length - 3; i++) {
    const here = flux[i] - level[i];
    if (!usable[i] || !(here > TALL_SIGMA * noise[i])) continue;
    const left = flux[i - 1] - level[i - 1];
    const right = flux[i + 1] - level[i + 1];
    if (here < left || here <= right) continue;
    // spikes have nothing beside them
    if (Math.max(left, right) < 0.2 * here) continue;
    tall.push({ at: i, height: here / noise[i] });
  }
  tall.sort((a, b) => b.height - a.height);
  const powers = tall
    .slice(0, MOST_PEAKS)
    .map(({ at }) => x[at] / halfHeightWidth(x, above, at))
    .filter((r) => r > 0 && Number.isFinite(r));
  if (powers.length >= FEW_PEAKS) return { resolvingPower: quantile(powers, 1 - NARROW_QUANTILE), from: 'lines' };
  const middle = x.length >> 1;
  return { resolvingPower: x[middle] / (SAMPLES_PER_FWHM * (x[middle + 1] - x[middle])), from: 'sampling' };
}

function halfHeightWidth(x: Float64Array, above: (i: number) => number, at: number): number {
  const half = above(at) / 2;
  let low = at;
  while (low > 0 && above(low) > half) low--;
  let high = at;
  while (high < x.length - 1 && above(high) > half) high++;
  const left = x[low] + ((half - above(low)) / (above(low + 1) - above(low))) * (x[low + 1] - x[low]);
  const right = x[high] - ((half - above(high)) / (above(high - 1) - above(high))) * (x[high] - x[high - 1]);
  return right - left;
}
