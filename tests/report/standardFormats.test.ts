import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { COLUMNS, TABLE_FORMATS } from '../../src/report/index.ts';
import { blend, oIII, table } from './someTable.ts';

// The same rows through every format must give the cells of the CSV table; astropy 5.2 reads all three without an error (checked by hand with tests/report/readBack.py).
const rows = [oIII, { ...blend, note: 'a "quoted" < b & c' }, { ...oIII, feature: 3, flux: 3.3e-15, alternatives: [] }];
const expected = rows.map((row) => COLUMNS.map((column) => column.cell(row)));

test('ECSV: the head names a column for every cell and the rows hold the cells', () => {
  const lines = TABLE_FORMATS.ecsv
    .write(table(...rows))
    .trimEnd()
    .split('\n');
  expect(lines[0]).toBe('# %ECSV 1.0');
  const head = lines.filter((line) => line.startsWith('# - {name: '));
  expect(head.map((line) => /name: (\w+)/.exec(line)?.[1])).toEqual(COLUMNS.map((c) => c.key));
  const body = Papa.parse<string[]>(lines.filter((line) => !line.startsWith('#')).join('\n')).data;
  expect(body[0]).toEqual(COLUMNS.map((c) => c.key));
  const booleans = COLUMNS.map((c) => c.kind === 'boolean');
  expect(body.slice(1).map((cells) => cells.map((cell, k) => (booleans[k] ? cell.toLowerCase() : cell)))).toEqual(expected);
});

describe('VOTable', () => {
  const text = TABLE_FORMATS.votable.write(table(...rows));
  const decoded = (cell: string) => cell.replaceAll('&lt;', '<').replaceAll('&gt;', '>').replaceAll('&quot;', '"').replaceAll('&amp;', '&');

  test('has a field for every column and as many cells', () => {
    expect([...text.matchAll(/<FIELD name="(\w+)"/g)].map((m) => m[1])).toEqual(COLUMNS.map((c) => c.key));
    const cells = [...text.matchAll(/<TR>(.*?)<\/TR>/g)].map((m) => [...m[1].matchAll(/<TD>(.*?)<\/TD>/g)].map((c) => decoded(c[1])));
    expect(cells).toEqual(expected.map((row) => row.map((cell, k) => (COLUMNS[k].kind === 'boolean' && cell === '' ? '?' : cell))));
  });

  test('closes every element it opens', () => {
    for (const name of ['VOTABLE', 'RESOURCE', 'TABLE', 'DATA', 'TABLEDATA', 'TR', 'TD', 'PARAM', 'FIELD', 'DESCRIPTION']) {
      expect([...text.matchAll(new RegExp(`<${name}[ >]`, 'g'))].length, name).toBe(
        [...text.matchAll(new RegExp(`</${name}>`, 'g'))].length,
      );
    }
  });
});

test('machine-readable table: the bytes named in the head cut every cell out of every row', () => {
  const lines = TABLE_FORMATS.mrt
    .write(table(...rows))
    .trimEnd()
    .split('\n');
  const columns = lines.map((line) => /^\s*(\d+)(?:-\s*(\d+))? +([IAFE])(\d+)\S* +\S+ +(\w+)/.exec(line)).filter((m) => m !== null);
  expect(columns.map((m) => m[5])).toEqual(COLUMNS.map((c) => c.key));
  const last = lines.map((line) => /^-+$/.test(line)).lastIndexOf(true);
  const cells = lines.slice(last + 1).map((line) => columns.map((m) => line.slice(Number(m[1]) - 1, Number(m[2] ?? m[1])).trim()));
  expect(cells).toEqual(expected);
});

test('a table without rows is still a table in every format', () => {
  for (const format of Object.values(TABLE_FORMATS)) expect(format.write(table()).length).toBeGreaterThan(50);
});
