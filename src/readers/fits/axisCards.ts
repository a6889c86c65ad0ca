import { spectralUnit } from '../spectralUnits.ts';
import { type Header, numberOf, textOf } from './header.ts';

/** A wavelength axis in a header, before it is worked out. */
export interface AxisCards {
  /** Number of the axis, from 1. */
  readonly axis: number;
  readonly type: string;
  readonly reference: number;
  readonly pixel: number;
  readonly step: number;
  readonly unitWords: string;
}

/** CTYPE of FITS WCS paper III: code and algorithm. */
export const STANDARD = /^(WAVE|AWAV|FREQ|ENER|WAVN|VOPT|VRAD|ZOPT|VELO|BETA)(?:-(LOG|[FWVA]2[FWVA]|TAB|GRI|GRA))?\s*$/;
/** Older names of velocity axes. */
const VELOCITY = /^(VELO|FELO|VRAD|VOPT|VELOCITY|VEL)\b|^(VELO|FELO)-/i;
const NOT_SPECTRAL =
  /^(RA--|DEC-|GLON|GLAT|ELON|ELAT|[XY]LON|[XY]LAT|STOKES|TIME|UTC|POS|OFFSET|SPATIAL|ANGLE|SLIT|APERTURE|FIBER|BAND|DETECTOR|CPIX|PIXELS?$|RA$|DEC$|.*-(TAN|SIN|ARC|CAR|ZEA)\b)/i;

/** The first axis that can be one of wavelengths; undefined when the header has none. */
export function findAxis(header: Header, axes: readonly number[]): AxisCards | undefined {
  const all = axes.map((n, k) => ({ n, cards: axisCards(header, k + 1) }));
  const named = all.find(
    ({ n, cards }) =>
      n > 1 && cards && (STANDARD.test(cards.type) || /^(lambda|wave|awav|log|angstrom|micron|freq|velo|felo|multispe)/i.test(cards.type)),
  );
  if (named?.cards) return named.cards;
  const first = all.find(({ n, cards }) => n > 1 && cards && !NOT_SPECTRAL.test(cards.type));
  return first?.cards && (first.cards.axis === 1 || all.slice(0, first.cards.axis - 1).every(({ n }) => n === 1)) ? first.cards : undefined;
}

function axisCards(header: Header, axis: number): AxisCards | undefined {
  const type = textOf(header, `CTYPE${axis}`).toUpperCase();
  const coefficients =
    axis === 1 && numberOf(header, 'CRVAL1') === undefined ? [numberOf(header, 'COEFF0'), numberOf(header, 'COEFF1')] : [];
  const reference = numberOf(header, `CRVAL${axis}`) ?? coefficients[0] ?? (/^MULTISPE/.test(type) ? 1 : undefined);
  const cd = numberOf(header, `CD${axis}_${axis}`);
  const cdelt = numberOf(header, `CDELT${axis}`);
  const pc = numberOf(header, `PC${axis}_${axis}`) ?? 1;
  const step = (cd ? cd : cdelt !== undefined ? cdelt * pc : undefined) ?? coefficients[1] ?? (/^MULTISPE/.test(type) ? 1 : undefined);
  if (reference === undefined || !step || !Number.isFinite(step)) return undefined;
  const pixel = numberOf(header, `CRPIX${axis}`) ?? 1;
  const first = reference + step * (1 - pixel);
  // 1, 2, 3 ... counts pixels
  if (step === 1 && (first === 0 || first === 1) && !STANDARD.test(type) && !/^MULTISPE/.test(type)) return undefined;
  return { axis, type, reference, pixel, step, unitWords: textOf(header, `CUNIT${axis}`) };
}

/** Whether a header's axis counts velocities. */
export const isVelocityAxis = (cards: AxisCards): boolean =>
  VELOCITY.test(cards.type) || spectralUnit(cards.unitWords)?.quantity === 'velocity';
