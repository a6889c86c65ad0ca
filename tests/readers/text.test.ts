import { describe, expect, it } from 'vitest';
import { ProblemError } from '../../src/problems/index.ts';
import { bytesSource, type Reading, type ReadingChoices, readSpectrum } from '../../src/readers/index.ts';

const read = (text: string, choices: ReadingChoices = {}) => readSpectrum(bytesSource('made.txt', new TextEncoder().encode(text)), choices);
const codes = ({ remarks }: Reading) => remarks.map((r) => r.code);

/** What a reading shows: wavelengths | fluxes | errors, medium, masked samples. */
function shown({ spectrum: { wavelength, flux, fluxErr, masked, medium } }: Reading): string {
  const list = (values: ArrayLike<number>) => Array.from(values, (v) => Number(v.toPrecision(12))).join(' ');
  return [list(wavelength), list(flux), fluxErr ? list(fluxErr) : '-', medium, masked.join('')].join(' | ');
}

const COMMAS = 'wavelength,flux,flux_err\n5000,1,0.1\n5001,2,0.2\n5002,3,0.3\n';
const SAME = '5000 5001 5002 | 1 2 3 | 0.1 0.2 0.3 | air | 000';

describe('the same spectrum is read from every dialect', () => {
  for (const [what, text] of [
    ['commas', COMMAS],
    ['CRLF', COMMAS.replaceAll('\n', '\r\n')],
    ['old Mac line ends', COMMAS.replaceAll('\n', '\r')],
    ['no line end at the end', COMMAS.trim()],
    ['semicolons', COMMAS.replaceAll(',', ';')],
    ['tabs', COMMAS.replaceAll(',', '\t')],
    ['blanks', COMMAS.replaceAll(',', '   ')],
    ['blanks before the rows', COMMAS.replaceAll(',', ' ').replaceAll('\n', '\n   ')],
    ['commas and blanks', COMMAS.replaceAll(',', ' , ')],
    ['bars', COMMAS.replaceAll(',', ' | ')],
    ['quotes', '"wavelength","flux","flux_err"\n"5000","1","0.1"\n"5001","2","0.2"\n"5002","3","0.3"\n'],
    ['decimal commas', 'wavelength;flux;flux_err\n5000,0;1,0;0,1\n5001,0;2,0;0,2\n5002,0;3,0;0,3\n'],
    ['decimal commas between blanks', '5000,0 1,0 0,1\n5001,0 2,0 0,2\n5002,0 3,0 0,3\n'],
    ['a byte-order mark', `\uFEFF${COMMAS}`],
    ['comments of many kinds', `# a\n% b\n! c\n; d\n// e\n${COMMAS}`],
    ['comments between and after the rows', `${COMMAS.replace('5001', '# aside\n5001')}# the end\n`],
    ['names in a comment', `# wavelength flux flux_err\n5000 1 0.1\n5001 2 0.2\n5002 3 0.3\n`],
    ['no names', '5000 1 0.1\n5001 2 0.2\n5002 3 0.3\n'],
    ['numbered comments', '# 1: wavelength [A]\n# 2: flux\n# 3: flux error\n5000 1 0.1\n5001 2 0.2\n5002 3 0.3\n'],
    ['Fortran exponents', 'wave flux err\n5.000D3 1.D0 1.0d-1\n5.001D3 2.D0 2.0d-1\n5.002D3 3.D0 3.0d-1\n'],
    ['a delimiter at the end of lines', 'wavelength,flux,flux_err,\n5000,1,0.1,\n5001,2,0.2,\n5002,3,0.3,\n'],
    ['other columns before', 'id,star,wavelength,sky,flux,flux_err\n1,a b,5000,7,1,0.1\n2,a b,5001,7,2,0.2\n3,a b,5002,7,3,0.3\n'],
    ['empty lines', `\n\n${COMMAS.replaceAll('\n', '\n\n')}`],
    ['names and units in two lines', 'wavelength flux flux_err\nAngstrom Jy Jy\n5000 1 0.1\n5001 2 0.2\n5002 3 0.3\n'],
    ['nanometres in the name', 'wavelength_nm,flux,flux_err\n500,1,0.1\n500.1,2,0.2\n500.2,3,0.3\n'],
    ['nanometres in brackets', 'wave [nm],flux [Jy],err [Jy]\n500,1,0.1\n500.1,2,0.2\n500.2,3,0.3\n'],
    ['brackets and blanks', 'wave [nm]  flux [erg/s/cm2/A]  err [erg/s/cm2/A]\n500 1 0.1\n500.1 2 0.2\n500.2 3 0.3\n'],
    ['micrometres in a comment', '# wavelength in microns\nwave flux err\n0.5 1 0.1\n0.5001 2 0.2\n0.5002 3 0.3\n'],
    [
      'an IPAC table',
      '\\comment = x\n| wavelength | flux | flux_err |\n| double | double | double |\n| Angstrom | Jy | Jy |\n 5000 1 0.1\n 5001 2 0.2\n 5002 3 0.3\n',
    ],
    ['inverse variance', 'wavelength,flux,ivar\n5000,1,100\n5001,2,25\n5002,3,11.1111111111111\n'],
    ['variance', 'wavelength,flux,variance\n5000,1,0.01\n5001,2,0.04\n5002,3,0.09\n'],
    ['falling wavelengths', 'wavelength,flux,flux_err\n5002,3,0.3\n5001,2,0.2\n5000,1,0.1\n'],
    ['any order', 'wavelength,flux,flux_err\n5001,2,0.2\n5000,1,0.1\n5002,3,0.3\n'],
  ] as const) {
    it(what, async () => expect(shown(await read(text))).toBe(SAME));
  }

  it('UTF-16 with and without a byte-order mark', async () => {
    const units = Uint8Array.from(Array.from(COMMAS).flatMap((c) => [c.charCodeAt(0), 0]));
    for (const bytes of [Uint8Array.from([0xff, 0xfe, ...units]), units])
      expect(shown(await readSpectrum(bytesSource('made.txt', bytes), {}))).toBe(SAME);
    const swapped = Uint8Array.from(Array.from(COMMAS).flatMap((c) => [0, c.charCodeAt(0)]));
    expect(shown(await readSpectrum(bytesSource('made.txt', Uint8Array.from([0xfe, 0xff, ...swapped])), {}))).toBe(SAME);
  });
});

describe('units of the spectral axis are turned into Angstrom', () => {
  for (const [what, text, low] of [
    ['GHz', 'frequency_GHz,flux\n599584.916,1\n599000,2\n', 5000],
    ['log10', 'loglam flux\n3.69897000433602 1\n3.7 2\n', 5000],
    ['log unit', 'wave [log(Angstrom)] flux\n3.69897000433602 1\n3.7 2\n', 5000],
    ['eV', 'energy(eV),flux\n2.479683968664005,1\n2.4,2\n', 5000],
    ['wavenumber', 'wavenumber [cm-1],flux\n20000,1\n19000,2\n', 5000],
    ['0.1nm', 'wave [0.1nm],flux\n5000,1\n5001,2\n', 5000],
    ['metres', 'wave [m],flux\n5e-7,1\n5.1e-7,2\n', 5000],
  ] as const) {
    it(what, async () => {
      const reading = await read(text);
      expect(reading.spectrum.wavelength[0]).toBeCloseTo(low, 6);
      if (!what.startsWith('log') && !what.startsWith('0') && what !== 'metres') expect(reading.spectrum.medium).toBe('vacuum');
    });
  }

  it('a bare unit that puts the numbers nowhere is asked for, not guessed', async () => {
    await expect(read('wavelength,flux\n1e-3,1\n2e-3,2\n3e-3,2\n')).rejects.toThrow(/unit/);
  });

  it('a guessed unit is remarked on and can be overruled', async () => {
    const text = 'wavelength,flux\n500,1\n501,2\n502,3\n';
    expect(codes(await read(text))).toContain('unit-assumed');
    expect((await read(text)).spectrum.wavelength[0]).toBe(5000);
    expect((await read(text, { wavelengthUnit: 'Angstrom' })).spectrum.wavelength[0]).toBe(500);
  });
});

describe('air or vacuum comes from the file, else it is assumed aloud', () => {
  for (const [line, medium] of [
    ['# air wavelengths in Angstrom', 'air'],
    ['# wavelengths are in vacuum', 'vacuum'],
    ['# Wavelength (vac)', 'vacuum'],
    ['# wavelengths converted from air to vacuum', 'vacuum'],
    ['# wavelengths converted from vacuum to air', 'air'],
    ['# AIRORVAC = vac', 'vacuum'],
  ] as const) {
    it(line, async () => {
      const reading = await read(`${line}\n${COMMAS}`);
      expect([reading.mediumStated, reading.spectrum.medium]).toEqual([true, medium]);
    });
  }

  it('column names say it too', async () => {
    expect((await read('wave_vac,flux\n5000,1\n5001,2\n')).spectrum.medium).toBe('vacuum');
    expect((await read('lambda_air,flux\n5000,1\n5001,2\n')).spectrum.medium).toBe('air');
  });

  it('an air mass is no air', async () => {
    for (const line of ['# AIRMASS = 1.95', '# airmass 1.2, wavelength in Angstrom', '# vacuum pump on'])
      expect((await read(`${line}\n${COMMAS}`)).mediumStated).toBe(false);
  });

  it('what contradicts itself is not taken', async () => {
    const reading = await read(`# air wavelengths\n# vacuum wavelengths\n${COMMAS}`);
    expect(reading.mediumStated).toBe(false);
    expect(codes(reading)).toContain('medium-contradiction');
  });

  it("the user's word counts, with a warning where the file says otherwise", async () => {
    const reading = await read(`# air wavelengths\n${COMMAS}`, { medium: 'vacuum' });
    expect([reading.mediumStated, reading.spectrum.medium]).toEqual([true, 'vacuum']);
    expect(codes(reading)).toContain('medium-contradicts-file');
  });
});

describe('missing and odd samples are masked and counted', () => {
  it('words for missing values', async () => {
    const reading = await read('wavelength,flux\n5000,1\n5001,nan\n5002,\n5003,NULL\n5004,--\n5005,INDEF\n5006,2\n');
    expect(reading.spectrum.masked.join('')).toBe('0111110');
    expect(codes(reading)).toContain('masked-samples');
  });

  it('a declared value, and only a declared one', async () => {
    const rows = 'wavelength,flux\n5000,1\n5001,-999\n5002,-999\n5003,2\n';
    expect((await read(`# missing values are -999\n${rows}`)).spectrum.masked.join('')).toBe('0110');
    const undeclared = await read(rows);
    expect(undeclared.spectrum.masked.join('')).toBe('0000');
    expect(codes(undeclared)).toContain('possible-marker');
    expect((await read(rows, { missingValue: -999 })).spectrum.masked.join('')).toBe('0110');
  });

  it('asterisks, huge markers and zeros at the ends', async () => {
    const reading = await read('wave flux\n5000 0\n5001 0\n5002 0\n5003 1.5\n5004 *****\n5005 -1.557e+35\n5006 0\n5007 2.5\n');
    expect(reading.spectrum.masked.join('')).toBe('11101100');
  });

  it('errors that are no errors mask their sample', async () => {
    const reading = await read('wave flux err\n5000 1 0.1\n5001 1 0\n5002 1 -0.1\n5003 1 nan\n5004 1 0.1\n');
    expect(reading.spectrum.masked.join('')).toBe('01110');
    expect(codes(reading)).toContain('negative-errors');
  });

  it('equal wavelengths are averaged by their weights', async () => {
    const reading = await read('wave flux err\n5000 1 0.1\n5001 1 0.1\n5001 4 0.2\n5002 1 0.1\n');
    expect(Array.from(reading.spectrum.wavelength)).toEqual([5000, 5001, 5002]);
    expect(reading.spectrum.flux[1]).toBeCloseTo((1 / 0.01 + 4 / 0.04) / (1 / 0.01 + 1 / 0.04), 12);
    expect(codes(reading)).toContain('duplicate-wavelengths');
  });

  it('lines of other text are skipped with a warning that shows the first', async () => {
    const reading = await read('wave flux\n5000 1\n5001 2\nend of part one\n5002 3\n5003 4\n');
    expect(reading.spectrum.flux.join(' ')).toBe('1 2 3 4');
    expect(reading.remarks.find((r) => r.code === 'lines-without-numbers')?.where.line).toBe(4);
  });
});

describe('columns can be chosen by name or number', () => {
  const text = 'wavelength,flux,sky,err\n5000,1,7,0.1\n5001,2,8,0.1\n';
  it('by name, whatever the case, and by number', async () => {
    for (const fluxColumn of ['sky', 'SKY', '3']) expect(Array.from((await read(text, { fluxColumn })).spectrum.flux)).toEqual([7, 8]);
    expect((await read(text, { errorColumn: 'none' })).spectrum.fluxErr).toBeUndefined();
  });
  it('a wrong name is answered with the nearest', async () => {
    const problem = await read(text, { fluxColumn: 'fluxx' }).catch((e: unknown) => e);
    expect(problem).toBeInstanceOf(ProblemError);
    expect(String(problem)).toContain('flux');
  });
  it('a first row of numbers is no header', async () => {
    expect((await read('3266.0,5.3e-16\n3269.5,5.2e-16\n3273.1,5.2e-16\n')).spectrum.wavelength.length).toBe(3);
  });
  it('a counter in the first column is no wavelength', async () => {
    expect(Array.from((await read('0 5000 1\n1 5002 3\n2 5004 2\n3 5006 1\n')).spectrum.wavelength)).toEqual([5000, 5002, 5004, 5006]);
  });
  it('the choices of a reading give it again', async () => {
    const reading = await read(text, { fluxColumn: 'sky' });
    expect((await read(text, reading.choices)).spectrum).toEqual(reading.spectrum);
  });
});

describe('progress and cancelling', () => {
  it('a cancelled read rejects with the reason of its signal', async () => {
    const control = new AbortController();
    control.abort(new Error('stopped'));
    await expect(readSpectrum(bytesSource('made.txt', new TextEncoder().encode(COMMAS)), {}, { signal: control.signal })).rejects.toThrow(
      'stopped',
    );
  });
  it('progress ends at 1', async () => {
    const shares: number[] = [];
    await readSpectrum(bytesSource('made.txt', new TextEncoder().encode(COMMAS)), {}, { progress: (share) => shares.push(share) });
    expect(shares.at(-1)).toBe(1);
  });
});

describe('further forms of text tables', () => {
  it('a machine-readable table with a byte-by-byte description', async () => {
    const text = `Title: A spectrum made for tests
================================================================================
Byte-by-byte Description of file: made.txt
--------------------------------------------------------------------------------
   Bytes Format Units   Label   Explanations
--------------------------------------------------------------------------------
   1-  7 F7.2   nm      lambda  Wavelength in vacuum
   9- 13 F5.2   mJy     Flux    Flux density
  15- 18 F4.2   mJy     e_Flux  One sigma error of Flux
--------------------------------------------------------------------------------
 500.00  1.00 0.10
 500.10  2.00 0.20
 500.20  3.00 0.30
`;
    const reading = await read(text);
    expect(shown(reading)).toBe('5000 5001 5002 | 1 2 3 | 0.1 0.2 0.3 | vacuum | 000');
    expect(reading.spectrum.fluxUnit).toBe('mJy');
  });

  it('survey logarithms without the word are taken as such, with a warning and a way out', async () => {
    const rows = Array.from({ length: 200 }, (_, i) => `${(3.55 + i * 1e-4).toFixed(4)},${1 + (i % 7)}`).join('\n');
    const reading = await read(`wavelength,flux\n${rows}\n`);
    expect(reading.spectrum.wavelength[0]).toBeCloseTo(10 ** 3.55, 9);
    expect(codes(reading)).toContain('unit-assumed');
    expect(reading.offers.map((o) => o.choices.wavelengthUnit)).toContain('um');
  });

  it('up to thirty columns, of which the right ones are proposed with their reasons', async () => {
    const names = Array.from({ length: 30 }, (_, k) => (k === 20 ? 'Wave' : k === 3 ? 'Flux' : k === 25 ? 'e_Flux' : `aux${k}`));
    const rows = [5000, 5001, 5002].map((w, i) =>
      names.map((n) => (n === 'Wave' ? w : n === 'Flux' ? i + 1 : n === 'e_Flux' ? (i + 1) / 10 : 42)).join('\t'),
    );
    const reading = await read(`${names.join('\t')}\n${rows.join('\n')}\n`);
    expect(shown(reading)).toBe(SAME);
    expect(reading.columns?.length).toBe(30);
    expect(reading.how.find((h) => h.fact === 'flux')?.reason).toContain('Flux');
  });

  it('a rest-frame spectrum is warned of', async () => {
    expect(codes(await read(`# rest-frame wavelengths in Angstrom\n${COMMAS}`))).toContain('rest-frame');
  });

  it('a velocity correction is applied only when it is asked for', async () => {
    const plain = await read(COMMAS);
    const corrected = await read(COMMAS, { velocityCorrectionKms: 299.792458 });
    expect(plain.spectrum.wavelength[0]).toBe(5000);
    expect(corrected.spectrum.wavelength[0]).toBeCloseTo(5005, 9);
  });
});

describe('headers that do not quite match', () => {
  it('fewer names than columns name the first ones', async () => {
    const reading = await read('wavelength flux\n5000 1 0.1\n5001 2 0.2\n5002 3 0.3\n');
    expect(Array.from(reading.spectrum.flux)).toEqual([1, 2, 3]);
    expect(reading.how.find((h) => h.fact === 'wavelength')?.reason).toContain('wavelength');
  });
});
