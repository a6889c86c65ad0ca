import { describe, expect, test } from 'vitest';
import { erfc, interpolateMonotone, median, normalTail, quantile, robustSigma, seededRandom, whittaker } from '../../src/numeric/index.ts';

describe('robust statistics', () => {
  test('median and quantiles pass over what is not finite', () => {
    expect(median([3, Number.NaN, 1, 2, Number.POSITIVE_INFINITY])).toBe(2);
    expect(quantile([0, 10], 0.25)).toBe(2.5);
    expect(median([])).toBeNaN();
  });

  test('one wild value in ten does not move sigma', () => {
    const random = seededRandom(3);
    const values = Array.from({ length: 4000 }, (_, i) => (i % 10 === 0 ? 1e6 : 2 * random.normal()));
    expect(robustSigma(values)).toBeGreaterThan(1.9);
    expect(robustSigma(values)).toBeLessThan(2.4);
  });
});

describe('the normal distribution', () => {
  // Abramowitz & Stegun 1964, tables 7.1 and 26.2 (from memory)
  test.each([
    [0, 1],
    [0.5, 0.479_500_122_2],
    [1, 0.157_299_207_1],
    [2, 0.004_677_734_981],
    [-1, 1.842_700_792_9],
  ])('erfc(%s) = %s', (x, value) => {
    expect(erfc(x)).toBeCloseTo(value, 9);
  });

  test('erfc is continuous where its two formulae meet', () => {
    expect(erfc(2.5 - 1e-9) / erfc(2.5 + 1e-9)).toBeCloseTo(1, 7);
  });

  test('five sigma leave 2.87e-7 in one tail', () => {
    expect(normalTail(5)).toBeCloseTo(2.866_515_7e-7, 12);
  });
});

test('the same seed gives the same numbers, with the mean and width of a normal distribution', () => {
  const a = seededRandom(11);
  const b = seededRandom(11);
  const draws = Array.from({ length: 20_000 }, () => a.normal());
  expect(Array.from({ length: 20_000 }, () => b.normal())).toEqual(draws);
  const mean = draws.reduce((s, v) => s + v, 0) / draws.length;
  const variance = draws.reduce((s, v) => s + (v - mean) ** 2, 0) / draws.length;
  expect(Math.abs(mean)).toBeLessThan(4 / Math.sqrt(draws.length));
  expect(Math.abs(variance - 1)).toBeLessThan(4 * Math.sqrt(2 / draws.length));
});

describe('smoothing', () => {
  test('a straight line passes through unchanged, also across a gap', () => {
    const y = Float64Array.from({ length: 200 }, (_, i) => 3 + 0.5 * i);
    const weight = new Float64Array(200).fill(1);
    weight.fill(0, 80, 120);
    y.fill(Number.NaN, 80, 120);
    for (const [i, z] of whittaker(y, weight, 1e4).entries()) expect(z).toBeCloseTo(3 + 0.5 * i, 6);
  });

  test('a wave of the half period comes out at half its height', () => {
    const period = 50;
    const y = Float64Array.from({ length: 2000 }, (_, i) => Math.sin((2 * Math.PI * i) / period));
    const z = whittaker(y, new Float64Array(2000).fill(1), (period / (2 * Math.PI)) ** 4);
    expect(Math.max(...z.slice(500, 1500))).toBeCloseTo(0.5, 1);
  });
});

test('monotone interpolation keeps to its nodes and never overshoots', () => {
  const x = [0, 1, 2, 3, 4];
  const y = [0, 0, 1, 1, 5];
  for (const [k, at] of x.entries()) expect(interpolateMonotone(x, y, at)).toBeCloseTo(y[k], 12);
  for (let at = 0; at <= 4; at += 0.01) expect(interpolateMonotone(x, y, at)).toBeLessThanOrEqual(at <= 3 ? 1 + 1e-12 : 5);
  expect(interpolateMonotone(x, y, 9)).toBe(5);
});
