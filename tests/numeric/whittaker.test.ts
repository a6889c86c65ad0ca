import { expect, test } from 'vitest';
import { seededRandom, solveLinear, whittaker, whittakerVariance } from '../../src/numeric/index.ts';

const N = 40;
const STIFFNESS = 30;
const random = seededRandom(5);
const weight = Float64Array.from({ length: N }, (_, i) => (i % 7 === 3 ? 0 : 0.5 + random.uniform()));
const y = Float64Array.from({ length: N }, () => random.normal());

/** W + stiffness D'D, written out. */
function matrix(): Float64Array {
  const m = new Float64Array(N * N);
  for (let i = 0; i < N; i++) m[i * N + i] = weight[i];
  for (let k = 0; k < N - 2; k++) {
    const row = [1, -2, 1];
    for (let a = 0; a < 3; a++) for (let b = 0; b < 3; b++) m[(k + a) * N + k + b] += STIFFNESS * row[a] * row[b];
  }
  return m;
}

test('the banded solution is that of the full equations', () => {
  const z = Float64Array.from(y, (v, i) => weight[i] * v);
  expect(solveLinear(matrix(), z)).toBe(true);
  whittaker(y, weight, STIFFNESS).forEach((v, i) => {
    expect(v).toBeCloseTo(z[i], 9);
  });
});

test('the banded variances are the diagonal of the full inverse', () => {
  const variance = whittakerVariance(weight, STIFFNESS);
  for (let i = 0; i < N; i++) {
    const column = new Float64Array(N);
    column[i] = 1;
    solveLinear(matrix(), column);
    expect(variance[i]).toBeCloseTo(column[i], 9);
  }
});
