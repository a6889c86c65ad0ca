/**
 * Physical constants, CODATA 2018 (Tiesinga et al. 2021, Rev. Mod. Phys. 93, 025010). c and h are exact by definition of the SI (2019).
 */
export const SPEED_OF_LIGHT_KMS = 299_792.458;
/** erg s */
export const PLANCK_ERG_S = 6.626_070_15e-27;
/** h c / k, cm K: exp(-HC_OVER_K_CM * energyCm1 / te) is the Boltzmann factor. */
export const HC_OVER_K_CM = 1.438_776_877;
/** FWHM of a Gaussian over its standard deviation: sqrt(8 ln 2), exact. */
export const FWHM_PER_SIGMA = Math.sqrt(8 * Math.LN2);
