import { expect, test } from 'vitest';
import { numberPairs, pairsText } from '../../src/ui/desk/numberPairs.ts';

test('pairs are read as they are written', () => {
  const pairs = [
    [4000, 4100.5],
    [6860, 6880],
  ] as const;
  expect(numberPairs(pairsText(pairs, '-'), 'rising')).toEqual(pairs);
  expect(numberPairs('5000 3.2e-15; 6000 -2', 'any')).toEqual([
    [5000, 3.2e-15],
    [6000, -2],
  ]);
});

test('a text that is no row of pairs is refused', () => {
  for (const text of ['4000', '4100-4000', 'a-b', '4000-4100-4200']) expect(numberPairs(text, 'rising')).toBeUndefined();
});
