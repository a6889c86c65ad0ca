import { byError, minus, withPower } from './byError.ts';
import { decimals } from './columns.ts';
import type { PaperColumnKey, TableDesign } from './design.ts';
import { type Inline, type InlineText, ionInline } from './inline.ts';
import type { LineRow, LineTable } from './lineTable.ts';

/** One column of a printed table: its head, unit and cells. */
export interface PaperColumn {
  readonly key: PaperColumnKey;
  /** Words for choosing it. */
  readonly label: string;
  readonly align: 'left' | 'right';
  readonly head: (design: TableDesign, table: LineTable) => InlineText;
  readonly unit: (design: TableDesign, table: LineTable) => InlineText;
  readonly cell: (row: LineRow, design: TableDesign) => InlineText;
}

/** The sign of a quantity. */
const sign = (letter: string): Inline => ({ sign: letter });
const NONE: InlineText = [];
const ANGSTROM: InlineText = ['Å'];
const KMS: InlineText = ['km s', { sup: '−1' }];

/** Digits of quantities that come from atomic data, which are not known better. */
const ATOMIC_DIGITS = 2;

export const PAPER_COLUMNS: Readonly<Record<PaperColumnKey, PaperColumn>> = {
  number: column('number', 'number', 'right', ['No.'], NONE, (row) => [String(row.feature)]),
  observed: column('observed', 'observed wavelength', 'right', [sign('λ'), { sub: 'obs' }], ANGSTROM, (row, { errorDigits }) =>
    row.wavelengthObsErr === undefined ? [decimals(row.wavelengthObs, 2)] : byError(row.wavelengthObs, row.wavelengthObsErr, errorDigits),
  ),
  ion: column('ion', 'ion', 'left', ['Ion'], NONE, ionCell),
  laboratory: column('laboratory', 'laboratory wavelength', 'right', [sign('λ'), { sub: 'lab' }], ANGSTROM, (row) =>
    row.wavelengthLab ? [row.wavelengthLab.map((w) => decimals(w, 2)).join(', ')] : NONE,
  ),
  transition: column('transition', 'transition', 'left', ['Transition'], NONE, (row) =>
    row.lower || row.upper ? [`${row.lower ?? ''} – ${row.upper ?? ''}`] : NONE,
  ),
  velocity: column('velocity', 'velocity', 'right', [sign('v')], KMS, (row, { errorDigits }) =>
    byError(row.velocity, row.velocityErr, errorDigits),
  ),
  flux: {
    key: 'flux',
    label: 'flux',
    align: 'right',
    head: ({ scale }) => [sign(scale === 'dereddened' ? 'I' : 'F'), '(', sign('λ'), ')'],
    unit: ({ scale }, table) => (scale === 'as-measured' ? fluxUnit(table.fluxUnit) : ['Hβ = 100']),
    cell: fluxCell,
  },
  fwhm: column('fwhm', 'FWHM, Å', 'right', ['FWHM'], ANGSTROM, (row, { errorDigits }) => byError(row.fwhm, row.fwhmErr, errorDigits)),
  width: column('width', 'FWHM, km/s', 'right', ['FWHM'], KMS, (row) => (row.fwhmKms === undefined ? NONE : [decimals(row.fwhmKms, 0)])),
  equivalentWidth: column('equivalentWidth', 'equivalent width', 'right', ['EW'], ANGSTROM, (row, { errorDigits }) =>
    byError(row.ew, row.ewErr, errorDigits),
  ),
  snr: column('snr', 'signal to noise', 'right', ['S/N'], NONE, (row) =>
    row.snr === undefined ? NONE : [decimals(row.snr, row.snr < 10 ? 1 : 0)],
  ),
  probability: column('probability', 'probability', 'right', [sign('P')], NONE, (row) =>
    row.probability === undefined ? NONE : [probability(row.probability)],
  ),
  criticalDensity: column('criticalDensity', 'critical density', 'right', [sign('n'), { sub: 'crit' }], ['cm', { sup: '−3' }], (row) =>
    withExponent(row.nCrit),
  ),
  lifetime: column('lifetime', 'lifetime', 'right', [sign('τ')], ['s'], (row) => withPower(row.lifetimeS, ATOMIC_DIGITS)),
  alternatives: column('alternatives', 'other names', 'left', ['Other names'], NONE, (row) => {
    const [first] = row.alternatives;
    return first
      ? [...ionInline(first.ion), ` ${first.wavelengthLab.map((w) => decimals(w, 2)).join(', ')} (${probability(first.probability)})`]
      : NONE;
  }),
  note: column('note', 'notes', 'left', ['Notes'], NONE, () => NONE),
};

function column(
  key: PaperColumnKey,
  label: string,
  align: PaperColumn['align'],
  head: InlineText,
  unit: InlineText,
  cell: PaperColumn['cell'],
): PaperColumn {
  return { key, label, align, head: () => head, unit: () => unit, cell };
}

/** The name with a ring for thin gas; a line without one says so. */
function ionCell(row: LineRow): InlineText {
  if (row.ion) return [...ionInline(row.ion), ...(row.thinGas ? [{ sup: '○' } satisfies Inline] : [])];
  return row.verdict === 'artefact' || row.artefact ? ['artefact'] : ['unidentified'];
}

function fluxCell(row: LineRow, { scale, errorDigits }: TableDesign): InlineText {
  if (scale === 'dereddened') return byError(row.intensityHbeta100, row.intensityHbeta100Err, errorDigits);
  return scale === 'hbeta100' ? byError(row.fluxHbeta100, row.fluxHbeta100Err, errorDigits) : byError(row.flux, row.fluxErr, errorDigits);
}

/** `1e-15 erg/s/cm2/A` times Angstrom, as text: the unit is the file's own. */
const fluxUnit = (unit: string): InlineText => (unit === '' ? ['unit of the file × Å'] : [`${unit} × Å`]);

function probability(value: number): string {
  return value > 0.9995 ? '> 0.999' : value < 0.0005 ? '< 0.001' : decimals(value, 3);
}

/** `7.1 × 10^5`: always with its power, so that a column can be scanned. */
function withExponent(value: number | undefined): InlineText {
  if (value === undefined) return NONE;
  const [mantissa, exponent] = value.toExponential(ATOMIC_DIGITS - 1).split('e');
  return [`${mantissa} × 10`, { sup: minus(String(Number(exponent))) }];
}
