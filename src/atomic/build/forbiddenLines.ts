import type { LevelIndex } from './assembleLevels.ts';
import type { IonEntry, LevelEntry, LineEntry } from './assembly.ts';
import { ritzWavelength } from './assembly.ts';
import { type CsvTable, numberIn } from './csvTable.ts';
import { estimatedCollisions } from './estimatedCollisions.ts';
import { type AtomAtTe, equilibrium } from './populations.ts';

/** The reference nebula: density cm^-3 (middle, in the logarithm, of 10^3 and 10^4). */
const REFERENCE_NE = 3_000;
/** Electron temperature, K, where helium is at most singly ionized, and where ions made above He+ live (He++ zones of nebulae, shells and shocks are hotter). */
const REFERENCE_TE = 10_000;
const HOT_REFERENCE_TE = 15_000;
const HELIUM_PLUS_EV = 54.4;
/** 4 pi j(H beta) / (ne np), erg cm^3 s^-1, case B at 10^4 K and 10^4 cm^-3: Storey & Hummer 1995. */
const H_BETA_EMISSIVITY = 1.239e-25;
/** h c, erg cm (CODATA 2018, exact constants). */
const HC_ERG_CM = 1.986_445_857e-16;
/** Lines fainter than this share of the ion's strongest - of those short of `INFRARED`, or of those beyond - are left out. */
const FAINTEST_SHARE = 1e-4;
/** Vacuum Angstrom: fine-structure lines beyond outshine everything else and must not set the limit for the optical. */
const INFRARED = 25_000;
/** Other gas than the reference (temperature as a factor, density in cm^-3): how far a strength moves within the ion between these is two sigma. */
const OTHER_TE_FACTORS = [0.8, 1.4] as const;
const OTHER_NE = [200, 200_000] as const;
/** Scatter of published rates, and of the estimate of estimatedCollisions.ts. */
const RATES_ERR_DEX = 0.1;
const ESTIMATE_ERR_DEX = 0.5;
const SHORTEST = 900;
const LONGEST = 300_000;

const TEMPERATURES = [2_000, 3_000, 5_000, 7_500, 10_000, 12_500, 15_000, 20_000, 30_000];

/** Effective collision strength at a tabulated temperature, or the nearest temperature the source has. */
function upsilonAt(reference: number, table: CsvTable, row: Readonly<Record<string, string>>): number {
  const order = [...TEMPERATURES].sort((p, q) => Math.abs(Math.log(p / reference)) - Math.abs(Math.log(q / reference)));
  for (const te of order) {
    const value = numberIn(table, row, `upsilon_${te}`);
    if (value > 0) return value;
  }
  return 0;
}

function weight(level: LevelEntry): number {
  const [top, bottom] = level.j.split('/').map(Number);
  return (2 * top) / (bottom ?? 1) + 1;
}

interface IonRates extends AtomAtTe {
  /** Reference temperature of the ion, K. */
  readonly te: number;
  /** Upper levels whose collisions are estimated. */
  readonly estimated: ReadonlySet<number>;
  readonly decays: readonly {
    readonly lower: number;
    readonly upper: number;
    readonly a: number;
    readonly check: number;
    readonly source: string;
  }[];
}

function ratesOf(ion: string, te: number, own: readonly LevelEntry[], a: CsvTable, upsilon: CsvTable): IonRates {
  const rowsOf = (table: CsvTable) => table.rows.filter((row) => row['ion'] === ion);
  const pair = (table: CsvTable, row: Readonly<Record<string, string>>) => ({
    lower: numberIn(table, row, 'lower'),
    upper: numberIn(table, row, 'upper'),
  });
  const decays = rowsOf(a).map((row) => ({
    ...pair(a, row),
    a: numberIn(a, row, 'a_s1'),
    check: numberIn(a, row, 'a_check_s1'),
    source: row['source'],
  }));
  const tabulated = rowsOf(upsilon).map((row) => ({ ...pair(upsilon, row), upsilon: upsilonAt(te, upsilon, row) }));
  const g = own.map(weight);
  const estimates = estimatedCollisions(own, g, tabulated);
  return {
    te,
    g,
    energyCm1: own.map((level) => level.energyCm1),
    radiative: decays,
    decays,
    collisions: [...tabulated, ...estimates],
    estimated: new Set(estimates.map((c) => c.upper)),
  };
}

/** log10 of the emissivities of all decays at one temperature and density, relative to the largest short of `INFRARED` (or of all). */
function relativeEmissivities(atom: IonRates, te: number, ne: number, reference: number): number[] {
  const population = equilibrium(atom, te, ne);
  const logs = atom.decays.map((d) =>
    Math.log10(Math.max(1e-99, population[d.upper] * d.a * (atom.energyCm1[d.upper] - atom.energyCm1[d.lower]))),
  );
  return logs.map((value) => value - logs[reference]);
}

/** Half of how far each line moves against the ion's strongest when temperature or density is another, dex. */
function scatterOfGas(atom: IonRates, reference: number): number[] {
  const spread = (one: readonly number[], other: readonly number[]): number[] => one.map((value, i) => Math.abs(value - other[i]) / 2);
  const te = spread(
    relativeEmissivities(atom, OTHER_TE_FACTORS[0] * atom.te, REFERENCE_NE, reference),
    relativeEmissivities(atom, OTHER_TE_FACTORS[1] * atom.te, REFERENCE_NE, reference),
  );
  const ne = spread(
    relativeEmissivities(atom, atom.te, OTHER_NE[0], reference),
    relativeEmissivities(atom, atom.te, OTHER_NE[1], reference),
  );
  return te.map((value, i) => Math.hypot(value, ne[i]));
}

export interface ForbiddenTables {
  readonly a: CsvTable;
  readonly upsilon: CsvTable;
  /** `nebular-wavelengths.csv` */
  readonly wavelengths: CsvTable;
  /** `strengths-from-spectra.csv`: sets one line of an upper level; the others of the level follow by branching. */
  readonly strengths: CsvTable;
}

function rowFor(table: CsvTable, ion: string, lower: number, upper: number): Readonly<Record<string, string>> | undefined {
  return table.rows.find((row) => row['ion'] === ion && Number(row['lower']) === lower && Number(row['upper']) === upper);
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
    const te = ion.creationEv > HELIUM_PLUS_EV ? HOT_REFERENCE_TE : REFERENCE_TE;
    const atom = ratesOf(ion.name, te, own, tables.a, tables.upsilon);
    return atom.decays.length === 0 ? [] : linesOfIon(ion, ionNumber, own, levels, atom, tables, taken);
  });
}

function linesOfIon(
  ion: IonEntry,
  ionNumber: number,
  own: readonly LevelEntry[],
  levels: LevelIndex,
  atom: IonRates,
  tables: ForbiddenTables,
  taken: ReadonlySet<string>,
): LineEntry[] {
  const population = equilibrium(atom, atom.te, REFERENCE_NE);
  const ritz = atom.decays.map((d) => ritzWavelength(own[d.lower], own[d.upper]));
  const seen = ritz.map((w) => w >= SHORTEST && w <= LONGEST);
  const strength = atom.decays.map((d, i) => {
    const emissivity = (population[d.upper] * d.a * HC_ERG_CM) / (ritz[i] * 1e-8) / REFERENCE_NE;
    return (100 * ion.abundance * emissivity) / H_BETA_EMISSIVITY;
  });
  const anchored = new Map<number, { readonly factor: number; readonly errDex: number; readonly source: string }>();
  for (const row of tables.strengths.rows.filter((r) => r['ion'] === ion.name)) {
    const i = atom.decays.findIndex((d) => d.lower === Number(row['lower']) && d.upper === Number(row['upper']));
    if (i < 0) throw new Error(`${tables.strengths.name}: ${ion.name} has no decay ${row['upper']}-${row['lower']}`);
    anchored.set(atom.decays[i].upper, {
      factor: numberIn(tables.strengths, row, 'strength') / strength[i],
      errDex: numberIn(tables.strengths, row, 'strength_err_dex'),
      source: row['source'],
    });
  }
  // levels without an anchor share the typical factor of the ion's anchors, so that the ion stays in proportion
  const factors = [...anchored.values()].map((f) => f.factor).sort((p, q) => p - q);
  const common = factors.length > 0 ? factors[factors.length >> 1] : 1;
  atom.decays.forEach((d, i) => {
    strength[i] *= anchored.get(d.upper)?.factor ?? common;
  });
  const strongest = (among: (i: number) => boolean): number =>
    strength.reduce((best, s, i) => (among(i) && s > (strength[best] ?? -1) ? i : best), -1);
  const optical = strongest((i) => seen[i] && ritz[i] < INFRARED);
  const infrared = strongest((i) => seen[i] && ritz[i] >= INFRARED);
  const reference = optical >= 0 ? optical : infrared;
  if (reference < 0) return [];
  const scatter = scatterOfGas(atom, reference);
  const nLevel = atom.te === HOT_REFERENCE_TE ? 'n-level-15kk' : 'n-level';
  return atom.decays.flatMap((d, i): LineEntry[] => {
    const lower = levels.modelRow(ion.name, d.lower);
    const upper = levels.modelRow(ion.name, d.upper);
    const limit = FAINTEST_SHARE * strength[ritz[i] < INFRARED ? optical : infrared];
    if (!seen[i] || strength[i] < limit || taken.has(`${lower}-${upper}`)) return [];
    const given = rowFor(tables.wavelengths, ion.name, d.lower, d.upper);
    const anchor = anchored.get(d.upper);
    const estimated = anchor !== undefined || atom.estimated.has(d.upper);
    const energyErr = Math.hypot(own[d.lower].energyErrCm1, own[d.upper].energyErrCm1);
    return [
      {
        ion: ionNumber,
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
        strengthErrDex: Math.min(2, Math.hypot(anchor?.errDex ?? (estimated ? ESTIMATE_ERR_DEX : RATES_ERR_DEX), scatter[i])),
        mechanism: 'collisional',
        basis: estimated ? 'estimate' : 'computed',
        strengthSource: anchor ? `strength-anchored+${anchor.source}` : estimated ? `${nLevel}+upsilon-estimate` : nLevel,
        source: own[d.upper].source === d.source ? d.source : `${own[d.upper].source}+${d.source}`,
        name: '',
      },
    ];
  });
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
export function natureOf(lower: LevelEntry, upper: LevelEntry): 'permitted' | 'intercombination' | 'forbidden' {
  const odd = (level: LevelEntry): boolean => /o$|\*$/.test(level.term);
  if (odd(lower) === odd(upper)) return 'forbidden';
  const [jl, ju] = [weight(lower), weight(upper)];
  if (Math.abs(jl - ju) > 2 || (jl === 1 && ju === 1)) return 'forbidden';
  return multiplicity(lower.term) === multiplicity(upper.term) ? 'permitted' : 'intercombination';
}
