import { ProblemError } from '../../problems/index.ts';
import { bytesSource } from '../byteSource.ts';
import { rankColumns } from '../chooseColumns.ts';
import type { Column } from '../columns.ts';
import { columnsToSpectrum } from '../columnsToSpectrum.ts';
import { fitsSpectrum } from '../fits/fitsSpectrum.ts';
import { gunzip } from '../gunzip.ts';
import { mediumInWords } from '../mediumWords.ts';
import { count, type Notes, newNotes, noteFact, warn } from '../notes.ts';
import type { ByteSource, Reading, ReadingChoices, ReadingControl } from '../reading.ts';
import { numberInWords } from '../text/parseNumber.ts';
import { fromBase64 } from './base64.ts';
import { binaryRows } from './binaryRows.ts';
import { isArray, isText, readTables, type VoDocument, type VoTable } from './tables.ts';

/** Larger documents are not read: they would not fit into memory as text. */
const MOST_BYTES = 300_000_000;
const MOST_OFFERS = 300;

/** Reads a spectrum from a VOTable: TABLEDATA, BINARY, BINARY2 or FITS. `choices.hdu` = number of the table from 1. @throws ProblemError */
export async function votableSpectrum(source: ByteSource, choices: ReadingChoices, control: ReadingControl): Promise<Reading> {
  const notes = newNotes(source.name);
  if (source.size > MOST_BYTES)
    throw new ProblemError({
      code: 'too-large',
      where: { file: source.name },
      found: `a VOTable of ${Math.round(source.size / 1e6)} MB`,
      expected: `at most ${MOST_BYTES / 1e6} MB`,
      doThis: 'Save the spectrum as FITS.',
    });
  const bytes = await source.read(0, source.size);
  control.signal?.throwIfAborted();
  const [a, b] = bytes;
  const label = a === 0xff && b === 0xfe ? 'utf-16le' : a === 0xfe && b === 0xff ? 'utf-16be' : 'utf-8';
  const document = readTables(new TextDecoder(label).decode(bytes), source.name);
  control.signal?.throwIfAborted();
  const { tables } = document;
  noteFact(notes, 'format', `VOTable, ${count(tables.length, 'table')}`, 'the document element is VOTABLE');
  const number = choices.hdu ?? likeliest(tables) + 1;
  const table = tables[number - 1];
  if (!table)
    throw new ProblemError({
      code: tables.length ? 'no-such-table' : 'no-table',
      where: { file: source.name },
      found: tables.length ? `no table ${number}` : 'a VOTable without tables',
      expected: tables.length ? `tables 1 to ${tables.length}` : 'a table of wavelengths and fluxes',
      doThis: 'Choose another table.',
    });
  noteFact(
    notes,
    'table',
    `${number}${table.name ? `: ${table.name}` : ''}, ${count(table.fields.length, 'column')}`,
    choices.hdu === undefined ? 'the first with wavelength and flux' : 'chosen by you',
  );
  tables.forEach((t, k) => {
    if (k !== number - 1 && k < MOST_OFFERS)
      notes.offers.push({ label: `table ${k + 1}${t.name ? `: ${t.name}` : ''}`, choices: { hdu: k + 1 } });
  });
  const { stream } = table;
  if (stream?.serialization === 'FITS')
    return fitsSpectrum(bytesSource(source.name, await streamBytes(table, source.name, control)), { ...choices, hdu: undefined }, control);
  const { columns, row } = await columnsOf(table, choices, notes, control);
  const medium = document.words.map(mediumInWords).find((m) => m !== undefined);
  const frame = paramOf(document, /SpectralFrame\.RefPos|specsys/i);
  const taken = { hdu: number, ...(row ? { row } : {}) };
  return columnsToSpectrum(
    columns,
    {
      name: source.name,
      place: row ? { row } : {},
      taken,
      maker: document.words.join(' ').slice(0, 4000),
      ...(medium ? { medium } : {}),
      ...(frame ? { frame } : {}),
    },
    choices,
    notes,
  );
}

const paramOf = ({ words }: VoDocument, name: RegExp): string | undefined =>
  words
    .find((w) => name.test(w.split(' = ')[0]))
    ?.split(' = ')[1]
    ?.trim() || undefined;

function likeliest(tables: readonly VoTable[]): number {
  const merit = (table: VoTable) => {
    const ranked = rankColumns(
      table.fields.map((f) => ({ ...f, kind: isText(f) ? 'text' : 'real', samples: 2, read: async () => new Float64Array() })),
    );
    return (
      (ranked.some((r) => r.role === 'wavelength') ? 2 : 0) +
      (ranked.some((r) => r.role === 'flux') ? 2 : 0) +
      (table.rows > 0 || table.stream ? 1 : 0)
    );
  };
  let best = 0;
  tables.forEach((t, k) => {
    if (merit(t) > merit(tables[best])) best = k;
  });
  return best;
}

async function columnsOf(
  table: VoTable,
  choices: ReadingChoices,
  notes: Notes,
  control: ReadingControl,
): Promise<{ columns: Column[]; row?: number }> {
  const decoded = table.stream
    ? binaryRows(await streamBytes(table, notes.file, control), table.fields, table.stream.serialization === 'BINARY2', notes.file)
    : undefined;
  const rows = decoded ? decoded.rows : table.rows;
  if (rows === 0)
    throw new ProblemError({
      code: 'no-rows',
      where: { file: notes.file },
      found: 'a table without rows',
      expected: 'one sample a row',
      doThis: 'Choose another table.',
    });
  if (table.unreadable)
    warn(
      notes,
      'cells-not-numbers',
      `${count(table.unreadable, 'cell')} ${table.unreadable === 1 ? 'is' : 'are'} no number and taken as missing`,
    );
  const arrayOf = (k: number, row: number) =>
    decoded ? (decoded.arrays[k][row - 1] ?? new Float64Array()) : numbersIn(table.arrays[k][row - 1] ?? '');
  const vectors = table.fields.filter(isArray).length;
  const scalars = table.fields.filter((f) => !isArray(f) && !isText(f)).length;
  const holdsArrays = vectors >= 2 || (vectors >= 1 && scalars < 2);
  if (holdsArrays) {
    const row = choices.row ?? 1;
    if (row < 1 || row > rows)
      throw new ProblemError({
        code: 'no-such-row',
        where: { file: notes.file },
        found: `no row ${row}`,
        expected: `rows 1 to ${rows}`,
        doThis: 'Choose one of the rows that are there.',
      });
    for (let r = 1; rows > 1 && r <= Math.min(rows, MOST_OFFERS); r++)
      if (r !== row) notes.offers.push({ label: `row ${r}`, choices: { ...(choices.hdu ? { hdu: choices.hdu } : {}), row: r } });
    if (rows > 1 && choices.row === undefined)
      warn(notes, 'several-spectra', `the table holds ${rows} spectra; the one in row 1 is shown`, { doThis: 'Choose another row.' });
    return {
      columns: table.fields.map((f, k) =>
        column(f, isArray(f) ? arrayOf(k, row) : Float64Array.of(decoded ? (decoded.scalars[k][row - 1] ?? Number.NaN) : Number.NaN)),
      ),
      row,
    };
  }
  return {
    columns: table.fields.map((f, k) =>
      column(
        f,
        isText(f) || isArray(f)
          ? new Float64Array(rows).fill(Number.NaN)
          : decoded
            ? Float64Array.from(decoded.scalars[k])
            : table.scalars[k].finish(),
      ),
    ),
  };
}

function column(field: VoTable['fields'][number], values: Float64Array): Column {
  const { name, unit, ucd, utype, description, datatype } = field;
  return {
    name,
    unit,
    ...(ucd ? { ucd } : {}),
    ...(utype ? { utype } : {}),
    ...(description ? { description } : {}),
    kind: isText(field) ? 'text' : datatype === 'boolean' ? 'logical' : /^(float|double)/.test(datatype) ? 'real' : 'whole',
    samples: values.length,
    read: async () => values.slice(),
  };
}

const numbersIn = (text: string) =>
  Float64Array.from(
    text.split(/\s+/).filter((w) => w !== ''),
    (w) => numberInWords(w, false) ?? Number.NaN,
  );

async function streamBytes(table: VoTable, file: string, control: ReadingControl): Promise<Uint8Array> {
  const { stream } = table;
  if (!stream || (stream.href !== '' && stream.text.trim() === ''))
    throw new ProblemError({
      code: 'data-elsewhere',
      where: { file, ...(stream ? { excerpt: stream.href.slice(0, 100) } : {}) },
      found: 'a table whose data are kept in another place',
      expected: 'data inside the file',
      doThis: 'Fetch the table with its data inside.',
    });
  const bytes = fromBase64(stream.text, file);
  if (bytes[0] === 0x1f && bytes[1] === 0x8b) {
    const unpacked = await gunzip(bytesSource(file, bytes), control);
    return unpacked.read(0, unpacked.size);
  }
  return bytes;
}
