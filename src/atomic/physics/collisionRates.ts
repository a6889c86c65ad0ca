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
 *
 * @param pair index into `model.collisions`
 * @param te   K
 * @returns Upsilon; 0 when the source gives no value at all
 */
export function upsilonAt(model: LevelModel, pair: number, te: number): number {
  const { upsilon } = model.collisions;
  const first = pair * UPSILON_TE.length;
  const x: number[] = [];
  const y: number[] = [];
  for (let k = 0; k < UPSILON_TE.length; k++) {
    const value = upsilon[first + k];
    if (value > 0) {
      x.push(LOG_TE[k]);
      y.push(value);
    }
  }
  return x.length === 0 ? 0 : interpolateMonotone(x, y, Math.log(te));
}

/** Whether the collision strengths out of `level` are tabulated at `te` (K), or had to be held at the end of their range. */
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
 * Down: 8.629e-6 Upsilon / (g_upper sqrt(Te)); up by detailed balance.
 */
export function collisionRates(model: LevelModel, te: number): Float64Array {
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
