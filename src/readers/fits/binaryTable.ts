import { ProblemError } from '../../problems/index.ts';
import type { NumberColumn } from '../columns.ts';
import type { ByteSource } from '../reading.ts';
import { type Hdu, numberCard, textCard } from './cards.ts';

/** One field of a binary table, FITS 4.0 section 7.3. */
export interface TableField {
  readonly name: string;
  readonly unit: string;
  /** Letter of TFORM: L X B I J K A E D C M P Q. */
  readonly type: string;
  /** Values in one cell. */
  readonly repeat: number;
  /** Bytes from the start of a row. */
  readonly offset: number;
  readonly scale: number;
  readonly zero: number;
  readonly null?: number;
}

const BYTES: Readonly<Record<string, number>> = { L: 1, B: 1, I: 2, J: 4, K: 8, A: 1, E: 4, D: 8, C: 8, M: 16, P: 8, Q: 16 };
const NUMERIC = 'BIJKED';
/** Bytes read at once. */
const CHUNK = 1 << 24;
/** Samples a spectrum may have: beyond, the memory of a browser ends. */
const MOST_SAMPLES = 50_000_000;

/** The fields of a table. @throws ProblemError where a TFORM cannot be understood or the fields do not fill the row */
export function tableFields(file: string, hdu: Hdu): TableField[] {
  const count = numberCard(hdu, 'TFIELDS') ?? 0;
  const fields: TableField[] = [];
  let offset = 0;
  for (let k = 1; k <= count; k++) {
    const form = textCard(hdu, `TFORM${k}`);
    const match = /^(\d*)([LXBIJKAEDCMPQ])/.exec(form);
    if (!match)
      throw new ProblemError({
        code: 'bad-tform',
        where: { file, hdu: hdu.index, column: k },
        found: `TFORM${k} = '${form}'`,
        expected: 'a count and one of the letters L X B I J K A E D C M P Q',
      });
    const repeat = match[1] === '' ? 1 : Number(match[1]);
    const type = match[2];
    fields.push({
      name: textCard(hdu, `TTYPE${k}`),
      unit: textCard(hdu, `TUNIT${k}`),
      type,
      repeat,
      offset,
      scale: numberCard(hdu, `TSCAL${k}`) ?? 1,
      zero: numberCard(hdu, `TZERO${k}`) ?? 0,
      null: numberCard(hdu, `TNULL${k}`),
    });
    offset += type === 'X' ? Math.ceil(repeat / 8) : repeat * BYTES[type];
  }
  const width = numberCard(hdu, 'NAXIS1') ?? 0;
  if (offset !== width)
    throw new ProblemError({
      code: 'row-width',
      where: { file, hdu: hdu.index },
      found: `fields of ${offset} bytes in rows of ${width}`,
      expected: 'NAXIS1 equal to the width of all fields',
    });
  return fields;
}

export const isNumeric = (field: TableField) => NUMERIC.includes(field.type) && field.repeat > 0;

/** One sample a row: the first value of each numeric scalar field of every row. */
export async function scalarColumns(
  source: ByteSource,
  hdu: Hdu,
  fields: readonly TableField[],
  progress?: (share: number) => void,
  signal?: AbortSignal,
): Promise<NumberColumn[]> {
  const rows = numberCard(hdu, 'NAXIS2') ?? 0;
  const width = numberCard(hdu, 'NAXIS1') ?? 0;
  const wanted = fields.filter((f) => isNumeric(f) && f.repeat === 1);
  checkLength(source, hdu, rows * width);
  if (rows > MOST_SAMPLES)
    throw new ProblemError({
      code: 'too-many-rows',
      where: { file: source.name, hdu: hdu.index },
      found: `${rows} rows`,
      expected: `at most ${MOST_SAMPLES}`,
    });
  const columns = wanted.map((field) => ({ name: field.name, unit: field.unit, values: new Float64Array(rows) }));
  const rowsAtOnce = Math.max(1, Math.floor(CHUNK / Math.max(1, width)));
  for (let from = 0; from < rows; from += rowsAtOnce) {
    signal?.throwIfAborted();
    progress?.(from / rows);
    const to = Math.min(rows, from + rowsAtOnce);
    const bytes = await source.read(hdu.dataStart + from * width, hdu.dataStart + to * width);
    const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    wanted.forEach((field, c) => {
      const { values } = columns[c];
      for (let r = from; r < to; r++) values[r] = valueAt(view, (r - from) * width + field.offset, field);
    });
  }
  return columns;
}

/** One spectrum in a row: every numeric field whose cell holds as many values as the longest. */
export async function vectorColumns(source: ByteSource, hdu: Hdu, fields: readonly TableField[], row: number): Promise<NumberColumn[]> {
  const width = numberCard(hdu, 'NAXIS1') ?? 0;
  checkLength(source, hdu, (row + 1) * width);
  const longest = Math.max(...fields.filter(isNumeric).map((f) => f.repeat));
  const wanted = fields.filter((f) => isNumeric(f) && f.repeat === longest);
  const start = hdu.dataStart + row * width;
  const bytes = await source.read(start, start + width);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  return wanted.map((field) => ({
    name: field.name,
    unit: field.unit,
    values: Float64Array.from({ length: longest }, (_, i) => valueAt(view, field.offset + i * BYTES[field.type], field)),
  }));
}

function checkLength(source: ByteSource, hdu: Hdu, needed: number): void {
  if (hdu.dataStart + needed <= source.size) return;
  throw new ProblemError({
    code: 'file-cut',
    where: { file: source.name, hdu: hdu.index, byte: source.size },
    found: `the file ends after ${source.size} bytes`,
    expected: `${hdu.dataStart + needed}, as its header promises`,
    doThis: 'The file is cut: copy it once more.',
  });
}

function valueAt(view: DataView, at: number, field: TableField): number {
  const raw = rawAt(view, at, field.type);
  if (field.null !== undefined && raw === field.null && field.type !== 'E' && field.type !== 'D') return Number.NaN;
  return field.scale === 1 && field.zero === 0 ? raw : raw * field.scale + field.zero;
}

function rawAt(view: DataView, at: number, type: string): number {
  switch (type) {
    case 'B':
      return view.getUint8(at);
    case 'I':
      return view.getInt16(at);
    case 'J':
      return view.getInt32(at);
    case 'K':
      return Number(view.getBigInt64(at));
    case 'E':
      return view.getFloat32(at);
    default:
      return view.getFloat64(at);
  }
}
