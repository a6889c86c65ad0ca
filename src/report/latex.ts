import { DEFAULT_DESIGN, type TableDesign } from './design.ts';
import type { InlineText } from './inline.ts';
import type { LineTable } from './lineTable.ts';
import { type PaperTable, paperTable } from './paperTable.ts';

/** The table as LaTeX: `longtable` with booktabs rules; ions with their roman numeral in small capitals. */
export function latexTable(table: LineTable, design: TableDesign = DEFAULT_DESIGN): string {
  const paper = paperTable(table, design);
  const heads = headRows(paper);
  const width = paper.columns.length;
  const foot = footnotes(paper);
  return [
    '% needs \\usepackage{longtable} and \\usepackage{booktabs}',
    `\\begin{longtable}{${alignment(paper)}}`,
    `\\caption{${latexText(paper.caption)}}\\\\`,
    '\\toprule',
    ...heads,
    '\\midrule',
    '\\endfirsthead',
    '\\toprule',
    ...heads,
    '\\midrule',
    '\\endhead',
    '\\bottomrule',
    '\\endfoot',
    '\\bottomrule',
    `\\multicolumn{${width}}{p{0.95\\linewidth}}{\\footnotesize ${foot.join(' ')}}\\\\`,
    '\\endlastfoot',
    ...bodyRows(paper),
    '\\end{longtable}',
    '',
  ].join('\n');
}

/** The table as `deluxetable*` of the AASTeX classes (version 6.3 and later), broken over pages by `\startlongtable`. */
export function deluxeTable(table: LineTable, design: TableDesign = DEFAULT_DESIGN): string {
  const paper = paperTable(table, design);
  const heads = paper.columns.map(({ head }) => `\\colhead{${latexInline(head)}}`).join(' & ');
  const units = paper.columns.map(({ unit }) => `\\colhead{${unit.length > 0 ? `(${latexInline(unit)})` : ''}}`).join(' & ');
  return [
    '% for aastex631.cls and later',
    '\\startlongtable',
    `\\begin{deluxetable*}{${alignment(paper)}}`,
    `\\tablecaption{${latexText(paper.caption)}}`,
    `\\tablehead{${heads} \\\\ ${units}}`,
    '\\startdata',
    bodyRows(paper)
      .join('\n')
      .replace(/ \\\\$/, ''),
    '\\enddata',
    ...paper.notes.map(({ mark, text }) => `\\tablenotetext{${mark}}{${latexText(text)}.}`),
    `\\tablecomments{${paper.remarks.map(latexInline).join(' ')}}`,
    '\\end{deluxetable*}',
    '',
  ].join('\n');
}

const alignment = ({ columns }: PaperTable) => columns.map(({ align }) => (align === 'left' ? 'l' : 'r')).join('');

/** Heads, and below them the units in brackets. */
function headRows({ columns }: PaperTable): string[] {
  const units = columns.map(({ unit }) => (unit.length > 0 ? `(${latexInline(unit)})` : ''));
  return [columns.map(({ head }) => latexInline(head)), units].map((cells) => `${cells.join(' & ')} \\\\`);
}

/** An empty first cell would let TeX take a bracket of the next row for the length of `\\`: every row ends with an empty group. */
const bodyRows = ({ rows }: PaperTable) => rows.map(({ cells }) => `${cells.map(latexInline).join(' & ')} \\\\`.replace(/^\[/, '{}['));

const footnotes = ({ remarks, notes }: PaperTable) => [
  ...remarks.map(latexInline),
  ...notes.map(({ mark, text }) => `$^{\\rm ${mark}}$~${latexText(text)}.`),
];

/** Pieces as LaTeX. */
export function latexInline(pieces: InlineText): string {
  return pieces
    .map((piece) => {
      if (typeof piece === 'string') return latexText(piece);
      if ('caps' in piece) return `\\textsc{${latexText(piece.caps)}}`;
      if ('sign' in piece) return `$${SPECIAL[piece.sign]?.replaceAll('$', '') ?? piece.sign}$`;
      return 'sup' in piece ? `$^{${mathText(piece.sup)}}$` : `$_{${mathText(piece.sub)}}$`;
    })
    .join('');
}

const SPECIAL: Readonly<Record<string, string>> = {
  '\\': '\\textbackslash{}',
  '~': '\\textasciitilde{}',
  '^': '\\textasciicircum{}',
  '\u00a0': '~',
  '±': '$\\pm$',
  '×': '$\\times$',
  '−': '$-$',
  '–': '--',
  λ: '$\\lambda$',
  β: '$\\beta$',
  τ: '$\\tau$',
  Å: '\\AA{}',
  '○': '$\\circ$',
  '<': '$<$',
  '>': '$>$',
};
/** Characters TeX takes as they are; any other one becomes a question mark rather than an error of the compiler. */
const PLAIN = /[ -~]/;

/** Plain text with the characters TeX would take as commands made harmless. */
export function latexText(text: string): string {
  return Array.from(text, (c) => SPECIAL[c] ?? (/[&%$#_{}]/.test(c) ? `\\${c}` : PLAIN.test(c) ? c : accented(c))).join('');
}

/** Letters with accents go through as UTF-8, which LaTeX has read since 2018. */
const accented = (c: string) => (/\p{L}/u.test(c) && c <= '\u017f' ? c : '?');

function mathText(text: string): string {
  if (text === '○') return '\\circ';
  return /^[−\d]+$/.test(text) ? text.replace('−', '-') : `\\rm ${latexText(text)}`;
}
