/** A stretch of the spectrum, Angstrom as observed. */
export type Range = readonly [low: number, high: number];

/** Nothing closer than this can be looked at, Angstrom. */
const NARROWEST = 2;

/** `range` moved and, if need be, narrowed so that it lies inside `full`. */
export function inside(range: Range, full: Range): Range {
  const width = Math.min(Math.max(range[1] - range[0], NARROWEST), full[1] - full[0]);
  const centre = (range[0] + range[1]) / 2;
  const low = Math.min(Math.max(centre - width / 2, full[0]), full[1] - width);
  return [low, low + width];
}

/** The range made `factor` times as wide about `at`, which keeps its place on the screen. */
export function zoomed(range: Range, at: number, factor: number, full: Range): Range {
  const width = Math.max((range[1] - range[0]) * factor, NARROWEST);
  const share = (at - range[0]) / (range[1] - range[0]);
  const low = at - share * width;
  return inside([low, low + width], full);
}

/** Fingers nearer to each other than this share of the view would zoom without end. */
const CLOSEST_FINGERS = 0.02;

/**
 * The range in which what two fingers took hold of lies under them again.
 *
 * @param before where they took hold, shares of the view
 * @param after  where they are now
 */
export function pinched(range: Range, before: readonly [number, number], after: readonly [number, number], full: Range): Range {
  const apart = (fingers: readonly [number, number]) => Math.max(Math.abs(fingers[0] - fingers[1]), CLOSEST_FINGERS);
  const width = Math.max(((range[1] - range[0]) * apart(before)) / apart(after), NARROWEST);
  const held = range[0] + ((before[0] + before[1]) / 2) * (range[1] - range[0]);
  const low = held - ((after[0] + after[1]) / 2) * width;
  return inside([low, low + width], full);
}

/** The range moved by a share of its width. */
export function panned(range: Range, share: number, full: Range): Range {
  const by = (range[1] - range[0]) * share;
  return inside([range[0] + by, range[1] + by], full);
}

/** The same range if `at` is comfortably inside it, else one of the same width about `at`. */
export function showing(range: Range, at: number, full: Range): Range {
  const margin = (range[1] - range[0]) * 0.06;
  if (at > range[0] + margin && at < range[1] - margin) return range;
  const half = (range[1] - range[0]) / 2;
  return inside([at - half, at + half], full);
}

/** Ends of the spectrum (or of the list of features) with a little air. */
export function fullRange(wavelengths: ArrayLike<number>): Range {
  const low = wavelengths[0] ?? 3000;
  const high = wavelengths[wavelengths.length - 1] ?? 10000;
  const air = Math.max((high - low) * 0.005, NARROWEST);
  return [low - air, high + air];
}
