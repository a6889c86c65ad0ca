import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { gunzip } from '../../src/readers/gunzip.ts';
import { type ByteSource, bytesSource, readSpectrum } from '../../src/readers/index.ts';

const headerOf = (cards: readonly string[]) =>
  [...cards, 'END']
    .map((c) => c.padEnd(80))
    .join('')
    .padEnd(Math.ceil((cards.length + 1) / 36) * 2880);
const bytesOf = (text: string) => Uint8Array.from(text, (c) => c.charCodeAt(0));

/** A file of any size whose bytes are made where they are read; counts them. */
function virtualFile(size: number, parts: readonly { at: number; bytes: Uint8Array }[]): ByteSource & { readonly taken: () => number } {
  let taken = 0;
  return {
    name: 'huge.fits',
    size,
    taken: () => taken,
    read: async (start, end) => {
      const made = new Uint8Array(Math.max(0, Math.min(end, size) - start));
      taken += made.length;
      for (const { at, bytes } of parts) {
        const from = Math.max(start, at);
        const to = Math.min(start + made.length, at + bytes.length);
        if (to > from) made.set(bytes.subarray(from - at, to - at), from - start);
      }
      return made;
    },
  };
}

const PRIMARY = headerOf(['SIMPLE  =                    T', 'BITPIX  =                    8', 'NAXIS   =                    0']);
const spectrumUnit = () => {
  const header = headerOf([
    "XTENSION= 'IMAGE'",
    'BITPIX  =                  -64',
    'NAXIS   =                    1',
    'NAXIS1  =                  100',
    "CTYPE1  = 'WAVE'",
    "CUNIT1  = 'Angstrom'",
    'CRVAL1  =               5000.0',
    'CDELT1  =                  1.0',
  ]);
  const bytes = new Uint8Array(header.length + 2880);
  bytes.set(bytesOf(header));
  const view = new DataView(bytes.buffer);
  for (let i = 0; i < 100; i++) view.setFloat64(header.length + i * 8, i + 0.5);
  return bytes;
};

describe('huge files cost only what is shown', () => {
  it('a spectrum behind two gigabytes of other data', async () => {
    const other = headerOf([
      "XTENSION= 'IMAGE'",
      'BITPIX  =                  -32',
      'NAXIS   =                    2',
      'NAXIS1  =                20000',
      'NAXIS2  =                25000',
    ]);
    const dataBytes = Math.ceil((20_000 * 25_000 * 4) / 2880) * 2880;
    const last = PRIMARY.length + other.length + dataBytes;
    const unit = spectrumUnit();
    const file = virtualFile(last + unit.length, [
      { at: 0, bytes: bytesOf(PRIMARY) },
      { at: PRIMARY.length, bytes: bytesOf(other) },
      { at: last, bytes: unit },
    ]);
    const { spectrum } = await readSpectrum(file, {});
    expect(spectrum.wavelength.length).toBe(100);
    expect(file.taken()).toBeLessThan(300_000);
  });

  it('a table that promises terabytes gives the rows that are there', async () => {
    const header = headerOf([
      "XTENSION= 'BINTABLE'",
      'BITPIX  =                    8',
      'NAXIS   =                    2',
      'NAXIS1  =                   16',
      'NAXIS2  =        1000000000000',
      'PCOUNT  =                    0',
      'GCOUNT  =                    1',
      'TFIELDS =                    2',
      "TTYPE1  = 'WAVE'",
      "TFORM1  = 'D'",
      "TTYPE2  = 'FLUX'",
      "TFORM2  = 'D'",
    ]);
    const bytes = new Uint8Array(PRIMARY.length + header.length + 160);
    bytes.set(bytesOf(PRIMARY + header));
    const view = new DataView(bytes.buffer);
    for (let i = 0; i < 10; i++) {
      view.setFloat64(PRIMARY.length + header.length + i * 16, 5000 + i);
      view.setFloat64(PRIMARY.length + header.length + i * 16 + 8, i + 0.5);
    }
    const { spectrum, remarks } = await readSpectrum(bytesSource('huge.fits', bytes), { hdu: 1 });
    expect(spectrum.wavelength.length).toBe(10);
    expect(remarks.map((r) => r.code)).toContain('table-cut');
  });

  it('a row of two gigabytes is read by its cells', async () => {
    const header = headerOf([
      "XTENSION= 'BINTABLE'",
      'BITPIX  =                    8',
      'NAXIS   =                    2',
      'NAXIS1  =           2000001600',
      'NAXIS2  =                    1',
      'PCOUNT  =                    0',
      'GCOUNT  =                    1',
      'TFIELDS =                    3',
      "TTYPE1  = 'JUNK'",
      "TFORM1  = '2000000000B'",
      "TTYPE2  = 'WAVE'",
      "TFORM2  = '100D'",
      "TUNIT2  = 'Angstrom'",
      "TTYPE3  = 'FLUX'",
      "TFORM3  = '100D'",
    ]);
    const cells = new Uint8Array(1600);
    const view = new DataView(cells.buffer);
    for (let i = 0; i < 100; i++) {
      view.setFloat64(i * 8, 5000 + i);
      view.setFloat64(800 + i * 8, i + 0.5);
    }
    const start = PRIMARY.length + header.length;
    const file = virtualFile(start + 2_000_001_600, [
      { at: 0, bytes: bytesOf(PRIMARY + header) },
      { at: start + 2_000_000_000, bytes: cells },
    ]);
    const { spectrum } = await readSpectrum(file, {});
    expect(spectrum.flux[99]).toBe(99.5);
    expect(file.taken()).toBeLessThan(300_000);
  });

  it('unpacking stops at its limit', async () => {
    const packed = new Uint8Array(gzipSync(new Uint8Array(5_000_000)));
    await expect(gunzip(bytesSource('bomb.gz', packed), {}, 1_000_000)).rejects.toThrow(/unpacks to more than 1 MB/);
  });

  it('an endless line is refused', async () => {
    await expect(readSpectrum(bytesSource('line.txt', bytesOf(`5000 1\n5001 2\n${'5'.repeat(6_000_000)}`)), {})).rejects.toThrow(
      /a line of more than/,
    );
  });

  it('lines of one long word or many brackets take no more than their length', async () => {
    for (const odd of [
      'x'.repeat(200_000),
      '('.repeat(200_000),
      ' '.repeat(200_000),
      'in '.repeat(60_000),
      '1'.repeat(200_000),
      '(a)'.repeat(60_000),
    ]) {
      const { spectrum } = await readSpectrum(
        bytesSource('odd.txt', bytesOf(`# wavelength flux ${odd}\nwave flux\n5000 1\n5001 2\n5002 3\n`)),
        {},
      );
      expect(spectrum.wavelength.length).toBe(3);
    }
  });
});
