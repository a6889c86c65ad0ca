import { decimals, significant } from './columns.ts';
import type { RowChoice, TableDesign } from './design.ts';
import { type Inline, type InlineText, ionInline } from './inline.ts';
import type { LineRow, LineTable } from './lineTable.ts';
import { PAPER_COLUMNS } from './paperColumns.ts';

/** A table as it will be printed: finished heads, cells and notes; LaTeX and the preview are two ways to set it. */
export interface PaperTable {
  readonly caption: string;
  readonly columns: readonly {
    readonly key: string;
    readonly head: InlineText;
    readonly unit: InlineText;
    readonly align: 'left' | 'right';
  }[];
  /** `part`: a further part of the blend above. */
  readonly rows: readonly { readonly kind: 'line' | 'part'; readonly feature: number; readonly cells: readonly InlineText[] }[];
  /** Table notes by their letters. */
  readonly notes: readonly { readonly mark: string; readonly text: string }[];
  /** Sentences below the table. */
  readonly remarks: readonly InlineText[];
}

/** The rows that a choice takes, in the order asked for. */
export function chosenRows(table: LineTable, { rows, order }: Pick<TableDesign, 'rows' | 'order'>): LineRow[] {
  const kept = table.rows.filter((row) => isChosen(row, rows));
  if (order === 'flux') return kept.sort((a, b) => b.flux - a.flux);
  if (order === 'ion') return kept.sort((a, b) => compareIons(a.ion, b.ion) || a.wavelengthObs - b.wavelengthObs);
  return kept.sort((a, b) => a.wavelengthObs - b.wavelengthObs);
}

function isChosen(row: LineRow, choice: RowChoice): boolean {
  if (row.verdict === 'accepted') return true;
  if (row.verdict === 'artefact' || row.artefact) return false;
  if (choice === 'accepted') return false;
  if (choice === 'accepted-and-unidentified') return row.verdict === 'unidentified';
  return choice === 'all' || row.ion !== undefined;
}

/** Names without brackets, the nameless last. */
function compareIons(a: string | undefined, b: string | undefined): number {
  const key = (ion: string | undefined) => (ion ?? '\uffff').replaceAll(/[[\]]/g, '');
  return key(a) < key(b) ? -1 : key(a) > key(b) ? 1 : 0;
}

/** The table by its design. */
export function paperTable(table: LineTable, design: TableDesign): PaperTable {
  const rows = chosenRows(table, design);
  const columns = design.columns.map((key) => PAPER_COLUMNS[key]);
  const notes = [...new Set(rows.map((row) => row.note).filter((note) => note !== ''))].map((text, k) => ({ mark: letter(k), text }));
  const marked = new Map(notes.map(({ mark, text }) => [text, mark]));
  const cellsOf = (row: LineRow): InlineText[] =>
    columns.map((column) => {
      const mark = marked.get(row.note);
      return column.key === 'note' ? (mark ? [{ sup: mark } satisfies Inline] : []) : column.cell(row, design);
    });
  return {
    caption: design.caption ?? `Emission lines of ${table.title}`,
    columns: columns.map(({ key, align, head, unit }) => ({ key, align, head: head(design, table), unit: unit(design, table) })),
    rows: rows.flatMap((row) => [
      { kind: 'line' as const, feature: row.feature, cells: cellsOf(design.blends === 'a-row-each' ? firstPart(row) : row) },
      ...(design.blends === 'a-row-each' ? furtherParts(row, design) : []),
    ]),
    notes: design.columns.includes('note') ? notes : [],
    remarks: remarksOf(table, design, rows),
  };
}

/** A blend's first part with all that was measured. */
function firstPart(row: LineRow): LineRow {
  const parts = row.ion?.split('+') ?? [];
  return parts.length > 1 ? { ...row, ion: parts[0], wavelengthLab: row.wavelengthLab?.slice(0, 1) } : row;
}

/** The other parts: a name and a laboratory wavelength each, under the flux of the first. */
function furtherParts(row: LineRow, design: TableDesign): { kind: 'part'; feature: number; cells: InlineText[] }[] {
  const parts = row.ion?.split('+').slice(1) ?? [];
  return parts.map((ion, k) => ({
    kind: 'part' as const,
    feature: row.feature,
    cells: design.columns.map((key): InlineText => {
      if (key === 'ion') return ionInline(ion);
      if (key === 'laboratory') return [decimals(row.wavelengthLab?.[k + 1], 2)];
      return key === 'flux' ? ['*'] : [];
    }),
  }));
}

function remarksOf(table: LineTable, design: TableDesign, rows: readonly LineRow[]): InlineText[] {
  const remarks: InlineText[] = [
    [`Wavelengths in ${table.medium === 'air' ? 'standard air' : 'vacuum'}${table.mediumStated ? '' : ' (assumed)'}.`],
  ];
  if (design.columns.includes('criticalDensity'))
    remarks.push(['Critical densities at ', { sign: 'T' }, { sub: 'e' }, ` = ${significant(table.te, 3)} K.`]);
  if (design.columns.includes('ion') && rows.some((row) => row.thinGas))
    remarks.push([{ sup: '○' }, ' marks lines of a metastable upper level, which need low density.']);
  if (design.columns.includes('flux') && design.blends === 'a-row-each' && rows.some((row) => row.ion?.includes('+')))
    remarks.push(['An asterisk marks parts of a blend: the flux is in the row above.']);
  if (rows.some((row) => row.verdict === 'open'))
    remarks.push(['Names that were not accepted by the authors are proposals of the program.']);
  return remarks;
}

/** a, b, ... z, aa, ab ... */
const letter = (k: number): string => (k < 26 ? String.fromCharCode(97 + k) : letter(Math.floor(k / 26) - 1) + letter(k % 26));
