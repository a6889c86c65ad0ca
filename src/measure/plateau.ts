import { erfc, solveLinear } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { FitSamples, GroupFit, WidthPrior } from './fitGroup.ts';

/** Components of a plateau differ by no more than this in flux ... */
const ALIKE = 3;
/** ... and stand no further apart than this, in FWHM. */
const TOUCHING_FWHM = 2.6;
/** A narrower row, outermost centre to outermost, is a blend: a box looks like it. */
const NARROWEST_FWHM = 1.3;
/** Edges are sought this far beyond the outermost components, on a grid of so many places. */
const EDGE_REACH_FWHM = 1.6;
const EDGES = 16;
/** Height and slope of the box, offset and slope of the line below. */
const BOX_UNKNOWNS = 4;

/**
 * Whether a row of like components is really a step up and down of the continuum (the foot of a series limit, an order's end): a box with edges as soft as the
 * instrument explains the samples at least as well with four numbers as the lines do with three each (Schwarz 1978).
 */
export function isPlateau(samples: FitSamples, fit: GroupFit, width: WidthPrior): boolean {
  const lines = [...fit.components].sort((a, b) => a.centre - b.centre);
  if (lines.length < 2 || lines.some((l) => l.flux <= 0)) return false;
  const fluxes = lines.map((l) => l.flux);
  if (Math.max(...fluxes) > ALIKE * Math.min(...fluxes)) return false;
  const fwhm = FWHM_PER_SIGMA * width.sigmaAt(lines[0].centre);
  const gaps = lines.slice(1).map((line, k) => (line.centre - lines[k].centre) / fwhm);
  if (Math.max(...gaps) > TOUCHING_FWHM || gaps.reduce((a, b) => a + b, 0) < NARROWEST_FWHM) return false;
  const price = Math.log(fit.last - fit.first + 1);
  const box = bestBoxChi2(samples, fit, lines[0].centre, lines[lines.length - 1].centre, width.sigmaAt(lines[0].centre), fwhm);
  return box + BOX_UNKNOWNS * price < fit.chi2 + 3 * lines.length * price;
}

/** chi2 of the best box: its edges on a grid outside the outermost components, everything else by linear least squares. */
function bestBoxChi2(samples: FitSamples, { first, last }: GroupFit, left: number, right: number, sigma: number, fwhm: number): number {
  const step = (EDGE_REACH_FWHM * fwhm) / EDGES;
  const places = Array.from({ length: EDGES + 1 }, (_, k) => k * step);
  const rising = places.map((p) => edge(samples.x, first, last, left - p, sigma));
  const falling = places.map((p) => edge(samples.x, first, last, right + p, sigma));
  let best = Number.POSITIVE_INFINITY;
  for (const up of rising) for (const down of falling) best = Math.min(best, boxChi2(samples, first, last, up, down));
  return best;
}

/** A step from 0 to 1 as soft as the instrument, one value a sample of the window. */
const edge = (x: Float64Array, first: number, last: number, at: number, sigma: number) =>
  x.subarray(first, last + 1).map((w) => 0.5 * erfc((at - w) / (sigma * Math.SQRT2)));

/** chi2 of a box with a sloping top on a straight line: linear least squares in four unknowns. */
function boxChi2({ x, y, noise, usable }: FitSamples, first: number, last: number, up: Float64Array, down: Float64Array): number {
  const middle = 0.5 * (x[first] + x[last]);
  const half = 0.5 * (x[last] - x[first]);
  const m = new Float64Array(BOX_UNKNOWNS * BOX_UNKNOWNS);
  const v = new Float64Array(BOX_UNKNOWNS);
  const row = new Float64Array(BOX_UNKNOWNS);
  let total = 0;
  for (let i = first; i <= last; i++) {
    if (!usable[i]) continue;
    const w = 1 / (noise[i] * noise[i]);
    row[0] = up[i - first] - down[i - first];
    row[1] = 1;
    row[2] = (x[i] - middle) / half;
    row[3] = row[0] * row[2];
    for (let a = 0; a < BOX_UNKNOWNS; a++) {
      v[a] += w * row[a] * y[i];
      for (let b = 0; b < BOX_UNKNOWNS; b++) m[BOX_UNKNOWNS * a + b] += w * row[a] * row[b];
    }
    total += w * y[i] * y[i];
  }
  const before = Float64Array.from(v);
  if (!solveLinear(m, v)) return Number.POSITIVE_INFINITY;
  return v.reduce((chi2, value, k) => chi2 - value * before[k], total);
}
