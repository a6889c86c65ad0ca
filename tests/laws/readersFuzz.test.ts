import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ProblemError } from '../../src/problems/index.ts';
import { bytesSource, type ReadingChoices, readLineList, readSpectrum } from '../../src/readers/index.ts';

// Whatever the bytes, a read ends in a sound spectrum or in a ProblemError: more than 20 000 cases, from a fixed seed (printed on failure).
const SEED = 20_261_201;
const folder = fileURLToPath(new URL('../reference/fits/', import.meta.url));
const files = readdirSync(folder)
  .filter((name) => !/\.(py|json)$/.test(name))
  .sort()
  .map((name) => ({ name, bytes: new Uint8Array(readFileSync(folder + name)) }));

/** Sound = what `Spectrum` promises. */
async function endsWell(name: string, bytes: Uint8Array, choices: ReadingChoices = {}): Promise<'read' | 'refused'> {
  try {
    const { spectrum, how } = await readSpectrum(bytesSource(name, bytes), choices);
    const { wavelength, flux, fluxErr, masked } = spectrum;
    const n = wavelength.length;
    if (n < 2 || flux.length !== n || masked.length !== n || (fluxErr && fluxErr.length !== n) || how.length === 0)
      throw new Error(`unsound lengths: ${n} ${flux.length} ${masked.length}`);
    for (let i = 0; i < n; i++) {
      if (!(wavelength[i] > 0 && wavelength[i] < Number.POSITIVE_INFINITY) || (i > 0 && !(wavelength[i] > wavelength[i - 1])))
        throw new Error(`unsound wavelength ${wavelength[i]} at ${i}`);
      if (!masked[i] && (!Number.isFinite(flux[i]) || (fluxErr && !(fluxErr[i] > 0)))) throw new Error(`sample ${i} should be masked`);
    }
    return 'read';
  } catch (error) {
    if (!(error instanceof ProblemError)) throw error;
    const { code, found } = error.problem;
    if (!/^[a-z0-9-]+$/.test(code) || found === '') throw new Error(`a problem without words: ${code}`);
    return 'refused';
  }
}

/** Runs a property and returns how often files were read and refused. */
async function tally<T>(
  arbitrary: fc.Arbitrary<T>,
  runs: number,
  end: (made: T) => Promise<'read' | 'refused'>,
): Promise<{ read: number; refused: number }> {
  const ends = { read: 0, refused: 0 };
  await fc.assert(
    fc.asyncProperty(arbitrary, async (made) => {
      ends[await end(made)]++;
    }),
    { numRuns: runs, seed: SEED },
  );
  return ends;
}

const anyFile = fc.constantFrom(...files);
const anyChoices: fc.Arbitrary<ReadingChoices> = fc.record(
  {
    hdu: fc.integer({ min: 0, max: 6 }),
    row: fc.integer({ min: 1, max: 5 }),
    order: fc.integer({ min: 1, max: 5 }),
    band: fc.integer({ min: 1, max: 3 }),
    merge: fc.boolean(),
    fluxColumn: fc.constantFrom('FLUX', 'flux', '2', '3', 'ERR', 'nonsense'),
    wavelengthColumn: fc.constantFrom('WAVE', 'wavelength', '1', '2', 'nonsense'),
    errorColumn: fc.constantFrom('none', 'ERROR', '3'),
    errorMeaning: fc.constantFrom('sigma', 'variance', 'ivar', 'relative'),
    maskColumn: fc.constantFrom('none', '4', 'MASK'),
    wavelengthUnit: fc.constantFrom('Angstrom', 'nm', 'um', 'GHz', 'eV', 'log10 Angstrom'),
    medium: fc.constantFrom('air', 'vacuum'),
    missingValue: fc.constantFrom(-999, 0),
    velocityCorrectionKms: fc.constantFrom(0, 30.5, -12),
  },
  { requiredKeys: [] },
);

/** Bytes replaced, bits flipped, a piece cut out, doubled or cut off. */
const damages = fc.array(
  fc.oneof(
    fc.record({
      kind: fc.constant('put' as const),
      at: fc.double({ min: 0, max: 1, noNaN: true }),
      value: fc.integer({ min: 0, max: 255 }),
    }),
    fc.record({
      kind: fc.constant('flip' as const),
      at: fc.double({ min: 0, max: 1, noNaN: true }),
      value: fc.integer({ min: 0, max: 7 }),
    }),
    fc.record({
      kind: fc.constant('cut' as const),
      at: fc.double({ min: 0, max: 1, noNaN: true }),
      value: fc.integer({ min: 1, max: 400 }),
    }),
    fc.record({ kind: fc.constant('end' as const), at: fc.double({ min: 0, max: 1, noNaN: true }), value: fc.constant(0) }),
    fc.record({
      kind: fc.constant('double' as const),
      at: fc.double({ min: 0, max: 1, noNaN: true }),
      value: fc.integer({ min: 1, max: 400 }),
    }),
  ),
  { minLength: 1, maxLength: 6 },
);

function damage(bytes: Uint8Array, all: readonly { kind: string; at: number; value: number }[]): Uint8Array {
  let made = bytes.slice();
  for (const { kind, at, value } of all) {
    const place = Math.min(made.length - 1, Math.floor(at * made.length));
    if (made.length === 0) break;
    if (kind === 'put') made[place] = value;
    else if (kind === 'flip') made[place] ^= 1 << value;
    else if (kind === 'end') made = made.slice(0, place);
    else if (kind === 'cut') made = Uint8Array.from([...made.subarray(0, place), ...made.subarray(place + value)]);
    else made = Uint8Array.from([...made.subarray(0, place + value), ...made.subarray(place)]);
  }
  return made;
}

/** Header cards replaced by other values: sizes, formats, scalings that promise too much or nothing. */
const KEYWORDS =
  'NAXIS NAXIS1 NAXIS2 NAXIS3 BITPIX TFIELDS PCOUNT GCOUNT THEAP TFORM1 TFORM2 TFORM3 TTYPE1 TTYPE2 TUNIT1 TSCAL2 TZERO2 TNULL2 TBCOL1 TBCOL2 TDIM2 CTYPE1 CUNIT1 CRVAL1 CRPIX1 CDELT1 CD1_1 BSCALE BZERO BLANK DC-FLAG RESTWAV EXTNAME XTENSION SIMPLE END'.split(
    ' ',
  );
const VALUES =
  "0 1 -1 2 40 999999999999 1e308 -1e308 1E400 nan T F 'A' '' '0' 'D' '3D' '1PD(9)' '1QE(0)' '999999999D' '0X' '13X' 'WAVE' 'AWAV' 'WAVE-LOG' 'WAVE-F2W' 'FREQ' 'VELO' 'MULTISPE' 'LOG' 'um' 'Angstrom' 'km/s' 'FLUX' 'IVAR' 'BINTABLE' 'TABLE' 'IMAGE' 2147483648 -2147483648 3.5e3 1e-300".split(
    ' ',
  );
const cardChanges = fc.array(
  fc.record({ keyword: fc.constantFrom(...KEYWORDS), value: fc.constantFrom(...VALUES), which: fc.integer({ min: 0, max: 2 }) }),
  { minLength: 1, maxLength: 4 },
);

function changeCards(bytes: Uint8Array, changes: readonly { keyword: string; value: string; which: number }[]): Uint8Array {
  const made = bytes.slice();
  const text = new TextDecoder('latin1').decode(made);
  for (const { keyword, value, which } of changes) {
    const name = keyword.padEnd(8);
    let at = -1;
    let seen = 0;
    for (let c = 0; c + 80 <= text.length; c += 80) {
      if (!text.startsWith(name, c)) continue;
      at = c;
      if (seen++ === which) break;
    }
    if (at < 0) continue;
    const card = `${name}= ${value.padStart(20)}`.padEnd(80);
    for (let i = 0; i < 80; i++) made[at + i] = card.charCodeAt(i);
  }
  return made;
}

const cell = fc.oneof(
  { weight: 6, arbitrary: fc.double({ min: -1e6, max: 1e6, noNaN: true }).map(String) },
  { weight: 2, arbitrary: fc.integer({ min: 3000, max: 9000 }).map(String) },
  {
    weight: 1,
    arbitrary: fc.constantFrom(
      '',
      'nan',
      '-999',
      'inf',
      '1e999',
      '****',
      '"',
      "'",
      '1,5',
      'a b',
      '#',
      '5000.5D3',
      '1.2-101',
      '0x10',
      '\u0000',
      '\uFEFF',
      '\u2212 5',
      '--',
      '=1+1',
      '<td>',
      'NaN\r',
    ),
  },
);
const madeText = fc
  .record({
    head: fc.array(
      fc.constantFrom(
        '# wavelength [nm]',
        'wavelength,flux',
        'wave flux err',
        '# air wavelengths',
        '%ECSV',
        '# %ECSV 1.0',
        '# delimiter: ","',
        '# datatype:',
        '# - {name: flux, unit: "x',
        '| wave | flux |',
        '| a |',
        '\\key = 1',
        '',
        '   ',
        ',,,',
        ';;;',
        '# 1: wave',
        '# missing = -999',
        '<VOTABLE>',
        'x'.repeat(300),
      ),
      { maxLength: 4 },
    ),
    delimiter: fc.constantFrom(',', ';', '\t', ' ', '|', ', ', '  '),
    rows: fc.array(fc.array(cell, { maxLength: 5 }), { maxLength: 30 }),
    end: fc.constantFrom('\n', '\r\n', '\r', ''),
  })
  .map(({ head, delimiter, rows, end }) => [...head, ...rows.map((r) => r.join(delimiter))].join(end || '\n') + end);

const madeXml = fc
  .array(
    fc.constantFrom(
      '<?xml version="1.0"?>',
      '<VOTABLE>',
      '</VOTABLE>',
      '<TABLE>',
      '</TABLE>',
      '<FIELD name="wave" datatype="double" unit="nm"/>',
      '<FIELD name="flux" datatype="float"/>',
      '<FIELD name="flux" datatype="double" arraysize="*"/>',
      '<FIELD name="n" datatype="nonsense"/>',
      '<DATA><TABLEDATA>',
      '<TR><TD>500</TD><TD>1</TD></TR>',
      '<TR><TD>501</TD><TD>2</TD></TR>',
      '<TR><TD>',
      '</TD></TR>',
      '<TR/>',
      '<BINARY><STREAM encoding="base64">',
      '<BINARY2><STREAM>',
      'QH9AAAAAAAA/gAAA',
      '</STREAM></BINARY>',
      '<FITS><STREAM>U0lNUExF',
      '</STREAM></FITS>',
      '<![CDATA[',
      ']]>',
      '<!--',
      '-->',
      '&amp;',
      '&#99999999;',
      '&x;',
      '<!DOCTYPE a [<!ENTITY b "c">]>',
      '<',
      '>',
      '"',
      ' 5 6 7 ',
    ),
    { maxLength: 25 },
  )
  .map((parts) => `<VOTABLE>${parts.join('')}`);

describe('a read ends in a sound spectrum or in a ProblemError', () => {
  it('for 9000 files with damaged bytes', async () => {
    const ends = await tally(fc.tuple(anyFile, damages), 9000, ([file, what]) => endsWell(file.name, damage(file.bytes, what)));
    expect(ends.read).toBeGreaterThan(500);
    expect(ends.refused).toBeGreaterThan(100);
  });

  it('for 5000 files with other header cards', async () => {
    const fits = files.filter((f) => f.name.endsWith('.fits'));
    const ends = await tally(fc.tuple(fc.constantFrom(...fits), cardChanges), 5000, ([file, changes]) =>
      endsWell(file.name, changeCards(file.bytes, changes)),
    );
    expect(ends.read).toBeGreaterThan(500);
    expect(ends.refused).toBeGreaterThan(100);
  });

  it('for 2000 choices that fit or do not', async () => {
    const ends = await tally(fc.tuple(anyFile, anyChoices), 2000, ([file, choices]) => endsWell(file.name, file.bytes, choices));
    expect(ends.read).toBeGreaterThan(50);
    expect(ends.refused).toBeGreaterThan(100);
  });

  it('for 4000 made-up texts', async () => {
    const ends = await tally(madeText, 4000, (text) => endsWell('made.txt', new TextEncoder().encode(text)));
    expect(ends.read).toBeGreaterThan(200);
  });

  it('for 2000 made-up VOTables', async () => {
    const ends = await tally(madeXml, 2000, (text) => endsWell('made.vot', new TextEncoder().encode(text)));
    expect(ends.refused).toBeGreaterThan(100);
  });

  it('for 1500 strings of random bytes, packed or not, and the starts of every kind of file', async () => {
    const start = fc.constantFrom(
      '',
      'SIMPLE  =                    T',
      '<?xml version="1.0"?><VOTABLE>',
      '# %ECSV 1.0\n',
      'PK\u0003\u0004',
      '\u001f\u008b\u0008',
      '| a | b |\n',
    );
    await tally(fc.tuple(start, fc.uint8Array({ maxLength: 6000 }), fc.boolean()), 1500, ([head, tail, packed]) => {
      const bytes = Uint8Array.from([...Array.from(head, (c) => c.charCodeAt(0)), ...tail]);
      return endsWell('made', packed ? new Uint8Array(gzipSync(bytes)) : bytes);
    });
  });

  it('for 500 damaged gzip files', async () => {
    const packed = files.filter((f) => f.name === 'samples.fits.gz');
    await tally(fc.tuple(fc.constantFrom(...packed), damages), 500, ([file, what]) => endsWell(file.name, damage(file.bytes, what)));
  });

  it('for 1000 made-up lists of lines', async () => {
    await tally(madeText, 1000, async (text) => {
      try {
        const { wavelength, flux } = await readLineList(bytesSource('made.csv', new TextEncoder().encode(text)));
        if (wavelength.length !== flux.length || wavelength.some((w) => !(w > 0))) throw new Error('an unsound list');
        return 'read';
      } catch (error) {
        if (error instanceof ProblemError) return 'refused';
        throw error;
      }
    });
  });
});

describe('laws of reading', () => {
  it('numbers written in any usual form are read to the bit', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(fc.double({ min: -1e25, max: 1e25, noNaN: true }), { minLength: 2, maxLength: 20 }),
        fc.constantFrom('plain', 'exponent', 'digits'),
        async (values, form) => {
          const words = values.map((v) => (form === 'plain' ? String(v) : form === 'exponent' ? v.toExponential() : v.toPrecision(9)));
          const { spectrum } = await readSpectrum(
            bytesSource('made.csv', new TextEncoder().encode(`wavelength,flux\n${words.map((w, i) => `${5000 + i},${w}`).join('\n')}`)),
            {},
          );
          expect(Array.from(spectrum.flux)).toEqual(words.map(Number));
        },
      ),
      { numRuns: 500, seed: SEED },
    );
  });

  it('the order of rows does not matter', async () => {
    await fc.assert(
      fc.asyncProperty(fc.uniqueArray(fc.integer({ min: 3000, max: 9000 }), { minLength: 3, maxLength: 30 }), async (waves) => {
        const text = (list: readonly number[]) =>
          new TextEncoder().encode(`wavelength,flux\n${list.map((w) => `${w},${Math.sin(w)}`).join('\n')}`);
        const one = await readSpectrum(bytesSource('made.csv', text(waves)), {});
        const other = await readSpectrum(bytesSource('made.csv', text(waves.toSorted((a, b) => a - b))), {});
        expect(one.spectrum).toEqual(other.spectrum);
      }),
      { numRuns: 200, seed: SEED },
    );
  });
});
