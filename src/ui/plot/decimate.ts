import { sampleAt } from './sampleAt.ts';

/** A polyline; NaN in `y` breaks it. */
export interface Points {
  readonly x: number[];
  readonly y: number[];
}

/**
 * The least and the greatest value of every stretch of `step`, in the order in which they stand: the picture keeps every extremum.
 * Stretches are counted from zero, not from `from`, so that a picture does not shimmer while it is moved.
 *
 * @param x ascending
 * @param y NaN = a gap
 * @param step width of one pixel column in units of `x`, positive
 * @returns at most two points (and one gap) for every stretch; the samples themselves where they are sparser than that
 */
export function decimate(x: Float64Array, y: Float64Array, from: number, to: number, step: number): Points {
  const first = Math.max(0, sampleAt(x, from) - 1);
  const end = Math.min(x.length, sampleAt(x, to) + 1);
  const points: Points = { x: [], y: [] };
  if (end - first <= (2 * (to - from)) / step) return copy(points, x, y, first, end);
  let i = first;
  let inGap = true;
  while (i < end) {
    const edge = (Math.floor(x[i] / step) + 1) * step;
    let least = -1;
    let greatest = -1;
    let gap = false;
    // at least one sample is taken: a rounded edge may lie on the sample itself
    do {
      const value = y[i];
      if (Number.isNaN(value)) gap = true;
      else {
        if (least < 0 || value < y[least]) least = i;
        if (greatest < 0 || value >= y[greatest]) greatest = i;
      }
      i++;
    } while (i < end && x[i] < edge);
    if (least >= 0) {
      push(points, x, y, Math.min(least, greatest));
      if (least !== greatest) push(points, x, y, Math.max(least, greatest));
      inGap = false;
    }
    if (gap && !inGap) {
      points.x.push(x[i - 1]);
      points.y.push(Number.NaN);
      inGap = true;
    }
  }
  return points;
}

function copy(points: Points, x: Float64Array, y: Float64Array, first: number, end: number): Points {
  for (let i = first; i < end; i++) push(points, x, y, i);
  return points;
}

function push(points: Points, x: Float64Array, y: Float64Array, i: number): void {
  points.x.push(x[i]);
  points.y.push(y[i]);
}
