import type { Remark } from '../problems/index.ts';
import type { Continuum } from './continuum.ts';
import type { MeasureSettings } from './feature.ts';
import type { GroupFit } from './fitGroup.ts';
import type { FitSamples, WidthPrior } from './fitSamples.ts';
import type { LineSpread } from './lineSpread.ts';

/** A spectrum with everything that was fitted to it by itself: what is done by hand starts from here. Not to be changed by whoever holds it. */
export interface FittedSpectrum {
  readonly samples: FitSamples;
  readonly masked: Uint8Array;
  readonly continuum: Continuum;
  readonly noiseFactor?: number;
  readonly noiseCorrelation: number;
  readonly spread: LineSpread;
  readonly width: WidthPrior;
  readonly fits: readonly GroupFit[];
  /** Sample numbers. */
  readonly spikes: readonly number[];
  /** Sample numbers where the detector was full, ascending. */
  readonly saturated: readonly number[];
  readonly name: string;
  readonly settings: MeasureSettings;
  readonly expectedFalse: number;
  readonly remarks: readonly Remark[];
}
