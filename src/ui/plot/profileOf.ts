import type { FeatureView } from '../../engine/index.ts';
import type { Profile } from './profileCurve.ts';

/** The fitted profile of a feature, wavelengths in Angstrom. */
export const profileOf = ({ measured }: FeatureView): Profile => ({ centre: measured.centroid, fwhm: measured.fwhm, flux: measured.flux });
