import type { ExtinctionCurve } from './extinction.ts';

/** What the user may choose about the gas. */
export interface GasSettings {
  readonly curve: ExtinctionCurve;
  /** A(V)/E(B-V). */
  readonly rV: number;
  /** Given c(H beta), logarithm of the extinction at H beta; absent = from the hydrogen lines. */
  readonly cHbeta?: number;
  /** Equivalent width of stellar absorption under every Balmer line, Angstrom, or fitted together with c(H beta). */
  readonly stellarEwA: number | 'fitted';
  /** Open features are used under their best name from this probability on; above 1 = accepted names only. */
  readonly leastProbability: number;
  /** Error of the relative flux calibration, share of each flux; added in quadrature. */
  readonly calibrationErr: number;
  /** Given electron temperature (K) and density (cm^-3); absent = from the diagnostic ratios. */
  readonly te?: number;
  readonly ne?: number;
}

export const DEFAULT_GAS_SETTINGS: GasSettings = {
  curve: 'ccm89-odonnell94',
  rV: 3.1,
  stellarEwA: 0,
  leastProbability: 0.9,
  calibrationErr: 0,
};
