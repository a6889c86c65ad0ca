import type { LevelModel } from '../levelModel.ts';
import { isInsideRange } from './collisionRates.ts';
import { criticalDensity, radiativeLifetime } from './criticalDensity.ts';
import { duration, powerOfTen } from './figuresInWords.ts';
import { isMetastable } from './isMetastable.ts';
import { survival } from './survival.ts';

/** What a metastable level means for the gas. */
export interface ThinGasFacts {
  /** No electric-dipole-allowed decay: the level waits for a forbidden or intercombination one. */
  readonly metastable: boolean;
  /** s; Infinity = no decay known. */
  readonly lifetimeS: number;
  /** cm^-3 at the temperature asked, collisions to all levels counted; Infinity = no collisions known, NaN = no decay known. */
  readonly criticalDensityCm3: number;
  /** One to three sentences a referee can read. */
  readonly why: string;
}

/** The density at which the sentence says how much is left, in critical densities. */
const FAR_ABOVE = 100;

/**
 * Lifetime, critical density and the sentence why lines from a level need thin gas.
 *
 * @param level index into `model.levels`, 1 or more
 * @param te    K
 */
export function thinGasFacts(model: LevelModel, level: number, te: number): ThinGasFacts {
  const metastable = isMetastable(model, level);
  const lifetimeS = radiativeLifetime(model, level);
  const criticalDensityCm3 = criticalDensity(model, level, te);
  return { metastable, lifetimeS, criticalDensityCm3, why: sentence(model, level, te, metastable, lifetimeS, criticalDensityCm3) };
}

function sentence(model: LevelModel, level: number, te: number, metastable: boolean, lifetimeS: number, nCrit: number): string {
  const name = `${model.ion} in its level ${levelName(model, level)}`;
  if (!Number.isFinite(lifetimeS))
    return `${name} has no decay in the tables, so neither its lifetime nor a critical density can be given.`;
  if (!metastable)
    return `${name} radiates by an electric-dipole transition after ${duration(lifetimeS)} on average: its lines do not need thin gas.`;
  const waits = `${name} has no allowed way down and waits ${duration(lifetimeS)} on average before it radiates`;
  if (!Number.isFinite(nCrit)) return `${waits}. Its collision rates are not tabulated, so no critical density can be given.`;
  return `${waits}. Above ${powerOfTen(nCrit)} electrons per cm³ (at ${te.toFixed(0)} K) a collision comes first.${fading(model, level, te, nCrit)}${
    isInsideRange(model, level, te) ? '' : ' The collision strengths are held at the end of their tabulated temperatures.'
  }`;
}

/** How much is left far above the critical density; silent where that would be no fading (fine structure, fed by crowded neighbours). */
function fading(model: LevelModel, level: number, te: number, nCrit: number): string {
  const [left] = survival(model, level, te, [FAR_ABOVE * nCrit]);
  if (!(left < 0.5)) return '';
  const percent = Number((100 * left).toPrecision(1));
  return ` At ${powerOfTen(FAR_ABOVE * nCrit)} per cm³ ${percent >= 1 ? `about ${percent} %` : 'less than 1 %'} of its light per electron is left.`;
}

/** `2p2 1D, J = 2` with odd terms marked as the trade prints them. */
function levelName(model: LevelModel, level: number): string {
  const { configuration, term, j } = model.levels[level];
  const twiceJ = Math.round(2 * j);
  return `${configuration} ${term.replace(/o$/, '°')}, J = ${twiceJ % 2 === 0 ? twiceJ / 2 : `${twiceJ}/2`}`;
}
