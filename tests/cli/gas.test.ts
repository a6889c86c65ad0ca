import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { linewright } from './linewright.ts';

const sample = 'public/samples/lantern-nebula.csv';
const rows = (text: string) => Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true }).data;

describe('linewright gas', () => {
  test('prints temperature and density of the sample within 3 % and 10 % of what it was made with, each number with its assumption', () => {
    const { code, out } = linewright('gas', sample);
    expect(code).toBe(0);
    const lines = rows(out);
    const of = (item: string, zone: string) => lines.find((row) => row.item === item && row.zone === zone);
    expect(Math.abs(Number(of('Te', 'medium')?.value) / 11_400 - 1)).toBeLessThan(0.03);
    expect(Math.abs(Number(of('ne', 'low')?.value) / 1_800 - 1)).toBeLessThan(0.1);
    expect(of('Te', 'medium')?.note).toContain('[O III] 4363');
    expect(lines.find((row) => row.item === '[S II] 6716/6731')).toMatchObject({
      unit: 'cm-3',
      note: expect.stringContaining('level populations'),
    });
    expect(new Set(lines.map((row) => row.section))).toEqual(
      new Set(['reddening', 'zone', 'diagnostic', 'abundance', 'ladder', 'kinematics']),
    );
  });

  test('takes the reddening law and a given c(Hbeta)', () => {
    const { out } = linewright('gas', sample, '--curve', 'fitzpatrick99', '--rv', '5', '--chbeta', '0.2');
    const c = rows(out).find((row) => row.item === 'c(Hbeta)');
    expect(c).toMatchObject({ value: '0.20000', note: expect.stringContaining('Fitzpatrick 1999, R(V) = 5') });
  });

  test('the table carries fluxes and corrected intensities for H beta = 100, with errors', () => {
    const lines = rows(linewright('table', sample, '--threshold', '10').out);
    const alpha = lines.find((row) => row.ion === 'H I' && row.wavelength_lab.startsWith('6562'));
    expect(Number(alpha?.flux_hbeta100)).toBeGreaterThan(350);
    expect(Math.abs(Number(alpha?.intensity_hbeta100) - 283)).toBeLessThan(10);
    for (const row of lines.filter((each) => Number(each.flux) > 0 && each.nature !== 'sky')) {
      expect(Number(row.intensity_hbeta100), row.feature).toBeGreaterThan(0);
      expect(Number(row.intensity_hbeta100_err), row.feature).toBeGreaterThan(0);
    }
  });

  test('refuses a format it does not write', () => {
    expect(linewright('gas', sample, '--format', 'latex')).toMatchObject({ code: 2, err: expect.stringContaining('csv only') });
  });
});
