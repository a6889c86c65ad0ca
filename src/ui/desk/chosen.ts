import { fullRange, type Range, showing } from '../plot/viewRange.ts';
import { tableRows } from '../table/tableRows.ts';
import { type DeskRow, nextOpen } from './deskRows.ts';
import { desk, setDesk, useDesk } from './deskStore.ts';

/** A feature is still the chosen one after a refit when it lies this near, vacuum Angstrom. */
const SAME_A = 1.5;

/** The row that `at` (vacuum Angstrom) means. */
export function rowAt(rows: readonly DeskRow[], at: number | undefined): DeskRow | undefined {
  const best = nearestRow(rows, at);
  return best && at !== undefined && Math.abs(best.feature.at - at) <= SAME_A ? best : undefined;
}

/** The row nearest to `at`, however far. */
export function nearestRow(rows: readonly DeskRow[], at: number | undefined): DeskRow | undefined {
  if (at === undefined) return undefined;
  let best: DeskRow | undefined;
  for (const row of rows) if (!best || Math.abs(row.feature.at - at) < Math.abs(best.feature.at - at)) best = row;
  return best;
}

export const useChosenRow = () => useDesk((state) => rowAt(state.rows, state.chosenAt));
export const chosenRow = () => rowAt(desk().rows, desk().chosenAt);

/** Ends of a spectrum, or of a list of lines. */
export const rangeOf = (wavelength: Float64Array | undefined, rows: readonly DeskRow[]): Range =>
  fullRange(wavelength ?? rows.map((row) => row.feature.centroid));

/** The whole wavelength range of what is open. */
export const wholeRange = (): Range => rangeOf(desk().samples?.wavelength, desk().rows);

/** Makes a feature the chosen one and brings it into view. */
export function choose(index: number): void {
  const row = desk().rows[index];
  if (!row) return;
  const { range } = desk();
  setDesk({
    chosenAt: row.feature.at,
    tab: 'case',
    picked: [],
    pickedFrom: undefined,
    ...(range ? { range: showing(range, row.feature.centroid, wholeRange()) } : {}),
  });
}

/** Walks by wavelength. */
export function walkFeatures(by: 1 | -1): void {
  const { rows } = desk();
  const row = chosenRow();
  const from = row?.index ?? (by === 1 ? -1 : rows.length);
  choose(Math.min(Math.max(from + by, 0), rows.length - 1));
}

/** Walks in the order of the table, over the rows it shows. */
export function walkTable(by: 1 | -1): void {
  const shown = tableRows(desk().rows, desk().filter, desk().sorting);
  const row = chosenRow();
  const place = row ? shown.findIndex((each) => each.index === row.index) : -1;
  const next = shown[place < 0 ? 0 : Math.min(Math.max(place + by, 0), shown.length - 1)];
  if (next) choose(next.index);
}

/** Goes to the next feature without a verdict; false when there is none. */
export function chooseNextOpen(): boolean {
  const next = nextOpen(desk().rows, chosenRow()?.index ?? -1);
  if (next !== undefined) choose(next);
  return next !== undefined;
}
