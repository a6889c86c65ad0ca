import { faddeeva, type LeastSquaresEnd, levenbergMarquardt, type NormalEquations } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import { addProfiles } from './addProfiles.ts';
import type { ProfileShape } from './feature.ts';
import { fitGroup, type GroupFit } from './fitGroup.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { spanOf } from './groupEquations.ts';
import { ROOT_2PI } from './profile.ts';

/** One feature measured with another shape; errors one sigma, inflated by sqrt(chi2/dof) when that is more than 1. */
export interface ShapeFit {
  readonly as: ProfileShape;
  readonly centroid: number;
  readonly centroidErr: number;
  readonly flux: number;
  readonly fluxErr: number;
  readonly fwhm: number;
  readonly fwhmErr: number;
  readonly chi2: number;
  /** chi2 + parameters times ln(samples): the lower the better (Schwarz 1978). */
  readonly bic: number;
  /** FWHM of the Lorentzian part of a Voigt profile, Angstrom. */
  readonly lorentzFwhm?: number;
  /** The parts of a sum of two Gaussians, the narrower first: flux and FWHM. */
  readonly parts?: readonly { readonly centroid: number; readonly flux: number; readonly fwhm: number }[];
  /** The profile at the samples of the group, flux unit. */
  readonly profile: Float64Array;
}

/** The widths of the two Gaussians at the start, in units of the single one. */
const NARROW_START = 0.7;
const BROAD_START = 2.2;
/** Widths are free within a factor of this many e-folds when shapes are compared. */
const FREE_SPREAD = 1.5;
const MOST_STEPS = 100;
const CLOSE_ENOUGH = 1e-6;

/**
 * One component of a fitted group measured as a Gaussian, a Voigt profile and a sum of two Gaussians; its neighbours stay as they were fitted, the local
 * continuum is fitted anew each time. A shape that does not converge is left out.
 */
export function shapesOf(samples: FitSamples, fit: GroupFit, line: number, width: WidthPrior): ShapeFit[] {
  const window = withoutOthers(samples, fit, line);
  const component = fit.components[line];
  const last = window.x.length - 1;
  const free: WidthPrior = { ...width, spread: FREE_SPREAD };
  const one = fitGroup(window, 0, last, [component], free);
  const parted = [NARROW_START, BROAD_START].map((share) => ({ ...component, flux: component.flux / 2, sigma: component.sigma * share }));
  const two = fitGroup(window, 0, last, parted, free);
  return [
    gaussianShape('gaussian', window, one),
    gaussianShape('two-gaussians', window, two),
    voigtShape(window, one.components[0]),
  ].flatMap((shape) => (shape ? [shape] : []));
}

/** The samples of the group with the other components taken out. */
function withoutOthers(samples: FitSamples, fit: GroupFit, line: number): FitSamples {
  const [from, to] = [fit.first, fit.last + 1];
  const window = {
    x: samples.x.subarray(from, to),
    y: samples.y.slice(from, to),
    noise: samples.noise.subarray(from, to),
    usable: samples.usable.subarray(from, to),
    sampleWidth: samples.sampleWidth.subarray(from, to),
  };
  const others = new Float64Array(window.x.length);
  addProfiles(
    window,
    fit.components.filter((_, k) => k !== line),
    others,
  );
  for (let i = 0; i < others.length; i++) window.y[i] -= others[i];
  return window;
}

const bicOf = (chi2: number, parameters: number, { usable }: FitSamples) => {
  let count = 0;
  for (const u of usable) count += u;
  return chi2 + parameters * Math.log(count);
};

function gaussianShape(as: ProfileShape, window: FitSamples, fit: GroupFit): ShapeFit | undefined {
  if (fit.end.ended !== 'converged') return undefined;
  const count = fit.components.length;
  const lines = (p: Float64Array): Component[] =>
    Array.from({ length: count }, (_, k) => ({ flux: p[3 * k], centre: p[3 * k + 1], sigma: Math.exp(p[3 * k + 2]) }));
  const inflation = Math.sqrt(Math.max(1, fit.chi2 / fit.dof));
  const measured = (value: (p: Float64Array) => number) => withErr(value, fit.parameters, fit.end, inflation);
  const [flux, fluxErr] = measured((p) => lines(p).reduce((sum, c) => sum + c.flux, 0));
  const [centroid, centroidErr] = measured((p) => meanOf(lines(p)));
  const [fwhm, fwhmErr] = measured((p) => widthOfSum(lines(p)));
  const profile = new Float64Array(window.x.length);
  addProfiles(window, fit.components, profile);
  const parts = [...fit.components]
    .sort((a, b) => a.sigma - b.sigma)
    .map((c) => ({ centroid: c.centre, flux: c.flux, fwhm: FWHM_PER_SIGMA * c.sigma }));
  const bic = bicOf(fit.chi2, fit.parameters.length, window);
  return { as, centroid, centroidErr, flux, fluxErr, fwhm, fwhmErr, chi2: fit.chi2, bic, ...(count > 1 ? { parts } : {}), profile };
}

const meanOf = (lines: readonly Component[]) =>
  lines.reduce((sum, c) => sum + c.flux * c.centre, 0) / lines.reduce((sum, c) => sum + c.flux, 0);

/** FWHM of a sum of Gaussians by bisection on either side of its highest point. */
function widthOfSum(lines: readonly Component[]): number {
  const at = (x: number) =>
    lines.reduce((sum, c) => sum + (Math.abs(c.flux) / c.sigma) * Math.exp(-0.5 * ((x - c.centre) / c.sigma) ** 2), 0);
  const widest = Math.max(...lines.map((c) => c.sigma));
  let peak = lines[0].centre;
  for (const c of lines) for (let s = -1; s <= 1; s += 0.02) if (at(c.centre + s * c.sigma) > at(peak)) peak = c.centre + s * c.sigma;
  const half = at(peak) / 2;
  const side = (sign: number) => {
    let inside = 0;
    let outside = 8 * widest;
    for (let k = 0; k < 60; k++) {
      const middle = 0.5 * (inside + outside);
      if (at(peak + sign * middle) > half) inside = middle;
      else outside = middle;
    }
    return inside;
  };
  return side(1) + side(-1);
}

/** A quantity made of fitted parameters, with its error carried through numerically. */
function withErr(value: (p: Float64Array) => number, p: Float64Array, end: LeastSquaresEnd, inflation: number): [number, number] {
  if (end.ended !== 'converged') return [value(p), Number.NaN];
  const n = p.length;
  const gradient = Float64Array.from(p, (_, i) => {
    const step = 0.1 * Math.sqrt(end.covariance[i * n + i]);
    if (!(step > 0)) return 0;
    const up = p.slice();
    const down = p.slice();
    up[i] += step;
    down[i] -= step;
    return (value(up) - value(down)) / (2 * step);
  });
  let variance = 0;
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) variance += gradient[i] * gradient[j] * end.covariance[i * n + j];
  return [value(p), inflation * Math.sqrt(Math.max(0, variance))];
}

/** A Lorentzian part starts at this share of the Gaussian's width. */
const LORENTZ_START = 0.2;
/** Neither part of a Voigt profile is sought below this share of a sample. */
const LEAST_PART = 0.01;
/** Flux, centre, ln sigma, ln gamma, offset, slope. */
const VOIGT_PARAMETERS = 6;
/** Three-point Gauss-Legendre average over a sample. */
const NODES = [-Math.sqrt(0.6), 0, Math.sqrt(0.6)];
const SHARES = [5 / 18, 8 / 18, 5 / 18];

function voigtShape(window: FitSamples, start: Component): ShapeFit | undefined {
  const p = Float64Array.of(start.flux, start.centre, Math.log(start.sigma), Math.log(LORENTZ_START * start.sigma), 0, 0);
  const equations = voigtEquations(window);
  const end = levenbergMarquardt(equations, p, { maxSteps: MOST_STEPS, closeEnough: CLOSE_ENOUGH });
  if (end.ended !== 'converged') return undefined;
  let count = 0;
  for (const u of window.usable) count += u;
  const inflation = Math.sqrt(Math.max(1, end.chi2 / Math.max(1, count - VOIGT_PARAMETERS)));
  const measured = (value: (p: Float64Array) => number) => withErr(value, p, end, inflation);
  const [flux, fluxErr] = measured((q) => q[0]);
  const [centroid, centroidErr] = measured((q) => q[1]);
  const [fwhm, fwhmErr] = measured((q) => voigtFwhm(Math.exp(q[2]), Math.exp(q[3])));
  return {
    as: 'voigt',
    ...{ centroid, centroidErr, flux, fluxErr, fwhm, fwhmErr },
    chi2: end.chi2,
    bic: bicOf(end.chi2, VOIGT_PARAMETERS, window),
    lorentzFwhm: 2 * Math.exp(p[3]),
    profile: equations.profile(p),
  };
}

/** FWHM of a Voigt profile to 0.02 % (Olivero & Longbothum 1977, J. Quant. Spectrosc. Radiat. Transfer 17, 233). */
function voigtFwhm(sigma: number, gamma: number): number {
  const lorentz = 2 * gamma;
  const gauss = FWHM_PER_SIGMA * sigma;
  return 0.5346 * lorentz + Math.sqrt(0.2166 * lorentz * lorentz + gauss * gauss);
}

function voigtEquations({ x, y, noise, usable, sampleWidth }: FitSamples): NormalEquations & { profile(p: Float64Array): Float64Array } {
  const n = x.length;
  const { middle, half } = spanOf(x, 0, n - 1);
  const size = VOIGT_PARAMETERS;
  const rows = new Float64Array(n * size);
  const residual = new Float64Array(n);
  const point = (p: Float64Array, at: number, into: Float64Array) => {
    const sigma = Math.exp(p[2]);
    const gamma = Math.exp(p[3]);
    const scale = 1 / (sigma * Math.SQRT2);
    const [zRe, zIm] = [(at - p[1]) * scale, gamma * scale];
    const [re, im] = faddeeva(zRe, zIm);
    // w' = -2 z w + 2 i / sqrt(pi)
    const slopeRe = -2 * (zRe * re - zIm * im);
    const slopeIm = -2 * (zRe * im + zIm * re) + 2 / Math.sqrt(Math.PI);
    const norm = 1 / (sigma * ROOT_2PI);
    into[0] = norm * re;
    into[1] = -norm * slopeRe * scale;
    into[2] = -norm * (re + zRe * slopeRe - zIm * slopeIm);
    into[3] = -norm * slopeIm * scale * gamma;
  };
  const value = new Float64Array(4);
  const averaged = (p: Float64Array, i: number, into: Float64Array) => {
    into.fill(0);
    for (let k = 0; k < NODES.length; k++) {
      point(p, x[i] + 0.5 * NODES[k] * sampleWidth[i], value);
      for (let m = 0; m < 4; m++) into[m] += SHARES[k] * value[m];
    }
  };
  const here = new Float64Array(4);
  const narrowest = Math.log(LEAST_PART * sampleWidth[n >> 1]);
  const widest = Math.log(2 * half);
  return {
    size,
    evaluate(p) {
      let chi2 = 0;
      for (let i = 0; i < n; i++) {
        if (!usable[i]) continue;
        averaged(p, i, here);
        const u = (x[i] - middle) / half;
        const root = 1 / noise[i];
        residual[i] = root * (y[i] - p[0] * here[0] - p[4] - p[5] * u);
        rows.set([root * here[0], root * p[0] * here[1], root * p[0] * here[2], root * p[0] * here[3], root, root * u], i * size);
        chi2 += residual[i] * residual[i];
      }
      return chi2;
    },
    accumulate(jtj, jtr) {
      for (let i = 0; i < n; i++) {
        if (!usable[i]) continue;
        for (let a = 0; a < size; a++) {
          jtr[a] += rows[i * size + a] * residual[i];
          for (let b = 0; b <= a; b++) jtj[a * size + b] += rows[i * size + a] * rows[i * size + b];
        }
      }
    },
    bound(p) {
      // either part may vanish, none may run away
      for (const i of [2, 3]) p[i] = Math.min(widest, Math.max(narrowest, p[i]));
    },
    profile: (p) => {
      const values = new Float64Array(n);
      for (let i = 0; i < n; i++) {
        averaged(p, i, here);
        values[i] = p[0] * here[0];
      }
      return values;
    },
  };
}
