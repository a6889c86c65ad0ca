import { ProblemError } from '../../problems/index.ts';
import { splineValue } from './orderSplines.ts';

/** The dispersion of one order in WAT cards: `aperture beam type w1 dw n z low high functions...`. */
export interface OrderDispersion {
  readonly aperture: number;
  readonly beam: number;
  /** 0 linear, 1 log-linear, 2 functions of the pixel. */
  readonly type: number;
  readonly first: number;
  readonly step: number;
  /** Samples that are filled. */
  readonly samples: number;
  /** Redshift the wavelengths have to be divided by, plus one. */
  readonly z: number;
  readonly terms: readonly number[];
}

export function parseOrder(text: string): OrderDispersion | undefined {
  const numbers = text
    .trim()
    .split(/\s+/)
    .map((w) => Number(w.replace(/[dD]/, 'e')));
  const [aperture, beam, type, first, step, samples, z] = numbers;
  if (numbers.length < 6 || numbers.slice(0, 6).some((v) => !Number.isFinite(v))) return undefined;
  return { aperture, beam, type, first, step, samples, z: Number.isFinite(z) ? z : 0, terms: numbers.slice(9) };
}

/** Terms of functions kept for one order; more is damage. */
const MOST_TERMS = 100_000;

/**
 * Wavelengths of the pixels 1 ... n of an order, in the unit of the WAT cards.
 *
 * Types and functions (1 Chebyshev, 2 Legendre, 3 cubic spline, 4 linear spline, 5 pixel list, 6 sampled list) as the convention of these
 * cards defines them; several functions add up with their weights. Checked in tests/readers/realFiles.test.ts and tests/readers/multispec.test.ts.
 *
 * @throws ProblemError for functions that are none of these
 */
export function orderWavelengths(order: OrderDispersion, n: number, file: string, hdu: number, number: number): Float64Array {
  const { type, first, step, z } = order;
  const out = new Float64Array(n);
  if (type === 0 || type === 1) {
    for (let i = 0; i < n; i++) out[i] = (type === 1 ? 10 ** (first + step * i) : first + step * i) / (1 + z);
    return out;
  }
  if (type !== 2) throw unknown(`dispersion type ${type}`, file, hdu, number);
  const { terms } = order;
  if (terms.length > MOST_TERMS || terms.some((t) => !Number.isFinite(t))) throw unknown('terms that are no numbers', file, hdu, number);
  let at = 0;
  while (at + 2 < terms.length) {
    const weight = terms[at];
    const zero = terms[at + 1];
    const kind = terms[at + 2];
    const used = addFunction(kind, terms, at + 3, weight, zero, out);
    if (used === undefined) throw unknown(`a function of kind ${kind}`, file, hdu, number);
    at += 3 + used;
  }
  if (at === 0) throw unknown('no function', file, hdu, number);
  for (let i = 0; i < n; i++) out[i] /= 1 + z;
  return out;
}

/** Adds weight * (zero + function) to all pixels; returns the number of terms used. */
function addFunction(
  kind: number,
  terms: readonly number[],
  at: number,
  weight: number,
  zero: number,
  out: Float64Array,
): number | undefined {
  const size = terms[at];
  if (!Number.isInteger(size) || size < 1 || size > 1000)
    return kind === 5 || kind === 6 ? addList(kind, terms, at, weight, zero, out) : undefined;
  if (kind === 5 || kind === 6) return addList(kind, terms, at, weight, zero, out);
  const low = terms[at + 1];
  const high = terms[at + 2];
  if (!(high > low)) return undefined;
  const isPolynomial = kind === 1 || kind === 2;
  const needed = isPolynomial ? size : kind === 3 ? size + 3 : kind === 4 ? size + 1 : undefined;
  if (needed === undefined) return undefined;
  const c = terms.slice(at + 3, at + 3 + needed);
  if (c.length < needed) return undefined;
  for (let i = 0; i < out.length; i++) {
    const p = i + 1;
    const x = (2 * p - (high + low)) / (high - low);
    const value = kind === 1 ? chebyshev(c, x) : kind === 2 ? legendre(c, x) : splineValue(kind, c, size, (p - low) / (high - low));
    out[i] += weight * (zero + value);
  }
  return 3 + needed;
}

function chebyshev(c: readonly number[], x: number): number {
  let before = 1;
  let now = x;
  let sum = c[0];
  for (let k = 1; k < c.length; k++) {
    sum += c[k] * now;
    [before, now] = [now, 2 * x * now - before];
  }
  return sum;
}

function legendre(c: readonly number[], x: number): number {
  let before = 1;
  let now = x;
  let sum = c[0];
  for (let k = 1; k < c.length; k++) {
    sum += c[k] * now;
    [before, now] = [now, ((2 * k + 1) * x * now - k * before) / (k + 1)];
  }
  return sum;
}

/** 5: a wavelength for every pixel; 6: wavelengths at evenly spread places between the first and the last pixel. */
function addList(kind: number, terms: readonly number[], at: number, weight: number, zero: number, out: Float64Array): number | undefined {
  const size = terms[at];
  if (!Number.isInteger(size) || size < 2) return undefined;
  const start = kind === 5 ? at + 1 : at + 3;
  const c = terms.slice(start, start + size);
  if (c.length < size) return undefined;
  const low = kind === 5 ? 1 : terms[at + 1];
  const high = kind === 5 ? size : terms[at + 2];
  for (let i = 0; i < out.length; i++) {
    const s = Math.min(Math.max(((i + 1 - low) / (high - low)) * (size - 1), 0), size - 1);
    const k = Math.min(Math.floor(s), size - 2);
    out[i] += weight * (zero + c[k] + (s - k) * (c[k + 1] - c[k]));
  }
  return (kind === 5 ? 1 : 3) + size;
}

const unknown = (found: string, file: string, hdu: number, number: number) =>
  new ProblemError({
    code: 'unknown-dispersion',
    where: { file, hdu, column: 'WAT2' },
    found: `${found} in the dispersion of order ${number}`,
    expected: 'a linear or log-linear order, polynomials, splines or lists',
    doThis: 'Choose another order, or resample the spectrum.',
  });
