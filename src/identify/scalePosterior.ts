import { normalTail } from '../numeric/index.ts';
import { chanceLeftOut, type LeftOut } from './leftOut.ts';

/** What is expected of a family before its lines are looked at. */
export interface ScalePrior {
  readonly mean: number;
  /** Mean before the excitation that other ions show is taken in. */
  readonly base: number;
  /** One sigma, dex. */
  readonly spread: number;
}

/** A line of a family that was not seen: the scale must keep it below the limit. */
export interface Absence {
  readonly line: number;
  /** log10 limit minus log10 predicted at scale 0. */
  readonly room: number;
  readonly err: number;
  /** What feeds the line may itself be missing: the line is then absent with this probability at any scale. */
  readonly unfed: number;
}

/** What one mark says of a family. */
export interface Sighting {
  readonly mark: number;
  /** Probability that the mark is of the family, as far as it goes. */
  readonly weight: number;
  /** Log likelihood of the mark at each scale of the grid: it is one of the family's lines, or any of its other names. */
  readonly logLikelihood: Float64Array;
}

/** log10 scale of a family against the reference nebula. */
export interface FamilyScale {
  readonly mean: number;
  readonly variance: number;
  /** Variance about the mean of what lies above it, and below: absences cut the upper side short. */
  readonly varianceUp: number;
  readonly varianceDown: number;
  /** Sum of the weights of its sightings. */
  readonly seen: number;
}

const GRID_LOW = -5;
const GRID_STEP = 0.2;
export const GRID_COUNT = 49;
/** log10 scale at a place of the grid. */
export const gridScale = (g: number): number => GRID_LOW + GRID_STEP * g;

const LEAST_VARIANCE = GRID_STEP ** 2 / 12;
/** Beyond this many errors below the limit an absence says nothing. */
const FAR_BELOW = 4;

/** Log posterior of a family's scale on the grid, not normalised. */
export interface ScalePosterior {
  readonly log: Float64Array;
  readonly seen: number;
}

/**
 * What prior, absences and all marks say of a family's scale together. The grid keeps what a normal would lose: an ion is there at one strength, or it is not
 * there and its sightings are other lines.
 *
 * @param leftOutHow what the list leaves out
 */
export function scalePosterior(
  prior: ScalePrior,
  sightings: readonly Sighting[],
  absences: readonly Absence[],
  leftOutHow: LeftOut,
): ScalePosterior {
  const log = new Float64Array(GRID_COUNT);
  for (let g = 0; g < GRID_COUNT; g++) log[g] = -0.5 * ((gridScale(g) - prior.mean) / prior.spread) ** 2;
  for (let g = 0; g < GRID_COUNT; g++) log[g] += logAbsent(gridScale(g), absences, leftOutHow);
  let seen = 0;
  for (const { weight, logLikelihood } of sightings) {
    for (let g = 0; g < GRID_COUNT; g++) log[g] += logLikelihood[g];
    seen += weight;
  }
  return { log, seen };
}

/** Logarithm of the chance that the family's absent lines are absent at a scale, nats. */
export function logAbsent(scale: number, absences: readonly Absence[], leftOutHow: LeftOut): number {
  let log = 0;
  for (const { room, err, unfed } of absences) {
    const free = room - scale;
    if (free > FAR_BELOW * err) continue;
    // an observer's list leaves lines out for other reasons too: that floor keeps one absence from ruling the scale
    const leftOut = unfed + (1 - unfed) * chanceLeftOut(leftOutHow, -free);
    log += Math.log(leftOut + (1 - leftOut) * normalTail(-free / err));
  }
  return log;
}

/**
 * Mean and variance of a posterior.
 *
 * @param without leaves this sighting out: what the rest of the spectrum says
 */
export function summaryOf({ log, seen }: ScalePosterior, without?: Sighting): FamilyScale {
  let top = Number.NEGATIVE_INFINITY;
  for (let g = 0; g < GRID_COUNT; g++) top = Math.max(top, log[g] - (without?.logLikelihood[g] ?? 0));
  let sum = 0;
  let first = 0;
  let second = 0;
  for (let g = 0; g < GRID_COUNT; g++) {
    const p = Math.exp(log[g] - (without?.logLikelihood[g] ?? 0) - top);
    const s = gridScale(g);
    sum += p;
    first += p * s;
    second += p * s * s;
  }
  const mean = first / sum;
  let up = 0;
  let upSum = 0;
  let down = 0;
  let downSum = 0;
  for (let g = 0; g < GRID_COUNT; g++) {
    const p = Math.exp(log[g] - (without?.logLikelihood[g] ?? 0) - top);
    const off = gridScale(g) - mean;
    if (off > 0) {
      up += p * off * off;
      upSum += p;
    } else {
      down += p * off * off;
      downSum += p;
    }
  }
  return {
    varianceUp: upSum > 0 ? up / upSum : LEAST_VARIANCE,
    varianceDown: downSum > 0 ? down / downSum : LEAST_VARIANCE,
    mean,
    variance: Math.max(0, second / sum - mean * mean),
    seen: seen - (without?.weight ?? 0),
  };
}
