// Quantities with their units: physical constants with edition and source, air and vacuum wavelengths, the velocity scale.
// Deliberately not here: unit strings of files (the readers' work). Standards: CODATA 2018, Ciddor 1996.
export { AIR_LIMIT, airFromVacuum, vacuumFromAir } from './air.ts';
export type { AirAngstrom, VacuumAngstrom } from './brands.ts';
export { FWHM_PER_SIGMA, HC_OVER_K_CM, PLANCK_ERG_S, SPEED_OF_LIGHT_KMS } from './constants.ts';
export { kmsFromWidth, redshiftFromVelocity, velocityFromRedshift } from './velocity.ts';
