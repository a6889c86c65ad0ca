import { COLUMNS, type Column } from './columns.ts';
import type { LineTable } from './lineTable.ts';
import { spreadsheetSafe } from './spreadsheetSafe.ts';

/**
 * The table as CSV by RFC 4180: one header row, CRLF line ends, cells quoted where they must be.
 * Text that a spreadsheet would run as a formula is kept from it by a leading apostrophe.
 */
export function csvTable(table: LineTable): string {
  const lines = [COLUMNS.map((c) => c.key).join(',')];
  for (const row of table.rows) lines.push(COLUMNS.map((column) => csvCell(column, column.cell(row))).join(','));
  return `${lines.join('\r\n')}\r\n`;
}

function csvCell(column: Column, text: string): string {
  const safe = column.kind === 'text' ? spreadsheetSafe(text) : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
