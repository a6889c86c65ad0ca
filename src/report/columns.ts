import { lineFluxUnit, type UnitStyle } from './fluxUnit.ts';
import type { LineRow } from './lineTable.ts';

/** One column of the full table: what it is called in files, what it means, its unit, and the text of a cell (blank when unknown). */
export interface Column {
  readonly key: string;
  readonly meaning: string;
  /** Unit by the VOUnits recommendation; empty for numbers without one; `flux` stands for the flux unit of the table. */
  readonly unit: string;
  readonly kind: 'integer' | 'number' | 'text' | 'boolean';
  /** What the column is by the IVOA's vocabulary of unified content descriptors (UCD1+); empty where none fits. */
  readonly ucd: string;
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

const number = (key: string, meaning: string, unit: string, ucd: string, cell: (row: LineRow) => string): Column => ({
  key,
  meaning,
  unit,
  ucd,
  kind: 'number',
  cell,
});
const text = (key: string, meaning: string, ucd: string, cell: (row: LineRow) => string): Column => ({
  key,
  meaning,
  unit: '',
  ucd,
  kind: 'text',
  cell,
});

/** Unit of a column in this table: flux columns carry the spectrum's flux unit times Angstrom, where it is known. */
export function unitOf(column: Column, fluxUnit: string, style: UnitStyle): string {
  return column.unit === 'flux' ? lineFluxUnit(fluxUnit, style) : column.unit;
}

/** All columns of the machine-readable table, in their order. */
export const COLUMNS: readonly Column[] = [
  { key: 'feature', meaning: 'number of the feature', unit: '', ucd: 'meta.id;meta.main', kind: 'integer', cell: (r) => String(r.feature) },
  number('wavelength_obs', 'observed wavelength', 'Angstrom', 'em.wl', (r) => decimals(r.wavelengthObs, 4)),
  number('wavelength_obs_err', 'its error', 'Angstrom', 'stat.error;em.wl', (r) => decimals(r.wavelengthObsErr, 4)),
  number('wavelength_rest_obs', 'observed wavelength in the rest frame', 'Angstrom', 'em.wl', (r) => decimals(r.wavelengthRestObs, 4)),
  number('flux', 'flux', 'flux', 'spect.line.intensity', (r) => significant(r.flux, 6)),
  number('flux_err', 'its error', 'flux', 'stat.error;spect.line.intensity', (r) => significant(r.fluxErr, 4)),
  number('fwhm', 'observed full width at half maximum', 'Angstrom', 'spect.line.width;em.wl', (r) => decimals(r.fwhm, 4)),
  number('fwhm_err', 'its error', 'Angstrom', 'stat.error;spect.line.width', (r) => decimals(r.fwhmErr, 4)),
  number('fwhm_kms', 'full width at half maximum, instrument removed where it is known', 'km/s', 'spect.line.width', (r) =>
    decimals(r.fwhmKms, 2),
  ),
  number('ew', 'equivalent width, positive in emission', 'Angstrom', 'spect.line.eqWidth', (r) => significant(r.ew, 5)),
  number('ew_err', 'its error', 'Angstrom', 'stat.error;spect.line.eqWidth', (r) => significant(r.ewErr, 3)),
  number('snr', 'signal to noise of the flux', '', 'stat.snr', (r) => decimals(r.snr, 2)),
  text('ion', 'ion, brackets by the nature of the line', 'phys.atmol.element', (r) => r.ion ?? ''),
  text('wavelength_lab', 'laboratory wavelength, Angstrom', 'em.wl;spect.line', (r) => labText(r.wavelengthLab)),
  text('lower', 'lower level', 'phys.atmol.level', (r) => r.lower ?? ''),
  text('upper', 'upper level', 'phys.atmol.level', (r) => r.upper ?? ''),
  text('nature', 'permitted, intercombination, forbidden or sky', 'phys.atmol.transition', (r) => r.nature ?? ''),
  number('velocity', 'velocity, optical convention', 'km/s', 'spect.dopplerVeloc.opt', (r) => decimals(r.velocity, 2)),
  number('velocity_err', 'its error', 'km/s', 'stat.error;spect.dopplerVeloc.opt', (r) => decimals(r.velocityErr, 2)),
  number('probability', 'probability of the name', '', 'stat.probability', (r) => decimals(r.probability, 4)),
  {
    key: 'thin_gas',
    meaning: 'upper level metastable: needs low density',
    unit: '',
    ucd: 'meta.code',
    kind: 'boolean',
    cell: (r) => (r.thinGas === undefined ? '' : String(r.thinGas)),
  },
  number('lifetime_s', 'radiative lifetime of the upper level', 's', 'phys.atmol.lifetime', (r) => significant(r.lifetimeS, 4)),
  number('n_crit', 'critical density of the upper level', 'cm-3', 'phys.density', (r) => significant(r.nCrit, 4)),
  number('flux_hbeta100', 'flux, H beta = 100', '', 'spect.line.intensity;arith.ratio', (r) => significant(r.fluxHbeta100, 5)),
  number('flux_hbeta100_err', 'its error', '', 'stat.error;spect.line.intensity', (r) => significant(r.fluxHbeta100Err, 3)),
  number('intensity_hbeta100', 'intensity corrected for reddening, H beta = 100', '', 'spect.line.intensity;arith.ratio', (r) =>
    significant(r.intensityHbeta100, 5),
  ),
  number('intensity_hbeta100_err', 'its error', '', 'stat.error;spect.line.intensity', (r) => significant(r.intensityHbeta100Err, 3)),
  text('alternatives', 'other names: ion|wavelength|probability', 'meta.note', (r) =>
    r.alternatives.map((a) => `${a.ion}|${labText(a.wavelengthLab)}|${decimals(a.probability, 4)}`).join('; '),
  ),
  text('verdict', 'what the user decided', 'meta.code', (r) => r.verdict),
  text('note', 'note', 'meta.note', (r) => r.note),
];
