import { type DeskRow, thinGasOf } from '../desk/deskRows.ts';
import { fixed, fluxText, powerText, probabilityText, round, signed, wavelengthText } from '../figures.ts';
import { words } from '../words.ts';

/** One column of the line table on the desk. */
export interface TableColumn {
  readonly key: string;
  readonly head: string;
  readonly unit: string;
  /** Pixels, at least: columns of words share what is left. */
  readonly width: number;
  readonly numeric: boolean;
  readonly text: (row: DeskRow) => string;
  /** What it is sorted by; undefined goes last. */
  readonly order: (row: DeskRow) => number | string | undefined;
}

const finite = (value: number | undefined) => (value !== undefined && Number.isFinite(value) ? value : undefined);

export const TABLE_COLUMNS: readonly TableColumn[] = [
  number(
    'number',
    48,
    '',
    (r) => String(r.feature.number),
    (r) => r.feature.number,
  ),
  number(
    'wavelength',
    132,
    'Å',
    (r) => wavelengthText(r.feature.centroid, finite(r.feature.centroidErr)),
    (r) => r.feature.centroid,
  ),
  word(
    'name',
    160,
    (r) => r.name?.label ?? '',
    (r) => r.name?.label,
  ),
  number(
    'probability',
    64,
    '',
    (r) => probabilityText(r.name?.probability),
    (r) => r.name?.probability,
  ),
  word(
    'standing',
    144,
    (r) => words.standing[r.standing],
    (r) => r.standing,
  ),
  number(
    'flux',
    108,
    '',
    (r) => fluxText(r.feature.measured.flux, r.feature.measured.fluxErr),
    (r) => r.feature.measured.flux,
  ),
  number(
    'hBeta',
    76,
    '',
    (r) => round(r.printed.fluxHbeta100, 4),
    (r) => finite(r.printed.fluxHbeta100),
  ),
  number(
    'intensity',
    112,
    '',
    (r) => (r.printed.intensityHbeta100 === undefined ? '' : fluxText(r.printed.intensityHbeta100, r.printed.intensityHbeta100Err)),
    (r) => finite(r.printed.intensityHbeta100),
  ),
  number(
    'fwhm',
    92,
    'km/s',
    (r) => fixed(r.printed.fwhmKms, 1),
    (r) => finite(r.printed.fwhmKms),
  ),
  number(
    'snr',
    60,
    '',
    (r) => fixed(r.feature.measured.snr, 1),
    (r) => finite(r.feature.measured.snr),
  ),
  number(
    'velocity',
    100,
    'km/s',
    (r) => velocityText(r),
    (r) => finite(r.name?.velocityKms),
  ),
  number(
    'nCrit',
    88,
    'cm⁻³',
    (r) => nCritText(r),
    (r) => finite(thinGasOf(r.name)?.nCrit),
  ),
  word(
    'note',
    96,
    (r) => r.note || r.printed.note,
    (r) => r.note || r.printed.note || undefined,
  ),
];

const nCritText = (row: DeskRow) => {
  const thinGas = thinGasOf(row.name);
  return thinGas ? powerText(thinGas.nCrit, 2) : '';
};

/** Number, wavelength and name say what a row is: they stay. */
export const isAlwaysShown = ({ key }: TableColumn) => ['number', 'wavelength', 'name'].includes(key);

/** The columns left when those of `hidden` are not wanted. */
export const shownColumns = (hidden: readonly string[]) => TABLE_COLUMNS.filter(({ key }) => !hidden.includes(key));

function velocityText(row: DeskRow): string {
  return row.name && Number.isFinite(row.name.velocityKms) ? signed(row.name.velocityKms, finite(row.name.velocityErrKms), 1) : '';
}

function number(
  key: keyof typeof words.columns,
  width: number,
  unit: string,
  text: TableColumn['text'],
  order: TableColumn['order'],
): TableColumn {
  return { key, head: words.columns[key], unit, width, numeric: true, text, order };
}

function word(key: keyof typeof words.columns, width: number, text: TableColumn['text'], order: TableColumn['order']): TableColumn {
  return { key, head: words.columns[key], unit: '', width, numeric: false, text, order };
}
