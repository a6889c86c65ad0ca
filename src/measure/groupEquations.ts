import { erfc, expOfNegative, type NormalEquations } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { Component, FitSamples, Stretch, WidthPrior } from './fitSamples.ts';
import { firstAtLeast, PROFILE_REACH, ROOT_2PI, UNDERSAMPLED_FWHM } from './profile.ts';

/** A centre may move this far from its start, in expected sigma. */
const CENTRE_REACH = 2.5;
/** ln(sigma) may leave the expected one by this much: a factor 12 for lines far wider than the instrument. */
const WIDTH_REACH = 2.5;
/** This near to its bound a parameter rests on it. */
const AT_BOUND = 1 - 1e-9;
/** ln(width) of a broad line is known from its start to this only. */
const BROAD_SPREAD = 0.7;
/** Prior of the local continuum about the global one, in units of the noise: weak, but it keeps crowded windows determined. */
const OFFSET_SIGMA = 2;

/** Equations whose chi2 of the samples alone, without the priors, can be asked for. */
export interface GroupEquations extends NormalEquations {
  /** At the point last given to `accumulate`. */
  readonly chi2OfSamples: () => number;
  /** Samples that count. */
  readonly count: number;
  /** Which parameter of line `k` rests on its bound at `p`, if one does. */
  readonly atBound: (p: Float64Array, k: number) => Component['atBound'];
}

/** Working arrays, grown as needed and used anew by every fit, since fits never run inside one another: the Jacobian, three columns a line ... */
let columns = new Float64Array(0);
/** ... and what belongs to the samples of the window. */
let sampleRoom = roomOf(0);

function roomOf(length: number) {
  return { residual: new Float64Array(length), y: new Float64Array(length), root: new Float64Array(length), u: new Float64Array(length) };
}

/**
 * The least-squares equations of Gaussian lines on straight pieces of continuum: parameters three a line (flux, centre, ln sigma), then offset and slope a stretch.
 *
 * Each line is computed over its own samples only, and the profiles of the point last evaluated are kept for the Jacobian.
 *
 * @param starts    their `flux` gives the sign that each line keeps, their centre what it may not leave by 2.5 sigma
 * @param stretches of samples, apart from each other, ascending
 */
export function groupEquations(
  samples: FitSamples,
  stretches: readonly Stretch[],
  starts: readonly Component[],
  width: WidthPrior,
): GroupEquations {
  const lines = starts.length;
  const size = 3 * lines + 2 * stretches.length;
  const window = gather(samples, stretches);
  const { x, y, root, u, from, length } = window;
  const home = Int32Array.from(starts, (start) => homeOf(samples, stretches, start.centre));
  const expected = Float64Array.from(starts, (start) => Math.log(start.isBroad ? start.sigma : width.sigmaAt(start.centre)));
  const widthWeight = Float64Array.from(starts, (start) => 1 / (start.isBroad ? BROAD_SPREAD : width.spread) ** 2);
  const low = new Int32Array(lines);
  const high = new Int32Array(lines);
  const { residual } = sampleRoom;
  const point = new Float64Array(size);
  if (columns.length < 3 * lines * length) columns = new Float64Array(3 * lines * length);
  const shapes = columns;
  let chi2 = 0;
  let accepted = 0;

  function addLine(k: number): void {
    const flux = point[3 * k];
    const centre = point[3 * k + 1];
    const sigma = Math.exp(point[3 * k + 2]);
    const begin = from[home[k]];
    const end = from[home[k] + 1];
    const reach = PROFILE_REACH * sigma;
    let i = firstAtLeast(x, centre - reach, begin, end);
    const last = firstAtLeast(x, centre + reach, i, end) - 1;
    low[k] = i;
    high[k] = last;
    const atValue = 3 * k * length;
    const atCentre = atValue + length;
    const atWidth = atCentre + length;
    const over = 1 / sigma;
    if (sigma * FWHM_PER_SIGMA < UNDERSAMPLED_FWHM * window.step[Math.min(end - 1, Math.max(begin, (i + last) >> 1))]) {
      addAveraged(k, i, last, flux, centre, sigma);
      return;
    }
    const norm = over / ROOT_2PI;
    const fluxOver = flux * over;
    for (; i <= last; i++) {
      const z = (x[i] - centre) * over;
      const value = root[i] * norm * expOfNegative(0.5 * z * z);
      shapes[atValue + i] = value;
      const slope = fluxOver * value * z;
      shapes[atCentre + i] = slope;
      shapes[atWidth + i] = flux * value * (z * z - 1);
      residual[i] -= flux * value;
    }
  }

  /** The profile averaged over each sample, from its values at the samples' edges. */
  function addAveraged(k: number, first: number, last: number, flux: number, centre: number, sigma: number): void {
    const atValue = 3 * k * length;
    const { step } = window;
    let edge = Number.NaN;
    let below = 0;
    let density = 0;
    for (let i = first; i <= last; i++) {
      const half = 0.5 * step[i];
      const left = (x[i] - half - centre) / sigma;
      // neighbours share an edge on a regular axis
      if (!(Math.abs(left - edge) < 1e-9)) {
        below = 0.5 * erfc(left / Math.SQRT2);
        density = expOfNegative(0.5 * left * left) / ROOT_2PI;
      }
      const right = (x[i] + half - centre) / sigma;
      const beyond = 0.5 * erfc(right / Math.SQRT2);
      const densityRight = expOfNegative(0.5 * right * right) / ROOT_2PI;
      const scale = root[i] / step[i];
      const value = scale * (below - beyond);
      shapes[atValue + i] = value;
      shapes[atValue + length + i] = (flux * scale * (density - densityRight)) / sigma;
      shapes[atValue + 2 * length + i] = flux * scale * (left * density - right * densityRight);
      residual[i] -= flux * value;
      edge = right;
      below = beyond;
      density = densityRight;
    }
  }

  return {
    size,
    count: window.count,
    chi2OfSamples: () => accepted,
    evaluate(p) {
      point.set(p);
      for (let s = 0; s < stretches.length; s++) {
        const offset = p[3 * lines + 2 * s];
        const slope = p[3 * lines + 2 * s + 1];
        for (let i = from[s]; i < from[s + 1]; i++) residual[i] = root[i] * (y[i] - offset - slope * u[i]);
      }
      for (let k = 0; k < lines; k++) addLine(k);
      // summed in a variable of its own: one that closures share is boxed anew at every step
      let sum = 0;
      for (let i = 0; i < length; i++) sum += residual[i] * residual[i];
      chi2 = sum;
      let priors = 0;
      for (let s = 0; s < stretches.length; s++)
        priors += window.offsetWeight[s] * (p[3 * lines + 2 * s] ** 2 + p[3 * lines + 2 * s + 1] ** 2);
      for (let k = 0; k < lines; k++) priors += widthWeight[k] * (expected[k] - p[3 * k + 2]) ** 2;
      return chi2 + priors;
    },
    accumulate(jtj, jtr) {
      accepted = chi2;
      for (let k = 0; k < lines; k++) {
        lineSums(jtj, jtr, k);
        for (let l = 0; l < k; l++) if (home[l] === home[k]) pairSums(jtj, k, l);
        const off = expected[k] - point[3 * k + 2];
        jtj[(3 * k + 2) * size + 3 * k + 2] += widthWeight[k];
        jtr[3 * k + 2] += widthWeight[k] * off;
      }
      for (let s = 0; s < stretches.length; s++) {
        const a = 3 * lines + 2 * s;
        const weight = window.offsetWeight[s];
        let r0 = -weight * point[a];
        let r1 = -weight * point[a + 1];
        for (let i = from[s]; i < from[s + 1]; i++) {
          const wr = root[i] * residual[i];
          r0 += wr;
          r1 += wr * u[i];
        }
        jtr[a] += r0;
        jtr[a + 1] += r1;
        jtj[a * size + a] += window.sums[3 * s] + weight;
        jtj[(a + 1) * size + a] += window.sums[3 * s + 1];
        jtj[(a + 1) * size + a + 1] += window.sums[3 * s + 2] + weight;
      }
    },
    atBound(p, k) {
      if (p[3 * k] === 0) return 'flux';
      const reach = CENTRE_REACH * Math.exp(expected[k]);
      if (Math.abs(p[3 * k + 1] - starts[k].centre) >= AT_BOUND * reach) return 'centroid';
      return Math.abs(p[3 * k + 2] - expected[k]) >= AT_BOUND * WIDTH_REACH ? 'width' : undefined;
    },
    bound(p) {
      for (let k = 0; k < lines; k++) {
        const sign = Math.sign(starts[k].flux) || 1;
        const reach = CENTRE_REACH * Math.exp(expected[k]);
        p[3 * k] = sign * Math.max(0, sign * p[3 * k]);
        p[3 * k + 1] = Math.min(starts[k].centre + reach, Math.max(starts[k].centre - reach, p[3 * k + 1]));
        p[3 * k + 2] = Math.min(expected[k] + WIDTH_REACH, Math.max(expected[k] - WIDTH_REACH, p[3 * k + 2]));
      }
    },
  };

  function lineSums(jtj: Float64Array, jtr: Float64Array, k: number): void {
    const a = 3 * k * length;
    const b = a + length;
    const c = b + length;
    let aa = 0;
    let ab = 0;
    let bb = 0;
    let ac = 0;
    let bc = 0;
    let cc = 0;
    let ar = 0;
    let br = 0;
    let cr = 0;
    let a0 = 0;
    let b0 = 0;
    let c0 = 0;
    let a1 = 0;
    let b1 = 0;
    let c1 = 0;
    for (let i = low[k]; i <= high[k]; i++) {
      const va = shapes[a + i];
      const vb = shapes[b + i];
      const vc = shapes[c + i];
      const r = residual[i];
      const w = root[i];
      const wu = w * u[i];
      aa += va * va;
      ab += va * vb;
      bb += vb * vb;
      ac += va * vc;
      bc += vb * vc;
      cc += vc * vc;
      ar += va * r;
      br += vb * r;
      cr += vc * r;
      a0 += va * w;
      b0 += vb * w;
      c0 += vc * w;
      a1 += va * wu;
      b1 += vb * wu;
      c1 += vc * wu;
    }
    const row = 3 * k * size + 3 * k;
    jtj[row] += aa;
    jtj[row + size] += ab;
    jtj[row + size + 1] += bb;
    jtj[row + 2 * size] += ac;
    jtj[row + 2 * size + 1] += bc;
    jtj[row + 2 * size + 2] += cc;
    jtr[3 * k] += ar;
    jtr[3 * k + 1] += br;
    jtr[3 * k + 2] += cr;
    const offset = (3 * lines + 2 * home[k]) * size + 3 * k;
    jtj[offset] += a0;
    jtj[offset + 1] += b0;
    jtj[offset + 2] += c0;
    jtj[offset + size] += a1;
    jtj[offset + size + 1] += b1;
    jtj[offset + size + 2] += c1;
  }

  function pairSums(jtj: Float64Array, k: number, l: number): void {
    const first = Math.max(low[k], low[l]);
    const last = Math.min(high[k], high[l]);
    if (first > last) return;
    const a = 3 * k * length;
    const d = 3 * l * length;
    let s00 = 0;
    let s01 = 0;
    let s02 = 0;
    let s10 = 0;
    let s11 = 0;
    let s12 = 0;
    let s20 = 0;
    let s21 = 0;
    let s22 = 0;
    for (let i = first; i <= last; i++) {
      const k0 = shapes[a + i];
      const k1 = shapes[a + length + i];
      const k2 = shapes[a + 2 * length + i];
      const l0 = shapes[d + i];
      const l1 = shapes[d + length + i];
      const l2 = shapes[d + 2 * length + i];
      s00 += k0 * l0;
      s01 += k0 * l1;
      s02 += k0 * l2;
      s10 += k1 * l0;
      s11 += k1 * l1;
      s12 += k1 * l2;
      s20 += k2 * l0;
      s21 += k2 * l1;
      s22 += k2 * l2;
    }
    const at = 3 * k * size + 3 * l;
    jtj[at] += s00;
    jtj[at + 1] += s01;
    jtj[at + 2] += s02;
    jtj[at + size] += s10;
    jtj[at + size + 1] += s11;
    jtj[at + size + 2] += s12;
    jtj[at + 2 * size] += s20;
    jtj[at + 2 * size + 1] += s21;
    jtj[at + 2 * size + 2] += s22;
  }
}

/** The samples of the stretches one after the other. */
interface Gathered {
  readonly length: number;
  readonly count: number;
  /** Stretch s is samples [from[s], from[s + 1]). */
  readonly from: Int32Array;
  readonly x: Float64Array;
  readonly y: Float64Array;
  /** 1 / noise; 0 where a sample may not be used. */
  readonly root: Float64Array;
  /** -1 ... 1 along its stretch. */
  readonly u: Float64Array;
  readonly step: Float64Array;
  /** Sums of w, w u, w u u, three a stretch. */
  readonly sums: Float64Array;
  readonly offsetWeight: Float64Array;
}

function gather(samples: FitSamples, stretches: readonly Stretch[]): Gathered {
  const from = new Int32Array(stretches.length + 1);
  stretches.forEach(({ first, last }, s) => {
    from[s + 1] = from[s] + last - first + 1;
  });
  const length = from[stretches.length];
  const single = stretches.length === 1;
  if (sampleRoom.y.length < length) sampleRoom = roomOf(2 * length);
  const gathered = {
    length,
    from,
    x: single ? samples.x.subarray(stretches[0].first, stretches[0].last + 1) : new Float64Array(length),
    step: single ? samples.sampleWidth.subarray(stretches[0].first, stretches[0].last + 1) : new Float64Array(length),
    y: sampleRoom.y,
    root: sampleRoom.root,
    u: sampleRoom.u,
    sums: new Float64Array(3 * stretches.length),
    offsetWeight: new Float64Array(stretches.length),
  };
  let count = 0;
  stretches.forEach(({ first, last }, s) => {
    const at = from[s];
    if (!single) {
      gathered.x.set(samples.x.subarray(first, last + 1), at);
      gathered.step.set(samples.sampleWidth.subarray(first, last + 1), at);
    }
    const { middle, half } = spanOf(samples.x, first, last);
    for (let i = first; i <= last; i++) {
      const k = at + i - first;
      const u = (samples.x[i] - middle) / half;
      gathered.u[k] = u;
      gathered.y[k] = 0;
      gathered.root[k] = 0;
      // the others may hold no number at all: they stay 0, with no weight
      if (!samples.usable[i]) continue;
      count++;
      gathered.y[k] = samples.y[i];
      const root = 1 / samples.noise[i];
      gathered.root[k] = root;
      gathered.sums[3 * s] += root * root;
      gathered.sums[3 * s + 1] += root * root * u;
      gathered.sums[3 * s + 2] += root * root * u * u;
    }
    gathered.offsetWeight[s] = 1 / (OFFSET_SIGMA * samples.noise[(first + last) >> 1]) ** 2;
  });
  return { ...gathered, count };
}

/** Middle and half length of a stretch, Angstrom: the slope of its continuum is per half length. */
export function spanOf(x: Float64Array, first: number, last: number): { middle: number; half: number } {
  return { middle: 0.5 * (x[first] + x[last]), half: Math.max(1e-9, 0.5 * (x[last] - x[first])) };
}

/** The stretch a wavelength lies in, or the nearest one. */
function homeOf(samples: FitSamples, stretches: readonly Stretch[], centre: number): number {
  let best = 0;
  let nearest = Number.POSITIVE_INFINITY;
  stretches.forEach(({ first, last }, s) => {
    const away = Math.max(samples.x[first] - centre, centre - samples.x[last], 0);
    if (away < nearest) {
      nearest = away;
      best = s;
    }
  });
  return best;
}
