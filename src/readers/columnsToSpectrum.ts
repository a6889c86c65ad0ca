import { type Place, ProblemError } from '../problems/index.ts';
import { assemble, type RawSpectrum } from './assemble.ts';
import { chooseColumns, columnList } from './chooseColumns.ts';
import { roleOf } from './columnRoles.ts';
import type { Column } from './columns.ts';
import { flaggedBy } from './maskValues.ts';
import { type MediumEvidence, mediumInColumn, saysRestFrame } from './mediumWords.ts';
import { type Notes, noteFact, warn } from './notes.ts';
import type { Reading, ReadingChoices } from './reading.ts';
import { likelyUnit, type SpectralUnit, spectralUnit, toAngstrom, unitNamed } from './spectralUnits.ts';

/** What stands around the columns: header, comments. */
export interface Surroundings {
  readonly name: string;
  readonly place: Place;
  /** Choices that lead to these columns (HDU, row). */
  readonly taken: ReadingChoices;
  readonly medium?: MediumEvidence;
  /** A unit of wavelength stated outside the columns, with the words that state it. */
  readonly spectralUnit?: { readonly unit: SpectralUnit; readonly evidence: string };
  readonly fluxUnit?: { readonly unit: string; readonly evidence: string };
  readonly maker?: string;
  readonly frame?: string;
  readonly restFrame?: string;
  readonly resolvingPower?: number;
  readonly missingValues?: readonly number[];
}

/** From columns and what stands around them to a reading. @throws ProblemError when there is no wavelength or flux */
export async function columnsToSpectrum(
  columns: readonly Column[],
  around: Surroundings,
  choices: ReadingChoices,
  notes: Notes,
): Promise<Reading> {
  const { place } = around;
  const chosen = await chooseColumns(columns, choices, notes, place);
  const stored = await chosen.wavelength.read();
  const unit = unitOfColumn(chosen.wavelength, stored, around, choices, notes);
  const wavelength = toAngstrom(stored, unit);
  const flux = await chosen.flux.read();
  requireSameLength(wavelength, flux, notes.file, place);
  const error = chosen.error && {
    values: await chosen.error.column.read(),
    meaning: chosen.error.meaning,
    label: `column ${chosen.error.column.name}`,
  };
  const flagged = chosen.mask ? await flaggedBy(chosen.mask, choices, notes, place) : undefined;
  const medium: MediumEvidence | undefined =
    mediumInColumn(chosen.wavelength) ??
    around.medium ??
    mediumOfSibling(columns, chosen.wavelength) ??
    (unit.quantity === 'wavelength' ? undefined : { medium: 'vacuum', evidence: `a ${unit.quantity} gives vacuum wavelengths` });
  const raw: RawSpectrum = {
    name: around.name,
    place,
    wavelength,
    flux,
    fluxUnit: fluxUnitOf(chosen.flux, around, notes, place),
    ...(error ? { error } : {}),
    ...(flagged ? { flagged } : {}),
    ...(medium ? { medium } : {}),
    ...(around.maker ? { maker: around.maker } : {}),
    ...(around.frame ? { frame: around.frame } : {}),
    ...(around.resolvingPower ? { resolvingPower: around.resolvingPower } : {}),
    ...(around.missingValues ? { missingValues: around.missingValues } : {}),
    ...restFrameOf(chosen.wavelength, around),
    columns: columnList(columns),
  };
  return assemble(raw, choices, takenChoices(columns, chosen, around, choices), notes);
}

/** Beside a column called wavelength_air the one called wavelength is in vacuum, and the other way round. */
function mediumOfSibling(columns: readonly Column[], wavelength: Column): MediumEvidence | undefined {
  const others = columns.filter((c) => c !== wavelength && c.samples === wavelength.samples && roleOf(c).role === 'wavelength');
  const said = others.map((c) => ({ name: c.name, told: mediumInColumn(c) })).filter(({ told }) => told !== undefined);
  if (said.length !== 1 || others.length !== 1) return undefined;
  const [{ name, told }] = said;
  return { medium: told?.medium === 'air' ? 'vacuum' : 'air', evidence: `the column beside it is called ${name}` };
}

function restFrameOf(wavelength: Column, { restFrame }: Surroundings): { restFrame?: string } {
  if (restFrame) return { restFrame };
  return saysRestFrame(`${wavelength.name} wave`) && /rest/i.test(wavelength.name)
    ? { restFrame: `the column is called ${wavelength.name}` }
    : {};
}

function takenChoices(
  columns: readonly Column[],
  chosen: Awaited<ReturnType<typeof chooseColumns>>,
  around: Surroundings,
  choices: ReadingChoices,
): ReadingChoices {
  const nameOf = (c: Column) =>
    columns.filter((o) => o.name === c.name).length === 1 && c.name !== '' ? c.name : String(columns.indexOf(c) + 1);
  const { errorMeaning, maskMeaning } = choices;
  return {
    ...around.taken,
    wavelengthColumn: nameOf(chosen.wavelength),
    fluxColumn: nameOf(chosen.flux),
    errorColumn: chosen.error ? nameOf(chosen.error.column) : 'none',
    ...(errorMeaning ? { errorMeaning } : {}),
    ...(chosen.mask ? { maskColumn: nameOf(chosen.mask) } : choices.maskColumn ? { maskColumn: choices.maskColumn } : {}),
    ...(maskMeaning ? { maskMeaning } : {}),
  };
}

/** The unit of a column of wavelengths: the user's, the column's, one in its name, one stated elsewhere, else the likely one, with a warning. */
export function unitOfColumn(
  column: Column,
  stored: Float64Array,
  around: Pick<Surroundings, 'spectralUnit' | 'place'>,
  choices: ReadingChoices,
  notes: Notes,
): SpectralUnit {
  const told = (unit: SpectralUnit, reason: string) => {
    noteFact(notes, 'wavelength unit', unit.name, reason);
    return unit;
  };
  if (choices.wavelengthUnit) return told(unitNamed(choices.wavelengthUnit), 'chosen by you');
  const log = logarithmInName(column.name);
  const fromUnit = column.unit ? spectralUnit(column.unit) : undefined;
  const withLog = (unit: SpectralUnit): SpectralUnit =>
    log && !unit.log ? { ...unit, name: `${log === 10 ? 'log10' : 'ln'} ${unit.name}`, log } : unit;
  if (fromUnit && fromUnit.quantity !== 'velocity')
    return told(withLog(fromUnit), `the column's unit is ${column.unit}${log ? ' and its name says logarithm' : ''}`);
  const fromName = unitInName(column.name) ?? (column.description ? unitInWords(column.description) : undefined);
  if (fromName) return told(withLog(fromName), `the column is called ${column.name}`);
  if (around.spectralUnit) return told(withLog(around.spectralUnit.unit), around.spectralUnit.evidence);
  if (log)
    return told(
      { name: `${log === 10 ? 'log10' : 'ln'} Angstrom`, quantity: 'wavelength', scale: 1, log },
      `the column is called ${column.name}`,
    );
  const { low, high } = rangeOf(stored);
  const likely = isEvenLog(stored) ? LOG_GUESS : likelyUnit(low, high);
  if (!likely) {
    throw new ProblemError({
      code: 'unknown-wavelength-unit',
      where: { file: notes.file, ...around.place, column: column.name },
      found: `no unit, and numbers from ${Number(low.toPrecision(6))} to ${Number(high.toPrecision(6))} that are wavelengths in none of the usual ones`,
      expected: 'wavelengths in Angstrom, nm or um',
      doThis: 'Choose the unit of the wavelengths, or another column.',
    });
  }
  warn(notes, 'unit-assumed', `no unit of wavelength is stated; ${likely.unit.name} is assumed: ${likely.reason}`, {
    where: { ...around.place, column: column.name },
    doThis: 'Choose the unit if this is wrong.',
  });
  for (const other of ['Angstrom', 'nm', 'um'] as const)
    if (other !== likely.unit.name) notes.offers.push({ label: `wavelengths in ${other}`, adds: true, choices: { wavelengthUnit: other } });
  return told(likely.unit, `assumed: ${likely.reason}`);
}

const LOG_GUESS = {
  unit: { name: 'log10 Angstrom', quantity: 'wavelength', scale: 1, log: 10 } as const satisfies SpectralUnit,
  reason: 'numbers between 3 and 4.6 in even steps of 0.00001 to 0.0005 are usually logarithms of Angstrom (common practice, no source)',
};

/** Logarithms of Angstrom in the even steps of surveys, rather than micrometres. */
function isEvenLog(stored: Float64Array): boolean {
  const n = stored.length;
  if (n < 100 || !(stored[0] >= 3 && stored[n - 1] <= 4.6)) return false;
  const step = (stored[n - 1] - stored[0]) / (n - 1);
  if (!(step >= 1e-5 && step <= 5e-4)) return false;
  // stored as 32-bit floats the steps waver by 2e-7
  for (let i = 1; i < n; i++) if (Math.abs(stored[i] - stored[i - 1] - step) > 0.02 * step + 5e-7) return false;
  return true;
}

/** Lowest and highest positive finite value; NaN when there is none. */
export function rangeOf(values: Float64Array): { low: number; high: number } {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const v of values) {
    if (!(v > 0) || v > 1e30) continue;
    if (v < low) low = v;
    if (v > high) high = v;
  }
  return high < low ? { low: Number.NaN, high: Number.NaN } : { low, high };
}

const logarithmInName = (name: string): 10 | 'e' | undefined =>
  /^(log|lg)_?(10)?_?(lam|wav|wl|l$|w$)/i.test(name) ? 10 : /^ln_?(lam|wav|wl)/i.test(name) ? 'e' : undefined;

/** `wavelength_nm`, `lambda(um)`, `wave [A]`, `Wavelength, nm`: the unit in a column's name. */
export function unitInName(name: string): SpectralUnit | undefined {
  const bracket = /[[({<]([^\])}>]+)[\])}>]/.exec(name);
  const inBracket = bracket && spectralUnit(bracket[1]);
  if (inBracket) return inBracket;
  const last = /[\s_,./:-]+([A-Za-zµμÅ-]+[0-9]?)$/.exec(name.trim());
  // one letter after an underscore is more likely an index than a unit, but for A
  if (last && (last[1].length > 1 || last[1] === 'A' || last[1] === 'Å')) return spectralUnit(last[1]);
  const whole = /^(angstroms?|microns?|nanomet(er|re)s?|nm|um|[kmgt]hz)$/i.exec(name.trim());
  return whole ? spectralUnit(whole[0]) : undefined;
}

/** Characters of a sentence that are looked at. */
const LONGEST_SENTENCE = 300;

/** A unit of wavelength in a sentence: "lam - wavelength in microns", "Wavelength (Angstrom), air". */
export function unitInWords(words: string): SpectralUnit | undefined {
  const text = words.slice(0, LONGEST_SENTENCE);
  if (!/wave|lam(bda)?\b|λ|\bwl\b|spectral|frequenc|\bang|micron|dispersion|x[-_ ]?axis/i.test(text)) return undefined;
  const told = /\b(?:in(?:\s+units?\s+of)?|units?(?:\s+(?:of|are|is|in))?\s*[:=]?)\s+([^\s,;:.()[\]]+)/gi;
  for (const match of text.matchAll(told)) {
    const unit = spectralUnit(match[1]);
    if (unit && unit.quantity !== 'velocity') return unit;
  }
  for (const match of text.matchAll(/[[({<]([^\])}>]{1,30})[\])}>]/g)) {
    const unit = spectralUnit(match[1]);
    if (unit && unit.quantity !== 'velocity') return unit;
  }
  for (const match of text.matchAll(
    /(?:^|[\s:=_/,-])(angstroms?|angstroems?|ångstr[oö]ms?|nm|nanomet(?:er|re)s?|microns?|micromet(?:er|re)s?|um|µm|μm|[kmgt]hz)\b/gi,
  )) {
    const unit = spectralUnit(match[1]);
    if (unit) return unit;
  }
  return undefined;
}

function fluxUnitOf(flux: Column, around: Surroundings, notes: Notes, place: Place): string {
  if (flux.unit) {
    noteFact(notes, 'flux unit', flux.unit, "the column's unit");
    if (around.fluxUnit && squash(around.fluxUnit.unit) !== squash(flux.unit)) {
      warn(
        notes,
        'flux-units-differ',
        `the column's flux unit is ${flux.unit}, but ${around.fluxUnit.evidence} says ${around.fluxUnit.unit}: the column's is taken`,
        { where: { ...place, column: flux.name } },
      );
    }
    return flux.unit;
  }
  if (around.fluxUnit) {
    noteFact(notes, 'flux unit', around.fluxUnit.unit, around.fluxUnit.evidence);
    return around.fluxUnit.unit;
  }
  noteFact(notes, 'flux unit', 'unknown', 'the file states none');
  return '';
}

const squash = (unit: string) => unit.replace(/\s+/g, '').toLowerCase();

function requireSameLength(wavelength: Float64Array, flux: Float64Array, file: string, place: Place): void {
  if (wavelength.length === flux.length) return;
  throw new ProblemError({
    code: 'lengths-differ',
    where: { file, ...place },
    found: `${wavelength.length} wavelengths but ${flux.length} fluxes`,
    expected: 'one flux for every wavelength',
    doThis: 'Choose columns of equal length.',
  });
}
