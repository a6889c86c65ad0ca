import { choleskyFactor, choleskySolve } from './cholesky.ts';

/** The least-squares problem as sums over its data. */
export interface NormalEquations {
  /** Number of parameters. */
  readonly size: number;
  /** chi2 = sum w (data - model)^2 at `p`; keeps what `accumulate` needs. */
  evaluate(p: Float64Array): number;
  /** At the point of the last `evaluate`, fills `jtj` (size x size, row by row, lower half) with J'WJ and `jtr` with J'W(data - model); both come zeroed. */
  accumulate(jtj: Float64Array, jtr: Float64Array): void;
  /** Puts parameters that left their bounds back onto them. */
  bound?(p: Float64Array): void;
}

/** How the iteration ended, with what then exists. */
export type LeastSquaresEnd =
  | { readonly ended: 'converged'; readonly chi2: number; readonly covariance: Float64Array; readonly steps: number }
  /** Converged, but J'WJ has no inverse. */
  | { readonly ended: 'singular'; readonly chi2: number; readonly steps: number }
  /** No convergence within the steps allowed. */
  | { readonly ended: 'limit'; readonly chi2: number; readonly steps: number };

/** chi2 may no longer fall by more than this share ... */
const CHI2_SHARE = 1e-10;
/** ... and damping above this means that no step helps any more. */
const HOPELESS_DAMPING = 1e12;
const FIRST_DAMPING = 1e-3;

export interface LeastSquaresOptions {
  readonly maxSteps?: number;
  /** A step that lowers chi2 by no more than this is the last; 0 = go on to working precision. With absolute weights 1e-4 is a hundredth of a sigma. */
  readonly closeEnough?: number;
}

/**
 * Levenberg-Marquardt least squares with Marquardt's scaling (Marquardt 1963, J. SIAM 11, 431; damping as in Nielsen 1999, IMM-REP-1999-05).
 *
 * @param p start values; holds the solution afterwards
 * @returns the covariance (size x size) is (J'WJ)^-1: multiply by chi2/dof where the weights are not absolute
 * Checked in tests/reference/nistStrd.test.ts.
 */
export function levenbergMarquardt(problem: NormalEquations, p: Float64Array, options: LeastSquaresOptions = {}): LeastSquaresEnd {
  const { maxSteps = 100, closeEnough = 0 } = options;
  const n = problem.size;
  const { jtj, jtr, damped, step, trial } = workspaceOf(n);
  jtj.fill(0);
  jtr.fill(0);
  let damping = FIRST_DAMPING;
  let growth = 2;
  let chi2 = problem.evaluate(p);
  problem.accumulate(jtj, jtr);
  for (let k = 1; k <= maxSteps; k++) {
    damped.set(jtj);
    for (let i = 0; i < n; i++) damped[i * n + i] += damping * Math.max(jtj[i * n + i], 1e-300);
    step.set(jtr);
    if (!choleskyFactor(damped, n)) {
      damping *= 10;
      if (damping > HOPELESS_DAMPING) return { ended: 'singular', chi2, steps: k };
      continue;
    }
    choleskySolve(damped, n, step);
    for (let i = 0; i < n; i++) trial[i] = p[i] + step[i];
    problem.bound?.(trial);
    const next = problem.evaluate(trial);
    const small = Math.max(closeEnough, CHI2_SHARE * Math.min(chi2, next));
    if (next <= chi2) {
      const gained = chi2 - next;
      let predicted = 0;
      for (let i = 0; i < n; i++) predicted += step[i] * (damping * jtj[i * n + i] * step[i] + jtr[i]);
      const quality = predicted > 0 ? gained / predicted : 1;
      damping = Math.max(1e-15, damping * Math.max(1 / 3, 1 - (2 * quality - 1) ** 3));
      growth = 2;
      p.set(trial);
      jtj.fill(0);
      jtr.fill(0);
      chi2 = next;
      problem.accumulate(jtj, jtr);
      if (gained <= small) return finish(jtj, n, chi2, k);
    } else {
      if (next - chi2 <= small && damping < 1) return finish(jtj, n, chi2, k);
      damping *= growth;
      growth *= 2;
      if (damping > HOPELESS_DAMPING) return finish(jtj, n, chi2, k);
    }
  }
  return { ended: 'limit', chi2, steps: maxSteps };
}

interface Workspace {
  readonly jtj: Float64Array;
  readonly jtr: Float64Array;
  readonly damped: Float64Array;
  readonly step: Float64Array;
  readonly trial: Float64Array;
}

/** Working arrays by number of parameters: thousands of small fits follow one another, never one inside another. */
const workspaces = new Map<number, Workspace>();

function workspaceOf(n: number): Workspace {
  const known = workspaces.get(n);
  if (known) return known;
  const vector = () => new Float64Array(n);
  const matrix = () => new Float64Array(n * n);
  const made = { jtj: matrix(), damped: matrix(), jtr: vector(), step: vector(), trial: vector() };
  workspaces.set(n, made);
  return made;
}

function finish(jtj: Float64Array, n: number, chi2: number, steps: number): LeastSquaresEnd {
  const covariance = invertPositive(jtj, n);
  return covariance ? { ended: 'converged', chi2, covariance, steps } : { ended: 'singular', chi2, steps };
}

/** Inverse of a symmetric positive matrix (lower half read), scaled to a unit diagonal first so that parameters of very different size do no harm. */
function invertPositive(matrix: Float64Array, n: number): Float64Array | undefined {
  const scale = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    scale[i] = 1 / Math.sqrt(matrix[i * n + i]);
    if (!Number.isFinite(scale[i])) return undefined;
  }
  const factor = new Float64Array(n * n);
  for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) factor[i * n + j] = matrix[i * n + j] * scale[i] * scale[j];
  if (!choleskyFactor(factor, n)) return undefined;
  const inverse = new Float64Array(n * n);
  const column = new Float64Array(n);
  for (let j = 0; j < n; j++) {
    column.fill(0);
    column[j] = 1;
    choleskySolve(factor, n, column);
    for (let i = 0; i < n; i++) inverse[i * n + j] = column[i] * scale[i] * scale[j];
  }
  return inverse;
}
