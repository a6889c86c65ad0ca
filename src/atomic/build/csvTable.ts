/** One table of `src/atomic/tables`: columns by name, rows as text. */
export interface CsvTable {
  readonly name: string;
  readonly columns: readonly string[];
  readonly rows: readonly Readonly<Record<string, string>>[];
}

function cells(line: string): string[] {
  if (!line.includes('"')) return line.split(',');
  const out: string[] = [];
  let cell = '';
  let quoted = false;
  for (let i = 0; i < line.length; i++) {
    const c = line[i];
    if (quoted) {
      if (c !== '"') cell += c;
      else if (line[i + 1] === '"') {
        cell += '"';
        i++;
      } else quoted = false;
    } else if (c === '"') quoted = true;
    else if (c === ',') {
      out.push(cell);
      cell = '';
    } else cell += c;
  }
  out.push(cell);
  return out;
}

/**
 * Reads a table of ours: first line the header, LF, no line breaks inside a cell.
 *
 * @throws Error naming file and line when a row has another number of cells than the header: the build must stop.
 */
export function parseCsvTable(name: string, text: string): CsvTable {
  const lines = text.split('\n').filter((line) => line !== '');
  const columns = cells(lines[0]);
  const rows = lines.slice(1).map((line, k) => {
    const values = cells(line);
    if (values.length !== columns.length)
      throw new Error(`${name} line ${k + 2}: ${values.length} cells, the header has ${columns.length}`);
    return Object.fromEntries(columns.map((column, i) => [column, values[i]]));
  });
  return { name, columns, rows };
}

/** A number of a table; NaN for an empty cell. @throws Error when the cell holds something else */
export function numberIn(table: CsvTable, row: Readonly<Record<string, string>>, column: string): number {
  const text = row[column];
  if (text === undefined) throw new Error(`${table.name}: no column ${column}`);
  if (text === '') return Number.NaN;
  const value = Number(text);
  if (!Number.isFinite(value))
    throw new Error(`${table.name}: ${column} = ${text} is no number (${Object.values(row).slice(0, 4).join(',')})`);
  return value;
}
