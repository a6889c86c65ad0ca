import type { AtomicData } from '../../src/atomic/index.ts';
import { DEFAULT_NAMING_SETTINGS, nameMarks } from '../../src/identify/index.ts';
import { type SimulatedMark, type SimulatedNebula, simulateNebula } from './simulatedNebula.ts';
import { withoutLines } from './withoutLines.ts';

/** A leading name with the probability it was given. */
export interface Claim {
  readonly kind: SimulatedNebula['kind'];
  readonly claimed: number;
  readonly right: boolean;
}

export interface Claims {
  readonly claims: readonly Claim[];
  readonly spectra: number;
  /** Seeds of nebulae whose redshift was missed. */
  readonly missedRedshifts: readonly number[];
}

const KINDS = ['low', 'high', 'shocked', 'nova', 'galaxy'] as const;
/** Of the multiplets, every so many is unknown to the namer. */
const EVERY_GONE = 29;

const pick = <T>(from: readonly T[], seed: number, stride: number): T => from[Math.floor(seed / stride) % from.length];

/** The nebulae the model was looked at with. */
export const usualNebula = (seed: number): SimulatedNebula => ({
  seed,
  kind: KINDS[seed % 5],
  count: pick([60, 150, 100, 220, 25], seed, 5),
  resolvingPower: pick([2000, 20_000, 5000, 1500], seed, 2),
  z: seed % 5 === 4 ? 0.02 + 0.09 * (seed % 28) : ((seed * 37) % 200) * 3e-6,
  low: pick([3500, 3300, 3900], seed, 9),
  high: pick([9800, 9000], seed, 4),
  strangers: pick([0.03, 0.06], seed, 11),
  te: pick([8000, 10_000, 14_000], seed, 7),
  ne: pick([100, 3000, 30_000, 1e6], seed, 3),
  cHbeta: pick([0.3, 1, 2], seed, 10),
  ionScatterDex: pick([0.45, 0.6], seed, 13),
  calibrationFwhm: pick([0.01, 0.05], seed, 4),
  bendDex: pick([0, 0.07], seed, 6),
  leftOut: pick([0, 0.2, 0.4], seed, 8),
  withoutWidths: seed % 4 === 1,
});

/** Nebulae outside those ranges, kept aside: nothing is chosen by them. */
export const asideNebula = (seed: number): SimulatedNebula => ({
  seed: seed + 50_000,
  kind: KINDS[seed % 5],
  count: pick([45, 120, 80, 320, 20], seed, 5),
  resolvingPower: pick([3000, 40_000, 1200, 9000], seed, 2),
  z: seed % 5 === 4 ? 0.013 + 0.07 * (seed % 41) : (((seed * 53) % 200) - 100) * 1.5e-5,
  low: pick([3100, 4100], seed, 9),
  high: pick([10_400, 8000, 7100], seed, 4),
  strangers: 0.05,
  te: pick([6500, 12_000, 18_000], seed, 7),
  ne: pick([30, 1000, 1e5, 5e6], seed, 3),
  cHbeta: pick([0, 1.6, 2.6], seed, 10),
  ionScatterDex: 0.65,
  calibrationFwhm: pick([0.02, 0.07], seed, 4),
  bendDex: pick([0.03, 0.1], seed, 6),
  leftOut: pick([0.1, 0.45], seed, 8),
  withoutWidths: seed % 3 === 1,
});

/** Names claimed for nebulae of all kinds by a namer whose list lacks some of their lines. */
export function claimsFor(full: AtomicData, nebulaOf: (seed: number) => SimulatedNebula, from: number, to: number): Claims {
  const { data, placeOf } = withoutLines(full, (line) => full.lines.multiplet[line] % EVERY_GONE === 7);
  const { lines } = data;
  /** One ion, and near enough to be printed as one line of a multiplet. */
  const isSame = (a: number, b: number) =>
    a === b || (lines.ion[a] === lines.ion[b] && Math.abs(lines.wavelengthVac[a] - lines.wavelengthVac[b]) < 1.2);
  /** A name is right when its leading line carries at least a quarter of the feature. */
  const isRight = (mark: SimulatedMark, named: number) => mark.lines.some((line) => placeOf[line] >= 0 && isSame(placeOf[line], named));
  const claims: Claim[] = [];
  const missedRedshifts: number[] = [];
  for (let seed = from; seed <= to; seed++) {
    const nebula = nebulaOf(seed);
    const marks = simulateNebula(full, nebula);
    const naming = nameMarks(marks, data, DEFAULT_NAMING_SETTINGS, []);
    // what a name is worth is said for the redshift it is named at: that has a probability of its own
    if (Math.abs(naming.z - nebula.z) > 3e-4 * (1 + nebula.z)) {
      missedRedshifts.push(nebula.seed);
      continue;
    }
    naming.features.forEach(({ candidates, noneProbability }, k) => {
      const [best] = candidates;
      if (best && best.probability > noneProbability)
        claims.push({ kind: nebula.kind, claimed: best.probability, right: isRight(marks[k], best.lines[0]) });
    });
  }
  return { claims, spectra: to - from + 1, missedRedshifts };
}

/** One bin of claimed probability. */
export interface Bin {
  readonly low: number;
  readonly high: number;
  readonly count: number;
  /** Mean claimed probability and share of right names. */
  readonly claimed: number;
  readonly right: number;
}

/** The claims from `low` up to `high`; 1 belongs to the last bin. */
export function binOf(claims: readonly Claim[], low: number, high: number): Bin {
  const inside = claims.filter((c) => c.claimed >= low && (c.claimed < high || high === 1));
  const mean = (values: readonly number[]) => values.reduce((p, q) => p + q, 0) / Math.max(1, values.length);
  return {
    low,
    high,
    count: inside.length,
    claimed: mean(inside.map((c) => c.claimed)),
    right: mean(inside.map((c) => (c.right ? 1 : 0))),
  };
}

/** Claims in bins of equal width from 0 to 1. */
export const binsOf = (claims: readonly Claim[], bins = 10): Bin[] =>
  Array.from({ length: bins }, (_, b) => binOf(claims, b / bins, (b + 1) / bins));
