import { COLUMNS, type LineTable, spreadsheetSafe } from '../../report/index.ts';

/** The table for a spreadsheet's clipboard: cells apart by tabs, rows by line ends, nothing that would be run as a formula. */
export function tsvTable(table: LineTable): string {
  const clean = (text: string) => text.replace(/[\t\r\n]+/g, ' ');
  const head = COLUMNS.map((column) => column.key).join('\t');
  return [head, ...table.rows.map((row) => COLUMNS.map((column) => spreadsheetSafe(clean(column.cell(row)))).join('\t'))].join('\n');
}
