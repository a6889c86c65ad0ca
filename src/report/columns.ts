import type { LineRow } from './lineTable.ts';

/** One column of the full table: what it is called in files, what it means, its unit, and the text of a cell (blank when unknown). */
export interface Column {
  readonly key: string;
  readonly meaning: string;
  /** Unit by the VOUnits recommendation; empty for numbers without one; `flux` stands for the flux unit of the table. */
  readonly unit: string;
  readonly kind: 'number' | 'text' | 'boolean';
  readonly cell: (row: LineRow) => string;
}

/** Text of a number with `digits` decimals; blank when absent or not finite. */
export function decimals(value: number | undefined, digits: number): string {
  return value === undefined || !Number.isFinite(value) ? '' : (Number(value.toFixed(digits)) || 0).toFixed(digits);
}

/** Text of a number with `digits` significant digits, exponents only where a plain number would be long; blank when absent or not finite. */
export function significant(value: number | undefined, digits: number): string {
  if (value === undefined || !Number.isFinite(value)) return '';
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e7 || size < 1e-4) return value.toExponential(digits - 1).replace('e+', 'e');
  const whole = Math.floor(Math.log10(size)) + 1;
  return value.toFixed(Math.max(0, digits - whole));
}

/** Laboratory wavelengths of a name, blend parts joined by `+`. */
export const labText = (wavelengths: readonly number[] | undefined) => (wavelengths ?? []).map((w) => decimals(w, 3)).join('+');

const number = (key: string, meaning: string, unit: string, cell: (row: LineRow) => string): Column => ({
  key,
  meaning,
  unit,
  kind: 'number',
  cell,
});
const text = (key: string, meaning: string, cell: (row: LineRow) => string): Column => ({ key, meaning, unit: '', kind: 'text', cell });

/** All columns of the machine-readable table, in their order. */
export const COLUMNS: readonly Column[] = [
  number('feature', 'number of the feature', '', (r) => String(r.feature)),
  number('wavelength_obs', 'observed wavelength', 'Angstrom', (r) => decimals(r.wavelengthObs, 4)),
  number('wavelength_obs_err', 'its error', 'Angstrom', (r) => decimals(r.wavelengthObsErr, 4)),
  number('wavelength_rest_obs', 'observed wavelength in the rest frame', 'Angstrom', (r) => decimals(r.wavelengthRestObs, 4)),
  number('flux', 'flux', 'flux', (r) => significant(r.flux, 6)),
  number('flux_err', 'its error', 'flux', (r) => significant(r.fluxErr, 4)),
  number('fwhm', 'observed full width at half maximum', 'Angstrom', (r) => decimals(r.fwhm, 4)),
  number('fwhm_err', 'its error', 'Angstrom', (r) => decimals(r.fwhmErr, 4)),
  number('fwhm_kms', 'full width at half maximum, instrument removed where it is known', 'km/s', (r) => decimals(r.fwhmKms, 2)),
  number('ew', 'equivalent width, positive in emission', 'Angstrom', (r) => significant(r.ew, 5)),
  number('ew_err', 'its error', 'Angstrom', (r) => significant(r.ewErr, 3)),
  number('snr', 'signal to noise of the flux', '', (r) => decimals(r.snr, 2)),
  text('ion', 'ion, brackets by the nature of the line', (r) => r.ion ?? ''),
  text('wavelength_lab', 'laboratory wavelength, Angstrom', (r) => labText(r.wavelengthLab)),
  text('lower', 'lower level', (r) => r.lower ?? ''),
  text('upper', 'upper level', (r) => r.upper ?? ''),
  text('nature', 'permitted, intercombination, forbidden or sky', (r) => r.nature ?? ''),
  number('velocity', 'velocity, optical convention', 'km/s', (r) => decimals(r.velocity, 2)),
  number('velocity_err', 'its error', 'km/s', (r) => decimals(r.velocityErr, 2)),
  number('probability', 'probability of the name', '', (r) => decimals(r.probability, 4)),
  {
    key: 'thin_gas',
    meaning: 'upper level metastable: needs low density',
    unit: '',
    kind: 'boolean',
    cell: (r) => (r.thinGas === undefined ? '' : String(r.thinGas)),
  },
  number('lifetime_s', 'radiative lifetime of the upper level', 's', (r) => significant(r.lifetimeS, 4)),
  number('n_crit', 'critical density of the upper level', 'cm-3', (r) => significant(r.nCrit, 4)),
  number('flux_hbeta100', 'flux, H beta = 100', '', (r) => significant(r.fluxHbeta100, 5)),
  number('flux_hbeta100_err', 'its error', '', (r) => significant(r.fluxHbeta100Err, 3)),
  number('intensity_hbeta100', 'intensity corrected for reddening, H beta = 100', '', (r) => significant(r.intensityHbeta100, 5)),
  number('intensity_hbeta100_err', 'its error', '', (r) => significant(r.intensityHbeta100Err, 3)),
  text('alternatives', 'other names: ion|wavelength|probability', (r) =>
    r.alternatives.map((a) => `${a.ion}|${labText(a.wavelengthLab)}|${decimals(a.probability, 4)}`).join('; '),
  ),
  text('verdict', 'what the user decided', (r) => r.verdict),
  text('note', 'note', (r) => r.note),
];
