import type { Remark } from '../problems/index.ts';
import { addLocalContinuum, addProfiles } from './addProfiles.ts';
import { applyEdits, type TieEdit } from './applyEdits.ts';
import type { Feature, FeatureEdit, Group, Measurement } from './feature.ts';
import { artefactFeature, featuresOfFit } from './featuresOfFit.ts';
import type { GroupFit } from './fitGroup.ts';
import type { Component } from './fitSamples.ts';
import type { FittedSpectrum } from './fittedSpectrum.ts';
import { fwhmAt } from './lineSpread.ts';
import { type ShapeFit, shapesOf } from './shapes.ts';

/**
 * The features of a fitted spectrum after what was done by hand; only groups that an edit touches are fitted anew.
 *
 * @param ties further ties, of pairs that have been named; they yield to what was done by hand
 */
export function measurementOf(fitted: FittedSpectrum, edits: readonly FeatureEdit[] = [], ties: readonly TieEdit[] = []): Measurement {
  const { samples, continuum, spread, settings, width } = fitted;
  const { fits, spikes, lost } = applyEdits(samples, width, fitted, edits, ties);
  const groups = fits.map((fit): Group => ({ first: fit.first, last: fit.last, chi2: fit.chi2, dof: fit.dof }));
  const shapes = chosenShapes(fitted, fits);
  const model = modelOf(fitted, fits, shapes);
  const left = new Float64Array(model.length);
  for (let i = 0; i < left.length; i++) left[i] = samples.y[i] + continuum.level[i] - model[i];
  const features = fits.flatMap((fit, group): Feature[] =>
    featuresOfFit(samples, fit, {
      ...{ group, spread, shapes, left },
      continuum: continuum.level,
      threshold: settings.thresholdSigma,
      masked: fitted.masked,
      saturated: fitted.saturated,
    }),
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
    remarks: [...fitted.remarks, ...lost.map((edit) => lostRemark(fitted.name, edit))],
  };
}

/** The features that are to be shown in another shape; one that no longer converges stays a Gaussian. */
function chosenShapes({ samples, width }: FittedSpectrum, fits: readonly GroupFit[]): Map<Component, ShapeFit> {
  const shapes = new Map<Component, ShapeFit>();
  for (const fit of fits) {
    fit.components.forEach((component, k) => {
      if (!component.shape) return;
      const shape = shapesOf(samples, fit, k, width).find(({ as }) => as === component.shape);
      if (shape) shapes.set(component, shape);
    });
  }
  return shapes;
}

/** Continuum plus all profiles, n. */
function modelOf(
  { samples, continuum }: FittedSpectrum,
  fits: readonly GroupFit[],
  shapes: ReadonlyMap<Component, ShapeFit>,
): Float64Array {
  const model = continuum.level.slice();
  for (const fit of fits) {
    const gaussians = shapes.size === 0 ? fit.components : fit.components.filter((c) => !shapes.has(c));
    addProfiles(samples, gaussians, model);
    addLocalContinuum(samples, fit, model);
    for (const component of fit.components) {
      const profile = shapes.get(component)?.profile;
      if (profile) for (let i = 0; i < profile.length; i++) model[fit.first + i] += profile[i];
    }
  }
  return model;
}

const lostRemark = (file: string, edit: FeatureEdit): Remark => ({
  code: 'edit-lost',
  weight: 'warning',
  where: { file },
  found: `"${edit.edit}" by hand at ${edit.at.toFixed(2)} finds no feature there any more; it was left out`,
});
