import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { type Analysis, createEngine } from '../../src/engine/index.ts';
import { bytesSource } from '../../src/readers/index.ts';
import { DEFAULT_DESIGN, methodsText, PRESETS, paperFiles, type References, zipArchive } from '../../src/report/index.ts';
import {
  accept,
  applyChange,
  EMPTY_DOCUMENT,
  make,
  readSession,
  type SessionDocument,
  startHistory,
  writeSession,
} from '../../src/session/index.ts';
import { bundled } from '../atomic/bundledData.ts';

const sample = new Uint8Array(readFileSync(new URL('../../public/samples/lantern-nebula.csv', import.meta.url)));
const references = JSON.parse(readFileSync(new URL('../../public/references.json', import.meta.url), 'utf8')) as References;

async function analyse(document: SessionDocument): Promise<Analysis> {
  const engine = createEngine(bundled, () => 0);
  await engine.open(bytesSource('lantern-nebula.csv', sample), 'spectrum');
  return engine.analyse(document.settings, document.verdicts);
}

const filesOf = (analysis: Analysis, session: string) =>
  paperFiles({
    table: analysis.table,
    design: { ...PRESETS.atlas, rows: 'all' },
    methods: analysis.methods,
    references,
    ...(analysis.samples ? { samples: analysis.samples } : {}),
    figures: { width: 'double', panels: 3 },
    fits: [1, 5],
    session,
  });

let first: Analysis;
beforeAll(async () => {
  first = await analyse(EMPTY_DOCUMENT);
});

describe('the archive of a paper', () => {
  test('holds the table in every format, figures, methods, references and provenance', () => {
    const files = filesOf(first, '{}');
    expect(Object.keys(files).sort()).toEqual(
      [
        'figures/atlas.svg',
        'figures/feature-1.svg',
        'figures/feature-5.svg',
        'methods.txt',
        'provenance.json',
        'references.bib',
        'session.linewright.json',
        ...['aas.tex', 'csv', 'ecsv', 'fits', 'json', 'mrt', 'tex', 'vot'].map((ending) => `tables/lines.${ending}`),
      ].sort(),
    );
    for (const [path, content] of Object.entries(files)) expect(content.length, path).toBeGreaterThan(1);
  });

  test('a session file reopened gives the same bytes', async () => {
    const feature = first.features.find((f) => f.name?.label.startsWith('[O III] 5006'));
    if (!feature?.name) throw new Error('the sample has lost its brightest line');
    const history = make(
      startHistory(EMPTY_DOCUMENT),
      accept(EMPTY_DOCUMENT, { at: feature.at, atErr: feature.atErr, label: 'it' }, feature.name),
    );
    const text = writeSession(history);
    const before = await analyse(history.document);
    const again = readSession(text, 'session');
    const after = await analyse(again.document);
    expect(writeSession(again)).toBe(text);
    expect(zipArchive(filesOf(after, text))).toEqual(zipArchive(filesOf(before, text)));
  });

  test('is opened by a foreign program, if Python is there', () => {
    const path = join(mkdtempSync(join(tmpdir(), 'linewright-zip-')), 'paper.zip');
    writeFileSync(path, zipArchive({ 'a/one.txt': 'one\n', 'two.bin': Uint8Array.of(0, 255) }));
    const run = spawnSync(
      'python3',
      ['-c', `import zipfile; z = zipfile.ZipFile(${JSON.stringify(path)}); print(z.testzip(), z.namelist(), z.read('a/one.txt'))`],
      { encoding: 'utf8' },
    );
    if (run.error) return expect(run.error.message).toContain('ENOENT');
    expect(run.stdout.trim()).toBe("None ['a/one.txt', 'two.bin'] b'one\\n'");
  });
});

describe('methods and references', () => {
  test('the paragraph says what was done, and only that', () => {
    const text = methodsText(first.methods);
    expect(text).toContain('lantern-nebula.csv (5070 samples');
    expect(text).toContain('standard air');
    expect(text).toContain('c(Hbeta) = 0.4');
    expect(text).toMatch(/Of \d+ features \d+ were not decided on\./);
    expect(text).not.toContain('by hand');
    expect(text).not.toMatch(/undefined|NaN|\$\{/);
  });

  test('says when something was set otherwise', async () => {
    const document = applyChange(EMPTY_DOCUMENT, {
      sentence: '',
      steps: [
        {
          on: 'settings',
          before: EMPTY_DOCUMENT.settings,
          after: {
            ...EMPTY_DOCUMENT.settings,
            measure: {
              thresholdSigma: 7,
              edits: [
                { edit: 'split', at: 5007.36 },
                { edit: 'profile', at: 4363.66, as: 'voigt' },
              ],
              continuum: { exclude: [[4990, 5020]] },
            },
            naming: { z: 0.0001 },
          },
        },
      ],
    });
    const text = methodsText((await analyse(document)).methods);
    expect(text).toContain('above 7.0 sigma');
    expect(text).toContain('2 changes were made to the fits by hand');
    expect(text).toContain('1 feature was measured as a Voigt profile or a sum of two Gaussians');
    expect(text).toContain('1 excluded stretches');
    expect(text).toContain('(given)');
  });

  test('BibTeX names every work once and only those that were used', () => {
    const bib = String(filesOf(first, '{}')['references.bib']);
    const keys = [...bib.matchAll(/^@\w+\{([^,]+),/gm)].map((m) => m[1]);
    expect(new Set(keys).size).toBe(keys.length);
    expect(keys).toEqual(expect.arrayContaining(['ciddor1996', 'storeyHummer1995', 'cardelli1989']));
    expect(keys).not.toContain('fitzpatrick1999');
    expect(bib.match(/\{/g)?.length).toBe(bib.match(/\}/g)?.length);
  });
});

test('the default design is one of the presets', () => {
  expect(Object.values(PRESETS)).toContain(DEFAULT_DESIGN);
});
