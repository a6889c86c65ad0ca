import { mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { unzipSync } from 'fflate';
import { expect, test } from 'vitest';
import { fileWith, linewright } from './linewright.ts';

const sample = 'public/samples/lantern-nebula.csv';
const text = (bytes: Uint8Array) => new TextDecoder().decode(bytes);

test('linewright paper writes everything for a paper into one ZIP, the same bytes each time', { timeout: 60_000 }, () => {
  const [one, two] = [1, 2].map(() => mkdtempSync(join(tmpdir(), 'linewright-paper-')));
  expect(linewright('paper', sample, '--out', one, '--design', 'appendix', '--threshold', '20').code).toBe(0);
  expect(linewright('paper', sample, '--out', two, '--design', 'appendix', '--threshold', '20').code).toBe(0);
  const bytes = readFileSync(join(one, 'lantern-nebula-paper.zip'));
  expect(bytes.equals(readFileSync(join(two, 'lantern-nebula-paper.zip')))).toBe(true);
  const files = unzipSync(bytes);
  expect(Object.keys(files)).toEqual(
    expect.arrayContaining([
      'figures/atlas.svg',
      'figures/density-ladder.svg',
      'figures/temperature-density.svg',
      'methods.txt',
      'provenance.json',
      'references.bib',
      'session.linewright.json',
      'tables/gas.csv',
      'tables/lines.aas.tex',
      'tables/lines.fits',
    ]),
  );
  expect(text(files['tables/lines.tex'])).toContain('Transition');
  const provenance = JSON.parse(text(files['provenance.json']));
  expect(provenance.settings).toContainEqual({ key: 'measure.thresholdSigma', value: '20' });
  expect(text(files['methods.txt'])).toContain('above 20 sigma');
  expect(JSON.parse(text(files['session.linewright.json'])).document.settings.measure).toEqual({ thresholdSigma: 20 });
});

test('paper without a place to write to, and an unknown design, are refused with words', () => {
  expect(linewright('paper', sample)).toMatchObject({ code: 2, err: 'linewright: paper needs --out DIR\n' });
  expect(linewright('table', sample, '--design', 'apendix').err).toContain('did you mean appendix?');
});

const session = (decision: string, note?: string) =>
  JSON.stringify({
    magic: 'linewright-session',
    version: 2,
    document: {
      source: { kind: 'spectrum', name: 'lantern-nebula.csv', size: 1 },
      settings: { reading: {}, measure: { thresholdSigma: 20 }, naming: {} },
      verdicts: [
        {
          at: 5008.76,
          atErr: 0.01,
          decision,
          ...(decision === 'accepted' ? { accepted: ['O III 5008.240'] } : {}),
          ...(note ? { note } : {}),
        },
      ],
    },
    past: [],
    future: [],
  });

test('linewright differences says in which verdicts two sessions differ, and how probable the names are', { timeout: 60_000 }, () => {
  const first = fileWith('one.linewright.json', session('accepted'));
  const second = fileWith('two.linewright.json', session('unidentified', 'ghost of the grating'));
  const { code, out, err } = linewright('differences', first, second, sample);
  expect(code).toBe(1);
  expect(out).toMatch(
    /^5008\.760 A \(vacuum\): First: accepted O III 5008\.240; second: unidentified \("ghost of the grating"\)\. The weighing gives O III 5008\.240 [01]\.\d{3}, no name 0\.\d{3}\.$/m,
  );
  expect(err).toContain('0 verdicts agree, 1 differ');
  expect(linewright('differences', first, first)).toMatchObject({ code: 0, out: '' });
  expect(linewright('differences', first).code).toBe(2);
});
