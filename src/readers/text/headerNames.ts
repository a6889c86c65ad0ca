import { roleOf } from '../columnRoles.ts';
import { spectralUnit } from '../spectralUnits.ts';
import { type Dialect, splitLine } from './cells.ts';

/** Name, unit and description of a column as the text words them. */
export interface NamedColumn {
  readonly name: string;
  readonly unit: string;
  readonly description?: string;
}

interface Names {
  readonly columns: readonly NamedColumn[];
  readonly from: string;
  /** Header lines that were names or units. */
  readonly linesUsed: number;
}

/** Names of columns from the lines before the rows, else from the comments, else numbers: "column 1". */
export function namesOfColumns(headers: readonly string[], comments: readonly string[], dialect: Dialect, columns: number): Names {
  return (
    fromByteDescription(headers, columns) ??
    fromHeaderLines(headers, dialect, columns) ??
    fromNumberedComments(comments, columns) ??
    fromComments(comments, dialect, columns) ?? {
      columns: Array.from({ length: columns }, (_, k) => ({ name: String(k + 1), unit: '' })),
      from: 'no names in the file: numbers',
      linesUsed: 0,
    }
  );
}

/** The "Byte-by-byte Description" of machine-readable tables (CDS standard): bytes, format, unit, label, explanation. */
function fromByteDescription(headers: readonly string[], columns: number): Names | undefined {
  if (!headers.some((line) => /byte-by-byte description/i.test(line))) return undefined;
  const found: NamedColumn[] = [];
  for (const line of headers) {
    const match = /^\s*(?:\d+\s*-\s*)?\d+\s+[AIFE]\d[\d.]*\s+(\S+)\s+(\S+)\s*(.*)$/.exec(line);
    if (match)
      found.push({ name: match[2], unit: match[1] === '---' ? '' : match[1], description: match[3].replace(/^\?=?\S*\s/, '').trim() });
  }
  return found.length === columns ? { columns: found, from: 'the byte-by-byte description', linesUsed: headers.length } : undefined;
}

function fromHeaderLines(headers: readonly string[], dialect: Dialect, columns: number): Names | undefined {
  const rows = headers
    .map((line) => cellsOfHeader(line, dialect, columns) ?? firstNames(line, dialect, columns))
    .filter((cells) => cells !== undefined);
  if (rows.length === 0) return undefined;
  const nameAt = Math.max(0, rows.findIndex(namesAnAxis));
  const names = rows[nameAt];
  if (names.every((n) => n === '')) return undefined;
  const units = rows.find((cells, k) => k !== nameAt && looksLikeUnits(cells));
  return { columns: names.map((n, k) => named(n, k, units?.[k])), from: 'the header line', linesUsed: rows.length };
}

function fromComments(comments: readonly string[], dialect: Dialect, columns: number): Names | undefined {
  const rows = comments.map(
    (line) =>
      cellsOfHeader(line.replace(/^[#\s]+/, ''), dialect, columns) ??
      cellsOfHeader(line, { delimiter: ' ', decimalComma: false }, columns) ??
      cellsOfHeader(line, { delimiter: ',', decimalComma: false }, columns),
  );
  const nameAt = rows.findLastIndex((cells) => cells !== undefined && namesAnAxis(cells));
  const names = rows[nameAt];
  if (!names) return undefined;
  const near = [rows[nameAt + 1], rows[nameAt + 2], rows[nameAt - 1]];
  const units =
    near.find((cells) => cells !== undefined && looksLikeUnits(cells)) ??
    bracketUnits([comments[nameAt + 1], comments[nameAt + 2], comments[nameAt - 1]]);
  return { columns: names.map((n, k) => named(n, k, units?.[k])), from: 'the comments', linesUsed: 0 };
}

/** "[A] [erg/s/cm2/A]": units of the first columns. */
function bracketUnits(lines: readonly (string | undefined)[]): string[] | undefined {
  for (const line of lines) {
    if (!line || !/^\s*(?:[[(][^\])]*[\])]\s*)+$/.test(line)) continue;
    const units = line.match(/[[(][^\])]*[\])]/g) ?? [];
    if (looksLikeUnits(units)) return units;
  }
  return undefined;
}

/** "# 1: wavelength [A]", "# Column 2 = flux". */
function fromNumberedComments(comments: readonly string[], columns: number): Names | undefined {
  const found = new Map<number, string>();
  for (const line of comments) {
    const match = /^\s*(?:col(?:umn)?s?\.?\s*#?\s*)?\(?(\d{1,3})\)?\s*[:=.)\t -]\s*([A-Za-zλ].*)$/i.exec(line);
    if (match && Number(match[1]) >= 1 && Number(match[1]) <= columns && !found.has(Number(match[1])))
      found.set(Number(match[1]), match[2].trim());
  }
  if (found.size < 2) return undefined;
  const all = Array.from({ length: columns }, (_, k) => {
    const words = found.get(k + 1);
    if (words === undefined) return { name: String(k + 1), unit: '' };
    const column = named(words.split(/\s[-–—]\s|[,;:]\s/)[0], k, undefined);
    return { ...column, description: words };
  });
  return all.some((c) => isAxisName(c.name)) ? { columns: all, from: 'the comments', linesUsed: 0 } : undefined;
}

/** The cells of a header line if they match the columns: brackets are kept together, and blanks inside names are tried last. */
function cellsOfHeader(line: string, dialect: Dialect, columns: number): string[] | undefined {
  const ways = [
    () => splitLine(line, dialect.delimiter),
    () =>
      dialect.delimiter === ' '
        ? (line.match(/"[^"]*"|[^\s[({"]*(?:\[[^\]]*\]|\((?:[^()]|\([^)]*\))*\)|\{[^}]*\})\S*|[^\s"]+/g) ?? [])
        : [],
    () => (dialect.delimiter === ' ' ? joinBrackets(line.match(/\[[^\]]*\]|\((?:[^()]|\([^)]*\))*\)|\{[^}]*\}|[^\s[({]+/g) ?? []) : []),
    () => (dialect.delimiter === ' ' ? line.trim().split(/\s{2,}|\t+/) : []),
    () => (dialect.delimiter === ' ' ? splitLine(line, ',') : []),
    () => (dialect.delimiter === ' ' ? splitLine(line, '\t') : []),
    () => (dialect.delimiter === ' ' ? splitLine(line, '|') : []),
  ];
  for (const way of ways) {
    const cells = way().map((c) => c.trim());
    if (cells.length === columns + 1 && cells.at(-1) === '') cells.pop();
    if (cells.length === columns + 1 && /^(#|%|!|;|\/\/)$/.test(cells[0])) cells.shift();
    if (cells.length === columns) return cells;
  }
  return undefined;
}

/** Names of the first columns where a header names fewer than there are. */
function firstNames(line: string, { delimiter }: Dialect, columns: number): string[] | undefined {
  const cells = splitLine(line, delimiter);
  const rest = Array.from({ length: columns - cells.length }, (_, k) => String(cells.length + k + 1));
  return cells.length >= 2 && cells.length < columns && namesAnAxis(cells) ? [...cells, ...rest] : undefined;
}

/** `wave [A] flux [Jy]` -> `wave [A]`, `flux [Jy]`. */
function joinBrackets(parts: readonly string[]): string[] {
  const joined: string[] = [];
  for (const part of parts) {
    if (/^[[({]/.test(part) && joined.length) joined[joined.length - 1] += ` ${part}`;
    else joined.push(part);
  }
  return joined;
}

const isAxisName = (cell: string) => {
  const { name, unit } = named(cell, 0, undefined);
  return roleOf({ name, unit, kind: 'real' }).role === 'wavelength';
};

const namesAnAxis = (cells: readonly string[]): boolean => cells.some(isAxisName) && cells.length >= 2;

/** A row of units has a unit of wavelength in it and no name of a column. */
const looksLikeUnits = (cells: readonly string[]): boolean => cells.some((c) => spectralUnit(c) !== undefined);

/** "wave [A]" -> name and unit. */
function named(cell: string, index: number, unit: string | undefined): NamedColumn {
  const clean = cell.replace(/^[#\s]+/, '').trim();
  const bracket = /^(.*?\S)\s*[[({<]\s*(.*?)\s*[\])}>]\s*$/.exec(clean);
  const name = bracket ? bracket[1] : clean;
  const words = (unit ?? '').replace(/^[[({<]\s*|\s*[\])}>]$/g, '').trim();
  return { name: name === '' ? String(index + 1) : name, unit: bracket ? bracket[2] : words === '-' || words === '---' ? '' : words };
}
