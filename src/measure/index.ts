// Spectrum -> features: continuum, noise, line-spread function, detection by matched filter, joint fits of overlapping profiles, what is done by hand, limits.
// Deliberately not here: names. Methods: Eilers 2003 (smoothing), Stoehr et al. 2008 (noise), Marquardt 1963 (fits), Schwarz 1978 (number of components).
export type { TieEdit } from './applyEdits.ts';
export {
  DEFAULT_MEASURE_SETTINGS,
  type Feature,
  type FeatureEdit,
  type FitEnd,
  type Group,
  type Measurement,
  type MeasureSettings,
  type ProfileShape,
  type WidthLaw,
} from './feature.ts';
export type { FittedSpectrum } from './fittedSpectrum.ts';
export { type FluxLimit, fluxLimit } from './fluxLimit.ts';
export { fitSpectrum, measure } from './measure.ts';
export { measurementOf } from './measurementOf.ts';
export { type FeatureShape, shapesOfFeature } from './shapesOfFeature.ts';
