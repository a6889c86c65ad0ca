import { levenbergMarquardt, type NormalEquations } from '../numeric/index.ts';
import { CLOSE_ENOUGH, componentOf, type GroupFit, MOST_STEPS, startPoint } from './fitGroup.ts';
import type { FitSamples, WidthPrior } from './fitSamples.ts';
import { groupEquations } from './groupEquations.ts';

/** Component `line` has the velocity and the velocity width of component `to`, and its flux times `ratio` when that is said; numbers count through all fits. */
export interface Tie {
  readonly line: number;
  readonly to: number;
  /** Rest wavelength of `line` over that of `to`. */
  readonly wavelengthRatio: number;
  readonly ratio?: number;
}

/** Full parameter i = `factor` times free parameter `free` + `plus`. */
interface Place {
  readonly free: number;
  readonly factor: number;
  readonly plus: number;
}

/**
 * Fits several groups at once with ties between their components.
 *
 * @param ties no component is tied to one that is itself tied
 * @returns the fits in the same order, with covariances that know of the ties
 */
export function fitTied(samples: FitSamples, fits: readonly GroupFit[], ties: readonly Tie[], width: WidthPrior): GroupFit[] {
  const starts = fits.flatMap((fit) => fit.components);
  const equations = groupEquations(samples, fits, starts, width);
  const places = placesOf(starts.length, equations.size, ties);
  const freeCount = Math.max(...places.map((place) => place.free)) + 1;
  const full = startPoint(starts, fits.length);
  const p = new Float64Array(freeCount);
  const contract = (from: Float64Array, into: Float64Array) =>
    places.forEach(({ free, factor, plus }, i) => {
      if (factor === 1 && plus === 0) into[free] = from[i];
    });
  const expand = (from: Float64Array) => {
    for (let i = 0; i < places.length; i++) full[i] = places[i].factor * from[places[i].free] + places[i].plus;
  };
  contract(full, p);
  const end = levenbergMarquardt(reduced(), p, { maxSteps: MOST_STEPS, closeEnough: CLOSE_ENOUGH });
  expand(p);
  equations.evaluate(full);
  const components = starts.map((start, k) => componentOf(start, full, k, equations));
  const dof = Math.max(1, equations.count - freeCount);
  let from = 0;
  return fits.map((fit, s) => {
    const count = fit.components.length;
    const rows = Array.from({ length: 3 * count }, (_, i) => 3 * from + i).concat(3 * starts.length + 2 * s, 3 * starts.length + 2 * s + 1);
    const part: GroupFit = {
      parameters: Float64Array.from(rows, (i) => full[i]),
      components: components.slice(from, from + count),
      end: end.ended === 'converged' ? { ...end, covariance: covarianceOf(rows, places, end.covariance, freeCount) } : end,
      chi2: equations.chi2OfSamples(),
      dof,
      first: fit.first,
      last: fit.last,
    };
    from += count;
    return part;
  });

  function reduced(): NormalEquations {
    const size = equations.size;
    const jtj = new Float64Array(size * size);
    const jtr = new Float64Array(size);
    return {
      size: freeCount,
      evaluate(free) {
        expand(free);
        return equations.evaluate(full);
      },
      accumulate(intoJtj, intoJtr) {
        jtj.fill(0);
        jtr.fill(0);
        equations.accumulate(jtj, jtr);
        for (let i = 0; i < size; i++) {
          const a = places[i];
          intoJtr[a.free] += a.factor * jtr[i];
          for (let j = 0; j <= i; j++) {
            const b = places[j];
            const value = a.factor * b.factor * jtj[i * size + j];
            // the lower half of the reduced matrix; two full parameters of one free one count twice
            if (a.free === b.free) intoJtj[a.free * freeCount + a.free] += i === j ? value : 2 * value;
            else intoJtj[Math.max(a.free, b.free) * freeCount + Math.min(a.free, b.free)] += value;
          }
        }
      },
      bound(free) {
        expand(free);
        equations.bound?.(full);
        contract(full, free);
      },
    };
  }
}

function placesOf(lines: number, size: number, ties: readonly Tie[]): Place[] {
  const tied = new Map<number, { readonly to: number; readonly factor: number; readonly plus: number }>();
  for (const { line, to, wavelengthRatio, ratio } of ties) {
    if (ratio !== undefined) tied.set(3 * line, { to: 3 * to, factor: ratio, plus: 0 });
    tied.set(3 * line + 1, { to: 3 * to + 1, factor: wavelengthRatio, plus: 0 });
    tied.set(3 * line + 2, { to: 3 * to + 2, factor: 1, plus: Math.log(wavelengthRatio) });
  }
  if (lines * 3 > size) throw new RangeError('more lines than parameters');
  const places: Place[] = [];
  const numbers = new Map<number, number>();
  for (let i = 0; i < size; i++) if (!tied.has(i)) numbers.set(i, numbers.size);
  for (let i = 0; i < size; i++) {
    const tie = tied.get(i);
    const free = numbers.get(tie ? tie.to : i);
    if (free === undefined) throw new RangeError(`component ${Math.floor(i / 3)} is tied to one that is itself tied`);
    // a factor a hair off 1 tells a tied parameter of ratio 1 from a free one
    places.push(
      tie
        ? { free, factor: tie.factor === 1 && tie.plus === 0 ? 1 + Number.EPSILON : tie.factor, plus: tie.plus }
        : { free, factor: 1, plus: 0 },
    );
  }
  return places;
}

function covarianceOf(rows: readonly number[], places: readonly Place[], free: Float64Array, freeCount: number): Float64Array {
  const n = rows.length;
  const covariance = new Float64Array(n * n);
  rows.forEach((i, a) => {
    rows.forEach((j, b) => {
      covariance[a * n + b] = places[i].factor * places[j].factor * free[places[i].free * freeCount + places[j].free];
    });
  });
  return covariance;
}
