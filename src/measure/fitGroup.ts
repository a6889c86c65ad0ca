import { type LeastSquaresEnd, levenbergMarquardt, type NormalEquations } from '../numeric/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import { gaussianInto, type ProfileValue } from './profile.ts';

/** The samples of a spectrum as the fits see them; all arrays one value a sample. */
export interface FitSamples {
  /** Angstrom, ascending. */
  readonly x: Float64Array;
  /** Flux minus continuum. */
  readonly y: Float64Array;
  readonly noise: Float64Array;
  /** 1 = may be used; a spike found on the way is set to 0. */
  readonly usable: Uint8Array;
  /** Angstrom. */
  readonly sampleWidth: Float64Array;
}

/** What is expected of a width before a line is fitted. */
export interface WidthPrior {
  /** Gaussian sigma, Angstrom, at a wavelength. */
  readonly sigmaAt: (wavelength: number) => number;
  /** One sigma of ln(sigma) about it. */
  readonly spread: number;
}

/** Start of one component. */
export interface Component {
  readonly flux: number;
  readonly centre: number;
  /** Gaussian sigma, Angstrom. */
  readonly sigma: number;
}

/** A finished fit: parameters three a component (flux, centre, ln sigma), then offset and slope of the local continuum. */
export interface GroupFit {
  readonly parameters: Float64Array;
  readonly components: readonly Component[];
  readonly end: LeastSquaresEnd;
  /** chi2 of the samples alone, without the priors. */
  readonly chi2: number;
  readonly dof: number;
  readonly first: number;
  readonly last: number;
}

/** Lines narrower than this (FWHM in samples) are fitted with the profile averaged over each sample. */
const UNDERSAMPLED_FWHM = 4;
/** A centre may move this far from its start, in expected sigma. */
const CENTRE_REACH = 2.5;
/** ln(sigma) may leave the expected one by this much: a factor 12 for lines far wider than the instrument. */
const WIDTH_REACH = 2.5;
/** Prior of the local continuum about the global one, in units of the noise: weak, but it keeps crowded windows determined. */
const OFFSET_SIGMA = 2;

/**
 * Fits all components of a group at once, with a local linear correction of the continuum.
 *
 * @param first,last samples of the window, both included
 */
export function fitGroup(
  samples: FitSamples,
  first: number,
  last: number,
  starts: readonly Component[],
  width: WidthPrior,
  maxSteps = 60,
): GroupFit {
  const p = new Float64Array(3 * starts.length + 2);
  starts.forEach((start, k) => {
    p[3 * k] = start.flux;
    p[3 * k + 1] = start.centre;
    p[3 * k + 2] = Math.log(start.sigma);
  });
  const problem = groupEquations(samples, first, last, starts, width);
  const end = levenbergMarquardt(problem, p, maxSteps);
  const { chi2, count } = problem.ofSamples(p);
  const components = starts.map((_, k) => ({ flux: p[3 * k], centre: p[3 * k + 1], sigma: Math.exp(p[3 * k + 2]) }));
  return { parameters: p, components, end, chi2, dof: Math.max(1, count - p.length), first, last };
}

function groupEquations(samples: FitSamples, first: number, last: number, starts: readonly Component[], width: WidthPrior) {
  const { x, y, noise, usable, sampleWidth } = samples;
  const lines = starts.length;
  const size = 3 * lines + 2;
  const middle = 0.5 * (x[first] + x[last]);
  const half = Math.max(1e-9, 0.5 * (x[last] - x[first]));
  const noiseLevel = noise[(first + last) >> 1];
  const offsetWeight = 1 / (OFFSET_SIGMA * noiseLevel) ** 2;
  const expected = starts.map((start) => Math.log(width.sigmaAt(start.centre)));
  const widthWeight = 1 / width.spread ** 2;
  const profile: ProfileValue = { value: 0, byCentre: 0, bySigma: 0 };
  const row = new Float64Array(size);
  const touched = new Int32Array(size);

  const pass = (p: Float64Array, jtj: Float64Array | undefined, jtr: Float64Array | undefined) => {
    let chi2 = 0;
    let count = 0;
    for (let i = first; i <= last; i++) {
      if (!usable[i]) continue;
      count++;
      const u = (x[i] - middle) / half;
      let model = p[size - 2] + p[size - 1] * u;
      let nTouched = 0;
      for (let k = 0; k < lines; k++) {
        const sigma = Math.exp(p[3 * k + 2]);
        const under = sigma * FWHM_PER_SIGMA < UNDERSAMPLED_FWHM * sampleWidth[i];
        gaussianInto(profile, x[i], under ? sampleWidth[i] : 0, p[3 * k + 1], sigma);
        if (profile.value === 0) continue;
        const flux = p[3 * k];
        model += flux * profile.value;
        if (jtj) {
          row[3 * k] = profile.value;
          row[3 * k + 1] = flux * profile.byCentre;
          row[3 * k + 2] = flux * profile.bySigma * sigma;
          touched[nTouched++] = 3 * k;
          touched[nTouched++] = 3 * k + 1;
          touched[nTouched++] = 3 * k + 2;
        }
      }
      const weight = 1 / (noise[i] * noise[i]);
      const residual = y[i] - model;
      chi2 += weight * residual * residual;
      if (jtj && jtr) {
        row[size - 2] = 1;
        row[size - 1] = u;
        touched[nTouched++] = size - 2;
        touched[nTouched++] = size - 1;
        for (let a = 0; a < nTouched; a++) {
          const ia = touched[a];
          const wa = weight * row[ia];
          jtr[ia] += wa * residual;
          for (let b = 0; b <= a; b++) jtj[ia * size + touched[b]] += wa * row[touched[b]];
        }
      }
    }
    return { chi2, count };
  };

  const priors = (p: Float64Array, jtj?: Float64Array, jtr?: Float64Array): number => {
    let chi2 = offsetWeight * (p[size - 2] ** 2 + p[size - 1] ** 2);
    if (jtj && jtr) {
      for (const i of [size - 2, size - 1]) {
        jtj[i * size + i] += offsetWeight;
        jtr[i] -= offsetWeight * p[i];
      }
    }
    for (let k = 0; k < lines; k++) {
      const off = expected[k] - p[3 * k + 2];
      chi2 += widthWeight * off * off;
      if (jtj && jtr) {
        jtj[(3 * k + 2) * size + 3 * k + 2] += widthWeight;
        jtr[3 * k + 2] += widthWeight * off;
      }
    }
    return chi2;
  };

  const equations: NormalEquations = {
    size,
    accumulate(p, jtj, jtr) {
      return pass(p, jtj, jtr).chi2 + priors(p, jtj, jtr);
    },
    chi2: (p) => pass(p, undefined, undefined).chi2 + priors(p),
    bound(p) {
      let moved = false;
      for (let k = 0; k < lines; k++) {
        const sign = Math.sign(starts[k].flux) || 1;
        const reach = CENTRE_REACH * Math.exp(expected[k]);
        const flux = sign * Math.max(0, sign * p[3 * k]);
        const centre = Math.min(starts[k].centre + reach, Math.max(starts[k].centre - reach, p[3 * k + 1]));
        const logSigma = Math.min(expected[k] + WIDTH_REACH, Math.max(expected[k] - WIDTH_REACH, p[3 * k + 2]));
        moved ||= flux !== p[3 * k] || centre !== p[3 * k + 1] || logSigma !== p[3 * k + 2];
        p[3 * k] = flux;
        p[3 * k + 1] = centre;
        p[3 * k + 2] = logSigma;
      }
      return moved;
    },
  };
  return { ...equations, ofSamples: (p: Float64Array) => pass(p, undefined, undefined) };
}

/** Adds the fit's profiles (not its continuum) to `into`, one value a sample of the whole spectrum. */
export function addProfiles(
  samples: FitSamples,
  components: readonly Component[],
  into: Float64Array,
  continuumOffset?: { fit: GroupFit; into: Float64Array },
): void {
  const { x, sampleWidth } = samples;
  const profile: ProfileValue = { value: 0, byCentre: 0, bySigma: 0 };
  for (const { flux, centre, sigma } of components) {
    const from = firstAtLeast(x, centre - 7 * sigma);
    for (let i = from; i < x.length && x[i] <= centre + 7 * sigma; i++) {
      const under = sigma * FWHM_PER_SIGMA < UNDERSAMPLED_FWHM * sampleWidth[i];
      gaussianInto(profile, x[i], under ? sampleWidth[i] : 0, centre, sigma);
      into[i] += flux * profile.value;
    }
  }
  if (!continuumOffset) return;
  const { first, last, parameters } = continuumOffset.fit;
  const middle = 0.5 * (x[first] + x[last]);
  const half = Math.max(1e-9, 0.5 * (x[last] - x[first]));
  for (let i = first; i <= last; i++) {
    continuumOffset.into[i] += parameters[parameters.length - 2] + (parameters[parameters.length - 1] * (x[i] - middle)) / half;
  }
}

/** Index of the first value >= `at` in an ascending array; its length when there is none. */
export function firstAtLeast(x: Float64Array, at: number): number {
  let low = 0;
  let high = x.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (x[mid] < at) low = mid + 1;
    else high = mid;
  }
  return low;
}
