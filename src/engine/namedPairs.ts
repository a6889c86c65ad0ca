import { type AtomicData, branchingRatio } from '../atomic/index.ts';
import type { Naming } from '../identify/index.ts';
import type { Feature, TieEdit } from '../measure/index.ts';
import type { Verdict } from '../session/index.ts';
import { fromVacuum, type Medium } from '../spectrum/index.ts';
import { lineOfKey } from './lineNames.ts';

/** A name that is not accepted must be this sure before a fit rests on it. */
const SURE = 0.95;
/** The reference of a tie must be this many times as strong, in S/N, as the feature tied to it. */
const STRONGER = 1.5;
/** A flux ratio fixed by atomic data good to a few per cent helps only where the fit itself knows the flux worse than this. */
const UNSURE_FLUX = 0.05;

/**
 * Ties for blended features with a stronger, unblended partner of their own pair: lines of one ion that share their upper level get velocity, width and, where the
 * blend leaves the flux uncertain, the ratio of the A values; lines of one multiplet get velocity and width.
 */
export function namedPairs(
  data: AtomicData,
  medium: Medium,
  features: readonly Feature[],
  naming: Naming,
  verdicts: readonly (Verdict | undefined)[],
): TieEdit[] {
  const named = features.flatMap((feature, k) => {
    const line = feature.kind === 'emission' && !feature.artefact && !feature.byHand ? sureLine(data, naming, verdicts[k], k) : undefined;
    return line === undefined ? [] : [{ feature, line }];
  });
  return named.flatMap(({ feature, line }): TieEdit[] => {
    if (!feature.notes.includes('blended')) return [];
    const partners = named.filter(
      (other) => isPair(data, line, other.line) && other.feature.snr > STRONGER * feature.snr && !other.feature.notes.includes('blended'),
    );
    if (partners.length === 0) return [];
    const partner = partners.reduce((a, b) => (b.feature.snr > a.feature.snr ? b : a));
    const ratio = feature.fluxErr > UNSURE_FLUX * feature.flux ? fixedRatio(data, line, partner.line) : undefined;
    const rest = (of: number) => fromVacuum(data.lines.wavelengthVac[of], medium);
    const tie: TieEdit = {
      edit: 'tie',
      at: feature.centroid,
      to: partner.feature.centroid,
      restAt: rest(line),
      restTo: rest(partner.line),
      ...(ratio === undefined ? {} : { ratio }),
    };
    return [tie];
  });
}

/** The one transition that a feature surely is. */
function sureLine(data: AtomicData, naming: Naming, verdict: Verdict | undefined, feature: number): number | undefined {
  if (verdict?.decision === 'accepted') return verdict.accepted?.length === 1 ? lineOfKey(data, verdict.accepted[0]) : undefined;
  if (verdict?.decision !== undefined) return undefined;
  const best = naming.features[feature].candidates[0];
  return best?.probability >= SURE && best.lines.length === 1 ? best.lines[0] : undefined;
}

function isPair({ lines }: AtomicData, a: number, b: number): boolean {
  if (a === b || lines.ion[a] !== lines.ion[b]) return false;
  return (
    (lines.upperId[a] > 0 && lines.upperId[a] === lines.upperId[b]) || (lines.multiplet[a] > 0 && lines.multiplet[a] === lines.multiplet[b])
  );
}

/** Flux of `a` over that of `b` where both come from one level of a level model. */
function fixedRatio(data: AtomicData, a: number, b: number): number | undefined {
  const { lines } = data;
  const upper = lines.upperLevel[a];
  if (upper < 0 || upper !== lines.upperLevel[b] || lines.upperId[a] !== lines.upperId[b]) return undefined;
  const model = data.levelModel(lines.ions[lines.ion[a]].name);
  const ratio = model ? branchingRatio(model, upper, lines.lowerLevel[a], lines.lowerLevel[b]) : Number.NaN;
  return ratio > 0 ? ratio : undefined;
}
