/** How a line may come about by the selection rules, or that it is no line of the object. */
export type Nature = 'permitted' | 'intercombination' | 'forbidden' | 'raman' | 'sky' | 'telluric' | 'interstellar';

/** What feeds the upper level, for the largest part of the strength. */
export type Mechanism = 'recombination' | 'collisional' | 'fluorescence';

/** An ion as the list knows it. */
export interface Ion {
  /** Trade notation without brackets: `O III`; for sky species the carrier (`OH`, `O2`). */
  readonly name: string;
  readonly element: string;
  /** Charge of the emitting ion: 0 for O I, 2 for O III. */
  readonly charge: number;
  /** Energy that was needed to make this ion from the one below, eV; 0 for neutrals. */
  readonly creationEv: number;
  /** Energy needed to make the next ion, eV: the zone of a recombination line. */
  readonly ionizationEv: number;
}

/** The transitions, ascending vacuum wavelength, one value a line in every array (structure of arrays, n lines). */
export interface LineList {
  readonly count: number;
  readonly ions: readonly Ion[];
  /** Index into `ions`. */
  readonly ion: Uint16Array;
  /** Vacuum Angstrom: Ritz, or the nebular or laboratory value where that is known better. */
  readonly wavelengthVac: Float64Array;
  /** One sigma, Angstrom. */
  readonly wavelengthErr: Float32Array;
  readonly nature: (line: number) => Nature;
  readonly mechanism: (line: number) => Mechanism;
  /** log10 of the flux for H beta = 100 in the reference nebula (every ionisation zone present); -Infinity = unknown. */
  readonly logStrength: Float32Array;
  /** One sigma within the ion, dex. */
  readonly strengthErrDex: Float32Array;
  /** Sum of A over the line's components, s^-1; NaN when unknown. */
  readonly aValue: Float32Array;
  /** Index of the upper and lower level in the ion's n-level atom (0 = ground), -1 when the ion has none or the level is outside it. */
  readonly upperLevel: Int16Array;
  readonly lowerLevel: Int16Array;
  /** Lines with the same number > 0 belong to one multiplet of one ion; 0 = none known. */
  readonly multiplet: Uint32Array;
  /** Lines with the same number > 0 share their upper level. */
  readonly upperId: Uint32Array;
}
