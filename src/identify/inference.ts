import type { AtomicData } from '../atomic/index.ts';
import { absencesOf, strongestLines } from './absences.ts';
import { claimsOf } from './claims.ts';
import { fitScale, type IonScale, priorMeans } from './ionScales.ts';
import { factsOf } from './lineFacts.ts';
import type { SystemModel } from './model.ts';
import type { FixedName, Mark, NamingSettings } from './naming.ts';
import { rulesOf } from './rules.ts';
import { sightingsOf } from './sightings.ts';
import { startModel } from './startModel.ts';
import type { Survey } from './survey.ts';
import { updateModel } from './updateModel.ts';
import { weigh } from './weigh.ts';
import type { Weighing } from './weighed.ts';

export interface Inferred {
  readonly model: SystemModel;
  readonly weighings: readonly Weighing[];
  readonly scales: readonly IonScale[];
}

const MOST_ROUNDS = 7;
const LEAST_ROUNDS = 4;
/** Settled when no probability of a leading name moved more than this. */
const SETTLED = 0.02;

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
): Inferred {
  const facts = factsOf(data);
  const rules = rulesOf(marks.length, fixed);
  const strongest = strongestLines(data, survey, z0);
  let model = startModel(marks, data, z0, zErr0);
  let scales: IonScale[] = [];
  let weighings: Weighing[] = [];
  for (let round = 0; round < MOST_ROUNDS; round++) {
    if (round > 0) model = updateModel(model, marks, weighings, data, settings.z !== undefined);
    const sightings = sightingsOf(weighings, marks, data, model);
    const means = priorMeans(data, settings.kind, scales, facts.localIon);
    const absences = absencesOf(marks, data, strongest, survey, model, settings);
    scales = Array.from(means, (mean, ion) => fitScale(mean, sightings.byIon.get(ion) ?? [], absences[ion]));
    const shared = { data, facts, settings, survey, model, sightings, absences, means, scales, claims: claimsOf(weighings) };
    const next = marks.map((mark, j) => weigh(mark, j, { ...shared, rule: rules[j] }));
    const moved = round + 1 < LEAST_ROUNDS ? 1 : largestMove(weighings, next);
    weighings = next;
    if (moved < SETTLED) break;
  }
  return { model, weighings, scales };
}

function largestMove(before: readonly Weighing[], after: readonly Weighing[]): number {
  return after.reduce((most, { candidates, noneProbability }, j) => {
    const [best] = candidates;
    if (!best) return most;
    const same = before[j].candidates.find(
      (c) => c.lines.length === best.lines.length && c.lines.every((line, k) => line === best.lines[k]),
    );
    return Math.max(most, Math.abs(noneProbability - before[j].noneProbability), same ? Math.abs(best.probability - same.probability) : 1);
  }, 0);
}
