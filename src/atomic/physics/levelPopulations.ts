import { stationaryShares } from '../../numeric/index.ts';
import type { LevelModel } from '../levelModel.ts';
import { collisionRates } from './collisionRates.ts';

/**
 * Share of the ion in each level under statistical equilibrium of collisions with electrons and radiative decay; no radiation is absorbed.
 * A level that no tabulated collision reaches holds what decays into it, usually nothing; a level that no known rate leaves holds nothing.
 *
 * @param te K, > 0; collision strengths are held outside their tables (`isInsideRange` tells)
 * @param ne cm^-3, > 0
 * @returns n values that sum to 1, each good to some 13 digits of the rates at any density
 * @throws RangeError when `te` or `ne` is not positive and finite
 * Osterbrock & Ferland 2006, section 3.5. Checked in tests/reference/lineRatios.test.ts; speed: tests/bench/physicsBench.ts.
 */
export function levelPopulations(model: LevelModel, te: number, ne: number): Float64Array {
  return populationsFromRates(model, collisionRates(model, te), ne);
}

/** The same from collision rate coefficients at hand, for many densities at one temperature. */
export function populationsFromRates(model: LevelModel, q: Float64Array, ne: number): Float64Array {
  if (!(ne > 0 && ne < Number.POSITIVE_INFINITY)) throw new RangeError(`electron density ${ne}: expected a positive number, cm^-3`);
  const n = model.levels.length;
  const rates = new Float64Array(n * n);
  for (let k = 0; k < rates.length; k++) rates[k] = ne * q[k];
  const { lower, upper, a } = model.radiative;
  for (let k = 0; k < a.length; k++) rates[upper[k] * n + lower[k]] += a[k];
  return stationaryShares(rates, n);
}
