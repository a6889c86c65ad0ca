import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { chanceLeftOut } from './leftOut.ts';
import type { SystemModel } from './model.ts';
import type { CompanionFinding, Mark, NamingSettings } from './naming.ts';
import { isLocal } from './options.ts';
import { roughDimming } from './roughReddening.ts';
import type { Survey } from './survey.ts';

/** A companion with what it says of the candidate. */
export interface WeighedCompanion {
  readonly finding: CompanionFinding;
  readonly nats: number;
  readonly sameUpper: boolean;
}

/** Relatives of every line: those that share its upper level, and those of its multiplet. */
export interface Kin {
  readonly of: (line: number) => readonly number[];
}

/** Companions looked at for one candidate. */
const MOST_COMPANIONS = 5;
/** Scatter of the ratio of two lines from one upper level (A values), and of two lines of one multiplet (level populations), dex. */
const SAME_UPPER_DEX = 0.07;
const MULTIPLET_DEX = 0.16;
/** Pumping fills the levels of a multiplet unevenly, dex. */
const PUMPED_DEX = 0.35;
/** The ion's scale already holds part of this evidence: it counts by this share. */
const SHARE = 0.6;
const MOST_FOR = 2.5;
/** An observer's list leaves lines out: an absent companion counts this much at most, and all that speak against together. */
const MOST_AGAINST = 2.5;
const MOST_AGAINST_TOGETHER = 5;
/** Marks without a width: two lines nearer than this many errors of a mark could not be told apart. */
const UNRESOLVED_SIGMAS = 3;

const made = new WeakMap<AtomicData, Kin>();

/** Made once a bundle. */
export function kinOf(data: AtomicData): Kin {
  const before = made.get(data);
  if (before) return before;
  const { lines } = data;
  const byUpper = new Map<number, number[]>();
  const byMultiplet = new Map<number, number[]>();
  const put = (map: Map<number, number[]>, key: number, line: number) => {
    if (key <= 0) return;
    const list = map.get(key);
    if (list) list.push(line);
    else map.set(key, [line]);
  };
  for (let line = 0; line < lines.count; line++) {
    if (isLocal(data, line)) continue;
    put(byUpper, lines.upperId[line], line);
    put(byMultiplet, lines.multiplet[line], line);
  }
  const kin: Kin = {
    of(line) {
      const relatives = new Set([...(byUpper.get(lines.upperId[line]) ?? []), ...(byMultiplet.get(lines.multiplet[line]) ?? [])]);
      relatives.delete(line);
      return [...relatives].sort((a, b) => lines.logStrength[b] - lines.logStrength[a]).slice(0, MOST_COMPANIONS);
    },
  };
  made.set(data, kin);
  return kin;
}

/**
 * Looks for the companions of a line that is taken for a mark.
 *
 * @param share of the mark's flux that the line carries
 * @param marks ascending wavelength
 */
export function findCompanions(
  mark: Mark,
  line: number,
  share: number,
  marks: readonly Mark[],
  kin: Kin,
  data: AtomicData,
  survey: Survey,
  model: SystemModel,
  settings: NamingSettings,
): WeighedCompanion[] {
  const { lines } = data;
  const found = kin.of(line).flatMap((other): WeighedCompanion[] => {
    const dimming = model.cHbeta * (roughDimming(lines.wavelengthVac[line]) - roughDimming(lines.wavelengthVac[other]));
    const logRatio = lines.logStrength[other] - lines.logStrength[line] + dimming;
    if (!Number.isFinite(logRatio)) return [];
    const expectedAt = lines.wavelengthVac[other] * (1 + model.z);
    const logPredicted = Math.log10(mark.flux * share) + logRatio;
    const sameUpper = lines.upperId[other] === lines.upperId[line] && lines.upperId[line] > 0;
    const pumped = lines.mechanism(line) === 'fluorescence' || lines.mechanism(other) === 'fluorescence';
    const err = sameUpper ? SAME_UPPER_DEX : pumped ? PUMPED_DEX : MULTIPLET_DEX;
    const base = { line: other, expectedAt, predictedFlux: 10 ** logPredicted };
    const say = (outcome: CompanionFinding['outcome'], nats: number, feature?: number): WeighedCompanion[] => [
      { finding: { ...base, outcome, ...(feature === undefined ? {} : { feature }) }, nats: SHARE * nats, sameUpper },
    ];
    if (!survey.covers(expectedAt)) return say('outside', 0);
    if (Math.abs(expectedAt - mark.wavelength) < mergedWithin(mark)) return [];
    const there = nearestWithin(marks, expectedAt, (settings.toleranceKms / SPEED_OF_LIGHT_KMS) * expectedAt);
    const above = logPredicted - survey.logLimitAt(expectedAt);
    if (there === undefined) {
      if (above <= 0) return say('too-faint', 0);
      const near = nearestWithin(marks, expectedAt, mergedWithin(mark));
      if (near !== undefined && Math.log10(marks[near].flux) > logPredicted - err) return say('hidden', 0, near);
      const left = chanceLeftOut(model.leftOut, above);
      const gone = Math.exp(-0.5 * (above / Math.hypot(err, 0.1)) ** 2);
      return say('absent', Math.max(-MOST_AGAINST, Math.log(left + (1 - left) * gone)));
    }
    const off = Math.log10(marks[there].flux) - logPredicted;
    const fluxErr = Number.isFinite(marks[there].fluxErr) ? (Math.LOG10E * marks[there].fluxErr) / marks[there].flux : 0.05;
    const s = Math.hypot(err, fluxErr, 0.03);
    if (Math.abs(off) <= 3 * s)
      return say('seen', Math.min(MOST_FOR, Math.log((3 * Math.exp(-0.5 * (off / s) ** 2)) / (s * Math.sqrt(2 * Math.PI)))), there);
    // something stronger stands there: the companion may hide in it
    if (off > 0) return say('hidden', 0, there);
    return say('wrong-ratio', -Math.min(MOST_AGAINST, 0.5 * (off / s) ** 2 * 0.3), there);
  });
  return together(found);
}

/** Those that speak against fail for one reason together: their sum is held. */
function together(found: readonly WeighedCompanion[]): WeighedCompanion[] {
  const against = -found.reduce((sum, c) => sum + Math.min(0, c.nats), 0);
  if (against <= MOST_AGAINST_TOGETHER) return [...found];
  return found.map((c) => (c.nats < 0 ? { ...c, nats: (c.nats * MOST_AGAINST_TOGETHER) / against } : c));
}

/** Lines nearer to a mark than this are measured with it, Angstrom. */
const mergedWithin = (mark: Mark) => mark.fwhm ?? UNRESOLVED_SIGMAS * mark.wavelengthErr;

function nearestWithin(marks: readonly Mark[], at: number, reach: number): number | undefined {
  let best: number | undefined;
  let low = 0;
  let high = marks.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (marks[mid].wavelength < at - reach) low = mid + 1;
    else high = mid;
  }
  for (let j = low; j < marks.length && marks[j].wavelength <= at + reach; j++) {
    if (marks[j].artefact || marks[j].flux <= 0) continue;
    if (best === undefined || Math.abs(marks[j].wavelength - at) < Math.abs(marks[best].wavelength - at)) best = j;
  }
  return best;
}

/** Strong lines that the model predicts in the observed range and that no mark stands for; `linesBetween` keeps it to the range. */
export function missingLines(
  marks: readonly Mark[],
  data: AtomicData,
  survey: Survey,
  model: SystemModel,
  scaleOf: (line: number) => { mean: number; seen: number },
  logPredicted: (line: number) => number,
  toleranceKms: number,
): { line: number; predictedFlux: number; expectedAt: number; above: number }[] {
  const { lines } = data;
  const [first, end] = linesBetween(lines, survey.low / (1 + model.z), survey.high / (1 + model.z));
  const missing: { line: number; predictedFlux: number; expectedAt: number; above: number }[] = [];
  for (let line = first; line < end; line++) {
    if (isLocal(data, line)) continue;
    const scale = scaleOf(line);
    if (!(scale.seen > 0.8)) continue;
    const expectedAt = lines.wavelengthVac[line] * (1 + model.z);
    if (!survey.covers(expectedAt)) continue;
    const log = logPredicted(line) + scale.mean;
    const above = log - survey.logLimitAt(expectedAt);
    if (above < 0.5) continue;
    if (nearestWithin(marks, expectedAt, (2 * toleranceKms * expectedAt) / SPEED_OF_LIGHT_KMS) === undefined)
      missing.push({ line, predictedFlux: 10 ** log, expectedAt, above });
  }
  return missing.sort((a, b) => b.predictedFlux - a.predictedFlux).slice(0, 40);
}
