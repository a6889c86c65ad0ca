import { type AtomicData, type CompanionFinder, linesBetween } from '../atomic/index.ts';
import { airFromVacuum, vacuumFromAir } from '../units/index.ts';
import type { ThinGasView } from './analysis.ts';
import { ionLabel, lineKey } from './lineNames.ts';
import { thinGasOf } from './transitionView.ts';

/** A line of the list in one row. */
export interface ListedLine {
  readonly index: number;
  readonly key: string;
  /** With brackets. */
  readonly ion: string;
  /** Angstrom. */
  readonly wavelengthAir: number;
  readonly wavelengthVac: number;
  readonly lower: string;
  readonly upper: string;
  readonly nature: string;
  /** H beta = 100 in the reference nebula; absent = unknown. */
  readonly strength?: number;
  readonly multiplet: string;
}

/** All the list knows of a line. */
export interface LineRecord extends ListedLine {
  readonly name: string;
  readonly wavelengthErr: number;
  /** Vacuum Angstrom from the level energies alone; absent where a level is unknown. */
  readonly ritzVac?: number;
  readonly wavelengthNote: string;
  /** cm^-1; absent = unknown. */
  readonly lowerEnergyCm1?: number;
  readonly upperEnergyCm1?: number;
  /** s^-1; absent = unknown. */
  readonly aValue?: number;
  readonly strengthErrDex: number;
  readonly strengthBasis: string;
  readonly strengthNote: string;
  readonly thinGas?: ThinGasView;
  readonly sources: readonly string[];
  /** Other lines that must be there too, nearest kin first. */
  readonly companions: readonly ListedCompanion[];
}

export interface ListedCompanion {
  readonly index: number;
  /** With brackets. */
  readonly ion: string;
  readonly wavelengthAir: number;
  readonly relation: 'same-upper-level' | 'same-multiplet' | 'same-ion';
  /** Flux over that of the line, without reddening; absent = not known. */
  readonly ratio?: number;
  /** One sigma of it, dex. */
  readonly errDex?: number;
  readonly basis?: string;
}

export interface LineSearchResult {
  readonly lines: readonly ListedLine[];
  /** All that fit, shown or not. */
  readonly total: number;
  /** What the words were taken for. */
  readonly understood: string;
}

/** Lines shown at once. */
const MOST_SHOWN = 500;
/** A single wavelength means this far to either side, Angstrom. */
const NEAR_A = 2.5;

interface Wanted {
  readonly ions: readonly string[];
  readonly low: number;
  readonly high: number;
  readonly words: readonly string[];
  readonly understood: string;
}

/**
 * Searches the list by ion (`O III`, `[O III]`), wavelength in air (`5007`, `4950-5010`) and words of the multiplet or the level (`3p 4Do`, `(1)`), in any order;
 * all must fit. Ascending wavelength.
 */
export function searchLines(data: AtomicData, query: string): LineSearchResult {
  const wanted = understand(data, query);
  const [first, end] = linesBetween(data.lines, wanted.low, wanted.high);
  const found: ListedLine[] = [];
  let total = 0;
  for (let line = first; line < end; line++) {
    const ion = data.lines.ions[data.lines.ion[line]].name;
    if (wanted.ions.length > 0 && !wanted.ions.includes(ion)) continue;
    if (wanted.words.length > 0) {
      const text =
        `${data.multipletName(line)} ${data.lowerLabel(line)} ${data.upperLabel(line)} ${data.lineName(line)} ${data.lines.nature(line)}`.toLowerCase();
      if (!wanted.words.every((word) => text.includes(word))) continue;
    }
    total++;
    if (found.length < MOST_SHOWN) found.push(listed(data, line));
  }
  return { lines: found, total, understood: wanted.understood };
}

function understand(data: AtomicData, query: string): Wanted {
  const names = new Map(data.lines.ions.map((ion) => [ion.name.toLowerCase(), ion.name]));
  const ions: string[] = [];
  let low = 0;
  let high = Number.POSITIVE_INFINITY;
  const said: string[] = [];
  let rest = ` ${query.replace(/[[\]]/g, ' ')} `.replace(/\s+/g, ' ');
  for (const [lower, name] of names) {
    const pattern = new RegExp(` ${lower.replace(/[+*]/g, '\\$&')} `, 'i');
    if (!pattern.test(rest)) continue;
    ions.push(name);
    said.push(name);
    rest = rest.replace(pattern, ' ');
  }
  const range = / (\d{3,6}(?:\.\d+)?)\s*(?:-|–|to|\.\.)\s*(\d{3,6}(?:\.\d+)?) /i.exec(rest);
  const single = / (\d{3,6}(?:\.\d+)?) /.exec(rest);
  if (range) {
    low = vacuumFromAir(Number(range[1]));
    high = vacuumFromAir(Number(range[2]));
    rest = rest.replace(range[0], ' ');
    said.push(`${range[1]} to ${range[2]} Å in air`);
  } else if (single) {
    low = vacuumFromAir(Number(single[1]) - NEAR_A);
    high = vacuumFromAir(Number(single[1]) + NEAR_A);
    rest = rest.replace(single[0], ' ');
    said.push(`within ${NEAR_A} Å of ${single[1]} Å in air`);
  }
  const words = rest
    .toLowerCase()
    .trim()
    .split(' ')
    .filter((word) => word !== '');
  if (words.length > 0) said.push(`levels or multiplet with ${words.join(' and ')}`);
  return { ions, low, high, words, understood: said.length > 0 ? said.join(', ') : 'all lines' };
}

function listed(data: AtomicData, line: number): ListedLine {
  const { lines } = data;
  const log = lines.logStrength[line];
  return {
    index: line,
    key: lineKey(data, line),
    ion: ionLabel(data, line),
    wavelengthAir: airFromVacuum(lines.wavelengthVac[line]),
    wavelengthVac: lines.wavelengthVac[line],
    lower: data.lowerLabel(line),
    upper: data.upperLabel(line),
    nature: lines.nature(line),
    ...(Number.isFinite(log) ? { strength: 10 ** log } : {}),
    multiplet: data.multipletName(line),
  };
}

/**
 * Everything the list holds of one line.
 *
 * @param line   index into the list
 * @param te     K, for the critical density and the companions
 * @param ne     cm^-3, for the companions
 * @param finder of the same list
 * @throws RangeError when the list has no such line
 */
export function lineRecord(data: AtomicData, line: number, te: number, ne: number, finder: CompanionFinder): LineRecord {
  if (!(line >= 0 && line < data.lines.count)) throw new RangeError(`no line ${line} in a list of ${data.lines.count}`);
  const thinGas = thinGasOf({ data, medium: 'air', te }, line);
  const ritzVac = data.ritzVac(line);
  const lowerEnergyCm1 = data.lowerEnergyCm1(line);
  const upperEnergyCm1 = data.upperEnergyCm1(line);
  const aValue = data.lines.aValue[line];
  return {
    ...listed(data, line),
    name: data.lineName(line),
    wavelengthErr: data.lines.wavelengthErr[line],
    ...(Number.isFinite(ritzVac) ? { ritzVac } : {}),
    wavelengthNote: data.wavelengthNote(line),
    ...(Number.isFinite(lowerEnergyCm1) ? { lowerEnergyCm1 } : {}),
    ...(Number.isFinite(upperEnergyCm1) ? { upperEnergyCm1 } : {}),
    ...(Number.isFinite(aValue) ? { aValue } : {}),
    strengthErrDex: data.lines.strengthErrDex[line],
    strengthBasis: data.strengthBasis(line),
    strengthNote: data.strengthNote(line),
    ...(thinGas ? { thinGas } : {}),
    sources: data.lineSources(line),
    companions: finder(line, te, ne).map(
      (other): ListedCompanion => ({
        index: other.line,
        ion: ionLabel(data, other.line),
        wavelengthAir: airFromVacuum(data.lines.wavelengthVac[other.line]),
        relation: other.relation,
        ...(other.predicted ? { ratio: other.predicted.ratio, errDex: other.predicted.errDex, basis: other.predicted.basis } : {}),
      }),
    ),
  };
}
