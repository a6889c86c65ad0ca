import { erfc, solveLinear } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import { addProfiles } from './addProfiles.ts';
import { fitGroup, type GroupFit } from './fitGroup.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { spanOf } from './groupEquations.ts';
import { firstAtLeast } from './profile.ts';

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
const EDGES = 8;
/** Edges are as soft as the instrument, or sharp where the data were joined after it (orders, arms). */
const SOFTNESS = [1, 0.25];
/** Heights of the two edges, offset and slope of the line below. */
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

/** Whether a row of components is better told as a step up and a step down of the continuum. */
export function isPlateau(samples: FitSamples, fit: GroupFit, row: readonly Component[], width: WidthPrior): boolean {
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
  const sigma = width.sigmaAt(row[0].centre);
  const box = Math.min(
    ...SOFTNESS.map((softness) => bestBoxChi2(window, row[0].centre, row[row.length - 1].centre, softness * sigma, fwhm)),
  );
  const asLines = fitGroup(window, 0, n, row, width).chi2;
  return box + BOX_UNKNOWNS * price < asLines + 3 * row.length * price;
}

/** chi2 of the best box: its edges on a grid outside the outermost components, everything else by linear least squares. */
function bestBoxChi2(samples: FitSamples, left: number, right: number, sigma: number, fwhm: number): number {
  const step = (EDGE_REACH_FWHM * fwhm) / EDGES;
  const places = Array.from({ length: EDGES + 1 }, (_, k) => k * step);
  const weighed = weigh(samples);
  const rising = places.map((p) => edgeSums(weighed, edge(samples.x, left - p, sigma)));
  const falling = places.map((p) => edgeSums(weighed, edge(samples.x, right + p, sigma)));
  let best = Number.POSITIVE_INFINITY;
  for (const up of rising) for (const down of falling) best = Math.min(best, boxChi2(weighed, up, down));
  return best;
}

/** A step from 0 to 1 as soft as the instrument, one value a sample. */
function edge(x: Float64Array, at: number, sigma: number): Float64Array {
  const values = new Float64Array(x.length);
  for (let i = 0; i < x.length; i++) {
    const z = (at - x[i]) / (sigma * Math.SQRT2);
    // beyond four sigma and a bit an edge is 0 or 1 to the last digit that matters
    values[i] = z > 3 ? 0 : z < -3 ? 1 : 0.5 * erfc(z);
  }
  return values;
}

/** Weights of the samples and what boxes have in common. */
interface Weighed {
  readonly y: Float64Array;
  /** 1 / variance; 0 where a sample may not be used. */
  readonly w: Float64Array;
  /** -1 ... 1 along the window. */
  readonly u: Float64Array;
  /** Sums of w u^k, k = 0, 1, 2; of w y, w y u; of w y y. */
  readonly sums: readonly number[];
}

function weigh({ x, y, noise, usable }: FitSamples): Weighed {
  const n = x.length;
  const w = new Float64Array(n);
  const u = new Float64Array(n);
  const sums = [0, 0, 0, 0, 0, 0];
  const { middle, half } = spanOf(x, 0, n - 1);
  for (let i = 0; i < n; i++) {
    u[i] = (x[i] - middle) / half;
    if (!usable[i]) continue;
    w[i] = 1 / (noise[i] * noise[i]);
    sums[0] += w[i];
    sums[1] += w[i] * u[i];
    sums[2] += w[i] * u[i] * u[i];
    sums[3] += w[i] * y[i];
    sums[4] += w[i] * y[i] * u[i];
    sums[5] += w[i] * y[i] * y[i];
  }
  return { y, w, u, sums };
}

/** An edge e with the sums of w e, w e u, w e e and w e y. */
interface Edge {
  readonly e: Float64Array;
  readonly sum: number;
  readonly slope: number;
  readonly square: number;
  readonly data: number;
}

function edgeSums({ y, w, u }: Weighed, e: Float64Array): Edge {
  let sum = 0;
  let slope = 0;
  let square = 0;
  let data = 0;
  for (let i = 0; i < e.length; i++) {
    const we = w[i] * e[i];
    if (we === 0) continue;
    sum += we;
    slope += we * u[i];
    square += we * e[i];
    data += we * y[i];
  }
  return { e, sum, slope, square, data };
}

/** chi2 of a step up and a step down, each with its own height, on a straight line: linear least squares. */
function boxChi2({ w, sums }: Weighed, up: Edge, down: Edge): number {
  let cross = 0;
  for (let i = 0; i < w.length; i++) cross += w[i] * up.e[i] * down.e[i];
  const m = Float64Array.from([
    ...[up.square, cross, up.sum, up.slope],
    ...[cross, down.square, down.sum, down.slope],
    ...[up.sum, down.sum, sums[0], sums[1]],
    ...[up.slope, down.slope, sums[1], sums[2]],
  ]);
  const before = [up.data, down.data, sums[3], sums[4]];
  const v = Float64Array.from(before);
  if (!solveLinear(m, v)) return Number.POSITIVE_INFINITY;
  return v.reduce((chi2, value, k) => chi2 - value * before[k], sums[5]);
}
