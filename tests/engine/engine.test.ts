import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { type Analysis, createEngine, type Engine, type FeatureView } from '../../src/engine/index.ts';
import { ProblemError } from '../../src/problems/index.ts';
import { bytesSource } from '../../src/readers/index.ts';
import { TABLE_FORMATS, withoutArtefacts } from '../../src/report/index.ts';
import { accept, applyChange, declare, EMPTY_DOCUMENT, reject, type SessionDocument, writeNote } from '../../src/session/index.ts';
import { bundled } from '../atomic/bundledData.ts';

// The sample spectrum through the whole engine: it is made from known lines, so the names are known too.

const sample = new Uint8Array(readFileSync(new URL('../../public/samples/lantern-nebula.csv', import.meta.url)));
const text = (name: string, content: string) => bytesSource(name, new TextEncoder().encode(content));

let engine: Engine;
let analysis: Analysis;
const at = (a: Analysis, wavelength: number): FeatureView =>
  a.features.reduce((x, y) => (Math.abs(x.centroid - wavelength) < Math.abs(y.centroid - wavelength) ? x : y));
const pointed = (f: FeatureView) => ({ at: f.at, atErr: f.atErr, label: `feature ${f.number}` });
const analyse = (document: SessionDocument) => engine.analyse(document.settings, document.verdicts);

beforeAll(async () => {
  engine = createEngine(bundled, () => 0);
  expect(await engine.open(bytesSource('lantern-nebula.csv', sample), 'guess')).toBe('spectrum');
  analysis = await analyse(EMPTY_DOCUMENT);
});

describe('the sample, opened', () => {
  test('is read as what its comments say', () => {
    expect(analysis.reading).toMatchObject({ kind: 'spectrum', medium: 'air', mediumStated: true, samples: 5070 });
    expect(analysis.reading.fluxUnit).toContain('erg');
  });

  test('carries the SHA-256 of its bytes into the table', () => {
    expect(analysis.table.sha256).toBe(createHash('sha256').update(sample).digest('hex'));
  });

  test('carries the sky that was in the way, in the medium of the file', () => {
    const { bands, lines } = analysis.sky;
    expect(lines.some(({ at }) => Math.abs(at - 5577.338) < 0.01)).toBe(true);
    // the A band of molecular oxygen: 7594-7700 A in air
    expect(bands.some(({ species, low, high }) => species.includes('O2') && low < 7600 && high > 7650)).toBe(true);
    bands.forEach((band, k) => {
      expect(band.high).toBeGreaterThan(band.low);
      if (k > 0) expect(band.low).toBeGreaterThan(bands[k - 1].high);
    });
  });

  test('shows its velocity of 31.2 km/s', () => {
    expect(analysis.z * 299_792.458).toBeGreaterThan(30.2);
    expect(analysis.z * 299_792.458).toBeLessThan(32.2);
  });

  test.each([
    [4861.83, 'H I', 4861.33],
    [5007.36, '[O III]', 5006.84],
    [4363.66, '[O III]', 4363.21],
    [4686.2, 'He II', 4685.71],
    [6584.14, '[N II]', 6583.45],
    [6716.96, '[S II]', 6716.44],
    [9069.56, '[S III]', 9068.62],
  ])('names the line at %f A %s %f', (wavelength, ion, lab) => {
    const { name } = at(analysis, wavelength);
    expect(name?.transitions[0].ion).toBe(ion);
    expect(name?.transitions[0].wavelengthLab).toBeCloseTo(lab, 1);
    expect(name?.probability).toBeGreaterThan(0.9);
  });

  test('takes the night-sky line for one', () => {
    expect(at(analysis, 5577.33).name?.transitions[0].nature).toBe('sky');
    expect(analysis.table.rows[at(analysis, 5577.33).number - 1].nature).toBe('sky');
  });

  test('flags lines of metastable levels with lifetime, critical density and the reason in words', () => {
    const thin = at(analysis, 5007.36).name?.transitions[0].thinGas;
    // Osterbrock & Ferland 2006, table 3.15 (from memory): 6.8e5 cm^-3 for [O III] 1D2
    expect(thin?.nCrit).toBeGreaterThan(5e5);
    expect(thin?.nCrit).toBeLessThan(9e5);
    expect(thin?.sentence).toMatch(/waits 37 seconds .*before it radiates.*electrons per cm³/);
    expect(at(analysis, 4861.83).name?.transitions[0].thinGas).toBeUndefined();
  });

  test('puts fluxes on the scale H beta = 100', () => {
    const row = analysis.table.rows[at(analysis, 4861.83).number - 1];
    expect(row.fluxHbeta100).toBe(100);
    const ratio =
      (analysis.table.rows[at(analysis, 5007.36).number - 1].fluxHbeta100 ?? 0) /
      (analysis.table.rows[at(analysis, 4959.43).number - 1].fluxHbeta100 ?? 1);
    // both from one upper level: 2.98 (Storey & Zeippen 2000, MNRAS 312, 813)
    expect(ratio).toBeGreaterThan(2.9);
    expect(ratio).toBeLessThan(3.06);
  });

  test('finds 100 lines, all but a few of them named', () => {
    expect(analysis.features.length).toBeGreaterThanOrEqual(100);
    expect(analysis.features.filter((f) => f.name).length / analysis.features.length).toBeGreaterThan(0.95);
  });
});

describe('verdicts', () => {
  test('an acceptance holds through a refit with another threshold and width', async () => {
    const feature = at(analysis, 5518.2);
    const name = feature.candidates[0];
    let document = applyChange(EMPTY_DOCUMENT, accept(EMPTY_DOCUMENT, pointed(feature), name));
    document = { ...document, settings: { ...document.settings, measure: { thresholdSigma: 8, resolvingPower: 2300 } } };
    const refit = await analyse(document);
    expect(refit.features.length).toBeLessThan(analysis.features.length);
    expect(at(refit, 5518.2).verdict?.decision).toBe('accepted');
    expect(at(refit, 5518.2).name?.keys).toEqual(name.keys);
    expect(refit.lostVerdicts).toEqual([]);
  });

  test('a rejected name does not come back, and the row has no name until another is accepted', async () => {
    const feature = at(analysis, 5755.19);
    const wrong = feature.candidates[0];
    const document = applyChange(EMPTY_DOCUMENT, reject(EMPTY_DOCUMENT, pointed(feature), wrong));
    const after = at(await analyse(document), 5755.19);
    expect(after.candidates.some((c) => c.keys.join() === wrong.keys.join())).toBe(false);
    expect(after.name).toBeUndefined();
    expect((await analyse(document)).table.rows[after.number - 1]).toMatchObject({ verdict: 'rejected' });
  });

  test('an unidentified line keeps its row, its note is printed', async () => {
    const feature = at(analysis, 8446.9);
    let document = applyChange(EMPTY_DOCUMENT, declare(EMPTY_DOCUMENT, pointed(feature), 'unidentified'));
    document = applyChange(document, writeNote(document, pointed(feature), 'ask the archive'));
    const row = (await analyse(document)).table.rows[feature.number - 1];
    expect(row.verdict).toBe('unidentified');
    expect(row.ion).toBeUndefined();
    expect(row.note).toContain('ask the archive');
  });
});

describe('stages', () => {
  test('a verdict runs naming again but not reading and measuring', async () => {
    await analyse(EMPTY_DOCUMENT);
    const document = applyChange(EMPTY_DOCUMENT, declare(EMPTY_DOCUMENT, pointed(at(analysis, 6300.9)), 'unidentified'));
    expect((await analyse(document)).timings.map((t) => t.stage)).toEqual(['naming', 'gas']);
    expect((await analyse(document)).timings).toEqual([]);
  });

  test('a broken file is a problem that names it, and the earlier source can be opened again', async () => {
    await engine.open(text('notes.txt', 'dear reader\nthis is no spectrum\n'), 'spectrum');
    await expect(analyse(EMPTY_DOCUMENT)).rejects.toThrow(ProblemError);
    await expect(analyse(EMPTY_DOCUMENT)).rejects.toThrow(/notes\.txt/);
    await engine.open(bytesSource('lantern-nebula.csv', sample), 'spectrum');
    expect((await analyse(EMPTY_DOCUMENT)).features.length).toBe(analysis.features.length);
  });
});

describe('an already measured list', () => {
  const list =
    '# air wavelengths in Angstrom\nwavelength,flux,wavelength_err,flux_err\n4861.33,100,0.05,1\n4958.91,240,0.05,2\n5006.84,716,0.05,4\n6562.8,290,0.05,3\n6583.45,60,0.05,1\n6548.05,20,0.05,1\n4340.47,47,0.05,1\n5875.6,13,0.05,0.5\n';

  const IONS = ['H I', 'H I', '[O III]', '[O III]', 'He I', '[N II]', 'H I', '[N II]'];

  test('is recognised by its columns and named by the same engine', async () => {
    expect(await engine.open(text('mine.csv', list), 'guess')).toBe('line-list');
    const named = await analyse(EMPTY_DOCUMENT);
    expect(named.samples).toBeUndefined();
    expect(named.features.map((f) => f.name?.transitions[0].ion)).toEqual(IONS);
    expect(named.table.rows[0]).toMatchObject({ ew: undefined, fwhm: undefined });
  });

  test('without errors and widths is named all the same, and says what was assumed', async () => {
    await engine.open(
      text('bare.csv', list.replace('wavelength,flux,wavelength_err,flux_err', 'wavelength,flux').replaceAll(/,0\.05,[\d.]+$/gm, '')),
      'line-list',
    );
    const named = await analyse(EMPTY_DOCUMENT);
    expect(named.features.map((f) => f.name?.transitions[0].ion)).toEqual(IONS);
    expect(named.remarks.map((r) => r.code)).toContain('no-wavelength-errors');
  });

  test('is written with every column of the table', async () => {
    await engine.open(text('mine.csv', list), 'line-list');
    const csv = TABLE_FORMATS.csv.write(withoutArtefacts((await analyse(EMPTY_DOCUMENT)).table));
    expect(csv.split('\r\n')[0].split(',')).toHaveLength(30);
    expect(csv).toContain('[O III]');
  });
});
