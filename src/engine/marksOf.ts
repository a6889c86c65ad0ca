import type { Mark } from '../identify/index.ts';
import type { Feature } from '../measure/index.ts';
import { type Medium, toVacuum } from '../spectrum/index.ts';

/** A centroid without an error (its fit failed) is given this share of its width: common practice, no source. */
const UNKNOWN_CENTROID_ERR_PER_FWHM = 0.25;

/** Measured features -> what naming needs: vacuum wavelengths, every error a positive number. One mark a feature, same order. */
export function marksOf(features: readonly Feature[], medium: Medium): Mark[] {
  return features.map((feature) => {
    const perAngstrom = toVacuum(feature.centroid, medium) / feature.centroid;
    const known = Number.isFinite(feature.centroidErr) && feature.centroidErr > 0;
    return {
      wavelength: feature.centroid * perAngstrom,
      wavelengthErr: (known ? feature.centroidErr : UNKNOWN_CENTROID_ERR_PER_FWHM * feature.fwhm) * perAngstrom,
      flux: feature.flux,
      fluxErr: feature.fluxErr,
      ...(Number.isFinite(feature.fwhm) ? { fwhm: feature.fwhm * perAngstrom } : {}),
      artefact: feature.artefact !== undefined,
    };
  });
}
