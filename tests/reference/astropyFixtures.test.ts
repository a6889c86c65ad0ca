import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { bytesSource, type ReadingChoices, readSpectrum } from '../../src/readers/index.ts';

// tests/reference/fits/make_fits.py wrote the files with astropy 5.2.1 and what astropy (and WCSLIB, for image axes) reads back from them.
const folder = fileURLToPath(new URL('./fits/', import.meta.url));

interface Expected {
  readonly file: string;
  readonly choices: ReadingChoices;
  /** null = not a number. */
  readonly wavelength: readonly (number | null)[];
  readonly flux: readonly (number | null)[];
  readonly fluxErr?: readonly (number | null)[];
  readonly masked?: readonly number[];
  readonly medium?: string;
  readonly fluxUnit?: string;
  /** Where WCSLIB works an axis out in another order of steps the last bits differ: relative difference allowed. Absent = to the bit. */
  readonly relative?: number;
}

const all: Expected[] = JSON.parse(readFileSync(`${folder}expected.json`, 'utf8'));
const numbers = (values: readonly (number | null)[]) => values.map((v) => v ?? Number.NaN);

describe('our numbers are those of astropy', () => {
  it('for more than thirty spectra in all layouts', () => {
    expect(all.length).toBeGreaterThan(30);
  });

  for (const [k, expected] of all.entries()) {
    it(`${k + 1}: ${expected.file} ${JSON.stringify(expected.choices)}`, async () => {
      const { spectrum } = await readSpectrum(
        bytesSource(expected.file, new Uint8Array(readFileSync(folder + expected.file))),
        expected.choices,
      );
      const { wavelength, flux, fluxErr, masked } = spectrum;
      const waves = numbers(expected.wavelength);
      if (expected.relative === undefined) expect(Array.from(wavelength)).toEqual(waves);
      else
        for (let i = 0; i < waves.length; i++)
          expect(Math.abs(wavelength[i] / waves[i] - 1), `sample ${i}: ${wavelength[i]} for ${waves[i]}`).toBeLessThanOrEqual(
            expected.relative,
          );
      expect(wavelength.length).toBe(waves.length);
      expect(Array.from(flux)).toEqual(numbers(expected.flux));
      if (expected.fluxErr) expect(Array.from(fluxErr ?? [])).toEqual(numbers(expected.fluxErr));
      if (expected.masked) expect(Array.from(masked)).toEqual(expected.masked);
      if (expected.medium) expect(spectrum.medium).toBe(expected.medium);
      if (expected.fluxUnit) expect(spectrum.fluxUnit).toBe(expected.fluxUnit);
    });
  }
});
