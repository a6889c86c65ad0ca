import { nearestWord, ProblemError, type Remark } from '../problems/index.ts';
import type { Medium, Spectrum } from '../spectrum/index.ts';
import type { Reading, ReadingChoices } from './reading.ts';
import { likelyUnit, unitNamed, type WavelengthUnit, wavelengthUnit } from './wavelengthUnits.ts';

/** Columns of numbers as any format delivers them. */
export interface NumberTable {
  readonly file: string;
  /** "delimited text", "FITS binary table" ... */
  readonly format: string;
  readonly hdu?: number;
  readonly columns: readonly NumberColumn[];
  /** All free text that may say something about the medium: comments, header cards, column names. */
  readonly text: string;
  /** Facts of the format itself, in order. */
  readonly how: Reading['how'];
  readonly offers: Reading['offers'];
  readonly remarks: readonly Remark[];
  /** What the file states outright, by keyword. */
  readonly stated?: {
    readonly medium?: Medium;
    readonly resolvingPower?: number;
    readonly fluxUnit?: string;
    readonly log10Wavelength?: boolean;
  };
}

export interface NumberColumn {
  /** Empty when the file has no names. */
  readonly name: string;
  readonly unit: string;
  readonly values: Float64Array;
}

const WAVELENGTH =
  /^(wave(length|len)?s?|lam(bda|da)?|wl|wvl|awav|vwav|loglam|log_?(wave|lambda)|ang(strom)?s?|λ|spectral_?axis|x)\d?(?![a-z])/i;
const FLUX = /^(flux(es)?|f_?lam(bda)?|flam|intensity|counts?|fnu|signal|flux_?density|y|data|spec(trum)?|brightness)(?![a-z])/i;
const ERROR =
  /^(e_?flux|flux_?(err(or)?|unc(ertainty)?|sigma|std)|(e_?)?err(or)?s?|sigma|sig|noise|unc(ertainty)?|stat_?err(or)?|std|dflux|rms)\b/i;
const INVERSE_VARIANCE = /^(ivar|inv_?var(iance)?|flux_?ivar|weights?)\b/i;
const VARIANCE = /^(var(iance)?|flux_?var)\b/i;
const MASK = /^(mask|and_?mask|flag|quality|dq|bad)\b/i;

/** The spectrum in a table of numbers: finds the columns, turns units, sorts, masks, and says what it assumed. */
export function spectrumOfColumns(table: NumberTable, choices: ReadingChoices): Reading {
  const remarks: Remark[] = [...table.remarks];
  const roles = findRoles(table, choices);
  const how: { fact: string; value: string; reason: string }[] = [...table.how];
  how.push({ fact: 'wavelength column', value: label(table, roles.wavelength), reason: roles.why });
  how.push({ fact: 'flux column', value: label(table, roles.flux), reason: roles.why });
  how.push({
    fact: 'errors',
    value: roles.error ? `${label(table, roles.error)} (${roles.errorIs})` : 'none',
    reason: roles.error ? roles.why : 'no column of errors was found',
  });

  const logarithmic = table.stated?.log10Wavelength ?? /^log/i.test(roles.wavelength.name);
  const raw = logarithmic ? roles.wavelength.values.map((v) => 10 ** v) : roles.wavelength.values;
  const unit = chooseUnit(table, roles.wavelength, raw, choices, remarks);
  how.push({ fact: 'wavelength unit', value: logarithmic ? `log10 of ${unit.unit.name}` : unit.unit.name, reason: unit.reason });
  const samples = tidy(table.file, raw, unit.unit.angstroms, roles, remarks);
  const medium = chooseMedium(table, samples.wavelength, choices);
  how.push({ fact: 'wavelengths in', value: medium.medium, reason: medium.reason });
  if (!medium.stated) {
    remarks.push({
      code: 'medium-assumed',
      weight: 'warning',
      where: { file: table.file },
      found: `nothing says whether wavelengths are in air or vacuum; ${medium.medium} is assumed`,
      doThis: 'Say which it is.',
    });
  }
  const fluxUnit = table.stated?.fluxUnit ?? roles.flux.unit;
  how.push({ fact: 'flux unit', value: fluxUnit || 'unknown', reason: fluxUnit ? 'stated in the file' : 'not stated' });
  const spectrum: Spectrum = {
    name: table.file,
    ...samples,
    medium: medium.medium,
    fluxUnit,
    ...(table.stated?.resolvingPower ? { resolvingPower: table.stated.resolvingPower } : {}),
  };
  return { spectrum, mediumStated: medium.stated, how, offers: table.offers, remarks, choices };
}

interface Roles {
  readonly wavelength: NumberColumn;
  readonly flux: NumberColumn;
  readonly error?: NumberColumn;
  readonly errorIs: 'one sigma' | 'variance' | 'inverse variance';
  readonly mask?: NumberColumn;
  readonly why: string;
}

function findRoles(table: NumberTable, choices: ReadingChoices): Roles {
  const { columns } = table;
  const chosen = (word: string | undefined) => (word === undefined ? undefined : columnCalled(table, word));
  const byName = (pattern: RegExp, not: readonly (NumberColumn | undefined)[]) =>
    columns.find((c) => pattern.test(c.name.trim()) && !not.includes(c));
  let wavelength = chosen(choices.wavelengthColumn) ?? byName(WAVELENGTH, []) ?? columns.find((c) => wavelengthUnit(c.unit));
  let flux = chosen(choices.fluxColumn) ?? byName(FLUX, [wavelength]);
  let why = 'by its name';
  if (!wavelength || !flux) {
    if (columns.length < 2) {
      throw new ProblemError({
        code: 'too-few-columns',
        where: { file: table.file, hdu: table.hdu },
        found: `${columns.length} column of numbers`,
        expected: 'a column of wavelengths and one of fluxes',
        doThis: 'Add the wavelengths to the file.',
      });
    }
    wavelength ??= columns.find((c) => c !== flux) ?? columns[0];
    flux ??= columns.find((c) => c !== wavelength) ?? columns[1];
    why = 'by its place: the first column is taken for wavelength, the next for flux';
  }
  const taken = [wavelength, flux];
  const wanted = choices.errorColumn;
  const sigma = wanted === 'none' ? undefined : (chosen(wanted) ?? byName(ERROR, taken));
  const ivar = wanted === undefined && !sigma ? byName(INVERSE_VARIANCE, taken) : undefined;
  const variance = wanted === undefined && !sigma && !ivar ? byName(VARIANCE, taken) : undefined;
  const unnamed = columns.every((c) => c.name === '');
  const third =
    wanted === undefined && !sigma && !ivar && !variance && unnamed && columns.length === 3
      ? columns.find((c) => !taken.includes(c))
      : undefined;
  const error = sigma ?? ivar ?? variance ?? third;
  const errorIs =
    error && (error === ivar || INVERSE_VARIANCE.test(error.name))
      ? 'inverse variance'
      : error && (error === variance || VARIANCE.test(error.name))
        ? 'variance'
        : 'one sigma';
  return { wavelength, flux, error, errorIs, mask: byName(MASK, [...taken, error]), why };
}

function columnCalled(table: NumberTable, word: string): NumberColumn {
  const found = table.columns.find((c) => c.name === word) ?? (/^\d+$/.test(word) ? table.columns[Number(word) - 1] : undefined);
  if (found) return found;
  const near = nearestWord(
    word,
    table.columns.map((c) => c.name),
  );
  throw new ProblemError({
    code: 'no-such-column',
    where: { file: table.file, hdu: table.hdu, column: word },
    found: `no column ${word}`,
    expected: `one of ${table.columns.map((c, k) => c.name || String(k + 1)).join(', ')}`,
    doThis: near ? `Did you mean ${near}?` : undefined,
  });
}

const label = (table: NumberTable, column: NumberColumn) => column.name || `column ${table.columns.indexOf(column) + 1}`;

function chooseUnit(
  table: NumberTable,
  column: NumberColumn,
  raw: Float64Array,
  choices: ReadingChoices,
  remarks: Remark[],
): { unit: WavelengthUnit; reason: string } {
  if (choices.wavelengthUnit) return { unit: unitNamed(choices.wavelengthUnit), reason: 'chosen by you' };
  const stated = wavelengthUnit(column.unit);
  if (stated) return { unit: stated, reason: `stated in the file: ${column.unit}` };
  const said =
    /wavelengths?[^.\n]{0,40}?\b(angstroms?|nm|nanomet(?:er|re)s?|um|µm|microns?)\b/i.exec(table.text)?.[1] ??
    /\b(?:in|unit:?|\[|\()\s*(angstroms?|nm|microns?|um)\b/i.exec(table.text)?.[1];
  const worded = said ? wavelengthUnit(said) : undefined;
  if (worded) return { unit: worded, reason: `the file's text says ${said}` };
  const finite = raw.filter((v) => Number.isFinite(v) && v > 0);
  const low = finite.reduce((a, b) => Math.min(a, b), Number.POSITIVE_INFINITY);
  const high = finite.reduce((a, b) => Math.max(a, b), 0);
  const unit = likelyUnit(low, high);
  if (!unit) {
    throw new ProblemError({
      code: 'not-wavelengths',
      where: { file: table.file, hdu: table.hdu, column: label(table, column) },
      found: finite.length === 0 ? 'no positive numbers' : `numbers from ${low.toPrecision(6)} to ${high.toPrecision(6)}`,
      expected: 'wavelengths in Angstrom, nm or um',
      doThis: 'Choose the column of wavelengths and its unit.',
    });
  }
  const range = `${low.toPrecision(6)} to ${high.toPrecision(6)}`;
  remarks.push({
    code: 'unit-assumed',
    weight: 'note',
    where: { file: table.file, column: label(table, column) },
    found: `no wavelength unit is stated; ${range} is taken for ${unit.name}`,
  });
  return { unit, reason: `not stated; the numbers run from ${range}` };
}

function chooseMedium(
  table: NumberTable,
  wavelength: Float64Array,
  choices: ReadingChoices,
): { medium: Medium; stated: boolean; reason: string } {
  if (choices.medium) return { medium: choices.medium, stated: true, reason: 'chosen by you' };
  if (table.stated?.medium) return { medium: table.stated.medium, stated: true, reason: 'stated by keyword' };
  const air = /\bair\b|\bawav\b|in air/i.test(table.text);
  const vacuum = /\bvac(uum)?\b/i.test(table.text);
  if (air !== vacuum) return { medium: air ? 'air' : 'vacuum', stated: true, reason: 'the file says so in its text' };
  const first = wavelength[0];
  const last = wavelength[wavelength.length - 1];
  if (last < 2000)
    return { medium: 'vacuum', stated: true, reason: 'below 2000 A wavelengths are always given in vacuum (common practice)' };
  if (first < 2000 || last > 25_000)
    return { medium: 'vacuum', stated: false, reason: 'not stated; ultraviolet and infrared spectra are mostly in vacuum' };
  return { medium: 'air', stated: false, reason: 'not stated; ground-based optical spectra are mostly in air' };
}

/** Sorted, strictly ascending samples with their mask; what had to be done about it is a remark. */
function tidy(
  file: string,
  raw: Float64Array,
  angstroms: number,
  roles: Roles,
  remarks: Remark[],
): Pick<Spectrum, 'wavelength' | 'flux' | 'fluxErr' | 'masked'> {
  const n = raw.length;
  let order: number[] = [];
  for (let i = 0; i < n; i++) if (Number.isFinite(raw[i]) && raw[i] > 0) order.push(i);
  const without = n - order.length;
  if (without > 0)
    remarks.push({ code: 'no-wavelength', weight: 'note', where: { file }, found: `${without} rows without a wavelength were left out` });
  const ascending = order.every((i, k) => k === 0 || raw[i] > raw[order[k - 1]]);
  if (!ascending) {
    const descending = order.every((i, k) => k === 0 || raw[i] < raw[order[k - 1]]);
    order = descending ? order.reverse() : order.sort((a, b) => raw[a] - raw[b] || a - b);
    if (!descending)
      remarks.push({
        code: 'unsorted',
        weight: 'warning',
        where: { file },
        found: 'the wavelengths do not ascend; the samples were sorted',
      });
    const before = order.length;
    order = order.filter((i, k) => k === 0 || raw[i] > raw[order[k - 1]]);
    if (order.length < before)
      remarks.push({
        code: 'duplicates',
        weight: 'warning',
        where: { file },
        found: `${before - order.length} samples repeat a wavelength; the first of each was kept`,
      });
  }
  if (order.length < 2) {
    throw new ProblemError({
      code: 'too-few-samples',
      where: { file },
      found: `${order.length} samples with a wavelength`,
      expected: 'at least 2',
    });
  }
  const flux = Float64Array.from(order, (i) => roles.flux.values[i]);
  const fluxErr = roles.error && errorsOf(roles.error.values, roles.errorIs, order);
  const masked = Uint8Array.from(order, (i, k) => {
    const flagged = roles.mask !== undefined && roles.mask.values[i] > 0;
    return flagged || !Number.isFinite(flux[k]) || (fluxErr !== undefined && !(fluxErr[k] > 0 && Number.isFinite(fluxErr[k]))) ? 1 : 0;
  });
  const missing = masked.reduce((sum, m) => sum + m, 0);
  if (missing === masked.length)
    throw new ProblemError({
      code: 'nothing-usable',
      where: { file },
      found: 'every sample is missing, flagged or without a positive error',
      doThis: 'Choose another flux or error column.',
    });
  if (missing > 0)
    remarks.push({
      code: 'masked',
      weight: 'note',
      where: { file },
      found: `${missing} of ${masked.length} samples are missing, flagged or without a positive error and are not used`,
    });
  return { wavelength: Float64Array.from(order, (i) => raw[i] * angstroms), flux, ...(fluxErr ? { fluxErr } : {}), masked };
}

function errorsOf(values: Float64Array, are: Roles['errorIs'], order: readonly number[]): Float64Array {
  return Float64Array.from(order, (i) => {
    const v = values[i];
    if (are === 'inverse variance') return v > 0 ? 1 / Math.sqrt(v) : Number.NaN;
    return are === 'variance' ? (v > 0 ? Math.sqrt(v) : Number.NaN) : v;
  });
}
