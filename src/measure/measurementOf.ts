import { addLocalContinuum, addProfiles } from './addProfiles.ts';
import type { Feature, FeatureEdit, Group, Measurement } from './feature.ts';
import { artefactFeature, featuresOfFit } from './featuresOfFit.ts';
import { fwhmAt } from './lineSpread.ts';
import type { FittedSpectrum } from './measure.ts';

/** The features of a fitted spectrum after what was done by hand. */
export function measurementOf(fitted: FittedSpectrum, edits: readonly FeatureEdit[] = []): Measurement {
  const { samples, continuum, spread, settings, fits, spikes } = fitted;
  void edits;
  const groups = fits.map((fit): Group => ({ first: fit.first, last: fit.last, chi2: fit.chi2, dof: fit.dof }));
  const model = Float64Array.from(continuum.level);
  for (const fit of fits) {
    addProfiles(samples, fit.components, model);
    addLocalContinuum(samples, fit, model);
  }
  const features = fits.flatMap((fit, group): Feature[] =>
    featuresOfFit(samples, fit, { continuum: continuum.level, group, spread, threshold: settings.thresholdSigma, masked: fitted.masked }),
  );
  for (const spike of spikes) features.push(artefactFeature(samples, spike, continuum.level, groups));
  features.sort((a, b) => a.centroid - b.centroid);
  const middle = 0.5 * (samples.x[0] + samples.x[samples.x.length - 1]);
  return {
    features: features.map((feature, index) => ({ ...feature, index })),
    groups,
    continuum: continuum.level,
    continuumErr: continuum.levelErr,
    continuumHalfPeriodA: continuum.halfPeriodA,
    model,
    noise: samples.noise,
    ...(fitted.noiseFactor === undefined ? {} : { noiseFactor: fitted.noiseFactor }),
    noiseCorrelation: fitted.noiseCorrelation,
    lineWidth: spread.usual,
    resolvingPower: middle / fwhmAt(spread.usual, middle),
    resolvingPowerFrom: spread.from,
    expectedFalse: fitted.expectedFalse,
    remarks: fitted.remarks,
  };
}
