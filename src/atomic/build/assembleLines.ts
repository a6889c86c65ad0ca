import { MECHANISMS, NATURES, STRENGTH_BASES } from '../bundleFormat.ts';
import type { LevelIndex } from './assembleLevels.ts';
import type { IonEntry, LineEntry } from './assembly.ts';
import { type CsvTable, numberIn } from './csvTable.ts';

function oneOf<T extends string>(allowed: readonly T[], value: string, where: string): T {
  const found = allowed.find((a) => a === value);
  if (found === undefined) throw new Error(`${where}: ${value} is none of ${allowed.join(', ')}`);
  return found;
}

/** What the classes of NIST ASD promise. */
const ACCURACY: Readonly<Record<string, string>> = {
  AAA: '0.3 %',
  AA: '1 %',
  'A+': '2 %',
  A: '3 %',
  'B+': '7 %',
  B: '10 %',
  'C+': '18 %',
  C: '25 %',
  'D+': '40 %',
  D: '50 %',
  E: 'more than 50 %',
};

function accuracyNote(accuracy: string, where: string): string {
  if (accuracy === '') return '';
  if (accuracy === 'exact') return 'exact hydrogenic value';
  if (accuracy === 'memory') return 'from memory';
  if (accuracy === 'calculated') return 'calculated, accuracy not stated';
  if (accuracy === 'coulomb') return 'Coulomb approximation, no published value';
  // a prime beside the letter does not change what the class promises
  const within = ACCURACY[accuracy.replace(/'$/, '')];
  if (within === undefined) throw new Error(`${where}: accuracy ${accuracy} is no class of NIST ASD`);
  return `NIST accuracy class ${accuracy}: ${within}`;
}

/** Lines of one family table (`lines-*.csv`). */
export function assembleFamily(ions: readonly IonEntry[], levels: LevelIndex, table: CsvTable): LineEntry[] {
  const ionIndex = new Map(ions.map((ion, i) => [ion.name, i]));
  return table.rows.map((row) => {
    const ion = ionIndex.get(row['ion']);
    if (ion === undefined) throw new Error(`${table.name}: ion ${row['ion']} is not in ions.csv`);
    const where = `${table.name}: ${row['ion']} ${row['lower']}-${row['upper']}`;
    const strength = numberIn(table, row, 'strength');
    const known = strength > 0;
    return {
      ion,
      lower: levels.row(row['ion'], numberIn(table, row, 'lower')),
      upper: levels.row(row['ion'], numberIn(table, row, 'upper')),
      givenVac: numberIn(table, row, 'wavelength_vac'),
      wavelengthErr: numberIn(table, row, 'wavelength_err'),
      wavelengthSource: row['wavelength_source'],
      a: numberIn(table, row, 'a_s1'),
      aNote: accuracyNote(row['a_accuracy'], where),
      moore: row['multiplet'],
      nature: oneOf(NATURES, row['nature'], where),
      strength: known ? strength : Number.NaN,
      strengthErrDex: known ? numberIn(table, row, 'strength_err_dex') : Number.NaN,
      mechanism: oneOf(MECHANISMS, row['mechanism'] || 'recombination', where),
      basis: known ? oneOf(STRENGTH_BASES, row['strength_basis'], where) : 'unknown',
      strengthSource: known ? row['strength_source'] : 'none',
      source: row['source'],
      name: row['name'],
    };
  });
}

/** Narrow lines of the sky, of lamps and of interstellar gas, in the observer's frame; their carriers are added to the ions. */
export function assembleSky(ions: IonEntry[], table: CsvTable): LineEntry[] {
  const carriers = new Map<string, number>();
  const carrier = (name: string): number => {
    let index = carriers.get(name);
    if (index === undefined) {
      index = ions.length;
      carriers.set(name, index);
      const known = ions.find((ion) => ion.name === name);
      ions.push({
        name,
        element: known?.element ?? name,
        charge: known?.charge ?? 0,
        creationEv: 0,
        ionizationEv: known?.ionizationEv ?? 0,
        abundance: 0,
      });
    }
    return index;
  };
  const lines: LineEntry[] = [];
  for (const row of table.rows) {
    if (row['end_vac'] !== '') continue;
    const intensity = numberIn(table, row, 'relative_intensity');
    lines.push({
      ion: carrier(row['species']),
      lower: -1,
      upper: -1,
      givenVac: numberIn(table, row, 'wavelength_vac'),
      wavelengthErr: row['species'] === 'DIB' ? 0.1 : 0.01,
      wavelengthSource: row['source'],
      a: Number.NaN,
      aNote: '',
      moore: '',
      nature: row['kind'] === 'interstellar' ? 'interstellar' : row['kind'] === 'telluric' ? 'telluric' : 'sky',
      strength: intensity > 0 ? intensity : Number.NaN,
      strengthErrDex: 0.3,
      mechanism: 'fluorescence',
      basis: intensity > 0 ? 'published' : 'unknown',
      strengthSource: intensity > 0 ? row['source'] : 'none',
      source: row['source'],
      name: [row['kind'] === 'lamp' ? 'lamp' : '', row['transition'], row['note']].filter((t) => t !== '').join('; '),
    });
  }
  return lines;
}
