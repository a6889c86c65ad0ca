/** One row of a CSV text: the line it begins on (from 1) and its cells, trimmed. */
export interface CsvRow {
  readonly line: number;
  readonly cells: readonly string[];
}

/**
 * Splits a CSV text (RFC 4180: quotes double inside quotes, line breaks allowed there) into rows. Empty lines and lines that begin with # are left out;
 * a byte order mark is taken off.
 *
 * @returns the line of a quote that is never closed, when there is one
 */
export function csvRows(text: string): { readonly rows: CsvRow[] } | { readonly unclosedQuote: number } {
  const body = `${text.replace(/^\uFEFF/, '').replace(/\r\n?/g, '\n')}\n`;
  const rows: CsvRow[] = [];
  let cells: string[] = [];
  let cell = '';
  let [line, start] = [1, 1];
  let quotedSince = 0;
  for (let at = 0; at < body.length; at++) {
    const letter = body[at];
    if (letter === '\n') line++;
    if (quotedSince > 0) {
      if (letter !== '"') cell += letter;
      else if (body[at + 1] === '"') {
        cell += '"';
        at++;
      } else quotedSince = 0;
    } else if (letter === '"' && cell.trim() === '' && !isComment(cells, cell)) quotedSince = line;
    else if (letter === ',' && !isComment(cells, cell)) {
      cells.push(cell.trim());
      cell = '';
    } else if (letter === '\n') {
      cells.push(cell.trim());
      if (!cells[0].startsWith('#') && cells.some((c) => c !== '')) rows.push({ line: start, cells });
      cells = [];
      cell = '';
      start = line;
    } else cell += letter;
  }
  return quotedSince > 0 ? { unclosedQuote: quotedSince } : { rows };
}

/** Commas in a comment line part nothing. */
const isComment = (cells: readonly string[], cell: string) => cells.length === 0 && cell.startsWith('#');
