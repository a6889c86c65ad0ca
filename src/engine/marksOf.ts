import type { Mark } from '../identify/index.ts';
import type { Feature } from '../measure/index.ts';
import { type Medium, toVacuum } from '../spectrum/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';

/** A centroid without an error (its fit failed) is given this share of its width: common practice, no source. */
const UNKNOWN_CENTROID_ERR_PER_FWHM = 0.25;
/** And where no width is known either (lists without errors), this much, km/s: what low-resolution lists are good for; common practice, no source. */
export const UNKNOWN_CENTROID_ERR_KMS = 40;

/** Measured features -> what naming needs: vacuum wavelengths, every error a positive number. One mark a feature, same order. */
export function marksOf(features: readonly Feature[], medium: Medium): Mark[] {
  return features.map((feature) => {
    const perAngstrom = toVacuum(feature.centroid, medium) / feature.centroid;
    const known = Number.isFinite(feature.centroidErr) && feature.centroidErr > 0;
    return {
      wavelength: feature.centroid * perAngstrom,
      wavelengthErr: (known ? feature.centroidErr : unknownErr(feature)) * perAngstrom,
      flux: feature.flux,
      fluxErr: feature.fluxErr,
      ...(Number.isFinite(feature.fwhm) ? { fwhm: feature.fwhm * perAngstrom } : {}),
      artefact: feature.artefact !== undefined,
    };
  });
}

const unknownErr = ({ fwhm, centroid }: Feature) =>
  Number.isFinite(fwhm) && fwhm > 0 ? UNKNOWN_CENTROID_ERR_PER_FWHM * fwhm : (UNKNOWN_CENTROID_ERR_KMS / SPEED_OF_LIGHT_KMS) * centroid;
