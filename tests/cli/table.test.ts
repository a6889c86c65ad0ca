import { mkdtempSync, readdirSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { fileWith, linewright } from './linewright.ts';

const sample = 'public/samples/lantern-nebula.csv';
const rows = (text: string) => Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true }).data;

describe('linewright table', () => {
  test('prints one row a feature with its name, and says what it did on stderr', () => {
    const { code, out, err } = linewright('table', sample, '--timings');
    expect(code).toBe(0);
    const lines = rows(out);
    expect(lines.length).toBeGreaterThan(100);
    const oIII = lines.find((r) => Math.abs(Number(r.wavelength_obs) - 5007.36) < 0.3);
    expect(oIII).toMatchObject({ ion: '[O III]', nature: 'forbidden', thin_gas: 'true', verdict: 'open' });
    expect(lines.filter((r) => /\|[\d.+]+\|0\.\d{4}/.test(r.alternatives)).length).toBeGreaterThan(30);
    expect(err).toMatch(/\d+ features, \d+ named, z = 0\.00010/);
    for (const stage of ['reading', 'measuring', 'naming']) expect(err).toMatch(new RegExp(`${stage} \\d+\\.\\d+ s`));
  });

  test('a given velocity is kept', () => {
    const { err } = linewright('table', sample, '--velocity', '31.2', '--threshold', '20');
    expect(err).toContain('z = 0.000104 +/- 0.000000');
  });

  test('prints three-sigma limits where they are asked for, and says where there are none', () => {
    const { err } = linewright('table', sample, '--limit', '5300,99999', '--threshold', '20');
    expect(err).toMatch(/limit 5300: flux < 0\.\d+ \(3 sigma, FWHM 2\.\d+ A\)/);
    expect(err).toContain('limit 99999: too few samples there');
  });

  test('goes on after a file that cannot be read, and exits with 1', () => {
    const out = mkdtempSync(join(tmpdir(), 'linewright-out-'));
    const broken = fileWith('broken.csv', 'no numbers here\nnone at all\n');
    const { code, err } = linewright('table', broken, sample, '--out', out, '--format', 'latex', '--threshold', '20');
    expect(code).toBe(1);
    expect(err).toMatch(/linewright: broken\.csv/);
    expect(readdirSync(out)).toEqual(['lantern-nebula.tex']);
    expect(readFileSync(join(out, 'lantern-nebula.tex'), 'utf8')).toContain('\\begin{longtable}');
  });
});

test('own lines join the list, and a bad row keeps all of them out', () => {
  const own = fileWith('own.csv', 'ion,wavelength_air,nature,strength\nXe VI,5409.5,forbidden,50\n');
  const lines = fileWith(
    'mine.csv',
    '# air wavelengths in Angstrom\nwavelength,flux,wavelength_err,flux_err\n4861.33,100,0.05,1\n4958.91,240,0.05,2\n5006.84,716,0.05,4\n5409.5,45,0.05,1\n6562.8,290,0.05,3\n',
  );
  expect(rows(linewright('name', lines, '--lines', own).out).map((r) => r.ion)).toContain('[Xe VI]');
  const bad = fileWith('bad.csv', 'ion,wavelength_air\nXe VI,far\n');
  const { code, err } = linewright('name', lines, '--lines', bad);
  expect(code).toBe(1);
  expect(err).toMatch(/bad\.csv, line 2/);
});

test('linewright name takes lines measured elsewhere', () => {
  const path = fileWith(
    'mine.csv',
    '# air wavelengths in Angstrom\nwavelength,flux,wavelength_err,flux_err\n4861.33,100,0.05,1\n4958.91,240,0.05,2\n5006.84,716,0.05,4\n6562.8,290,0.05,3\n6583.45,60,0.05,1\n',
  );
  const { code, out } = linewright('name', path);
  expect(code).toBe(0);
  expect(rows(out).map((r) => r.ion)).toEqual(['H I', '[O III]', '[O III]', 'H I', '[N II]']);
});

describe('linewright limits', () => {
  test('prints lifetime, critical density and survival of each thin-gas line', () => {
    const { code, out } = linewright('limits', 'O III', '[S II]', '--te', '10000', '--ne', '1000');
    expect(code).toBe(0);
    const lines = rows(out.replace(/^#.*\n/, ''));
    const line = lines.find((r) => r.wavelength_air === '5006.843');
    // Osterbrock & Ferland 2006, table 3.15 (from memory): 6.8e5 cm^-3
    expect(Math.abs(Number(line?.n_crit) / 6.8e5 - 1)).toBeLessThan(0.1);
    expect(Number(line?.survival)).toBeGreaterThan(0.95);
    expect(lines.some((r) => r.ion === '[S II]')).toBe(true);
  });

  test('offers the nearest ion for one it does not know', () => {
    const { code, err } = linewright('limits', 'O IIII');
    expect(code).toBe(1);
    expect(err).toContain('Did you mean O III?');
  });
});
