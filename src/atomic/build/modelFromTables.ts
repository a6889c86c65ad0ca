import { type LevelModel, UPSILON_TE } from '../levelModel.ts';
import { jOf, type LevelEntry } from './assembly.ts';
import { type CsvTable, numberIn } from './csvTable.ts';
import { estimatedCollisions } from './estimatedCollisions.ts';

export interface Decay {
  readonly lower: number;
  readonly upper: number;
  /** s^-1 */
  readonly a: number;
  /** The same from the compilation not chosen; NaN = it has none. */
  readonly check: number;
  readonly source: string;
}

/** An n-level atom as the build sees it: gaps in the collisions filled by estimates. */
export interface TableModel {
  readonly model: LevelModel;
  readonly decays: readonly Decay[];
  /** Upper levels whose collisions are estimates. */
  readonly estimated: ReadonlySet<number>;
}

/**
 * @param own the ion's levels, ground first
 * @param a   `model-a.csv`
 * @param upsilon `model-upsilon.csv`
 */
export function modelFromTables(ion: string, own: readonly LevelEntry[], a: CsvTable, upsilon: CsvTable): TableModel {
  const rowsOf = (table: CsvTable) => table.rows.filter((row) => row['ion'] === ion);
  const decays = rowsOf(a).map((row) => ({
    lower: numberIn(a, row, 'lower'),
    upper: numberIn(a, row, 'upper'),
    a: numberIn(a, row, 'a_s1'),
    check: numberIn(a, row, 'a_check_s1'),
    source: row['source'],
  }));
  const tabulated = rowsOf(upsilon).map((row) => ({
    lower: numberIn(upsilon, row, 'lower'),
    upper: numberIn(upsilon, row, 'upper'),
    upsilon: UPSILON_TE.map((te) => numberIn(upsilon, row, `upsilon_${te}`)),
  }));
  const reached = new Set(tabulated.filter((c) => c.upsilon.some((value) => value > 0)).map((c) => c.upper));
  const estimates = estimatedCollisions(own, reached).map((c) => ({ ...c, upsilon: UPSILON_TE.map(() => c.upsilon) }));
  const collisions = [...tabulated, ...estimates];
  return {
    decays,
    estimated: new Set(estimates.map((c) => c.upper)),
    model: {
      ion,
      levels: own.map((level) => ({
        configuration: level.configuration,
        term: level.term,
        j: jOf(level),
        energyCm1: level.energyCm1,
        energyErrCm1: level.energyErrCm1,
        parity: level.term.endsWith('o') ? 'odd' : 'even',
      })),
      radiative: {
        lower: Uint8Array.from(decays, (d) => d.lower),
        upper: Uint8Array.from(decays, (d) => d.upper),
        a: Float64Array.from(decays, (d) => d.a),
      },
      collisions: {
        lower: Uint8Array.from(collisions, (c) => c.lower),
        upper: Uint8Array.from(collisions, (c) => c.upper),
        upsilon: Float32Array.from(collisions.flatMap((c) => c.upsilon)),
        teLow: new Float32Array(collisions.length).fill(Number.NaN),
        teHigh: new Float32Array(collisions.length).fill(Number.NaN),
      },
      sources: { energies: [], radiative: [], collisions: [] },
    },
  };
}
