import type { AtomicData } from '../atomic/index.ts';
import { priorLogScale } from './kindPriors.ts';
import { factsOf } from './lineFacts.ts';
import type { ObjectKind } from './naming.ts';
import type { FamilyScale } from './scalePosterior.ts';

const KINDS = ['hii-region', 'planetary-nebula', 'nova-shell', 'shocked-gas', 'narrow-line-galaxy'] as const;
/** Spread of ion scales about those of the kind, dex. */
const SPREAD_DEX = 0.7;
/** One odd ion does not decide. */
const MOST_NATS = 3;
/** A kind is said only when it is this probable. */
const SURE = 0.7;
const LEAST_SEEN = 0.8;

/** The kind of object whose ion scales fit best what was found; 'unknown' unless one kind stands out. */
export function estimateKind(data: AtomicData, scales: readonly FamilyScale[]): { kind: ObjectKind; probability: number } {
  const { families } = factsOf(data);
  const nats = KINDS.map((kind) =>
    families.reduce((sum, { ion, local, mechanism, zoneEv }, i) => {
      // what light pumps follows the star's spectrum, not the kind of object
      if (local || mechanism === 'fluorescence') return sum;
      const { mean, variance, seen } = scales[i];
      const off = mean - priorLogScale(data.lines.ions[ion], zoneEv, kind);
      // an ion that was not seen speaks only when it should be stronger than its limit
      if (!(seen > LEAST_SEEN) && off > 0) return sum;
      return sum - Math.min(MOST_NATS, (0.5 * off * off) / (SPREAD_DEX * SPREAD_DEX + variance)) * Math.min(1, 0.2 + seen);
    }, 0),
  );
  const best = Math.max(...nats);
  const weights = nats.map((n) => Math.exp(n - best));
  const total = weights.reduce((a, b) => a + b, 0);
  const k = nats.indexOf(best);
  const probability = weights[k] / total;
  return { kind: probability > SURE ? KINDS[k] : 'unknown', probability };
}
