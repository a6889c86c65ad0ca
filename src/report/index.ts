// The finished line table and its writers; one file a format. A writer sees the table and nothing else.
// Deliberately not here: any measuring, naming or physics. Standards: RFC 4180 (CSV).
export { COLUMNS, type Column, decimals, significant } from './columns.ts';
export { TABLE_FORMATS, type TableFormat, type TableFormatName } from './formats.ts';
export { gasCsv } from './gasCsv.ts';
export { latexText, withError } from './latex.ts';
export { acceptedRows, type LineRow, type LineTable, withoutArtefacts } from './lineTable.ts';
