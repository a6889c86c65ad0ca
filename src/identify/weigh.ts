import { normalTail } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { blendsOf, type Single } from './blends.ts';
import { claimedElsewhere } from './claims.ts';
import { fitScale, type IonScale } from './ionScales.ts';
import { predictedLog } from './model.ts';
import type { Mark } from './naming.ts';
import { isLocal, type Option, optionsOf } from './options.ts';
import { scoreName } from './scoreName.ts';
import type { WeighContext } from './weighContext.ts';
import type { Weighed, Weighing } from './weighed.ts';

/** Candidates below this probability are dropped, but for the first few. */
const HOPELESS = 1e-5;
const ALWAYS_KEPT = 5;

/** Weighs every name of one mark against each other and against none of them. */
export function weigh(mark: Mark, j: number, context: WeighContext): Weighing {
  const { data, settings, model, rule } = context;
  if (mark.artefact || rule.none) return { candidates: [], noneProbability: 1 };
  const cache = new Map<number, IonScale>();
  const scaleWithout = (ion: number): IonScale => {
    const known = cache.get(ion);
    if (known) return known;
    const involved = context.sightings.get(ion)?.some((s) => s.mark === j);
    const scale = involved ? fitScale(context.means[ion], context.sightings.get(ion) ?? [], context.absences[ion], j) : context.scales[ion];
    cache.set(ion, scale);
    return scale;
  };
  const singles = optionsOf(mark, data, settings, model.z, model.dispersionKms).map((option) =>
    single(mark, j, option, context, scaleWithout),
  );
  const names = [...singles.map((s) => [s]), ...blendsOf(mark, singles)].filter((parts) => !rule.not.some((not) => sameLines(not, parts)));
  const forced = rule.lines;
  if (forced) {
    const parts = forced.map((line) => singles.find((s) => s.line === line) ?? farSingle(mark, line, context, scaleWithout));
    return { candidates: [{ ...scoreName(mark, j, parts, context), probability: 1 }], noneProbability: 0 };
  }
  const scored = names.map((parts) => scoreName(mark, j, parts, context)).sort((a, b) => logOdds(b) - logOdds(a));
  const top = Math.max(0, ...scored.map(logOdds));
  const weights = scored.map((s) => Math.exp(logOdds(s) - top));
  const none = Math.exp(-top);
  const total = weights.reduce((a, b) => a + b, none);
  return {
    candidates: scored
      .map((s, k) => ({ ...s, probability: weights[k] / total }))
      .filter((s, k) => k < ALWAYS_KEPT || s.probability > HOPELESS),
    noneProbability: none / total,
  };
}

const logOdds = (w: Weighed) => w.wavelengthNats + w.strengthNats + w.priorNats + w.owedNats;

function single(mark: Mark, j: number, option: Option, context: WeighContext, scaleOf: (ion: number) => IonScale): Single {
  const { data, facts, model } = context;
  const scale = scaleOf(data.lines.ion[option.line]);
  const logPredicted = predictedLog(facts, option.line, model) + scale.mean;
  const err = Math.hypot(facts.errDex[option.line], Math.sqrt(scale.variance));
  return { ...option, logPredicted, err, seen: scale.seen, owed: owedBy(mark, j, option, logPredicted, err, context) };
}

/** A line may hide as a part of a feature when it carries less than this share. */
const HIDDEN_SHARE = 0.15;
/** Predictions fail for reasons no model holds: a line is absent with at least this probability. */
const LEAST_ABSENT = 0.01;

/** Minus the logarithm of the chance that the line is too faint to be seen, hides in the mark, or is another mark. */
function owedBy(mark: Mark, j: number, option: Option, logPredicted: number, err: number, { data, survey, claims }: WeighContext): number {
  if (mark.flux <= 0 || isLocal(data, option.line)) return 0;
  const hiding = Math.max(survey.logLimitAt(mark.wavelength), Math.log10(HIDDEN_SHARE * mark.flux));
  const unseen = Math.max(LEAST_ABSENT, normalTail((logPredicted - hiding) / err));
  const elsewhere = claimedElsewhere(claims, option.line, j);
  return -Math.log(elsewhere + (1 - elsewhere) * unseen);
}

const sameLines = (a: readonly number[], parts: readonly Single[]) => a.length === parts.length && parts.every((p) => a.includes(p.line));

/** A name the user insists on although it lies outside the tolerance. */
function farSingle(mark: Mark, line: number, context: WeighContext, scaleOf: (ion: number) => IonScale): Single {
  const { data, facts, model } = context;
  const shift = isLocal(data, line) ? 1 : 1 + model.z;
  const scale = scaleOf(data.lines.ion[line]);
  return {
    line,
    off: mark.wavelength - data.lines.wavelengthVac[line] * shift,
    sigma: Math.hypot(mark.wavelengthErr, data.lines.wavelengthErr[line], (model.dispersionKms / SPEED_OF_LIGHT_KMS) * mark.wavelength),
    logPredicted: predictedLog(facts, line, model) + scale.mean,
    err: Math.hypot(facts.errDex[line], Math.sqrt(scale.variance)),
    seen: scale.seen,
    owed: 0,
  };
}
