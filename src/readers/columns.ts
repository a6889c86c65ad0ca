/** One column of numbers a file offers: of a text, a table, or a group of image rows. */
export interface Column {
  readonly name: string;
  /** As the file words it; empty when it says none. */
  readonly unit: string;
  readonly ucd?: string;
  readonly utype?: string;
  readonly description?: string;
  readonly kind: 'real' | 'whole' | 'logical' | 'text';
  /** Values it yields; 1 for a number that goes with the whole spectrum. */
  readonly samples: number;
  /** A new array the caller owns; NaN = missing, 1 and 0 for true and false. */
  read(): Promise<Float64Array>;
}

/** What a column is to a spectrum. `relative` is an error as a share of the flux. */
export type ColumnRole =
  | 'wavelength'
  | 'wavelength-step'
  | 'velocity'
  | 'flux'
  | 'sigma'
  | 'variance'
  | 'ivar'
  | 'relative'
  | 'snr'
  | 'mask'
  | 'other';

/** A role with how well the column suits it (higher = better) and the words that tell one family of columns from another. */
export interface RoleGuess {
  readonly role: ColumnRole;
  readonly merit: number;
  /** Name without the words of its role: FLUX_ERROR -> "flux", OPT_WAVE -> "opt". */
  readonly stem: string;
  readonly reason: string;
}

/** A column with its place and its likely role. */
export interface RankedColumn extends RoleGuess {
  readonly column: Column;
  /** From 0. */
  readonly index: number;
}
