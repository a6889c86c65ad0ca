import type { LevelIndex } from './assembleLevels.ts';
import type { IonEntry, LevelEntry, LineEntry } from './assembly.ts';
import { ritzWavelength } from './assembly.ts';
import { type CsvTable, numberIn } from './csvTable.ts';
import { estimatedCollisions } from './estimatedCollisions.ts';
import { type AtomAtTe, equilibrium } from './populations.ts';

/** The reference nebula: electron temperature K, density cm^-3 (middle, in the logarithm, of 10^3 and 10^4). */
export const REFERENCE_TE = 10_000;
export const REFERENCE_NE = 3_000;
/** 4 pi j(H beta) / (ne np), erg cm^3 s^-1, case B at 10^4 K and 10^4 cm^-3: Storey & Hummer 1995. */
const H_BETA_EMISSIVITY = 1.239e-25;
/** h c, erg cm (CODATA 2018, exact constants). */
const HC_ERG_CM = 1.986_445_857e-16;
/** Lines fainter than this share of the ion's strongest are left out, unless they hold this share of their upper level's decays. */
const FAINTEST_SHARE = 1e-4;
const SHORTEST = 900;
const LONGEST = 300_000;

const TEMPERATURES = [2_000, 3_000, 5_000, 7_500, 10_000, 12_500, 15_000, 20_000, 30_000];

/** Effective collision strength at the reference temperature, or the nearest temperature the source has. */
function upsilonAtReference(table: CsvTable, row: Readonly<Record<string, string>>): number {
  const order = [10_000, 12_500, 7_500, 15_000, 5_000, 20_000, 30_000, 3_000, 2_000];
  for (const te of order) {
    if (!TEMPERATURES.includes(te)) continue;
    const value = numberIn(table, row, `upsilon_${te}`);
    if (value > 0) return value;
  }
  return 0;
}

function weight(level: LevelEntry): number {
  const [top, bottom] = level.j.split('/').map(Number);
  return (2 * top) / (bottom ?? 1) + 1;
}

/**
 * Collisionally excited lines of all n-level atoms, with strengths from level populations in the reference nebula.
 *
 * @param taken `lower-upper` rows (canonical) that another family already holds
 */
export function forbiddenLines(
  ions: readonly IonEntry[],
  levels: LevelIndex,
  tables: { readonly a: CsvTable; readonly upsilon: CsvTable; readonly wavelengths: CsvTable },
  taken: ReadonlySet<string>,
): LineEntry[] {
  const out: LineEntry[] = [];
  const rowsOf = (table: CsvTable, ion: string) => table.rows.filter((row) => row['ion'] === ion);
  ions.forEach((ion, ionNumber) => {
    const decays = rowsOf(tables.a, ion.name).map((row) => ({
      lower: numberIn(tables.a, row, 'lower'),
      upper: numberIn(tables.a, row, 'upper'),
      a: numberIn(tables.a, row, 'a_s1'),
      source: row['source'],
    }));
    if (decays.length === 0) return;
    const own = levels.levels.filter((level, k) => level.ion === ionNumber && level.canonical === k && level.modelLevel >= 0);
    const g = own.map(weight);
    const tabulated = rowsOf(tables.upsilon, ion.name).map((row) => ({
      lower: numberIn(tables.upsilon, row, 'lower'),
      upper: numberIn(tables.upsilon, row, 'upper'),
      upsilon: upsilonAtReference(tables.upsilon, row),
    }));
    const known = new Set(tabulated.map((c) => c.upper));
    const estimates = estimatedCollisions(own, g, tabulated);
    const atom: AtomAtTe = { g, energyCm1: own.map((l) => l.energyCm1), radiative: decays, collisions: [...tabulated, ...estimates] };
    const population = equilibrium(atom, REFERENCE_TE, REFERENCE_NE);
    const total = g.map((_, u) => decays.reduce((sum, d) => (d.upper === u ? sum + d.a : sum), 0));
    const found = decays
      .map((decay) => {
        const lower = levels.modelRow(ion.name, decay.lower);
        const upper = levels.modelRow(ion.name, decay.upper);
        const ritz = ritzWavelength(levels.levels[lower], levels.levels[upper]);
        const emissivity = (population[decay.upper] * decay.a * HC_ERG_CM) / (ritz * 1e-8) / REFERENCE_NE;
        return { decay, lower, upper, ritz, strength: (100 * ion.abundance * emissivity) / H_BETA_EMISSIVITY };
      })
      .filter((line) => line.ritz >= SHORTEST && line.ritz <= LONGEST);
    const strongest = Math.max(...found.map((line) => line.strength));
    for (const { decay, lower, upper, ritz, strength } of found) {
      if (taken.has(`${lower}-${upper}`)) continue;
      const faint = strength < FAINTEST_SHARE * strongest;
      if (faint) continue;
      const given = tables.wavelengths.rows.find(
        (row) => row['ion'] === ion.name && Number(row['lower']) === decay.lower && Number(row['upper']) === decay.upper,
      );
      const energyErr = Math.hypot(levels.levels[lower].energyErrCm1, levels.levels[upper].energyErrCm1);
      const estimated = !known.has(decay.upper);
      out.push({
        ion: ionNumber,
        lower,
        upper,
        givenVac: given ? numberIn(tables.wavelengths, given, 'wavelength_vac') : Number.NaN,
        wavelengthErr: given ? numberIn(tables.wavelengths, given, 'wavelength_err') : (energyErr * ritz * ritz) / 1e8,
        wavelengthSource: given ? given['source'] : 'ritz',
        a: decay.a,
        moore: '',
        nature: natureOf(levels.levels[lower], levels.levels[upper]),
        strength,
        strengthErrDex: estimated ? 0.5 : Math.hypot(0.1, decay.a < 0.05 * total[decay.upper] ? 0.15 : 0),
        mechanism: 'collisional',
        basis: estimated ? 'estimate' : 'computed',
        strengthSource: estimated ? 'n-level+upsilon-estimate' : 'n-level',
        source: `${levels.levels[upper].source}+${decay.source}`,
        name: '',
      });
    }
  });
  return out;
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
