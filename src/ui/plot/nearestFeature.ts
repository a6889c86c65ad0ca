/** What a pointer can hit. */
export interface Target {
  /** Angstrom, ascending in a list of targets. */
  readonly centroid: number;
  /** Angstrom; NaN when unknown. */
  readonly fwhm: number;
}

/**
 * The feature meant by a click at `at`: the nearest within `reach`, or within its own FWHM when that is wider.
 *
 * @param reach Angstrom: what a few pixels are at this zoom
 * @returns position in `targets`, undefined when the click was at none
 */
export function nearestFeature(targets: readonly Target[], at: number, reach: number): number | undefined {
  let best: number | undefined;
  let bestDistance = Number.POSITIVE_INFINITY;
  targets.forEach((target, k) => {
    const distance = Math.abs(target.centroid - at);
    const allowed = Math.max(reach, Number.isFinite(target.fwhm) ? target.fwhm : 0);
    if (distance <= allowed && distance < bestDistance) {
      best = k;
      bestDistance = distance;
    }
  });
  return best;
}
