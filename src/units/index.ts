// Quantities with their units: physical constants with edition and source, air and vacuum wavelengths, the velocity scale.
// Deliberately not here: unit strings of files (the readers' work). Standards: CODATA 2018, Ciddor 1996.
export { AIR_LIMIT, airFromVacuum, refractiveIndexOfAir, vacuumFromAir } from './air.ts';
export type { AirAngstrom, Kelvin, KmPerS, PerCm3, VacuumAngstrom } from './brands.ts';
export { airAngstrom, kelvin, kmPerS, perCm3, vacuumAngstrom } from './brands.ts';
export { BOLTZMANN_ERG_K, CM1_PER_EV, FWHM_PER_SIGMA, HC_OVER_K_CM, PLANCK_ERG_S, RYDBERG_CM1, SPEED_OF_LIGHT_KMS } from './constants.ts';
export { kmsFromWidth, redshiftFromVelocity, velocityFromRedshift } from './velocity.ts';
