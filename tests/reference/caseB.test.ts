import { expect, it } from 'vitest';
import { caseBIntensity } from '../../src/atomic/index.ts';
import { bundled } from '../atomic/bundledData.ts';

// Osterbrock & Ferland 2006, table 4.4 (after Storey & Hummer 1995), from memory: Te, ne, H alpha, H gamma, H delta over H beta.
const TABLE = [
  [5_000, 1e2, 3.041, 0.458, 0.251],
  [5_000, 1e4, 3.001, 0.46, 0.253],
  [10_000, 1e2, 2.863, 0.468, 0.259],
  [10_000, 1e4, 2.847, 0.469, 0.26],
  [20_000, 1e2, 2.747, 0.475, 0.264],
  [20_000, 1e4, 2.739, 0.476, 0.264],
] as const;

it('Balmer ratios of case B are met within 0.5 %', () => {
  for (const [te, ne, alpha, gamma, delta] of TABLE) {
    const ratio = (n: number): number =>
      caseBIntensity(bundled.caseB, 'H I', 2, n, te, ne) / caseBIntensity(bundled.caseB, 'H I', 2, 4, te, ne);
    expect(Math.abs(ratio(3) / alpha - 1)).toBeLessThan(0.005);
    expect(Math.abs(ratio(5) / gamma - 1)).toBeLessThan(0.005);
    expect(Math.abs(ratio(6) / delta - 1)).toBeLessThan(0.005);
  }
});

it('intensities change smoothly between the nodes and are held outside', () => {
  const alpha = (te: number, ne: number): number => caseBIntensity(bundled.caseB, 'H I', 2, 3, te, ne);
  expect(alpha(7_500, 1e3)).toBeLessThan(alpha(5_000, 1e3));
  expect(alpha(7_500, 1e3)).toBeGreaterThan(alpha(10_000, 1e3));
  expect(alpha(4_000, 1e3)).toBe(alpha(5_000, 1e3));
  expect(alpha(1e4, 10)).toBe(alpha(1e4, 100));
  expect(alpha(1e4, 1e6)).toBe(alpha(1e4, 1e4));
  expect(caseBIntensity(bundled.caseB, 'H I', 2, 99, 1e4, 1e3)).toBeNaN();
  expect(caseBIntensity(bundled.caseB, 'He II', 3, 4, 12_000, 1e3)).toBeCloseTo(100, 3);
});

it('a hydrogenic line is found by its quantum numbers', () => {
  const line = bundled.hydrogenicLine('H I', 2, 3);
  expect(bundled.lineName(line)).toBe('Balmer alpha');
  expect(bundled.hydrogenicLine('He II', 3, 4)).toBeGreaterThan(0);
  expect(bundled.hydrogenicLine('H I', 2, 99)).toBe(-1);
});
