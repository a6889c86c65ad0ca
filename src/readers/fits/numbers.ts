/** Bytes of one value by the letter of TFORM or by BITPIX. */
export const LETTER_BYTES: Readonly<Record<string, number>> = {
  L: 1,
  X: 1,
  B: 1,
  I: 2,
  J: 4,
  K: 8,
  A: 1,
  E: 4,
  D: 8,
  C: 8,
  M: 16,
  P: 8,
  Q: 16,
};

/** The letter of TFORM for a BITPIX. */
export const letterOfBitpix = (bitpix: number): string | undefined =>
  ({ '8': 'B', '16': 'I', '32': 'J', '64': 'K', '-32': 'E', '-64': 'D' })[String(bitpix)];

const TWO_63 = 2 ** 63;

/** How stored numbers turn into values: value = stored * scale + zero; `blank` = stored whole number that means "missing". */
export interface Scaling {
  readonly scale: number;
  readonly zero: number;
  readonly blank?: number;
}

/**
 * Decodes `n` big-endian values into `into` from `at` on.
 *
 * @param view bytes; the first value stands at `start`, the next ones `stride` bytes on
 * @param letter B I J K E D (numbers) or L (logical: 1, 0, NaN for undefined)
 * Unsigned whole numbers are the signed ones with the zero points of FITS 4.0 section 5.2.5; 64-bit ones are rounded to the nearest double.
 */
export function decode(
  view: DataView,
  start: number,
  stride: number,
  n: number,
  letter: string,
  { scale, zero, blank }: Scaling,
  into: Float64Array,
  at: number,
): void {
  const plain = scale === 1 && zero === 0;
  const isWhole = 'BIJK'.includes(letter);
  for (let i = 0, p = start; i < n; i++, p += stride) {
    let raw: number;
    switch (letter) {
      case 'D':
        raw = view.getFloat64(p);
        break;
      case 'E':
        raw = view.getFloat32(p);
        break;
      case 'J':
        raw = view.getInt32(p);
        break;
      case 'I':
        raw = view.getInt16(p);
        break;
      case 'B':
        raw = view.getUint8(p);
        break;
      case 'K':
        if (zero === TWO_63 && scale === 1) {
          into[at + i] =
            blank !== undefined && Number(view.getBigInt64(p)) === blank
              ? Number.NaN
              : Number(BigInt.asUintN(64, view.getBigInt64(p) + (1n << 63n)));
          continue;
        }
        raw = Number(view.getBigInt64(p));
        break;
      default: {
        const byte = view.getUint8(p);
        raw = byte === 84 || byte === 1 ? 1 : byte === 70 ? 0 : Number.NaN;
      }
    }
    into[at + i] = isWhole && raw === blank ? Number.NaN : plain ? raw : raw * scale + zero;
  }
}
