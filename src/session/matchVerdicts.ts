import type { Verdict } from './document.ts';

/** Vacuum wavelength and its one-sigma error, Angstrom. */
export interface Place {
  readonly at: number;
  readonly atErr: number;
}

/** A verdict still means a feature this many combined errors away: wide enough for a refit, narrow enough for a blend. */
const REACH_SIGMA = 4;
/** And in any case this near, Angstrom: strong lines have errors far below what another continuum or another blend partner shifts them. */
const REACH_A = 0.15;

/** Distance within which a verdict is taken to mean the feature, Angstrom. */
const reach = (verdict: Verdict, feature: Place) =>
  Math.max(REACH_A, REACH_SIGMA * Math.hypot(finite(verdict.atErr), finite(feature.atErr)));

/** The verdict that means `feature`, the nearest when several do. */
export function findVerdict(verdicts: readonly Verdict[], feature: Place): Verdict | undefined {
  let best: Verdict | undefined;
  for (const verdict of verdicts) {
    const distance = Math.abs(verdict.at - feature.at);
    if (distance <= reach(verdict, feature) && (!best || distance < Math.abs(best.at - feature.at))) best = verdict;
  }
  return best;
}

/**
 * Gives every verdict to at most one feature and every feature at most one verdict, nearest pairs first.
 *
 * @returns for each feature its verdict or undefined; verdicts that found no feature come second
 */
export function matchVerdicts(
  verdicts: readonly Verdict[],
  features: readonly Place[],
): { byFeature: (Verdict | undefined)[]; lost: Verdict[] } {
  const pairs: { verdict: number; feature: number; distance: number }[] = [];
  verdicts.forEach((verdict, v) => {
    features.forEach((feature, f) => {
      const distance = Math.abs(verdict.at - feature.at);
      if (distance <= reach(verdict, feature)) pairs.push({ verdict: v, feature: f, distance });
    });
  });
  pairs.sort((a, b) => a.distance - b.distance || a.verdict - b.verdict);
  const byFeature: (Verdict | undefined)[] = features.map(() => undefined);
  const used = new Set<number>();
  for (const pair of pairs) {
    if (used.has(pair.verdict) || byFeature[pair.feature]) continue;
    byFeature[pair.feature] = verdicts[pair.verdict];
    used.add(pair.verdict);
  }
  return { byFeature, lost: verdicts.filter((_, v) => !used.has(v)) };
}

const finite = (value: number) => (Number.isFinite(value) ? value : 0);
