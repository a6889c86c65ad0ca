import { COLUMNS, type Column, unitOf } from './columns.ts';
import type { LineTable } from './lineTable.ts';
import { tableFacts } from './tableFacts.ts';

/** Characters of one line of text in the head. */
const LINE = 80;
const RULE = '-'.repeat(LINE);
const DOUBLE_RULE = '='.repeat(LINE);

/** A column laid out: its cells padded to one width, with the Fortran format that reads them. */
interface Laid {
  readonly column: Column;
  readonly format: string;
  readonly cells: readonly string[];
  readonly width: number;
  readonly hasBlank: boolean;
}

/**
 * The table as a machine-readable table by the byte-by-byte convention of CDS and the AAS journals
 * (Standards for Astronomical Catalogues, version 2.0, Ochsenbein 2000): fixed columns, a head that describes them, blank = unknown.
 */
export function mrtTable(table: LineTable): string {
  const laid = COLUMNS.map((column) =>
    layColumn(
      column,
      table.rows.map((row) => plain(column.cell(row))),
    ),
  );
  let byte = 1;
  const description: string[] = [];
  for (const { column, format, width, hasBlank } of laid) {
    const bytes = width === 1 ? `${byte}`.padStart(9) : `${String(byte).padStart(4)}-${String(byte + width - 1).padStart(4)}`;
    const unit = (unitOf(column, table.fluxUnit, 'cds') || '---').replaceAll(' ', '.');
    const words = `${hasBlank ? '? ' : ''}${plain(column.meaning)}`;
    description.push(`${bytes} ${format.padEnd(7)} ${unit.padEnd(12)} ${column.key.padEnd(22)} ${words}`.trimEnd());
    byte += width + 1;
  }
  const rows = table.rows.map((_, r) => laid.map(({ cells }) => cells[r]).join(' '));
  return [
    `Title: Emission lines of ${plain(table.title)}`,
    'Authors: ',
    'Table: Line identifications',
    DOUBLE_RULE,
    'Byte-by-byte Description of file: lines.mrt',
    RULE,
    '   Bytes Format Units        Label                  Explanations',
    RULE,
    ...description,
    RULE,
    ...tableFacts(table).map(({ key, meaning, value }) => `Note: ${plain(key)} = ${plain(String(value))} (${plain(meaning)})`),
    RULE,
    ...rows,
    '',
  ].join('\n');
}

function layColumn(column: Column, texts: readonly string[]): Laid {
  const width = Math.max(1, ...texts.map((text) => text.length));
  const numeric = column.kind === 'integer' || column.kind === 'number';
  const cells = texts.map((text) => (numeric ? text.padStart(width) : text.padEnd(width)));
  return { column, cells, width, hasBlank: texts.includes('') || texts.length === 0, format: formatOf(column, texts, width) };
}

function formatOf(column: Column, texts: readonly string[], width: number): string {
  if (column.kind === 'integer') return `I${width}`;
  if (column.kind !== 'number') return `A${width}`;
  const places = Math.max(0, ...texts.map((text) => /\.(\d+)/.exec(text)?.[1].length ?? 0));
  return `${texts.some((text) => text.includes('e')) ? 'E' : 'F'}${width}.${places}`;
}

/** Fixed columns hold plain ASCII: other characters become a question mark. */
const plain = (text: string) => Array.from(text, (c) => (c >= ' ' && c <= '~' ? c : /\s/.test(c) ? ' ' : '?')).join('');
