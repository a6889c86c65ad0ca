/** A linear map of an axis to pixels. */
export interface Axis {
  readonly low: number;
  readonly high: number;
  /** Pixels of `low` and `high`. */
  readonly from: number;
  readonly to: number;
}

export const place = (axis: Axis, value: number) => axis.from + ((value - axis.low) / (axis.high - axis.low || 1)) * (axis.to - axis.from);

/** The `d` of a polyline through the points; a gap where a value is not finite. */
export function svgPath(x: ArrayLike<number>, y: ArrayLike<number>, xAxis: Axis, yAxis: Axis): string {
  let path = '';
  let pen = 'M';
  for (let i = 0; i < x.length; i++) {
    const py = place(yAxis, y[i]);
    if (!Number.isFinite(py)) {
      pen = 'M';
      continue;
    }
    path += `${pen}${place(xAxis, x[i]).toFixed(1)} ${py.toFixed(1)}`;
    pen = 'L';
  }
  return path;
}

/** The same as steps: every sample is a level as wide as the way to its neighbours. */
export function svgSteps(x: ArrayLike<number>, y: ArrayLike<number>, xAxis: Axis, yAxis: Axis): string {
  const sx: number[] = [];
  const sy: number[] = [];
  for (let i = 0; i < x.length; i++) {
    const left = i > 0 ? (x[i - 1] + x[i]) / 2 : x[i];
    const right = i + 1 < x.length ? (x[i] + x[i + 1]) / 2 : x[i];
    sx.push(left, right);
    sy.push(y[i], y[i]);
  }
  return svgPath(sx, sy, xAxis, yAxis);
}

/** Least and greatest finite value over all lists; undefined when there is none. */
export function extent(...lists: readonly ArrayLike<number>[]): [number, number] | undefined {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const list of lists) {
    for (let i = 0; i < list.length; i++) {
      const value = list[i];
      if (value < low) low = value;
      if (value > high) high = value;
    }
  }
  return Number.isFinite(low) && Number.isFinite(high) ? [low, high] : undefined;
}
