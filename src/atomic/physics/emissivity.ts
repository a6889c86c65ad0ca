import { PLANCK_ERG_S, SPEED_OF_LIGHT_KMS } from '../../units/index.ts';
import type { LevelModel } from '../levelModel.ts';
import { collisionRates } from './collisionRates.ts';
import { levelPopulations, populationsFromRates } from './levelPopulations.ts';

const CM_PER_KM = 1e5;

/** A value of one pair of levels, s^-1; 0 when none is known. */
export function decayRate(model: LevelModel, upper: number, lower: number): number {
  const { radiative } = model;
  for (let k = 0; k < radiative.a.length; k++) if (radiative.upper[k] === upper && radiative.lower[k] === lower) return radiative.a[k];
  return 0;
}

/** Energy of one photon between two levels, erg. */
const photonErg = (model: LevelModel, upper: number, lower: number) =>
  PLANCK_ERG_S * SPEED_OF_LIGHT_KMS * CM_PER_KM * (model.levels[upper].energyCm1 - model.levels[lower].energyCm1);

/** Emission of a line per ion, erg s^-1: population of the upper level times A times the photon's energy. */
export function emissivityPerIon(model: LevelModel, upper: number, lower: number, te: number, ne: number): number {
  return levelPopulations(model, te, ne)[upper] * decayRate(model, upper, lower) * photonErg(model, upper, lower);
}

/** Ratio of two lines of one ion in energy units, `over` / `under`, each as [upper, lower]. */
export function lineRatio(
  model: LevelModel,
  over: readonly [number, number],
  under: readonly [number, number],
  te: number,
  ne: number,
): number {
  const populations = levelPopulations(model, te, ne);
  const strength = ([upper, lower]: readonly [number, number]) =>
    populations[upper] * decayRate(model, upper, lower) * photonErg(model, upper, lower);
  return strength(over) / strength(under);
}

/** Density (cm^-3) low enough for every level of the list to radiate before it is hit: far below all critical densities but those of the far infrared. */
const LOW_DENSITY_CM3 = 1e-3;

/**
 * What is left of a level's light at a density: emission per ion and electron relative to its low-density limit. 1 in thin gas; it falls as 1/ne far above the critical density.
 *
 * @param ne cm^-3, one or many
 * @returns one value a density
 */
export function survival(model: LevelModel, upper: number, te: number, ne: readonly number[]): number[] {
  const q = collisionRates(model, te);
  const perElectron = (density: number) => populationsFromRates(model, q, density)[upper] / density;
  const limit = perElectron(LOW_DENSITY_CM3);
  return ne.map((density) => perElectron(density) / limit);
}
