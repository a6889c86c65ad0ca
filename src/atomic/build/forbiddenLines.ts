import type { LevelIndex } from './assembleLevels.ts';
import { type IonEntry, jOf, type LevelEntry, type LineEntry, ritzWavelength } from './assembly.ts';
import { type CsvTable, numberIn } from './csvTable.ts';
import { modelFromTables, type TableModel } from './modelFromTables.ts';
import { HOT_REFERENCE_TE, referenceStrengths, referenceTe, scatterOfGas } from './referenceNebula.ts';

/** Lines fainter than this share of the ion's strongest - of those short of `INFRARED`, or of those beyond - are left out. */
const FAINTEST_SHARE = 1e-4;
/** Vacuum Angstrom: fine-structure lines beyond outshine everything else and must not set the limit for the optical. */
const INFRARED = 25_000;
const SHORTEST = 900;
const LONGEST = 300_000;
/** Scatter of published rates, and of the estimates of estimatedCollisions.ts. */
const RATES_ERR_DEX = 0.1;
const ESTIMATE_ERR_DEX = 0.5;
const LARGEST_ERR_DEX = 2;

export interface ForbiddenTables {
  readonly a: CsvTable;
  readonly upsilon: CsvTable;
  /** `nebular-wavelengths.csv` */
  readonly wavelengths: CsvTable;
  /** `strengths-from-spectra.csv`: sets one line of an upper level; the others of the level follow by branching. */
  readonly strengths: CsvTable;
}

/**
 * Collisionally excited lines of all n-level atoms, with strengths from level populations in the reference nebula.
 *
 * @param taken `lower-upper` rows (canonical) that another family already holds
 */
export function forbiddenLines(
  ions: readonly IonEntry[],
  levels: LevelIndex,
  tables: ForbiddenTables,
  taken: ReadonlySet<string>,
): LineEntry[] {
  return ions.flatMap((ion, ionNumber) => {
    const own = levels.levels.filter((level, k) => level.ion === ionNumber && level.canonical === k && level.modelLevel >= 0);
    const atom = modelFromTables(ion.name, own, tables.a, tables.upsilon);
    return atom.decays.length === 0 ? [] : linesOfIon(ion, own, levels, atom, tables, taken);
  });
}

function linesOfIon(
  ion: IonEntry,
  own: readonly LevelEntry[],
  levels: LevelIndex,
  atom: TableModel,
  tables: ForbiddenTables,
  taken: ReadonlySet<string>,
): LineEntry[] {
  const ritz = atom.decays.map((d) => ritzWavelength(own[d.lower], own[d.upper]));
  const seen = ritz.map((w) => w >= SHORTEST && w <= LONGEST);
  const { strength, anchored } = anchoredStrengths(ion.name, referenceStrengths(ion, atom), atom, tables.strengths);
  const strongest = (among: (i: number) => boolean): number =>
    strength.reduce((best, s, i) => (among(i) && s > (strength[best] ?? -1) ? i : best), -1);
  const optical = strongest((i) => seen[i] && ritz[i] < INFRARED);
  const infrared = strongest((i) => seen[i] && ritz[i] >= INFRARED);
  if (optical < 0 && infrared < 0) return [];
  const scatter = scatterOfGas(ion, atom, optical >= 0 ? optical : infrared);
  const nLevel = referenceTe(ion) === HOT_REFERENCE_TE ? 'n-level-15kk' : 'n-level';
  return atom.decays.flatMap((d, i): LineEntry[] => {
    const lower = levels.modelRow(ion.name, d.lower);
    const upper = levels.modelRow(ion.name, d.upper);
    const limit = FAINTEST_SHARE * strength[ritz[i] < INFRARED ? optical : infrared];
    if (!seen[i] || strength[i] < limit || taken.has(`${lower}-${upper}`)) return [];
    const given = rowFor(tables.wavelengths, ion.name, d.lower, d.upper);
    const anchor = anchored.get(d.upper);
    const estimated = anchor !== undefined || atom.estimated.has(d.upper);
    const energyErr = Math.hypot(own[d.lower].energyErrCm1, own[d.upper].energyErrCm1);
    const ratesErr = anchor?.errDex ?? (estimated ? ESTIMATE_ERR_DEX : RATES_ERR_DEX);
    return [
      {
        ion: own[0].ion,
        lower,
        upper,
        givenVac: given ? numberIn(tables.wavelengths, given, 'wavelength_vac') : Number.NaN,
        wavelengthErr: given ? numberIn(tables.wavelengths, given, 'wavelength_err') : (energyErr * ritz[i] * ritz[i]) / 1e8,
        wavelengthSource: given ? given['source'] : 'ritz',
        a: d.a,
        aNote: checkNote(d.a, d.check),
        moore: '',
        nature: natureOf(own[d.lower], own[d.upper]),
        strength: strength[i],
        strengthErrDex: Math.min(LARGEST_ERR_DEX, Math.hypot(ratesErr, scatter[i])),
        mechanism: 'collisional',
        basis: estimated ? 'estimate' : 'computed',
        strengthSource: anchor ? `strength-anchored+${anchor.source}` : estimated ? `${nLevel}+upsilon-estimate` : nLevel,
        source: own[d.upper].source === d.source ? d.source : `${own[d.upper].source}+${d.source}`,
        name: '',
      },
    ];
  });
}

interface Anchor {
  readonly factor: number;
  readonly errDex: number;
  readonly source: string;
}

/** Strengths with the rows of `strengths-from-spectra.csv` applied; levels without a row share the ion's median factor, so that it stays in proportion. */
function anchoredStrengths(
  ion: string,
  computed: readonly number[],
  { decays }: TableModel,
  table: CsvTable,
): { readonly strength: number[]; readonly anchored: ReadonlyMap<number, Anchor> } {
  const anchored = new Map<number, Anchor>();
  for (const row of table.rows.filter((r) => r['ion'] === ion)) {
    const i = decays.findIndex((d) => d.lower === Number(row['lower']) && d.upper === Number(row['upper']));
    if (i < 0) throw new Error(`${table.name}: ${ion} has no decay ${row['upper']}-${row['lower']}`);
    anchored.set(decays[i].upper, {
      factor: numberIn(table, row, 'strength') / computed[i],
      errDex: numberIn(table, row, 'strength_err_dex'),
      source: row['source'],
    });
  }
  const factors = [...anchored.values()].map((anchor) => anchor.factor).sort((p, q) => p - q);
  const common = factors.length > 0 ? factors[factors.length >> 1] : 1;
  return { anchored, strength: computed.map((s, i) => s * (anchored.get(decays[i].upper)?.factor ?? common)) };
}

function rowFor(table: CsvTable, ion: string, lower: number, upper: number): Readonly<Record<string, string>> | undefined {
  return table.rows.find((row) => row['ion'] === ion && Number(row['lower']) === lower && Number(row['upper']) === upper);
}

/** How the compilation not chosen differs. */
function checkNote(a: number, check: number): string {
  if (Number.isNaN(check)) return 'one compilation only';
  const percent = Math.round((check / a - 1) * 100);
  if (percent === 0) return 'both compilations agree';
  return percent > 300
    ? `other compilation ${Math.round(check / a)} times as large`
    : `other compilation ${percent > 0 ? '+' : '-'}${Math.abs(percent)} %`;
}

/** Spin multiplicity of an LS term (`3Po` -> 3); NaN where the label has none. */
function multiplicity(term: string): number {
  const m = /(\d+)[A-Z]/.exec(term);
  return m ? Number(m[1]) : Number.NaN;
}

/** Same parity, |dJ| > 1 or 0-0: forbidden; parity change with a change of spin: intercombination; else permitted. */
function natureOf(lower: LevelEntry, upper: LevelEntry): 'permitted' | 'intercombination' | 'forbidden' {
  const odd = (level: LevelEntry): boolean => level.term.endsWith('o');
  if (odd(lower) === odd(upper)) return 'forbidden';
  const [jl, ju] = [jOf(lower), jOf(upper)];
  if (Math.abs(jl - ju) > 1 || (jl === 0 && ju === 0)) return 'forbidden';
  return multiplicity(lower.term) === multiplicity(upper.term) ? 'permitted' : 'intercombination';
}
