import { normalTail } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { blendsOf, type Single } from './blends.ts';
import { claimedElsewhere } from './claims.ts';
import { predictedLog } from './model.ts';
import type { Mark } from './naming.ts';
import { isLocal, type Option, optionsOf } from './options.ts';
import { type FamilyScale, summaryOf } from './scalePosterior.ts';
import { scoreName } from './scoreName.ts';
import type { WeighContext } from './weighContext.ts';
import { logOddsOf, type Weighing } from './weighed.ts';

/** Candidates below this probability are dropped, but for the first few. */
const HOPELESS = 1e-5;
const ALWAYS_KEPT = 5;

/** Weighs every name of one mark against each other and against none of them. */
export function weigh(mark: Mark, j: number, context: WeighContext): Weighing {
  const { data, settings, model, rule } = context;
  if (mark.artefact || rule.none) return { candidates: [], noneProbability: 1 };
  const cache = new Map<number, FamilyScale>();
  const scaleWithout = (family: number): FamilyScale => {
    const known = cache.get(family);
    if (known) return known;
    const sighting = context.sightings.ofMark[j].get(family);
    const scale = sighting ? summaryOf(context.posteriors[family], sighting) : context.scales[family];
    cache.set(family, scale);
    return scale;
  };
  const width = mark.fwhm ?? context.survey.unresolvedAt(mark);
  const singles = likelyOnes(mark, optionsOf(mark, width, data, settings, model), context, scaleWithout).map((single) => ({
    ...single,
    owed: owedBy(mark, j, single, context),
  }));
  const names = [...singles.filter((s) => s.within).map((s) => [s]), ...blendsOf(width, singles)].filter(
    (parts) => !rule.not.some((not) => sameLines(not, parts)),
  );
  const forced = rule.lines;
  if (forced) {
    const parts = forced.map((line) => singles.find((s) => s.line === line) ?? farSingle(mark, line, context, scaleWithout));
    return { candidates: [{ ...scoreName(mark, j, parts, context), probability: 1 }], noneProbability: 0 };
  }
  const scored = names.map((parts) => scoreName(mark, j, parts, context)).sort((a, b) => logOddsOf(b) - logOddsOf(a));
  const top = Math.max(0, ...scored.map(logOddsOf));
  const weights = scored.map((s) => Math.exp(logOddsOf(s) - top));
  const none = Math.exp(-top);
  const total = weights.reduce((a, b) => a + b, none);
  return {
    candidates: scored
      .map((s, k) => ({ ...s, probability: weights[k] / total }))
      .filter((s, k) => k < ALWAYS_KEPT || s.probability > HOPELESS),
    noneProbability: none / total,
  };
}

/** Options this many nats below the best are not weighed further. */
const OUT_OF_REACH = 16;
/** Even a wrong prediction of the strength costs no more than a line that is wide by this much, nats and dex. */
const WIDE_NATS = 3;
const WIDE_DEX = 1.3;

/** The options with their predicted flux, but for those that cannot win. */
function likelyOnes(mark: Mark, options: readonly Option[], context: WeighContext, scaleOf: (family: number) => FamilyScale): Single[] {
  const { facts, model } = context;
  const { family } = facts;
  const logFlux = Math.log10(Math.abs(mark.flux));
  const rough = new Float64Array(options.length);
  let best = Number.NEGATIVE_INFINITY;
  options.forEach((option, k) => {
    const scale = scaleOf(family[option.line]);
    const excess = logFlux - predictedLog(facts, option.line, model) - scale.mean;
    const squared = excess * excess;
    const variance = facts.errDex[option.line] ** 2 + (excess > 0 ? scale.varianceUp : scale.varianceDown);
    // a line outside the tolerance can only be a part of a blend: its own place says nothing
    const pull = option.within ? option.off / option.sigma : 0;
    rough[k] = -0.5 * pull * pull - Math.min((0.5 * squared) / variance, WIDE_NATS + (0.5 * squared) / (variance + WIDE_DEX * WIDE_DEX));
    if (option.within && rough[k] > best) best = rough[k];
  });
  const wanted = context.rule.lines;
  // a referee wants to see what was turned down: the first few stay even when they cannot win
  const few = rough.slice().sort((a, b) => b - a)[ALWAYS_KEPT - 1] ?? Number.NEGATIVE_INFINITY;
  const least = Math.min(best - OUT_OF_REACH, few);
  const singles: Single[] = [];
  options.forEach(({ line, off, sigma, within }, k) => {
    if (rough[k] < least && !wanted?.includes(line)) return;
    const scale = scaleOf(family[line]);
    const logPredicted = predictedLog(facts, line, model) + scale.mean;
    singles.push({
      line,
      off,
      sigma,
      within,
      logPredicted,
      err: Math.sqrt(facts.errDex[line] ** 2 + scale.variance),
      errUp: Math.sqrt(facts.errDex[line] ** 2 + scale.varianceUp),
      errDown: Math.sqrt(facts.errDex[line] ** 2 + scale.varianceDown),
      seen: scale.seen,
      excited: excitedBy(line, scale, context),
      owed: 0,
    });
  });
  return singles;
}

/** Ions seen elsewhere stand on their own lines, not on the excitation of the gas. */
const SEEN_ELSEWHERE = 0.7;

function excitedBy(line: number, { seen }: FamilyScale, { facts, priors }: WeighContext): number {
  const { mean, base } = priors[facts.family[line]];
  return seen > SEEN_ELSEWHERE ? 0 : mean - base;
}

/** A line may hide as a part of a feature when it carries less than this share. */
const HIDDEN_SHARE = 0.15;
/** Predictions fail for reasons no model holds: a line is absent with at least this probability. */
const LEAST_ABSENT = 0.01;

/** Minus the logarithm of the chance that the line is too faint to be seen, hides in the mark, or is another mark. */
function owedBy(mark: Mark, j: number, { line, logPredicted, err }: Single, { facts, survey, claims }: WeighContext): number {
  if (mark.flux <= 0 || facts.local[line] === 1) return 0;
  const hiding = Math.max(survey.logLimitAt(mark.wavelength), Math.log10(HIDDEN_SHARE * mark.flux));
  const unseen = Math.max(LEAST_ABSENT, normalTail((logPredicted - hiding) / err));
  const elsewhere = claimedElsewhere(claims, line, j);
  return -Math.log(elsewhere + (1 - elsewhere) * unseen);
}

const sameLines = (a: readonly number[], parts: readonly Single[]) => a.length === parts.length && parts.every((p) => a.includes(p.line));

/** A name the user insists on although it lies outside the tolerance. */
function farSingle(mark: Mark, line: number, context: WeighContext, scaleOf: (family: number) => FamilyScale): Single {
  const { data, facts, model } = context;
  const shift = isLocal(data, line) ? 1 : 1 + model.z;
  const scale = scaleOf(facts.family[line]);
  return {
    line,
    within: false,
    off: mark.wavelength - data.lines.wavelengthVac[line] * shift,
    sigma: Math.hypot(mark.wavelengthErr, data.lines.wavelengthErr[line], (model.dispersionKms / SPEED_OF_LIGHT_KMS) * mark.wavelength),
    logPredicted: predictedLog(facts, line, model) + scale.mean,
    err: Math.hypot(facts.errDex[line], Math.sqrt(scale.variance)),
    errUp: Math.hypot(facts.errDex[line], Math.sqrt(scale.varianceUp)),
    errDown: Math.hypot(facts.errDex[line], Math.sqrt(scale.varianceDown)),
    seen: scale.seen,
    excited: excitedBy(line, scale, context),
    owed: 0,
  };
}
