import { describe, expect, it } from 'vitest';
import { deskRows, nextOpen, shortName } from '../../src/ui/desk/deskRows.ts';
import { passes } from '../../src/ui/table/rowFilter.ts';
import { analysed, candidate, feature, verdict } from './someDesk.ts';

const oIII = candidate('[O III] 5006.84', 0.98);
const feI = candidate('Fe I 5006.71', 0.01, 'permitted');
const desk = analysed(feature(1, 4959, [candidate('[O III] 4958.91', 0.97)]), feature(2, 5007, [oIII, feI]), feature(3, 5300, []));

describe('rows of the desk', () => {
  it('carry the best name while nothing is decided', () => {
    const rows = deskRows(desk, []);
    expect(rows.map((row) => row.name?.label)).toEqual(['[O III] 4958.91', '[O III] 5006.84', undefined]);
    expect(rows.map((row) => row.standing)).toEqual(['open', 'open', 'open']);
  });

  it('show a verdict at once, before anything is weighed anew', () => {
    const rows = deskRows(desk, [verdict(5007, { decision: 'accepted', accepted: feI.keys })]);
    expect(rows[1].name?.label).toBe('Fe I 5006.71');
    expect(rows[1].standing).toBe('accepted');
  });

  it('after a name is turned down the next candidate is on top and no name is in force', () => {
    const [, row] = deskRows(desk, [verdict(5007, { decision: 'rejected', turnedDown: [oIII.keys] })]);
    expect(row.name).toBeUndefined();
    expect(row.candidates.map((c) => c.label)).toEqual(['Fe I 5006.71']);
    expect(row.turnedDown.map((c) => c.label)).toEqual(['[O III] 5006.84']);
  });

  it('a name less likely than "none of these" is not in force', () => {
    const [row] = deskRows(analysed(feature(1, 5007, [candidate('[O III] 5006.84', 0.3)], 0.7)), []);
    expect(row.name).toBeUndefined();
  });

  it('the next open feature is looked for around the end', () => {
    const rows = deskRows(desk, [verdict(5300, { decision: 'unidentified' })]);
    expect(nextOpen(rows, 1)).toBe(0);
    const decided = deskRows(
      desk,
      [4959, 5007, 5300].map((at) => verdict(at, { decision: 'unidentified' })),
    );
    expect(nextOpen(decided, 1)).toBeUndefined();
  });

  it('names are shortened as figures print them', () => {
    expect(shortName(oIII)).toBe('[O III] 5007');
    expect(shortName(candidate('O I 5577.34', 1, 'sky'))).toBe('O I 5577 sky');
    expect(shortName(candidate('H I 3889.05 + He I 3888.65', 1))).toBe('H I + He I 3889+');
  });
});

describe('the filter of the table', () => {
  const rows = deskRows(desk, [verdict(5300, { decision: 'unidentified', note: 'faint, doubtful' })]);
  const shown = (filter: Parameters<typeof passes>[1]) => rows.filter((row) => passes(row, filter)).map((row) => row.feature.number);

  it('finds words in name, wavelength and note, all of them', () => {
    expect(shown({ text: 'o iii' })).toEqual([1, 2]);
    expect(shown({ text: 'o 5007' })).toEqual([2]);
    expect(shown({ text: 'doubtful' })).toEqual([3]);
  });

  it('tells natures, verdicts and probabilities apart', () => {
    expect(shown({ nature: 'unnamed' })).toEqual([3]);
    expect(shown({ nature: 'thin-gas' })).toEqual([1, 2]);
    expect(shown({ nature: 'permitted' })).toEqual([]);
    expect(shown({ standing: 'unidentified' })).toEqual([3]);
    expect(shown({ probability: 'sure' })).toEqual([1, 2]);
    expect(shown({ probability: 'doubtful' })).toEqual([3]);
  });
});
