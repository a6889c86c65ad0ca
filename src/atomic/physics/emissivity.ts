import { PLANCK_ERG_S, SPEED_OF_LIGHT_KMS } from '../../units/index.ts';
import type { LevelModel } from '../levelModel.ts';
import { levelPopulations } from './levelPopulations.ts';

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

/**
 * Emission of a line per ion, erg s^-1: population of the upper level times A times the photon's energy. Divided by ne it is the emission per ion and electron.
 *
 * @param te K
 * @param ne cm^-3, > 0
 */
export function emissivityPerIon(model: LevelModel, upper: number, lower: number, te: number, ne: number): number {
  return levelPopulations(model, te, ne)[upper] * decayRate(model, upper, lower) * photonErg(model, upper, lower);
}

/**
 * Ratio of two lines of one ion in energy units, `over` / `under`, each as [upper, lower].
 *
 * @param te K
 * @param ne cm^-3, > 0
 */
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

/**
 * Ratio of two lines from one upper level in energy units: A times photon energy over the same, the same in any gas that does not absorb them.
 *
 * @param upper index of the level both come from
 * @param over, under indices of their lower levels
 * @returns NaN when an A value is not known
 * [O III] and [N II] carry the relativistic A values of Storey & Zeippen 2000, MNRAS 312, 813. Checked in tests/reference/lineRatios.test.ts.
 */
export function branchingRatio(model: LevelModel, upper: number, over: number, under: number): number {
  const part = (lower: number) => decayRate(model, upper, lower) * photonErg(model, upper, lower);
  return part(over) > 0 && part(under) > 0 ? part(over) / part(under) : Number.NaN;
}
