import { describe, expect, test } from 'vitest';
import { bundled as data } from '../atomic/bundledData.ts';
import { asideNebula, binOf, type Claims, claimsFor, usualNebula } from './reliability.ts';

/** Claimed and true may differ by this much in every populated bin. */
const TOLERANCE = 0.05;
/** ... and by this much where the objects are unlike all that the model was looked at with: nothing is chosen by them. */
const TOLERANCE_OUTSIDE = 0.08;
/** Two sigma of so many counts are about the tolerance. */
const POPULATED = 280;

/** The larger run with its figure is made by `npm run bench` and kept as reliability.svg beside this file. */
function check({ claims, missedRedshifts, spectra }: Claims, edges: readonly number[], least: number, missed: number, tolerance: number) {
  test(`of 100 redshifts at most ${Math.round(100 * missed)} are missed`, () => {
    expect(missedRedshifts.length / spectra).toBeLessThanOrEqual(missed);
  });

  test(`${Math.round(100 * least)} of 100 names are right`, () => {
    expect(claims.filter((c) => c.right).length / claims.length).toBeGreaterThan(least);
  });

  test.each(edges.slice(1).map((high, k) => [edges[k], high]))('of the names claimed with %f to %f as many are right', (low, high) => {
    const { claimed, right, count } = binOf(claims, low, high);
    expect(count).toBeGreaterThan(POPULATED);
    expect(Math.abs(claimed - right), `claimed ${claimed.toFixed(3)}, right ${right.toFixed(3)} of ${count}`).toBeLessThan(tolerance);
  });
}

describe('nebulae of all kinds, made from the list with other abundances, temperatures, densities, reddening, errors of calibration and missing entries', () => {
  // seeds that nothing was looked at with
  check(claimsFor(data, usualNebula, 3001, 3150), [0.3, 0.65, 0.8, 0.9, 0.95, 1], 0.95, 0.02, TOLERANCE);
});

describe('nebulae outside the ranges that the model was looked at with', () => {
  check(claimsFor(data, asideNebula, 1001, 1075), [0.3, 0.7, 0.9, 1], 0.93, 0.05, TOLERANCE_OUTSIDE);
});
