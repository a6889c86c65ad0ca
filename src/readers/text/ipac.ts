import type { NamedColumn } from './headerNames.ts';

/** The header of an IPAC table: rows between bars give names, types, units and the words for missing values. */
export interface IpacHeader {
  readonly columns: readonly NamedColumn[];
  /** Places of the cells, from 0: [start, end). */
  readonly places: readonly (readonly [number, number])[];
  /** Header lines used. */
  readonly lines: number;
  /** Numbers declared to mean "missing". */
  readonly nulls: readonly number[];
}

/** Reads the header where the first lines stand between bars; undefined when they do not. */
export function ipacHeader(lines: readonly { text: string }[]): IpacHeader | undefined {
  const rows: string[] = [];
  for (const { text } of lines.slice(0, 4)) {
    if (!/^\s*\|.*\|\s*$/.test(text)) break;
    rows.push(text);
  }
  if (rows.length === 0 || !/[a-z]/i.test(rows[0])) return undefined;
  // a table drawn with bars throughout is not this format
  if (lines.length > rows.length && /^\s*\|/.test(lines[rows.length].text)) return undefined;
  const bars: number[] = [];
  for (let i = 0; i < rows[0].length; i++) if (rows[0][i] === '|') bars.push(i);
  if (bars.length < 3) return undefined;
  const cell = (row: string | undefined, k: number) => (row ?? '').slice(bars[k] + 1, bars[k + 1]).trim();
  const columns = bars.slice(0, -1).map((_, k) => ({ name: cell(rows[0], k), unit: cell(rows[2], k).replace(/^-+$/, '') }));
  const nulls = bars
    .slice(0, -1)
    .map((_, k) => cell(rows[3], k))
    .filter((w) => w !== '' && Number.isFinite(Number(w)))
    .map(Number);
  const places = bars.slice(0, -1).map((bar, k): readonly [number, number] => [bar, bars[k + 1]]);
  return { columns, places, lines: rows.length, nulls };
}
