import { expect, test } from 'vitest';
import { applyChange, dropEdit, EMPTY_DOCUMENT, editFeature, inverseOf, openSource } from '../../src/session/index.ts';

test('edits are kept in order, taken out one by one, and undone', () => {
  const first = editFeature(EMPTY_DOCUMENT, { edit: 'add', at: 5000 }, 'added a feature at 5000');
  const one = applyChange(EMPTY_DOCUMENT, first);
  const second = editFeature(one, { edit: 'split', at: 5000 }, 'split feature 3');
  const two = applyChange(one, second);
  expect(two.settings.measure.edits?.map((e) => e.edit)).toEqual(['add', 'split']);
  expect(applyChange(two, inverseOf(second))).toEqual(one);
  expect(applyChange(two, dropEdit(two, 0, 'took out')).settings.measure.edits?.map((e) => e.edit)).toEqual(['split']);
  expect(applyChange(one, dropEdit(one, 0, 'took out')).settings.measure).toEqual({});
});

test('another spectrum starts without the edits, pins and widths of the first', () => {
  const measure = {
    thresholdSigma: 6,
    instrumentFwhmA: 2,
    continuum: { pins: [{ wavelength: 5000, level: 1 }] },
    edits: [{ edit: 'add', at: 5000 } as const],
  };
  const document = {
    ...EMPTY_DOCUMENT,
    source: { kind: 'spectrum' as const, name: 'a.csv', size: 1 },
    settings: { ...EMPTY_DOCUMENT.settings, measure },
  };
  const after = applyChange(document, openSource(document, { kind: 'spectrum', name: 'b.csv', size: 2 }));
  expect(after.settings.measure).toEqual({ thresholdSigma: 6 });
});
