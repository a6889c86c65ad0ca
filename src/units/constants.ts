/**
 * Physical constants, CODATA 2018 (Tiesinga et al. 2021, Rev. Mod. Phys. 93, 025010). c, h, k and e are exact by definition of the SI (2019).
 */
export const SPEED_OF_LIGHT_KMS = 299_792.458;
/** erg s */
export const PLANCK_ERG_S = 6.626_070_15e-27;
/** erg / K */
export const BOLTZMANN_ERG_K = 1.380_649e-16;
/** h c / k, cm K: exp(-HC_OVER_K_CM * energyCm1 / te) is the Boltzmann factor. */
export const HC_OVER_K_CM = 1.438_776_877;
/** cm^-1 in one electron volt. */
export const CM1_PER_EV = 8_065.543_937;
/** cm^-1, infinite nuclear mass. */
export const RYDBERG_CM1 = 109_737.315_681_6;
/** FWHM of a Gaussian over its standard deviation: sqrt(8 ln 2), exact. */
export const FWHM_PER_SIGMA = Math.sqrt(8 * Math.LN2);
