import { expect, it } from 'vitest';
import { solveLinear, stationaryShares } from '../../src/numeric/index.ts';

it('two states share by the ratio of their rates', () => {
  expect(Array.from(stationaryShares(Float64Array.of(0, 3, 1, 0), 2))).toEqual([0.25, 0.75]);
});

it('a chain keeps shares of 10^-200 to all digits', () => {
  // up 1e-50, down 1: each share is 1e-50 of the one before
  const n = 5;
  const rates = new Float64Array(n * n);
  for (let k = 1; k < n; k++) {
    rates[(k - 1) * n + k] = 1e-50;
    rates[k * n + k - 1] = 1;
  }
  const shares = stationaryShares(rates, n);
  for (let k = 0; k < n; k++) expect(shares[k] / 10 ** (-50 * k)).toBeCloseTo(1, 12);
});

it('what the diagonal holds does not matter, and a state with no way back counts as empty', () => {
  // state 2 is entered from 1 and never left
  const rates = Float64Array.of(9, 1, 0, 1, 9, 5, 0, 0, 9);
  expect(Array.from(stationaryShares(rates, 3))).toEqual([0.5, 0.5, 0]);
});

it('one state holds everything', () => {
  expect(Array.from(stationaryShares(Float64Array.of(0), 1))).toEqual([1]);
});

it('the shares are those of Gaussian elimination where that keeps its digits', () => {
  const n = 12;
  const rates = Float64Array.from({ length: n * n }, (_, k) => 1 + ((k * 7919) % 97));
  const equations = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      if (i === j) continue;
      equations[j * n + i] += rates[i * n + j];
      equations[i * n + i] -= rates[i * n + j];
    }
  }
  const expected = new Float64Array(n);
  expected[0] = 1;
  equations.fill(1, 0, n);
  expect(solveLinear(equations, expected)).toBe(true);
  const shares = stationaryShares(rates, n);
  for (let k = 0; k < n; k++) expect(shares[k]).toBeCloseTo(expected[k], 12);
});
