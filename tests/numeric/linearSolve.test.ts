import { expect, it } from 'vitest';
import { solveLinear } from '../../src/numeric/index.ts';

it('a system whose first pivot is zero is solved by exchanging rows', () => {
  const rhs = Float64Array.of(5, 4, 11);
  expect(solveLinear(Float64Array.of(0, 1, 1, 1, 0, 1, 2, 1, 2), rhs)).toBe(true);
  // x = (2, 3, 2)
  expect(Array.from(rhs)).toEqual([2, 3, 2]);
});

it('the Hilbert matrix of order 6 gives back ones to the 8 digits its condition number of 1.5e7 leaves', () => {
  const n = 6;
  const matrix = Float64Array.from({ length: n * n }, (_, k) => 1 / (Math.floor(k / n) + (k % n) + 1));
  const rhs = Float64Array.from({ length: n }, (_, i) => matrix.subarray(i * n, i * n + n).reduce((sum, value) => sum + value, 0));
  expect(solveLinear(matrix, rhs)).toBe(true);
  for (const x of rhs) expect(x).toBeCloseTo(1, 8);
});

it('a singular system is told from a solvable one', () => {
  expect(solveLinear(Float64Array.of(1, 2, 2, 4), Float64Array.of(1, 2))).toBe(false);
  expect(solveLinear(Float64Array.of(Number.NaN, 0, 0, 1), Float64Array.of(1, 1))).toBe(false);
});
