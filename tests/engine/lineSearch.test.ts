import { describe, expect, test } from 'vitest';
import { companionFinder } from '../../src/atomic/index.ts';
import { lineRecord, searchLines } from '../../src/engine/index.ts';
import { lineKey, lineOfKey } from '../../src/engine/lineNames.ts';
import { bundled, lineAtAir } from '../atomic/bundledData.ts';

const found = (query: string) => searchLines(bundled, query).lines.map((l) => `${l.ion} ${l.wavelengthAir.toFixed(2)}`);

describe('the line list, searched', () => {
  test('by ion and wavelength together, in any order', () => {
    expect(found('[O III] 5007')).toContain('[O III] 5006.84');
    expect(found('5007 O III')).toEqual(found('[O III] 5007'));
    expect(found('[O III] 5007').every((l) => /O III/.test(l))).toBe(true);
  });

  test('an ion is not taken for another that begins like it', () => {
    expect(found('O II 3700-3760').every((l) => /\bO II\]?\b(?!I)/.test(l))).toBe(true);
  });

  test('by a range of wavelengths, ascending', () => {
    const { lines } = searchLines(bundled, '4900 - 5010');
    expect(lines.length).toBeGreaterThan(20);
    expect(
      lines.every(
        (l, k) => l.wavelengthAir >= 4899.9 && l.wavelengthAir <= 5010.1 && (k === 0 || l.wavelengthVac >= lines[k - 1].wavelengthVac),
      ),
    ).toBe(true);
  });

  test('by words of the multiplet', () => {
    const { lines } = searchLines(bundled, 'O II 3s 4P 3p 4Do');
    expect(lines.map((l) => l.wavelengthAir.toFixed(1))).toContain('4649.1');
  });

  test('says how many fit when it does not show them all', () => {
    const { lines, total, understood } = searchLines(bundled, '');
    expect(total).toBe(bundled.lines.count);
    expect(lines.length).toBeLessThan(total);
    expect(understood).toBe('all lines');
  });
});

test('a record holds levels, A value, lifetime, critical density, strength and sources', () => {
  const record = lineRecord(bundled, lineAtAir('O III', 5006.843), 10_000, 1_000, companionFinder(bundled));
  expect(record).toMatchObject({ ion: '[O III]', nature: 'forbidden', lower: '2p2 3P 2', upper: '2p2 1D 2' });
  // A = 0.0202 s^-1: Storey & Zeippen 2000, MNRAS 312, 813 (from memory)
  expect(record.aValue).toBeCloseTo(0.0202, 3);
  expect(record.thinGas?.nCrit).toBeGreaterThan(5e5);
  expect(record.sources.length).toBeGreaterThan(0);
  expect(record.strengthNote).not.toBe('');
  // 5007 / 4959 = 2.98: Storey & Zeippen 2000, MNRAS 312, 813
  const doublet = record.companions.find((c) => Math.abs(c.wavelengthAir - 4958.91) < 0.1);
  expect(doublet?.relation).toBe('same-upper-level');
  expect(1 / (doublet?.ratio ?? 0)).toBeCloseTo(2.98, 1);
  expect(() => lineRecord(bundled, -1, 10_000, 1_000, companionFinder(bundled))).toThrow(RangeError);
});

test('a line of the sky and the same transition of the object are remembered apart', () => {
  const { lines } = bundled;
  const oi = Array.from({ length: lines.count }, (_, line) => line).filter(
    (line) => lines.ions[lines.ion[line]].name === 'O I' && Math.abs(lines.wavelengthVac[line] - 5578.887) < 0.05,
  );
  const keys = oi.map((line) => lineKey(bundled, line));
  expect(oi.length).toBeGreaterThanOrEqual(2);
  expect(new Set(keys).size).toBe(keys.length);
  for (const [k, line] of oi.entries()) expect(lineOfKey(bundled, keys[k])).toBe(line);
  // a key of an older session means the object's line
  expect(lineKey(bundled, lineOfKey(bundled, keys[0].replace('sky ', '')) ?? -1)).not.toMatch(/^sky/);
});
