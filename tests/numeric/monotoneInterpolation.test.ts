import { expect, it } from 'vitest';
import { interpolateMonotone } from '../../src/numeric/index.ts';

// Fritsch & Carlson 1980, table 1 (RPN 14): the data on which a cubic spline overshoots.
const X = [7.99, 8.09, 8.19, 8.7, 9.2, 10, 12, 15, 20];
const Y = [0, 2.76429e-5, 4.37498e-2, 0.169183, 0.469428, 0.94374, 0.998636, 0.999919, 0.999994];

it('monotone nodes give a monotone curve through them', () => {
  for (let k = 0; k < X.length; k++) expect(interpolateMonotone(X, Y, X[k])).toBeCloseTo(Y[k], 14);
  let before = 0;
  for (let x = X[0]; x < X[X.length - 1]; x += 0.01) {
    const y = interpolateMonotone(X, Y, x);
    expect(y).toBeGreaterThanOrEqual(before - 1e-15);
    before = y;
  }
});

it('a straight line is kept, and an extremum stays at its node', () => {
  expect(interpolateMonotone([0, 1, 3, 4], [0, 2, 6, 8], 2.3)).toBeCloseTo(4.6, 12);
  for (const x of [0.4, 0.9, 1.2, 1.7]) expect(interpolateMonotone([0, 1, 2], [0, 1, 0], x)).toBeLessThanOrEqual(1);
});

it('outside the nodes the end value is held', () => {
  expect(interpolateMonotone(X, Y, 0)).toBe(0);
  expect(interpolateMonotone(X, Y, 99)).toBe(0.999994);
  expect(interpolateMonotone([5], [7], 4)).toBe(7);
});
