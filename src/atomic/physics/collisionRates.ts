import { interpolateMonotone } from '../../numeric/index.ts';
import { HC_OVER_K_CM } from '../../units/index.ts';
import { type LevelModel, UPSILON_TE } from '../levelModel.ts';

/**
 * h^2 / ((2 pi m_e)^(3/2) k^(1/2)), cm^3 s^-1 K^(1/2): de-excitation rate coefficient times g_u sqrt(Te) over Upsilon.
 * Osterbrock & Ferland 2006, equation 3.20.
 */
const RATE_CONSTANT = 8.629e-6;

const LOG_TE = UPSILON_TE.map(Math.log);

export const statisticalWeight = (model: LevelModel, level: number): number => 2 * model.levels[level].j + 1;

/**
 * Effective collision strength of one tabulated pair: monotone cubic in ln Te; held at the end value outside the source's temperatures and where a source has none.
 * Nothing is extrapolated; `isInsideRange` tells where a value was held.
 *
 * @param pair index into `model.collisions`
 * @param te   K
 * @returns Upsilon; 0 when the source gives no value at all
 */
export function upsilonAt(model: LevelModel, pair: number, te: number): number {
  const first = pair * UPSILON_TE.length;
  const y = model.collisions.upsilon.subarray(first, first + UPSILON_TE.length);
  let known = 0;
  for (let k = 0; k < y.length; k++) if (y[k] > 0) known++;
  if (known === 0) return 0;
  if (known === y.length) return interpolateMonotone(LOG_TE, y, Math.log(te));
  return interpolateMonotone(
    LOG_TE.filter((_, k) => y[k] > 0),
    y.filter((value) => value > 0),
    Math.log(te),
  );
}

/**
 * Whether the collision strengths out of `level` are tabulated at `te` (K), or had to be held at the end of their range.
 * Held values keep every result finite at 5000 ... 30000 K; show beside them that the table ended.
 */
export function isInsideRange(model: LevelModel, level: number, te: number): boolean {
  const { lower, upper, teLow, teHigh } = model.collisions;
  for (let pair = 0; pair < lower.length; pair++) {
    if (lower[pair] !== level && upper[pair] !== level) continue;
    if (te < teLow[pair] || te > teHigh[pair]) return false;
  }
  return te >= UPSILON_TE[0] && te <= UPSILON_TE[UPSILON_TE.length - 1];
}

/**
 * Collision rate coefficients between all pairs of levels, cm^3 s^-1: `q[from * n + to]`, n = number of levels.
 * @param te K, > 0
 * @throws RangeError when `te` is not positive and finite
 * Down: 8.629e-6 Upsilon / (g_upper sqrt(Te)); up by detailed balance.
 */
export function collisionRates(model: LevelModel, te: number): Float64Array {
  if (!(te > 0 && te < Number.POSITIVE_INFINITY)) throw new RangeError(`electron temperature ${te}: expected a positive number, K`);
  const n = model.levels.length;
  const q = new Float64Array(n * n);
  const { lower, upper } = model.collisions;
  for (let pair = 0; pair < lower.length; pair++) {
    const l = lower[pair];
    const u = upper[pair];
    const down = (RATE_CONSTANT * upsilonAt(model, pair, te)) / (statisticalWeight(model, u) * Math.sqrt(te));
    const gap = model.levels[u].energyCm1 - model.levels[l].energyCm1;
    q[u * n + l] = down;
    q[l * n + u] = down * (statisticalWeight(model, u) / statisticalWeight(model, l)) * Math.exp((-HC_OVER_K_CM * gap) / te);
  }
  return q;
}
