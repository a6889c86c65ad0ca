import { ProblemError } from '../../problems/index.ts';
import type { Column } from '../columns.ts';
import { type Notes, warn } from '../notes.ts';
import type { ByteSource, ReadingControl } from '../reading.ts';
import { numberInWords } from '../text/parseNumber.ts';
import { LONGEST_NAME, MOST_SAMPLES } from './binaryTable.ts';
import type { Hdu } from './hdus.ts';
import { numberOf, textOf } from './header.ts';

const SLICE = 1 << 22;
const MOST_FIELDS = 999;

/** The columns of an ASCII table (FITS 4.0, section 7.2). Blank fields are taken as missing. @throws ProblemError for a bad TFORM */
export function asciiColumns(hdu: Hdu, source: ByteSource, control: ReadingControl, notes: Notes): Column[] {
  const { header, axes, dataBytes, dataStart } = hdu;
  const rowBytes = axes[0] ?? 0;
  const rows = rowBytes === 0 ? 0 : Math.min(axes[1] ?? 0, Math.floor(dataBytes / rowBytes), MOST_SAMPLES);
  if (rows < (axes[1] ?? 0))
    warn(notes, 'table-cut', `the header promises ${axes[1]} rows, but the file holds only ${rows}`, {
      where: { hdu: hdu.index },
      doThis: 'Fetch the file again: it is cut.',
    });
  return Array.from({ length: Math.min(numberOf(header, 'TFIELDS') ?? 0, MOST_FIELDS) }, (_, j): Column => {
    const k = j + 1;
    const form = textOf(header, `TFORM${k}`).toUpperCase();
    const match = /^([AIFED])(\d+)(?:\.(\d+))?/.exec(form);
    const from = (numberOf(header, `TBCOL${k}`) ?? 0) - 1;
    if (!match || from < 0) {
      throw new ProblemError({
        code: 'bad-tform',
        where: { file: notes.file, hdu: hdu.index, column: k },
        found: `TFORM${k} = '${form.slice(0, 40)}', TBCOL${k} = ${from + 1}`,
        expected: 'one of the letters A I F E D with a width, and a first column from 1 on',
        doThis: 'Fetch the file again, or ask its maker.',
      });
    }
    const width = Number(match[2]);
    const decimals = match[1] === 'I' ? 0 : Number(match[3] ?? 0);
    const scale = numberOf(header, `TSCAL${k}`) ?? 1;
    const zero = numberOf(header, `TZERO${k}`) ?? 0;
    const blank = textOf(header, `TNULL${k}`);
    const value = (cell: string) => {
      if (cell === '' || (blank !== '' && cell === blank)) return Number.NaN;
      const number = numberInWords(cell, false) ?? Number.NaN;
      // Fw.d without a point: the last d digits are decimals
      const stored = decimals > 0 && !cell.includes('.') && !/[ed]/i.test(cell) ? number / 10 ** decimals : number;
      return scale === 1 && zero === 0 ? stored : stored * scale + zero;
    };
    return {
      name: textOf(header, `TTYPE${k}`).slice(0, LONGEST_NAME) || String(k),
      unit: textOf(header, `TUNIT${k}`),
      ...(textOf(header, `TUCD${k}`) ? { ucd: textOf(header, `TUCD${k}`) } : {}),
      kind: match[1] === 'A' ? 'text' : match[1] === 'I' && scale === 1 ? 'whole' : 'real',
      samples: rows,
      read: async () => {
        const values = new Float64Array(rows).fill(Number.NaN);
        const atOnce = Math.max(1, Math.floor(SLICE / rowBytes));
        for (let first = 0; first < rows; first += atOnce) {
          control.signal?.throwIfAborted();
          const last = Math.min(rows, first + atOnce);
          const text = new TextDecoder('latin1').decode(await source.read(dataStart + first * rowBytes, dataStart + last * rowBytes));
          for (let r = first; r < last; r++)
            values[r] = value(text.slice((r - first) * rowBytes + from, (r - first) * rowBytes + Math.min(from + width, rowBytes)).trim());
          control.progress?.(last / rows);
        }
        return values;
      },
    };
  });
}
