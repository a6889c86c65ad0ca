import { nearestWord, type Place, ProblemError } from '../problems/index.ts';
import { roleOf } from './columnRoles.ts';
import type { Column, RankedColumn } from './columns.ts';
import type { ErrorValues } from './errorValues.ts';
import { guessByNumbers } from './guessByNumbers.ts';
import { type Notes, noteFact, warn } from './notes.ts';
import type { ReadingChoices } from './reading.ts';

/** The columns that make a spectrum. */
export interface ChosenColumns {
  readonly wavelength: Column;
  readonly flux: Column;
  readonly error?: { readonly column: Column; readonly meaning: ErrorValues['meaning'] };
  readonly mask?: Column;
}

export const rankColumns = (columns: readonly Column[]): RankedColumn[] =>
  columns.map((column, index) => ({ column, index, ...roleOf(column) }));

/** What the user can choose from, with the role each column was taken for. */
export const columnList = (columns: readonly Column[]) => columns.map((c) => ({ name: c.name, unit: c.unit, role: roleOf(c).role }));

/**
 * Proposes wavelength, flux, error and mask among columns, by open standards (UCD, utype), names, units and, failing these, by the numbers.
 * The user's choices go first. Every choice is noted with its reason.
 *
 * @throws ProblemError when no column can be the wavelength or the flux, or a chosen one does not exist
 */
export async function chooseColumns(
  columns: readonly Column[],
  choices: ReadingChoices,
  notes: Notes,
  place: Place,
): Promise<ChosenColumns> {
  const ranked = rankColumns(columns);
  const named = (choice: string | undefined) =>
    choice === undefined || choice === 'none' ? undefined : ranked[findColumn(columns, choice, notes.file, place)];
  let flux = named(choices.fluxColumn);
  let wavelength = named(choices.wavelengthColumn);
  const chosenError = named(choices.errorColumn);
  const chosenMask = named(choices.maskColumn);
  const taken = new Set([flux, wavelength, chosenError, chosenMask]);
  const free = ranked.filter((r) => !taken.has(r));
  const reasonOf = (r: RankedColumn, chosen: boolean) => (chosen ? 'chosen by you' : r.reason);
  const chosenWave = wavelength !== undefined;
  const chosenFlux = flux !== undefined;

  flux ??= best(free, 'flux', (r) => (wavelength && sameFamily(r, wavelength) ? 3 : 0));
  wavelength ??= best(
    free.filter((r) => r !== flux),
    'wavelength',
    (r) => (flux && sameFamily(r, flux) ? 10 : 0),
  );
  let guessedError: RankedColumn | undefined;
  if (!wavelength || !flux) {
    const guess = await guessByNumbers(
      free.filter((r) => r !== flux && r !== wavelength),
      wavelength,
      flux,
      columns.length,
    );
    if (guess.wavelength || guess.flux) {
      const told = [
        guess.wavelength && `${label(guess.wavelength)} as wavelength`,
        guess.flux && `${label(guess.flux)} as flux`,
        guess.error && `${label(guess.error)} as uncertainty`,
      ];
      const says = columns.length === 2 && guess.wavelength && guess.flux ? undefined : told.filter((t) => t).join(', ');
      if (says)
        warn(notes, 'columns-guessed', `no names tell the columns apart; taken by their numbers: ${says}`, {
          where: place,
          doThis: 'Check the choice of columns.',
        });
    }
    wavelength ??= guess.wavelength;
    flux ??= guess.flux;
    guessedError = guess.error;
  }
  const velocity = ranked.find((r) => r.role === 'velocity');
  if (!wavelength) throw noColumn(velocity ? 'velocity' : 'wavelength', columns, notes.file, place);
  if (!flux) throw noColumn('flux', columns, notes.file, place);

  noteFact(notes, 'wavelength', label(wavelength), reasonOf(wavelength, chosenWave));
  noteFact(notes, 'flux', label(flux), reasonOf(flux, chosenFlux));
  remarkOnRivals(flux, ranked, chosenFlux, notes, place);

  const error =
    choices.errorColumn === 'none'
      ? undefined
      : (chosenError ?? errorFor(flux, free) ?? (guessedError !== flux ? guessedError : undefined));
  const meaning = choices.errorMeaning ?? (error ? meaningOf(error) : 'sigma');
  if (error) noteFact(notes, 'uncertainty', `${label(error)}, taken as ${MEANINGS[meaning]}`, reasonOf(error, chosenError !== undefined));
  else noteFact(notes, 'uncertainty', 'none', choices.errorColumn === 'none' ? 'chosen by you' : 'no column holds it');

  const mask = choices.maskColumn === 'none' ? undefined : (chosenMask ?? maskFor(flux, ranked, error));
  return {
    wavelength: wavelength.column,
    flux: flux.column,
    ...(error ? { error: { column: error.column, meaning } } : {}),
    ...(mask ? { mask: mask.column } : {}),
  };
}

export const MEANINGS = { sigma: 'one sigma', variance: 'variance', ivar: 'inverse variance', relative: 'a share of the flux' } as const;

const label = ({ column, index }: RankedColumn) => `column ${column.name || index + 1}${column.unit ? ` (${column.unit})` : ''}`;

/** Index of a column by name (case ignored when that is unambiguous) or by number from 1. @throws ProblemError with the nearest name */
export function findColumn(columns: readonly Column[], choice: string, file: string, place: Place): number {
  const exact = columns.findIndex((c) => c.name === choice);
  if (exact >= 0) return exact;
  const loose = columns.findIndex((c) => c.name.toLowerCase() === choice.toLowerCase());
  if (loose >= 0) return loose;
  if (/^\d+$/.test(choice) && Number(choice) >= 1 && Number(choice) <= columns.length) return Number(choice) - 1;
  const near = nearestWord(
    choice,
    columns.map((c) => c.name),
  );
  throw new ProblemError({
    code: 'no-such-column',
    where: { file, ...place },
    found: `no column \`${choice}\``,
    expected: near
      ? `\`${near}\` perhaps`
      : `one of ${columns
          .slice(0, 12)
          .map((c) => c.name)
          .join(', ')}`,
    doThis: 'Choose one of the columns that are there.',
  });
}

const sameFamily = (a: RankedColumn, b: RankedColumn) => familyOf(a.column.name) === familyOf(b.column.name);
const familyOf = (name: string) => (/^(opt|box)/i.exec(name)?.[1] ?? '').toLowerCase();

function best(ranked: readonly RankedColumn[], role: RankedColumn['role'], bonus: (r: RankedColumn) => number): RankedColumn | undefined {
  let found: RankedColumn | undefined;
  let merit = Number.NEGATIVE_INFINITY;
  for (const r of ranked) {
    if (r.role !== role || r.column.samples < 2) continue;
    const m = r.merit + bonus(r);
    if (m > merit) {
      merit = m;
      found = r;
    }
  }
  return found;
}

const RANK_OF_MEANING = { sigma: 3, ivar: 2, variance: 1, relative: 0 } as const;

/** The error column that belongs to a flux column: same stem, else one without any stem. */
function errorFor(flux: RankedColumn, free: readonly RankedColumn[]): RankedColumn | undefined {
  const fluxStems = stems(flux.column.name);
  let found: RankedColumn | undefined;
  let merit = 0;
  for (const r of free) {
    if (r === flux || !(r.role in RANK_OF_MEANING) || r.column.samples !== flux.column.samples) continue;
    // a UCD or utype of an error speaks of the one flux of its table
    const kinship = r.stem === '' ? 30 : fluxStems.has(squeeze(r.stem)) ? 50 : /^its (UCD|utype)/.test(r.reason) ? 20 : 0;
    if (kinship === 0) continue;
    const m = kinship + r.merit / 100 + RANK_OF_MEANING[meaningOf(r)];
    if (m > merit) {
      merit = m;
      found = r;
    }
  }
  return found;
}

const meaningOf = ({ role }: RankedColumn): ErrorValues['meaning'] =>
  role === 'variance' || role === 'ivar' || role === 'relative' ? role : 'sigma';

const squeeze = (text: string) => text.replace(/[^a-z0-9]/gi, '').toLowerCase();

/** Ways in which an error's name may repeat its flux's. */
function stems(name: string): ReadonlySet<string> {
  const bare = squeeze(name);
  const all = new Set([bare, bare.replace(/es$|s$/, ''), `${bare}s`]);
  // any flux may be called plain "flux", "f" or "spec" in the name of its error
  for (const usual of ['flux', 'f', 'fl', 'fx', 'spec', 'flambda', 'flam', 'int', 'intensity', 'counts', 'stat', 'total'])
    if (!/^(opt|box)/.test(bare)) all.add(usual);
  if (/surf|bright/.test(bare)) {
    all.clear();
    for (const s of [bare, 'sb']) all.add(s);
  }
  return all;
}

/** A mask that goes with the flux; where inverse variances are given they already say what is bad. */
function maskFor(flux: RankedColumn, ranked: readonly RankedColumn[], error: RankedColumn | undefined): RankedColumn | undefined {
  const family = familyOf(flux.column.name);
  const masks = ranked.filter((r) => r.role === 'mask' && r.column.samples === flux.column.samples && familyOf(r.column.name) === family);
  if (error && meaningOf(error) === 'ivar') return undefined;
  return best(masks, 'mask', () => 0);
}

/** A flux-calibrated rival matters to everyone who needs line ratios. */
function remarkOnRivals(flux: RankedColumn, ranked: readonly RankedColumn[], chosen: boolean, notes: Notes, place: Place): void {
  const rivals = ranked.filter((r) => r !== flux && r.role === 'flux' && r.column.samples === flux.column.samples);
  for (const r of rivals.slice(0, 12))
    notes.offers.push({
      label: `${label(r)} as flux`,
      adds: true,
      choices: { fluxColumn: r.column.name || String(r.index + 1), errorColumn: undefined, wavelengthColumn: undefined },
    });
  const calibrated = rivals.find((r) => /flam|f_?lambda|f_?nu/i.test(r.column.name) && /count|cts|adu|dn/i.test(flux.column.name));
  if (calibrated && !chosen) {
    warn(notes, 'calibrated-flux-there', `${label(flux)} is in counts; ${label(calibrated)} holds calibrated fluxes`, {
      where: place,
      doThis: `Choose ${calibrated.column.name} as flux where line ratios matter.`,
    });
  }
}

function noColumn(what: 'wavelength' | 'flux' | 'velocity', columns: readonly Column[], file: string, place: Place): ProblemError {
  const names =
    columns
      .slice(0, 12)
      .map((c) => c.name || '(no name)')
      .join(', ') + (columns.length > 12 ? ', ...' : '');
  return new ProblemError({
    code: what === 'flux' ? 'no-flux-column' : 'no-wavelength-column',
    where: { file, ...place },
    found: what === 'velocity' ? `a velocity but no wavelength among the columns ${names}` : `no ${what} among the columns ${names}`,
    expected: 'columns of wavelength and flux',
    doThis: `Choose the column that holds the ${what === 'flux' ? 'flux' : 'wavelength'}, or rename it in the file.`,
  });
}
