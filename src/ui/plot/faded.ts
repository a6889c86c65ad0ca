import type { DeskRow } from '../desk/deskRows.ts';
import type { Points } from './decimate.ts';
import { continuumAt } from './fitCurve.ts';
import { profileAt } from './profileCurve.ts';
import { profileOf } from './profileOf.ts';
import { sampleAt } from './sampleAt.ts';

/** Profiles are counted this many FWHM away from their centre. */
const WINGS_FWHM = 4;

/**
 * The fit with some of its lines changed in strength: what stands above the continuum is shared out among the lines there by their profiles, so that nothing ever falls
 * below the continuum.
 *
 * @param model the fit, ascending x
 * @param left  factor of a feature's flux, by its number; 1 for those it does not name
 */
export function faded(model: Points, continuum: Points, rows: readonly DeskRow[], left: ReadonlyMap<number, number>): Points {
  const all = new Float64Array(model.x.length);
  const kept = new Float64Array(model.x.length);
  for (const { feature } of rows) {
    const factor = left.get(feature.number) ?? 1;
    const profile = profileOf(feature);
    const reach = WINGS_FWHM * profile.fwhm;
    for (let k = sampleAt(model.x, profile.centre - reach); k < model.x.length && model.x[k] <= profile.centre + reach; k++) {
      const height = profileAt(profile, model.x[k]);
      all[k] += height;
      kept[k] += factor * height;
    }
  }
  const y = model.y.map((value, k) => {
    const ground = continuumAt(continuum, model.x[k]);
    return all[k] > 0 ? ground + ((value - ground) * kept[k]) / all[k] : value;
  });
  return { x: model.x, y };
}
