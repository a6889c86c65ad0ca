/** How the fit of a feature's group ended. */
export type FitEnd =
  | { readonly ended: 'converged' }
  /** A parameter rests on a bound: its error is not to be trusted. */
  | { readonly ended: 'at-bound'; readonly which: 'centroid' | 'width' | 'flux' }
  /** Converged, but the covariance could not be had: errors are NaN. */
  | { readonly ended: 'no-uncertainty' }
  /** The values are starting estimates; errors are NaN. */
  | { readonly ended: 'failed'; readonly reason: string };

/** One measured component; it has no name yet. Wavelengths in Angstrom in the medium of the spectrum; errors one sigma, NaN when they cannot be had. */
export interface Feature {
  /** Position in `Measurement.features`, ascending centroid. */
  readonly index: number;
  readonly kind: 'emission' | 'absorption';
  /** A spike narrower than the instrument, or another fault of the data: kept and shown, not named. */
  readonly artefact?: string;
  readonly centroid: number;
  readonly centroidErr: number;
  /** Integral over the profile, flux unit times Angstrom; negative for absorption. */
  readonly flux: number;
  readonly fluxErr: number;
  /** Observed, Angstrom. */
  readonly fwhm: number;
  readonly fwhmErr: number;
  /** Instrument removed, km/s; 0 when the line is not resolved, absent when the instrument is unknown. */
  readonly intrinsicFwhmKms?: number;
  /** Positive for emission, Angstrom; NaN where the continuum is not positive. */
  readonly ew: number;
  readonly ewErr: number;
  readonly snr: number;
  /** Continuum under the centroid, flux unit. */
  readonly continuum: number;
  /** Index into `Measurement.groups`: the features fitted at once. */
  readonly group: number;
  readonly fit: FitEnd;
  /** The feature is cut by masked samples or the end of the spectrum, saturated, or overlapped: words for the table's note column. */
  readonly notes: readonly string[];
}

/** Features fitted at once over one stretch of samples. */
export interface Group {
  /** Samples [first, last] of the spectrum. */
  readonly first: number;
  readonly last: number;
  readonly chi2: number;
  readonly dof: number;
}

export interface MeasureSettings {
  /** A feature is kept when its S/N reaches this. */
  readonly thresholdSigma: number;
  /** lambda / FWHM of the instrument; absent = taken from the spectrum's own isolated lines. */
  readonly resolvingPower?: number;
  readonly absorption: boolean;
}

export const DEFAULT_MEASURE_SETTINGS: MeasureSettings = { thresholdSigma: 4.5, absorption: true };

/** Everything measured on a spectrum; arrays are one value a sample, in the flux unit. */
export interface Measurement {
  readonly features: readonly Feature[];
  readonly groups: readonly Group[];
  readonly continuum: Float64Array;
  /** Continuum plus all profiles. */
  readonly model: Float64Array;
  /** One sigma used in the fits: the file's errors times `noiseFactor`, or the local estimate. */
  readonly noise: Float64Array;
  /** Scatter about the model over the file's errors; absent when the file has none. */
  readonly noiseFactor?: number;
  /** Line-spread function used: FWHM in Angstrom at a wavelength w is `fwhmAt = w / resolvingPower`. */
  readonly resolvingPower: number;
  readonly resolvingPowerFrom: 'user' | 'file' | 'lines' | 'sampling';
  /** Features expected from noise alone at this threshold. */
  readonly expectedFalse: number;
  /** Words about what was assumed, each a sentence. */
  readonly remarks: readonly import('../problems/index.ts').Remark[];
}
