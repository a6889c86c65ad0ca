import { expect, it } from 'vitest';
import { readBibliography } from '../../src/atomic/build/bibliography.ts';
import { buildBundle } from '../../src/atomic/build/buildBundle.ts';
import { parseCsvTable } from '../../src/atomic/build/csvTable.ts';
import { readTables } from '../../src/atomic/build/readTables.ts';

const tables = readTables();

/** The build with one table changed. */
function buildWith(name: string, change: (text: string) => string): () => Uint8Array {
  const files = new Map(tables.files);
  const text = files.get(name)!;
  const changed = change(text);
  if (changed === text) throw new Error(`the change of ${name} changed nothing`);
  files.set(name, changed);
  return () => buildBundle({ files, hash: tables.hash });
}

it('a row without a source stops the build', () => {
  expect(buildWith('model-a.csv', (t) => t.replace(/^(O III,2,3,.*),\S+$/m, '$1,'))).toThrow(/source "" has no entry/);
  expect(buildWith('levels.csv', (t) => t.replace(/,nist512\n/, ',\n'))).toThrow(/source "" has no entry/);
  expect(buildWith('lines-oxygen.csv', (t) => t.replace(/,nist512,\n/, ',nist999,\n'))).toThrow(/nist999/);
});

it('a line to a level that does not exist stops the build', () => {
  expect(buildWith('lines-carbon.csv', (t) => t.replace(/^C II,1,/m, 'C II,9999,'))).toThrow(/C II: no level 9999/);
});

it('a cell that is no number stops the build', () => {
  expect(buildWith('model-a.csv', (t) => t.replace(/^O III,2,3,[^,]+/m, 'O III,2,3,0.02O'))).toThrow(/a_s1 = 0.02O is no number/);
});

it('a row with a cell too many is named by its line', () => {
  expect(() => parseCsvTable('t.csv', 'a,b\n1,2\n1,2,3\n')).toThrow('t.csv line 3: 3 cells, the header has 2');
  expect(parseCsvTable('t.csv', 'a,b\n"x, ""y""",2\n').rows[0]).toEqual({ a: 'x, "y"', b: '2' });
});

it('every key of the bibliography is used once and cites something', () => {
  const bib = readBibliography(tables.files.get('sources.bib')!);
  const keys = [...tables.files.get('sources.bib')!.matchAll(/^@\w+\{([^,]+),/gm)].map((m) => m[1]);
  expect(new Set(keys).size).toBe(keys.length);
  for (const key of keys) expect(bib.citations(key, 'test')[0].length).toBeGreaterThan(5);
});

it('tables have LF and no line outside the plan of the folder', () => {
  for (const [name, text] of tables.files) {
    expect(text.includes('\r'), name).toBe(false);
    expect(text.endsWith('\n'), name).toBe(true);
  }
});
