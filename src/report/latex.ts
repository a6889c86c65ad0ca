import { decimals, significant } from './columns.ts';
import type { LineRow, LineTable } from './lineTable.ts';

/**
 * The table as LaTeX: `longtable` with booktabs rules, the columns a paper prints; ions with their roman numeral in small capitals.
 * Decimals follow the error: two significant digits of it.
 */
export function latexTable(table: LineTable): string {
  const scaled = table.rows.some((row) => row.fluxHbeta100 !== undefined);
  const head = [
    '$\\lambda_{\\rm obs}$ (\\AA)',
    'Ion',
    '$\\lambda_{\\rm lab}$ (\\AA)',
    '$v$ (km\\,s$^{-1}$)',
    scaled ? '$F$ (H$\\beta=100$)' : '$F$',
    'FWHM (\\AA)',
    '$n_{\\rm crit}$ (cm$^{-3}$)',
    'Notes',
  ];
  const notes = collectNotes(table.rows);
  const body = table.rows.map((row) => `${latexCells(row, scaled, notes).join(' & ')} \\\\`);
  const medium = `Wavelengths in ${table.medium === 'air' ? 'standard air' : 'vacuum'}${table.mediumStated ? '' : ' (assumed)'}.`;
  const legend = [
    `${medium} Critical densities at $T_{\\rm e} = ${significant(table.te, 3)}$\\,K; $^{\\circ}$ marks lines of a metastable upper level.`,
    ...notes.map((note, k) => `$^{${letter(k)}}$~${latexText(note)}.`),
  ].join(' ');
  return [
    '% needs \\usepackage{longtable} and \\usepackage{booktabs}',
    '\\begin{longtable}{lllrrlll}',
    `\\caption{Line identifications: ${latexText(table.title)}.}\\\\`,
    '\\toprule',
    `${head.join(' & ')} \\\\`,
    '\\midrule',
    '\\endfirsthead',
    '\\toprule',
    `${head.join(' & ')} \\\\`,
    '\\midrule',
    '\\endhead',
    '\\bottomrule',
    '\\endfoot',
    '\\bottomrule',
    `\\multicolumn{8}{p{0.95\\linewidth}}{\\footnotesize ${legend}}\\\\`,
    '\\endlastfoot',
    ...body,
    '\\end{longtable}',
    '',
  ].join('\n');
}

function latexCells(row: LineRow, scaled: boolean, notes: readonly string[]): string[] {
  const flux = scaled ? row.fluxHbeta100 : row.flux;
  const fluxErr = scaled ? row.fluxHbeta100Err : row.fluxErr;
  const mark = row.note ? `$^{${letter(notes.indexOf(row.note))}}$` : '';
  return [
    row.wavelengthObsErr === undefined ? `$${decimals(row.wavelengthObs, 2)}$` : withError(row.wavelengthObs, row.wavelengthObsErr),
    row.ion ? `${latexIon(row.ion)}${row.thinGas ? '$^{\\circ}$' : ''}` : row.verdict === 'unidentified' ? 'unidentified' : '',
    (row.wavelengthLab ?? []).map((w) => decimals(w, 2)).join(', '),
    withError(row.velocity, row.velocityErr),
    withError(flux, fluxErr),
    withError(row.fwhm, row.fwhmErr),
    row.nCrit === undefined ? '' : powerOfTen(row.nCrit),
    mark,
  ];
}

/** `5006.842 $\pm$ 0.012`: the error with two significant digits, the value with as many decimals. */
export function withError(value: number | undefined, error: number | undefined): string {
  if (value === undefined || !Number.isFinite(value)) return '';
  if (error === undefined || !Number.isFinite(error) || error <= 0) return `$${scientific(value, 4)}$`;
  const size = Math.max(Math.abs(value), error);
  if (size >= 1e6 || size < 1e-3) {
    const exponent = Math.floor(Math.log10(size));
    const unit = 10 ** exponent;
    const digits = errorDecimals(error / unit);
    return `$(${(value / unit).toFixed(digits)} \\pm ${(error / unit).toFixed(digits)})\\times10^{${exponent}}$`;
  }
  const digits = errorDecimals(error);
  return `$${value.toFixed(digits)} \\pm ${error.toFixed(digits)}$`;
}

const errorDecimals = (error: number) => Math.min(8, Math.max(0, 1 - Math.floor(Math.log10(error))));

function scientific(value: number, digits: number): string {
  const text = significant(value, digits);
  const [mantissa, exponent] = text.split('e');
  return exponent === undefined ? mantissa : `${mantissa}\\times10^{${Number(exponent)}}`;
}

/** `$7.1\\times10^{5}$`: two significant digits, as far as critical densities are known. */
function powerOfTen(value: number): string {
  const [mantissa, exponent] = value.toExponential(1).split('e');
  return `$${mantissa}\\times10^{${Number(exponent)}}$`;
}

/** `[O III]` -> `[O\,\textsc{iii}]`; blends keep their `+`. */
export function latexIon(ion: string): string {
  return ion
    .split('+')
    .map((part) =>
      part
        .trim()
        .replace(/([A-Z][a-z]?\d?) ([IVXL]+)/, (_, element: string, stage: string) => `${element}\\,\\textsc{${stage.toLowerCase()}}`),
    )
    .join(' + ');
}

const SPECIAL: Readonly<Record<string, string>> = { '\\': '\\textbackslash{}', '~': '\\textasciitilde{}', '^': '\\textasciicircum{}' };

/** Plain text with the characters TeX would take as commands made harmless. */
export function latexText(text: string): string {
  return text.replace(/[\\~^&%$#_{}]/g, (c) => SPECIAL[c] ?? `\\${c}`);
}

const collectNotes = (rows: readonly LineRow[]) => [...new Set(rows.map((row) => row.note).filter((note) => note !== ''))];

/** a, b, ... z, aa, ab ... */
function letter(k: number): string {
  return k < 26 ? String.fromCharCode(97 + k) : letter(Math.floor(k / 26) - 1) + letter(k % 26);
}
