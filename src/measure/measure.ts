import { normalTail } from '../numeric/index.ts';
import { ProblemError, type Remark } from '../problems/index.ts';
import { countUsable, type Spectrum } from '../spectrum/index.ts';
import { FWHM_PER_SIGMA } from '../units/index.ts';
import { type Coarse, coarseSamples, fineFit, spikeInBin } from './coarse.ts';
import type { Measurement, MeasureSettings } from './feature.ts';
import { fitPasses } from './fitPasses.ts';
import type { FitSamples } from './fitSamples.ts';
import type { FittedSpectrum } from './fittedSpectrum.ts';
import { learnLineSpread } from './learnLineSpread.ts';
import { LEAST_SHARE, type LineSpread, widthPrior } from './lineSpread.ts';
import { measurementOf } from './measurementOf.ts';
import { prepare } from './prepare.ts';

/** Progress is told as a share in [0, 1] of the named stage; a run is cancelled between groups. */
export interface MeasureControl {
  readonly progress?: (stage: string, share: number) => void;
  readonly signal?: AbortSignal;
}

const FEWEST_SAMPLES = 20;

/**
 * Measures every emission and absorption feature of a spectrum, and does to them what the user did by hand (`settings.edits`).
 *
 * @returns features by ascending centroid, with continuum, model and noise one value a sample
 * @throws ProblemError when fewer than 20 samples can be used
 * Checked in tests/measure/measure.test.ts on seeded spectra with known truth; `npm run bench` scores it beside a script.
 */
export const measure = (spectrum: Spectrum, settings: MeasureSettings, control: MeasureControl = {}): Measurement =>
  measurementOf(fitSpectrum(spectrum, settings, control), settings.edits);

/** The part of `measure` that nothing done by hand changes; `settings.edits` is not looked at. */
export function fitSpectrum(spectrum: Spectrum, settings: MeasureSettings, control: MeasureControl = {}): FittedSpectrum {
  if (countUsable(spectrum) < FEWEST_SAMPLES) {
    throw new ProblemError({
      code: 'too-few-samples',
      where: { file: spectrum.name },
      found: `${countUsable(spectrum)} usable samples`,
      expected: `at least ${FEWEST_SAMPLES}`,
      doThis: 'Choose another column or another part of the file.',
    });
  }
  const remarks: Remark[] = [];
  const prepared = prepare(spectrum, settings, remarks);
  const { samples } = prepared;
  control.progress?.('detecting', 0);
  const { spread, snr } = learnLineSpread(samples, prepared.width, prepared.told, settings.thresholdSigma);
  const width = widthPrior(spread.usual, spread.spread);
  const spikes = [...prepared.spikes];
  const coarse = coarseSamples(samples, width);
  const noiseBefore = coarse?.samples.noise.slice();
  const binSpikes: number[] = [];
  const found = fitPasses(
    coarse?.samples ?? samples,
    {
      width,
      threshold: settings.thresholdSigma,
      absorption: settings.absorption,
      ...(snr && !coarse ? { snr } : {}),
      between: (share) => {
        control.signal?.throwIfAborted();
        control.progress?.('fitting', share);
      },
    },
    coarse ? binSpikes : spikes,
    (share) =>
      remarks.push({
        code: 'not-gaussian',
        weight: 'note',
        where: { file: spectrum.name },
        found: `strong lines are not Gaussian: ${(100 * share).toFixed(1)} % of them is left over by the fits, and was added to the noise near them`,
      }),
  );
  const fits = coarse ? found.map((fit) => fineFit(coarse, samples, fit)) : found;
  if (coarse && noiseBefore) takeBack(coarse, samples, noiseBefore);
  for (const bin of coarse ? binSpikes : []) {
    const spike = coarse ? spikeInBin(coarse, samples, bin) : bin;
    samples.usable[spike] = 0;
    spikes.push(spike);
  }
  return {
    samples,
    masked: spectrum.masked,
    continuum: prepared.continuum,
    ...(prepared.noiseFactor === undefined ? {} : { noiseFactor: prepared.noiseFactor }),
    noiseCorrelation: prepared.noiseCorrelation,
    spread,
    width,
    fits,
    spikes: [...new Set(spikes)],
    saturated: prepared.saturated,
    name: spectrum.name,
    settings,
    expectedFalse: expectedFalse(samples, spread, settings),
    remarks,
  };
}

/** What strong lines leave over was added to the noise of the bins: the noise of their samples grows alike. */
function takeBack(coarse: Coarse, { noise }: FitSamples, before: Float64Array): void {
  for (let k = 0; k < before.length; k++) {
    const growth = coarse.samples.noise[k] / before[k];
    if (growth > 1) for (let i = coarse.start[k]; i < coarse.start[k + 1]; i++) noise[i] *= growth;
  }
}

/** Features from noise alone: independent places (two sigma of the profile apart) times the tail beyond the threshold. */
function expectedFalse({ x, usable, sampleWidth }: FitSamples, { usual }: LineSpread, settings: MeasureSettings): number {
  let places = 0;
  const { at, fwhmA, slope } = usual;
  for (let i = 0; i < x.length; i++)
    if (usable[i]) places += (sampleWidth[i] * FWHM_PER_SIGMA) / (2 * Math.max(LEAST_SHARE * fwhmA, fwhmA + slope * (x[i] - at)));
  return places * normalTail(settings.thresholdSigma) * (settings.absorption ? 2 : 1);
}
