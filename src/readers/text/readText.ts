import { ProblemError, type Remark } from '../../problems/index.ts';
import type { NumberColumn, NumberTable } from '../columns.ts';
import { wavelengthUnit } from '../wavelengthUnits.ts';
import { decodeText } from './decode.ts';

const COMMENT = /^\s*(#|%|!|;|\/\/|\*|\\)/;
const MISSING = /^(|nan|null|none|n\/a|na|-+|inf|-inf|\*+|\.\.\.)$/i;
/** Lines looked at to find the delimiter. */
const PROBE_LINES = 200;
/** Rows that hold no number are tolerated up to this share. */
const MOST_BAD_ROWS = 0.1;

/**
 * A text of columns -> numbers: delimiter (comma, semicolon, tab, bar, blanks), decimal comma, header line with units in brackets or suffixes, comments.
 *
 * @throws ProblemError naming the first line that cannot be understood
 */
export function readTextTable(file: string, bytes: Uint8Array): NumberTable {
  const lines = decodeText(bytes).split(/\r\n|\n|\r/);
  const comments: string[] = [];
  const rows: { text: string; line: number }[] = [];
  lines.forEach((text, k) => {
    if (text.trim() === '') return;
    if (COMMENT.test(text)) comments.push(text.replace(COMMENT, '').trim());
    else rows.push({ text, line: k + 1 });
  });
  if (rows.length === 0)
    throw new ProblemError({ code: 'no-rows', where: { file }, found: 'no line with data', expected: 'columns of numbers' });
  const layout = findLayout(rows.slice(0, PROBE_LINES).map((r) => r.text));
  const first = rows.findIndex((row) => isData(layout.split(row.text), layout));
  if (first < 0) {
    const row = rows[0];
    throw new ProblemError({
      code: 'no-numbers',
      where: { file, line: row.line, excerpt: row.text.slice(0, 120) },
      found: 'no line of numbers',
      expected: 'at least two columns of numbers',
      doThis: 'Is this a spectrum as text?',
    });
  }
  const width = layout.split(rows[first].text).length;
  const header = findHeader(
    rows.slice(0, first).map((r) => r.text),
    comments,
    layout,
    width,
  );
  const values = Array.from({ length: width }, () => new Float64Array(rows.length - first));
  const bad: { text: string; line: number }[] = [];
  for (let r = first; r < rows.length; r++) {
    const words = layout.split(rows[r].text);
    let understood = words.length >= 2;
    for (let c = 0; c < width; c++) {
      const value = numberOf(words[c] ?? '', layout.decimalComma);
      values[c][r - first] = value ?? Number.NaN;
      if (value === undefined && c < 2) understood = false;
    }
    if (!understood) bad.push(rows[r]);
  }
  const remarks: Remark[] = [];
  if (bad.length > MOST_BAD_ROWS * (rows.length - first)) {
    throw new ProblemError({
      code: 'not-numbers',
      where: { file, line: bad[0].line, excerpt: bad[0].text.slice(0, 120) },
      found: `${bad.length} of ${rows.length - first} lines are not numbers in columns`,
      expected: `${width} numbers a line`,
    });
  }
  if (bad.length > 0)
    remarks.push({
      code: 'bad-lines',
      weight: 'warning',
      where: { file, line: bad[0].line, excerpt: bad[0].text.slice(0, 120) },
      found: `${bad.length} lines are not numbers and were left out, the first of them here`,
    });
  const columns = values.map((column, c): NumberColumn => ({ ...nameAndUnit(header?.[c] ?? ''), values: column }));
  return {
    file,
    format: 'delimited text',
    columns,
    text: [...comments, ...rows.slice(0, first).map((r) => r.text)].join('\n'),
    how: [
      {
        fact: 'format',
        value: `text, columns separated by ${layout.name}${layout.decimalComma ? ', decimal comma' : ''}`,
        reason: 'from its first lines',
      },
    ],
    offers: [],
    remarks,
  };
}

interface Layout {
  readonly name: string;
  readonly decimalComma: boolean;
  readonly split: (text: string) => string[];
}

const unquote = (word: string) =>
  word
    .trim()
    .replace(/^(["'])(.*)\1$/, '$2')
    .trim();
const splitAt = (delimiter: string) => (text: string) => text.split(delimiter).map(unquote);
const splitBlanks = (text: string) => text.trim().split(/\s+/).map(unquote);

function findLayout(lines: readonly string[]): Layout {
  const candidates: Layout[] = [
    { name: 'semicolons', decimalComma: false, split: splitAt(';') },
    { name: 'semicolons', decimalComma: true, split: splitAt(';') },
    { name: 'tabs', decimalComma: false, split: splitAt('\t') },
    { name: 'tabs', decimalComma: true, split: splitAt('\t') },
    {
      name: 'bars',
      decimalComma: false,
      split: (text) =>
        text
          .replace(/^\s*\||\|\s*$/g, '')
          .split('|')
          .map(unquote),
    },
    { name: 'commas', decimalComma: false, split: splitAt(',') },
    { name: 'blanks', decimalComma: false, split: splitBlanks },
    { name: 'blanks', decimalComma: true, split: splitBlanks },
  ];
  let best = candidates[6];
  let bestScore = 0;
  for (const layout of candidates) {
    const score = lines.filter((line) => isData(layout.split(line), layout)).length;
    if (score > bestScore) {
      best = layout;
      bestScore = score;
    }
  }
  return best;
}

const isData = (words: readonly string[], layout: Layout) => {
  if (words.length < 2) return false;
  const numbers = words.map((word) => numberOf(word, layout.decimalComma));
  return (
    numbers[0] !== undefined && Number.isFinite(numbers[0]) && numbers.filter((v) => v !== undefined).length >= Math.min(2, words.length)
  );
};

/** NaN for the words that mean "missing"; undefined for what is no number at all. */
function numberOf(word: string, decimalComma: boolean): number | undefined {
  const text = decimalComma ? word.replace(',', '.') : word;
  if (MISSING.test(text)) return Number.NaN;
  const value = Number(text.replace(/^([+-]?[\d.]+)[dD]([+-]?\d+)$/, '$1e$2'));
  return Number.isNaN(value) ? undefined : value;
}

/** The line above the data, or the last comment, when it has a word for every column. */
function findHeader(above: readonly string[], comments: readonly string[], layout: Layout, width: number): string[] | undefined {
  for (const line of [...above].reverse()) {
    const words = layout.split(line);
    if (words.length === width && words.some((word) => /[a-zλ]/i.test(word))) return words;
  }
  for (const comment of [...comments].reverse()) {
    for (const split of [layout.split, splitBlanks]) {
      const words = split(comment);
      if (words.length === width && words.every((word) => /[a-zλ]/i.test(word))) return words;
    }
  }
  return undefined;
}

/** `wave [A]`, `lambda(um)`, `wavelength_nm` -> name and unit. */
function nameAndUnit(word: string): { name: string; unit: string } {
  const bracket = /^(.*?)\s*[[(]\s*(.*?)\s*[\])]\s*$/.exec(word);
  if (bracket) return { name: bracket[1].trim(), unit: bracket[2] };
  const suffix = /^(.*)[_ ]([^_ ]+)$/.exec(word);
  if (suffix && wavelengthUnit(suffix[2]) && /^(wave|lam|wl)/i.test(suffix[1])) return { name: suffix[1], unit: suffix[2] };
  return { name: word.trim(), unit: wavelengthUnit(word) && word.length > 2 ? word : '' };
}
