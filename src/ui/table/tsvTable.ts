import { COLUMNS, type LineTable } from '../../report/index.ts';

/** The table for a spreadsheet's clipboard: cells apart by tabs, rows by line ends. */
export function tsvTable(table: LineTable): string {
  const clean = (text: string) => text.replace(/[\t\r\n]+/g, ' ');
  const head = COLUMNS.map((column) => column.key).join('\t');
  return [head, ...table.rows.map((row) => COLUMNS.map((column) => clean(column.cell(row))).join('\t'))].join('\n');
}
