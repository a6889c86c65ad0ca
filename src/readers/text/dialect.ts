import { type Dialect, splitLine } from './cells.ts';
import { numberInWords } from './parseNumber.ts';

/** A dialect with the number of columns it gives and how many of the lines agree. */
export interface DialectFit {
  readonly dialect: Dialect;
  readonly columns: number;
  readonly lines: number;
}

const CANDIDATES: readonly Dialect[] = [
  { delimiter: ';', decimalComma: false },
  { delimiter: ';', decimalComma: true },
  { delimiter: ',', decimalComma: false },
  { delimiter: '\t', decimalComma: false },
  { delimiter: '\t', decimalComma: true },
  { delimiter: ' ', decimalComma: false },
  { delimiter: ' ', decimalComma: true },
  { delimiter: '|', decimalComma: false },
  { delimiter: ',', decimalComma: true },
];

/** Columns beyond this are no table of a spectrum. */
export const MOST_COLUMNS = 256;

/** Whether a line is a row of numbers in a dialect: at least two cells with a number, or one and the rest missing. */
export function isRow(cells: readonly string[], decimalComma: boolean): boolean {
  if (cells.length < 2) return false;
  let numbers = 0;
  let missing = 0;
  for (const cell of cells) {
    const value = numberInWords(cell, decimalComma);
    if (value === undefined) continue;
    if (Number.isNaN(value)) missing++;
    else numbers++;
  }
  return numbers >= 2 || (numbers === 1 && missing >= 1);
}

/** The dialect in which most of the lines are rows of the same number of columns; undefined when none makes two columns of numbers. */
export function findDialect(lines: readonly string[]): DialectFit | undefined {
  let best: DialectFit | undefined;
  for (const dialect of CANDIDATES) {
    const tally = new Map<number, number>();
    for (const line of lines) {
      const cells = splitLine(line, dialect.delimiter);
      if (cells.length > MOST_COLUMNS || !isRow(cells, dialect.decimalComma)) continue;
      if (dialect.decimalComma && !cells.some((c) => /^[+-]?\d+,\d/.test(c))) continue;
      tally.set(cells.length, (tally.get(cells.length) ?? 0) + 1);
    }
    for (const [columns, agreeing] of tally) if (!best || agreeing > best.lines) best = { dialect, columns, lines: agreeing };
  }
  return best;
}
