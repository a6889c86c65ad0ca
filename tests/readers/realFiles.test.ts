import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { bytesSource, type Reading, type ReadingChoices, readSpectrum } from '../../src/readers/index.ts';

// Public spectra of archives and surveys, kept outside this repository in $SHARED/spectra: MANIFEST.csv says how each must end, CHECKS.csv holds
// further samples. Both were read by foreign readers (astropy.io.fits and text exports).
const folder = process.env.SHARED ? join(process.env.SHARED, 'spectra') : undefined;
const isThere = folder !== undefined && existsSync(join(folder, 'MANIFEST.csv'));

/** Rows of a CSV with quoted cells, as objects. */
function rowsOf(text: string): Record<string, string>[] {
  const rows = text
    .trim()
    .split(/\r?\n/)
    .map((line) =>
      Array.from(`${line},`.matchAll(/("(?:[^"]|"")*"|[^,]*),/g), ([, cell]) => cell.replace(/^"|"$/g, '').replaceAll('""', '"')),
    );
  const [names, ...data] = rows;
  return data.map((cells) => Object.fromEntries(names.map((name, k) => [name, cells[k] ?? ''])));
}

const table = (name: string) => (folder && isThere ? rowsOf(readFileSync(join(folder, name), 'utf8')) : []);
const read = (file: string, choices: ReadingChoices = {}) =>
  readSpectrum(bytesSource(file, new Uint8Array(readFileSync(join(folder ?? '', file)))), choices);

/** Which part of the file the values of MANIFEST.csv belong to, where it is not the proposed one. */
const PARTS: Readonly<Record<string, ReadingChoices>> = {
  'coadd-5-169-thru20210419.fits': { hdu: 4, row: 5 },
  'med-58625-TD192102N424113K01_sp12-076.fits.gz': { hdu: 2 },
  'spline.fits': { order: 3 },
};
/** Files whose samples are sorted or joined by the reader: only what stays the same is compared. */
const REARRANGED = new Set(['ngc1068.xml', 'id41_z0.5.vot', 'gbt_1d.fits']);

/** The choices a selection of CHECKS.csv stands for. */
function selectionOf(file: string, selection: string): ReadingChoices {
  const [, hdu] = /^HDU (\d+)/.exec(selection) ?? [];
  if (hdu) return { hdu: Number(hdu) };
  const arm = /^arm ([BRZ]), target row (\d+)/.exec(selection);
  if (arm) return { hdu: { B: 4, R: 9, Z: 14 }[arm[1]], row: Number(arm[2]) + 1 };
  if (selection.startsWith('HDU COADD_')) return { hdu: selection.endsWith('B') ? 1 : 2 };
  const both = /^order (\d+) band (\d+)/.exec(selection);
  if (both) return { order: Number(both[1]), band: Number(both[2]) };
  const order = /^(?:order|band) (\d+)/.exec(selection);
  if (order) return { order: Number(order[1]) };
  const row = /^(?:image )?row (\d+)/.exec(selection);
  if (row) return { row: Number(row[1]) };
  const columns = /^(\w+) \/ (\w+)$/.exec(selection);
  if (columns) return { wavelengthColumn: columns[1], fluxColumn: columns[2] };
  const column = /^column (\d+)/.exec(selection);
  if (column) return { fluxColumn: column[1] };
  throw new Error(`${file}: unknown selection ${selection}`);
}

/** 12 digits of wavelength and 8 of flux are printed. */
const WAVE_DIGITS = 2e-11;
const FLUX_DIGITS = 6e-8;
const near = (a: number, b: number, relative: number) =>
  a === b || Math.abs(a - b) <= relative * Math.max(Math.abs(a), Math.abs(b)) || (Number.isNaN(a) && Number.isNaN(b));

/** Whether the spectrum has this sample. */
function hasSample({ spectrum: { wavelength, flux } }: Reading, wave: number, value: number): boolean {
  return wavelength.some((w, i) => near(w, wave, WAVE_DIGITS * 3) && near(flux[i], value, FLUX_DIGITS));
}

function expectSamples(reading: Reading, row: Record<string, string>): void {
  const { wavelength } = reading.spectrum;
  expect(wavelength.length).toBe(Number(row['n']));
  for (const place of ['first', 'middle', 'last']) {
    const wave = Number(row[`${place}_wave_A`]);
    const flux = Number(row[`${place}_flux`]);
    expect(hasSample(reading, wave, flux), `${place}: ${wave} ${flux}`).toBe(true);
  }
  if (row['wave_A_of_max'] !== undefined) expect(hasNear(reading, Number(row['wave_A_of_max']), Number(row['max'])), 'maximum').toBe(true);
}

const hasNear = ({ spectrum: { wavelength, flux } }: Reading, wave: number, value: number) =>
  wavelength.some((w, i) => near(w, wave, 1e-9) && near(flux[i], value, FLUX_DIGITS));

describe.runIf(isThere)('real spectra of archives end as their list says (skipped without SHARED)', () => {
  for (const row of table('MANIFEST.csv')) {
    it(`${row['file']}: ${row['outcome']}`, async () => {
      const file = row['file'];
      const proposed = await read(file);
      const reading = PARTS[file] ? await read(file, PARTS[file]) : proposed;
      expect(reading.how.length).toBeGreaterThan(3);
      if (!REARRANGED.has(file)) expectSamples(reading, row);
      const isWarned = proposed.remarks.some((r) => r.weight === 'warning');
      if (row['outcome'] !== 'load') expect(isWarned).toBe(true);
      if (row['outcome'] === 'load-choose') expect(proposed.offers.length).toBeGreaterThan(0);
      const evidence = row['medium_evidence'];
      if (!evidence.startsWith('not stated') && row['medium'] !== 'n/a') {
        expect(reading.mediumStated).toBe(true);
        expect(reading.spectrum.medium).toBe(row['medium']);
      }
      if (evidence.startsWith('not stated')) expect(reading.mediumStated).toBe(false);
      if (!/^none/.test(row['uncertainty']) && !file.startsWith('coadd')) expect(reading.spectrum.fluxErr).toBeDefined();
      if (/^none/.test(row['uncertainty'])) expect(reading.spectrum.fluxErr).toBeUndefined();
      // the choices of a reading give the same reading again
      const again = await read(file, reading.choices);
      expect(again.spectrum).toEqual(reading.spectrum);
    });
  }
});

describe.runIf(isThere)('further parts of real files give the samples that were read from them', () => {
  for (const row of table('CHECKS.csv')) {
    it(`${row['file']}: ${row['selection']}`, async () => {
      expectSamples(await read(row['file'], selectionOf(row['file'], row['selection'])), row);
    });
  }
});
