import { roleOf } from '../columnRoles.ts';
import type { FitsFile } from './candidate.ts';
import type { Hdu } from './hdus.ts';
import { textOf } from './header.ts';
import { imageLine } from './imageLine.ts';

/** Names of the lines of an image that are columns of one spectrum. */
export interface RowNames {
  readonly names: readonly string[];
  /** Axis along which the samples run: 1 or 2. */
  readonly axis: 1 | 2;
  readonly reason: string;
}

const MOST_LINES = 12;
const LEAST_SAMPLES = 20;
/** Longer lines are not looked through for wavelengths: that would read the whole file. */
const MOST_LOOKED_AT = 2_000_000;

/**
 * Whether the lines of a two-dimensional image are wavelength, flux and so on: the header names them, or one line rises or falls throughout
 * as only wavelengths do.
 */
export async function namesOfRows(file: FitsFile, hdu: Hdu): Promise<RowNames | undefined> {
  const [width, height, ...more] = hdu.axes;
  if (height === undefined || more.some((n) => n > 1)) return undefined;
  if (height >= 2 && height <= MOST_LINES && width >= LEAST_SAMPLES) {
    const named = namesInHeader(hdu, height);
    if (named) return { names: named, axis: 1, reason: 'its header names the rows' };
    return byNumbers(file, hdu, 1, height);
  }
  if (width >= 2 && width <= MOST_LINES && height >= LEAST_SAMPLES) return byNumbers(file, hdu, 2, width);
  return undefined;
}

/** ARRAY1, ARRAY2 ... or one card with a list of as many names as there are rows. */
function namesInHeader({ header }: Hdu, rows: number): string[] | undefined {
  for (const stem of ['ARRAY', 'ROW', 'PLANE']) {
    const names = Array.from({ length: rows }, (_, k) => textOf(header, `${stem}${k + 1}`));
    if (names.every((n) => n !== '') && names.some(isFlux)) return unique(names);
  }
  for (const { value } of header.cards.values()) {
    if (typeof value !== 'string') continue;
    const parts = value.split(/[,;]/).map((p) => p.trim());
    if (parts.length === rows && parts.some(isFlux) && parts.some((p) => roleOf({ name: p, unit: '', kind: 'real' }).role === 'wavelength'))
      return unique(parts);
  }
  return undefined;
}

const isFlux = (name: string) => roleOf({ name, unit: '', kind: 'real' }).role === 'flux' || /^spectrum/i.test(name);

const unique = (names: readonly string[]) => names.map((n, k) => (names.indexOf(n) === k ? n : `${n} ${k + 1}`));

async function byNumbers(file: FitsFile, hdu: Hdu, axis: 1 | 2, lines: number): Promise<RowNames | undefined> {
  const quiet = { ...file.notes, how: [], remarks: [], offers: [] };
  if (hdu.axes[axis - 1] > MOST_LOOKED_AT) return undefined;
  let wave: number | undefined;
  for (let k = 0; k < lines; k++) {
    const values = await imageLine(file.source, hdu, axis, axis === 1 ? [0, k] : [k, 0], quiet);
    if (!wavelengthRow(values)) continue;
    // two such lines: it cannot be told which one holds the wavelengths
    if (wave !== undefined) return undefined;
    wave = k;
  }
  if (wave === undefined) return undefined;
  const rest = lines - 1;
  const word = axis === 1 ? 'row' : 'column';
  const names = Array.from({ length: lines }, (_, k) => {
    if (k === wave) return 'wavelength';
    const rank = k > (wave ?? 0) ? k - 1 : k;
    return rank === 0 ? 'flux' : rest > 1 ? `${word} ${k + 1}` : 'flux';
  });
  return { names, axis, reason: `${word} ${wave + 1} rises throughout, as wavelengths do` };
}

/** Strictly monotonic, positive, over more than a counter's steps of 1. */
function wavelengthRow(values: Float64Array): boolean {
  const n = values.length;
  if (n < LEAST_SAMPLES) return false;
  const sign = Math.sign(values[n - 1] - values[0]);
  if (sign === 0 || !(values[0] > 0)) return false;
  let unit = 0;
  for (let i = 1; i < n; i++) {
    const step = values[i] - values[i - 1];
    if (!(step * sign > 0) || !(values[i] > 0)) return false;
    if (step === 1) unit++;
  }
  return !(unit === n - 1 && values[0] <= 1);
}
