import { expect, test } from 'vitest';
import { matchVerdicts, type Verdict } from '../../src/session/index.ts';

const verdict = (at: number, atErr = 0.02): Verdict => ({ at, atErr, decision: 'accepted', accepted: ['X 1.000'] });

test('a verdict survives a refit that moves the feature by its own error', () => {
  const { byFeature, lost } = matchVerdicts([verdict(5008.24)], [{ at: 5008.31, atErr: 0.02 }]);
  expect(byFeature[0]?.at).toBe(5008.24);
  expect(lost).toEqual([]);
});

test('of two features near a verdict the nearest gets it, and only that one', () => {
  const { byFeature } = matchVerdicts(
    [verdict(5008.24)],
    [
      { at: 5008.15, atErr: 0.05 },
      { at: 5008.27, atErr: 0.05 },
    ],
  );
  expect(byFeature.map((v) => v?.at)).toEqual([undefined, 5008.24]);
});

test('two verdicts on two blended features keep their places after both moved the same way', () => {
  const { byFeature } = matchVerdicts(
    [verdict(3727.0), verdict(3727.2)],
    [
      { at: 3727.05, atErr: 0.04 },
      { at: 3727.26, atErr: 0.04 },
    ],
  );
  expect(byFeature.map((v) => v?.at)).toEqual([3727.0, 3727.2]);
});

test('a verdict whose feature is gone is lost, not moved to a stranger', () => {
  const { byFeature, lost } = matchVerdicts([verdict(5008.24)], [{ at: 5010.0, atErr: 0.02 }]);
  expect(byFeature).toEqual([undefined]);
  expect(lost).toHaveLength(1);
});

test('a feature without a known error is found within the least reach', () => {
  expect(matchVerdicts([verdict(5008.24, Number.NaN)], [{ at: 5008.3, atErr: Number.NaN }]).byFeature[0]).toBeDefined();
});
