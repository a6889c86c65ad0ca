import { COLUMNS, type Column, unitOf } from './columns.ts';
import type { LineTable } from './lineTable.ts';
import { tableFacts } from './tableFacts.ts';

const BLOCK = 2880;
const CARD = 80;

/** A column with its place in a row of the binary table. */
interface Field {
  readonly column: Column;
  /** TFORM: `1D`, `12A`, `1J`, `1L`. */
  readonly form: string;
  readonly bytes: number;
  readonly texts: readonly string[];
}

/**
 * The table as FITS: an empty primary array, then one binary table (FITS Standard 4.0, section 7.3). Unknown numbers are NaN, unknown words blank, unknown booleans a
 * zero byte.
 */
export function fitsTable(table: LineTable): Uint8Array<ArrayBuffer> {
  const fields = COLUMNS.map((column) => fieldOf(column, table));
  const rowBytes = fields.reduce((sum, { bytes }) => sum + bytes, 0);
  const primary = header([card('SIMPLE', true, 'conforms to FITS standard'), card('BITPIX', 8), card('NAXIS', 0), card('EXTEND', true)]);
  const extension = header([
    card('XTENSION', 'BINTABLE', 'binary table'),
    card('BITPIX', 8),
    card('NAXIS', 2),
    card('NAXIS1', rowBytes, 'bytes in a row'),
    card('NAXIS2', table.rows.length, 'rows'),
    card('PCOUNT', 0),
    card('GCOUNT', 1),
    card('TFIELDS', fields.length),
    ...fields.flatMap((field, k) => fieldCards(field, k + 1, table.fluxUnit)),
    card('EXTNAME', 'LINES'),
    ...factCards(table),
  ]);
  const data = new Uint8Array(Math.ceil((rowBytes * table.rows.length) / BLOCK) * BLOCK);
  const view = new DataView(data.buffer);
  table.rows.forEach((_, row) => {
    let at = row * rowBytes;
    for (const field of fields) {
      writeCell(view, data, at, field, field.texts[row]);
      at += field.bytes;
    }
  });
  const whole = new Uint8Array(primary.length + extension.length + data.length);
  whole.set(primary);
  whole.set(extension, primary.length);
  whole.set(data, primary.length + extension.length);
  return whole;
}

function fieldOf(column: Column, table: LineTable): Field {
  const texts = table.rows.map((row) => ascii(column.cell(row)));
  if (column.kind === 'number') return { column, form: '1D', bytes: 8, texts };
  if (column.kind === 'integer') return { column, form: '1J', bytes: 4, texts };
  if (column.kind === 'boolean') return { column, form: '1L', bytes: 1, texts };
  const width = Math.max(1, ...texts.map((text) => text.length));
  return { column, form: `${width}A`, bytes: width, texts };
}

function writeCell(view: DataView, data: Uint8Array, at: number, { column, bytes }: Field, text: string): void {
  if (column.kind === 'number') view.setFloat64(at, text === '' ? Number.NaN : Number(text));
  else if (column.kind === 'integer') view.setInt32(at, Number(text));
  else if (column.kind === 'boolean') data[at] = text === '' ? 0 : text === 'true' ? 'T'.charCodeAt(0) : 'F'.charCodeAt(0);
  else for (let i = 0; i < bytes; i++) data[at + i] = i < text.length ? text.charCodeAt(i) : 32;
}

function fieldCards({ column, form }: Field, k: number, fluxUnit: string): string[] {
  const unit = ascii(unitOf(column, fluxUnit, 'fits'));
  return [
    card(`TTYPE${k}`, column.key, ascii(column.meaning)),
    card(`TFORM${k}`, form),
    ...(unit ? [card(`TUNIT${k}`, unit)] : []),
    ...(column.ucd ? [card(`TUCD${k}`, column.ucd)] : []),
  ];
}

/** Facts under their long names by the HIERARCH convention, which every reader of tables knows; long texts are cut, the other formats hold them whole. */
function factCards(table: LineTable): string[] {
  return tableFacts(table).flatMap(({ key, value }) => {
    const name = `HIERARCH LINES ${key.toUpperCase()}`;
    const text =
      typeof value === 'number'
        ? numberText(value)
        : `'${ascii(value)
            .replaceAll("'", "''")
            .slice(0, CARD - name.length - 5)}'`;
    return [`${name} = ${text}`.padEnd(CARD).slice(0, CARD)];
  });
}

function card(key: string, value: string | number | boolean, comment = ''): string {
  const text =
    typeof value === 'boolean'
      ? (value ? 'T' : 'F').padStart(20)
      : typeof value === 'number'
        ? numberText(value).padStart(20)
        : `'${value.replaceAll("'", "''").padEnd(8)}'`.padEnd(20);
  return `${key.padEnd(8)}= ${text}${comment ? ` / ${comment}` : ''}`.padEnd(CARD).slice(0, CARD);
}

const numberText = (value: number) => (Number.isInteger(value) ? String(value) : value.toExponential().toUpperCase());

function header(cards: readonly string[]): Uint8Array {
  const text = [...cards, 'END'.padEnd(CARD)].join('');
  const bytes = new Uint8Array(Math.ceil(text.length / BLOCK) * BLOCK).fill(32);
  for (let i = 0; i < text.length; i++) bytes[i] = text.charCodeAt(i);
  return bytes;
}

/** FITS texts are ASCII: other characters become a question mark. */
const ascii = (text: string) => Array.from(text, (c) => (c >= ' ' && c <= '~' ? c : /\s/.test(c) ? ' ' : '?')).join('');
