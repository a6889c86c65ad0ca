/** How the cells of a line are told apart: one character, runs of blanks, or fixed places. */
export interface Dialect {
  readonly delimiter: ',' | ';' | '\t' | '|' | ' ';
  readonly decimalComma: boolean;
}

/** The cells of a line of text, trimmed and without quotes. */
export function splitLine(line: string, delimiter: Dialect['delimiter']): string[] {
  if (delimiter === ' ') return splitBlanks(line);
  const cells: string[] = [];
  let cell = '';
  let quote = '';
  for (const c of line) {
    if (quote) {
      if (c === quote) quote = '';
      else cell += c;
    } else if (c === '"' && cell.trim() === '') {
      quote = c;
      cell = '';
    } else if (c === delimiter) {
      cells.push(cell.trim());
      cell = '';
    } else cell += c;
  }
  cells.push(cell.trim());
  if (delimiter === '|') {
    // pipes may stand around the line as well as between its cells
    if (cells[0] === '') cells.shift();
    if (cells.at(-1) === '') cells.pop();
  }
  return cells;
}

function splitBlanks(line: string): string[] {
  return (line.match(/"[^"]*"|[^\s"]+/g) ?? []).map((c) => c.replace(/^"|"$/g, ''));
}

/** First characters that make a line a comment. */
export const isComment = (line: string): boolean => /^\s*(#|%|!|;|\/\/|\\|\*|@|>)/.test(line);

/** The comment without its sign. */
export const commentText = (line: string): string => line.replace(/^\s*(#+|%+|!+|;+|\/\/|\\|\*+|@|>)+\s?/, '').trimEnd();
