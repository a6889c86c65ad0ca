import { expect, it } from 'vitest';
import { isInsideRange, type LevelModel, UPSILON_TE, upsilonAt } from '../../src/atomic/index.ts';
import { someAtom } from './someAtom.ts';

/** An atom of one pair with the given collision strengths at the temperatures of the table. */
function pairWith(upsilon: readonly number[], range = ''): LevelModel {
  const atom = someAtom({ levels: '3P 0 0 even; 1D 2 20000 even', decays: '0 1 0.02', collisions: `0 1 1 ${range}`.trim() });
  return { ...atom, collisions: { ...atom.collisions, upsilon: Float32Array.from(upsilon) } };
}

it('collision strengths go through the table and stay between its neighbours', () => {
  const upsilon = [2, 2.1, 2.2, 2.25, 2.3, 2.31, 2.33, 2.4, 2.5];
  const atom = pairWith(upsilon);
  UPSILON_TE.forEach((te, k) => {
    expect(upsilonAt(atom, 0, te)).toBeCloseTo(upsilon[k], 6);
  });
  expect(upsilonAt(atom, 0, 6000)).toBeGreaterThan(2.2);
  expect(upsilonAt(atom, 0, 6000)).toBeLessThan(2.25);
});

it('they are held, not extrapolated, where the source ends', () => {
  const none = Number.NaN;
  const atom = pairWith([none, none, 1, 2, 3, none, 4, 5, none]);
  expect(upsilonAt(atom, 0, 2000)).toBe(1);
  expect(upsilonAt(atom, 0, 30_000)).toBe(5);
  expect(upsilonAt(atom, 0, 12_500)).toBeGreaterThan(3);
  expect(upsilonAt(atom, 0, 12_500)).toBeLessThan(4);
  expect(upsilonAt(pairWith(UPSILON_TE.map(() => none)), 0, 10_000)).toBe(0);
});

it('a temperature outside the table or the range of the source is told', () => {
  const atom = pairWith(
    UPSILON_TE.map(() => 1),
    '5000 15000',
  );
  expect([4000, 5000, 10_000, 15_000, 20_000].map((te) => isInsideRange(atom, 1, te))).toEqual([false, true, true, true, false]);
  const unlimited = pairWith(UPSILON_TE.map(() => 1));
  expect([1000, 2000, 30_000, 40_000].map((te) => isInsideRange(unlimited, 1, te))).toEqual([false, true, true, false]);
});
