import {
  ERR_DEX_SCALE,
  LOG_A_SCALE,
  LOG_STRENGTH_SCALE,
  LOG_UPSILON_SCALE,
  MECHANISMS,
  NATURES,
  NO_LEVEL,
  STRENGTH_BASES,
  UNKNOWN_16,
  WAVELENGTH_ERR_FLOOR,
  WAVELENGTH_ERR_STEPS_PER_DEX,
} from '../bundleFormat.ts';
import { assembleIons, assembleLevels, type LevelIndex } from './assembleLevels.ts';
import { assembleFamily, assembleSky } from './assembleLines.ts';
import { type IonEntry, type LevelEntry, type LineEntry, ritzWavelength } from './assembly.ts';
import { type Bibliography, readBibliography } from './bibliography.ts';
import { type CsvTable, numberIn, parseCsvTable } from './csvTable.ts';
import { forbiddenLines } from './forbiddenLines.ts';
import { packBundle, type Section } from './packBundle.ts';
import type { TableFiles } from './readTables.ts';

/** Texts stored once, numbered in order of first use; number 0 is the empty text. */
class TextPool {
  readonly values: string[] = [''];
  private readonly index = new Map<string, number>([['', 0]]);
  number(text: string): number {
    let found = this.index.get(text);
    if (found === undefined) {
      found = this.values.length;
      this.values.push(text);
      this.index.set(text, found);
    }
    return found;
  }
}

function logFixed(value: number, scale: number): number {
  return value > 0 ? Math.max(-32_767, Math.min(32_767, Math.round(Math.log10(value) * scale))) : UNKNOWN_16;
}

function wavelengthErrCode(err: number): number {
  return Math.max(
    0,
    Math.min(255, Math.ceil(Math.log10(Math.max(err, WAVELENGTH_ERR_FLOOR) / WAVELENGTH_ERR_FLOOR) * WAVELENGTH_ERR_STEPS_PER_DEX - 1e-9)),
  );
}

/** The same transition in two families is one line: the first keeps it. */
function withoutDuplicates(lines: readonly LineEntry[], levels: readonly LevelEntry[]): LineEntry[] {
  const seen = new Set<string>();
  return lines.filter((line) => {
    if (line.lower < 0) return true;
    const key = `${levels[line.lower].canonical}-${levels[line.upper].canonical}`;
    if (seen.has(key)) return false;
    seen.add(key);
    return true;
  });
}

function multipletKey(line: LineEntry, levels: readonly LevelEntry[]): string {
  if (line.lower < 0) return '';
  const [lower, upper] = [levels[levels[line.lower].canonical], levels[levels[line.upper].canonical]];
  if (lower.term === '' || upper.term === '') return '';
  return [line.ion, lower.configuration, lower.term, upper.configuration, upper.term].join('|');
}

function lineSections(
  lines: readonly LineEntry[],
  levels: readonly LevelEntry[],
  texts: TextPool,
  bib: Bibliography,
): Record<string, Section> {
  const multiplets = new TextPool();
  const sources = new TextPool();
  const cite = (keys: string, where: string): number => sources.number(bib.citations(keys, where).join('\t'));
  const where = (line: LineEntry): string => `line of ion ${line.ion} (${line.source})`;
  const given = lines.filter((line) => !Number.isNaN(line.givenVac)).map((line) => line.givenVac);
  const sections: Record<string, Section> = {
    'line.ion': { type: 'u16', values: lines.map((l) => l.ion) },
    'line.lower': { type: 'u16', values: lines.map((l) => (l.lower < 0 ? NO_LEVEL : l.lower)) },
    'line.upper': { type: 'u16', values: lines.map((l) => (l.upper < 0 ? NO_LEVEL : l.upper)) },
    'line.kind': {
      type: 'u8',
      values: lines.map(
        (l) =>
          NATURES.indexOf(l.nature) +
          8 * MECHANISMS.indexOf(l.mechanism) +
          32 * STRENGTH_BASES.indexOf(l.basis) +
          (Number.isNaN(l.givenVac) ? 0 : 128),
      ),
    },
    'line.givenVac': { type: 'f64', values: given },
    'line.wavelengthErr': { type: 'u8', values: lines.map((l) => wavelengthErrCode(l.wavelengthErr)) },
    'line.wavelengthSource': { type: 'u8', values: lines.map((l) => cite(l.wavelengthSource, where(l))) },
    'line.logStrength': { type: 'i16', values: lines.map((l) => logFixed(l.strength, LOG_STRENGTH_SCALE)) },
    'line.strengthErr': {
      type: 'u8',
      values: lines.map((l) => Math.min(255, Math.round((Number.isNaN(l.strengthErrDex) ? 1 : l.strengthErrDex) * ERR_DEX_SCALE))),
    },
    'line.strengthSource': { type: 'u8', values: lines.map((l) => cite(l.strengthSource, where(l))) },
    'line.logA': { type: 'i16', values: lines.map((l) => logFixed(l.a, LOG_A_SCALE)) },
    'line.multiplet': { type: 'u16', values: lines.map((l) => multiplets.number(multipletKey(l, levels))) },
    'line.aNote': { type: 'u16', values: lines.map((l) => texts.number(l.aNote)) },
    'line.moore': { type: 'u16', values: lines.map((l) => texts.number(l.moore)) },
    'line.name': { type: 'u16', values: lines.map((l) => texts.number(l.name)) },
    'line.source': { type: 'u8', values: lines.map((l) => cite(l.source, where(l))) },
  };
  sections['sources'] = { type: 'text', values: sources.values };
  return sections;
}

function levelSections(levels: readonly LevelEntry[], texts: TextPool): Record<string, Section> {
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

interface ModelTables {
  readonly levels: CsvTable;
  readonly a: CsvTable;
  readonly upsilon: CsvTable;
  /** `model-papers.csv`: the papers behind each quantity of an ion. */
  readonly papers: CsvTable;
}

function modelSections(
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

/** Builds the bytes of `public/atomic.bin` from the tables; deterministic. @throws Error naming the row that is wrong */
export function buildBundle({ files, hash }: TableFiles): Uint8Array {
  const table = (name: string): CsvTable => {
    const text = files.get(name);
    if (text === undefined) throw new Error(`table ${name} is missing`);
    return parseCsvTable(name, text);
  };
  const bib = readBibliography(files.get('sources.bib') ?? '');
  const ions = assembleIons(table('ions.csv'));
  const model = table('model-levels.csv');
  const levels = assembleLevels(ions, model, table('levels.csv'));
  for (const level of levels.levels) bib.citations(level.source, `level of ${ions[level.ion].name}`);
  const [a, upsilon] = [table('model-a.csv'), table('model-upsilon.csv')];
  const families = [...files.keys()].filter((name) => name.startsWith('lines-')).sort();
  const lines = families.flatMap((name) => assembleFamily(ions, levels, table(name)));
  const taken = new Set(lines.map((line) => `${levels.levels[line.lower].canonical}-${levels.levels[line.upper].canonical}`));
  lines.push(
    ...forbiddenLines(
      ions,
      levels,
      { a, upsilon, wavelengths: table('nebular-wavelengths.csv'), strengths: table('strengths-from-spectra.csv') },
      taken,
    ),
  );
  const sky = table('sky.csv');
  lines.push(...assembleSky(ions, sky));
  const vacuum = (line: LineEntry): number =>
    Number.isNaN(line.givenVac) ? ritzWavelength(levels.levels[line.lower], levels.levels[line.upper]) : line.givenVac;
  const sorted = withoutDuplicates(lines, levels.levels)
    .map((line, order) => ({ line, order, wavelength: vacuum(line) }))
    .sort((p, q) => p.wavelength - q.wavelength || p.order - q.order)
    .map(({ line, wavelength }) => {
      if (!(wavelength > 0)) throw new Error(`a line of ${ions[line.ion].name} (${line.source}) has no wavelength`);
      return line;
    });
  const texts = new TextPool();
  const bands = sky.rows.filter((row) => row['end_vac'] !== '');
  const sections: Record<string, Section> = {
    ...lineSections(sorted, levels.levels, texts, bib),
    ...levelSections(levels.levels, texts),
    ...modelSections(ions, levels, { levels: model, a, upsilon, papers: table('model-papers.csv') }, texts, bib),
    'ion.name': { type: 'u16', values: ions.map((ion) => texts.number(ion.name)) },
    'ion.element': { type: 'u16', values: ions.map((ion) => texts.number(ion.element)) },
    'ion.charge': { type: 'u8', values: ions.map((ion) => ion.charge) },
    'ion.creationEv': { type: 'f64', values: ions.map((ion) => ion.creationEv) },
    'ion.ionizationEv': { type: 'f64', values: ions.map((ion) => ion.ionizationEv) },
    'ion.abundance': { type: 'f32', values: ions.map((ion) => ion.abundance) },
    'band.low': { type: 'f64', values: bands.map((row) => Number(row['wavelength_vac'])) },
    'band.high': { type: 'f64', values: bands.map((row) => Number(row['end_vac'])) },
    'band.kind': { type: 'u16', values: bands.map((row) => texts.number(row['kind'])) },
    'band.species': { type: 'u16', values: bands.map((row) => texts.number(row['species'])) },
    'band.note': {
      type: 'u16',
      values: bands.map((row) => texts.number([row['transition'], row['note']].filter((t) => t !== '').join('; '))),
    },
  };
  sections['texts'] = { type: 'text', values: texts.values };
  return packBundle(
    { lines: sorted.length, ions: ions.length, levels: levels.levels.length, modelIons: new Set(model.rows.map((r) => r['ion'])).size },
    hash,
    sections,
  );
}
