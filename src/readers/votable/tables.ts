import { ProblemError } from '../../problems/index.ts';
import { type Growing, growing } from '../text/growing.ts';
import { numberInWords } from '../text/parseNumber.ts';
import { walkXml } from './xml.ts';

/** A FIELD of a table (VOTable 1.5, section 4.1). */
export interface VoField {
  readonly name: string;
  readonly datatype: string;
  /** "" for single values, else a number, "n*" or "*". */
  readonly arraysize: string;
  readonly unit: string;
  readonly ucd: string;
  readonly utype: string;
  readonly nullValue?: number;
  description: string;
}

/** A table with its data as found; binary data are still text. */
export interface VoTable {
  readonly name: string;
  readonly utype: string;
  readonly fields: VoField[];
  /** TABLEDATA: single numbers by field. */
  readonly scalars: Growing[];
  /** TABLEDATA: text of cells that hold arrays, by field and row. */
  readonly arrays: string[][];
  rows: number;
  /** Cells that are no numbers although their field is one of numbers. */
  unreadable: number;
  stream?: { readonly serialization: 'BINARY' | 'BINARY2' | 'FITS'; readonly encoding: string; readonly href: string; text: string };
}

/** All tables of a document, and its words outside of them that may say something of the medium. */
export interface VoDocument {
  readonly tables: readonly VoTable[];
  readonly words: readonly string[];
}

const TEXT_TYPES = /^(char|unicodeChar)$/;
export const isText = (field: VoField) => TEXT_TYPES.test(field.datatype);
export const isArray = ({ arraysize, datatype }: VoField) => arraysize !== '' && arraysize !== '1' && !TEXT_TYPES.test(datatype);
/** Cells kept at most. */
const MOST_CELLS = 100_000_000;

/** Reads the tables of a VOTable document. @throws ProblemError where the document is broken or too large */
export function readTables(xml: string, file: string): VoDocument {
  const tables: VoTable[] = [];
  const words: string[] = [];
  let table: VoTable | undefined;
  let field: VoField | undefined;
  let inside = '';
  let text = '';
  let column = 0;
  let cells = 0;
  let isVotable = false;

  walkXml(xml, file, {
    open(name, attributes) {
      const of = (key: string) => attributes.get(key) ?? '';
      text = '';
      if (name === 'VOTABLE') isVotable = true;
      else if (name === 'TABLE') {
        table = { name: of('name') || of('ID'), utype: of('utype'), fields: [], scalars: [], arrays: [], rows: 0, unreadable: 0 };
        tables.push(table);
      } else if (name === 'FIELD' && table && table.rows === 0) {
        field = {
          name: (of('name') || of('ID')).slice(0, 100) || String(table.fields.length + 1),
          datatype: of('datatype'),
          arraysize: of('arraysize').trim(),
          unit: of('unit'),
          ucd: of('ucd'),
          utype: of('utype'),
          description: '',
        };
        table.fields.push(field);
        table.scalars.push(growing());
        table.arrays.push([]);
      } else if (name === 'VALUES' && field && table) {
        const value = Number(of('null'));
        if (of('null') !== '' && Number.isFinite(value)) {
          const k = table.fields.indexOf(field);
          field = { ...field, nullValue: value };
          table.fields[k] = field;
        }
      } else if (name === 'PARAM' || name === 'INFO') words.push(`${of('name')} ${of('utype')} = ${of('value')}`);
      else if (name === 'TR') column = 0;
      else if ((name === 'BINARY' || name === 'BINARY2' || name === 'FITS') && table) inside = name;
      else if (name === 'STREAM' && table && (inside === 'BINARY' || inside === 'BINARY2' || inside === 'FITS')) {
        table.stream = { serialization: inside, encoding: of('encoding').toLowerCase(), href: of('href'), text: '' };
      }
    },
    text(piece) {
      text += piece;
    },
    close(name) {
      if (name === 'TD' && table) {
        if (++cells > MOST_CELLS)
          throw new ProblemError({
            code: 'too-many-samples',
            where: { file },
            found: `more than ${MOST_CELLS} cells`,
            expected: 'a spectrum that fits into memory',
            doThis: 'Cut the table to the range you need.',
          });
        takeCell(table, column++, text);
      } else if (name === 'TR' && table) {
        for (let k = column; k < table.fields.length; k++) takeCell(table, k, '');
        cells += Math.max(0, table.fields.length - column);
        table.rows++;
      } else if (name === 'FIELD') field = undefined;
      else if (name === 'DESCRIPTION') {
        if (field) field.description = text.trim();
        else words.push(text.trim());
      } else if (name === 'STREAM' && table?.stream) table.stream.text = text;
      else if (name === 'TABLE') table = undefined;
      text = '';
    },
  });
  if (!isVotable)
    throw new ProblemError({
      code: 'foreign-format',
      where: { file },
      found: 'it is XML, but no VOTable',
      expected: 'delimited text, ECSV, VOTable or FITS',
      doThis: 'Save the spectrum in one of these forms.',
    });
  return { tables, words };
}

function takeCell(table: VoTable, k: number, text: string): void {
  const field = table.fields[k];
  if (!field || isText(field)) return;
  if (isArray(field)) {
    table.arrays[k].push(text);
    return;
  }
  const word = text.trim();
  const value = /^0x[0-9a-f]+$/i.test(word) ? Number(word) : numberInWords(word, false);
  if (value === undefined) table.unreadable++;
  table.scalars[k].push(value === undefined || value === field.nullValue ? Number.NaN : value);
}
