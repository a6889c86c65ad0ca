import { ProblemError } from '../../problems/index.ts';
import { type Notes, warn } from '../notes.ts';
import type { ByteSource } from '../reading.ts';
import { MOST_SAMPLES, viewOf } from './binaryTable.ts';
import type { Hdu } from './hdus.ts';
import { numberOf } from './header.ts';
import { decode, letterOfBitpix } from './numbers.ts';

/** Lines that lie apart in the file are read in pieces of this many bytes. */
const SLICE = 1 << 22;

/**
 * Samples along one axis of an image, BSCALE, BZERO and BLANK applied.
 *
 * @param axis number of the axis, from 1; `at` = places on all axes from 0 (that of `axis` is not used)
 * @throws ProblemError when the file ends before the samples, or BITPIX is none of the standard's
 */
export async function imageLine(source: ByteSource, hdu: Hdu, axis: number, at: readonly number[], notes: Notes): Promise<Float64Array> {
  const letter = letterOfBitpix(hdu.bitpix);
  const where = { file: notes.file, hdu: hdu.index };
  if (!letter)
    throw new ProblemError({
      code: 'bad-bitpix',
      where: { ...where, column: 'BITPIX' },
      found: `BITPIX = ${hdu.bitpix}`,
      expected: '8, 16, 32, 64, -32 or -64',
      doThis: 'Fetch the file again, or ask its maker.',
    });
  const size = Math.abs(hdu.bitpix) / 8;
  const n = hdu.axes[axis - 1] ?? 0;
  if (n > MOST_SAMPLES)
    throw new ProblemError({
      code: 'too-many-samples',
      where,
      found: `${n} samples`,
      expected: `at most ${MOST_SAMPLES}`,
      doThis: 'Cut the spectrum to the range you need.',
    });
  const strides = hdu.axes.map((_, k) => hdu.axes.slice(0, k).reduce((a, b) => a * b, size));
  const start = at.reduce((sum, place, k) => sum + (k === axis - 1 ? 0 : place * strides[k]), 0);
  const stride = strides[axis - 1];
  const inFile = Math.max(0, Math.min(n, Math.floor((hdu.dataBytes - start - size) / stride) + 1));
  if (inFile < Math.min(2, n))
    throw new ProblemError({
      code: 'image-cut',
      where: { ...where, byte: hdu.dataStart + hdu.dataBytes },
      found: 'the file ends before these samples',
      expected: `${n} samples`,
      doThis: 'Fetch the file again: it is cut.',
    });
  if (inFile < n)
    warn(notes, 'image-cut', `the header promises ${n} samples, but the file holds only ${inFile} of them; the rest is missing`, {
      where: { hdu: hdu.index },
      doThis: 'Fetch the file again: it is cut.',
    });
  const blank = hdu.bitpix > 0 ? numberOf(hdu.header, 'BLANK') : undefined;
  const scaling = {
    scale: numberOf(hdu.header, 'BSCALE') ?? 1,
    zero: numberOf(hdu.header, 'BZERO') ?? 0,
    ...(blank !== undefined ? { blank } : {}),
  };
  const values = new Float64Array(n).fill(Number.NaN);
  const atOnce = Math.max(1, Math.floor(SLICE / stride));
  for (let from = 0; from < inFile; from += atOnce) {
    const to = Math.min(inFile, from + atOnce);
    const first = hdu.dataStart + start + from * stride;
    const bytes = await source.read(first, first + (to - from - 1) * stride + size);
    const whole = Math.min(to - from, Math.floor((bytes.length - size) / stride) + 1);
    if (whole > 0) decode(viewOf(bytes), 0, stride, whole, letter, scaling, values, from);
  }
  return values;
}
