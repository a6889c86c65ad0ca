import type { LevelModel } from '../levelModel.ts';
import { collisionRates } from './collisionRates.ts';
import { totalDecayRate } from './criticalDensity.ts';
import { populationsFromRates } from './levelPopulations.ts';

/** Density (cm^-3) that stands for none: a millionth of the lowest critical density that matters (fine structure of the far infrared, about 1). */
const NO_DENSITY_CM3 = 1e-6;
/** Densities between which `densityOfSurvival` looks, log10 cm^-3: emptier than any gas, and a metal. */
const LOWEST_LOG_NE = -2;
const HIGHEST_LOG_NE = 24;
const LOG_NE_STEP = 0.25;
const BISECTIONS = 40;

/**
 * What is left of a level's light at a density: emission per ion and electron relative to its low-density limit. All lines from one upper level share it.
 * 1 in thin gas, falling as 1/ne far above the critical density; a little above 1 where crowded lower levels feed the level.
 *
 * @param upper index of the upper level, 0 = ground
 * @param te K
 * @param ne cm^-3, one or many, each > 0
 * @returns one value a density; NaN when no tabulated collision excites the level
 * From the full level populations (`levelPopulations`); n levels cost one solution a density.
 */
export function survival(model: LevelModel, upper: number, te: number, ne: readonly number[]): number[] {
  const share = survivalAt(model, upper, te);
  return ne.map(share);
}

/**
 * Density at which a given share of a level's light per ion and electron is left: above it always less.
 *
 * @param te    K
 * @param share between 0 and 1
 * @returns cm^-3; NaN when no tabulated collision excites the level or no decay of it is known
 */
export function densityOfSurvival(model: LevelModel, upper: number, te: number, share = 0.5): number {
  if (!(share > 0 && share < 1)) throw new RangeError(`survival ${share}: expected a value between 0 and 1`);
  if (totalDecayRate(model, upper) === 0) return Number.NaN;
  const at = survivalAt(model, upper, te);
  let high = HIGHEST_LOG_NE;
  if (!(at(10 ** high) < share)) return Number.NaN;
  let low = high - LOG_NE_STEP;
  while (low > LOWEST_LOG_NE && at(10 ** low) < share) {
    high = low;
    low -= LOG_NE_STEP;
  }
  for (let k = 0; k < BISECTIONS; k++) {
    const middle = (low + high) / 2;
    if (at(10 ** middle) < share) high = middle;
    else low = middle;
  }
  return 10 ** ((low + high) / 2);
}

/** Survival as a function of density at one temperature. */
function survivalAt(model: LevelModel, upper: number, te: number): (ne: number) => number {
  const q = collisionRates(model, te);
  const perElectron = (density: number) => populationsFromRates(model, q, density)[upper] / density;
  const limit = perElectron(NO_DENSITY_CM3);
  return (density) => (limit > 0 ? perElectron(density) / limit : Number.NaN);
}
