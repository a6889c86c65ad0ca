import { type LeastSquaresEnd, levenbergMarquardt } from '../numeric/index.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { type GroupEquations, groupEquations } from './groupEquations.ts';

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

export const MOST_STEPS = 60;
/** A step that gains less chi2 than this moves nothing by more than a few hundredths of its error, and convergence is quadratic there. */
export const CLOSE_ENOUGH = 1e-3;

/**
 * Fits all components of a group at once, with a local linear correction of the continuum.
 *
 * @param first,last samples of the window, both included
 */
export function fitGroup(samples: FitSamples, first: number, last: number, starts: readonly Component[], width: WidthPrior): GroupFit {
  const p = startPoint(starts, 1);
  const equations = groupEquations(samples, [{ first, last }], starts, width);
  const end = levenbergMarquardt(equations, p, { maxSteps: MOST_STEPS, closeEnough: CLOSE_ENOUGH });
  return {
    parameters: p,
    components: starts.map((start, k) => componentOf(start, p, k, equations)),
    end,
    chi2: equations.chi2OfSamples(),
    dof: Math.max(1, equations.count - p.length),
    first,
    last,
  };
}

/** Parameters at the start: three a component, two a stretch. */
export function startPoint(starts: readonly Component[], stretches: number): Float64Array {
  const p = new Float64Array(3 * starts.length + 2 * stretches);
  starts.forEach((start, k) => {
    p[3 * k] = start.flux;
    p[3 * k + 1] = start.centre;
    p[3 * k + 2] = Math.log(start.sigma);
  });
  return p;
}

/** Line `k` at the point `p`, with the words of its start. */
export function componentOf(start: Component, p: Float64Array, k: number, equations: GroupEquations): Component {
  const { byHand, shape, isBroad } = start;
  const atBound = equations.atBound(p, k);
  return {
    flux: p[3 * k],
    centre: p[3 * k + 1],
    sigma: Math.exp(p[3 * k + 2]),
    ...(isBroad ? { isBroad } : {}),
    ...(atBound ? { atBound } : {}),
    ...(byHand ? { byHand } : {}),
    ...(shape ? { shape } : {}),
  };
}
