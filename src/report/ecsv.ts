import { COLUMNS, type Column, unitOf } from './columns.ts';
import type { LineTable } from './lineTable.ts';
import { tableFacts } from './tableFacts.ts';

const DATATYPE = { integer: 'int32', number: 'float64', text: 'string', boolean: 'bool' } as const satisfies Record<Column['kind'], string>;

/** The table as ECSV 1.0 (Enhanced Character Separated Values, APE 6): a YAML head of columns, units and facts in comments, then comma-separated rows; blank = unknown. */
export function ecsvTable(table: LineTable): string {
  const head = [
    '%ECSV 1.0',
    '---',
    'delimiter: ","',
    'datatype:',
    ...COLUMNS.map((column) => `- ${columnYaml(column, table.fluxUnit)}`),
    'meta: !!omap',
    ...tableFacts(table).map(({ key, value }) => `- {${key}: ${typeof value === 'number' ? yamlNumber(value) : quoted(value)}}`),
    'schema: astropy-2.0',
  ];
  const rows = table.rows.map((row) => COLUMNS.map((column) => ecsvCell(column, column.cell(row))).join(','));
  return `${[...head.map((line) => `# ${line}`), COLUMNS.map((c) => c.key).join(','), ...rows].join('\n')}\n`;
}

function columnYaml(column: Column, fluxUnit: string): string {
  const unit = unitOf(column, fluxUnit, 'fits');
  return `{name: ${column.key}, datatype: ${DATATYPE[column.kind]}${unit ? `, unit: ${quoted(unit)}` : ''}, description: ${quoted(column.meaning)}}`;
}

function ecsvCell(column: Column, text: string): string {
  if (column.kind === 'boolean') return text === '' ? '' : text === 'true' ? 'True' : 'False';
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""').replaceAll(/\r?\n/g, ' ')}"` : text;
}

/** A YAML 1.2 double-quoted scalar: JSON's strings are a subset. */
const quoted = (text: string) => JSON.stringify(text);
/** YAML 1.1 readers take 1e-7 for text: the point makes it a number. */
const yamlNumber = (value: number) => String(value).replace(/^(-?\d+)e/, '$1.0e');
