import { erfc, solveLinear } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { FitSamples, GroupFit, WidthPrior } from './fitGroup.ts';

/** Components of a plateau differ by no more than this in flux ... */
const ALIKE = 3;
/** ... and stand no further apart than this, in FWHM. */
const TOUCHING_FWHM = 2.2;
const EDGES = 16;

/**
 * Whether a row of like components is really a step up and down of the continuum (the foot of a series limit, an order's end): a box with edges as soft as the
 * instrument explains the samples at least as well with three numbers as the lines do with three each (Schwarz 1978).
 */
export function isPlateau(samples: FitSamples, fit: GroupFit, width: WidthPrior): boolean {
  const lines = [...fit.components].sort((a, b) => a.centre - b.centre);
  if (lines.length < 2 || lines.some((l) => l.flux <= 0)) return false;
  const fluxes = lines.map((l) => l.flux);
  if (Math.max(...fluxes) > ALIKE * Math.min(...fluxes)) return false;
  const fwhm = FWHM_PER_SIGMA * width.sigmaAt(lines[0].centre);
  if (lines.some((line, k) => k > 0 && line.centre - lines[k - 1].centre > TOUCHING_FWHM * fwhm)) return false;
  const price = Math.log(fit.last - fit.first + 1);
  const box = bestBoxChi2(samples, fit, lines[0].centre, lines[lines.length - 1].centre, width.sigmaAt(lines[0].centre), fwhm);
  return box + 3 * price < fit.chi2 + 3 * lines.length * price;
}

function bestBoxChi2(samples: FitSamples, { first, last }: GroupFit, left: number, right: number, sigma: number, fwhm: number): number {
  let best = Number.POSITIVE_INFINITY;
  for (let a = 0; a <= EDGES; a++) {
    for (let b = 0; b <= EDGES; b++) {
      const low = left - (1.6 * fwhm * a) / EDGES;
      const high = right + (1.6 * fwhm * b) / EDGES;
      best = Math.min(best, boxChi2(samples, first, last, low, high, sigma));
    }
  }
  return best;
}

/** chi2 of a box of free height on a free straight line: linear least squares in three unknowns. */
function boxChi2({ x, y, noise, usable }: FitSamples, first: number, last: number, low: number, high: number, sigma: number): number {
  const middle = 0.5 * (x[first] + x[last]);
  const half = 0.5 * (x[last] - x[first]);
  const m = new Float64Array(9);
  const v = new Float64Array(3);
  let total = 0;
  for (let i = first; i <= last; i++) {
    if (!usable[i]) continue;
    const w = 1 / (noise[i] * noise[i]);
    const row = [0.5 * (erfc((low - x[i]) / (sigma * Math.SQRT2)) - erfc((high - x[i]) / (sigma * Math.SQRT2))), 1, (x[i] - middle) / half];
    for (let a = 0; a < 3; a++) {
      v[a] += w * row[a] * y[i];
      for (let b = 0; b < 3; b++) m[3 * a + b] += w * row[a] * row[b];
    }
    total += w * y[i] * y[i];
  }
  const before = Float64Array.from(v);
  if (!solveLinear(m, v)) return Number.POSITIVE_INFINITY;
  return total - (v[0] * before[0] + v[1] * before[1] + v[2] * before[2]);
}
