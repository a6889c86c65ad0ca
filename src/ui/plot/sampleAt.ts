/** Index of the first sample at or beyond `value` in ascending `x`; `x.length` when there is none. */
export function sampleAt(x: ArrayLike<number>, value: number): number {
  let low = 0;
  let high = x.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (x[middle] < value) low = middle + 1;
    else high = middle;
  }
  return low;
}
