import { jOf, type LevelEntry } from './assembly.ts';

/**
 * Estimated effective collision strengths, per product of statistical weights, for pairs of levels without a published value: same term, same spin,
 * spin changed by one pair, by two pairs. Round numbers within the published values of Fe II, Fe VI and Fe VII tabulated here at 10^4 K; scatter 0.5 dex.
 */
const PER_WEIGHTS = { sameTerm: 0.03, sameSpin: 0.01, spinByOne: 0.004, spinByTwo: 0.0005 };

function multiplicity(term: string): number {
  const m = /(\d+)[A-Z]/.exec(term);
  return m ? Number(m[1]) : 1;
}

function perWeights(a: LevelEntry, b: LevelEntry): number {
  if (a.term === b.term && a.configuration === b.configuration) return PER_WEIGHTS.sameTerm;
  const change = Math.abs(multiplicity(a.term) - multiplicity(b.term));
  if (change === 0) return PER_WEIGHTS.sameSpin;
  return change <= 2 ? PER_WEIGHTS.spinByOne : PER_WEIGHTS.spinByTwo;
}

/** Collisions for the levels not `reached` by a tabulated one: all pairs between such a level and the levels below it. */
export function estimatedCollisions(
  levels: readonly LevelEntry[],
  reached: ReadonlySet<number>,
): { readonly lower: number; readonly upper: number; readonly upsilon: number }[] {
  const g = levels.map((level) => 2 * jOf(level) + 1);
  const out: { lower: number; upper: number; upsilon: number }[] = [];
  for (let upper = 1; upper < levels.length; upper++) {
    if (reached.has(upper)) continue;
    for (let lower = 0; lower < upper; lower++) {
      out.push({ lower, upper, upsilon: perWeights(levels[lower], levels[upper]) * g[lower] * g[upper] });
    }
  }
  return out;
}
