import { type Place, ProblemError } from '../problems/index.ts';
import type { Medium, Spectrum } from '../spectrum/index.ts';
import { AIR_LIMIT } from '../units/index.ts';
import { assumeMedium } from './assumeMedium.ts';
import { type ErrorValues, sigmaOf } from './errorValues.ts';
import type { MediumEvidence } from './mediumWords.ts';
import { maskMissing } from './missing.ts';
import { count, type Notes, noteFact, warn } from './notes.ts';
import type { Reading, ReadingChoices } from './reading.ts';
import { sortAndJoin } from './sortAndJoin.ts';

/** Arrays of one spectrum as a file gives them, all of length n, already in Angstrom; the assembler owns them. */
export interface RawSpectrum {
  readonly name: string;
  readonly place: Place;
  /** Angstrom as stored, any order; NaN where there is none. */
  readonly wavelength: Float64Array;
  readonly flux: Float64Array;
  readonly fluxUnit: string;
  readonly error?: ErrorValues;
  /** 1 = bad by the file's own flags. */
  readonly flagged?: Uint8Array;
  /** What the file says of the medium. */
  readonly medium?: MediumEvidence;
  /** Telescope, instrument, survey: words for the assumption about the medium. */
  readonly maker?: string;
  readonly frame?: string;
  readonly restFrame?: string;
  readonly resolvingPower?: number;
  /** Values of flux the file declares to mean "missing". */
  readonly missingValues?: readonly number[];
  readonly columns?: Reading['columns'];
}

/** Fewer samples are no spectrum. */
const LEAST_SAMPLES = 2;
/** Fewer samples, over more than this factor in wavelength, are photometry rather than a spectrum. */
const PHOTOMETRY_SAMPLES = 1000;
const PHOTOMETRY_SPAN = 20;
/** So few samples resolve no line. */
const SPARSE_SAMPLES = 30;

/**
 * Sorts, masks and labels the samples: the last stage of every reader.
 *
 * @throws ProblemError when fewer than two samples have a wavelength and a flux
 */
export function assemble(raw: RawSpectrum, choices: ReadingChoices, taken: ReadingChoices, notes: Notes): Reading {
  const { place } = raw;
  const sigma = raw.error ? sigmaOf(raw.error, raw.flux, notes, place) : undefined;
  const sorted = sortAndJoin({ wavelength: raw.wavelength, flux: raw.flux, fluxErr: sigma, flagged: raw.flagged }, notes, place);
  const { wavelength, flux, fluxErr } = sorted;
  const n = wavelength.length;
  if (n < LEAST_SAMPLES) {
    throw new ProblemError({
      code: 'too-few-samples',
      where: { file: notes.file, ...place },
      found: `only ${count(n, 'sample')} with a wavelength`,
      expected: 'a spectrum of at least two samples',
      doThis: 'Choose other columns or another part of the file.',
    });
  }
  const missing = choices.missingValue === undefined ? (raw.missingValues ?? []) : [choices.missingValue];
  const { masked, keptErr } = maskMissing({ ...sorted, fluxErr }, missing, notes, place);
  correctVelocity(wavelength, choices, notes);

  const { medium, mediumStated } = settleMedium(raw, wavelength, choices, notes);
  if (raw.frame)
    noteFact(
      notes,
      'frame',
      raw.frame,
      choices.velocityCorrectionKms === undefined ? 'the file says so; wavelengths are shown as stored, not corrected' : 'the file says so',
    );
  if (raw.restFrame) {
    warn(notes, 'rest-frame', `the wavelengths are already in the rest frame: ${raw.restFrame}`, {
      doThis: 'Use a redshift of 0: it must not be taken out twice.',
    });
  }
  remarkOnRange(wavelength, flux, notes, place);
  const usable = masked.reduce((sum, m) => sum + 1 - m, 0);
  noteFact(
    notes,
    'samples',
    `${n}, of which ${n - usable} masked, ${shortest(wavelength[0])} to ${shortest(wavelength[n - 1])} Angstrom`,
    'counted',
  );
  const spectrum: Spectrum = {
    name: raw.name,
    wavelength,
    flux,
    ...(keptErr ? { fluxErr: keptErr } : {}),
    masked,
    medium,
    fluxUnit: raw.fluxUnit,
    ...(raw.resolvingPower ? { resolvingPower: raw.resolvingPower } : {}),
  };
  const all: ReadingChoices = { ...taken, ...(choices.medium ? { medium: choices.medium } : {}), ...carried(choices) };
  return {
    spectrum,
    mediumStated,
    how: notes.how,
    // an offer that only adds to this reading keeps the rest of it
    offers: notes.offers.map((offer) => (offer.adds ? { label: offer.label, choices: { ...all, ...offer.choices } } : offer)),
    remarks: notes.remarks,
    choices: all,
    ...(raw.columns ? { columns: raw.columns } : {}),
    ...(raw.frame ? { frame: raw.frame } : {}),
  };
}

/** Choices that stand as the user made them. */
function carried({ wavelengthUnit, missingValue, velocityCorrectionKms }: ReadingChoices): ReadingChoices {
  return {
    ...(wavelengthUnit ? { wavelengthUnit } : {}),
    ...(missingValue !== undefined ? { missingValue } : {}),
    ...(velocityCorrectionKms !== undefined ? { velocityCorrectionKms } : {}),
  };
}

const SPEED_OF_LIGHT_KMS = 299_792.458;

function correctVelocity(wavelength: Float64Array, { velocityCorrectionKms: v }: ReadingChoices, notes: Notes): void {
  if (v === undefined || v === 0) return;
  if (!(Math.abs(v) < SPEED_OF_LIGHT_KMS)) throw new RangeError(`velocity correction ${v} km/s: below the speed of light`);
  for (let i = 0; i < wavelength.length; i++) wavelength[i] *= 1 + v / SPEED_OF_LIGHT_KMS;
  noteFact(notes, 'velocity correction', `${v} km/s`, 'chosen by you; every wavelength was multiplied by 1 + v/c');
}

function settleMedium(
  raw: RawSpectrum,
  wavelength: Float64Array,
  choices: ReadingChoices,
  notes: Notes,
): { medium: Medium; mediumStated: boolean } {
  if (choices.medium) {
    noteFact(notes, 'medium', choices.medium, 'chosen by you');
    if (raw.medium && raw.medium.medium !== choices.medium) {
      warn(notes, 'medium-contradicts-file', `you chose ${choices.medium}, but the file says ${raw.medium.medium}: ${raw.medium.evidence}`);
    }
    return { medium: choices.medium, mediumStated: true };
  }
  if (raw.medium) {
    noteFact(notes, 'medium', raw.medium.medium, raw.medium.evidence);
    return { medium: raw.medium.medium, mediumStated: true };
  }
  const { medium, reason } = assumeMedium(wavelength, raw.maker ?? '');
  noteFact(notes, 'medium', `${medium} (assumed)`, reason);
  warn(
    notes,
    'medium-assumed',
    `the file does not say whether its wavelengths are in air or in vacuum; ${medium} is assumed because ${reason}`,
    {
      doThis: 'Say which: the difference is about 80 km/s.',
    },
  );
  return { medium, mediumStated: false };
}

function remarkOnRange(wavelength: Float64Array, flux: Float64Array, notes: Notes, place: Place): void {
  const n = wavelength.length;
  const span = wavelength[n - 1] / wavelength[0];
  if (n < SPARSE_SAMPLES || (span > PHOTOMETRY_SPAN && n < PHOTOMETRY_SAMPLES)) {
    warn(
      notes,
      'not-a-line-spectrum',
      `${count(n, 'sample')} over a factor ${Number(span.toPrecision(3))} in wavelength: this looks like photometry or a very coarse spectrum`,
      {
        doThis: 'Lines cannot be measured in it.',
        where: place,
      },
    );
  } else if (wavelength[0] < 100 || wavelength[n - 1] > 1e9) {
    warn(notes, 'unusual-wavelengths', `the wavelengths run from ${shortest(wavelength[0])} to ${shortest(wavelength[n - 1])} Angstrom`, {
      doThis: 'Check the unit of the wavelengths.',
      where: place,
    });
  }
  if (n > 2 && wavelength[n - 1] > AIR_LIMIT && flux.length > 2) {
    const negative = flux.reduce((sum, f) => sum + (f < 0 ? 1 : 0), 0);
    if (negative > n / 2)
      warn(notes, 'mostly-negative', `${negative} of ${n} fluxes are negative`, {
        where: place,
        doThis: 'Check that the right column is taken as flux.',
      });
  }
}

const shortest = (value: number) => String(Number(value.toPrecision(9)));
