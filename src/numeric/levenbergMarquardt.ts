import { choleskyFactor, choleskySolve } from './cholesky.ts';

/** The least-squares problem as sums over its data: the callback adds them up at `p`. */
export interface NormalEquations {
  /** Number of parameters. */
  readonly size: number;
  /**
   * Fills `jtj` (size x size, row by row, both halves or the lower one) with J'WJ and `jtr` with J'W(data - model); both come zeroed.
   *
   * @returns chi2 = sum w (data - model)^2
   */
  accumulate(p: Float64Array, jtj: Float64Array, jtr: Float64Array): number;
  /** chi2 alone. */
  chi2(p: Float64Array): number;
  /** Puts parameters that left their bounds back onto them; returns whether it had to. */
  bound?(p: Float64Array): boolean;
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

/**
 * Levenberg-Marquardt least squares with Marquardt's scaling (Marquardt 1963, J. SIAM 11, 431; damping as in Nielsen 1999, IMM-REP-1999-05).
 *
 * @param p start values; holds the solution afterwards
 * @returns the covariance (size x size) is (J'WJ)^-1: multiply by chi2/dof where the weights are not absolute
 * Checked in tests/reference/nistStrd.test.ts.
 */
export function levenbergMarquardt(problem: NormalEquations, p: Float64Array, maxSteps = 100): LeastSquaresEnd {
  const n = problem.size;
  const jtj = new Float64Array(n * n);
  const jtr = new Float64Array(n);
  const damped = new Float64Array(n * n);
  const step = new Float64Array(n);
  const trial = new Float64Array(n);
  let damping = 1e-3;
  let growth = 2;
  let chi2 = problem.accumulate(p, jtj, jtr);
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
    const next = problem.chi2(trial);
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
      chi2 = problem.accumulate(p, jtj, jtr);
      if (gained <= CHI2_SHARE * next) return finish(jtj, n, chi2, k);
    } else {
      if (next - chi2 <= CHI2_SHARE * chi2 && damping < 1) return finish(jtj, n, chi2, k);
      damping *= growth;
      growth *= 2;
      if (damping > HOPELESS_DAMPING) return finish(jtj, n, chi2, k);
    }
  }
  return { ended: 'limit', chi2, steps: maxSteps };
}

function finish(jtj: Float64Array, n: number, chi2: number, steps: number): LeastSquaresEnd {
  const covariance = invertPositive(jtj, n);
  return covariance ? { ended: 'converged', chi2, covariance, steps } : { ended: 'singular', chi2, steps };
}

/** Inverse of a symmetric positive matrix, scaled to a unit diagonal first so that parameters of very different size do no harm. */
function invertPositive(matrix: Float64Array, n: number): Float64Array | undefined {
  const scale = Float64Array.from({ length: n }, (_, i) => 1 / Math.sqrt(matrix[i * n + i]));
  if (scale.some((s) => !Number.isFinite(s))) return undefined;
  const factor = Float64Array.from(matrix, (v, k) => v * scale[Math.floor(k / n)] * scale[k % n]);
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
