import { describe, expect, test } from 'vitest';
import {
  accept,
  acceptMany,
  applyChange,
  declare,
  dropShelved,
  EMPTY_DOCUMENT,
  inverseOf,
  openSource,
  reject,
  reopen,
  writeNote,
} from '../../src/session/index.ts';

const feature = { at: 5008.24, atErr: 0.02, label: 'feature 41' };
const oIII = { label: '[O III] 5006.84', keys: ['O III 5008.240'] };
const feI = { label: 'Fe I 5006.71', keys: ['Fe I 5008.100'] };

describe('verdicts', () => {
  test('accepting a name says so in a sentence and pins it to the place of the feature', () => {
    const change = accept(EMPTY_DOCUMENT, feature, oIII);
    expect(change.sentence).toBe('accepted [O III] 5006.84 for feature 41');
    expect(applyChange(EMPTY_DOCUMENT, change).verdicts).toEqual([
      { at: 5008.24, atErr: 0.02, decision: 'accepted', accepted: ['O III 5008.240'] },
    ]);
  });

  test('a rejected name is remembered when another one is accepted', () => {
    let document = applyChange(EMPTY_DOCUMENT, reject(EMPTY_DOCUMENT, feature, feI));
    expect(document.verdicts[0]).toMatchObject({ decision: 'rejected', turnedDown: [['Fe I 5008.100']] });
    document = applyChange(document, accept(document, feature, oIII));
    expect(document.verdicts[0]).toMatchObject({ decision: 'accepted', accepted: ['O III 5008.240'], turnedDown: [['Fe I 5008.100']] });
  });

  test('rejecting another name does not touch an acceptance, rejecting the accepted one ends it', () => {
    let document = applyChange(EMPTY_DOCUMENT, accept(EMPTY_DOCUMENT, feature, oIII));
    document = applyChange(document, reject(document, feature, feI));
    expect(document.verdicts[0].decision).toBe('accepted');
    document = applyChange(document, reject(document, feature, oIII));
    expect(document.verdicts[0]).toMatchObject({ decision: 'rejected', turnedDown: [['Fe I 5008.100'], ['O III 5008.240']] });
    expect(document.verdicts[0].accepted).toBeUndefined();
  });

  test('a note outlives a reopened verdict', () => {
    let document = applyChange(EMPTY_DOCUMENT, writeNote(EMPTY_DOCUMENT, feature, 'asymmetric'));
    document = applyChange(document, declare(document, feature, 'unidentified'));
    document = applyChange(document, reopen(document, feature));
    expect(document.verdicts).toEqual([{ at: 5008.24, atErr: 0.02, note: 'asymmetric' }]);
    document = applyChange(document, writeNote(document, feature, ' '));
    expect(document.verdicts).toEqual([]);
  });

  test('deciding the same again changes nothing', () => {
    const document = applyChange(EMPTY_DOCUMENT, accept(EMPTY_DOCUMENT, feature, oIII));
    expect(accept(document, feature, oIII).steps).toEqual([]);
  });

  test('accepting many is one change and one undo', () => {
    const change = acceptMany(
      EMPTY_DOCUMENT,
      [
        { feature, name: oIII },
        { feature: { at: 4960.3, atErr: 0.02, label: 'feature 40' }, name: { label: '[O III] 4958.91', keys: ['O III 4960.295'] } },
      ],
      'accepted 2 names',
    );
    const document = applyChange(EMPTY_DOCUMENT, change);
    expect(document.verdicts.map((v) => v.at)).toEqual([4960.3, 5008.24]);
    expect(applyChange(document, inverseOf(change))).toEqual(EMPTY_DOCUMENT);
  });

  test('another source puts the first on the shelf with its verdicts, and going back brings both', () => {
    const first = { kind: 'spectrum', name: 'lantern.csv', size: 10 } as const;
    const second = { kind: 'spectrum', name: 'other.fits', size: 20 } as const;
    let document = applyChange(EMPTY_DOCUMENT, openSource(EMPTY_DOCUMENT, first));
    document = applyChange(document, accept(document, feature, oIII));
    const atFirst = document;
    const change = openSource(document, second);
    document = applyChange(document, change);
    expect(document.source).toEqual(second);
    expect(document.verdicts).toEqual([]);
    expect(document.shelf).toEqual([{ source: first, settings: atFirst.settings, verdicts: atFirst.verdicts }]);
    expect(applyChange(document, inverseOf(change))).toEqual(atFirst);
    document = applyChange(document, openSource(document, first));
    expect(document.source).toEqual(first);
    expect(document.verdicts).toEqual(atFirst.verdicts);
    expect(document.shelf?.map((s) => s.source)).toEqual([second]);
  });

  test('a spectrum is closed with its verdicts, and undo brings it back', () => {
    const first = { kind: 'spectrum', name: 'lantern.csv', size: 10 } as const;
    const opened = applyChange(EMPTY_DOCUMENT, openSource(EMPTY_DOCUMENT, first));
    const both = applyChange(opened, openSource(opened, { kind: 'spectrum', name: 'other.fits', size: 20 }));
    const change = dropShelved(both, first);
    expect(applyChange(both, change).shelf).toBeUndefined();
    expect(applyChange(applyChange(both, change), inverseOf(change))).toEqual(both);
  });

  test('a typed redshift and resolving power stay with their spectrum', () => {
    const document = {
      ...EMPTY_DOCUMENT,
      source: { kind: 'spectrum', name: 'a', size: 1 } as const,
      settings: { reading: { hdu: 2 }, measure: { resolvingPower: 900, thresholdSigma: 6 }, naming: { z: 0.1, te: 9000 } },
    };
    const opened = applyChange(document, openSource(document, { kind: 'spectrum', name: 'b', size: 2 }));
    expect(opened.settings).toEqual({ reading: {}, measure: { thresholdSigma: 6 }, naming: { te: 9000 } });
  });

  test('opening what is already on the desk keeps everything', () => {
    const first = { kind: 'spectrum', name: 'lantern.csv', size: 10 } as const;
    let document = applyChange(EMPTY_DOCUMENT, openSource(EMPTY_DOCUMENT, first));
    document = applyChange(document, accept(document, feature, oIII));
    expect(openSource(document, first).steps).toEqual([]);
  });
});
