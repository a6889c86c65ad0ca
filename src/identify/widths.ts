import { median } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import type { Mark } from './naming.ts';

/** Marks with a width that are needed before widths say anything. */
const LEAST_MARKS = 8;
/** Scatter of ln FWHM of single lines: resolving power along the spectrum, thermal and expansion widths. Common practice, no source. */
const SCATTER = 0.25;
/** ... and its error for S/N 1. */
const NOISE = 0.7;
const UNKNOWN_SNR = 20;
/** Widths of things that are no line, and of the few lines unlike the rest, in ln FWHM. */
const STRANGE_SCATTER = 1;
const STRANGE_SHARE = 0.1;
/** Most features without a name are lines that no list holds, as wide as the others; the rest are artefacts. */
const STRANGE_SHARE_OF_STRANGERS = 0.4;
const LEAST_DENSITY = 0.01;
const FWHM_PER_SIGMA = 2.3548;

/** Median FWHM of the brighter half of the emission marks, km/s; undefined when too few have a width. */
export function typicalFwhmKms(marks: readonly Mark[]): number | undefined {
  const wide = marks.filter((m) => !m.artefact && m.flux > 0 && m.fwhm !== undefined && m.fwhm > 0).sort((a, b) => b.flux - a.flux);
  if (wide.length < LEAST_MARKS) return undefined;
  return median(wide.slice(0, Math.max(LEAST_MARKS, wide.length >> 1)).map(fwhmKms));
}

export const fwhmKms = (mark: Mark): number => ((mark.fwhm ?? 0) / mark.wavelength) * SPEED_OF_LIGHT_KMS;

/**
 * Log odds that a mark's width adds to a name against "none of these".
 *
 * @param spread  root mean square distance of a blend's parts from their mean, Angstrom; 0 for one line
 * @param typical FWHM of the other features, km/s
 */
export function widthNats(mark: Mark, spread: number, typical: number | undefined): number {
  if (typical === undefined || mark.fwhm === undefined || !(mark.fwhm > 0)) return 0;
  const expected = Math.hypot(typical, ((FWHM_PER_SIGMA * spread) / mark.wavelength) * SPEED_OF_LIGHT_KMS);
  const snr = mark.fluxErr > 0 ? Math.abs(mark.flux) / mark.fluxErr : UNKNOWN_SNR;
  const s = Math.hypot(SCATTER, NOISE / snr);
  const off = Math.log(fwhmKms(mark) / expected);
  const usual = Math.exp(-0.5 * (off / s) ** 2) / s;
  const strange = Math.exp(-0.5 * (off / STRANGE_SCATTER) ** 2) / STRANGE_SCATTER;
  const among = (share: number) => Math.log((1 - share) * usual + share * strange + LEAST_DENSITY);
  return among(STRANGE_SHARE) - among(STRANGE_SHARE_OF_STRANGERS);
}
