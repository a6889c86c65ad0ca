import { LOG_UPSILON_SCALE, UNKNOWN_16 } from '../bundleFormat.ts';
import type { LevelIndex } from './assembleLevels.ts';
import type { IonEntry, LevelEntry } from './assembly.ts';
import type { Bibliography } from './bibliography.ts';
import { type CsvTable, numberIn } from './csvTable.ts';
import { logFixed } from './logFixed.ts';
import type { Section } from './packBundle.ts';
import type { TextPool } from './textPool.ts';

/** Sections of all levels. */
export function levelSections(levels: readonly LevelEntry[], texts: TextPool): Record<string, Section> {
  return {
    'level.energy': { type: 'f64', values: levels.map((l) => l.energyCm1) },
    'level.energyErr': { type: 'f32', values: levels.filter((l, k) => l.canonical === k && l.modelLevel >= 0).map((l) => l.energyErrCm1) },
    'level.configuration': { type: 'u16', values: levels.map((l) => texts.number(l.configuration)) },
    'level.term': { type: 'u16', values: levels.map((l) => texts.number(l.term)) },
    'level.j': { type: 'u16', values: levels.map((l) => texts.number(l.j)) },
    'level.canonical': { type: 'u16', values: levels.map((l) => l.canonical) },
    'level.model': { type: 'i16', values: levels.map((l) => l.modelLevel) },
  };
}

export interface ModelTables {
  readonly levels: CsvTable;
  readonly a: CsvTable;
  readonly upsilon: CsvTable;
  /** `model-papers.csv`: the papers behind each quantity of an ion. */
  readonly papers: CsvTable;
}

/** Sections of the n-level atoms, ion by ion. @throws Error when a rate points to no level or has no source */
export function modelSections(
  ions: readonly IonEntry[],
  levels: LevelIndex,
  { levels: model, a, upsilon, papers }: ModelTables,
  texts: TextPool,
  bib: Bibliography,
): Record<string, Section> {
  const names = [...new Set(model.rows.map((row) => row['ion']))];
  const count = (table: CsvTable, ion: string): number => table.rows.filter((row) => row['ion'] === ion).length;
  const cited = (table: CsvTable, quantity: string, ion: string): number => {
    const keys = table.rows.filter((row) => row['ion'] === ion).map((row) => row['source']);
    if (keys.length === 0) return 0;
    keys.push(...papers.rows.filter((row) => row['ion'] === ion && row['quantity'] === quantity).map((row) => row['source']));
    return texts.number([...new Set(keys.flatMap((key) => bib.citations(key, `${table.name}: ${ion}`)))].join('\t'));
  };
  const te = upsilon.columns.filter((c) => c.startsWith('upsilon_'));
  const check = (table: CsvTable): void => {
    for (const row of table.rows) {
      levels.modelRow(row['ion'], Number(row['lower']));
      levels.modelRow(row['ion'], Number(row['upper']));
      bib.citations(row['source'], `${table.name}: ${row['ion']} ${row['lower']}-${row['upper']}`);
    }
  };
  check(a);
  check(upsilon);
  const ofIons = (table: CsvTable, column: string): number[] =>
    names.flatMap((ion) => table.rows.filter((row) => row['ion'] === ion).map((row) => numberIn(table, row, column)));
  return {
    'model.ion': { type: 'u16', values: names.map((name) => ions.findIndex((ion) => ion.name === name)) },
    'model.levels': { type: 'u8', values: names.map((ion) => count(model, ion)) },
    'model.decays': { type: 'u16', values: names.map((ion) => count(a, ion)) },
    'model.collisions': { type: 'u16', values: names.map((ion) => count(upsilon, ion)) },
    'model.energySources': { type: 'u16', values: names.map((ion) => cited(model, 'energies', ion)) },
    'model.aSources': { type: 'u16', values: names.map((ion) => cited(a, 'radiative', ion)) },
    'model.upsilonSources': { type: 'u16', values: names.map((ion) => cited(upsilon, 'collisions', ion)) },
    'a.lower': { type: 'u8', values: ofIons(a, 'lower') },
    'a.upper': { type: 'u8', values: ofIons(a, 'upper') },
    'a.value': { type: 'f32', values: ofIons(a, 'a_s1') },
    'upsilon.lower': { type: 'u8', values: ofIons(upsilon, 'lower') },
    'upsilon.upper': { type: 'u8', values: ofIons(upsilon, 'upper') },
    'upsilon.teLow': { type: 'f32', values: ofIons(upsilon, 'te_low_k') },
    'upsilon.teHigh': { type: 'f32', values: ofIons(upsilon, 'te_high_k') },
    // temperature by temperature, as differences from the one before: compresses to half
    'upsilon.log': {
      type: 'i16',
      values: te.flatMap((column, k) => {
        const now = ofIons(upsilon, column).map((v) => logFixed(v, LOG_UPSILON_SCALE));
        const before = k === 0 ? now.map(() => 0) : ofIons(upsilon, te[k - 1]).map((v) => logFixed(v, LOG_UPSILON_SCALE));
        return now.map((v, i) => (v === UNKNOWN_16 ? UNKNOWN_16 : v - (before[i] === UNKNOWN_16 ? 0 : before[i])));
      }),
    },
  };
}
