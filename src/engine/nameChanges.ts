import { sameKeys } from '../session/index.ts';
import type { CandidateView, FeatureView, NameChange } from './analysis.ts';

/** A name that stays is told of when its probability moved by this much. */
const LEAST_MOVE = 0.2;

/**
 * What a step changed in the names of features that it did not decide on itself, in the order of the features.
 *
 * @param before, after the same features before and after the step
 */
export function nameChanges(before: readonly FeatureView[], after: readonly FeatureView[]): NameChange[] {
  if (before.length !== after.length) return [];
  return after.flatMap((now, feature): NameChange[] => {
    const was = before[feature];
    if (JSON.stringify(was.verdict) !== JSON.stringify(now.verdict)) return [];
    const moved = Math.abs((now.name?.probability ?? 0) - (was.name?.probability ?? 0));
    if (isSame(was.name, now.name) && moved < LEAST_MOVE) return [];
    return [{ feature, ...(was.name ? { from: short(was.name) } : {}), ...(now.name ? { to: short(now.name) } : {}) }];
  });
}

const short = ({ label, probability }: CandidateView) => ({ label, probability });

const isSame = (a: CandidateView | undefined, b: CandidateView | undefined) =>
  a === undefined || b === undefined ? a === b : sameKeys(a.keys, b.keys);
