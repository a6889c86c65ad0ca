import { rankColumns } from '../chooseColumns.ts';
import type { Column } from '../columns.ts';
import { columnsToSpectrum } from '../columnsToSpectrum.ts';
import { mergeReadings } from '../mergeReadings.ts';
import { count, noteFact, warn } from '../notes.ts';
import type { Reading, ReadingChoices, ReadingControl } from '../reading.ts';
import { asciiColumns } from './asciiTable.ts';
import { type BinaryTable, openBinaryTable, rowColumns, scalarColumns, textCell } from './binaryTable.ts';
import type { FitsFile, Judged } from './candidate.ts';
import { type Hdu, nameHdu } from './hdus.ts';
import { numberOf, textOf } from './header.ts';
import { headerFacts } from './headerFacts.ts';
import { requireChoice } from './requireChoice.ts';

/** Fewer rows than this are likelier a catalogue than a spectrum. */
const FEW = 30;

/** Judges a binary or ASCII table: does it hold a spectrum, in rows of samples or in cells? */
export async function judgeTable(file: FitsFile, hdu: Hdu): Promise<Judged> {
  const { source, notes } = file;
  if (hdu.kind === 'ASCII table') {
    const columns = asciiColumns(hdu, source, {}, notes);
    return judgeSamples(file, hdu, columns, (control) => asciiColumns(hdu, source, control, notes));
  }
  const table = openBinaryTable(hdu, notes);
  if (table.rows === 0) return { whyNot: 'its table has no rows' };
  const cells = await rowColumns(table, source, 1, notes.file);
  const hasVectors = cells.some((c) => c.kind !== 'text' && c.samples > 1);
  const ranked = rankColumns(cells);
  const hasVectorFlux = ranked.some((r) => r.role === 'flux' && r.column.samples > 1);
  const hasScalarPair =
    ranked.some((r) => r.role === 'flux' && r.column.samples === 1) &&
    ranked.some((r) => r.role === 'wavelength' && r.column.samples === 1);
  if (hasVectors && (hasVectorFlux || (table.rows < FEW && !hasScalarPair))) return judgeRows(file, table, cells);
  return judgeSamples(file, hdu, scalarColumns(table, source, {}, notes.file), (control) =>
    scalarColumns(table, source, control, notes.file),
  );
}

function judgeSamples(file: FitsFile, hdu: Hdu, columns: readonly Column[], open: (control: ReadingControl) => Column[]): Judged {
  const ranked = rankColumns(columns).filter((r) => r.column.samples > 1);
  const rows = columns[0]?.samples ?? 0;
  const numbers = ranked.filter((r) => r.column.kind !== 'text' && r.column.kind !== 'logical').length;
  const hasWave = ranked.some((r) => r.role === 'wavelength');
  const hasFlux = ranked.some((r) => r.role === 'flux');
  const headerAxis = axisColumn(hdu, rows);
  if (rows < 2 || numbers + (headerAxis ? 1 : 0) < 2)
    return { whyNot: rows < 2 ? `its table has ${count(rows, 'row')}` : 'its table has no two columns of numbers' };
  const merit =
    hasWave && hasFlux ? (rows >= FEW ? 100 : 60) : hasFlux && headerAxis ? 70 : hasWave ? 35 : rows < FEW ? 3 : hasFlux ? 30 : 15;
  return {
    candidate: {
      hdu,
      label: `${nameHdu(hdu)}: table, ${count(rows, 'sample')}`,
      merit,
      reason: hasWave && hasFlux ? 'its table has columns of wavelength and flux' : 'its table has columns of numbers',
      read: async (choices, control) => {
        const { notes } = file;
        noteFact(notes, 'layout', `${hdu.kind}, one sample a row, ${count(columns.length, 'column')}`, nameHdu(hdu));
        const all = open(control);
        const withAxis = !hasWave && headerAxis && !choices.wavelengthColumn ? [headerAxis, ...all] : all;
        return columnsToSpectrum(
          withAxis,
          { name: notes.file, place: { hdu: hdu.index }, taken: { hdu: hdu.index }, ...headerFacts(hdu, file.hdus[0], notes) },
          choices,
          notes,
        );
      },
    },
  };
}

function judgeRows(file: FitsFile, table: BinaryTable, cells: readonly Column[]): Judged {
  const { hdu, rows } = table;
  const ranked = rankColumns(withStartAndStep(cells, hdu));
  const vectors = ranked.filter((r) => r.column.samples > 1 && r.column.kind !== 'text');
  const hasWave = vectors.some((r) => r.role === 'wavelength');
  const hasFlux = vectors.some((r) => r.role === 'flux');
  if (vectors.length < 2) return { whyNot: 'its table has no cells with wavelengths and fluxes' };
  const longest = vectors.reduce((n, r) => Math.max(n, r.column.samples), 0);
  const merit = hasWave && hasFlux ? (longest >= FEW ? 100 : 60) : hasWave || hasFlux ? 25 : 5;
  return {
    candidate: {
      hdu,
      label: `${nameHdu(hdu)}: table, ${rows > 1 ? `${rows} spectra of ` : ''}${count(longest, 'sample')}`,
      merit,
      reason: hasWave && hasFlux ? 'its cells hold wavelength and flux' : 'its cells hold numbers',
      read: (choices, control) => readRow(file, table, choices, control),
    },
  };
}

const MOST_OFFERS = 300;
const MOST_MERGED = 500;
const LABEL_FIELDS = /^(object|objname|name|target|targname|segment|order|sporder|aperture|arm|channel|id|source|extname|spec_?id)$/i;

async function readRow(file: FitsFile, table: BinaryTable, choices: ReadingChoices, control: ReadingControl): Promise<Reading> {
  const { source, notes, hdus } = file;
  const { hdu, rows } = table;
  const { merge } = choices;
  if (merge && rows > 1) {
    const parts: Reading[] = [];
    for (let row = 1; row <= Math.min(rows, MOST_MERGED); row++) {
      control.signal?.throwIfAborted();
      control.progress?.(row / rows);
      parts.push(
        await readRow({ ...file, notes: { ...notes, how: [], remarks: [], offers: [] } }, table, { ...choices, merge: false, row }, {}),
      );
    }
    return mergeReadings(parts, `rows 1 to ${parts.length}`, notes, { hdu: hdu.index, merge: true });
  }
  const row = choices.row ?? choices.order ?? 1;
  requireChoice(row, rows, 'row', 'row', hdu, notes);
  noteFact(notes, 'layout', `${hdu.kind}, one spectrum a row, ${rows === 1 ? 'one row' : `row ${row} of ${rows}`}`, nameHdu(hdu));
  const columns = withStartAndStep(await rowColumns(table, source, row, notes.file), hdu);
  if (rows > 1) {
    const named = table.fields.find((f) => f.letter === 'A' && !f.pointer && f.repeat > 0 && LABEL_FIELDS.test(f.name));
    for (let r = 1; r <= Math.min(rows, MOST_OFFERS); r++) {
      if (r === row) continue;
      const name = named ? await textCell(table, source, named, r) : '';
      notes.offers.push({ label: `row ${r}${name ? ` (${name})` : ''} of ${nameHdu(hdu)}`, choices: { hdu: hdu.index, row: r } });
    }
    notes.offers.push({ label: `all ${rows} rows as one spectrum`, choices: { hdu: hdu.index, merge: true } });
    if (choices.row === undefined && choices.order === undefined)
      warn(notes, 'several-spectra', `the table holds ${rows} spectra; the one in row 1 is shown`, {
        where: { hdu: hdu.index },
        doThis: 'Choose another row, or all as one.',
      });
  }
  return columnsToSpectrum(
    columns,
    {
      name: notes.file,
      place: { hdu: hdu.index, ...(rows > 1 ? { row } : {}) },
      taken: { hdu: hdu.index, ...(rows > 1 ? { row } : {}) },
      ...headerFacts(hdu, hdus[0], notes),
    },
    choices,
    notes,
  );
}

/** A start and a step in single cells, or an axis in the header, stand for a column of wavelengths. */
function withStartAndStep(cells: readonly Column[], hdu: Hdu): Column[] {
  const ranked = rankColumns(cells);
  if (ranked.some((r) => r.role === 'wavelength' && r.column.samples > 1)) return [...cells];
  const flux =
    ranked.filter((r) => r.role === 'flux' && r.column.samples > 1).sort((a, b) => b.merit - a.merit)[0] ??
    ranked.find((r) => r.column.samples > 1 && r.column.kind === 'real');
  if (!flux) return [...cells];
  const n = flux.column.samples;
  const start = ranked.find((r) => r.role === 'wavelength' && r.column.samples === 1);
  const step = ranked.find((r) => r.role === 'wavelength-step' && r.column.samples === 1);
  if (start && step) {
    const column: Column = {
      ...start.column,
      samples: n,
      kind: 'real',
      description: `${start.column.name} + i x ${step.column.name}`,
      read: async () => {
        const [w0] = await start.column.read();
        const [dw] = await step.column.read();
        return Float64Array.from({ length: n }, (_, i) => w0 + i * dw);
      },
    };
    return cells.map((c) => (c === start.column ? column : c));
  }
  const axis = axisColumn(hdu, n);
  return axis ? [axis, ...cells] : [...cells];
}

/** A column of wavelengths from the header of a table: COEFF0, COEFF1 (log10) or CRVAL1 and CDELT1. */
function axisColumn(hdu: Hdu, n: number): Column | undefined {
  const { header } = hdu;
  const first = numberOf(header, 'COEFF0') ?? numberOf(header, 'CRVAL1');
  const step = numberOf(header, 'COEFF1') ?? numberOf(header, 'CDELT1') ?? numberOf(header, 'CD1_1');
  if (first === undefined || !step || n < 2) return undefined;
  const isLog = numberOf(header, 'COEFF0') !== undefined || (first < 5 && first > 2.9 && Math.abs(step) < 0.002);
  const pixel = numberOf(header, 'COEFF0') !== undefined ? 1 : (numberOf(header, 'CRPIX1') ?? 1);
  return {
    name: isLog ? 'loglam (header)' : 'wavelength (header)',
    unit: isLog ? '' : textOf(header, 'CUNIT1'),
    kind: 'real',
    samples: n,
    read: async () => Float64Array.from({ length: n }, (_, i) => first + step * (i + 1 - pixel)),
  };
}
