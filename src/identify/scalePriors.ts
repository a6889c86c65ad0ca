import type { AtomicData, Mechanism } from '../atomic/index.ts';
import { LOCAL_LOG_SCALE, priorLogScale } from './kindPriors.ts';
import { type Family, factsOf } from './lineFacts.ts';
import type { ObjectKind } from './naming.ts';
import type { FamilyScale, ScalePrior } from './scalePosterior.ts';

/** Spread of ion abundances and ionisation about the reference, dex: common practice, no source. */
const PRIOR_SPREAD_DEX = 0.9;
/** What light pumps follows the star and its distance. */
const PUMPED_SPREAD_DEX = 1.2;
/** Two families of one ion share its abundance, not what feeds them. */
const SIBLING_SPREAD_DEX = 0.7;
const SIBLING_WEIGHT = 3;
/** Neighbours in ionisation energy share excitation: width of the kernel in ln(energy). */
const KERNEL_WIDTH = 0.35;
const KERNEL_PRIOR_WEIGHT = 1.5;
/** Families that another mechanism feeds tell less. */
const OTHER_MECHANISM = 0.5;
const SOFTEST_EV = 8;
const SEEN = 0.8;
/** The usual spreads hold as if so many families had shown them; the families of this object, each of so many sightings, say the rest. */
const SPREAD_WEIGHT = 6;
const SURE = 2;
const LEAST_SPREAD_DEX = 0.4;
/** The flux zero is that of hydrogen's lines once there are any. */
const HYDROGEN_SPREAD_DEX = 0.15;
/**
 * Prior of every family: the kind of object, what families of about the same creation energy show, and other families of the ion.
 *
 * @param hydrogenSeen the flux zero was taken from lines of hydrogen
 */
export function scalePriors(data: AtomicData, kind: ObjectKind, scales: readonly FamilyScale[], hydrogenSeen: boolean): ScalePrior[] {
  const { families } = factsOf(data);
  const { ions } = data.lines;
  const place = ({ zoneEv }: Family) => Math.log(zoneEv + SOFTEST_EV);
  const base = ({ ion, zoneEv }: Family) => priorLogScale(ions[ion], zoneEv, kind);
  const seen = families.flatMap((family, k) => (!family.local && scales[k]?.seen > SEEN ? [{ ...family, scale: scales[k] }] : []));
  const centre = (family: Family) => {
    const { ion, mechanism } = family;
    const own = place(family);
    let sum = 0;
    let weight = KERNEL_PRIOR_WEIGHT;
    let hasSibling = false;
    for (const other of seen) {
      if (other.ion === ion && other.mechanism === mechanism) continue;
      const away = (own - place(other)) / KERNEL_WIDTH;
      let k = Math.exp(-0.5 * away * away) * Math.min(2, other.scale.seen);
      if (other.mechanism !== mechanism) k *= OTHER_MECHANISM;
      if (other.ion === ion) {
        hasSibling = true;
        k *= SIBLING_WEIGHT;
      }
      sum += k * (other.scale.mean - base(other));
      weight += k;
    }
    return { mean: base(family) + sum / weight, hasSibling };
  };
  const isHydrogen = (ion: number) => ions[ion].name === 'H I';
  const spreads = { pumped: PUMPED_SPREAD_DEX ** 2 * SPREAD_WEIGHT, other: PRIOR_SPREAD_DEX ** 2 * SPREAD_WEIGHT };
  const weights = { pumped: SPREAD_WEIGHT, other: SPREAD_WEIGHT };
  for (const { scale, ...family } of seen) {
    const { ion, mechanism } = family;
    if (isHydrogen(ion)) continue;
    const sort = mechanism === 'fluorescence' ? 'pumped' : 'other';
    const trust = Math.min(1, scale.seen / SURE);
    spreads[sort] += trust * (scale.mean - centre(family).mean) ** 2;
    weights[sort] += trust;
  }
  const spreadOf = (mechanism: Mechanism) => {
    const sort = mechanism === 'fluorescence' ? 'pumped' : 'other';
    return Math.max(LEAST_SPREAD_DEX, Math.sqrt(spreads[sort] / weights[sort]));
  };
  return families.map((family): ScalePrior => {
    const { ion, mechanism, local } = family;
    if (local) return { mean: LOCAL_LOG_SCALE, base: LOCAL_LOG_SCALE, spread: PRIOR_SPREAD_DEX };
    if (hydrogenSeen && isHydrogen(ion) && mechanism === 'recombination') return { mean: 0, base: 0, spread: HYDROGEN_SPREAD_DEX };
    const { mean, hasSibling } = centre(family);
    const spread = spreadOf(mechanism);
    return { mean, base: base(family), spread: hasSibling ? Math.min(spread, SIBLING_SPREAD_DEX) : spread };
  });
}
