import type { RankedColumn } from './columns.ts';

interface Guess {
  readonly wavelength?: RankedColumn;
  readonly flux?: RankedColumn;
  readonly error?: RankedColumn;
}

/** Columns looked at; more are never told apart by numbers alone. */
const MOST_COLUMNS = 40;

/**
 * Tells wavelength, flux and error apart by their numbers: the wavelength never turns back and is positive, a counter 0, 1, 2 ... is none;
 * the flux is the next column; a positive column after it, smaller than the flux, is its error.
 */
export async function guessByNumbers(
  free: readonly RankedColumn[],
  knownWave: RankedColumn | undefined,
  knownFlux: RankedColumn | undefined,
  columns: number,
): Promise<Guess> {
  const numeric = free
    .filter((r) => r.column.kind !== 'text' && r.column.kind !== 'logical' && r.column.samples >= 2 && isOpen(r))
    .slice(0, MOST_COLUMNS);
  const values = new Map<number, Float64Array>();
  for (const r of numeric) values.set(r.index, await r.column.read());
  const by = (reason: string, r: RankedColumn): RankedColumn => ({ ...r, reason });

  let wavelength: RankedColumn | undefined;
  if (!knownWave) {
    const found = numeric.find((r) => isAxis(values.get(r.index) ?? new Float64Array()));
    wavelength =
      found &&
      by(
        columns === 2 && found.index === 0
          ? 'the first of two columns; its numbers never turn back'
          : 'its numbers are positive and never turn back',
        found,
      );
  }
  const wave = wavelength ?? knownWave;
  if (!wave) return {};
  const rest = numeric.filter((r) => r.index !== wave.index && r.role !== 'wavelength');
  let flux: RankedColumn | undefined;
  if (!knownFlux) {
    const found =
      rest.find((r) => r.index > wave.index && varies(values.get(r.index))) ??
      rest.find((r) => varies(values.get(r.index))) ??
      rest.find((r) => r.index > wave.index);
    flux = found && by(found.index === wave.index + 1 ? 'it follows the wavelength' : 'the first column of varying numbers', found);
  }
  const fluxAt = (flux ?? knownFlux)?.index ?? -1;
  const fluxValues = flux && values.get(flux.index);
  const third = fluxValues && rest.find((r) => r.index === fluxAt + 1);
  const thirdValues = third && values.get(third.index);
  const error =
    third && thirdValues && looksLikeErrors(thirdValues, fluxValues)
      ? by('it follows the flux and is positive throughout', third)
      : undefined;
  return { ...(wavelength ? { wavelength } : {}), ...(flux ? { flux } : {}), ...(error ? { error } : {}) };
}

/** A column whose name already says that it is something else is not guessed at. */
const isOpen = ({ role, column }: RankedColumn) =>
  role === 'other' || role === 'flux' || role === 'wavelength' ? !/sky|mask|flag|err|sig|var|back/i.test(column.name) : false;

/** Positive, never turning back (one or two slips allowed), and not a counter. */
function isAxis(values: Float64Array): boolean {
  let rises = 0;
  let falls = 0;
  let unit = 0;
  let known = 0;
  let last = Number.NaN;
  for (const v of values) {
    if (Number.isNaN(v)) continue;
    if (!(v > 0) && !(v === 0 && known === 0)) return false;
    known++;
    if (v > last) rises++;
    if (v < last) falls++;
    if (v - last === 1) unit++;
    last = v;
  }
  if (known < 2 || (rises === 0 && falls === 0)) return false;
  const first = values[0];
  if ((first === 0 || first === 1) && unit === known - 1) return false;
  const slips = Math.min(rises, falls);
  return slips <= Math.max(0, Math.floor(known * 0.02));
}

function varies(values: Float64Array | undefined): boolean {
  if (!values) return false;
  for (let i = 1; i < values.length; i++) if (values[i] !== values[0] && Number.isFinite(values[i])) return true;
  return false;
}

function looksLikeErrors(errors: Float64Array, flux: Float64Array): boolean {
  let positive = 0;
  let smaller = 0;
  let known = 0;
  for (let i = 0; i < errors.length; i++) {
    if (!Number.isFinite(errors[i])) continue;
    known++;
    if (errors[i] < 0) return false;
    if (errors[i] > 0) positive++;
    if (errors[i] <= 3 * Math.abs(flux[i])) smaller++;
  }
  return known > errors.length / 2 && positive > known / 2 && smaller > known / 4;
}
