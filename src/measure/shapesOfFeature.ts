import { applyEdits } from './applyEdits.ts';
import type { FeatureEdit, ProfileShape } from './feature.ts';
import type { FittedSpectrum } from './fittedSpectrum.ts';
import { type ShapeFit, shapesOf } from './shapes.ts';

/** A feature in one shape, as plain data; `bicOver` is its BIC over that of the best shape: 10 and more is decisive (Kass & Raftery 1995, JASA 90, 773). */
export type FeatureShape = Omit<ShapeFit, 'profile' | 'bic'> & { readonly as: ProfileShape; readonly bicOver: number };

/**
 * The feature nearest to a wavelength measured as a Gaussian, a Voigt profile and a sum of two Gaussians, best first.
 *
 * @returns empty when no feature is within its own width of `at`
 */
export function shapesOfFeature(fitted: FittedSpectrum, edits: readonly FeatureEdit[], at: number): FeatureShape[] {
  const { samples, width } = fitted;
  const { fits } = applyEdits(samples, width, fitted, edits);
  let nearest: { fit: (typeof fits)[number]; line: number; away: number } | undefined;
  for (const fit of fits) {
    fit.components.forEach(({ centre, sigma }, line) => {
      const away = Math.abs(centre - at);
      if (away < 3 * sigma && (!nearest || away < nearest.away)) nearest = { fit, line, away };
    });
  }
  if (!nearest) return [];
  const shapes = shapesOf(samples, nearest.fit, nearest.line, width).sort((a, b) => a.bic - b.bic);
  return shapes.map(({ profile: _, bic, ...shape }) => ({ ...shape, bicOver: bic - shapes[0].bic }));
}
