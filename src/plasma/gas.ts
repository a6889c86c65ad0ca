import type { Band } from './bands.ts';
import type { DensityLadder } from './densityLadder.ts';
import type { Estimate } from './estimate.ts';
import type { GasSettings } from './gasSettings.ts';
import type { Kinematics } from './kinematics.ts';
import type { UnusedRatio } from './measuredRatios.ts';
import type { Zone } from './zones.ts';

/** A number with one sigma. */
export interface WithErr {
  readonly value: number;
  readonly err: number;
}

/** One hydrogen line in the reddening fit. */
export interface ReddeningLine {
  /** Numbers of the features, as shown. */
  readonly features: readonly number[];
  readonly label: string;
  readonly restVac: number;
  /** A(lambda)/A(H beta) - 1. */
  readonly f: number;
  /** Flux for H beta = 100 as the fit took it: stellar absorption filled, He II taken off. */
  readonly observed: number;
  readonly observedErr: number;
  /** Case B, H beta = 100. */
  readonly expected: number;
  /** How far the line lies off the fit, in its own errors; absent where it was not fitted. */
  readonly offSigma?: number;
  readonly state: 'used' | 'outlier' | 'unusable';
  /** Why it was not used. */
  readonly reason?: string;
}

export interface Reddening {
  readonly ended: 'fitted' | 'given' | 'none';
  /** Logarithm of the extinction at H beta; absent when nothing could be had. */
  readonly cHbeta?: WithErr;
  readonly aV?: WithErr;
  readonly eBV?: WithErr;
  readonly chi2?: number;
  readonly dof?: number;
  readonly lines: readonly ReddeningLine[];
  readonly stellarEwA: number;
  readonly stellarEwErrA?: number;
  /** c(H beta) from He II alone, as a check. */
  readonly helium?: { readonly cHbeta: WithErr; readonly lines: readonly string[] };
  /** K and cm^-3 of the case-B intensities. */
  readonly te: number;
  readonly ne: number;
  readonly assumption: string;
}

export interface DiagnosticResult {
  readonly label: string;
  readonly ion: string;
  readonly zone: Zone;
  readonly tells: 'temperature' | 'density';
  readonly features: readonly number[];
  /** Ratio of the measured lines, corrected for reddening. */
  readonly ratio: WithErr;
  /** K or cm^-3, at the other quantity of its zone. */
  readonly result: Estimate;
  /** Whether it has a part in the mean of its zone. */
  readonly counts: boolean;
  readonly assumption: string;
}

export interface ZoneQuantity {
  readonly estimate: Estimate;
  /** Where it is from: its own diagnostics, another zone's, given or assumed; a sentence. */
  readonly from: string;
}

export interface ZoneResult {
  readonly zone: Zone;
  readonly te: ZoneQuantity;
  readonly ne: ZoneQuantity;
}

export interface AbundanceResult {
  /** `O III` for N(O++)/N(H+). */
  readonly ion: string;
  readonly zone: Zone;
  readonly from: 'collisional' | 'recombination';
  readonly abundance: number;
  readonly low: number;
  readonly high: number;
  readonly lines: readonly string[];
  readonly assumption: string;
}

/** Recombination over collisional abundance of one ion. */
export interface Discrepancy {
  readonly ion: string;
  readonly factor: number;
  readonly low: number;
  readonly high: number;
}

/** Te from the drop of the continuum at a series limit. */
export interface JumpResult {
  readonly label: string;
  readonly result: Estimate;
  /** Jump over the flux of the series line it is compared with, per Angstrom, corrected for reddening. */
  readonly ratio: WithErr;
  readonly assumption: string;
}

/** What the named lines say of the gas: plain data. */
export interface Gas {
  readonly settings: GasSettings;
  /** How many names were taken: accepted by the user, and the program's best of open features. */
  readonly accepted: number;
  readonly probable: number;
  /** Named lines whose flux came without an error. */
  readonly withoutErr: number;
  /** Flux of H beta, all its components; absent when it has no name. */
  readonly hBeta?: WithErr & { readonly features: readonly number[] };
  readonly reddening: Reddening;
  /** Corrected for reddening, H beta = 100, by number of feature; absent without c(H beta) or H beta. */
  readonly intensities?: readonly (WithErr & { readonly feature: number })[];
  readonly diagnostics: readonly DiagnosticResult[];
  readonly unused: readonly UnusedRatio[];
  readonly zones: readonly ZoneResult[];
  readonly bands: readonly Band[];
  readonly jumps: readonly JumpResult[];
  readonly abundances: readonly AbundanceResult[];
  readonly discrepancies: readonly Discrepancy[];
  readonly ladder: DensityLadder;
  readonly kinematics: Kinematics;
  /** Draws of the noise behind the errors. */
  readonly draws: number;
}
