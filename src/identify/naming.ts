/** What naming needs to know of a feature: from a measured spectrum or from the user's own list. */
export interface Mark {
  /** Vacuum Angstrom. */
  readonly wavelength: number;
  /** One sigma, Angstrom, positive. */
  readonly wavelengthErr: number;
  /** Any unit, the same for all; negative = absorption. */
  readonly flux: number;
  /** One sigma; NaN when unknown. */
  readonly fluxErr: number;
  /** Observed FWHM, Angstrom; absent when unknown. */
  readonly fwhm?: number;
  /** Spikes are carried along but never named. */
  readonly artefact?: boolean;
}

export type ObjectKind = 'unknown' | 'hii-region' | 'planetary-nebula' | 'nova-shell' | 'shocked-gas' | 'narrow-line-galaxy';

export interface NamingSettings {
  /** Given redshift; absent = found from the strong features. */
  readonly z?: number;
  /** A candidate may lie this far off, km/s, whatever the feature's error ... */
  readonly toleranceKms: number;
  /** ... or this many times the feature's own error, whichever is larger. */
  readonly toleranceSigma: number;
  readonly kind: ObjectKind;
  /** Electron temperature (K) and density (cm^-3) at which lifetimes and critical densities are stated and companions are predicted. */
  readonly te: number;
  readonly ne: number;
  /** Stretches of the observed spectrum where nothing could be seen, vacuum Angstrom: lines in them are not missed. */
  readonly gaps?: readonly (readonly [number, number])[];
  /** Medium in which sentences give wavelengths; absent = vacuum. */
  readonly medium?: 'air' | 'vacuum';
}

export const DEFAULT_NAMING_SETTINGS: NamingSettings = { toleranceKms: 60, toleranceSigma: 4, kind: 'unknown', te: 10_000, ne: 1_000 };

/** One piece of a case. */
export interface Evidence {
  readonly kind: 'wavelength' | 'strength' | 'excitation' | 'companion' | 'width' | 'ion' | 'prior' | 'verdict';
  /** Log odds it adds, natural logarithm; all pieces of a case add up to its log odds against "none of these". */
  readonly nats: number;
  /** A sentence a referee can read, with its numbers and units. */
  readonly sentence: string;
}

/** A companion looked for: another transition that must be there too if the candidate is right. */
export interface CompanionFinding {
  /** Index into the line list. */
  readonly line: number;
  /** Vacuum Angstrom where it should be observed. */
  readonly expectedAt: number;
  /** Flux predicted from the candidate's feature, same unit. */
  readonly predictedFlux: number;
  readonly outcome: 'seen' | 'wrong-ratio' | 'absent' | 'hidden' | 'outside' | 'too-faint';
  /** Index of the feature taken for it, when seen. */
  readonly feature?: number;
}

/** One transition (or blend) proposed for a feature. */
export interface Candidate {
  /** Indices into the line list, strongest first; one, or up to three for a blend. */
  readonly lines: readonly number[];
  /** Share of the predicted flux of each of `lines`, summing to 1. */
  readonly shares: readonly number[];
  readonly probability: number;
  /** km/s of the feature against this candidate's rest wavelength, optical convention, systemic velocity included. */
  readonly velocityKms: number;
  readonly velocityErrKms: number;
  readonly evidence: readonly Evidence[];
  readonly companions: readonly CompanionFinding[];
}

/** The case of one feature: candidates, best first, and what is left for "none of these". */
export interface FeatureNaming {
  readonly candidates: readonly Candidate[];
  readonly noneProbability: number;
  /** What the feature would imply if it stayed without a name, a sentence. */
  readonly implies: string;
}

export interface RedshiftHypothesis {
  readonly z: number;
  readonly zErr: number;
  readonly probability: number;
  /** How it came about, a sentence. */
  readonly reason: string;
}

/** What the user has decided about a mark: the inference keeps to it. */
export type FixedName =
  | { readonly mark: number; readonly lines: readonly number[] }
  /** Rejected names. */
  | { readonly mark: number; readonly not: readonly (readonly number[])[] }
  | { readonly mark: number; readonly none: true };

export interface Naming {
  readonly features: readonly FeatureNaming[];
  /** Best first; one entry with probability 1 when z was given. */
  readonly redshifts: readonly RedshiftHypothesis[];
  readonly z: number;
  readonly zErr: number;
  /** Extra scatter of centroids about the model, km/s. */
  readonly dispersionKms: number;
  /** As set; with 'unknown', the kind whose ion strengths fit what was found, if one stands out. */
  readonly kind: ObjectKind;
  /** Trend of velocity with ionisation found on the way, km/s per e-fold of (creation energy + 8 eV); absent = none is significant. */
  readonly trendKms?: number;
  /**
   * Smooth drift of the wavelength calibration found on the way, at some wavelengths (observed, vacuum Angstrom); the names allow for it, the velocities
   * of the candidates do not. Absent = none is significant.
   */
  readonly drift?: readonly { readonly wavelength: number; readonly kms: number }[];
  readonly remarks: readonly import('../problems/index.ts').Remark[];
  /** Strong predicted lines without a feature: index into the line list, predicted flux, expected vacuum wavelength, what the absence would imply (a sentence). */
  readonly missing: readonly {
    readonly line: number;
    readonly predictedFlux: number;
    readonly expectedAt: number;
    readonly implies: string;
  }[];
}
