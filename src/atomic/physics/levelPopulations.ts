import { solveLinear } from '../../numeric/index.ts';
import type { LevelModel } from '../levelModel.ts';
import { collisionRates } from './collisionRates.ts';

/**
 * Share of the ion in each level under statistical equilibrium of collisions with electrons and radiative decay; no radiation is absorbed.
 * A level that no tabulated collision reaches holds what decays into it, usually nothing.
 *
 * @param te K
 * @param ne cm^-3, > 0
 * @returns n values that sum to 1
 * @throws RangeError when the equations are singular: a model without a way down from some level
 * Osterbrock & Ferland 2006, section 3.5.
 */
export function levelPopulations(model: LevelModel, te: number, ne: number): Float64Array {
  return populationsFromRates(model, collisionRates(model, te), ne);
}

/** The same from collision rate coefficients at hand, for many densities at one temperature. */
export function populationsFromRates(model: LevelModel, q: Float64Array, ne: number): Float64Array {
  const n = model.levels.length;
  // rates[to * n + from]: into `to`; the diagonal takes what leaves
  const rates = new Float64Array(n * n);
  for (let from = 0; from < n; from++) {
    for (let to = 0; to < n; to++) if (to !== from) rates[to * n + from] = ne * q[from * n + to];
  }
  const { lower, upper, a } = model.radiative;
  for (let k = 0; k < a.length; k++) rates[lower[k] * n + upper[k]] += a[k];
  for (let from = 0; from < n; from++) {
    let out = 0;
    for (let to = 0; to < n; to++) if (to !== from) out += rates[to * n + from];
    // a level that nothing leaves (no A, no collision known) would make the equations singular: it is emptied to the ground at once
    if (out === 0 && from > 0) {
      out = 1;
      rates[from] = 1;
    }
    rates[from * n + from] = -out;
  }
  // the equation of the ground level is the sum of the others: conservation takes its place
  const populations = new Float64Array(n);
  for (let from = 0; from < n; from++) rates[from] = 1;
  populations[0] = 1;
  if (!solveLinear(rates, populations)) throw new RangeError(`the level populations of ${model.ion} have no solution`);
  return populations;
}
