import type { LevelModel } from '../levelModel.ts';
import { collisionRates } from './collisionRates.ts';

/** Sum of the A values out of a level, s^-1; 0 for the ground and for levels without a known decay. */
export function totalDecayRate(model: LevelModel, level: number): number {
  const { upper, a } = model.radiative;
  let sum = 0;
  for (let k = 0; k < upper.length; k++) if (upper[k] === level) sum += a[k];
  return sum;
}

/** Mean time a level lives before it radiates, s: 1 / sum of A; Infinity for the ground and for levels without a known decay. */
export const radiativeLifetime = (model: LevelModel, level: number): number => 1 / totalDecayRate(model, level);

/**
 * Electron density at which collisions empty a level as fast as radiation does.
 *
 * @param level index into `model.levels`, 0 = ground
 * @param te    electron temperature, K; collision strengths are held outside their tables (`isInsideRange` tells)
 * @param counted 'all' other levels, up and down (our definition wherever a number is shown), or 'down' to lower levels only, as some textbooks have it
 * @returns cm^-3; Infinity where no collision out of the level is tabulated (nobody knows, not: no limit), NaN where no decay is
 * Definition: sum of A to all lower levels over sum of q to all other levels (Osterbrock & Ferland 2006, chapter 3).
 * Printed tables mix definitions: up and down, down only, down to other terms only; they differ by up to 10 within fine structure (C III 3P, O II 2D).
 * Checked in tests/reference/criticalDensity.test.ts.
 */
export function criticalDensity(model: LevelModel, level: number, te: number, counted: 'all' | 'down' = 'all'): number {
  const n = model.levels.length;
  const q = collisionRates(model, te);
  let out = 0;
  for (let to = 0; to < n; to++) if (to !== level && (counted === 'all' || to < level)) out += q[level * n + to];
  const decay = totalDecayRate(model, level);
  if (decay === 0) return Number.NaN;
  return out > 0 ? decay / out : Number.POSITIVE_INFINITY;
}
