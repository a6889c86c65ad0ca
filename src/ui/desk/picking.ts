import { tableRows } from '../table/tableRows.ts';
import { choose, chosenRow } from './chosen.ts';
import type { DeskRow } from './deskRows.ts';
import { desk, setDesk } from './deskStore.ts';

// Several rows picked at once: by Ctrl or ⌘ and a click, by Shift and a click or arrow, by the boxes of the rows. Picked rows are kept by feature number.

/** Fewer is the chosen feature alone. */
const SEVERAL = 2;

const shownRows = () => tableRows(desk().rows, desk().filter, desk().sorting);
const numberOf = (row: DeskRow) => row.feature.number;

/** The picked rows in the order of the table; none when fewer than two are picked. */
export function pickedRows(rows: readonly DeskRow[], picked: readonly number[]): DeskRow[] {
  if (picked.length < SEVERAL) return [];
  const wanted = new Set(picked);
  return rows.filter((row) => wanted.has(numberOf(row)));
}

/** What a decision is about: the picked rows, else the chosen one. */
export function rowsInHand(): DeskRow[] {
  const several = pickedRows(desk().rows, desk().picked);
  const row = chosenRow();
  return several.length > 0 ? several : row ? [row] : [];
}

/** Adds a row to the picked ones or takes it out; the first one joins the chosen feature. */
export function pickAlso(row: DeskRow): void {
  const { picked } = desk();
  const own = chosenRow();
  const base = picked.length === 0 && own && own !== row ? [numberOf(own)] : picked;
  setDesk({ picked: base.includes(numberOf(row)) ? base.filter((number) => number !== numberOf(row)) : [...base, numberOf(row)] });
}

/** Ticks a row's box: only this row, whatever is chosen. */
export function tick(row: DeskRow): void {
  const { picked } = desk();
  setDesk({ picked: picked.includes(numberOf(row)) ? picked.filter((number) => number !== numberOf(row)) : [...picked, numberOf(row)] });
}

/** Picks all rows of the table between where picking began (else the chosen feature) and this one. */
export function pickTo(row: DeskRow): void {
  const shown = shownRows();
  const began = desk().pickedFrom ?? chosenRow()?.feature.number;
  const from = Math.max(
    shown.findIndex((each) => numberOf(each) === began),
    0,
  );
  const to = shown.findIndex((each) => numberOf(each) === numberOf(row));
  if (to < 0) return;
  const picked = shown.slice(Math.min(from, to), Math.max(from, to) + 1).map(numberOf);
  choose(row.index);
  setDesk({ picked, pickedFrom: numberOf(shown[from]) });
}

/** One row further, and all between. */
export function pickFurther(by: 1 | -1): void {
  const shown = shownRows();
  const own = chosenRow();
  const place = shown.findIndex((row) => row.index === own?.index);
  const next = shown[Math.min(Math.max(place + by, 0), shown.length - 1)];
  if (next) pickTo(next);
}

export const pickAll = () => setDesk({ picked: shownRows().map(numberOf), pickedFrom: undefined });
export const pickNone = () => setDesk({ picked: [], pickedFrom: undefined });
