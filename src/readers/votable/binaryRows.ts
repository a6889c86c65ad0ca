import { ProblemError } from '../../problems/index.ts';
import { isArray, isText, type VoField } from './tables.ts';

/** Rows of binary data: single numbers by field, arrays by field and row. */
export interface BinaryRows {
  readonly rows: number;
  readonly scalars: readonly number[][];
  readonly arrays: readonly (readonly Float64Array[])[];
}

const BYTES: Readonly<Record<string, number>> = {
  boolean: 1,
  bit: 1,
  unsignedByte: 1,
  short: 2,
  int: 4,
  long: 8,
  char: 1,
  unicodeChar: 2,
  float: 4,
  double: 8,
  floatComplex: 8,
  doubleComplex: 16,
};

/**
 * Decodes a BINARY or BINARY2 stream (VOTable 1.5, sections 5.3 and 5.4). BINARY2 puts one bit a field before each row: set = missing.
 *
 * @throws ProblemError for unknown types, or data that end inside a row
 */
export function binaryRows(bytes: Uint8Array, fields: readonly VoField[], hasFlags: boolean, file: string): BinaryRows {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const scalars: number[][] = fields.map(() => []);
  const arrays: Float64Array[][] = fields.map(() => []);
  const flagBytes = hasFlags ? Math.ceil(fields.length / 8) : 0;
  let at = 0;
  let rows = 0;
  const need = (count: number) => {
    if (count < 0 || at + count > bytes.length)
      throw new ProblemError({
        code: 'table-cut',
        where: { file, row: rows + 1, byte: at },
        found: 'binary data that end inside a row',
        expected: 'whole rows',
        doThis: 'Fetch the file again: it is cut or damaged.',
      });
  };
  while (at < bytes.length) {
    const start = at;
    need(flagBytes);
    const flags = bytes.subarray(at, at + flagBytes);
    at += flagBytes;
    fields.forEach((field, k) => {
      const size = BYTES[field.datatype];
      if (!size)
        throw new ProblemError({
          code: 'unknown-datatype',
          where: { file, column: field.name },
          found: `a field of datatype "${field.datatype}"`,
          expected: 'one of the types of VOTable',
          doThis: 'Fetch the table as TABLEDATA.',
        });
      let count = fixedCount(field);
      if (count === undefined) {
        need(4);
        count = view.getInt32(at);
        at += 4;
      }
      const length = field.datatype === 'bit' ? Math.ceil(count / 8) : count * size;
      need(length);
      const isMissing = hasFlags && ((flags[k >> 3] >> (7 - (k & 7))) & 1) === 1;
      if (!isText(field)) {
        if (isArray(field))
          arrays[k].push(
            Float64Array.from({ length: field.datatype === 'bit' ? 0 : count }, (_, i) =>
              isMissing ? Number.NaN : valueAt(view, at + i * size, field),
            ),
          );
        else scalars[k].push(isMissing ? Number.NaN : valueAt(view, at, field));
      }
      at += length;
    });
    rows++;
    if (at === start) break;
  }
  return { rows, scalars, arrays };
}

/** Values in a cell; undefined where the data say it. */
function fixedCount({ arraysize }: VoField): number | undefined {
  if (arraysize === '') return 1;
  if (arraysize.includes('*')) return undefined;
  return arraysize.split('x').reduce((product, n) => product * (Number(n) || 0), 1);
}

function valueAt(view: DataView, at: number, { datatype, nullValue }: VoField): number {
  switch (datatype) {
    case 'double':
      return view.getFloat64(at);
    case 'float':
      return view.getFloat32(at);
    case 'boolean': {
      const byte = view.getUint8(at) | 32;
      return byte === 116 || byte === 49 ? 1 : byte === 102 || byte === 48 ? 0 : Number.NaN;
    }
    default: {
      const value =
        datatype === 'int'
          ? view.getInt32(at)
          : datatype === 'short'
            ? view.getInt16(at)
            : datatype === 'long'
              ? Number(view.getBigInt64(at))
              : datatype === 'unsignedByte' || datatype === 'bit'
                ? view.getUint8(at)
                : Number.NaN;
      return value === nullValue ? Number.NaN : value;
    }
  }
}
