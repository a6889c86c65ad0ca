import { quantile } from '../numeric/index.ts';
import type { Mark } from './naming.ts';
import { typicalFwhmKms } from './widths.ts';

/** What the list of marks itself tells: where it looked and how faint a line it would have shown. */
export interface Survey {
  /** Vacuum Angstrom, observed. */
  readonly low: number;
  readonly high: number;
  /** log10 of the faintest flux that would have been measured at a wavelength, in the marks' unit. */
  readonly logLimitAt: (wavelength: number) => number;
  /** Mean distance of neighbouring marks, Angstrom. */
  readonly spacing: number;
  /** log10 flux of the faintest and the brightest mark. */
  readonly logFaintest: number;
  readonly logBrightest: number;
  /** FWHM of the brighter features, km/s; absent when too few have one. */
  readonly fwhmKms?: number;
}

/** The spectrum is taken to reach this far beyond its outermost marks, as a share of the wavelength. */
const MARGIN = 0.004;
/** Nearest marks that tell of the depth at a place. */
const NEIGHBOURS = 24;
/** The faintest marks of a neighbourhood stand near the limit. */
const FAINT_QUANTILE = 0.06;
/** A lone mark stands for at least this much spectrum, Angstrom. */
const MIN_RANGE = 100;

export function surveyOf(marks: readonly Mark[]): Survey {
  const shown = marks.filter((m) => !m.artefact && m.flux > 0).sort((a, b) => a.wavelength - b.wavelength);
  const all = marks.map((m) => m.wavelength);
  const low = Math.min(...all) * (1 - MARGIN);
  const high = Math.max(...all) * (1 + MARGIN);
  const logs = shown.map((m) => Math.log10(m.flux));
  const limits = shown.map((_, i) => {
    const from = Math.max(0, Math.min(i - NEIGHBOURS / 2, shown.length - NEIGHBOURS));
    return quantile(logs.slice(from, from + NEIGHBOURS), FAINT_QUANTILE);
  });
  const logLimitAt = (wavelength: number) => {
    if (shown.length === 0) return Number.POSITIVE_INFINITY;
    let nearest = 0;
    let end = shown.length - 1;
    while (nearest < end) {
      const mid = (nearest + end) >> 1;
      if (shown[mid].wavelength < wavelength) nearest = mid + 1;
      else end = mid;
    }
    return limits[nearest];
  };
  const fwhmKms = typicalFwhmKms(marks);
  return {
    low,
    high,
    logLimitAt,
    spacing: Math.max(MIN_RANGE, high - low) / Math.max(1, marks.length),
    logFaintest: Math.min(...logs),
    logBrightest: Math.max(...logs),
    ...(fwhmKms === undefined ? {} : { fwhmKms }),
  };
}
