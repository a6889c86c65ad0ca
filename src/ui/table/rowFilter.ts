import type { DeskRow, Standing } from '../desk/deskRows.ts';

/** Which rows the table shows; an absent field lets everything pass. */
export interface RowFilter {
  /** Words looked for in name, wavelength and note; all must be there. */
  readonly text?: string;
  readonly nature?: 'permitted' | 'intercombination' | 'forbidden' | 'sky' | 'unnamed' | 'thin-gas';
  /** As printed: `[O III]`. */
  readonly ion?: string;
  readonly standing?: Standing;
  readonly probability?: 'sure' | 'likely' | 'doubtful';
}

/** The ions named in the rows, sorted, without their brackets counting. */
export function ionsIn(rows: readonly DeskRow[]): string[] {
  const ions = new Set(rows.flatMap((row) => row.name?.transitions.map((t) => t.ion) ?? []));
  const plain = (ion: string) => ion.replace(/[[\]]/g, '');
  return [...ions].sort((a, b) => plain(a).localeCompare(plain(b)) || a.localeCompare(b));
}

/** Limits of the probability filter. */
const SURE = 0.9;
const LIKELY = 0.5;

export function passes(row: DeskRow, filter: RowFilter): boolean {
  if (filter.standing && row.standing !== filter.standing) return false;
  if (filter.ion && !row.name?.transitions.some((t) => t.ion === filter.ion)) return false;
  if (filter.nature && !hasNature(row, filter.nature)) return false;
  if (filter.probability && !hasProbability(row, filter.probability)) return false;
  const words = (filter.text ?? '').toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return true;
  const where = `${row.name?.label ?? ''} ${row.feature.centroid.toFixed(2)} ${row.note} ${row.printed.note}`.toLowerCase();
  return words.every((word) => where.includes(word));
}

function hasNature(row: DeskRow, nature: NonNullable<RowFilter['nature']>): boolean {
  if (nature === 'unnamed') return row.name === undefined;
  if (nature === 'thin-gas') return row.name?.transitions.some((t) => t.thinGas) ?? false;
  return row.name?.transitions.some((t) => t.nature === nature) ?? false;
}

function hasProbability(row: DeskRow, want: NonNullable<RowFilter['probability']>): boolean {
  const p = row.name?.probability ?? 0;
  if (want === 'sure') return p >= SURE;
  return want === 'likely' ? p >= LIKELY : p < LIKELY;
}
