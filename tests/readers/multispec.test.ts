import { describe, expect, it } from 'vitest';
import { orderWavelengths, parseOrder } from '../../src/readers/fits/multispec.ts';

const wavelengths = (text: string, n: number) => {
  const order = parseOrder(text);
  if (!order) throw new Error('no order');
  return Array.from(orderWavelengths(order, n, 'made.fits', 0, 1));
};

// the polynomials by their definitions, the splines at their knots, all worked out by hand
describe('dispersions of orders in WAT cards', () => {
  it('linear and log-linear, with a redshift taken out', () => {
    expect(wavelengths('1 1 0 5000. 2. 3 0. 0. 10.', 3)).toEqual([5000, 5002, 5004]);
    expect(wavelengths('1 1 0 5000. 2. 3 1. 0. 10.', 2)).toEqual([2500, 2501]);
    const [first, second] = wavelengths('1 1 1 3.7 0.001 2 0. 0. 10.', 2);
    expect(first).toBeCloseTo(10 ** 3.7, 9);
    expect(second).toBeCloseTo(10 ** 3.701, 9);
  });

  it('Chebyshev and Legendre polynomials', () => {
    // three pixels: x = -1, 0, 1
    expect(wavelengths('1 1 2 0 0 3 0. 0. 1. 1. 0. 1 3 1 3 5000. 10. 2.', 3)).toEqual([5000 - 10 + 2, 5000 - 2, 5000 + 10 + 2]);
    expect(wavelengths('1 1 2 0 0 3 0. 0. 1. 1. 0. 2 3 1 3 5000. 10. 2.', 3)).toEqual([5000 - 10 + 2, 5000 - 1, 5000 + 10 + 2]);
  });

  it('splines, lists, and sums of functions with weights and zero points', () => {
    expect(wavelengths('1 1 2 0 0 3 0. 0. 1. 1. 0. 4 2 1 3 5000. 5010. 5030.', 3)).toEqual([5000, 5010, 5030]);
    // a cubic spline whose coefficients are all c is 6 c: its basis adds up to 6
    expect(wavelengths('1 1 2 0 0 3 0. 0. 1. 1. 0. 3 1 1 3 100. 100. 100. 100.', 3)).toEqual([600, 600, 600]);
    expect(wavelengths('1 1 2 0 0 3 0. 0. 1. 1. 0. 5 3 5000. 5001. 5003.', 3)).toEqual([5000, 5001, 5003]);
    expect(wavelengths('1 1 2 0 0 3 0. 0. 1. 0.5 1. 1 1 1 3 5000. 0.5 3. 1 1 1 3 5000.', 1)).toEqual([0.5 * 5001 + 0.5 * 5003]);
  });

  it('other functions are refused', () => {
    expect(() => wavelengths('1 1 2 0 0 3 0. 0. 1. 1. 0. 9 2 1 3 1. 2. 3.', 3)).toThrow(/kind 9/);
    expect(() => wavelengths('1 1 7 0 0 3 0. 0. 1.', 3)).toThrow(/type 7/);
    expect(parseOrder('1 1')).toBeUndefined();
  });
});
