import { describe, expect, test } from 'vitest';
import { chosenRows, DEFAULT_DESIGN, knownDesign, PRESETS, paperTable, plainText } from '../../src/report/index.ts';
import { blend, oIII, table } from './someTable.ts';

const nameless = { ...blend, feature: 3, ion: undefined, wavelengthLab: undefined, wavelengthObs: 4000, note: '' };
const rows = table(
  oIII,
  { ...blend, verdict: 'accepted' as const },
  { ...nameless, verdict: 'unidentified' as const },
  { ...nameless, feature: 4 },
  { ...oIII, feature: 5, verdict: 'artefact' as const },
);
const cells = (design: Parameters<typeof paperTable>[1]) => paperTable(rows, design).rows.map((row) => row.cells.map(plainText));

describe('a designed table', () => {
  test.each([
    ['accepted', [2, 1]],
    ['accepted-and-unidentified', [2, 3, 1]],
    ['named', [2, 1]],
    ['all', [2, 3, 4, 1]],
  ] as const)('rows "%s" are %j', (choice, numbers) => {
    expect(chosenRows(rows, { rows: choice, order: 'wavelength' }).map((row) => row.feature)).toEqual(numbers);
  });

  test('is ordered by ion without its brackets, or by flux', () => {
    expect(chosenRows(rows, { rows: 'accepted', order: 'ion' }).map((row) => row.ion)).toEqual(['H I+He I', '[O III]']);
    expect(chosenRows(rows, { rows: 'accepted', order: 'flux' }).map((row) => row.feature)).toEqual([1, 2]);
  });

  test('holds the columns asked for, in their order, and marks notes by letters', () => {
    const paper = paperTable(rows, { ...DEFAULT_DESIGN, columns: ['note', 'ion', 'observed'] });
    expect(paper.columns.map((c) => c.key)).toEqual(['note', 'ion', 'observed']);
    expect(paper.rows[0].cells.map(plainText)).toEqual(['^a', 'H\u00a0i + He\u00a0i', '3889.40']);
    expect(paper.notes).toEqual([{ mark: 'a', text: blend.note }]);
  });

  test('gives every part of a blend a row of its own when asked', () => {
    const paper = paperTable(rows, PRESETS.appendix);
    expect(paper.rows.map((row) => row.kind)).toEqual(['line', 'part', 'line', 'line', 'line']);
    const ion = paper.columns.findIndex((c) => c.key === 'ion');
    expect(paper.rows.slice(0, 2).map((row) => plainText(row.cells[ion]))).toEqual(['H\u00a0i', 'He\u00a0i']);
  });

  test('rounds by the error: one digit or two', () => {
    const one = cells({ ...DEFAULT_DESIGN, columns: ['observed', 'flux'], errorDigits: 1, rows: 'accepted', scale: 'as-measured' });
    expect(one[1]).toEqual(['5007.36 ± 0.01', '985 ± 3']);
    const two = cells({ ...DEFAULT_DESIGN, columns: ['observed', 'flux'], rows: 'accepted', scale: 'as-measured' });
    expect(two[1]).toEqual(['5007.363 ± 0.012', '985.2 ± 3.1']);
    expect(two[0]).toEqual(['3889.40', '1.230 × 10^−14']);
  });

  test('says in what medium it stands, and that open names are proposals', () => {
    const said = (design: Parameters<typeof paperTable>[1]) => paperTable(rows, design).remarks.map(plainText).join(' ');
    expect(said(DEFAULT_DESIGN)).toContain('standard air');
    expect(said(DEFAULT_DESIGN)).not.toContain('proposals');
    expect(said(PRESETS.appendix)).toContain('proposals');
  });
});

describe('a design out of a session file', () => {
  test('comes back as it was when this release knows all of it', () => {
    for (const design of Object.values(PRESETS)) expect(knownDesign(design)).toEqual(design);
    expect(knownDesign({ ...PRESETS.letter, caption: 'Lines' })).toEqual({ ...PRESETS.letter, caption: 'Lines' });
    expect(knownDesign(undefined)).toBe(DEFAULT_DESIGN);
  });

  test('loses what this release does not know, and never the table', () => {
    const odd = knownDesign({ columns: ['ion', 'colour', 'ion', 7, 'constructor'], rows: 'some', errorDigits: 3, caption: 5 });
    expect(odd).toEqual({ ...DEFAULT_DESIGN, columns: ['ion'] });
    expect(paperTable(rows, knownDesign({ columns: 'all' })).columns).toHaveLength(DEFAULT_DESIGN.columns.length);
  });
});
