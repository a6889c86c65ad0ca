import { expect, test } from 'vitest';
import { lineFluxUnit } from '../../src/report/fluxUnit.ts';

test.each([
  ['1e-15 erg/s/cm2/A', '10**-15 erg s-1 cm-2'],
  ['10^-17 erg/(s cm^2 Angstrom)', '10**-17 erg s-1 cm-2'],
  ['erg / (Angstrom cm2 s)', 'erg cm-2 s-1'],
  ['1E-16 erg cm-2 s-1 A-1', '10**-16 erg cm-2 s-1'],
  ['10**(-20)*erg/s/cm**2/Angstrom', '10**-20 erg s-1 cm-2'],
  ['Jy', 'Jy Angstrom'],
  ['counts', 'count Angstrom'],
  ['', ''],
  ['normalised flux', 'normalised flux Angstrom'],
])('%s times Angstrom is %s', (unit, expected) => {
  expect(lineFluxUnit(unit, 'fits')).toBe(expected);
});

test('every standard has its spelling', () => {
  expect(lineFluxUnit('1e-15 erg/s/cm2/A', 'vounits')).toBe('10**-15erg.s**-1.cm**-2');
  expect(lineFluxUnit('1e-15 erg/s/cm2/A', 'cds')).toBe('10-15erg.s-1.cm-2');
  expect(lineFluxUnit('counts', 'cds')).toBe('ct.Angstrom');
});
