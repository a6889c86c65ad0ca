import type { LineList } from './lineList.ts';

/** First index whose value is >= `bound`. */
function firstAtLeast(ascending: Float64Array, bound: number): number {
  let low = 0;
  let high = ascending.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (ascending[middle] < bound) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** All lines of a window, as indices [start, end): lowVac <= wavelength < highVac, vacuum Angstrom. Two binary searches. */
export function linesBetween(lines: LineList, lowVac: number, highVac: number): readonly [number, number] {
  const start = firstAtLeast(lines.wavelengthVac, lowVac);
  return [start, Math.max(start, firstAtLeast(lines.wavelengthVac, highVac))];
}
