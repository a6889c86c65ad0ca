import { quantile } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import type { Mark, NamingSettings } from './naming.ts';
import { typicalFwhmKms } from './widths.ts';

/** What the list of marks itself tells: where it looked and how faint a line it would have shown. */
export interface Survey {
  /** Vacuum Angstrom, observed. */
  readonly low: number;
  readonly high: number;
  /** Whether a line there would have been looked at: inside the range and in no gap. */
  readonly covers: (wavelength: number) => boolean;
  /** log10 of the faintest flux that would have been measured at a wavelength, in the marks' unit. */
  readonly logLimitAt: (wavelength: number) => number;
  /** Distance of neighbouring marks about a wavelength, Angstrom: lines of no list stand where lines stand. */
  readonly spacingAt: (wavelength: number) => number;
  /** log10 flux of the faintest and the brightest mark. */
  readonly logFaintest: number;
  readonly logBrightest: number;
  /** Width of an unresolved feature where a mark tells none, Angstrom: from the errors, and from how close the list tells lines apart. */
  readonly unresolvedAt: (mark: Mark) => number;
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

export function surveyOf(marks: readonly Mark[], gaps: NamingSettings['gaps'] = []): Survey {
  const shown = marks.filter((m) => !m.artefact && m.flux > 0).sort((a, b) => a.wavelength - b.wavelength);
  const all = marks.map((m) => m.wavelength);
  const low = Math.min(...all) * (1 - MARGIN);
  const high = Math.max(...all) * (1 + MARGIN);
  const logs = shown.map((m) => Math.log10(m.flux));
  const limits = shown.map((_, i) => {
    const from = Math.max(0, Math.min(i - NEIGHBOURS / 2, shown.length - NEIGHBOURS));
    return quantile(logs.slice(from, from + NEIGHBOURS), FAINT_QUANTILE);
  });
  const places = shown.map((m) => m.wavelength);
  const logLimitAt = (wavelength: number) => {
    if (shown.length === 0) return Number.POSITIVE_INFINITY;
    return limits[nearestPlace(places, wavelength)];
  };
  const fwhmKms = typicalFwhmKms(marks);
  return {
    low,
    high,
    covers: (at) => at >= low && at <= high && !gaps.some(([from, to]) => at > from && at < to),
    logLimitAt,
    spacingAt: spacingOf(
      all.sort((a, b) => a - b),
      Math.max(MIN_RANGE, high - low) / Math.max(1, marks.length),
    ),
    unresolvedAt: unresolvedOf(marks),
    logFaintest: Math.min(...logs),
    logBrightest: Math.max(...logs),
    ...(fwhmKms === undefined ? {} : { fwhmKms }),
  };
}

/** Half of what is known of the density of marks at a place comes from the whole range, half from the nearest marks. */
function spacingOf(places: readonly number[], overall: number): (wavelength: number) => number {
  if (places.length <= NEIGHBOURS) return () => overall;
  const near = places.map((_, i) => {
    const from = Math.max(0, Math.min(i - NEIGHBOURS / 2, places.length - 1 - NEIGHBOURS));
    const local = Math.max(overall / MOST_CROWDED, (places[from + NEIGHBOURS] - places[from]) / NEIGHBOURS);
    return 2 / (1 / local + 1 / overall);
  });
  return (wavelength) => near[nearestPlace(places, wavelength)];
}

/** The places in a crowd are at most this much denser than over all. */
const MOST_CROWDED = 10;

function nearestPlace(places: readonly number[], wavelength: number): number {
  let nearest = 0;
  let end = places.length - 1;
  while (nearest < end) {
    const mid = (nearest + end) >> 1;
    if (places[mid] < wavelength) nearest = mid + 1;
    else end = mid;
  }
  return nearest;
}

/** Width of a mark whose width is unknown: this many of its errors, ... */
const WIDTH_SIGMAS = 3;
/** ... at least this many km/s, ... */
const LEAST_WIDTH_KMS = 25;
/** ... up to this many errors where no two marks of the list stand nearer. */
const MOST_WIDTH_SIGMAS = 20;
/** The closest pairs may be a list's own splitting of one feature: those of this quantile count. */
const CLOSE_QUANTILE = 0.02;

function unresolvedOf(marks: readonly Mark[]): (mark: Mark) => number {
  const places = marks
    .filter((m) => !m.artefact)
    .map((m) => m.wavelength)
    .sort((a, b) => a - b);
  const gaps = places.slice(1).map((p, k) => Math.log(p / places[k]));
  const closest = gaps.length > 0 ? quantile(gaps, CLOSE_QUANTILE) : Number.POSITIVE_INFINITY;
  return ({ wavelength, wavelengthErr }) =>
    Math.max(
      WIDTH_SIGMAS * wavelengthErr,
      (LEAST_WIDTH_KMS / SPEED_OF_LIGHT_KMS) * wavelength,
      Math.min(MOST_WIDTH_SIGMAS * wavelengthErr, closest * wavelength),
    );
}
