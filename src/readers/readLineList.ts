import { ProblemError, type Remark } from '../problems/index.ts';
import type { Medium } from '../spectrum/index.ts';
import { type NumberColumn, spectrumOfColumns } from './columns.ts';
import type { ByteSource, Reading, ReadingChoices } from './reading.ts';
import { wholeText } from './readSpectrum.ts';
import { readTextTable } from './text/readText.ts';

/** Lines measured elsewhere; arrays one value a line in the order of the file, Angstrom in `medium`. */
export interface MeasuredList {
  readonly wavelength: Float64Array;
  /** One sigma. */
  readonly wavelengthErr?: Float64Array;
  readonly flux: Float64Array;
  readonly fluxErr?: Float64Array;
  readonly fwhm?: Float64Array;
  readonly medium: Medium;
  readonly mediumStated: boolean;
  readonly how: Reading['how'];
  readonly remarks: readonly Remark[];
  readonly choices: ReadingChoices;
}

const NAMES = {
  wavelength: /^(wavelength|wave|lambda|centroid|centre|center)(_obs)?$/i,
  wavelengthErr: /^((wavelength|wave|lambda|centroid)(_obs)?_?err(or)?|e_?(wave|lambda)\w*)$/i,
  flux: /^(flux|intensity|f|i)$/i,
  fluxErr: /^((flux|intensity)_?err(or)?|e_?flux)$/i,
  fwhm: /^fwhm$/i,
} as const;

/**
 * Reads a list of already measured lines: a text table with named columns wavelength and flux, optionally wavelength_err, flux_err, fwhm.
 *
 * @throws ProblemError when a needed column is missing or no row has a wavelength and a flux
 */
export async function readLineList(source: ByteSource, choices: ReadingChoices): Promise<MeasuredList> {
  const table = readTextTable(source.name, await wholeText(source));
  const find = (pattern: RegExp): NumberColumn | undefined => table.columns.find((c) => pattern.test(c.name));
  const named = table.columns.some((c) => c.name !== '');
  const wavelength = find(NAMES.wavelength) ?? (named ? undefined : table.columns[0]);
  const flux = find(NAMES.flux) ?? (named ? undefined : table.columns[1]);
  if (!wavelength || !flux) {
    throw new ProblemError({
      code: 'no-list-columns',
      where: { file: source.name },
      found: `columns ${table.columns.map((c) => c.name || '(no name)').join(', ')}`,
      expected: 'columns named wavelength and flux',
      doThis: 'Name the columns in the first line.',
    });
  }
  const kept = Array.from(wavelength.values.keys()).filter(
    (i) => wavelength.values[i] > 0 && Number.isFinite(wavelength.values[i]) && Number.isFinite(flux.values[i]),
  );
  if (kept.length === 0)
    throw new ProblemError({
      code: 'no-lines',
      where: { file: source.name },
      found: 'no row with a wavelength and a flux',
      expected: 'at least one',
    });
  // unit and medium are settled as for a spectrum: the reader of columns needs two samples to see a range
  const padded = kept.length > 1 ? kept : [kept[0], kept[0]];
  const probe = spectrumOfColumns(
    {
      ...table,
      columns: [
        { ...wavelength, values: Float64Array.from(padded, (i, k) => wavelength.values[i] * (1 + 1e-9 * k)) },
        { ...flux, values: Float64Array.from(padded, (i) => flux.values[i]) },
      ],
    },
    { medium: choices.medium, wavelengthUnit: choices.wavelengthUnit },
  );
  const unit = probe.spectrum.wavelength[0] / Math.min(...padded.map((i) => wavelength.values[i]));
  const column = (pattern: RegExp, scale: number) => {
    const found = find(pattern);
    return found && Float64Array.from(kept, (i) => found.values[i] * scale);
  };
  const skipped = wavelength.values.length - kept.length;
  return {
    wavelength: Float64Array.from(kept, (i) => wavelength.values[i] * unit),
    wavelengthErr: column(NAMES.wavelengthErr, unit),
    flux: Float64Array.from(kept, (i) => flux.values[i]),
    fluxErr: column(NAMES.fluxErr, 1),
    fwhm: column(NAMES.fwhm, unit),
    medium: probe.spectrum.medium,
    mediumStated: probe.mediumStated,
    how: probe.how,
    remarks: [
      ...probe.remarks.filter((r) => !['unsorted', 'duplicates'].includes(r.code)),
      ...(skipped > 0
        ? [
            {
              code: 'lines-left-out',
              weight: 'warning',
              where: { file: source.name },
              found: `${skipped} rows without a wavelength or a flux were left out`,
            } as const,
          ]
        : []),
    ],
    choices,
  };
}
