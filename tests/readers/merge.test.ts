import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { bytesSource, readSpectrum } from '../../src/readers/index.ts';

const folder = fileURLToPath(new URL('../reference/fits/', import.meta.url));
const read = (name: string, choices = {}) => readSpectrum(bytesSource(name, new Uint8Array(readFileSync(folder + name))), choices);

describe('several rows as one spectrum', () => {
  it('overlaps are cut at their middle and no sample is changed', async () => {
    const rows = await Promise.all([1, 2, 3].map((row) => read('rows.fits', { row })));
    const { spectrum, choices } = await read('rows.fits', { merge: true });
    // rows of 40 samples every 2.5 A start 90 A apart: 3500-3597.5, 3590-3687.5, 3680-3777.5; they are cut at 3593.75 and 3683.75
    expect(spectrum.wavelength[0]).toBe(3500);
    expect(spectrum.wavelength.at(-1)).toBe(3777.5);
    expect(spectrum.wavelength.length).toBe(112);
    for (let i = 0; i < spectrum.wavelength.length; i++) {
      const w = spectrum.wavelength[i];
      const row = w < 3593.75 ? rows[0] : w < 3683.75 ? rows[1] : rows[2];
      const k = row.spectrum.wavelength.indexOf(w);
      expect([spectrum.flux[i], spectrum.fluxErr?.[i], spectrum.masked[i]]).toEqual([
        row.spectrum.flux[k],
        row.spectrum.fluxErr?.[k],
        row.spectrum.masked[k],
      ]);
    }
    expect((await read('rows.fits', choices)).spectrum).toEqual(spectrum);
  });

  it('it is offered beside the single rows, which are called by their names', async () => {
    const { offers, remarks } = await read('rows.fits');
    expect(offers.map((o) => o.label)).toContain('all 3 rows as one spectrum');
    expect(offers.some((o) => o.label.includes('middle'))).toBe(true);
    expect(remarks.map((r) => r.code)).toContain('several-spectra');
  });
});

describe('choices about a FITS file', () => {
  it('errors can be left out, masks read the other way round, units overruled', async () => {
    expect((await read('samples.fits', { errorColumn: 'none' })).spectrum.fluxErr).toBeUndefined();
    expect((await read('samples.fits', { maskColumn: 'none' })).spectrum.masked.join('')).not.toContain('1');
    const turned = await read('samples.fits', { maskMeaning: 'zero-bad' });
    expect(turned.spectrum.masked.reduce((a, b) => a + b, 0)).toBe(39);
    expect((await read('samples.fits', { wavelengthUnit: 'nm' })).spectrum.wavelength[0]).toBe(35_000);
  });

  it('a velocity of the observer is offered, not applied', async () => {
    const { spectrum, offers } = await read('units.fits');
    expect(spectrum.wavelength[0]).toBe(3500);
    const offer = offers.find((o) => o.choices.velocityCorrectionKms === 12.5);
    expect((await read('units.fits', offer?.choices)).spectrum.wavelength[0]).toBeCloseTo(3500 * (1 + 12.5 / 299_792.458), 9);
  });
});
