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
  /** What was done to it by hand, or which other feature it is tied to: words for the table. */
  readonly byHand?: string;
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

/** How the continuum is drawn where the program's own way does not do. Wavelengths in Angstrom in the medium of the spectrum. */
export interface ContinuumSettings {
  /** Detail of this period is followed by half, Angstrom; absent = from the line width. */
  readonly halfPeriodA?: number;
  /** Stretches [from, to] that are left out of it. */
  readonly exclude?: readonly (readonly [number, number])[];
  /** Places it has to pass through, flux unit. */
  readonly pins?: readonly { readonly wavelength: number; readonly level: number }[];
}

export interface MeasureSettings {
  /** A feature is kept when its S/N reaches this. */
  readonly thresholdSigma: number;
  /** lambda / FWHM of the instrument; absent = the file's, else taken from the spectrum's own isolated lines. */
  readonly resolvingPower?: number;
  /** FWHM of the instrument at the middle of the spectrum, Angstrom: used when no resolving power is set. */
  readonly instrumentFwhmA?: number;
  /** Growth of that FWHM along the spectrum, Angstrom per Angstrom; 0 when absent. */
  readonly instrumentFwhmSlope?: number;
  readonly absorption: boolean;
  /** Whether blended features that are surely named take velocity and width, and where it helps the flux ratio, from an unblended partner. */
  readonly tieNamedPairs: boolean;
  readonly continuum?: ContinuumSettings;
  /** What the user did to the features by hand, in order. */
  readonly edits?: readonly FeatureEdit[];
}

/**
 * One thing done by hand to the features. `at` is a wavelength, Angstrom in the medium of the spectrum: the feature meant is the nearest one within its own width.
 * `add` makes a feature at `at`; `split` makes two of one; `move` starts its fit anew from `to`; `profile` measures it with another shape; `tie` gives it the
 * velocity and the width of the feature at `to` (rest wavelengths `restAt`, `restTo` in the same medium), and its flux times `ratio` when that is said.
 */
export type FeatureEdit =
  | { readonly edit: 'add'; readonly at: number; readonly absorption?: boolean }
  | { readonly edit: 'split'; readonly at: number }
  | { readonly edit: 'move'; readonly at: number; readonly to: number }
  | { readonly edit: 'delete'; readonly at: number }
  | { readonly edit: 'profile'; readonly at: number; readonly as: ProfileShape }
  | {
      readonly edit: 'tie';
      readonly at: number;
      readonly to: number;
      readonly restAt: number;
      readonly restTo: number;
      readonly ratio?: number;
    };

export type ProfileShape = 'gaussian' | 'voigt' | 'two-gaussians';

export const DEFAULT_MEASURE_SETTINGS: MeasureSettings = { thresholdSigma: 4.5, absorption: true, tieNamedPairs: true };

/** Width of a line as the instrument makes it: FWHM in Angstrom = `fwhmA` + `slope` (wavelength - `at`). */
export interface WidthLaw {
  readonly form: 'constant-resolving-power' | 'constant-width' | 'linear';
  readonly at: number;
  readonly fwhmA: number;
  readonly slope: number;
}

/** Everything measured on a spectrum; arrays are one value a sample, in the flux unit. */
export interface Measurement {
  readonly features: readonly Feature[];
  readonly groups: readonly Group[];
  readonly continuum: Float64Array;
  /** One sigma of the continuum from the noise. */
  readonly continuumErr: Float64Array;
  /** Period of the detail that the continuum follows by half, Angstrom. */
  readonly continuumHalfPeriodA: number;
  /** Continuum plus all profiles. */
  readonly model: Float64Array;
  /** One sigma used in the fits: the file's errors times `noiseFactor` (or the local estimate) times `noiseCorrelation`. */
  readonly noise: Float64Array;
  /** Scatter about the continuum over the file's errors; absent when the file has none. */
  readonly noiseFactor?: number;
  /** Noise under a line over what independent samples would give; 1 when neighbours are independent. */
  readonly noiseCorrelation: number;
  readonly lineWidth: WidthLaw;
  /** lambda / FWHM at the middle of the spectrum. */
  readonly resolvingPower: number;
  readonly resolvingPowerFrom: 'user' | 'file' | 'lines' | 'sampling';
  /** Features expected from noise alone at this threshold. */
  readonly expectedFalse: number;
  /** Words about what was assumed, each a sentence. */
  readonly remarks: readonly import('../problems/index.ts').Remark[];
}
