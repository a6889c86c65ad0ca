import { commentText, type Dialect, isComment, splitLine } from './cells.ts';
import { findDialect, isRow } from './dialect.ts';
import { ecsvColumns } from './ecsv.ts';
import { type NamedColumn, namesOfColumns } from './headerNames.ts';
import { ipacHeader } from './ipac.ts';

/** How a text file is laid out. */
export interface Layout {
  readonly format: 'delimited text' | 'ECSV' | 'IPAC table';
  readonly dialect: Dialect;
  readonly columns: readonly NamedColumn[];
  /** Where the names come from. */
  readonly namesFrom: string;
  /** Line of the first row, from 1. */
  readonly firstRow: number;
  /** Text of the comments before the rows. */
  readonly comments: readonly string[];
  readonly missingValues: readonly number[];
  /** Lines before the rows that are neither comment nor names. */
  readonly strayLines: number;
  /** Fixed places of the cells, from 0, where the standard of the format says so and blanks do not tell. */
  readonly places?: readonly (readonly [number, number])[];
}

/** Characters of a comment or of a header line that are looked at. */
const LONGEST_COMMENT = 500;
const LONGEST_HEADER = 5000;
/** Lines looked at to find the dialect. */
const SAMPLE = 400;

/** The layout of a text whose head is given; undefined when no two columns of numbers can be found. */
export function findLayout(head: string, whole: boolean): Layout | undefined {
  const lines = head.split(/\r\n|\n|\r/);
  if (!whole && lines.length > 1) lines.pop();
  const isEcsv = /^\s*#\s*%ECSV/.test(lines.find((l) => l.trim() !== '') ?? '');
  const plain: { text: string; at: number }[] = [];
  const comments: { text: string; at: number }[] = [];
  lines.forEach((text, at) => {
    if (text.trim() === '') return;
    if (isComment(text)) comments.push({ text, at });
    else plain.push({ text, at });
  });
  const ipac = ipacHeader(plain);
  const candidates = ipac ? plain.slice(ipac.lines) : plain;
  const fit = findDialect(sampleOf(candidates));
  if (!fit) return undefined;
  const { dialect, columns } = fit;
  const isData = (text: string) => {
    const cells = splitLine(text, dialect.delimiter);
    return isRow(cells, dialect.decimalComma) && Math.abs(cells.length - columns) <= (columns > 2 ? 1 : 0);
  };
  const firstAt = candidates.findIndex(({ text }) => isData(text));
  if (firstAt < 0) return undefined;
  const firstLine = candidates[firstAt].at;
  const before = comments.filter((c) => c.at < firstLine).map((c) => commentText(c.text.slice(0, LONGEST_COMMENT)));
  const after = comments
    .filter((c) => c.at > firstLine)
    .slice(0, 200)
    .map((c) => commentText(c.text.slice(0, LONGEST_COMMENT)));
  const base = { dialect, firstRow: firstLine + 1, comments: [...before, ...after], missingValues: declaredMissing([...before, ...after]) };

  if (ipac) {
    const places = ipac.columns.length === columns ? undefined : ipac.places;
    return {
      ...base,
      format: 'IPAC table',
      columns: ipac.columns,
      namesFrom: 'the header between bars',
      strayLines: 0,
      missingValues: [...base.missingValues, ...ipac.nulls],
      ...(places ? { places } : {}),
    };
  }
  const headers = candidates.slice(0, firstAt).map(({ text }) => text.slice(0, LONGEST_HEADER));
  if (isEcsv) {
    const declared = ecsvColumns(comments.map((c) => c.text));
    if (declared.length === columns) return { ...base, format: 'ECSV', columns: declared, namesFrom: 'the ECSV header', strayLines: 0 };
  }
  const named = namesOfColumns(headers, before, dialect, columns);
  return {
    ...base,
    format: isEcsv ? 'ECSV' : 'delimited text',
    columns: named.columns,
    namesFrom: named.from,
    strayLines: Math.max(0, headers.length - named.linesUsed),
  };
}

/** The first lines and some from the end of the head, so that a long preamble does not hide the rows. */
function sampleOf(lines: readonly { text: string }[]): string[] {
  if (lines.length <= 2 * SAMPLE) return lines.map((l) => l.text);
  return [...lines.slice(0, SAMPLE), ...lines.slice(-SAMPLE)].map((l) => l.text);
}

const NUMBER = String.raw`[-+]?\d+(?:\.\d*)?(?:e[-+]?\d+)?`;
const MEANS_MISSING = String.raw`(?:missing|null|no[\s_-]?data|undefined|invalid|not measured|fill[\s_-]?values?|bad (?:values?|data|pixels?|samples?)|blank)`;

/** Values that comments declare to mean "missing": "missing values are -999", "-999 = no data". */
export function declaredMissing(comments: readonly string[]): number[] {
  const found = new Set<number>();
  for (const text of comments) {
    const patterns = [
      new RegExp(`${MEANS_MISSING}[^.\\d+-]{0,30}(${NUMBER})`, 'i'),
      new RegExp(
        `(?:^|\\s)(${NUMBER})\\s*(?:=|:|is|are|means?|stands for|marks?|for|denotes?|indicates?)\\s*(?:an?\\s|the\\s)?${MEANS_MISSING}`,
        'i',
      ),
    ];
    for (const pattern of patterns) {
      const match = pattern.exec(text);
      if (match && Number.isFinite(Number(match[1]))) found.add(Number(match[1]));
    }
  }
  return [...found];
}
