import { FWHM_PER_SIGMA } from '../units/index.ts';
import type { GroupFit } from './fitGroup.ts';
import type { FitSamples, WidthPrior } from './fitSamples.ts';
import { spanOf } from './groupEquations.ts';
import { firstAtLeast } from './profile.ts';

/** A line keeps at least this many bins a FWHM: more tell nothing more of it. */
const ENOUGH_PER_FWHM = 8;
/** A bin counts when at least this share of its samples does. */
const LEAST_USABLE = 0.5;

/** Neighbouring samples taken together where lines are sampled far more finely than their fits need. */
export interface Coarse {
  readonly samples: FitSamples;
  /** Bin k holds samples [start[k], start[k + 1]). */
  readonly start: Int32Array;
}

/** Weighted means of neighbouring samples; undefined where lines are not oversampled: nothing is then gained. */
export function coarseSamples(fine: FitSamples, width: WidthPrior): Coarse | undefined {
  const n = fine.x.length;
  const per = (i: number) => Math.max(1, Math.floor((FWHM_PER_SIGMA * width.sigmaAt(fine.x[i])) / fine.sampleWidth[i] / ENOUGH_PER_FWHM));
  const starts: number[] = [];
  for (let i = 0; i < n; i += per(i)) starts.push(i);
  const m = starts.length;
  if (m > n / 1.5) return undefined;
  const start = Int32Array.from([...starts, n]);
  const samples: FitSamples = {
    x: new Float64Array(m),
    y: new Float64Array(m),
    noise: new Float64Array(m),
    usable: new Uint8Array(m),
    sampleWidth: new Float64Array(m),
  };
  for (let k = 0; k < m; k++) {
    let [weight, wx, wy, count] = [0, 0, 0, 0];
    for (let i = start[k]; i < start[k + 1]; i++) {
      samples.sampleWidth[k] += fine.sampleWidth[i];
      if (!fine.usable[i]) continue;
      const w = 1 / (fine.noise[i] * fine.noise[i]);
      weight += w;
      wx += w * fine.x[i];
      wy += w * fine.y[i];
      count++;
    }
    const whole = start[k + 1] - start[k];
    samples.x[k] = weight > 0 ? wx / weight : 0.5 * (fine.x[start[k]] + fine.x[start[k + 1] - 1]);
    samples.y[k] = weight > 0 ? wy / weight : Number.NaN;
    samples.noise[k] = weight > 0 ? 1 / Math.sqrt(weight) : Number.NaN;
    samples.usable[k] = count >= LEAST_USABLE * whole ? 1 : 0;
  }
  return { samples, start };
}

/** A fit of bins told of the samples: windows and continuum by samples, widths without what the bins added. */
export function fineFit({ samples, start }: Coarse, fine: FitSamples, fit: GroupFit): GroupFit {
  const first = start[fit.first];
  const last = start[fit.last + 1] - 1;
  const before = spanOf(samples.x, fit.first, fit.last);
  const after = spanOf(fine.x, first, last);
  const parameters = fit.parameters.slice();
  const size = parameters.length;
  const slope = parameters[size - 1] / before.half;
  parameters[size - 2] += slope * (after.middle - before.middle);
  parameters[size - 1] = slope * after.half;
  const components = fit.components.map((component, k) => {
    const bin = Math.min(samples.x.length - 1, firstAtLeast(samples.x, component.centre));
    const added = (samples.sampleWidth[bin] ** 2 - fine.sampleWidth[start[bin]] ** 2) / 12;
    const sigma = Math.sqrt(Math.max(0.25 * component.sigma ** 2, component.sigma ** 2 - added));
    parameters[3 * k + 2] = Math.log(sigma);
    return { ...component, sigma };
  });
  return { ...fit, parameters, components, first, last };
}

/** The sample of a bin that stands out most from its fellows: the spike among them. */
export function spikeInBin({ start }: Coarse, { y, noise }: FitSamples, bin: number): number {
  let [sum, count] = [0, 0];
  for (let i = start[bin]; i < start[bin + 1]; i++)
    if (Number.isFinite(y[i])) {
      sum += y[i];
      count++;
    }
  let worst = start[bin];
  let most = -1;
  for (let i = start[bin]; i < start[bin + 1]; i++) {
    const off = Math.abs(y[i] - sum / count) / noise[i];
    if (off > most) [worst, most] = [i, off];
  }
  return worst;
}
