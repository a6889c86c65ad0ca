/** Columns a printed table may have; `paperColumns.ts` says what each holds. */
export type PaperColumnKey =
  | 'number'
  | 'observed'
  | 'ion'
  | 'laboratory'
  | 'transition'
  | 'velocity'
  | 'flux'
  | 'fwhm'
  | 'width'
  | 'equivalentWidth'
  | 'snr'
  | 'probability'
  | 'criticalDensity'
  | 'lifetime'
  | 'alternatives'
  | 'note';

/** Which lines a table holds by their verdicts. */
export type RowChoice = 'accepted' | 'accepted-and-unidentified' | 'named' | 'all';
export type FluxScale = 'as-measured' | 'hbeta100' | 'dereddened';
export type RowOrder = 'wavelength' | 'ion' | 'flux';

/** How a table is printed. */
export interface TableDesign {
  /** In their order from the left. */
  readonly columns: readonly PaperColumnKey[];
  readonly rows: RowChoice;
  readonly scale: FluxScale;
  /** Significant digits of an error. */
  readonly errorDigits: 1 | 2;
  /** The parts of a blend in one row, or each in a row of its own below the first. */
  readonly blends: 'one-row' | 'a-row-each';
  readonly order: RowOrder;
  /** Absent = made from the name of the spectrum. */
  readonly caption?: string;
}

/** Designs to start from. */
export const PRESETS = {
  letter: {
    columns: ['ion', 'laboratory', 'flux', 'note'],
    rows: 'accepted',
    scale: 'dereddened',
    errorDigits: 1,
    blends: 'one-row',
    order: 'wavelength',
  },
  atlas: {
    columns: ['observed', 'ion', 'laboratory', 'velocity', 'flux', 'fwhm', 'criticalDensity', 'note'],
    rows: 'accepted-and-unidentified',
    scale: 'hbeta100',
    errorDigits: 2,
    blends: 'one-row',
    order: 'wavelength',
  },
  appendix: {
    columns: [
      'number',
      'observed',
      'ion',
      'laboratory',
      'transition',
      'velocity',
      'flux',
      'width',
      'equivalentWidth',
      'snr',
      'probability',
      'lifetime',
      'criticalDensity',
      'alternatives',
      'note',
    ],
    rows: 'all',
    scale: 'as-measured',
    errorDigits: 2,
    blends: 'a-row-each',
    order: 'wavelength',
  },
} as const satisfies Record<string, TableDesign>;

export type PresetName = keyof typeof PRESETS;
export const DEFAULT_DESIGN: TableDesign = PRESETS.atlas;
