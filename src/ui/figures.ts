import { decimals, significant } from '../report/index.ts';

const MINUS = '−';
const UNKNOWN = '–';
const MOST_DECIMALS = 7;
/** A wavelength in Angstrom is never known better than this on screen. */
const MOST_WAVELENGTH_DECIMALS = 4;

/** Decimals that show two significant digits of an error. */
export function decimalsOf(err: number | undefined, otherwise: number, most = MOST_DECIMALS): number {
  if (err === undefined || !(err > 0) || !Number.isFinite(err)) return otherwise;
  return Math.min(most, Math.max(0, 1 - Math.floor(Math.log10(err))));
}

/** "5006.843"; a dash when unknown. */
export const fixed = (value: number | undefined, digits: number) => (decimals(value, digits) || UNKNOWN).replace(/^-/, MINUS);

/** "985.2", three or more significant digits; a dash when unknown. */
export const round = (value: number | undefined, digits: number) => (significant(value, digits) || UNKNOWN).replace(/^-/, MINUS);

/** "5006.843 ± 0.012", decimals after the error; only the value when there is no error. */
export function withError(value: number | undefined, err: number | undefined, otherwise: number, most = MOST_DECIMALS): string {
  const digits = decimalsOf(err, otherwise, most);
  const shown = fixed(value, digits);
  return err !== undefined && Number.isFinite(err) ? `${shown} ± ${fixed(err, digits)}` : shown;
}

/** A wavelength with its error, Angstrom. */
export function wavelengthText(value: number, err: number | undefined): string {
  const text = withError(value, err, 2, MOST_WAVELENGTH_DECIMALS);
  return text.replace(/± 0\.0000$/, '± < 0.0001');
}

/** "+31.2 ± 0.4", with its sign. */
export function signed(value: number, err: number | undefined, otherwise: number): string {
  return `${value >= 0 ? '+' : ''}${withError(value, err, otherwise)}`;
}

/** Flux with its error on one power of ten: "9.852 ± 0.031 e−14", or plainly where the numbers are plain. */
export function fluxText(value: number, err: number | undefined): string {
  const size = Math.abs(value);
  const known = err !== undefined && Number.isFinite(err) ? err : undefined;
  if (size >= 0.01 && size < 1e5) return known ? withError(value, known, 3) : round(value, 4);
  const exponent = size > 0 ? Math.floor(Math.log10(size)) : 0;
  const unit = 10 ** exponent;
  const tail = exponent === 0 ? '' : ` e${exponent < 0 ? MINUS : ''}${Math.abs(exponent)}`;
  return `${withError(value / unit, known && known / unit, 3)}${tail}`;
}

/** Probability as it may be printed: never a bare 1 or 0. */
export function probabilityText(p: number | undefined): string {
  if (p === undefined) return UNKNOWN;
  if (p >= 0.9995) return '> 0.999';
  if (p < 0.0005) return '< 0.001';
  return p.toFixed(3);
}

/** A power of ten in superscripts: "7.1 × 10⁵"; plain between 0.01 and 10,000. */
export function powerText(value: number | undefined, digits: number): string {
  if (value === undefined || !Number.isFinite(value)) return UNKNOWN;
  const size = Math.abs(value);
  if (size === 0 || (size >= 0.01 && size < 1e4)) return round(value, digits);
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
  const raised = [...String(Number(exponent))].map((c) => (c === '-' ? '⁻' : '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(c)])).join('');
  return `${mantissa.replace('-', MINUS)} × 10${raised}`;
}
