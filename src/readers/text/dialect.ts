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

/** Numbers and missing values among the cells of a line. */
function tallyCells(cells: readonly string[], decimalComma: boolean): { numbers: number; missing: number } {
  let numbers = 0;
  let missing = 0;
  for (const cell of cells) {
    const value = numberInWords(cell, decimalComma);
    if (value === undefined) continue;
    if (Number.isNaN(value)) missing++;
    else numbers++;
  }
  return { numbers, missing };
}

/** Whether a line is a row of numbers in a dialect: at least two cells with a number, or one and the rest missing. */
export function isRow(cells: readonly string[], decimalComma: boolean): boolean {
  if (cells.length < 2) return false;
  const { numbers, missing } = tallyCells(cells, decimalComma);
  return numbers >= 2 || (numbers === 1 && missing >= 1);
}

/**
 * The dialect in which most of the lines are rows of the same number of columns, each line counting by the share of its cells that are
 * numbers; undefined when none makes two columns of numbers.
 */
export function findDialect(lines: readonly string[]): DialectFit | undefined {
  let best: DialectFit | undefined;
  let bestWeight = 0;
  for (const dialect of CANDIDATES) {
    const tally = new Map<number, { lines: number; weight: number }>();
    for (const line of lines) {
      const cells = splitLine(line, dialect.delimiter);
      if (cells.length > MOST_COLUMNS || !isRow(cells, dialect.decimalComma)) continue;
      if (dialect.decimalComma && !cells.some((c) => /^[+-]?\d+,\d/.test(c))) continue;
      const { numbers, missing } = tallyCells(cells, dialect.decimalComma);
      const so = tally.get(cells.length) ?? { lines: 0, weight: 0 };
      tally.set(cells.length, { lines: so.lines + 1, weight: so.weight + (numbers + missing) / cells.length });
    }
    for (const [columns, { lines: agreeing, weight }] of tally) {
      if (weight <= bestWeight + 1e-9) continue;
      bestWeight = weight;
      best = { dialect, columns, lines: agreeing };
    }
  }
  return best;
}
