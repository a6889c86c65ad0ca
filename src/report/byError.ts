import { significant } from './columns.ts';
import type { InlineText } from './inline.ts';

/** Beyond these sizes a number is printed with a power of ten. */
const LARGE = 1e6;
const SMALL = 1e-3;
const MOST_DECIMALS = 8;
/** Digits of a value whose error is not known. */
const DIGITS_WITHOUT_ERROR = 4;

/**
 * A value with its error as a paper prints it: the error with one or two significant digits, the value with as many decimals; `(1.234 ± 0.021) × 10^-14` for very
 * large and very small ones. Empty when there is no value.
 */
export function byError(value: number | undefined, err: number | undefined, digits: 1 | 2): InlineText {
  if (value === undefined || !Number.isFinite(value)) return [];
  if (err === undefined || !Number.isFinite(err) || err <= 0) return withPower(value, DIGITS_WITHOUT_ERROR);
  const size = Math.max(Math.abs(value), err);
  if (size < LARGE && size >= SMALL) {
    const places = decimalsOf(err, digits);
    return [`${minus(value.toFixed(places))} ± ${err.toFixed(places)}`];
  }
  const exponent = Math.floor(Math.log10(size));
  const unit = 10 ** exponent;
  const places = decimalsOf(err / unit, digits);
  return [`(${minus((value / unit).toFixed(places))} ± ${(err / unit).toFixed(places)}) × 10`, { sup: minus(String(exponent)) }];
}

/** A value with so many significant digits. */
export function withPower(value: number | undefined, digits: number): InlineText {
  const text = significant(value, digits);
  const [mantissa, exponent] = text.split('e');
  return exponent === undefined
    ? text === ''
      ? []
      : [minus(text)]
    : [`${minus(mantissa)} × 10`, { sup: minus(String(Number(exponent))) }];
}

/** Decimals at which an error has so many significant digits; 0.096 with one digit is 0.1. */
function decimalsOf(err: number, digits: 1 | 2): number {
  const first = Math.floor(Math.log10(Number(err.toPrecision(digits))));
  return Math.min(MOST_DECIMALS, Math.max(0, digits - 1 - first));
}

export const minus = (text: string) => text.replace(/^-/, '−');
