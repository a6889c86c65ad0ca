import { ProblemError } from '../../problems/index.ts';
import type { NumberColumn } from '../columns.ts';
import type { ByteSource, ReadingChoices } from '../reading.ts';
import { type Hdu, numberCard, textCard } from './cards.ts';

/** An image row with its wavelength axis, linear or log-linear (FITS 4.0 section 8; Greisen et al. 2006, A&A 446, 747; DC-FLAG = 1 and CTYPE LOG... mean log10). */
export async function imageColumns(
  source: ByteSource,
  hdu: Hdu,
  choices: ReadingChoices,
): Promise<{ columns: NumberColumn[]; what: string; rows: number }> {
  const n = numberCard(hdu, 'NAXIS1') ?? 0;
  const rows = numberCard(hdu, 'NAXIS2') ?? 1;
  const row = (choices.row ?? 1) - 1;
  if (row >= rows)
    throw new ProblemError({
      code: 'no-such-row',
      where: { file: source.name, hdu: hdu.index, row: row + 1 },
      found: `no row ${row + 1}`,
      expected: `1 to ${rows}`,
    });
  const bitpix = numberCard(hdu, 'BITPIX') ?? 8;
  const bytesEach = Math.abs(bitpix) / 8;
  const start = hdu.dataStart + row * n * bytesEach;
  const bytes = await source.read(start, start + n * bytesEach);
  if (bytes.length < n * bytesEach) {
    throw new ProblemError({
      code: 'file-cut',
      where: { file: source.name, hdu: hdu.index, byte: start + bytes.length },
      found: 'the file ends within its samples',
      expected: `${n} samples`,
      doThis: 'The file is cut: copy it once more.',
    });
  }
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const scale = numberCard(hdu, 'BSCALE') ?? 1;
  const zero = numberCard(hdu, 'BZERO') ?? 0;
  const blank = numberCard(hdu, 'BLANK');
  const flux = Float64Array.from({ length: n }, (_, i) => {
    const raw = rawAt(view, i * bytesEach, bitpix);
    return bitpix > 0 && raw === blank ? Number.NaN : raw * scale + zero;
  });
  const wavelength = axis(hdu, n);
  const unit = textCard(hdu, 'CUNIT1') || (isLog(hdu) ? 'Angstrom' : '');
  return {
    columns: [
      { name: 'wavelength', unit, values: wavelength },
      { name: 'flux', unit: textCard(hdu, 'BUNIT'), values: flux },
    ],
    what: `image with a ${isLog(hdu) ? 'log-linear' : 'linear'} wavelength axis`,
    rows,
  };
}

const isLog = (hdu: Hdu) =>
  numberCard(hdu, 'DC-FLAG') === 1 || /^(log|wave-log|awav-log)/i.test(textCard(hdu, 'CTYPE1')) || /log/i.test(textCard(hdu, 'WFITTYPE'));

function axis(hdu: Hdu, n: number): Float64Array {
  const value = numberCard(hdu, 'CRVAL1') ?? 0;
  const step = numberCard(hdu, 'CDELT1') ?? numberCard(hdu, 'CD1_1') ?? 1;
  const pixel = numberCard(hdu, 'CRPIX1') ?? 1;
  // the standard's logarithmic axis (WAVE-LOG) is exponential about the reference value; the older convention stores log10
  const standardLog = /-log/i.test(textCard(hdu, 'CTYPE1'));
  return Float64Array.from({ length: n }, (_, i) => {
    const along = (i + 1 - pixel) * step;
    if (standardLog) return value * Math.exp(along / value);
    return isLog(hdu) ? 10 ** (value + along) : value + along;
  });
}

function rawAt(view: DataView, at: number, bitpix: number): number {
  switch (bitpix) {
    case 8:
      return view.getUint8(at);
    case 16:
      return view.getInt16(at);
    case 32:
      return view.getInt32(at);
    case 64:
      return Number(view.getBigInt64(at));
    case -32:
      return view.getFloat32(at);
    default:
      return view.getFloat64(at);
  }
}
