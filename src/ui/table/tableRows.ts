import type { DeskRow } from '../desk/deskRows.ts';
import { TABLE_COLUMNS } from './columns.ts';
import { passes, type RowFilter } from './rowFilter.ts';
import { type Sorting, sortRows } from './sortRows.ts';

/** The rows the table shows, in its order. */
export function tableRows(rows: readonly DeskRow[], filter: RowFilter, sorting: Sorting): DeskRow[] {
  const column = TABLE_COLUMNS.find(({ key }) => key === sorting.column) ?? TABLE_COLUMNS[0];
  return sortRows(
    rows.filter((row) => passes(row, filter)),
    column.order,
    sorting.direction,
  );
}
