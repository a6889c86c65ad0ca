import type { ProfileShape, WidthLaw } from './feature.ts';

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

/** Samples [first, last] that are fitted together. */
export interface Stretch {
  readonly first: number;
  readonly last: number;
}

/** What is expected of a width before a line is fitted. */
export interface WidthPrior {
  readonly law: WidthLaw;
  /** Gaussian sigma, Angstrom, at a wavelength, by the law. */
  readonly sigmaAt: (wavelength: number) => number;
  /** One sigma of ln(sigma) about it. */
  readonly spread: number;
}

/** One Gaussian: start or outcome of a fit. */
export interface Component {
  readonly flux: number;
  readonly centre: number;
  /** Gaussian sigma, Angstrom. */
  readonly sigma: number;
  /** Far wider than usual lines: its width is free. */
  readonly isBroad?: true;
  /** A parameter that ended on its bound. */
  readonly atBound?: 'centroid' | 'width' | 'flux';
  /** Words for what was done to it by hand. */
  readonly byHand?: string;
  /** Measured in the end with this shape, as the user asked. */
  readonly shape?: ProfileShape;
}
