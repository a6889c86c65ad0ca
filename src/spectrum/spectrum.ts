/** Medium in which wavelengths are stated. */
export type Medium = 'air' | 'vacuum';

/** A reduced one-dimensional spectrum. Arrays are read-only for everyone but their maker. */
export interface Spectrum {
  /** What the user calls it: a file name or an object name. */
  readonly name: string;
  /** Angstrom in `medium`, strictly ascending; length n >= 2. */
  readonly wavelength: Float64Array;
  /** In `fluxUnit`; NaN at masked samples is allowed; length n. */
  readonly flux: Float64Array;
  /** One sigma in `fluxUnit`, positive where not masked; absent when the file has none; length n. */
  readonly fluxErr?: Float64Array;
  /** 1 = the sample must not be used (missing, flagged, not finite); length n. */
  readonly masked: Uint8Array;
  readonly medium: Medium;
  /** Unit of `flux` as the file words it; empty when unknown. */
  readonly fluxUnit: string;
  /** lambda / FWHM of the instrument, when the file states it. */
  readonly resolvingPower?: number;
}

/** Samples that may be used. */
export function countUsable(spectrum: Spectrum): number {
  let usable = 0;
  for (let i = 0; i < spectrum.masked.length; i++) usable += 1 - spectrum.masked[i];
  return usable;
}
