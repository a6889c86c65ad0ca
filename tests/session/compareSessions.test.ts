import { expect, test } from 'vitest';
import { compareSessions, EMPTY_DOCUMENT, type SessionDocument, type Verdict } from '../../src/session/index.ts';

const source = { kind: 'spectrum' as const, name: 'lantern.fits', size: 10, sha256: 'ab' };
const session = (verdicts: readonly Verdict[], measure = {}): SessionDocument => ({
  ...EMPTY_DOCUMENT,
  source,
  settings: { ...EMPTY_DOCUMENT.settings, measure },
  verdicts,
});
const at = (wavelength: number, rest: Partial<Verdict>): Verdict => ({ at: wavelength, atErr: 0.02, ...rest });

test('two opinions are brought together by place, and every difference is a sentence with its reason', () => {
  const first = session(
    [
      at(4686.5, { decision: 'accepted', accepted: ['He II 4686.991'] }),
      at(5008.24, { decision: 'accepted', accepted: ['O III 5008.240'] }),
      at(6302, { decision: 'accepted', accepted: ['O I 6302.046'], note: 'sky taken off' }),
      at(7000, { decision: 'unidentified' }),
    ],
    { thresholdSigma: 6 },
  );
  const second = session([
    at(4686.52, { decision: 'accepted', accepted: ['Ar IV 4686.9'], turnedDown: [['He II 4686.991']], note: 'too narrow for He II' }),
    at(5008.25, { decision: 'accepted', accepted: ['O III 5008.240'] }),
    at(6302.01, { decision: 'artefact' }),
    at(8000, { decision: 'unidentified' }),
  ]);
  const found = compareSessions(first, second);
  expect(found.sameSource).toBe(true);
  expect(found.agreeing).toBe(1);
  expect(found.verdicts.map((d) => [d.at, d.kind])).toEqual([
    [4686.5, 'other-name'],
    [6302, 'other-decision'],
    [7000, 'only-first'],
    [8000, 'only-second'],
  ]);
  expect(found.verdicts[0].sentence).toBe(
    'First: accepted He II 4686.991; second: accepted Ar IV 4686.9 ("too narrow for He II"). The second turned He II 4686.991 down.',
  );
  expect(found.settings).toEqual([{ key: 'measure.thresholdSigma', first: '6', second: 'as the program' }]);
});

test('a session agrees with itself, and one on other bytes is told', () => {
  const one = session([at(5008.24, { decision: 'accepted', accepted: ['O III 5008.240'] })]);
  expect(compareSessions(one, one)).toEqual({ sameSource: true, agreeing: 1, verdicts: [], settings: [] });
  expect(compareSessions(one, { ...one, source: { ...source, sha256: 'cd' } }).sameSource).toBe(false);
});

test('with an analysis at hand every difference says how probable the names are', () => {
  const first = session([at(4686.5, { decision: 'accepted', accepted: ['He II 4686.991'] })]);
  const second = session([at(4686.52, { decision: 'accepted', accepted: ['Ar IV 4686.9'] })]);
  const weighed = [
    { at: 4600, atErr: 0.01, noneProbability: 0.5, candidates: [] },
    { at: 4686.51, atErr: 0.01, noneProbability: 0.01, candidates: [{ keys: ['He II 4686.991'], probability: 0.93 }] },
  ];
  expect(compareSessions(first, second, weighed).verdicts[0].sentence).toMatch(
    / The weighing gives He II 4686\.991 0\.930, Ar IV 4686\.9 no place among the candidates, no name 0\.010\.$/,
  );
});
