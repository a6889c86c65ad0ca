// What named lines say of the gas: reddening, electron temperature and density by zone, ionic abundances, density ladder, kinematics.
// Takes names as given and measures nothing; works in the rest frame. Not here: which names are in force (the engine), drawing (the screen).
// Osterbrock & Ferland 2006, chapters 3-5; extinction laws, case B and jumps as cited where they are used.
export type { Band } from './bands.ts';
export type { DensityLadder, Rung } from './densityLadder.ts';
export { describeGas, type GasContext } from './describeGas.ts';
export type { Estimate } from './estimate.ts';
export { type ExtinctionCurve, extinctionRatio } from './extinction.ts';
export type { AbundanceResult, DiagnosticResult, Gas, Reddening, ReddeningLine, WithErr, ZoneQuantity, ZoneResult } from './gas.ts';
export { DEFAULT_GAS_SETTINGS, type GasSettings } from './gasSettings.ts';
export { hBetaEmissivity } from './hBetaEmissivity.ts';
export type { Continuum } from './jumps.ts';
export type { IonMean, KinematicPoint, Kinematics, Trend } from './kinematics.ts';
export type { NamedLine } from './namedLine.ts';
export type { Zone } from './zones.ts';
