import { type LimitRow, limitsOf } from '../engine/index.ts';
import { ProblemError, wordProblem } from '../problems/index.ts';
import { parseArguments, UsageError } from './arguments.ts';
import { openAtomicData } from './files.ts';

const DEFAULT_TE = 10_000;
const DEFAULT_NE = 1_000;
const COLUMNS = 'ion,wavelength_air,wavelength_vac,lower,upper,a_value,lifetime_s,n_crit,survival,note';

/** Prints lifetimes, critical densities and survival of the thin-gas lines of each ion, as CSV. */
export async function limits(args: readonly string[]): Promise<number> {
  try {
    const { words, te = DEFAULT_TE, ne = DEFAULT_NE } = parseArguments(args);
    if (words.length === 0) throw new UsageError('no ion was named, e.g. limits "O III"');
    const data = openAtomicData();
    process.stdout.write(`# Te = ${te} K, ne = ${ne} cm^-3; n_crit counts collisions to all other levels, up and down\n${COLUMNS}\n`);
    let failures = 0;
    for (const ion of joinStages(words)) {
      try {
        const rows = limitsOf(data, ion, te, ne);
        if (rows.length === 0) process.stderr.write(`linewright: ${ion} has no thin-gas line in the list\n`);
        for (const row of rows) process.stdout.write(`${csvRow(row)}\n`);
      } catch (error) {
        if (!(error instanceof ProblemError)) throw error;
        process.stderr.write(`linewright: ${wordProblem(error.problem)}\n`);
        failures++;
      }
    }
    return failures > 0 ? 1 : 0;
  } catch (error) {
    if (!(error instanceof UsageError)) throw error;
    process.stderr.write(`linewright: ${error.message}\n`);
    return 2;
  }
}

/** `limits O III S II` without quotes means two ions, not four words. */
function joinStages(words: readonly string[]): string[] {
  const ions: string[] = [];
  for (const word of words) {
    if (/^[IVXL]+\]?$/i.test(word) && ions.length > 0 && !/\s/.test(ions[ions.length - 1])) ions[ions.length - 1] += ` ${word}`;
    else ions.push(word);
  }
  return ions;
}

function csvRow(row: LimitRow): string {
  const number = (value: number | undefined) => (value !== undefined && Number.isFinite(value) ? String(Number(value.toPrecision(4))) : '');
  const note = row.insideRange ? '' : 'collision strengths held at the end of their temperatures';
  return [
    row.ion,
    row.wavelengthAir.toFixed(3),
    row.wavelengthVac.toFixed(3),
    row.lower,
    row.upper,
    number(row.aValue),
    number(row.lifetimeS),
    number(row.nCrit),
    number(row.survival),
    note,
  ].join(',');
}
