const ZERO = 48;
const NINE = 57;
const PLUS = 43;
const MINUS = 45;
const POINT = 46;
const COMMA = 44;
/** Powers of ten that are exact in a double: a mantissa of up to 15 digits times or over one of them is rounded once, so correctly. */
const EXACT = Array.from({ length: 23 }, (_, k) => Number(`1e${k}`));
const MOST_DIGITS = 15;

/** What a cell that is no finite number means. */
export const MISSING = Number.NaN;
/** Longer cells are no numbers. */
const LONGEST_NUMBER = 100;
const MISSING_WORDS =
  /^(|nan|-nan|\+nan|nan\(.*\)|null|none|nil|n\/?a|<na>|masked|missing|undef(ined)?|indef|blank|--+|-|\.\.\.|\.|\*+|\?+|#n\/a|n\.a\.|nodata|no_data|1\.#qnan0?|-1\.#ind0*|1\.#qnan0*)$/i;
const INFINITE_WORDS = /^[+-]?(inf(inity)?|1\.#inf0*)$/i;
const FORTRAN = /^([+-]?(?:\d+[.,]?\d*|[.,]\d+))(?:[deq]([+-]?\d+)|([+-]\d+))$/i;
const PLAIN = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/**
 * The number in bytes [start, end), rounded as IEEE 754 asks; blanks and quotes around it are allowed.
 *
 * @returns NaN for words that mean "missing" and for infinities, undefined for what is no number at all
 * Fortran forms are taken: `1.5D-16`, and `1.234-101` where the exponent letter fell out. With `decimalComma`, `1,5` is 1.5.
 */
export function parseNumber(bytes: Uint8Array, start: number, end: number, decimalComma: boolean): number | undefined {
  let from = start;
  let to = end;
  while (from < to && isPadding(bytes[from])) from++;
  while (to > from && isPadding(bytes[to - 1])) to--;
  const fast = decimalNumber(bytes, from, to, decimalComma ? COMMA : POINT);
  return fast !== undefined ? fast : numberInWords(asText(bytes, from, to), decimalComma);
}

/** blank, tab, carriage return, quotes */
const isPadding = (byte: number) => byte === 32 || byte === 9 || byte === 13 || byte === 34 || byte === 39;

function decimalNumber(bytes: Uint8Array, from: number, to: number, point: number): number | undefined {
  let i = from;
  let negative = false;
  if (i < to && (bytes[i] === MINUS || bytes[i] === PLUS)) negative = bytes[i++] === MINUS;
  let mantissa = 0;
  let digits = 0;
  let scale = 0;
  let seen = false;
  let pointSeen = false;
  for (; i < to; i++) {
    const byte = bytes[i];
    if (byte >= ZERO && byte <= NINE) {
      seen = true;
      if (digits > 0 || byte !== ZERO) digits++;
      if (digits > MOST_DIGITS) return undefined;
      mantissa = mantissa * 10 + (byte - ZERO);
      if (pointSeen) scale--;
    } else if (byte === point && !pointSeen) pointSeen = true;
    else break;
  }
  if (!seen) return undefined;
  if (i < to) {
    // e, E, d, D
    const letter = bytes[i] | 32;
    if (letter !== 101 && letter !== 100) return undefined;
    i++;
    let down = false;
    if (i < to && (bytes[i] === MINUS || bytes[i] === PLUS)) down = bytes[i++] === MINUS;
    if (i >= to || to - i > 3) return undefined;
    let exponent = 0;
    for (; i < to; i++) {
      if (bytes[i] < ZERO || bytes[i] > NINE) return undefined;
      exponent = exponent * 10 + (bytes[i] - ZERO);
    }
    scale += down ? -exponent : exponent;
  }
  if (scale < -22 || scale > 22) return undefined;
  const size = scale < 0 ? mantissa / EXACT[-scale] : mantissa * EXACT[scale];
  return negative ? -size : size;
}

/** The slow way for what the fast way does not take. */
export function numberInWords(words: string, decimalComma: boolean): number | undefined {
  if (words.length > LONGEST_NUMBER) return undefined;
  const text = decimalComma ? words.replace(',', '.') : words;
  if (PLAIN.test(text)) return Number(text);
  if (MISSING_WORDS.test(text) || INFINITE_WORDS.test(text)) return MISSING;
  const fortran = FORTRAN.exec(text);
  if (fortran) return Number(`${fortran[1].replace(',', '.')}e${fortran[2] ?? fortran[3]}`);
  if (/^(true|t)$/i.test(text)) return 1;
  if (/^(false|f)$/i.test(text)) return 0;
  return undefined;
}

function asText(bytes: Uint8Array, from: number, to: number): string {
  let text = '';
  const end = Math.min(to, from + 64);
  for (let i = from; i < end; i++) text += String.fromCharCode(bytes[i]);
  return text.replace(/\u2212|\u00e2\u0088\u0092/g, '-');
}
