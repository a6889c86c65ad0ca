import { ProblemError } from '../../problems/index.ts';
import type { Column } from '../columns.ts';
import { columnsToSpectrum, type Surroundings, unitInWords } from '../columnsToSpectrum.ts';
import { type MediumEvidence, mediumInWords, saysRestFrame } from '../mediumWords.ts';
import { count, excerpt, type Notes, newNotes, note, noteFact, warn } from '../notes.ts';
import type { ByteSource, Reading, ReadingChoices, ReadingControl } from '../reading.ts';
import { findLayout, type Layout } from './layout.ts';
import { type Rows, readRows } from './readRows.ts';
import { openText } from './textBytes.ts';

const DELIMITERS = { ',': 'commas', ';': 'semicolons', '\t': 'tabs', '|': 'bars', ' ': 'blanks' } as const;

/** Reads a spectrum from delimited text, ECSV or an IPAC table. @throws ProblemError */
export async function textSpectrum(source: ByteSource, choices: ReadingChoices, control: ReadingControl): Promise<Reading> {
  const notes = newNotes(source.name);
  const { columns, layout } = await readTextTable(source, notes, control);
  return columnsToSpectrum(columns, surroundings(layout, source.name, notes), choices, notes);
}

/** The columns of a text table, with what could not be read noted. @throws ProblemError when there are not two columns of numbers */
export async function readTextTable(
  source: ByteSource,
  notes: Notes,
  control: ReadingControl,
): Promise<{ columns: Column[]; layout: Layout }> {
  const { encoding, head, whole } = await openText(source);
  const layout = findLayout(head, whole);
  if (!layout) throw noTable(head, source.name);
  const rows = await readRows(source, encoding, layout, control);
  remarkOnRows(rows, layout, notes);
  const { delimiter, decimalComma } = layout.dialect;
  noteFact(
    notes,
    'format',
    `${layout.format}, ${layout.columns.length} columns separated by ${layout.places ? 'fixed places' : DELIMITERS[delimiter]}${decimalComma ? ', decimal commas' : ''}`,
    `${count(rows.columns[0].length, 'row')} from line ${layout.firstRow} on${encoding.label === 'utf-8' ? '' : `; stored as ${encoding.label}`}`,
  );
  noteFact(
    notes,
    'names',
    layout.columns
      .map((c) => c.name)
      .slice(0, 30)
      .join(', '),
    layout.namesFrom,
  );
  const columns = layout.columns.map(
    (named, k): Column => ({ ...named, kind: kindOf(rows, k), samples: rows.columns[k].length, read: async () => rows.columns[k].slice() }),
  );
  return { columns, layout };
}

function kindOf(rows: Rows, k: number): Column['kind'] {
  const values = rows.columns[k];
  return rows.unreadable[k].cells > values.length / 2 ? 'text' : 'real';
}

function remarkOnRows(rows: Rows, layout: Layout, notes: Notes): void {
  const n = rows.columns[0].length;
  const { wordy, ragged } = rows;
  if (n === 0 || wordy.lines > n) {
    throw new ProblemError({
      code: 'no-rows',
      where: { file: notes.file, ...(wordy.first ? { line: wordy.first, excerpt: wordy.text } : {}) },
      found: n === 0 ? 'no rows of numbers' : `${wordy.lines} lines without numbers among ${n} rows`,
      expected: 'one sample a line',
      doThis: 'Check that the file is a spectrum.',
    });
  }
  if (layout.strayLines)
    note(
      notes,
      'lines-skipped',
      `${count(layout.strayLines, 'line')} before the rows ${layout.strayLines === 1 ? 'was' : 'were'} not understood and skipped`,
    );
  if (wordy.lines)
    warn(notes, 'lines-without-numbers', `${count(wordy.lines, 'line')} without numbers skipped`, {
      where: { line: wordy.first, excerpt: wordy.text },
    });
  if (ragged.lines)
    warn(
      notes,
      'uneven-rows',
      `${count(ragged.lines, 'row')} ${ragged.lines === 1 ? 'has' : 'have'} more or fewer cells than the table has columns; missing cells are taken as missing values`,
      { where: { line: ragged.first } },
    );
  rows.unreadable.forEach(({ cells, line, text }, k) => {
    if (cells === 0 || cells > n / 2) return;
    warn(notes, 'cells-not-numbers', `${count(cells, 'cell')} ${cells === 1 ? 'is' : 'are'} no number and taken as missing`, {
      where: { column: layout.columns[k].name, line, excerpt: text },
    });
  });
}

/** What the comments say about the columns. */
export function surroundings(layout: Layout, name: string, notes: Notes): Surroundings {
  const medium = mediumOfComments(layout.comments, notes);
  const unitLine = layout.comments.find((c) => unitInWords(c) !== undefined);
  const unit = unitLine === undefined ? undefined : unitInWords(unitLine);
  const rest = layout.comments.find((c) => saysRestFrame(c) && /wave|lam|spectr|frame/i.test(c));
  const flux = layout.format === 'ECSV' ? undefined : fluxUnitOfComments(layout.comments);
  return {
    name,
    place: {},
    taken: {},
    missingValues: layout.missingValues,
    maker: layout.comments
      .filter((c) => /telescop|instrum|survey|observ|spectr/i.test(c))
      .join(' ')
      .slice(0, 2000),
    ...(medium ? { medium } : {}),
    ...(unit && unitLine !== undefined ? { spectralUnit: { unit, evidence: `the comment "${excerpt(unitLine)}"` } } : {}),
    ...(rest ? { restFrame: `"${excerpt(rest)}"` } : {}),
    ...(flux ? { fluxUnit: flux } : {}),
  };
}

function mediumOfComments(comments: readonly string[], notes: Notes): MediumEvidence | undefined {
  const said = comments.map(mediumInWords).filter((m) => m !== undefined);
  if (said.length === 0) return undefined;
  const other = said.find((m) => m.medium !== said[0].medium);
  if (!other) return said[0];
  warn(notes, 'medium-contradiction', `the comments say both: ${said[0].evidence} and ${other.evidence}`, {
    doThis: 'Say whether the wavelengths are in air or in vacuum.',
  });
  return undefined;
}

const FLUX_WORDS = /flux|intens|flam|f_?lam(bda)?\b|f_?nu\b|counts|bunit/i;
const FLUX_UNIT = /erg|jy\b|\bw\/|\bw\s*m|photon|counts|adu|\bmag|watt|10\*\*|1e-?\d/i;

function fluxUnitOfComments(comments: readonly string[]): { unit: string; evidence: string } | undefined {
  for (const text of comments) {
    if (!FLUX_WORDS.test(text)) continue;
    const after = text.slice(text.search(FLUX_WORDS));
    const bracket = bracketIn(after);
    const told = /(?:\bin(?: units? of)?|units?\s*[:=]?)\s+(.+)$/i.exec(after)?.[1];
    const valued = /^bunit\s*=\s*(?:'([^']*)'|[^'/]*)/i.exec(text.trim())?.[1];
    const unit = [valued, bracket, told]
      .find((u) => u !== undefined && FLUX_UNIT.test(u))
      ?.trim()
      .replace(/[.;,]+$/, '');
    if (unit && unit.length < 60) return { unit, evidence: `the comment "${excerpt(text)}"` };
    if (/arbitrary/i.test(after)) return { unit: 'arbitrary', evidence: `the comment "${excerpt(text)}"` };
  }
  return undefined;
}

/** What stands in the first bracket, brackets inside it included. */
function bracketIn(text: string): string | undefined {
  const start = text.search(/[[(]/);
  if (start < 0) return undefined;
  let depth = 0;
  for (let i = start; i < text.length; i++) {
    if (text[i] === '(' || text[i] === '[') depth++;
    else if ((text[i] === ')' || text[i] === ']') && --depth === 0) return text.slice(start + 1, i);
  }
  return undefined;
}

function noTable(head: string, file: string): ProblemError {
  const lines = head.split(/\r\n|\n|\r/);
  const at = lines.findIndex((l) => l.trim() !== '' && !/^\s*#/.test(l));
  const first = lines[at];
  const empty = head.trim() === '';
  return new ProblemError({
    code: empty ? 'empty-file' : 'no-table',
    where: { file, ...(first !== undefined ? { line: at + 1, excerpt: excerpt(first) } : {}) },
    found: empty ? 'the file is empty' : 'no two columns of numbers',
    expected: 'rows of wavelength and flux separated by blanks, commas, semicolons or tabs',
    doThis: 'Save the spectrum as a table with one sample a line, or as FITS.',
  });
}
