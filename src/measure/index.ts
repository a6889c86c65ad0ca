// Spectrum -> features: continuum, noise, line-spread function, detection by matched filter, joint fits of overlapping profiles.
// Deliberately not here: names. Methods: Eilers 2003 (smoothing), Stoehr et al. 2008 (noise), Marquardt 1963 (fits), Schwarz 1978 (number of components).
export { DEFAULT_MEASURE_SETTINGS, type Feature, type FitEnd, type Group, type Measurement, type MeasureSettings } from './feature.ts';
export { measure } from './measure.ts';
