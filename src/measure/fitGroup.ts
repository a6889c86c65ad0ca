import { type LeastSquaresEnd, levenbergMarquardt } from '../numeric/index.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { groupEquations } from './groupEquations.ts';

/** A finished fit: parameters three a component (flux, centre, ln sigma), then offset and slope of the local continuum. */
export interface GroupFit {
  readonly parameters: Float64Array;
  readonly components: readonly Component[];
  readonly end: LeastSquaresEnd;
  /** chi2 of the samples alone, without the priors. */
  readonly chi2: number;
  readonly dof: number;
  readonly first: number;
  readonly last: number;
}

const MOST_STEPS = 60;
/** A step that gains less chi2 than this moves nothing by more than a few thousandths of its error. */
const CLOSE_ENOUGH = 1e-4;

/**
 * Fits all components of a group at once, with a local linear correction of the continuum.
 *
 * @param first,last samples of the window, both included
 */
export function fitGroup(samples: FitSamples, first: number, last: number, starts: readonly Component[], width: WidthPrior): GroupFit {
  const p = new Float64Array(3 * starts.length + 2);
  starts.forEach((start, k) => {
    p[3 * k] = start.flux;
    p[3 * k + 1] = start.centre;
    p[3 * k + 2] = Math.log(start.sigma);
  });
  const equations = groupEquations(samples, [{ first, last }], starts, width);
  const end = levenbergMarquardt(equations, p, { maxSteps: MOST_STEPS, closeEnough: CLOSE_ENOUGH });
  return {
    parameters: p,
    components: starts.map((_, k) => ({ flux: p[3 * k], centre: p[3 * k + 1], sigma: Math.exp(p[3 * k + 2]) })),
    end,
    chi2: equations.chi2OfSamples(),
    dof: Math.max(1, equations.count - p.length),
    first,
    last,
  };
}
