import type { AtomicData } from '../atomic/index.ts';
import type { Remark } from '../problems/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { findCompanions, type Kin, kinOf, missingLines } from './companions.ts';
import { evidenceOf } from './evidence.ts';
import { type Inferred, infer, type Weighed } from './inference.ts';
import { predictedLog, type SystemModel } from './model.ts';
import type { Candidate, Evidence, FeatureNaming, FixedName, Mark, Naming, NamingSettings } from './naming.ts';
import { isLocal } from './options.ts';
import { findRedshift } from './redshift.ts';
import { type Survey, surveyOf } from './survey.ts';

export interface NamingControl {
  readonly progress?: (share: number) => void;
  readonly signal?: AbortSignal;
}

/** Candidates shown for a feature: at most so many, always the first few (a referee wants to see what was turned down), the rest only when they are not hopeless. */
const MOST_CANDIDATES = 8;
const ALWAYS_SHOWN = 4;
const LEAST_PROBABILITY = 1e-4;
/** Candidates whose companions are looked for: the others cannot win. */
const MOST_WEIGHED = 8;

/**
 * Names every mark jointly: redshift, ion scales, reddening and dispersion are estimated with the assignments.
 *
 * @param marks any order; wavelengths in vacuum Angstrom
 * @param fixed the user's verdicts: they are kept, and teach the rest
 * @returns one naming a mark, in the order of `marks`; probabilities of a mark's candidates and of "none of these" sum to 1
 * Checked in tests/identify on line lists with known names.
 */
export function nameMarks(
  marks: readonly Mark[],
  data: AtomicData,
  settings: NamingSettings,
  fixed: readonly FixedName[],
  control: NamingControl = {},
): Naming {
  const remarks: Remark[] = [];
  if (marks.length === 0) return emptyNaming(settings, remarks);
  const order = marks.map((_, j) => j).sort((a, b) => marks[a].wavelength - marks[b].wavelength);
  const sorted = order.map((j) => marks[j]);
  const place = new Map(order.map((j, k) => [j, k]));
  const survey = surveyOf(sorted);
  const given = settings.z !== undefined;
  const redshifts = given ? [{ z: settings.z ?? 0, zErr: 0, probability: 1, reason: 'given' }] : findRedshift(sorted, data, survey);
  control.progress?.(0.3);
  if (!given && redshifts[0].probability < 0.9) {
    remarks.push({
      code: 'redshift-unsure',
      weight: 'warning',
      where: {},
      found: `the redshift is not certain: ${redshifts
        .slice(0, 3)
        .map((h) => `z = ${h.z.toFixed(4)} (${(100 * h.probability).toFixed(0)} %)`)
        .join(', ')}`,
      doThis: 'Type the redshift if you know it.',
    });
  }
  const fixedSorted = fixed.map((f) => ({ ...f, mark: place.get(f.mark) ?? f.mark }));
  const inferred = infer(sorted, data, settings, survey, redshifts[0].z, redshifts[0].zErr, fixedSorted);
  control.progress?.(0.8);
  const kin = kinOf(data);
  const forced = new Set(fixedSorted.filter((f) => 'lines' in f).map((f) => f.mark));
  const named = sorted.map((mark, k) => caseOf(mark, k, sorted, inferred, kin, data, survey, settings, forced.has(k)));
  const { model, scales } = inferred;
  const refined = redshifts.map((h, k) => (k === 0 ? { ...h, z: model.z, zErr: model.zErr } : h));
  return {
    features: marks.map((_, j) => named[place.get(j) ?? j]),
    redshifts: refined,
    z: model.z,
    zErr: model.zErr,
    dispersionKms: model.dispersionKms,
    kind: settings.kind,
    remarks,
    missing: missingLines(
      sorted,
      data,
      survey,
      model,
      (ion) => scales[ion],
      (line) => predictedLog(data, line, model),
      settings.toleranceKms,
    ),
  };
}

const emptyNaming = (settings: NamingSettings, remarks: readonly Remark[]): Naming => ({
  features: [],
  redshifts: [{ z: settings.z ?? 0, zErr: 0, probability: 1, reason: settings.z === undefined ? 'no feature' : 'given' }],
  z: settings.z ?? 0,
  zErr: 0,
  dispersionKms: 0,
  kind: settings.kind,
  remarks,
  missing: [],
});

function caseOf(
  mark: Mark,
  k: number,
  marks: readonly Mark[],
  inferred: Inferred,
  kin: Kin,
  data: AtomicData,
  survey: Survey,
  settings: NamingSettings,
  forced: boolean,
): FeatureNaming {
  const { candidates, noneProbability } = inferred.weighings[k];
  if (candidates.length === 0) return { candidates: [], noneProbability };
  const detailed = candidates.slice(0, MOST_WEIGHED).map((weighed) => {
    const companions =
      isLocal(data, weighed.lines[0]) || mark.flux <= 0
        ? []
        : findCompanions(mark, weighed.lines[0], weighed.shares[0], marks, kin, data, survey, inferred.model, settings);
    return { weighed, companions, evidence: evidenceOf(mark, weighed, companions, data) };
  });
  const odds = detailed.map(({ evidence }) => total(evidence));
  const top = Math.max(0, ...odds);
  const weights = odds.map((o) => Math.exp(o - top));
  const none = forced ? 0 : Math.exp(-top);
  const sum = weights.reduce((a, b) => a + b, none);
  const shown = detailed
    .map(
      ({ weighed, companions, evidence }, i): Candidate =>
        candidateOf(
          mark,
          weighed,
          evidence,
          companions.map((c) => c.finding),
          weights[i] / sum,
          inferred.model,
          data,
        ),
    )
    .sort((a, b) => b.probability - a.probability);
  if (forced)
    return {
      candidates: shown.map((c) => ({
        ...c,
        evidence: [...c.evidence, { kind: 'verdict', nats: 0, sentence: 'You accepted this name.' }],
      })),
      noneProbability: 0,
    };
  return {
    candidates: shown.slice(0, MOST_CANDIDATES).filter((c, i) => i < ALWAYS_SHOWN || c.probability >= LEAST_PROBABILITY),
    noneProbability: none / sum,
  };
}

const total = (evidence: readonly Evidence[]) => evidence.reduce((sum, e) => sum + e.nats, 0);

function candidateOf(
  mark: Mark,
  weighed: Weighed,
  evidence: readonly Evidence[],
  companions: Candidate['companions'],
  probability: number,
  model: SystemModel,
  data: AtomicData,
): Candidate {
  const local = isLocal(data, weighed.lines[0]);
  const systemic = local ? 0 : model.z;
  const rest = (mark.wavelength - weighed.off) / (1 + systemic);
  return {
    lines: weighed.lines,
    shares: weighed.shares,
    probability,
    velocityKms: (mark.wavelength / rest - 1) * SPEED_OF_LIGHT_KMS,
    velocityErrKms: (Math.hypot(mark.wavelengthErr, data.lines.wavelengthErr[weighed.lines[0]]) / rest) * SPEED_OF_LIGHT_KMS,
    evidence,
    companions,
  };
}
