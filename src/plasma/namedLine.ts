/** An emission feature with the name it goes by: what this room is given. */
export interface NamedLine {
  /** Number of the feature, as shown. */
  readonly feature: number;
  /** "[O III] 5006.84". */
  readonly label: string;
  /** Indices into the line list; several for a blend, none for a feature without a name. */
  readonly lines: readonly number[];
  /** Share of the flux of each of `lines`. */
  readonly shares: readonly number[];
  /** Whether the user accepted the name; else it is the program's best. */
  readonly accepted: boolean;
  /** Any unit, the same for all; positive. */
  readonly flux: number;
  /** One sigma; NaN when unknown. */
  readonly fluxErr: number;
  /** Observed wavelength over 1 + z, vacuum Angstrom. */
  readonly restVac: number;
  /** Rest frame, Angstrom; absent when the continuum is not known. */
  readonly ew?: number;
  /** Observed FWHM in the rest frame, Angstrom. */
  readonly fwhmA?: number;
  /** km/s against the laboratory wavelength, optical convention. */
  readonly velocityKms: number;
  readonly velocityErrKms: number;
  /** FWHM, instrument removed where it is known. */
  readonly fwhmKms?: number;
  readonly fwhmErrKms?: number;
  /** Why the flux should not be relied on: a saturated peak, a failed fit. */
  readonly doubt?: string;
}
