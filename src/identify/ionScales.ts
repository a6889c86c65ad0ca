import type { AtomicData } from '../atomic/index.ts';
import { normalTail } from '../numeric/index.ts';
import { LOCAL_LOG_SCALE, priorLogScale } from './kindPriors.ts';
import type { ObjectKind } from './naming.ts';

/** One line of an ion seen at a flux, with the probability that it is this line. */
export interface Sighting {
  readonly mark: number;
  readonly line: number;
  readonly weight: number;
  /** log10 flux minus log10 predicted at scale 0. */
  readonly excess: number;
  /** One sigma, dex. */
  readonly err: number;
}

/** A line of an ion that was not seen: its scale must keep it below the limit. */
export interface Absence {
  readonly line: number;
  /** log10 limit minus log10 predicted at scale 0. */
  readonly room: number;
  readonly err: number;
}

/** log10 scale of an ion against the reference nebula. */
export interface IonScale {
  readonly mean: number;
  readonly variance: number;
  /** Sum of the weights of its sightings. */
  readonly seen: number;
}

/** Spread of ion abundances and ionisation about the reference, dex: common practice, no source. */
const PRIOR_SPREAD_DEX = 0.9;
/** Neighbours in ionisation energy share excitation: width of the kernel in ln(energy). */
const KERNEL_WIDTH = 0.35;
const KERNEL_PRIOR_WEIGHT = 1.5;
const CENSOR_ROUNDS = 12;
/** The chance that a line above the limit is left out falls by ten for every so many dex that the line should stand above the limit. */
const LEFT_OUT_DEX = 0.7;

/** Prior mean of every ion: the kind of object, and what ions of about the same creation energy show. */
export function priorMeans(data: AtomicData, kind: ObjectKind, scales: readonly IonScale[], local: Uint8Array): Float64Array {
  const { ions } = data.lines;
  const place = ions.map((ion) => Math.log(ion.creationEv + 8));
  return Float64Array.from(ions, (ion, i) => {
    if (local[i]) return LOCAL_LOG_SCALE;
    const base = priorLogScale(ion, kind);
    let sum = 0;
    let weight = KERNEL_PRIOR_WEIGHT;
    for (let j = 0; j < ions.length; j++) {
      if (j === i || local[j] || !(scales[j]?.seen > 0.8)) continue;
      const k = Math.exp(-0.5 * ((place[i] - place[j]) / KERNEL_WIDTH) ** 2) * Math.min(2, scales[j].seen);
      sum += k * (scales[j].mean - priorLogScale(ions[j], kind));
      weight += k;
    }
    return base + sum / weight;
  });
}

/**
 * Posterior of one ion's scale from sightings and absences: normal, with the censored absences worked in by expectation-maximisation (Dempster, Laird & Rubin 1977).
 *
 * @param leftOutShare chance that a line just above the limit is not among the marks all the same
 * @param without leaves the sightings of this mark out: what the rest of the spectrum says
 */
export function fitScale(
  priorMean: number,
  sightings: readonly Sighting[],
  absences: readonly Absence[],
  leftOutShare: number,
  without = -1,
): IonScale {
  let precision = 1 / PRIOR_SPREAD_DEX ** 2;
  let moment = priorMean * precision;
  let seen = 0;
  for (const s of sightings) {
    if (s.mark === without) continue;
    const p = s.weight / (s.err * s.err);
    precision += p;
    moment += p * s.excess;
    seen += s.weight;
  }
  let mean = moment / precision;
  if (absences.length === 0) return { mean, variance: 1 / precision, seen };
  let total = precision;
  for (let round = 0; round < CENSOR_ROUNDS; round++) {
    let m = moment;
    total = precision;
    for (const a of absences) {
      const alpha = (a.room - mean) / a.err;
      if (alpha > 3) continue;
      // an observer's list leaves lines out for other reasons too: that floor keeps one absence from ruling the scale
      const density = Math.exp(-0.5 * alpha * alpha) / Math.sqrt(2 * Math.PI);
      const leftOut = round < CENSOR_ROUNDS / 2 ? 1e-9 : leftOutShare * 10 ** (Math.min(0, a.room - mean) / LEFT_OUT_DEX);
      const hazard = ((1 - leftOut) * density) / (leftOut + (1 - leftOut) * normalTail(-alpha));
      // expectation of the unseen flux below its limit; its information falls as the limit moves away
      const expected = mean - a.err * hazard;
      const p = Math.min(1, Math.max(0.02, hazard * (hazard + alpha))) / (a.err * a.err);
      // Newton's step in the form of a weighted mean: slope of the log likelihood at `mean`
      m += p * (mean + (expected - mean) / Math.max(0.02, p * a.err * a.err));
      total += p;
    }
    const next = m / total;
    if (round > CENSOR_ROUNDS / 2 && Math.abs(next - mean) < 1e-4) {
      mean = next;
      break;
    }
    mean = 0.5 * (mean + next);
  }
  return { mean, variance: 1 / total, seen };
}
