import { describe, expect, it } from 'vitest';
import { fluxText, powerText, probabilityText, signed, withError } from '../../src/ui/figures.ts';

describe('numbers on screen', () => {
  it('have as many decimals as two digits of their error', () => {
    expect(withError(5006.84312, 0.0121, 2)).toBe('5006.843 ± 0.012');
    expect(withError(5006.84312, undefined, 2)).toBe('5006.84');
    expect(withError(123.4, 25, 2)).toBe('123 ± 25');
  });

  it('show a velocity with its sign, a real minus included', () => {
    expect(signed(31.24, 0.41, 1)).toBe('+31.24 ± 0.41');
    expect(signed(-31.24, undefined, 1)).toBe('−31.2');
  });

  it('put flux and error on one power of ten', () => {
    expect(fluxText(9.852e-14, 3.1e-16)).toBe('9.852 ± 0.031 e−14');
    expect(fluxText(985.2, 3.1)).toBe('985.2 ± 3.1');
  });

  it('never claim certainty', () => {
    expect(probabilityText(1)).toBe('> 0.999');
    expect(probabilityText(0)).toBe('< 0.001');
    expect(probabilityText(0.7314)).toBe('0.731');
    expect(probabilityText(undefined)).toBe('–');
  });

  it('write large and small numbers as powers', () => {
    expect(powerText(6.8e5, 2)).toBe('6.8 × 10⁵');
    expect(powerText(1.2e-7, 2)).toBe('1.2 × 10⁻⁷');
    expect(powerText(36.9, 3)).toBe('36.9');
  });
});
