import type { AtomicData } from '../atomic/index.ts';
import { median } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { factsOf } from './lineFacts.ts';
import type { SystemModel } from './model.ts';
import type { Mark } from './naming.ts';
import { isLocal } from './options.ts';
import { roughDimming } from './roughReddening.ts';
import { logFluxErr } from './sightings.ts';
import { USUAL_STRANGERS } from './startModel.ts';
import type { Weighed, Weighing } from './weighed.ts';
import { weightedMedian } from './weightedMedian.ts';

const SURE = 0.6;

/** Systemic velocity, dispersion, flux zero and rough reddening from the names that are likely. */
export function updateModel(
  model: SystemModel,
  marks: readonly Mark[],
  weighings: readonly Weighing[],
  data: AtomicData,
  zFixed: boolean,
): SystemModel {
  const sure = sureNames(marks, weighings, data);
  if (sure.length < 3) return model;
  const strangers = strangersOf(weighings);
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
  const hardness = sure.map(({ best }) => factsOf(data).hardness[data.lines.ion[best.lines[0]]]);
  const trendKms = trendOf(
    hardness,
    kms.map(({ v }) => v - shift),
    weights,
    model.trendKms,
  );
  return { ...model, strangers, z, zErr, dispersionKms, trendKms, ...fluxFrame(model, sure, data) };
}

/** The usual share of strangers holds as if it had been seen on so many marks. */
const USUAL_WEIGHT = 200;

const strangersOf = (weighings: readonly Weighing[]) =>
  (weighings.reduce((sum, w) => sum + w.noneProbability, 0) + USUAL_STRANGERS * USUAL_WEIGHT) / (weighings.length + USUAL_WEIGHT);

/** Residuals beyond this many of their errors are left out of the trend. */
const CLIP_SIGMAS = 3;
/** A trend below this many of its own errors is none. */
const SIGNIFICANT = 2.5;

/** Slope of velocity against the ion's hardness, weighted least squares, on top of the one already taken off; 0 when it is not significant. */
function trendOf(hardness: readonly number[], residuals: readonly number[], weights: readonly number[], before: number): number {
  let sw = 0;
  let swx = 0;
  let swxx = 0;
  let swxy = 0;
  let swy = 0;
  hardness.forEach((x, i) => {
    const y = residuals[i] + before * x;
    const w = weights[i];
    if (residuals[i] ** 2 * w > CLIP_SIGMAS ** 2) return;
    sw += w;
    swx += w * x;
    swxx += w * x * x;
    swy += w * y;
    swxy += w * x * y;
  });
  const spread = swxx - (swx * swx) / sw;
  if (!(spread > 0)) return 0;
  const slope = (swxy - (swx * swy) / sw) / spread;
  return slope === 0 ? 0 : slope * Math.max(0, 1 - (SIGNIFICANT ** 2 * (1 / spread)) / (slope * slope));
}

/** The names that the model learns from: likely, and of the object. */
export const sureNames = (
  marks: readonly Mark[],
  weighings: readonly Weighing[],
  data: AtomicData,
): { mark: Mark; best: Weighed; j: number }[] =>
  weighings.flatMap(({ candidates }, j) =>
    candidates.length > 0 && candidates[0].probability > SURE && !isLocal(data, candidates[0].lines[0])
      ? [{ mark: marks[j], best: candidates[0], j }]
      : [],
  );

/** Flux zero and rough reddening from the hydrogen lines; without three of them the zero alone, from all. */
function fluxFrame(
  model: SystemModel,
  sure: readonly { mark: Mark; best: Weighed }[],
  data: AtomicData,
): Pick<SystemModel, 'logZero' | 'cHbeta' | 'hydrogenSeen'> {
  const hydrogen = sure.filter(
    ({ best }) =>
      best.lines.length === 1 &&
      data.lines.ions[data.lines.ion[best.lines[0]]].name === 'H I' &&
      Number.isFinite(data.lines.logStrength[best.lines[0]]),
  );
  const points = hydrogen.map(({ mark, best }) => ({
    x: -roughDimming(data.lines.wavelengthVac[best.lines[0]]),
    y: Math.log10(mark.flux) - data.lines.logStrength[best.lines[0]],
    w: 1 / logFluxErr(mark) ** 2 + 1,
  }));
  if (points.length === 0) return { logZero: model.logZero, cHbeta: model.cHbeta, hydrogenSeen: false };
  // slope with a prior about moderate reddening, so that two lines next to each other do not decide
  const prior = { mean: 0.3, weight: 1 / 0.5 ** 2 };
  const sw = points.reduce((s, p) => s + p.w, 0);
  const mx = points.reduce((s, p) => s + p.w * p.x, 0) / sw;
  const my = points.reduce((s, p) => s + p.w * p.y, 0) / sw;
  const sxx = points.reduce((s, p) => s + p.w * (p.x - mx) ** 2, 0);
  const sxy = points.reduce((s, p) => s + p.w * (p.x - mx) * (p.y - my), 0);
  const cHbeta = Math.min(4, Math.max(0, (sxy + prior.mean * prior.weight) / (sxx + prior.weight)));
  return { cHbeta, logZero: my - cHbeta * mx, hydrogenSeen: true };
}
