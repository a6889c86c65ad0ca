import { assembleIons, assembleLevels } from './assembleLevels.ts';
import { assembleFamily, assembleSky } from './assembleLines.ts';
import { type IonEntry, type LevelEntry, type LineEntry, ritzWavelength } from './assembly.ts';
import { type Bibliography, readBibliography } from './bibliography.ts';
import { type CsvTable, numberIn, parseCsvTable } from './csvTable.ts';
import { forbiddenLines } from './forbiddenLines.ts';
import { levelSections, modelSections } from './levelSections.ts';
import { lineSections } from './lineSections.ts';
import { packBundle, type Section } from './packBundle.ts';
import type { TableFiles } from './readTables.ts';
import { TextPool } from './textPool.ts';

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
  Object.assign(sections, caseBSections(table('case-b.csv'), ions, bib));
  sections['texts'] = { type: 'text', values: texts.values };
  return packBundle(
    { lines: sorted.length, ions: ions.length, levels: levels.levels.length, modelIons: new Set(model.rows.map((r) => r['ion'])).size },
    hash,
    sections,
  );
}

function caseBSections(table: CsvTable, ions: readonly IonEntry[], bib: Bibliography): Record<string, Section> {
  for (const row of table.rows) bib.citations(row['source'], `${table.name}: ${row['ion']} ${row['n_lower']}-${row['n_upper']}`);
  const nodes = table.columns.filter((column) => column.startsWith('i_'));
  return {
    'caseB.ion': { type: 'u16', values: table.rows.map((row) => ions.findIndex((ion) => ion.name === row['ion'])) },
    'caseB.nLower': { type: 'u8', values: table.rows.map((row) => numberIn(table, row, 'n_lower')) },
    'caseB.nUpper': { type: 'u8', values: table.rows.map((row) => numberIn(table, row, 'n_upper')) },
    'caseB.intensity': { type: 'f32', values: table.rows.flatMap((row) => nodes.map((column) => numberIn(table, row, column))) },
  };
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
