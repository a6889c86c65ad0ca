import { ProblemError } from '../../problems/index.ts';
import type { Column } from '../columns.ts';
import { type Notes, warn } from '../notes.ts';
import type { ByteSource, ReadingControl } from '../reading.ts';
import type { Hdu } from './hdus.ts';
import { commentOf, type Header, numberOf, textOf } from './header.ts';
import { decode, LETTER_BYTES, type Scaling } from './numbers.ts';

/** One field of a binary table (FITS 4.0, section 7.3). */
export interface Field {
  /** From 1. */
  readonly number: number;
  readonly name: string;
  readonly unit: string;
  readonly ucd: string;
  readonly utype: string;
  readonly description: string;
  /** Letter of the values; for P and Q that of the values in the heap. */
  readonly letter: string;
  /** P or Q: a cell holds count and place of values in the heap. */
  readonly pointer?: 'P' | 'Q';
  /** Values a cell holds; for P and Q 0 or 1 pointers. */
  readonly repeat: number;
  /** Byte in the row. */
  readonly offset: number;
  readonly scaling: Scaling;
}

/** A binary table with the rows that are really in the file. */
export interface BinaryTable {
  readonly hdu: Hdu;
  readonly fields: readonly Field[];
  readonly rowBytes: number;
  readonly rows: number;
}

export const MOST_SAMPLES = 50_000_000;
/** Bytes read at once, and bytes of a table kept at most while its columns are read. */
const SLICE = 1 << 24;
const KEPT = 1 << 27;
const MOST_FIELDS = 999;
/** Longer names are cut: they are damage. */
export const LONGEST_NAME = 100;

/** The fields of a table. @throws ProblemError where a TFORM means nothing or the fields are longer than the rows */
export function openBinaryTable(hdu: Hdu, notes: Notes): BinaryTable {
  const { header, axes, dataBytes } = hdu;
  const where = { file: notes.file, hdu: hdu.index };
  const rowBytes = axes[0] ?? 0;
  const promisedRows = axes[1] ?? 0;
  const fields: Field[] = [];
  let offset = 0;
  const tfields = Math.min(numberOf(header, 'TFIELDS') ?? 0, MOST_FIELDS);
  for (let k = 1; k <= tfields; k++) {
    const form = textOf(header, `TFORM${k}`);
    const match = /^\s*(\d{0,10})([LXBIJKAEDCMPQ])\s*([A-Z])?/.exec(form.toUpperCase());
    if (!match) {
      throw new ProblemError({
        code: 'bad-tform',
        where: { ...where, column: k, excerpt: form.slice(0, 60) },
        found: `TFORM${k} is ${form === '' ? 'missing' : `'${form}'`}`,
        expected: 'a count and one of the letters L X B I J K A E D C M P Q',
        doThis: 'Fetch the file again, or ask its maker.',
      });
    }
    const repeat = match[1] === '' ? 1 : Number(match[1]);
    const letter = match[2];
    const pointer = letter === 'P' || letter === 'Q' ? letter : undefined;
    fields.push({
      number: k,
      name: textOf(header, `TTYPE${k}`).slice(0, LONGEST_NAME),
      unit: textOf(header, `TUNIT${k}`),
      ucd: textOf(header, `TUCD${k}`),
      utype: textOf(header, `TUTYP${k}`),
      description: textOf(header, `TCOMM${k}`) || textOf(header, `TDESC${k}`) || commentOf(header, `TTYPE${k}`),
      letter: pointer ? (match[3] ?? 'B') : letter,
      ...(pointer ? { pointer } : {}),
      repeat: pointer ? Math.min(repeat, 1) : repeat,
      offset,
      scaling: scalingOf(header, k),
    });
    offset += letter === 'X' ? Math.ceil(repeat / 8) : repeat * LETTER_BYTES[letter];
  }
  if (offset > rowBytes) {
    throw new ProblemError({
      code: 'row-too-short',
      where,
      found: `the columns need ${offset} bytes a row, but NAXIS1 gives ${rowBytes}`,
      expected: 'a row as long as its columns',
      doThis: 'Fetch the file again, or ask its maker.',
    });
  }
  const rows = rowBytes === 0 ? 0 : Math.min(promisedRows, Math.floor(dataBytes / rowBytes));
  if (rows < promisedRows) {
    warn(notes, 'table-cut', `the header promises ${promisedRows} rows, but the file holds only ${rows}`, {
      where: { hdu: hdu.index },
      doThis: 'Fetch the file again: it is cut.',
    });
  }
  return { hdu, fields, rowBytes, rows };
}

function scalingOf(header: Header, k: number): Scaling {
  const blank = numberOf(header, `TNULL${k}`);
  return { scale: numberOf(header, `TSCAL${k}`) ?? 1, zero: numberOf(header, `TZERO${k}`) ?? 0, ...(blank !== undefined ? { blank } : {}) };
}

const kindOf = ({ letter, scaling }: Field): Column['kind'] =>
  letter === 'L' ? 'logical' : 'BIJK'.includes(letter) ? (scaling.scale === 1 ? 'whole' : 'real') : 'ED'.includes(letter) ? 'real' : 'text';

/** Columns with one value a row: one row is one sample. */
export function scalarColumns(table: BinaryTable, source: ByteSource, control: ReadingControl, file: string): Column[] {
  const { hdu, rows, rowBytes, fields } = table;
  if (rows > MOST_SAMPLES) throw tooMany(rows, file, hdu.index);
  const total = rows * rowBytes;
  let kept: Promise<Uint8Array> | undefined;
  const slice = async (from: number, to: number) => {
    if (total > KEPT) return source.read(hdu.dataStart + from * rowBytes, hdu.dataStart + to * rowBytes);
    kept ??= source.read(hdu.dataStart, hdu.dataStart + total);
    return (await kept).subarray(from * rowBytes, to * rowBytes);
  };
  const rowsAtOnce = Math.max(1, Math.floor(SLICE / Math.max(1, rowBytes)));
  return fields.map((field) => ({
    ...words(field),
    kind: field.repeat === 1 && !field.pointer ? kindOf(field) : 'text',
    samples: rows,
    read: async () => {
      const values = new Float64Array(rows).fill(Number.NaN);
      for (let from = 0; from < rows; from += rowsAtOnce) {
        control.signal?.throwIfAborted();
        const to = Math.min(rows, from + rowsAtOnce);
        const bytes = await slice(from, to);
        const whole = Math.min(to - from, Math.floor(bytes.length / rowBytes));
        decode(viewOf(bytes), field.offset, rowBytes, whole, field.letter, field.scaling, values, from);
        control.progress?.(to / rows);
      }
      return values;
    },
  }));
}

/** Columns of the cells of one row (from 1): the row is a spectrum. Single numbers are columns of one sample. Cells are read when asked for. */
export async function rowColumns(table: BinaryTable, source: ByteSource, row: number, file: string): Promise<Column[]> {
  const { hdu, rowBytes, fields } = table;
  const start = hdu.dataStart + (row - 1) * rowBytes;
  const columns: Column[] = [];
  for (const field of fields) {
    if (field.pointer) {
      const pointer = await source.read(start + field.offset, start + field.offset + LETTER_BYTES[field.pointer] * field.repeat);
      columns.push(heapColumn(table, field, viewOf(pointer), source, file, row));
    } else columns.push(cellColumn(field, start, source, file, { hdu: hdu.index, row }));
  }
  return columns;
}

function cellColumn(field: Field, rowStart: number, source: ByteSource, file: string, at: { hdu: number; row: number }): Column {
  const { letter, scaling, repeat, offset } = field;
  return {
    ...words(field),
    kind: kindOf(field),
    samples: repeat,
    read: async () => {
      if (repeat > MOST_SAMPLES) throw tooMany(repeat, file, at.hdu);
      const size = LETTER_BYTES[letter];
      const bytes = await source.read(rowStart + offset, rowStart + offset + repeat * size);
      if (bytes.length < repeat * size) throw cut(file, at.hdu, at.row);
      const values = new Float64Array(repeat);
      decode(viewOf(bytes), 0, size, repeat, letter, scaling, values, 0);
      return values;
    },
  };
}

function heapColumn(table: BinaryTable, field: Field, pointer: DataView, source: ByteSource, file: string, row: number): Column {
  const { hdu, rowBytes } = table;
  const wide = field.pointer === 'Q';
  const has = field.repeat === 1 && pointer.byteLength >= (wide ? 16 : 8);
  const n = has ? (wide ? Number(pointer.getBigInt64(0)) : pointer.getInt32(0)) : 0;
  const place = has ? (wide ? Number(pointer.getBigInt64(8)) : pointer.getInt32(4)) : 0;
  const heap = numberOf(hdu.header, 'THEAP') ?? rowBytes * (hdu.axes[1] ?? 0);
  const size = LETTER_BYTES[field.letter] ?? 1;
  const isSound =
    n >= 0 && place >= 0 && Number.isSafeInteger(n) && Number.isSafeInteger(place) && heap >= 0 && heap + place + n * size <= hdu.dataBytes;
  return {
    ...words(field),
    kind: kindOf(field),
    samples: isSound ? n : 0,
    read: async () => {
      if (!isSound) {
        throw new ProblemError({
          code: 'bad-heap-pointer',
          where: { file, hdu: hdu.index, column: field.name || field.number, row },
          found: `a cell that points to ${n} values at byte ${place} of the heap`,
          expected: 'values inside the data of the table',
          doThis: 'Fetch the file again: it is cut or damaged.',
        });
      }
      if (n > MOST_SAMPLES) throw tooMany(n, file, hdu.index);
      const start = hdu.dataStart + heap + place;
      const bytes = await source.read(start, start + n * size);
      const values = new Float64Array(n).fill(Number.NaN);
      decode(viewOf(bytes), 0, size, Math.floor(bytes.length / size), field.letter, field.scaling, values, 0);
      return values;
    },
  };
}

function words({ name, number, unit, ucd, utype, description }: Field) {
  return {
    name: name || String(number),
    unit,
    ...(ucd ? { ucd } : {}),
    ...(utype ? { utype } : {}),
    ...(description ? { description } : {}),
  };
}

/** The text in a cell of letters, e.g. the name of an object. */
export async function textCell(table: BinaryTable, source: ByteSource, field: Field, row: number): Promise<string> {
  const start = table.hdu.dataStart + (row - 1) * table.rowBytes + field.offset;
  const bytes = await source.read(start, start + Math.min(field.repeat, 80));
  return new TextDecoder('latin1').decode(bytes).replace(/\0.*$/s, '').trim();
}

export const viewOf = (bytes: Uint8Array) => new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);

const tooMany = (n: number, file: string, hdu: number) =>
  new ProblemError({
    code: 'too-many-samples',
    where: { file, hdu },
    found: `${n} samples`,
    expected: `at most ${MOST_SAMPLES}`,
    doThis: 'Cut the spectrum to the range you need.',
  });

const cut = (file: string, hdu: number, row: number) =>
  new ProblemError({
    code: 'table-cut',
    where: { file, hdu, row },
    found: 'the file ends inside this row',
    expected: 'the whole row',
    doThis: 'Fetch the file again: it is cut.',
  });
