import type { LineTable } from './lineTable.ts';

/** The whole table with its facts as JSON, one row object a feature, keys as in `LineRow`; unknown values are left out. */
export function jsonTable(table: LineTable): string {
  return `${JSON.stringify({ format: 'linewright-table', version: 1, ...table }, null, 1)}\n`;
}
