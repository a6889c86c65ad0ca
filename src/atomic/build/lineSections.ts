import {
  ERR_DEX_SCALE,
  LOG_A_SCALE,
  LOG_STRENGTH_SCALE,
  MECHANISMS,
  NATURES,
  NO_LEVEL,
  STRENGTH_BASES,
  WAVELENGTH_ERR_FLOOR,
  WAVELENGTH_ERR_STEPS_PER_DEX,
} from '../bundleFormat.ts';
import type { LevelEntry, LineEntry } from './assembly.ts';
import type { Bibliography } from './bibliography.ts';
import { logFixed } from './logFixed.ts';
import type { Section } from './packBundle.ts';
import { TextPool } from './textPool.ts';

function wavelengthErrCode(err: number): number {
  return Math.max(
    0,
    Math.min(255, Math.ceil(Math.log10(Math.max(err, WAVELENGTH_ERR_FLOOR) / WAVELENGTH_ERR_FLOOR) * WAVELENGTH_ERR_STEPS_PER_DEX - 1e-9)),
  );
}

function multipletKey(line: LineEntry, levels: readonly LevelEntry[]): string {
  if (line.lower < 0) return '';
  const [lower, upper] = [levels[levels[line.lower].canonical], levels[levels[line.upper].canonical]];
  if (lower.term === '' || upper.term === '') return '';
  return [line.ion, lower.configuration, lower.term, upper.configuration, upper.term].join('|');
}

/** Sections of the lines, in their order. */
export function lineSections(
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
