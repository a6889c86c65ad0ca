import type { Weighing } from './weighed.ts';

/** Which mark claims a line most, and how strongly the next one does. */
export interface Claim {
  readonly mark: number;
  readonly probability: number;
  readonly second: number;
}

/** For every line the two strongest claims on it: a line is one feature. */
export function claimsOf(weighings: readonly Weighing[]): Map<number, Claim> {
  const claims = new Map<number, Claim>();
  weighings.forEach(({ candidates }, mark) => {
    for (const { lines, probability } of candidates) {
      for (const line of lines) {
        const claim = claims.get(line);
        if (!claim) claims.set(line, { mark, probability, second: 0 });
        else if (claim.mark === mark) claims.set(line, { ...claim, probability: Math.min(1, claim.probability + probability) });
        else if (probability > claim.probability) claims.set(line, { mark, probability, second: claim.probability });
        else if (probability > claim.second) claims.set(line, { ...claim, second: probability });
      }
    }
  });
  return claims;
}

/** Probability that a mark other than `mark` is the line. */
export function claimedElsewhere(claims: ReadonlyMap<number, Claim>, line: number, mark: number): number {
  const claim = claims.get(line);
  return claim ? (claim.mark === mark ? claim.second : claim.probability) : 0;
}
