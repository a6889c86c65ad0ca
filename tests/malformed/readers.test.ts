import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { ProblemError } from '../../src/problems/index.ts';
import { bytesSource, type ReadingChoices, readSpectrum } from '../../src/readers/index.ts';

const folder = fileURLToPath(new URL('../reference/fits/', import.meta.url));
const fixture = (name: string) => new Uint8Array(readFileSync(folder + name));
const bytesOf = (text: string) => Uint8Array.from(text, (c) => c.charCodeAt(0));
const headerOf = (cards: readonly string[]) =>
  [...cards, 'END']
    .map((c) => c.padEnd(80))
    .join('')
    .padEnd(2880);

/** Code and words of the problem a read must end in. */
async function problemOf(bytes: Uint8Array | string, choices: ReadingChoices = {}) {
  const error = await readSpectrum(bytesSource('made', typeof bytes === 'string' ? bytesOf(bytes) : bytes), choices).catch(
    (e: unknown) => e,
  );
  if (!(error instanceof ProblemError)) throw new Error(`no problem, but ${String(error)}`);
  return error.problem;
}

const EMPTY_PRIMARY = headerOf(['SIMPLE  =                    T', 'BITPIX  =                    8', 'NAXIS   =                    0']);
const image = (...cards: string[]) =>
  headerOf([
    'SIMPLE  =                    T',
    'BITPIX  =                  -32',
    'NAXIS   =                    1',
    'NAXIS1  =                   40',
    ...cards,
  ]) + '\0'.repeat(2880);
const table = (...cards: string[]) =>
  EMPTY_PRIMARY + headerOf(["XTENSION= 'BINTABLE'", 'BITPIX  =                    8', 'NAXIS   =                    2', ...cards]);

describe('what cannot be read is refused with its reason', () => {
  for (const [what, bytes, code] of [
    ['an empty file', '', 'empty-file'],
    ['blanks only', '  \n\n  \n', 'empty-file'],
    ['a letter', 'Dear colleague,\nplease find attached the spectrum.\n', 'no-table'],
    ['one column', '5000\n5001\n5002\n', 'no-table'],
    ['a web page', '<!DOCTYPE html><html><body>log in</body></html>', 'web-page'],
    ['other XML', '<?xml version="1.0"?><svg><path/></svg>', 'foreign-format'],
    ['broken XML', '<?xml version="1.0"?><VOTABLE><TABLE', 'broken-xml'],
    ['a VOTable without tables', '<VOTABLE version="1.4"></VOTABLE>', 'no-table'],
    ['a zip archive', 'PK\u0003\u0004xxxxxx', 'foreign-format'],
    ['a PDF', '%PDF-1.4 ...', 'foreign-format'],
    ['a picture', '\u0089PNG\r\n', 'foreign-format'],
    ['HDF5', '\u0089HDF\r\n', 'foreign-format'],
    ['zero bytes', '\0'.repeat(5000), 'not-text'],
    ['a cut gzip', gzipSync(bytesOf('5000 1\n5001 2\n'.repeat(500))).subarray(0, 40), 'damaged-gzip'],
    ['gzip of nothing', gzipSync(new Uint8Array()), 'empty-file'],
    ['a FITS header without end', 'SIMPLE  =                    T'.padEnd(80), 'broken-header'],
    ['a FITS header of binary noise', `${'SIMPLE  =                    T'.padEnd(80)}${'\u0001'.repeat(5000)}`, 'broken-header'],
    ['FITS without data', EMPTY_PRIMARY, 'no-spectrum'],
    ['an image without wavelengths', image(), 'no-spectrum'],
    [
      'an image of the sky',
      image("CTYPE1  = 'RA---TAN'", 'CRVAL1  =                 10.0', 'CDELT1  =                  0.1'),
      'no-spectrum',
    ],
    [
      'a velocity axis without rest wavelength',
      image("CTYPE1  = 'VELO'", "CUNIT1  = 'km/s'", 'CRVAL1  =                  0.0', 'CDELT1  =                  1.0'),
      'velocity-axis',
    ],
    ['an axis of pixels', image('CRVAL1  =                  1.0', 'CDELT1  =                  1.0'), 'no-spectrum'],
    [
      'a look-up axis',
      image("CTYPE1  = 'WAVE-TAB'", "CUNIT1  = 'm'", 'CRVAL1  =                  1.0', 'CDELT1  =                  1.0'),
      'unknown-axis-algorithm',
    ],
    [
      'a table without rows',
      table(
        'NAXIS1  =                   16',
        'NAXIS2  =                    0',
        'TFIELDS =                    2',
        "TFORM1  = 'D'",
        "TFORM2  = 'D'",
      ),
      'no-spectrum',
    ],
    [
      'a column of no known form',
      table('NAXIS1  =                   16', 'NAXIS2  =                    1', 'TFIELDS =                    1', "TFORM1  = 'Z9'"),
      'bad-tform',
    ],
    [
      'columns longer than the row',
      table('NAXIS1  =                    8', 'NAXIS2  =                    1', 'TFIELDS =                    1', "TFORM1  = '99D'"),
      'row-too-short',
    ],
    ['text after SIMPLE', `SIMPLE = yes\n5000 1\n`, 'broken-header'],
    ['wavelengths that are all missing', 'wave flux\nnan 1\nnan 2\nnan 3\n', 'unknown-wavelength-unit'],
  ] as const) {
    it(what, async () => {
      const problem = await problemOf(bytes);
      expect(problem.code).toBe(code);
      expect(problem.where.file).toBe('made');
      expect(problem.doThis ?? problem.expected).toBeTruthy();
    });
  }

  it('names the unit, row, order and column that is not there, and what is', async () => {
    expect((await problemOf(fixture('rows.fits'), { row: 4 })).expected).toBe('rows 1 to 3');
    expect((await problemOf(fixture('rows.fits'), { hdu: 7 })).code).toBe('no-such-hdu');
    expect((await problemOf(fixture('rows.fits'), { hdu: 0 })).code).toBe('no-spectrum');
    expect((await problemOf(fixture('stack.fits'), { row: 9 })).code).toBe('no-such-row');
    expect((await problemOf(fixture('samples.fits'), { fluxColumn: 'FLUXX' })).expected).toContain('FLUX');
  });

  it('says of every unit why it holds no spectrum', async () => {
    const problem = await problemOf(image());
    expect(problem.found).toContain('CRVAL1');
  });
});

describe('what is damaged in part is read as far as it goes, with a warning', () => {
  it('a table cut in the middle', async () => {
    const bytes = fixture('samples.fits');
    const { spectrum, remarks } = await readSpectrum(bytesSource('cut.fits', bytes.subarray(0, bytes.length - 2880 + 300)), {});
    expect(spectrum.wavelength.length).toBe(10);
    expect(remarks.map((r) => r.code)).toContain('table-cut');
  });

  it('an image cut in the middle', async () => {
    const { spectrum, remarks } = await readSpectrum(bytesSource('cut.fits', fixture('wave.fits').subarray(0, 2880 + 80)), {});
    expect(spectrum.masked.join('')).toBe('0'.repeat(20) + '1'.repeat(20));
    expect(remarks.map((r) => r.code)).toContain('image-cut');
  });

  it('a card that means nothing, and a unit after the last that is none', async () => {
    const plain = image(
      "CTYPE1  = 'WAVE'",
      "CUNIT1  = 'Angstrom'",
      'CRVAL1  =               5000.0',
      'CDELT1  =                  1.0',
      'AIRMASS = 1.2 and more',
      'OBJECT  no value',
    );
    const { remarks, spectrum } = await readSpectrum(bytesSource('odd.fits', bytesOf(`${plain}left over bytes`)), {});
    expect(spectrum.wavelength[0]).toBe(5000);
    expect(remarks.map((r) => r.code)).toContain('unreadable-cards');
  });
});
