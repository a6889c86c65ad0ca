import { type DeskRow, thinGasOf } from '../desk/deskRows.ts';
import { fixed, fluxText, powerText, probabilityText, round, signed, withError } from '../figures.ts';
import { words } from '../words.ts';

/** One column of the line table on the desk. */
export interface TableColumn {
  readonly key: string;
  readonly head: string;
  readonly unit: string;
  /** CSS grid width. */
  readonly width: string;
  readonly numeric: boolean;
  readonly text: (row: DeskRow) => string;
  /** What it is sorted by; undefined goes last. */
  readonly order: (row: DeskRow) => number | string | undefined;
}

const finite = (value: number | undefined) => (value !== undefined && Number.isFinite(value) ? value : undefined);

export const TABLE_COLUMNS: readonly TableColumn[] = [
  number(
    'number',
    '48px',
    '',
    (r) => String(r.feature.number),
    (r) => r.feature.number,
  ),
  number(
    'wavelength',
    '136px',
    'Å',
    (r) => withError(r.feature.centroid, finite(r.feature.centroidErr), 2),
    (r) => r.feature.centroid,
  ),
  word(
    'name',
    'minmax(148px, 1.4fr)',
    (r) => r.name?.label ?? '',
    (r) => r.name?.label,
  ),
  number(
    'probability',
    '84px',
    '',
    (r) => probabilityText(r.name?.probability),
    (r) => r.name?.probability,
  ),
  word(
    'standing',
    '104px',
    (r) => words.standing[r.standing],
    (r) => r.standing,
  ),
  number(
    'flux',
    '124px',
    '',
    (r) => fluxText(r.feature.measured.flux, r.feature.measured.fluxErr),
    (r) => r.feature.measured.flux,
  ),
  number(
    'hBeta',
    '72px',
    '',
    (r) => round(r.printed.fluxHbeta100, 4),
    (r) => finite(r.printed.fluxHbeta100),
  ),
  number(
    'fwhm',
    '100px',
    'km/s',
    (r) => fixed(r.printed.fwhmKms, 1),
    (r) => finite(r.printed.fwhmKms),
  ),
  number(
    'snr',
    '64px',
    '',
    (r) => fixed(r.feature.measured.snr, 1),
    (r) => finite(r.feature.measured.snr),
  ),
  number(
    'velocity',
    '112px',
    'km/s',
    (r) => velocityText(r),
    (r) => finite(r.name?.velocityKms),
  ),
  number(
    'nCrit',
    '96px',
    'cm⁻³',
    (r) => (r.name ? powerText(thinGasOf(r.name)?.nCrit, 2) : ''),
    (r) => finite(thinGasOf(r.name)?.nCrit),
  ),
  word(
    'note',
    'minmax(96px, 1fr)',
    (r) => r.note || r.printed.note,
    (r) => r.note || r.printed.note || undefined,
  ),
];

function velocityText(row: DeskRow): string {
  return row.name && Number.isFinite(row.name.velocityKms) ? signed(row.name.velocityKms, finite(row.name.velocityErrKms), 1) : '';
}

function number(
  key: keyof typeof words.columns,
  width: string,
  unit: string,
  text: TableColumn['text'],
  order: TableColumn['order'],
): TableColumn {
  return { key, head: words.columns[key], unit, width, numeric: true, text, order };
}

function word(key: keyof typeof words.columns, width: string, text: TableColumn['text'], order: TableColumn['order']): TableColumn {
  return { key, head: words.columns[key], unit: '', width, numeric: false, text, order };
}
