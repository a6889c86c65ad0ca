import { FWHM_PER_SIGMA } from '../../units/index.ts';

/** One Gaussian line to be drawn. */
export interface Profile {
  readonly centre: number;
  /** Same unit as `centre`. */
  readonly fwhm: number;
  /** Integral, unit of the curve times that of `centre`. */
  readonly flux: number;
}

/** Height of a Gaussian of `profile` at `x`. */
export function profileAt(profile: Profile, x: number): number {
  const sigma = profile.fwhm / FWHM_PER_SIGMA;
  const u = (x - profile.centre) / sigma;
  return (profile.flux / (sigma * Math.sqrt(2 * Math.PI))) * Math.exp(-0.5 * u * u);
}
