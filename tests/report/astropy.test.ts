import { spawnSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { COLUMNS, TABLE_FORMATS } from '../../src/report/index.ts';
import { blend, oIII, table } from './someTable.ts';

const PYTHON = '/usr/bin/python3';
const hasAstropy = spawnSync(PYTHON, ['-c', 'import astropy.table']).status === 0;
const script = fileURLToPath(new URL('readBack.py', import.meta.url));

interface Read {
  readonly rows: number;
  readonly columns: readonly string[];
  readonly first: Readonly<Record<string, unknown>>;
  readonly units: Readonly<Record<string, string>>;
}

describe.skipIf(!hasAstropy)('read back by astropy (skipped: needs python3-astropy)', () => {
  test.each(['ecsv', 'votable', 'mrt', 'fits'] as const)('%s: rows, columns, values and units come back', { timeout: 30_000 }, (format) => {
    const path = join(mkdtempSync(join(tmpdir(), 'linewright-astropy-')), `lines.${TABLE_FORMATS[format].ending}`);
    writeFileSync(path, TABLE_FORMATS[format].write(table(oIII, blend)));
    const run = spawnSync(PYTHON, [script, '--values', path], { encoding: 'utf8' });
    // VOUnits 1.0 calls Angstrom and erg deprecated, but known
    expect(run.stderr.split('\n').filter((line) => line !== '' && !/deprecated|warnings.warn/.test(line))).toEqual([]);
    const read = JSON.parse(run.stdout) as Read;
    expect(read.rows).toBe(2);
    expect(read.columns).toEqual(COLUMNS.map((c) => c.key));
    expect(read.first).toMatchObject({
      feature: 1,
      wavelength_obs: 5007.3634,
      flux: 985.2,
      ion: '[O III]',
      lifetime_s: 36.9,
      n_crit: 710000,
      intensity_hbeta100: null,
      alternatives: 'Fe I|5006.710|0.0007',
    });
    expect(read.units.flux).toMatch(/^1e-15 erg/);
    expect(read.units.wavelength_obs).toMatch(/^(Angstrom|AA|0.1 nm)$/);
  });
});

test('a FITS table has whole blocks, its rows where the head says, and blanks for what is unknown', () => {
  const bytes = TABLE_FORMATS.fits.write(table(oIII, blend));
  if (typeof bytes === 'string') throw new TypeError('FITS is bytes');
  expect(bytes.length % 2880).toBe(0);
  const text = new TextDecoder('latin1').decode(bytes);
  expect(text.startsWith('SIMPLE  =                    T')).toBe(true);
  expect(/TFIELDS *= +(\d+)/.exec(text)?.[1]).toBe(String(COLUMNS.length));
  const end = text.indexOf(`END${' '.repeat(77)}`, 2880);
  const data = Math.ceil((end + 80) / 2880) * 2880;
  const view = new DataView(bytes.buffer);
  // number, wavelength, its error of row 1; the error of row 2 is not known
  expect(view.getInt32(data)).toBe(1);
  expect(view.getFloat64(data + 4)).toBeCloseTo(5007.3634, 9);
  const rowBytes = Number(/NAXIS1 *= +(\d+)/.exec(text)?.[1]);
  expect(view.getFloat64(data + rowBytes + 12)).toBeNaN();
});
