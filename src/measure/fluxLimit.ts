import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { FittedSpectrum } from './fittedSpectrum.ts';
import { firstAtLeast, ROOT_2PI } from './profile.ts';

/** The largest flux that a line could have at a wavelength without being seen. */
export interface FluxLimit {
  /** Angstrom, medium of the spectrum. */
  readonly at: number;
  /** Flux unit times Angstrom. */
  readonly limit: number;
  /** FWHM that the line is taken to have, Angstrom. */
  readonly fwhm: number;
  /** Flux of a line of that width fitted there to what the model leaves over, with its error: a limit holds only where this is not many errors. */
  readonly flux: number;
  readonly fluxErr: number;
}

const LIMIT_SIGMA = 3;
const REACH_SIGMA = 5;

/**
 * Three-sigma upper limit of an unseen line of the usual width at a wavelength: the error of its flux from the noise under the profile and from the continuum.
 *
 * @param model n, continuum plus all profiles of the measurement
 * @param fwhm  of the line, Angstrom; absent = the usual one
 * @returns undefined outside the spectrum, or where less than half of the profile is usable
 */
export function fluxLimit(fitted: FittedSpectrum, model: Float64Array, at: number, fwhm?: number): FluxLimit | undefined {
  const { samples, continuum, width } = fitted;
  const { x, y, noise, usable, sampleWidth } = samples;
  const sigma = fwhm === undefined ? width.sigmaAt(at) : fwhm / FWHM_PER_SIGMA;
  if (!(at > x[0]) || !(at < x[x.length - 1])) return undefined;
  let information = 0;
  let signal = 0;
  let seen = 0;
  let whole = 0;
  const to = at + REACH_SIGMA * sigma;
  for (let i = firstAtLeast(x, at - REACH_SIGMA * sigma); i < x.length && x[i] <= to; i++) {
    const profile = Math.exp(-0.5 * ((x[i] - at) / sigma) ** 2) / (sigma * ROOT_2PI);
    whole += profile * sampleWidth[i];
    if (!usable[i]) continue;
    seen += profile * sampleWidth[i];
    information += (profile / noise[i]) ** 2;
    signal += (profile * (y[i] + continuum.level[i] - model[i])) / noise[i] ** 2;
  }
  if (!(information > 0) || seen < 0.5 * whole) return undefined;
  const middle = Math.min(x.length - 1, firstAtLeast(x, at));
  const fluxErr = Math.hypot(1 / Math.sqrt(information), continuum.levelErr[middle] * sigma * ROOT_2PI * Math.SQRT2);
  return { at, limit: LIMIT_SIGMA * fluxErr, fwhm: FWHM_PER_SIGMA * sigma, flux: signal / information, fluxErr };
}
