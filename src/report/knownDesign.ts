import { DEFAULT_DESIGN, type PaperColumnKey, type TableDesign } from './design.ts';
import { PAPER_COLUMNS } from './paperColumns.ts';

const CHOICES = {
  rows: ['accepted', 'accepted-and-unidentified', 'named', 'all'],
  scale: ['as-measured', 'hbeta100', 'dereddened'],
  errorDigits: [1, 2],
  blends: ['one-row', 'a-row-each'],
  order: ['wavelength', 'ion', 'flux'],
} as const satisfies { readonly [Key in keyof TableDesign]?: readonly TableDesign[Key][] };

/**
 * A design as this release knows it: a session file may hold one of another release, or one that was edited. Columns and choices that are not known are left to the
 * default; without a known column all of the default's are taken.
 */
export function knownDesign(stored: { readonly [Key in keyof TableDesign]?: unknown } | undefined): TableDesign {
  if (!stored) return DEFAULT_DESIGN;
  const asked: readonly unknown[] = Array.isArray(stored.columns) ? stored.columns : [];
  const columns = [...new Set(asked)].filter((key): key is PaperColumnKey => typeof key === 'string' && Object.hasOwn(PAPER_COLUMNS, key));
  return {
    columns: columns.length > 0 ? columns : DEFAULT_DESIGN.columns,
    rows: one(CHOICES.rows, stored.rows, DEFAULT_DESIGN.rows),
    scale: one(CHOICES.scale, stored.scale, DEFAULT_DESIGN.scale),
    errorDigits: one(CHOICES.errorDigits, stored.errorDigits, DEFAULT_DESIGN.errorDigits),
    blends: one(CHOICES.blends, stored.blends, DEFAULT_DESIGN.blends),
    order: one(CHOICES.order, stored.order, DEFAULT_DESIGN.order),
    ...(typeof stored.caption === 'string' && stored.caption !== '' ? { caption: stored.caption } : {}),
  };
}

const one = <Choice>(choices: readonly Choice[], asked: unknown, otherwise: Choice): Choice =>
  choices.find((choice) => choice === asked) ?? otherwise;
