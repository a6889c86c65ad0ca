import { beforeEach, expect, it } from 'vitest';
import { deskRows } from '../../src/ui/desk/deskRows.ts';
import { desk, setDesk } from '../../src/ui/desk/deskStore.ts';
import { pickAll, pickAlso, pickedRows, pickFurther, pickNone, pickTo, rowsInHand, tick } from '../../src/ui/desk/picking.ts';
import { ionsIn, passes } from '../../src/ui/table/rowFilter.ts';
import { analysed, candidate, feature } from './someDesk.ts';

const rows = deskRows(
  analysed(
    feature(1, 4000, [candidate('[Ne III] 4000.00', 0.99)]),
    feature(2, 4100, [candidate('H I 4100.00', 0.99, 'permitted')]),
    feature(3, 4200, [candidate('[O III] 4200.00', 0.99)]),
    feature(4, 4300, [candidate('O III 4300.00', 0.99, 'permitted')]),
    feature(5, 4400, []),
  ),
  [],
);
const picked = () => [...desk().picked].sort();

beforeEach(() => {
  setDesk({ rows, chosenAt: 4100, filter: {}, sorting: { column: 'wavelength', direction: 'ascending' } });
  pickNone();
});

it('Ctrl and a click add a row to the chosen one and take it out again', () => {
  pickAlso(rows[3]);
  expect(picked()).toEqual([2, 4]);
  expect(rowsInHand().map((row) => row.feature.number)).toEqual([2, 4]);
  pickAlso(rows[1]);
  expect(picked()).toEqual([4]);
  // one row is no crowd: what is decided is decided on the chosen feature
  expect(rowsInHand().map((row) => row.feature.number)).toEqual([2]);
});

it('Shift picks from the chosen row to the clicked one and back over it, in the order of the table', () => {
  pickTo(rows[4]);
  expect(picked()).toEqual([2, 3, 4, 5]);
  pickTo(rows[0]);
  expect(picked()).toEqual([1, 2]);
  setDesk({ sorting: { column: 'wavelength', direction: 'descending' } });
  pickFurther(-1);
  expect(picked()).toEqual([2]);
});

it('what the filter hides is not picked by "all", and a box ticks its own row alone', () => {
  setDesk({ filter: { nature: 'permitted' } });
  pickAll();
  expect(picked()).toEqual([2, 4]);
  pickNone();
  tick(rows[4]);
  expect(picked()).toEqual([5]);
  expect(pickedRows(rows, desk().picked)).toEqual([]);
});

it('the filter tells an ion from the same ion in brackets', () => {
  expect(ionsIn(rows)).toEqual(['H I', '[Ne III]', '[O III]', 'O III']);
  expect(rows.filter((row) => passes(row, { ion: 'O III' })).map((row) => row.feature.number)).toEqual([4]);
  expect(rows.filter((row) => passes(row, { ion: '[O III]' })).map((row) => row.feature.number)).toEqual([3]);
});
