import { SPEED_OF_LIGHT_KMS } from './constants.ts';

/** Redshift -> velocity in the optical convention, v = c z, km/s. */
export const velocityFromRedshift = (z: number) => SPEED_OF_LIGHT_KMS * z;
/** Velocity in the optical convention (km/s) -> redshift, z = v / c. */
export const redshiftFromVelocity = (velocityKms: number) => velocityKms / SPEED_OF_LIGHT_KMS;
/** Width or offset in wavelength at `wavelength` (same unit) -> km/s. */
export const kmsFromWidth = (width: number, wavelength: number) => (SPEED_OF_LIGHT_KMS * width) / wavelength;
