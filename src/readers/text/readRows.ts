import { ProblemError } from '../../problems/index.ts';
import { excerpt } from '../notes.ts';
import type { ByteSource, ReadingControl } from '../reading.ts';
import { type Growing, growing } from './growing.ts';
import type { Layout } from './layout.ts';
import { parseNumber } from './parseNumber.ts';
import { type Encoding, slicesOf } from './textBytes.ts';

/** The numbers of a text table, and what could not be read. */
export interface Rows {
  readonly columns: readonly Float64Array[];
  /** Cells of each column that are no number, and the first of them. */
  readonly unreadable: readonly { readonly cells: number; readonly line?: number; readonly text?: string }[];
  /** Lines with fewer or more cells than the table has columns. */
  readonly ragged: { readonly lines: number; readonly first?: number };
  /** Lines without any number. */
  readonly wordy: { readonly lines: number; readonly first?: number; readonly text?: string };
}

/** A spectrum with more samples than this cannot be shown; memory is kept bounded. */
export const MOST_ROWS = 20_000_000;
/** Cells kept at most: bounds memory for wide tables. */
const MOST_CELLS = 200_000_000;
/** A longer line is no row of a table. */
const LONGEST_LINE = 1 << 20;
const NEWLINE = 10;
const RETURN = 13;

/** Reads all rows slice by slice. @throws ProblemError when a line or the table is too long */
export async function readRows(source: ByteSource, encoding: Encoding, layout: Layout, control: ReadingControl): Promise<Rows> {
  const reader = rowReader(layout, source.name);
  let rest: Uint8Array = new Uint8Array(0);
  for await (const { bytes, share } of slicesOf(source, encoding)) {
    control.signal?.throwIfAborted();
    let chunk = bytes;
    if (rest.length) {
      chunk = new Uint8Array(rest.length + bytes.length);
      chunk.set(rest);
      chunk.set(bytes, rest.length);
    }
    rest = chunk.subarray(reader.take(chunk, false));
    if (rest.length > LONGEST_LINE) throw tooLong(source.name, reader.line());
    // a line's rest must not keep the whole slice alive
    rest = rest.slice();
    control.progress?.(share);
  }
  reader.take(rest, true);
  return reader.rows();
}

const tooLong = (file: string, line: number) =>
  new ProblemError({
    code: 'line-too-long',
    where: { file, line },
    found: `a line of more than ${LONGEST_LINE} bytes`,
    expected: 'one sample a line',
    doThis: 'Save the spectrum as a table with one sample a line.',
  });

function rowReader(layout: Layout, file: string) {
  const n = layout.columns.length;
  const columns: Growing[] = Array.from({ length: n }, growing);
  const unreadable = Array.from({ length: n }, () => ({
    cells: 0,
    line: undefined as number | undefined,
    text: undefined as string | undefined,
  }));
  const ragged = { lines: 0, first: undefined as number | undefined };
  const wordy = { lines: 0, first: undefined as number | undefined, text: undefined as string | undefined };
  const delimiter = layout.dialect.delimiter.charCodeAt(0);
  const { decimalComma } = layout.dialect;
  const values = new Float64Array(n);
  const bad: number[] = [];
  const most = Math.min(MOST_ROWS, Math.floor(MOST_CELLS / n));
  let line = 0;

  /** Takes whole lines; returns the offset of what is left. */
  function take(bytes: Uint8Array, last: boolean): number {
    let start = 0;
    for (let i = 0; i < bytes.length; i++) {
      const byte = bytes[i];
      if (byte !== NEWLINE && byte !== RETURN) continue;
      if (byte === RETURN && i + 1 >= bytes.length && !last) return start;
      line++;
      if (line >= layout.firstRow) takeLine(bytes, start, i);
      if (byte === RETURN && bytes[i + 1] === NEWLINE) i++;
      start = i + 1;
    }
    if (last && start < bytes.length) {
      line++;
      if (line >= layout.firstRow) takeLine(bytes, start, bytes.length);
    }
    return start;
  }

  function takeLine(bytes: Uint8Array, start: number, end: number): void {
    let from = start;
    while (from < end && (bytes[from] === 32 || bytes[from] === 9)) from++;
    if (from === end || isCommentByte(bytes, from, end)) return;
    bad.length = 0;
    const cells = layout.places
      ? placedCells(bytes, start, end, layout.places)
      : delimiter === 32
        ? blankCells(bytes, from, end)
        : delimitedCells(bytes, start, end);
    let numbers = 0;
    for (let k = 0; k < Math.min(cells, n); k++) if (!Number.isNaN(values[k])) numbers++;
    if (numbers === 0) {
      if (bad.length === 0) return;
      wordy.lines++;
      wordy.first ??= line;
      wordy.text ??= excerpt(latin(bytes, start, end));
      return;
    }
    if (cells !== n) {
      ragged.lines++;
      ragged.first ??= line;
      for (let k = cells; k < n; k++) values[k] = Number.NaN;
    }
    for (const k of bad) {
      unreadable[k].cells++;
      unreadable[k].line ??= line;
      unreadable[k].text ??= excerpt(latin(bytes, start, end));
    }
    for (let k = 0; k < n; k++) columns[k].push(values[k]);
    if (columns[0].length > most) {
      throw new ProblemError({
        code: 'too-many-rows',
        where: { file, line },
        found: `more than ${most} rows`,
        expected: 'a spectrum that fits into memory',
        doThis: 'Cut the file to the range you need.',
      });
    }
  }

  function put(bytes: Uint8Array, k: number, from: number, to: number): void {
    if (k >= n) return;
    const value = parseNumber(bytes, from, to, decimalComma);
    if (value === undefined) {
      bad.push(k);
      values[k] = Number.NaN;
    } else values[k] = value;
  }

  function blankCells(bytes: Uint8Array, start: number, end: number): number {
    let k = 0;
    let i = start;
    while (i < end) {
      while (i < end && (bytes[i] === 32 || bytes[i] === 9)) i++;
      if (i >= end) break;
      const from = i;
      if (bytes[i] === 34) {
        i++;
        while (i < end && bytes[i] !== 34) i++;
        if (i < end) i++;
      } else while (i < end && bytes[i] !== 32 && bytes[i] !== 9) i++;
      put(bytes, k++, from, i);
    }
    return k;
  }

  function delimitedCells(bytes: Uint8Array, start: number, end: number): number {
    let k = 0;
    let from = start;
    let quoted = false;
    let skipFirst = delimiter === 124;
    for (let i = start; i <= end; i++) {
      if (i < end) {
        if (bytes[i] === 34) quoted = !quoted;
        if (bytes[i] !== delimiter || quoted) continue;
      }
      const isEmptyEdge = delimiter === 124 && (skipFirst || i === end) && isBlank(bytes, from, i);
      skipFirst = false;
      // a delimiter at the end of the line makes no cell more
      if (!isEmptyEdge && !(i === end && k >= n && isBlank(bytes, from, i))) put(bytes, k++, from, i);
      from = i + 1;
    }
    return k;
  }

  function placedCells(bytes: Uint8Array, start: number, end: number, places: readonly (readonly [number, number])[]): number {
    places.forEach(([from, to], k) => {
      put(bytes, k, Math.min(end, start + from), Math.min(end, k === places.length - 1 ? end : start + to));
    });
    return places.length;
  }

  return {
    take,
    line: () => line,
    rows: (): Rows => ({ columns: columns.map((c) => c.finish()), unreadable, ragged, wordy }),
  };
}

function isBlank(bytes: Uint8Array, from: number, to: number): boolean {
  for (let i = from; i < to; i++) if (bytes[i] !== 32 && bytes[i] !== 9) return false;
  return true;
}

/** # % ! ; \ * @ > and // start a comment, as in `isComment`. */
function isCommentByte(bytes: Uint8Array, at: number, end: number): boolean {
  const b = bytes[at];
  if (b === 35 || b === 37 || b === 33 || b === 59 || b === 92 || b === 64 || b === 62) return true;
  if (b === 42) return !(at + 1 < end && bytes[at + 1] === 42) && !isStarCell(bytes, at, end);
  return b === 47 && at + 1 < end && bytes[at + 1] === 47;
}

const isStarCell = (bytes: Uint8Array, at: number, end: number) => at + 1 < end && (bytes[at + 1] === 44 || bytes[at + 1] === 59);

function latin(bytes: Uint8Array, from: number, to: number): string {
  let text = '';
  for (let i = from; i < Math.min(to, from + 160); i++) text += String.fromCharCode(bytes[i]);
  return text;
}
