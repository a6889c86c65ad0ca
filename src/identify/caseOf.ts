import type { AtomicData } from '../atomic/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { findCompanions, type Kin } from './companions.ts';
import { asMeasured } from './drift.ts';
import { evidenceOf } from './evidence.ts';
import type { Inferred } from './inference.ts';
import type { Candidate, CompanionFinding, Evidence, FeatureNaming, Mark, NamingSettings } from './naming.ts';
import { isLocal } from './options.ts';
import type { Survey } from './survey.ts';
import type { Weighed } from './weighed.ts';

/** Candidates shown for a feature: at most so many, always the first few (a referee wants to see what was turned down), the rest only when they are not hopeless. */
const MOST_CANDIDATES = 8;
const ALWAYS_SHOWN = 4;
const LEAST_PROBABILITY = 1e-4;
/** Names whose companions are looked for: the others cannot win. */
const MOST_WEIGHED = 14;

/** Lines of one multiplet nearer than this share of a width are one name. */
const UNRESOLVED_FWHM = 0.5;

/** A weighed name with its evidence. */
interface Version {
  readonly weighed: Weighed;
  readonly companions: readonly CompanionFinding[];
  readonly evidence: readonly Evidence[];
  readonly odds: number;
}

/**
 * The case of one mark. Names that hold the same line (alone, or blended with neighbours) are versions of one candidate: the best stands for them with their
 * joint probability, that of this line carrying at least a quarter of the feature.
 *
 * @param mark   with the drift of the calibration taken off
 * @param measured its wavelength as measured, vacuum Angstrom
 * @param k      the mark's place in `marks`
 * @param marks  ascending wavelength
 * @param forced the user accepted the (only) name
 */
export function caseOf(
  mark: Mark,
  k: number,
  marks: readonly Mark[],
  inferred: Inferred,
  kin: Kin,
  data: AtomicData,
  survey: Survey,
  settings: NamingSettings,
  forced: boolean,
  measured: number,
): Omit<FeatureNaming, 'implies'> {
  const { candidates, noneProbability } = inferred.weighings[k];
  if (candidates.length === 0) return { candidates: [], noneProbability };
  const { model } = inferred;
  const versions = candidates
    .slice(0, MOST_WEIGHED)
    .map((weighed): Version => {
      const looked = !isLocal(data, weighed.lines[0]) && mark.flux > 0;
      const companions = looked ? findCompanions(mark, weighed.lines[0], weighed.shares[0], marks, kin, data, survey, model, settings) : [];
      const evidence = evidenceOf(mark, weighed, companions, data, survey, model.strangers, settings.medium);
      return {
        weighed,
        companions: companions.map(({ finding }) => ({ ...finding, expectedAt: asMeasured(inferred.drift, finding.expectedAt) })),
        evidence,
        odds: evidence.reduce((sum, e) => sum + e.nats, 0),
      };
    })
    .sort((a, b) => b.odds - a.odds);
  if (forced) {
    const [only] = versions;
    const accepted: Evidence = { kind: 'verdict', nats: 0, sentence: 'You accepted this name.' };
    return { candidates: [candidateOf(mark, { ...only, evidence: [...only.evidence, accepted] }, 1, measured, data)], noneProbability: 0 };
  }
  const joined = joinVersions(versions, data, UNRESOLVED_FWHM * (mark.fwhm ?? 0)).map(tempered);
  const top = Math.max(0, ...joined.map((v) => v.odds));
  const none = Math.exp(-top);
  const weights = joined.map((v) => Math.exp(v.odds - top));
  const sum = weights.reduce((a, b) => a + b, none);
  return {
    candidates: joined
      .map((version, i) => candidateOf(mark, version, weights[i] / sum, measured, data))
      .sort((a, b) => b.probability - a.probability)
      .slice(0, MOST_CANDIDATES)
      .filter((c, i) => i < ALWAYS_SHOWN || c.probability >= LEAST_PROBABILITY),
    noneProbability: none / sum,
  };
}

/**
 * The pieces of a case are weighed as if they were independent; they are not: the ion's scale, the velocity and what the list leaves out are learned from the
 * same names. What the pieces are worth together was measured on the simulated nebulae of tests/identify (reliability), the only number taken from them.
 */
const WORTH = 0.85;

function tempered(version: Version): Version {
  const nats = (WORTH - 1) * version.odds;
  const piece: Evidence = {
    kind: 'prior',
    nats,
    sentence: `The pieces lean on the same names: together they are worth ${WORTH} of their sum, as simulated nebulae show.`,
  };
  return { ...version, evidence: [...version.evidence, piece], odds: version.odds + nats };
}

/**
 * @param versions   best first
 * @param unresolved Angstrom
 */
function joinVersions(versions: readonly Version[], data: AtomicData, unresolved: number): Version[] {
  const groups: Version[][] = [];
  for (const version of versions) {
    const group = groups.find(([best]) => isOneName(best.weighed, version.weighed, data, unresolved));
    if (group) group.push(version);
    else groups.push([version]);
  }
  return groups.map((group) => {
    const [best, ...others] = group;
    const gain = Math.log(group.reduce((sum, v) => sum + Math.exp(v.odds - best.odds), 0));
    if (others.length === 0) return best;
    const more: Evidence = {
      kind: 'prior',
      nats: gain,
      sentence: `The same line fits in ${others.length} other ${others.length === 1 ? 'way' : 'ways'}, alone or with fainter neighbours; they count together.`,
    };
    return { ...best, evidence: [...best.evidence, more], odds: best.odds + gain };
  });
}

/** A line that carries this much of a feature names it. */
const NAMING_SHARE = 0.25;

/** The leading line of the first names the second too, or their leading lines are of one multiplet and this mark cannot tell them apart. */
function isOneName(a: Weighed, b: Weighed, { lines }: AtomicData, unresolved: number): boolean {
  const [p] = a.lines;
  const [q] = b.lines;
  if (b.lines.some((line, k) => line === p && b.shares[k] >= NAMING_SHARE)) return true;
  if (lines.ion[p] !== lines.ion[q]) return false;
  const kin = (lines.multiplet[p] > 0 && lines.multiplet[p] === lines.multiplet[q]) || lines.upperId[p] === lines.upperId[q];
  return kin && Math.abs(lines.wavelengthVac[p] - lines.wavelengthVac[q]) < Math.max(Math.min(a.sigma, b.sigma), unresolved);
}

function candidateOf(
  mark: Mark,
  { weighed, evidence, companions }: Version,
  probability: number,
  measured: number,
  data: AtomicData,
): Candidate {
  const rest = weighed.lines.reduce((sum, line, i) => sum + weighed.shares[i] * data.lines.wavelengthVac[line], 0);
  return {
    lines: weighed.lines,
    shares: weighed.shares,
    probability,
    velocityKms: (measured / rest - 1) * SPEED_OF_LIGHT_KMS,
    velocityErrKms: (Math.hypot(mark.wavelengthErr, data.lines.wavelengthErr[weighed.lines[0]]) / rest) * SPEED_OF_LIGHT_KMS,
    evidence,
    companions,
  };
}
