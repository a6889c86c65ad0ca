import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { acceptedRows, TABLE_FORMATS, withoutArtefacts } from '../../src/report/index.ts';
import { blend, oIII, table } from './someTable.ts';

const HEADER =
  'feature, wavelength_obs, wavelength_obs_err, wavelength_rest_obs, flux, flux_err, fwhm, fwhm_err, fwhm_kms, ew, ew_err, snr, ion, wavelength_lab, lower, upper, nature, velocity, velocity_err, probability, thin_gas, lifetime_s, n_crit, flux_hbeta100, flux_hbeta100_err, intensity_hbeta100, intensity_hbeta100_err, alternatives, verdict, note';

const read = (text: string) => Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true });

describe('the CSV table', () => {
  test('has the columns of the terminal in their order', () => {
    expect(TABLE_FORMATS.csv.write(table()).trim()).toBe(HEADER.replaceAll(', ', ','));
  });

  test('is read back by an independent reader with every value in its place', () => {
    const { data, errors } = read(TABLE_FORMATS.csv.write(table(oIII, blend)));
    expect(errors).toEqual([]);
    expect(data[0]).toMatchObject({
      wavelength_obs: '5007.3634',
      ion: '[O III]',
      wavelength_lab: '5006.843',
      thin_gas: 'true',
      n_crit: '710000',
      alternatives: 'Fe I|5006.710|0.0007',
      verdict: 'accepted',
    });
    expect(Number(data[0].flux)).toBeCloseTo(985.2, 6);
    expect(data[1]).toMatchObject({
      ion: 'H I+He I',
      wavelength_lab: '3889.050+3888.647',
      wavelength_obs_err: '',
      flux: '1.23000e-14',
      note: blend.note,
    });
  });

  test.each(['=HYPERLINK("http://x")', '+1+2', "-2+3+cmd|' /C calc'!A0", '@SUM(A1)', ' =1+1', '\t=1'])(
    'keeps the note %j from being run as a formula by a spreadsheet',
    (note) => {
      const { data } = read(TABLE_FORMATS.csv.write(table({ ...blend, note })));
      expect(data[0].note).toBe(`'${note}`);
    },
  );

  test.each(['-1.5e-3', '+7', 'blend - see text', '[O III] = 5007'])('leaves the harmless note %j as it is', (note) => {
    const { data } = read(TABLE_FORMATS.csv.write(table({ ...blend, note })));
    expect(data[0].note).toBe(note);
  });

  test('leaves negative numbers numbers', () => {
    const { data } = read(TABLE_FORMATS.csv.write(table({ ...oIII, velocity: -31.2, ew: -4 })));
    expect([data[0].velocity, data[0].ew]).toEqual(['-31.20', '-4.0000']);
  });

  test('does not print a minus zero', () => {
    const { data } = read(TABLE_FORMATS.csv.write(table({ ...oIII, velocity: -0.001 })));
    expect(data[0].velocity).toBe('0.00');
  });
});

test('accepted rows leave the open ones out, and artefacts stay out unless accepted', () => {
  const spike = { ...oIII, artefact: true, verdict: 'open' as const };
  expect(acceptedRows(table(oIII, blend)).rows).toEqual([oIII]);
  expect(withoutArtefacts(table(oIII, spike, { ...spike, verdict: 'accepted' })).rows).toHaveLength(2);
});
