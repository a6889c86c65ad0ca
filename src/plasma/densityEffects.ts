import { collisionRates, type LevelModel, populationsFromRates, radiativeLifetime } from '../atomic/index.ts';

/** Densities at which survival is tabulated, log10 cm^-3. */
export const LADDER_LOG_NE: readonly number[] = Array.from({ length: 53 }, (_, k) => -1 + k * 0.4);
/** A curve that rises above this belongs to a level that collisions reach only by way of other levels: it is told by its peak, not by the thinnest gas, where it is dark. */
const FED_BY_OTHERS = 3;
/** Stands for no density at all, cm^-3. */
const NO_DENSITY_CM3 = 1e-6;

/** What density does to the levels of an atom at one temperature; one entry a level. */
export interface DensityEffects {
  readonly te: number;
  /** At the densities of `LADDER_LOG_NE`; NaN where no tabulated collision excites the level. */
  readonly curves: readonly Float64Array[];
  /** cm^-3, collisions to all levels; as `criticalDensity`. */
  readonly critical: readonly number[];
}

const kept = new WeakMap<LevelModel, DensityEffects>();

/**
 * Survival of all levels of an atom: emission per ion and electron over that in the thinnest gas (over its peak, where that is more than three times higher), at the densities of
 * `LADDER_LOG_NE`.
 * Solved at once for all levels; the last temperature of each atom is kept.
 */
export function densityEffects(model: LevelModel, te: number): DensityEffects {
  const known = kept.get(model);
  if (known?.te === te) return known;
  const q = collisionRates(model, te);
  const thin = populationsFromRates(model, q, NO_DENSITY_CM3).map((share) => share / NO_DENSITY_CM3);
  const curves = model.levels.map(() => new Float64Array(LADDER_LOG_NE.length));
  LADDER_LOG_NE.forEach((log, k) => {
    const shares = populationsFromRates(model, q, 10 ** log);
    for (let level = 0; level < curves.length; level++)
      curves[level][k] = thin[level] > 0 ? shares[level] / 10 ** log / thin[level] : Number.NaN;
  });
  for (const curve of curves) {
    const peak = curve.reduce((most, value) => Math.max(value, most), 0);
    if (peak > FED_BY_OTHERS) for (let k = 0; k < curve.length; k++) curve[k] /= peak;
  }
  const effects = { te, curves, critical: model.levels.map((_, level) => criticalOf(model, level, q)) };
  kept.set(model, effects);
  return effects;
}

/** Critical density as `criticalDensity` defines it, from rates at hand. */
function criticalOf(model: LevelModel, level: number, q: Float64Array): number {
  const n = model.levels.length;
  let out = 0;
  for (let to = 0; to < n; to++) if (to !== level) out += q[level * n + to];
  const lifetime = radiativeLifetime(model, level);
  return Number.isFinite(lifetime) ? 1 / (lifetime * out) : Number.NaN;
}

/** Survival at a density between the nodes (cm^-3), straight in the logarithms; held outside. */
export function survivalAt(curve: ArrayLike<number>, ne: number): number {
  const step = LADDER_LOG_NE[1] - LADDER_LOG_NE[0];
  const at = Math.min(Math.max((Math.log10(ne) - LADDER_LOG_NE[0]) / step, 0), LADDER_LOG_NE.length - 1);
  const cell = Math.min(Math.floor(at), LADDER_LOG_NE.length - 2);
  return Math.exp(Math.log(curve[cell]) + (at - cell) * (Math.log(curve[cell + 1]) - Math.log(curve[cell])));
}

/** Density above which always less than `share` is left, cm^-3; NaN where the curve never falls so far. */
export function densityWhereLeft(curve: ArrayLike<number>, share: number): number {
  let k = LADDER_LOG_NE.length - 1;
  if (!(curve[k] < share)) return Number.NaN;
  while (k > 0 && curve[k - 1] < share) k--;
  if (k === 0) return 10 ** LADDER_LOG_NE[0];
  const [over, under] = [Math.log(curve[k - 1]), Math.log(curve[k])];
  const t = (over - Math.log(share)) / (over - under);
  return 10 ** (LADDER_LOG_NE[k - 1] + t * (LADDER_LOG_NE[k] - LADDER_LOG_NE[k - 1]));
}
