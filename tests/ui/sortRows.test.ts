import { expect, it } from 'vitest';
import { sortedBy, sortRows } from '../../src/ui/table/sortRows.ts';

const rows = [{ v: 3 }, { v: undefined }, { v: 1 }, { v: 2 }];

it('unknown values stand last in either direction', () => {
  expect(sortRows(rows, (r) => r.v, 'ascending').map((r) => r.v)).toEqual([1, 2, 3, undefined]);
  expect(sortRows(rows, (r) => r.v, 'descending').map((r) => r.v)).toEqual([3, 2, 1, undefined]);
});

it('a second click on a head turns the order round', () => {
  const once = sortedBy({ column: 'wavelength', direction: 'ascending' }, 'flux');
  expect(once).toEqual({ column: 'flux', direction: 'ascending' });
  expect(sortedBy(once, 'flux').direction).toBe('descending');
});
