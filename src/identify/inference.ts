import type { AtomicData } from '../atomic/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { absencesOf, strongestLines } from './absences.ts';
import { claimsOf } from './claims.ts';
import { type Drift, type DriftPoint, fitDrift, refineDrift, startPoints, withoutDrift } from './drift.ts';
import { estimateKind } from './estimateKind.ts';
import { estimateLeftOut } from './estimateLeftOut.ts';
import { factsOf } from './lineFacts.ts';
import type { SystemModel } from './model.ts';
import type { FixedName, Mark, NamingSettings, ObjectKind } from './naming.ts';
import { rulesOf } from './rules.ts';
import { type FamilyScale, logAbsent, scalePosterior, summaryOf } from './scalePosterior.ts';
import { scalePriors } from './scalePriors.ts';
import { sightingsOf } from './sightings.ts';
import { startModel } from './startModel.ts';
import type { Survey } from './survey.ts';
import { sureNames, updateModel } from './updateModel.ts';
import { weigh } from './weigh.ts';
import type { Weighing } from './weighed.ts';

export interface Inferred {
  readonly model: SystemModel;
  readonly weighings: readonly Weighing[];
  readonly scales: readonly FamilyScale[];
  /** The marks with the drift of the wavelength calibration taken off. */
  readonly placed: readonly Mark[];
  readonly drift: Drift;
  /** Log likelihood of the marks, and of the strong lines that are not there, against features of no list, nats. */
  readonly evidence: number;
  /** As set, or as estimated from the ion scales. */
  readonly kind: ObjectKind;
}

/** No single mark speaks louder than this for the redshift it is named at. */
const LEAST_NONE = 1e-6;
const MOST_ROUNDS = 7;
const LEAST_ROUNDS = 4;
/** Settled when no more than this share of the leading names moved by more than this in probability. */
const SETTLED_SHARE = 0.01;
const SETTLED = 0.05;
/** No single line tells of the drift more closely than this. */
const LEAST_ERR_KMS = 2;

/**
 * Expectation-maximisation over names, ion scales, flux zero, reddening, velocity and dispersion (Dempster, Laird & Rubin 1977, J. R. Stat. Soc. B 39, 1).
 *
 * @param marks ascending wavelength
 */
export function infer(
  marks: readonly Mark[],
  data: AtomicData,
  settings: NamingSettings,
  survey: Survey,
  z0: number,
  zErr0: number,
  fixed: readonly FixedName[],
  mostRounds = MOST_ROUNDS,
): Inferred {
  const facts = factsOf(data);
  const rules = rulesOf(marks.length, fixed);
  const strongest = strongestLines(data, survey, z0);
  let drift = fitDrift(startPoints(marks, data, z0), survey.low, survey.high);
  let placed = withoutDrift(marks, drift);
  let model = startModel(placed, data, z0, zErr0);
  let scales: FamilyScale[] = [];
  let kind = settings.kind;
  let weighings: Weighing[] = [];
  let missed = 0;
  for (let round = 0; round < mostRounds; round++) {
    if (round > 0) {
      model = updateModel(model, placed, weighings, data, settings.z !== undefined);
      const coarse = fitDrift(startPoints(marks, data, model.z), survey.low, survey.high);
      const fine = fitDrift(driftPoints(withoutDrift(marks, coarse), weighings, data, model), survey.low, survey.high);
      drift = refineDrift(coarse, fine);
      placed = withoutDrift(marks, drift);
    }
    const sightings = sightingsOf(weighings, placed, data, model);
    if (round > 1 && settings.kind === 'unknown') kind = estimateKind(data, scales).kind;
    const priors = scalePriors(data, kind, scales, model.hydrogenSeen);
    const absences = absencesOf(placed, data, strongest, survey, model, settings);
    // what absences say must not decide how much they say
    const bySightings = priors.map((prior, family) =>
      summaryOf(scalePosterior(prior, sightings.byFamily.get(family) ?? [], [], model.leftOut)),
    );
    model = { ...model, leftOut: estimateLeftOut(placed, data, strongest, survey, model, bySightings, settings) };
    const posteriors = priors.map((prior, family) =>
      scalePosterior(prior, sightings.byFamily.get(family) ?? [], absences[family], model.leftOut),
    );
    scales = posteriors.map((posterior) => summaryOf(posterior));
    missed = scales.reduce((sum, scale, family) => sum + logAbsent(scale.mean, absences[family], model.leftOut), 0);
    const shared = { data, facts, settings, survey, model, sightings, priors, posteriors, scales, claims: claimsOf(weighings) };
    const next = placed.map((mark, j) => weigh(mark, j, { ...shared, rule: rules[j] }));
    const moved = round + 1 < LEAST_ROUNDS ? 1 : shareMoved(weighings, next);
    weighings = next;
    if (moved <= SETTLED_SHARE) break;
  }
  const named = weighings.reduce((sum, { noneProbability }) => sum - Math.log(Math.max(LEAST_NONE, noneProbability)), 0);
  return { model, weighings, scales, placed, drift, kind, evidence: named + missed };
}

/** Raw velocities of the likely names against the systemic one. */
function driftPoints(marks: readonly Mark[], weighings: readonly Weighing[], data: AtomicData, model: SystemModel): DriftPoint[] {
  const { lines } = data;
  return sureNames(marks, weighings, data).map(({ mark, best }) => {
    const rest = best.lines.reduce((sum, line, k) => sum + best.shares[k] * lines.wavelengthVac[line], 0);
    const kms = (mark.wavelength / (rest * (1 + model.z)) - 1) * SPEED_OF_LIGHT_KMS;
    return { wavelength: mark.wavelength, kms, errKms: Math.hypot((best.sigma / mark.wavelength) * SPEED_OF_LIGHT_KMS, LEAST_ERR_KMS) };
  });
}

function shareMoved(before: readonly Weighing[], after: readonly Weighing[]): number {
  const moved = after.filter(({ candidates, noneProbability }, j) => {
    const [best] = candidates;
    if (!best) return false;
    const same = before[j].candidates.find(
      (c) => c.lines.length === best.lines.length && c.lines.every((line, k) => line === best.lines[k]),
    );
    return (
      Math.abs(noneProbability - before[j].noneProbability) > SETTLED || !same || Math.abs(best.probability - same.probability) > SETTLED
    );
  });
  return moved.length / Math.max(1, after.length);
}
