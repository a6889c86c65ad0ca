import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { factsOf } from './lineFacts.ts';
import type { Mark } from './naming.ts';
import { weightedMedian } from './weightedMedian.ts';

/** Smooth error of the wavelength calibration: km/s to be taken off at nodes equally spaced in ln(wavelength). */
export interface Drift {
  readonly low: number;
  readonly step: number;
  readonly kms: readonly number[];
}

/** A name that is likely, with its velocity against the systemic one, raw. */
export interface DriftPoint {
  readonly wavelength: number;
  readonly kms: number;
  readonly errKms: number;
}

const NODE_STEP = 0.03;
/** A node hears lines within this much of ln(wavelength), and further until it has heard enough of them. */
const REACH = 0.08;
const WIDEST_REACH = 0.4;
const LEAST_POINTS = 6;
/** A shift below this many of its own errors is none. */
const SIGNIFICANT = 2;
/** Lines this strong (log10, H beta = 100) are recognised before anything is known, within this many km/s. */
const START_LOG_STRENGTH = 0;
const START_REACH_KMS = 150;
const START_ERR_KMS = 20;
/** Bright marks are better placed than the errors of a crowded fit say. */
const START_TRUST = 0.3;
/** Likely names may move the drift no further than this from what the strong lines say, km/s: wrong names confirm each other. */
const FARTHEST_KMS = 15;

export const NO_DRIFT: Drift = { low: 0, step: 1, kms: [0] };

/** km/s at a wavelength (vacuum Angstrom, observed), linear between nodes. */
export function driftAt({ low, step, kms }: Drift, wavelength: number): number {
  const place = Math.min(kms.length - 1, Math.max(0, (Math.log(wavelength) - low) / step));
  const k = Math.min(kms.length - 1, Math.floor(place));
  const next = Math.min(kms.length - 1, k + 1);
  return kms[k] + (place - k) * (kms[next] - kms[k]);
}

/** The drift that strong lines tell by their place, refined by the likely names. */
export function refineDrift(coarse: Drift, fine: Drift): Drift {
  const low = coarse === NO_DRIFT ? fine : coarse;
  return {
    ...low,
    kms: low.kms.map((_, k) => {
      const wavelength = Math.exp(low.low + k * low.step);
      return driftAt(coarse, wavelength) + Math.min(FARTHEST_KMS, Math.max(-FARTHEST_KMS, driftAt(fine, wavelength)));
    }),
  };
}

/** Where a drift is not negligible: its values at the nodes of the observed range, or undefined. */
export function shownDrift(drift: Drift, leastKms: number): { wavelength: number; kms: number }[] | undefined {
  if (!drift.kms.some((kms) => Math.abs(kms) > leastKms)) return undefined;
  return drift.kms.map((kms, k) => ({ wavelength: Math.exp(drift.low + k * drift.step), kms }));
}

/** Marks with the drift taken off; the table keeps the measured ones. */
export const withoutDrift = (marks: readonly Mark[], drift: Drift): Mark[] =>
  marks.map((mark) => ({ ...mark, wavelength: mark.wavelength / (1 + driftAt(drift, mark.wavelength) / SPEED_OF_LIGHT_KMS) }));

/** Where a line without drift at `wavelength` stands in the measured spectrum. */
export const asMeasured = (drift: Drift, wavelength: number): number => wavelength * (1 + driftAt(drift, wavelength) / SPEED_OF_LIGHT_KMS);

/** Local robust regression of degree 0 (Cleveland 1979, J. Am. Stat. Assoc. 74, 829, with medians): kept where it is significant. */
export function fitDrift(points: readonly DriftPoint[], low: number, high: number): Drift {
  if (points.length < LEAST_POINTS) return NO_DRIFT;
  const start = Math.log(low);
  const count = Math.max(2, Math.ceil((Math.log(high) - start) / NODE_STEP) + 1);
  const places = points.map((p) => Math.log(p.wavelength));
  return {
    low: start,
    step: NODE_STEP,
    kms: Array.from({ length: count }, (_, k) => {
      const at = start + k * NODE_STEP;
      let reach = REACH;
      while (reach < WIDEST_REACH && places.filter((p) => Math.abs(p - at) < reach).length < LEAST_POINTS) reach *= 1.4;
      const near = points.filter((_p, i) => Math.abs(places[i] - at) < reach);
      if (near.length < LEAST_POINTS) return 0;
      const weights = near.map((p) => (1 - (Math.abs(Math.log(p.wavelength) - at) / reach) ** 3) ** 3 / (p.errKms * p.errKms));
      const kms = weightedMedian(
        near.map((p) => p.kms),
        weights,
      );
      const err = 1.25 / Math.sqrt(weights.reduce((a, b) => a + b, 0));
      return kms * Math.max(0, 1 - ((SIGNIFICANT * err) / kms) ** 2);
    }),
  };
}

/** Strong lines recognised by their place alone: a first idea of the drift, raw velocities against `z`. */
export function startPoints(marks: readonly Mark[], data: AtomicData, z: number): DriftPoint[] {
  const { lines } = data;
  const { local } = factsOf(data);
  const bright = marks.filter((m) => !m.artefact && m.flux > 0).sort((a, b) => b.flux - a.flux);
  const taken = new Set<number>();
  return bright.slice(0, Math.max(12, bright.length >> 1)).flatMap((mark): DriftPoint[] => {
    const reach = START_REACH_KMS / SPEED_OF_LIGHT_KMS;
    const [first, end] = linesBetween(lines, (mark.wavelength * (1 - reach)) / (1 + z), (mark.wavelength * (1 + reach)) / (1 + z));
    let best = -1;
    for (let line = first; line < end; line++) {
      if (local[line] === 1 || !(lines.logStrength[line] > START_LOG_STRENGTH)) continue;
      if (best < 0 || lines.logStrength[line] > lines.logStrength[best]) best = line;
    }
    // the wings of a bright line are measured as marks of their own: only the brightest mark is the line
    if (best < 0 || taken.has(best)) return [];
    taken.add(best);
    const kms = (mark.wavelength / (lines.wavelengthVac[best] * (1 + z)) - 1) * SPEED_OF_LIGHT_KMS;
    return [
      {
        wavelength: mark.wavelength,
        kms,
        errKms: Math.hypot(START_ERR_KMS, START_TRUST * (mark.wavelengthErr / mark.wavelength) * SPEED_OF_LIGHT_KMS),
      },
    ];
  });
}
