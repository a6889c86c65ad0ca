import type { Level, LevelModel } from '../levelModel.ts';
import { totalDecayRate } from './criticalDensity.ts';

/**
 * A spin-changing dipole decay as fast as this (s^-1) is no hindrance: spin-orbit coupling has mixed the terms. Those of thin gas are slower
 * (C III 1909 A: 10^2, Ne V 1575 A: 10^4), allowed ones faster (10^7 ... 10^10). Our boundary, no source.
 */
const FAST_DECAY_S1 = 1e6;

/** 2S+1 of `2Po`, `a 4F`; undefined for terms in other couplings. */
const multiplicity = (level: Level): string | undefined => /(\d+)[A-Z]/.exec(level.term)?.[1];

/**
 * Whether a level has no electric-dipole-allowed decay: each lower level it decays to has its parity, or a J out of reach, or another spin.
 * Dipole rules: parity changes, J changes by at most 1, not 0 to 0, spin stays (Osterbrock & Ferland 2006, appendix 4).
 *
 * @param level index into `model.levels`; the ground level counts as metastable
 */
export function isMetastable(model: LevelModel, level: number): boolean {
  const upper = model.levels[level];
  const { radiative } = model;
  for (let k = 0; k < radiative.a.length; k++) {
    if (radiative.upper[k] !== level) continue;
    const lower = model.levels[radiative.lower[k]];
    const dipole = lower.parity !== upper.parity && Math.abs(lower.j - upper.j) <= 1 && lower.j + upper.j > 0;
    if (dipole && multiplicity(lower) === multiplicity(upper)) return false;
  }
  return totalDecayRate(model, level) < FAST_DECAY_S1;
}
