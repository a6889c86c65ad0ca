import { ProblemError, type Remark } from '../problems/index.ts';
import type { Medium } from '../spectrum/index.ts';
import { assumeMedium } from './assumeMedium.ts';
import { findColumn } from './chooseColumns.ts';
import { nameWords, roleOf } from './columnRoles.ts';
import type { Column } from './columns.ts';
import { unitOfColumn } from './columnsToSpectrum.ts';
import { mediumInColumn } from './mediumWords.ts';
import { count, newNotes, noteFact, warn } from './notes.ts';
import type { ByteSource, Fact, ReadingChoices, ReadingControl } from './reading.ts';
import { unpacked } from './readSpectrum.ts';
import { toAngstrom } from './spectralUnits.ts';
import { readTextTable, surroundings } from './text/textSpectrum.ts';

/** Lines somebody has measured already; all arrays of length n, in the order of the file. */
export interface LineListReading {
  /** Angstrom in `medium`. */
  readonly wavelength: Float64Array;
  readonly wavelengthErr?: Float64Array;
  /** Integrated, in the file's unit; NaN where the file has none. */
  readonly flux: Float64Array;
  readonly fluxErr?: Float64Array;
  /** Angstrom. */
  readonly fwhm?: Float64Array;
  readonly medium: Medium;
  readonly mediumStated: boolean;
  readonly fluxUnit: string;
  readonly how: readonly Fact[];
  readonly remarks: readonly Remark[];
  readonly choices: ReadingChoices;
}

/**
 * Reads a list of measured lines from delimited text: columns `wavelength` and `flux`, optional `wavelength_err`, `flux_err`, `fwhm`.
 *
 * @throws ProblemError when the file is no such list
 */
export async function readLineList(
  source: ByteSource,
  choices: ReadingChoices = {},
  control: ReadingControl = {},
): Promise<LineListReading> {
  control.signal?.throwIfAborted();
  const opened = await unpacked(source, control);
  const notes = newNotes(source.name);
  const { columns, layout } = await readTextTable(opened, notes, control);
  const around = surroundings(layout, source.name, notes);
  const pick = (choice: string | undefined, fits: (c: Column) => boolean) =>
    choice && choice !== 'none' ? columns[findColumn(columns, choice, source.name, {})] : columns.find((c) => c.kind !== 'text' && fits(c));
  const isError = (c: Column) => nameWords(c.name).some((w) => /^(err|error|e|sigma|sig|unc|uncertainty|d)$/.test(w));
  const isWidth = (c: Column) => /fwhm|width/i.test(c.name);
  const isCentre = (c: Column) =>
    /^(centroid|centre|center|cen|wavelength_obs|lambda_obs|wave_obs|obs_wave|observed_wavelength)$/i.test(c.name);
  const wavelength =
    pick(choices.wavelengthColumn, (c) => isCentre(c)) ??
    pick(undefined, (c) => roleOf(c).role === 'wavelength' && !isError(c)) ??
    unnamed(columns, 0);
  const flux = pick(choices.fluxColumn, (c) => roleOf(c).role === 'flux' && c !== wavelength) ?? unnamed(columns, 1);
  if (!wavelength || !flux) throw missingColumn(wavelength ? 'flux' : 'wavelength', columns, source.name);
  const wavelengthErr = pick(undefined, (c) => isError(c) && /wave|lam|cen|wl/i.test(c.name));
  const fluxErr =
    choices.errorColumn === 'none'
      ? undefined
      : pick(choices.errorColumn, (c) => isError(c) && c !== wavelengthErr && !isWidth(c) && !/wave|lam|cen|ew\b|eqw|vel/i.test(c.name));
  const fwhm = pick(undefined, (c) => isWidth(c) && !isError(c) && !/kms|km_s|km\/s|vel/i.test(c.name + c.unit));

  const stored = await wavelength.read();
  const unit = unitOfColumn(wavelength, stored, around, choices, notes);
  const inAngstrom = toAngstrom(stored, unit);
  const fluxes = await flux.read();
  const rows = Uint32Array.from(Array.from(inAngstrom.keys()).filter((i) => inAngstrom[i] > 0));
  if (rows.length === 0) throw missingColumn('wavelength', columns, source.name);
  const lost = inAngstrom.length - rows.length;
  if (lost) warn(notes, 'lines-without-wavelength', `${count(lost, 'line')} without a wavelength left out`);
  const keep = (values: Float64Array, scale = 1) => Float64Array.from(rows, (i) => values[i] * scale);
  const scale = unit.quantity === 'wavelength' && !unit.log ? unit.scale : Number.NaN;
  const kept = keep(inAngstrom);

  const stated = choices.medium ? { medium: choices.medium, evidence: 'chosen by you' } : (mediumInColumn(wavelength) ?? around.medium);
  const assumed = stated ? undefined : assumeMedium(kept.slice().sort(), around.maker ?? '');
  if (assumed)
    warn(
      notes,
      'medium-assumed',
      `the file does not say whether its wavelengths are in air or in vacuum; ${assumed.medium} is assumed because ${assumed.reason}`,
      { doThis: 'Say which: the difference is about 80 km/s.' },
    );
  noteFact(notes, 'medium', stated?.medium ?? `${assumed?.medium} (assumed)`, stated?.evidence ?? assumed?.reason ?? '');
  noteFact(notes, 'wavelength', `column ${wavelength.name}`, 'its name or place');
  noteFact(notes, 'flux', `column ${flux.name}`, 'its name or place');
  noteFact(notes, 'lines', String(rows.length), 'counted');
  return {
    wavelength: kept,
    flux: keep(fluxes),
    ...(wavelengthErr ? { wavelengthErr: keep(await wavelengthErr.read(), scale) } : {}),
    ...(fluxErr ? { fluxErr: keep(await fluxErr.read()) } : {}),
    ...(fwhm ? { fwhm: keep(await fwhm.read(), scale) } : {}),
    medium: stated?.medium ?? assumed?.medium ?? 'air',
    mediumStated: stated !== undefined,
    fluxUnit: flux.unit || around.fluxUnit?.unit || '',
    how: notes.how,
    remarks: notes.remarks,
    choices: { ...choices, wavelengthColumn: wavelength.name, fluxColumn: flux.name, errorColumn: fluxErr?.name ?? 'none' },
  };
}

/** Columns without names are taken in order. */
const unnamed = (columns: readonly Column[], k: number) => (columns.every((c, i) => c.name === String(i + 1)) ? columns[k] : undefined);

const missingColumn = (what: string, columns: readonly Column[], file: string) =>
  new ProblemError({
    code: `no-${what}-column`,
    where: { file },
    found: `no ${what} among the columns ${columns
      .slice(0, 12)
      .map((c) => c.name)
      .join(', ')}`,
    expected: 'columns wavelength and flux, optional wavelength_err, flux_err, fwhm',
    doThis: `Name the column of the ${what} \`${what}\` in the first line.`,
  });
