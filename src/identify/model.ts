import type { AtomicData } from '../atomic/index.ts';
import { roughDimming } from './roughReddening.ts';

/** What is common to all marks, estimated with the assignments. */
export interface SystemModel {
  readonly z: number;
  readonly zErr: number;
  /** Extra scatter of centroids, km/s. */
  readonly dispersionKms: number;
  /** log10 of the marks' flux unit against H beta = 100. */
  readonly logZero: number;
  /** Rough reddening, c(Hbeta). */
  readonly cHbeta: number;
}

/** A line whose strength nobody knows is expected to be faint, with a wide error. */
const UNKNOWN_LOG_STRENGTH = -3.5;
const UNKNOWN_ERR_DEX = 1.3;

const logStrength = (data: AtomicData, line: number) => {
  const known = data.lines.logStrength[line];
  return Number.isFinite(known) ? known : UNKNOWN_LOG_STRENGTH;
};

/** log10 flux predicted for a line at ion scale 0, in the marks' unit. */
export function predictedLog(data: AtomicData, line: number, model: SystemModel): number {
  return model.logZero + logStrength(data, line) - model.cHbeta * roughDimming(data.lines.wavelengthVac[line]);
}

/** Scatter of a line's flux about the prediction beyond the list's own error, dex: other temperature, density, calibration. */
const MODEL_SCATTER_DEX = 0.12;
/** Collisionally excited lines also move with temperature and density. */
const COLLISIONAL_SCATTER_DEX = 0.2;

export const strengthErr = (data: AtomicData, line: number): number => {
  if (!Number.isFinite(data.lines.logStrength[line])) return UNKNOWN_ERR_DEX;
  const own = data.lines.strengthErrDex[line];
  const model = data.lines.mechanism(line) === 'collisional' ? COLLISIONAL_SCATTER_DEX : MODEL_SCATTER_DEX;
  return Math.hypot(Number.isFinite(own) ? own : 0.5, model);
};
