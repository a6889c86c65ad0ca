import type { Place } from '../problems/index.ts';
import { count, type Notes, note, warn } from './notes.ts';

/** An uncertainty as the file gives it. */
export interface ErrorValues {
  readonly values: Float64Array;
  readonly meaning: 'sigma' | 'variance' | 'ivar' | 'relative';
  /** "column FLUX_ERROR", "band 4". */
  readonly label: string;
}

/**
 * One sigma in the unit of the flux; NaN where the file gives none (zero, negative or missing: the sample is then masked).
 * Undefined, with a warning, when hardly any value can serve.
 */
export function sigmaOf({ values, meaning, label }: ErrorValues, flux: Float64Array, notes: Notes, place: Place): Float64Array | undefined {
  const n = flux.length;
  const sigma = new Float64Array(n);
  let useful = 0;
  let negative = 0;
  let zero = 0;
  let known = 0;
  for (let i = 0; i < n; i++) {
    const e = values[i];
    if (Number.isFinite(flux[i])) known++;
    if (e < 0) negative++;
    else if (e === 0) zero++;
    let s = Number.NaN;
    if (e > 0 && e < 1e30)
      s = meaning === 'sigma' ? e : meaning === 'variance' ? Math.sqrt(e) : meaning === 'ivar' ? 1 / Math.sqrt(e) : e * Math.abs(flux[i]);
    // an inverse variance may be as large as 1e36 where fluxes are in cgs
    else if (e >= 1e30 && meaning === 'ivar' && e < Number.POSITIVE_INFINITY) s = 1 / Math.sqrt(e);
    if (s > 0 && s < Number.POSITIVE_INFINITY) useful++;
    else s = Number.NaN;
    sigma[i] = s;
  }
  if (useful < 2 || useful < 0.02 * known) {
    warn(notes, 'errors-unusable', `${label} has no positive values to take as uncertainties: it is left aside`, {
      where: place,
      doThis: 'Choose another column for the uncertainties if there is one.',
    });
    return undefined;
  }
  const what = meaning === 'ivar' ? 'inverse variances' : meaning === 'variance' ? 'variances' : 'uncertainties';
  if (negative)
    warn(
      notes,
      'negative-errors',
      `${count(negative, 'sample')} of ${label} ${negative === 1 ? 'is' : 'are'} negative, which ${what} cannot be: masked`,
      { where: place },
    );
  if (zero)
    note(notes, 'zero-errors', `${count(zero, 'sample')} of ${label} ${zero === 1 ? 'is' : 'are'} 0, which means "do not use": masked`, {
      where: place,
    });
  return sigma;
}
