import type { IonEntry, LevelEntry } from './assembly.ts';
import { type CsvTable, numberIn } from './csvTable.ts';

/** Ions of `ions.csv` in its order (atomic number, charge). */
export function assembleIons(table: CsvTable): IonEntry[] {
  return table.rows.map((row) => ({
    name: row['ion'],
    element: row['element'],
    charge: numberIn(table, row, 'charge'),
    creationEv: numberIn(table, row, 'creation_ev'),
    ionizationEv: numberIn(table, row, 'ionization_ev'),
    abundance:
      10 ** (numberIn(table, row, 'log_abundance') - 12 + numberIn(table, row, 'depletion_dex')) * numberIn(table, row, 'ion_fraction'),
  }));
}

export interface LevelIndex {
  readonly levels: LevelEntry[];
  /** Row of a level of an n-level atom: ion name and level number, 0 = ground. */
  readonly modelRow: (ion: string, level: number) => number;
  /** Row of a level of `levels.csv`: ion name and its number there. */
  readonly row: (ion: string, level: number) => number;
}

function halves(j: number): string {
  return Number.isInteger(j) ? String(j) : `${2 * j}/2`;
}

/** Levels of the n-level atoms first, then those of the line families; a level that stands in both points to the first. */
export function assembleLevels(ions: readonly IonEntry[], model: CsvTable, others: CsvTable): LevelIndex {
  const ionIndex = new Map(ions.map((ion, i) => [ion.name, i]));
  const levels: LevelEntry[] = [];
  const byKey = new Map<string, number>();
  const find = (kind: string, ion: string, level: number): number => {
    const found = byKey.get(`${kind} ${ion} ${level}`);
    if (found === undefined) throw new Error(`${ion}: no level ${level} in ${kind}`);
    return found;
  };
  const add = (
    table: CsvTable,
    row: Readonly<Record<string, string>>,
    kind: string,
    more: Pick<LevelEntry, 'j' | 'energyErrCm1' | 'modelLevel' | 'canonical'>,
  ): void => {
    const ion = ionIndex.get(row['ion']);
    if (ion === undefined) throw new Error(`${table.name}: ion ${row['ion']} is not in ions.csv`);
    const key = `${kind} ${row['ion']} ${row['level']}`;
    if (byKey.has(key)) throw new Error(`${table.name}: ${key} stands twice`);
    byKey.set(key, levels.length);
    levels.push({
      ion,
      configuration: row['configuration'],
      term: row['term'],
      energyCm1: numberIn(table, row, 'energy_cm1'),
      source: row['source'],
      ...more,
    });
  };
  for (const row of model.rows) {
    const level = numberIn(model, row, 'level');
    const before = levels.at(-1);
    if (level > 0 && (before === undefined || before.modelLevel !== level - 1 || before.energyCm1 > Number(row['energy_cm1'])))
      throw new Error(`${model.name}: levels of ${row['ion']} are not in order of energy`);
    add(model, row, 'model', {
      j: halves(numberIn(model, row, 'j')),
      energyErrCm1: numberIn(model, row, 'energy_err_cm1'),
      modelLevel: level,
      canonical: levels.length,
    });
  }
  for (const row of others.rows) {
    const modelLevel = row['model_level'] === '' ? -1 : numberIn(others, row, 'model_level');
    add(others, row, 'other', {
      j: row['j'],
      energyErrCm1: Number.NaN,
      modelLevel,
      canonical: modelLevel < 0 ? levels.length : find('model', row['ion'], modelLevel),
    });
  }
  return { levels, modelRow: (ion, level) => find('model', ion, level), row: (ion, level) => find('other', ion, level) };
}
