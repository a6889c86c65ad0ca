import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { median, normalTail, quantile } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { type Absence, fitScale, type IonScale, priorMeans, type Sighting } from './ionScales.ts';
import { predictedLog, type SystemModel, strengthErr } from './model.ts';
import type { FixedName, Mark, NamingSettings } from './naming.ts';
import { isLocal, type Option, optionsOf } from './options.ts';
import { roughDimming } from './roughReddening.ts';
import type { Survey } from './survey.ts';

/** One name weighed for one mark: a line, or a blend of up to three. */
export interface Weighed {
  readonly lines: readonly number[];
  readonly shares: readonly number[];
  readonly off: number;
  readonly sigma: number;
  /** log10 flux predicted from what the rest of the spectrum says of the ion, and its one sigma. */
  readonly logPredicted: number;
  readonly logPredictedErr: number;
  readonly wavelengthNats: number;
  readonly strengthNats: number;
  readonly priorNats: number;
  /** What the place owes: a line that the rest of the spectrum predicts here, that no other feature can be, is missing if this name is wrong. */
  readonly owedNats: number;
  /** Weighted number of other lines of the (main) ion that were seen. */
  readonly ionSeen: number;
  readonly probability: number;
}

export interface Weighing {
  readonly candidates: readonly Weighed[];
  readonly noneProbability: number;
}

export interface Inferred {
  readonly model: SystemModel;
  readonly weighings: readonly Weighing[];
  readonly scales: readonly IonScale[];
}

const ROUNDS = 7;
/** Candidates below this probability are dropped, but for the first few. */
const HOPELESS = 1e-5;
const ALWAYS_KEPT = 5;
/** Lines of an ion that are looked for and, when absent, held against it. */
const MOST_ABSENCES = 14;
const FAINTEST_LOOKED_FOR = -6;
/** log10 odds that a blend rather than one line is measured, before anything is known. */
const BLEND_PRIOR = Math.log(0.35);
/** A part of a blend carries at least this share. */
const LEAST_SHARE = 0.07;
/** Parts of a blend stand within this many FWHM of each other. */
const BLEND_REACH_FWHM = 1.1;
/** Width of a mark whose width is unknown, in units of its error times this, and at least this many km/s. */
const UNKNOWN_FWHM_SIGMAS = 3;
const UNKNOWN_FWHM_KMS = 25;
/** Calibration and real scatter of fluxes, dex. */
const LEAST_FLUX_ERR_DEX = 0.04;
/** A part of the sky or an interstellar line: the reference strengths are on a scale of their own. */
const LOCAL_PRIOR = Math.log(0.2);
/** Far outliers in strength happen (fluorescence, variability): the normal is given a floor of a wide one. */
const WIDE_SHARE = 0.05;
const WIDE_DEX = 1.2;
/** Centroids have outliers too: unseen blends, underestimated errors. */
const OUTLIER_SHARE = 0.02;
const OUTLIER_SIGMAS = 3;
const MOST_OWED = 5;

/** Expectation-maximisation over names, ion scales, flux zero, reddening, velocity and dispersion. */
export function infer(
  marks: readonly Mark[],
  data: AtomicData,
  settings: NamingSettings,
  survey: Survey,
  z0: number,
  zErr0: number,
  fixed: readonly FixedName[],
): Inferred {
  let model: SystemModel = { z: z0, zErr: zErr0, dispersionKms: startDispersion(marks), logZero: startZero(marks, data, z0), cHbeta: 0 };
  let scales: IonScale[] = [];
  let weighings: Weighing[] = [];
  const rules = rulesOf(marks.length, fixed);
  const local = localIons(data);
  for (let round = 0; round < ROUNDS; round++) {
    const sightings = sightingsOf(weighings, marks, data, model);
    const means = priorMeans(data, settings.kind, scales, local);
    const absences = absencesOf(marks, data, survey, model, settings);
    scales = means.reduce<IonScale[]>((all, mean, ion) => {
      all.push(fitScale(mean, sightings.get(ion) ?? [], absences[ion]));
      return all;
    }, []);
    const claims = claimsOf(weighings);
    weighings = marks.map((mark, j) =>
      weigh(mark, j, { data, settings, survey, model, sightings, absences, means, scales, claims, rule: rules[j] }),
    );
    model = updateModel(model, marks, weighings, data, settings.z !== undefined);
  }
  return { model, weighings, scales };
}

/** A first guess of the dispersion: marks with tiny formal errors still scatter by the wavelength calibration. */
const startDispersion = (marks: readonly Mark[]) =>
  Math.min(20, Math.max(3, 0.3 * median(marks.map((m) => (m.wavelengthErr / m.wavelength) * SPEED_OF_LIGHT_KMS))));

/** H beta's mark if there is one where it should be, else the median of the brightest marks against the strongest lines in their places. */
function startZero(marks: readonly Mark[], data: AtomicData, z: number): number {
  const offsets: number[] = [];
  for (const mark of marks) {
    if (mark.artefact || mark.flux <= 0) continue;
    const reach = Math.max(3 * mark.wavelengthErr, mark.wavelength * 3e-4);
    const [first, end] = linesBetween(data.lines, (mark.wavelength - reach) / (1 + z), (mark.wavelength + reach) / (1 + z));
    let best = Number.NEGATIVE_INFINITY;
    let hydrogen = false;
    for (let line = first; line < end; line++) {
      if (isLocal(data, line) || data.lines.logStrength[line] <= best) continue;
      best = data.lines.logStrength[line];
      hydrogen = data.lines.ions[data.lines.ion[line]].name === 'H I';
    }
    if (best > -0.5) offsets.push(...Array.from({ length: hydrogen ? 4 : 1 }, () => Math.log10(mark.flux) - best));
  }
  return offsets.length > 0
    ? median(offsets)
    : quantile(
        marks.filter((m) => m.flux > 0).map((m) => Math.log10(m.flux)),
        0.9,
      ) - 2;
}

interface Rule {
  readonly lines?: readonly number[];
  readonly not: readonly (readonly number[])[];
  readonly none: boolean;
}

function rulesOf(count: number, fixed: readonly FixedName[]): Rule[] {
  const rules: { lines?: readonly number[]; not: (readonly number[])[]; none: boolean }[] = Array.from({ length: count }, () => ({
    not: [],
    none: false,
  }));
  for (const f of fixed) {
    if ('lines' in f) rules[f.mark].lines = f.lines;
    else if ('not' in f) rules[f.mark].not.push(...f.not);
    else rules[f.mark].none = true;
  }
  return rules;
}

function sightingsOf(
  weighings: readonly Weighing[],
  marks: readonly Mark[],
  data: AtomicData,
  model: SystemModel,
): Map<number, Sighting[]> {
  const byIon = new Map<number, Sighting[]>();
  weighings.forEach(({ candidates }, mark) => {
    for (const candidate of candidates) {
      if (candidate.probability < 0.02) continue;
      candidate.lines.forEach((line, k) => {
        const ion = data.lines.ion[line];
        const logFlux = Math.log10(Math.abs(marks[mark].flux) * candidate.shares[k]);
        // a minor part of a blend says little of its own ion
        const err = Math.hypot(
          strengthErr(data, line),
          logFluxErr(marks[mark]),
          candidate.lines.length > 1 ? 0.3 / Math.max(0.1, candidate.shares[k]) - 0.3 : 0,
        );
        const list = byIon.get(ion) ?? [];
        list.push({
          mark,
          line,
          weight: candidate.probability * Math.sqrt(candidate.shares[k]),
          excess: logFlux - predictedLog(data, line, model),
          err,
        });
        byIon.set(ion, list);
      });
    }
  });
  return byIon;
}

const logFluxErr = (mark: Mark) =>
  Math.hypot(LEAST_FLUX_ERR_DEX, Number.isFinite(mark.fluxErr) ? Math.min(1, (Math.LOG10E * mark.fluxErr) / Math.abs(mark.flux)) : 0);

/** 1 for the carriers of sky, telluric and interstellar lines, one value an ion of the list. */
function localIons(data: AtomicData): Uint8Array {
  const local = new Uint8Array(data.lines.ions.length);
  for (let line = 0; line < data.lines.count; line++) if (isLocal(data, line)) local[data.lines.ion[line]] = 1;
  return local;
}

/** For every ion its strongest lines in the observed range at whose place no mark stands. */
function absencesOf(marks: readonly Mark[], data: AtomicData, survey: Survey, model: SystemModel, settings: NamingSettings): Absence[][] {
  const { lines } = data;
  const places = marks
    .filter((m) => !m.artefact)
    .map((m) => m.wavelength)
    .sort((a, b) => a - b);
  const byIon: Absence[][] = lines.ions.map(() => []);
  const strongest: number[][] = lines.ions.map(() => []);
  const collect = (shift: number, local: boolean) => {
    const [first, end] = linesBetween(lines, survey.low / shift, survey.high / shift);
    for (let line = first; line < end; line++) {
      if (isLocal(data, line) === local && lines.logStrength[line] > FAINTEST_LOOKED_FOR) strongest[lines.ion[line]].push(line);
    }
  };
  collect(1 + model.z, false);
  collect(1, true);
  strongest.forEach((list, ion) => {
    list.sort((a, b) => lines.logStrength[b] - lines.logStrength[a]);
    for (const line of list.slice(0, MOST_ABSENCES)) {
      const at = lines.wavelengthVac[line] * (isLocal(data, line) ? 1 : 1 + model.z);
      const reach = Math.max((settings.toleranceKms / SPEED_OF_LIGHT_KMS) * at, 3 * lines.wavelengthErr[line]);
      if (hasWithin(places, at, reach)) continue;
      const room = survey.logLimitAt(at) - predictedLog(data, line, model);
      if (room < 3) byIon[ion].push({ line, room, err: strengthErr(data, line) });
    }
  });
  return byIon;
}

function hasWithin(sorted: readonly number[], at: number, reach: number): boolean {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (sorted[mid] < at - reach) low = mid + 1;
    else high = mid;
  }
  return low < sorted.length && sorted[low] <= at + reach;
}

/** For every line the two strongest claims on it: a line is one feature. */
function claimsOf(weighings: readonly Weighing[]): Map<number, { mark: number; probability: number; second: number }> {
  const claims = new Map<number, { mark: number; probability: number; second: number }>();
  weighings.forEach(({ candidates }, mark) => {
    for (const { lines, probability } of candidates) {
      for (const line of lines) {
        const claim = claims.get(line);
        if (!claim) claims.set(line, { mark, probability, second: 0 });
        else if (claim.mark === mark) claim.probability = Math.min(1, claim.probability + probability);
        else if (probability > claim.probability) claims.set(line, { mark, probability, second: claim.probability });
        else claim.second = Math.max(claim.second, probability);
      }
    }
  });
  return claims;
}

interface WeighContext {
  readonly data: AtomicData;
  readonly settings: NamingSettings;
  readonly survey: Survey;
  readonly model: SystemModel;
  readonly sightings: ReadonlyMap<number, readonly Sighting[]>;
  readonly absences: readonly (readonly Absence[])[];
  readonly means: Float64Array;
  readonly scales: readonly IonScale[];
  readonly claims: ReadonlyMap<number, { mark: number; probability: number; second: number }>;
  readonly rule: Rule;
}

interface Single extends Option {
  readonly logPredicted: number;
  readonly err: number;
  readonly seen: number;
  /** Nats against every name of the mark that leaves this line out. */
  readonly owed: number;
}

function weigh(mark: Mark, j: number, context: WeighContext): Weighing {
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
    return { candidates: [{ ...score(mark, j, parts, context), probability: 1 }], noneProbability: 0 };
  }
  const scored = names.map((parts) => score(mark, j, parts, context)).sort((a, b) => logOdds(b) - logOdds(a));
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
  const { data, model } = context;
  const scale = scaleOf(data.lines.ion[option.line]);
  const logPredicted = predictedLog(data, option.line, model) + scale.mean;
  const err = Math.hypot(strengthErr(data, option.line), Math.sqrt(scale.variance));
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
  const claim = claims.get(option.line);
  const elsewhere = claim ? (claim.mark === j ? claim.second : claim.probability) : 0;
  return -Math.log(elsewhere + (1 - elsewhere) * unseen);
}

const sameLines = (a: readonly number[], parts: readonly Single[]) => a.length === parts.length && parts.every((p) => a.includes(p.line));

/** A name the user insists on although it lies outside the tolerance. */
function farSingle(mark: Mark, line: number, context: WeighContext, scaleOf: (ion: number) => IonScale): Single {
  const { data, model } = context;
  const shift = isLocal(data, line) ? 1 : 1 + model.z;
  const scale = scaleOf(data.lines.ion[line]);
  return {
    line,
    off: mark.wavelength - data.lines.wavelengthVac[line] * shift,
    sigma: Math.hypot(mark.wavelengthErr, data.lines.wavelengthErr[line], (model.dispersionKms / SPEED_OF_LIGHT_KMS) * mark.wavelength),
    logPredicted: predictedLog(data, line, model) + scale.mean,
    err: Math.hypot(strengthErr(data, line), Math.sqrt(scale.variance)),
    seen: scale.seen,
    owed: 0,
  };
}

/** Pairs and triples of lines near enough to be measured as one, each carrying a share that matters. */
function blendsOf(mark: Mark, singles: readonly Single[]): Single[][] {
  const reach =
    BLEND_REACH_FWHM *
    (mark.fwhm ?? Math.max(UNKNOWN_FWHM_SIGMAS * mark.wavelengthErr, (UNKNOWN_FWHM_KMS / SPEED_OF_LIGHT_KMS) * mark.wavelength));
  const strong = [...singles].sort((a, b) => b.logPredicted - a.logPredicted).slice(0, 6);
  const blends: Single[][] = [];
  for (let a = 0; a < strong.length; a++) {
    for (let b = a + 1; b < strong.length; b++) {
      const pair = [strong[a], strong[b]];
      if (!fitsTogether(pair, reach)) continue;
      blends.push(pair);
      for (let c = b + 1; c < strong.length; c++) {
        const triple = [...pair, strong[c]];
        if (fitsTogether(triple, reach)) blends.push(triple);
      }
    }
  }
  return blends;
}

function fitsTogether(parts: readonly Single[], reach: number): boolean {
  const offs = parts.map((p) => p.off);
  if (Math.max(...offs) - Math.min(...offs) > reach) return false;
  const shares = sharesOf(parts);
  return Math.min(...shares) >= LEAST_SHARE;
}

function sharesOf(parts: readonly Single[]): number[] {
  const top = Math.max(...parts.map((p) => p.logPredicted));
  const fluxes = parts.map((p) => 10 ** (p.logPredicted - top));
  const total = fluxes.reduce((a, b) => a + b, 0);
  return fluxes.map((f) => f / total);
}

function score(mark: Mark, j: number, parts: readonly Single[], context: WeighContext): Weighed {
  const { data, survey, claims } = context;
  const shares = sharesOf(parts);
  const order = shares.map((_, k) => k).sort((a, b) => shares[b] - shares[a]);
  const sorted = order.map((k) => parts[k]);
  const sortedShares = order.map((k) => shares[k]);
  const off = sorted.reduce((sum, p, k) => sum + sortedShares[k] * p.off, 0);
  // the shares themselves are uncertain: half the spread between the parts times their uncertainty
  const mixing = sorted.reduce((sum, p, k) => sum + sortedShares[k] * (p.off - off) ** 2, 0);
  const sigma = Math.sqrt(sorted.reduce((sum, p, k) => sum + sortedShares[k] * p.sigma ** 2, 0) + 0.3 * mixing);
  const logPredicted = Math.log10(sorted.reduce((sum, p) => sum + 10 ** p.logPredicted, 0));
  const err = Math.hypot(Math.sqrt(sorted.reduce((sum, p, k) => sum + sortedShares[k] * p.err ** 2, 0)), logFluxErr(mark));
  const excess = Math.log10(Math.abs(mark.flux)) - logPredicted;
  const normal = (x: number, s: number) => Math.exp(-0.5 * (x / s) ** 2) / (s * Math.sqrt(2 * Math.PI));
  // rates per Angstrom and dex: the line's against that of strangers
  const wavelengthNats =
    Math.log((1 - OUTLIER_SHARE) * normal(off, sigma) + OUTLIER_SHARE * normal(off, OUTLIER_SIGMAS * sigma)) +
    Math.log(survey.high - survey.low);
  const owedNats = Math.min(
    MOST_OWED,
    sorted.reduce((sum, p) => sum + p.owed, 0),
  );
  const strengthNats =
    Math.log((1 - WIDE_SHARE) * normal(excess, err) + WIDE_SHARE * normal(excess, Math.hypot(err, WIDE_DEX))) - Math.log(1 / 3);
  // the rates of strangers were put as one a spectrum and three dex: their true number makes the rest
  let priorNats = -Math.log(survey.strangerRate * (survey.high - survey.low) * 3);
  if (parts.length > 1) priorNats += BLEND_PRIOR * (parts.length - 1);
  for (const part of sorted) {
    if (isLocal(data, part.line)) priorNats += LOCAL_PRIOR;
    const claim = claims.get(part.line);
    const elsewhere = claim ? (claim.mark === j ? claim.second : claim.probability) : 0;
    const share = parts.length > 1 ? sortedShares[sorted.indexOf(part)] : 1;
    priorNats += share * Math.log(Math.max(0.02, 1 - 0.95 * elsewhere));
  }
  return {
    lines: sorted.map((p) => p.line),
    shares: sortedShares,
    off,
    sigma,
    logPredicted,
    logPredictedErr: err,
    wavelengthNats,
    strengthNats,
    priorNats,
    owedNats,
    ionSeen: sorted[0].seen,
    probability: 0,
  };
}

function updateModel(
  model: SystemModel,
  marks: readonly Mark[],
  weighings: readonly Weighing[],
  data: AtomicData,
  zFixed: boolean,
): SystemModel {
  const sure = weighings.flatMap(({ candidates }, j) =>
    candidates.length > 0 && candidates[0].probability > 0.6 && !isLocal(data, candidates[0].lines[0])
      ? [{ mark: marks[j], best: candidates[0] }]
      : [],
  );
  if (sure.length < 3) return model;
  const kms = sure.map(({ mark, best }) => ({
    v: (best.off / mark.wavelength) * SPEED_OF_LIGHT_KMS,
    err: (Math.hypot(mark.wavelengthErr, data.lines.wavelengthErr[best.lines[0]]) / mark.wavelength) * SPEED_OF_LIGHT_KMS,
  }));
  const weights = kms.map(({ err }) => 1 / (err * err + model.dispersionKms ** 2 + 1));
  const shift = weightedMedian(
    kms.map((k) => k.v),
    weights,
  );
  const pulls = kms.map(({ v, err }) => Math.max(0, (v - shift) ** 2 - err * err));
  const scatter = 1.4826 * median(kms.map(({ v }) => Math.abs(v - shift)));
  const typicalErr = median(kms.map((k) => k.err));
  const dispersionKms = Math.min(60, Math.max(1.5, Math.sqrt(Math.max(0, scatter ** 2 - typicalErr ** 2)), 0.3 * Math.sqrt(median(pulls))));
  const z = zFixed ? model.z : (1 + model.z) * (1 + shift / SPEED_OF_LIGHT_KMS) - 1;
  const zErr = zFixed ? 0 : (Math.hypot(scatter, 0.3) / SPEED_OF_LIGHT_KMS / Math.sqrt(sure.length)) * 1.25;
  return { ...model, z, zErr, dispersionKms, ...fluxFrame(model, sure, data) };
}

function weightedMedian(values: readonly number[], weights: readonly number[]): number {
  const order = values.map((_, i) => i).sort((a, b) => values[a] - values[b]);
  const half = weights.reduce((a, b) => a + b, 0) / 2;
  let sum = 0;
  for (const i of order) {
    sum += weights[i];
    if (sum >= half) return values[i];
  }
  return values[order[order.length - 1]];
}

/** Flux zero and rough reddening from the hydrogen lines; without three of them the zero alone, from all. */
function fluxFrame(
  model: SystemModel,
  sure: readonly { mark: Mark; best: Weighed }[],
  data: AtomicData,
): Pick<SystemModel, 'logZero' | 'cHbeta'> {
  const hydrogen = sure.filter(({ best }) => best.lines.length === 1 && data.lines.ions[data.lines.ion[best.lines[0]]].name === 'H I');
  const points = hydrogen.map(({ mark, best }) => ({
    x: -roughDimming(data.lines.wavelengthVac[best.lines[0]]),
    y: Math.log10(mark.flux) - data.lines.logStrength[best.lines[0]],
    w: 1 / logFluxErr(mark) ** 2 + 1,
  }));
  if (points.length === 0) return { logZero: model.logZero, cHbeta: model.cHbeta };
  // slope with a prior about moderate reddening, so that two lines next to each other do not decide
  const prior = { mean: 0.3, weight: 1 / 0.5 ** 2 };
  const sw = points.reduce((s, p) => s + p.w, 0);
  const mx = points.reduce((s, p) => s + p.w * p.x, 0) / sw;
  const my = points.reduce((s, p) => s + p.w * p.y, 0) / sw;
  const sxx = points.reduce((s, p) => s + p.w * (p.x - mx) ** 2, 0);
  const sxy = points.reduce((s, p) => s + p.w * (p.x - mx) * (p.y - my), 0);
  const cHbeta = Math.min(4, Math.max(0, (sxy + prior.mean * prior.weight) / (sxx + prior.weight)));
  return { cHbeta, logZero: my - cHbeta * mx };
}
