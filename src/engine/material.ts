import type { Feature } from '../measure/index.ts';
import { type ByteSource, type ReadingChoices, type ReadingControl, readLineList, readSpectrum } from '../readers/index.ts';
import { countUsable, type Medium, type Spectrum } from '../spectrum/index.ts';
import { kmsFromWidth } from '../units/index.ts';
import type { ReadingView } from './analysis.ts';
import { UNKNOWN_CENTROID_ERR_KMS } from './marksOf.ts';

export type SourceKind = 'spectrum' | 'line-list';

/** What came out of the file: samples still to be measured, or features the user measured himself. */
export interface Material {
  readonly reading: ReadingView;
  readonly spectrum?: Spectrum;
  /** Of a line list; empty for a spectrum. */
  readonly features: readonly Feature[];
}

/** Bytes looked at to tell a list of lines from a spectrum. */
const HEAD_BYTES = 4096;
/** Column names that only a list of measured lines has. */
const LIST_COLUMN = /\b(wavelength_err|wave_err|centroid(_err)?|fwhm|ew|line)\b/i;

/** A text whose header names columns of measured lines is a list; everything else is a spectrum. */
export async function guessKind(source: ByteSource): Promise<SourceKind> {
  const head = new TextDecoder('latin1').decode(await source.read(0, Math.min(source.size, HEAD_BYTES)));
  if (head.startsWith('SIMPLE') || head.charCodeAt(0) === 0x1f) return 'spectrum';
  const header = head.split(/\r?\n/).find((line) => line.trim() !== '' && !line.startsWith('#'));
  return header !== undefined && LIST_COLUMN.test(header) && /wave|lambda|centroid/i.test(header) ? 'line-list' : 'spectrum';
}

/** @throws ProblemError when the file cannot be read as chosen */
export async function readMaterial(
  source: ByteSource,
  kind: SourceKind,
  choices: ReadingChoices,
  control: ReadingControl,
): Promise<Material> {
  if (kind === 'line-list') return readList(source, choices);
  const reading = await readSpectrum(source, choices, control);
  const { spectrum } = reading;
  return {
    spectrum,
    features: [],
    reading: {
      name: spectrum.name,
      kind,
      medium: spectrum.medium,
      mediumStated: reading.mediumStated,
      fluxUnit: spectrum.fluxUnit,
      samples: spectrum.wavelength.length,
      maskedSamples: spectrum.wavelength.length - countUsable(spectrum),
      how: reading.how,
      offers: reading.offers,
      ...(reading.columns ? { columns: reading.columns } : {}),
      choices: reading.choices,
      remarks: reading.remarks,
    },
  };
}

async function readList(source: ByteSource, choices: ReadingChoices): Promise<Material> {
  const list = await readLineList(source, choices);
  const order = Array.from(list.wavelength.keys()).sort((a, b) => list.wavelength[a] - list.wavelength[b]);
  const medium: Medium = list.medium;
  const features = order.map((row, index): Feature => {
    const flux = list.flux[row];
    const fluxErr = list.fluxErr?.[row] ?? Number.NaN;
    const centroid = list.wavelength[row];
    const fwhm = list.fwhm?.[row] ?? Number.NaN;
    return {
      index,
      kind: flux < 0 ? 'absorption' : 'emission',
      centroid,
      centroidErr: list.wavelengthErr?.[row] ?? Number.NaN,
      flux,
      fluxErr,
      fwhm,
      fwhmErr: Number.NaN,
      ...(Number.isFinite(fwhm) ? { intrinsicFwhmKms: kmsFromWidth(fwhm, centroid) } : {}),
      ew: Number.NaN,
      ewErr: Number.NaN,
      snr: Math.abs(flux) / fluxErr,
      continuum: Number.NaN,
      group: index,
      fit: { ended: 'converged' },
      notes: [],
    };
  });
  return {
    features,
    reading: {
      name: source.name,
      kind: 'line-list',
      medium,
      mediumStated: list.mediumStated,
      fluxUnit: '',
      samples: features.length,
      maskedSamples: 0,
      how: list.how,
      offers: [],
      choices: list.choices,
      remarks: list.wavelengthErr
        ? list.remarks
        : [
            ...list.remarks,
            {
              code: 'no-wavelength-errors',
              weight: 'note',
              where: { file: source.name },
              found: `the list has no wavelength errors; a quarter of the line width is taken, or ${UNKNOWN_CENTROID_ERR_KMS} km/s where that is not known either`,
            },
          ],
    },
  };
}
