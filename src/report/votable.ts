import { COLUMNS, type Column, unitOf } from './columns.ts';
import type { LineTable } from './lineTable.ts';
import { tableFacts } from './tableFacts.ts';

const DATATYPE = {
  integer: 'datatype="int"',
  number: 'datatype="double"',
  text: 'datatype="unicodeChar" arraysize="*"',
  boolean: 'datatype="boolean"',
} as const satisfies Record<Column['kind'], string>;

/** The table as VOTable 1.4 (IVOA Recommendation 2019), TABLEDATA; an empty cell is a null. */
export function votableTable(table: LineTable): string {
  const params = tableFacts(table).map(({ key, value, meaning }) => {
    const type = typeof value === 'number' ? 'datatype="double"' : 'datatype="unicodeChar" arraysize="*"';
    return `   <PARAM name="${key}" ${type} value="${xml(String(value))}"><DESCRIPTION>${xml(meaning)}</DESCRIPTION></PARAM>`;
  });
  const rows = table.rows.map(
    (row) => `     <TR>${COLUMNS.map((column) => `<TD>${xml(cellText(column, column.cell(row)))}</TD>`).join('')}</TR>`,
  );
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    '<VOTABLE version="1.4" xmlns="http://www.ivoa.net/xml/VOTable/v1.3">',
    ' <RESOURCE type="results">',
    `  <TABLE name="lines" nrows="${table.rows.length}">`,
    `   <DESCRIPTION>${xml(`Emission lines of ${table.title}`)}</DESCRIPTION>`,
    ...params,
    ...COLUMNS.map((column) => fieldElement(column, table.fluxUnit)),
    '   <DATA>',
    '    <TABLEDATA>',
    ...rows,
    '    </TABLEDATA>',
    '   </DATA>',
    '  </TABLE>',
    ' </RESOURCE>',
    '</VOTABLE>',
    '',
  ].join('\n');
}

function fieldElement(column: Column, fluxUnit: string): string {
  const unit = unitOf(column, fluxUnit, 'vounits');
  const words = [`name="${column.key}"`, DATATYPE[column.kind], column.ucd && `ucd="${column.ucd}"`, unit && `unit="${xml(unit)}"`].filter(
    Boolean,
  );
  return `   <FIELD ${words.join(' ')}><DESCRIPTION>${xml(column.meaning)}</DESCRIPTION></FIELD>`;
}

/** VOTable cannot say "unknown" for a boolean but by an empty cell or `?`. */
const cellText = (column: Column, text: string) => (column.kind === 'boolean' && text === '' ? '?' : text);

/** Text with the five characters of XML escaped and those it forbids dropped. */
function xml(text: string): string {
  // XML 1.0 forbids all below blank but tab, line feed and carriage return.
  const legal = Array.from(text).filter((c) => c >= ' ' || c === '\t' || c === '\n' || c === '\r');
  return legal.join('').replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
}
