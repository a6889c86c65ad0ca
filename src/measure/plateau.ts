import { erfc, solveLinear } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import { addProfiles, type Component, type FitSamples, firstAtLeast, fitGroup, type GroupFit, type WidthPrior } from './fitGroup.ts';

/** Components of a plateau differ by no more than this in flux ... */
const ALIKE = 3;
/** ... and stand no further apart than this, in FWHM. */
const TOUCHING_FWHM = 2.6;
/** A narrower row, outermost centre to outermost, is a blend: a box looks like it. */
const NARROWEST_FWHM = 1.3;
/** A row is judged with this much of its surroundings, in FWHM. */
const SURROUNDINGS_FWHM = 4;
/** Edges are sought this far beyond the outermost components, on a grid of so many places. */
const EDGE_REACH_FWHM = 1.6;
const EDGES = 16;
/** Height and slope of the box, offset and slope of the line below. */
const BOX_UNKNOWNS = 4;

/**
 * The fit without rows of like components that are really a step up and down of the continuum (the foot of a series limit, an order's end): a box with edges
 * as soft as the instrument explains the samples at least as well with four numbers as the lines of the row do with three each (Schwarz 1978).
 * The other components stay as they are.
 */
export function withoutPlateaus(samples: FitSamples, fit: GroupFit, width: WidthPrior): GroupFit {
  const lines = [...fit.components].sort((a, b) => a.centre - b.centre);
  const gone = new Set(
    rowsOf(lines, width)
      .filter((row) => isPlateau(samples, fit, row, width))
      .flat(),
  );
  if (gone.size === 0) return fit;
  // a fit keeps three parameters a component, in the order of its components
  const kept = fit.components.map((_, k) => k).filter((k) => !gone.has(fit.components[k]));
  const parameters = Float64Array.from([
    ...kept.flatMap((k) => [...fit.parameters.subarray(3 * k, 3 * k + 3)]),
    ...fit.parameters.subarray(fit.parameters.length - 2),
  ]);
  return { ...fit, components: kept.map((k) => fit.components[k]), parameters, end: keepRows(fit.end, kept, fit.components.length) };
}

/** The covariance of the components that stay. */
function keepRows(end: GroupFit['end'], kept: readonly number[], count: number): GroupFit['end'] {
  if (end.ended !== 'converged') return end;
  const rows = [...kept.flatMap((k) => [3 * k, 3 * k + 1, 3 * k + 2]), 3 * count, 3 * count + 1];
  const size = 3 * count + 2;
  return { ...end, covariance: Float64Array.from(rows.flatMap((i) => rows.map((j) => end.covariance[i * size + j]))) };
}

/** Runs of neighbours alike in flux and nowhere further apart than touching, at least two and wide enough. */
function rowsOf(lines: readonly Component[], width: WidthPrior): Component[][] {
  const rows: Component[][] = [];
  let row: Component[] = [];
  const fwhm = (line: Component) => FWHM_PER_SIGMA * width.sigmaAt(line.centre);
  for (const line of lines) {
    const last = row.at(-1);
    const fluxes = [...row.map((l) => l.flux), line.flux];
    const joins =
      last !== undefined && line.centre - last.centre <= TOUCHING_FWHM * fwhm(line) && Math.max(...fluxes) <= ALIKE * Math.min(...fluxes);
    if (joins && line.flux > 0) row.push(line);
    else {
      rows.push(row);
      row = line.flux > 0 ? [line] : [];
    }
  }
  rows.push(row);
  return rows.filter((r) => r.length > 1 && r[r.length - 1].centre - r[0].centre >= NARROWEST_FWHM * fwhm(r[0]));
}

function isPlateau(samples: FitSamples, fit: GroupFit, row: readonly Component[], width: WidthPrior): boolean {
  const fwhm = FWHM_PER_SIGMA * width.sigmaAt(row[0].centre);
  const first = Math.max(fit.first, firstAtLeast(samples.x, row[0].centre - SURROUNDINGS_FWHM * fwhm));
  const last = Math.min(fit.last, firstAtLeast(samples.x, row[row.length - 1].centre + SURROUNDINGS_FWHM * fwhm));
  const others = new Float64Array(last - first + 1);
  const window: FitSamples = {
    x: samples.x.subarray(first, last + 1),
    y: samples.y.slice(first, last + 1),
    noise: samples.noise.subarray(first, last + 1),
    usable: samples.usable.subarray(first, last + 1),
    sampleWidth: samples.sampleWidth.subarray(first, last + 1),
  };
  addProfiles(
    window,
    fit.components.filter((c) => !row.includes(c)),
    others,
  );
  for (let i = 0; i < others.length; i++) window.y[i] -= others[i];
  const price = Math.log(others.length);
  const n = others.length - 1;
  const box = bestBoxChi2(window, { first: 0, last: n }, row[0].centre, row[row.length - 1].centre, width.sigmaAt(row[0].centre), fwhm);
  const asLines = fitGroup(window, 0, n, row, width).chi2;
  return box + BOX_UNKNOWNS * price < asLines + 3 * row.length * price;
}

/** chi2 of the best box: its edges on a grid outside the outermost components, everything else by linear least squares. */
function bestBoxChi2(
  samples: FitSamples,
  { first, last }: { first: number; last: number },
  left: number,
  right: number,
  sigma: number,
  fwhm: number,
): number {
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
