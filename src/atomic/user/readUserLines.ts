import { nearestWord, type Place, type Problem, type Remark } from '../../problems/index.ts';
import { vacuumFromAir } from '../../units/index.ts';
import type { LineList } from '../lineList.ts';
import { linesBetween } from '../linesBetween.ts';
import { csvRows } from './csvRows.ts';
import { readIonName } from './readIonName.ts';
import type { UserLine, UserLinesReading } from './userLine.ts';

const COLUMNS = [
  'ion',
  'wavelength',
  'medium',
  'wavelength_air',
  'wavelength_vac',
  'uncertainty',
  'nature',
  'strength',
  'lower',
  'upper',
] as const;
type ColumnName = (typeof COLUMNS)[number];
const NATURES: readonly UserLine['nature'][] = ['permitted', 'intercombination', 'forbidden'];
/** Angstrom: X-rays and radio waves are in other units than Angstrom, so a value outside is a slip. */
const SHORTEST_A = 100;
const LONGEST_A = 1e7;
/** A line of the list and one of the user that lie nearer are taken for the same, relative to the wavelength (6 km/s). */
const SAME_PLACE = 2e-5;
/** As many problems are listed; of more only the number is told. */
const MOST_PROBLEMS = 100;

/**
 * Reads the user's own lines from a CSV text with named columns, in any order: `ion`; `wavelength` with `medium` (air or vacuum), or `wavelength_air`, or
 * `wavelength_vac` (Angstrom); optional `uncertainty` (Angstrom, one sigma), `nature` (permitted, intercombination, forbidden), `strength` (H beta = 100), `lower`, `upper`.
 *
 * @param file  name for the places of problems
 * @param known the bundled list: an ion's line that stands there already is told in a remark
 * @returns all lines, or a problem for every bad row and no line at all
 */
export function readUserLines(text: string, file: string, known: LineList): UserLinesReading {
  const split = csvRows(text);
  if ('unclosedQuote' in split)
    return refused([
      problem('unclosed-quote', { file, line: split.unclosedQuote }, 'a quotation mark that is never closed', 'Close it or take it out.'),
    ]);
  const [head, ...body] = split.rows;
  if (head === undefined || body.length === 0)
    return refused([
      problem('no-lines', { file }, 'no rows of lines', `Write a row of column names (${COLUMNS.join(', ')}) and a row for every line.`),
    ]);
  const names = head.cells.map((name) => name.toLowerCase());
  const headProblems = problemsOfHead(names, { file, line: head.line });
  if (headProblems.length > 0) return refused(headProblems);
  const problems: Problem[] = [];
  const remarks: Remark[] = [];
  const lines: UserLine[] = [];
  for (const row of body) {
    const place = { file, line: row.line };
    const before = problems.length;
    if (row.cells.length !== names.length) {
      const found = `${row.cells.length} cells, but ${names.length} columns`;
      problems.push(problem('wrong-number-of-cells', place, found, 'Give every column a cell, empty where nothing is known.'));
      continue;
    }
    const cell = (column: ColumnName): string => row.cells[names.indexOf(column)] ?? '';
    const line = readRow(cell, place, problems);
    if (problems.length > before || line === undefined) continue;
    lines.push(line);
    remarks.push(...remarksOf(line, cell, place, known));
  }
  return problems.length > 0 ? refused(problems) : { ended: 'read', lines, remarks };
}

function refused(problems: readonly Problem[]): UserLinesReading {
  if (problems.length <= MOST_PROBLEMS) return { ended: 'refused', problems };
  const more = problem('more-problems', {}, `${problems.length - MOST_PROBLEMS} more rows like these`, 'Mend these first.');
  return { ended: 'refused', problems: [...problems.slice(0, MOST_PROBLEMS), more] };
}

const problem = (code: string, where: Place, found: string, doThis?: string): Problem => ({
  code,
  where,
  found,
  ...(doThis ? { doThis } : {}),
});

function problemsOfHead(names: readonly string[], place: Place): Problem[] {
  const problems: Problem[] = [];
  for (const [k, name] of names.entries()) {
    if (!COLUMNS.some((column) => column === name)) {
      const near = nearestWord(name, COLUMNS);
      problems.push(
        problem(
          'unknown-column',
          { ...place, column: name || k + 1 },
          `a column '${name}'`,
          near ? `Did you mean ${near}?` : `Known are ${COLUMNS.join(', ')}.`,
        ),
      );
    } else if (names.indexOf(name) !== k)
      problems.push(problem('column-twice', { ...place, column: name }, `two columns '${name}'`, 'Keep one.'));
  }
  if (!names.includes('ion')) problems.push(problem('no-ion-column', place, "no column 'ion'", 'Name the column of ions `ion`.'));
  const wavelengths = (['wavelength', 'wavelength_air', 'wavelength_vac'] as const).filter((name) => names.includes(name));
  if (wavelengths.length === 0)
    problems.push(
      problem('no-wavelength-column', place, 'no column of wavelengths', 'Name it wavelength_air or wavelength_vac, in Angstrom.'),
    );
  if (names.includes('wavelength') && !names.includes('medium'))
    problems.push(
      problem(
        'no-medium-column',
        place,
        "a column 'wavelength' without a column 'medium'",
        'Name it wavelength_air or wavelength_vac, or add `medium` with air or vacuum.',
      ),
    );
  return problems;
}

type Cell = (column: ColumnName) => string;

function readRow(cell: Cell, place: Place, problems: Problem[]): UserLine | undefined {
  const wrong = (code: string, column: ColumnName, found: string, doThis: string) =>
    problems.push(problem(code, { ...place, column }, found, doThis));
  const name = readIonName(cell('ion'));
  if (name.ended === 'wrong') wrong('no-such-ion', 'ion', name.found, name.doThis);
  const wavelength = readWavelength(cell, wrong);
  const uncertainty = readPositive(cell, 'uncertainty', wrong);
  const strength = readPositive(cell, 'strength', wrong);
  const nature = cell('nature').toLowerCase();
  const known = NATURES.find((n) => n === nature);
  const bracketed = name.ended === 'read' ? name.nature : undefined;
  if (nature !== '' && known === undefined) {
    const near = nearestWord(nature, NATURES);
    wrong('no-such-nature', 'nature', `'${cell('nature')}'`, near ? `Did you mean ${near}?` : `Write ${NATURES.join(', ')} or nothing.`);
  } else if (known !== undefined && bracketed !== undefined && known !== bracketed)
    wrong(
      'nature-against-brackets',
      'nature',
      `'${cell('ion')}' is written as ${bracketed}, but the nature says ${known}`,
      'Mend the one that is wrong.',
    );
  if (name.ended === 'wrong' || wavelength === undefined) return undefined;
  return {
    ion: name.ion,
    element: name.element,
    charge: name.charge,
    wavelengthVac: wavelength.vacuum,
    wavelengthErr: uncertainty ?? wavelength.lastDigit / 2,
    nature: known ?? bracketed ?? 'permitted',
    ...(strength === undefined ? {} : { strength }),
    lower: cell('lower'),
    upper: cell('upper'),
    source: `${place.file}, line ${place.line}`,
  };
}

type Wrong = (code: string, column: ColumnName, found: string, doThis: string) => void;

/** Vacuum Angstrom, and one unit of the last digit that was written. */
function readWavelength(cell: Cell, wrong: Wrong): { vacuum: number; lastDigit: number } | undefined {
  const given = (['wavelength_vac', 'wavelength_air', 'wavelength'] as const).filter((column) => cell(column) !== '');
  if (given.length !== 1) {
    if (given.length === 0) wrong('no-wavelength', 'wavelength', 'no wavelength', 'Write it in Angstrom.');
    else wrong('two-wavelengths', given[1], `a wavelength in ${given.join(' and in ')}`, 'Keep the one that is known better.');
    return undefined;
  }
  const [column] = given;
  const text = cell(column);
  const value = readNumber(text);
  const medium = column === 'wavelength' ? cell('medium').toLowerCase() : column === 'wavelength_air' ? 'air' : 'vacuum';
  const mediumKnown = /^(air|vac|vacuum)$/.test(medium);
  if (!mediumKnown) wrong('no-medium', 'medium', medium === '' ? 'no medium' : `'${cell('medium')}'`, 'Write air or vacuum.');
  if (!(value >= SHORTEST_A && value <= LONGEST_A)) {
    wrong('wavelength-out-of-range', column, `'${text}'`, `Write a number between ${SHORTEST_A} and ${LONGEST_A}, in Angstrom.`);
    return undefined;
  }
  if (!mediumKnown) return undefined;
  const decimals = /\.(\d*)/.exec(text)?.[1].length ?? 0;
  return { vacuum: medium === 'air' ? vacuumFromAir(value) : value, lastDigit: 10 ** -decimals };
}

const readNumber = (text: string) => (/^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(text) ? Number(text) : Number.NaN);

/** Absent when the cell is empty. */
function readPositive(cell: Cell, column: 'uncertainty' | 'strength', wrong: Wrong): number | undefined {
  const text = cell(column);
  if (text === '') return undefined;
  const value = readNumber(text);
  if (value > 0 && Number.isFinite(value)) return value;
  wrong(`wrong-${column}`, column, `'${text}'`, 'Write a number above 0, or nothing.');
  return undefined;
}

/** What was assumed for a line, and that the list has it already. */
function remarksOf(line: UserLine, cell: Cell, place: Place, known: LineList): Remark[] {
  const remarks: Remark[] = [];
  const note = (code: string, found: string, doThis?: string) => remarks.push({ ...problem(code, place, found, doThis), weight: 'note' });
  if (cell('uncertainty') === '')
    note('uncertainty-from-digits', `no uncertainty: ${line.wavelengthErr} A taken, half a unit of the last digit`);
  if (cell('nature') === '' && line.nature === 'permitted') note('nature-permitted', 'neither nature nor brackets: taken as permitted');
  const reach = SAME_PLACE * line.wavelengthVac;
  const [first, end] = linesBetween(known, line.wavelengthVac - reach, line.wavelengthVac + reach);
  for (let k = first; k < end; k++) {
    if (known.ions[known.ion[k]].name !== line.ion) continue;
    note('line-in-list', `${line.ion} has a line at ${known.wavelengthVac[k].toFixed(3)} A (vacuum) in the list already: both are kept`);
    break;
  }
  return remarks;
}
