import type { LeftOut } from './leftOut.ts';
import type { LineFacts } from './lineFacts.ts';

/** What is common to all marks, estimated with the assignments. */
export interface SystemModel {
  readonly z: number;
  readonly zErr: number;
  /** Extra scatter of centroids, km/s. */
  readonly dispersionKms: number;
  /** Trend of velocity with the ion's hardness (see `LineFacts`), km/s per e-fold of energy. */
  readonly trendKms: number;
  /** log10 of the marks' flux unit against H beta = 100. */
  readonly logZero: number;
  /** Rough reddening, c(Hbeta). */
  readonly cHbeta: number;
  /** Share of features that belong to no line of the list: missing entries, artefacts. */
  readonly strangers: number;
  /** What the list leaves out. */
  readonly leftOut: LeftOut;
  /** The flux zero comes from lines of hydrogen. */
  readonly hydrogenSeen: boolean;
}

/** log10 flux predicted for a line at ion scale 0, in the marks' unit. */
export const predictedLog = (facts: LineFacts, line: number, model: SystemModel): number =>
  model.logZero + facts.logStrength[line] - model.cHbeta * facts.dimming[line];
