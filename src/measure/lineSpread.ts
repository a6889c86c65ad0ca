import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { Measurement, WidthLaw } from './feature.ts';
import type { FitSamples, WidthPrior } from './fitSamples.ts';

/** Line width as the fits expect it, with the scatter of ln(width) seen on isolated lines. */
export interface LineSpread {
  /** What is usual for a line. */
  readonly usual: WidthLaw;
  /** The instrument alone, where it is known apart from the lines. */
  readonly instrument?: WidthLaw;
  readonly from: Measurement['resolvingPowerFrom'];
  /** One sigma of ln(width). */
  readonly spread: number;
}

/** A width never falls below this share of what it is at the reference wavelength, however steep the law. */
export const LEAST_SHARE = 0.05;

/** FWHM, Angstrom. */
export const fwhmAt = ({ at, fwhmA, slope }: WidthLaw, wavelength: number) =>
  Math.max(LEAST_SHARE * fwhmA, fwhmA + slope * (wavelength - at));

/** lambda / FWHM the same everywhere. */
export const constantResolvingPower = (resolvingPower: number, at: number): WidthLaw => ({
  form: 'constant-resolving-power',
  at,
  fwhmA: at / resolvingPower,
  slope: 1 / resolvingPower,
});

export const widthPrior = (usual: WidthLaw, spread: number): WidthPrior => ({
  law: usual,
  sigmaAt: (wavelength) => fwhmAt(usual, wavelength) / FWHM_PER_SIGMA,
  spread,
});

/** The expected width (sigma) of a line in samples, one value a sample. */
export function sigmaInSamples({ x, sampleWidth }: Pick<FitSamples, 'x' | 'sampleWidth'>, { law }: WidthPrior): Float64Array {
  const sigma = new Float64Array(x.length);
  const { at, slope } = law;
  const level = law.fwhmA / FWHM_PER_SIGMA;
  const growth = slope / FWHM_PER_SIGMA;
  for (let i = 0; i < x.length; i++) sigma[i] = Math.max(LEAST_SHARE * level, level + growth * (x[i] - at)) / sampleWidth[i];
  return sigma;
}
