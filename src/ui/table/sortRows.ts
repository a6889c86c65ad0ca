/** Which column the table is sorted by. */
export interface Sorting {
  readonly column: string;
  readonly direction: 'ascending' | 'descending';
}

/** Rows in the order of `keyOf`; unknown values last either way, equal ones as they stood. */
export function sortRows<Row>(
  rows: readonly Row[],
  keyOf: (row: Row) => number | string | undefined,
  direction: Sorting['direction'],
): Row[] {
  const sign = direction === 'ascending' ? 1 : -1;
  return rows
    .map((row) => ({ row, value: keyOf(row) }))
    .sort((a, b) => {
      if (a.value === undefined || b.value === undefined) return Number(a.value === undefined) - Number(b.value === undefined);
      if (typeof a.value === 'string' || typeof b.value === 'string') return sign * String(a.value).localeCompare(String(b.value));
      return sign * (a.value - b.value);
    })
    .map(({ row }) => row);
}

/** A click on a head: the other direction when it is sorted by that column already. */
export function sortedBy(before: Sorting, column: string): Sorting {
  const flipped = before.column === column && before.direction === 'ascending';
  return { column, direction: flipped ? 'descending' : 'ascending' };
}
