// Lines and atoms: the bundled line list (Ritz wavelengths, strengths, sources), n-level atoms and what follows from them.
// The tables stand in ./tables, ./build compiles them into public/atomic.bin (`npm run data`).
// Not here: spectra, features, what a line is taken for. Strengths are those of a reference nebula that holds every
// ionization zone (Te 10^4 K): they rank lines within an ion, across ions only to 0.5 dex.
export type { AtomicData, SkyBand } from './atomicData.ts';
export type { StrengthBasis } from './bundleFormat.ts';
export { type CaseBTable, caseBIntensity } from './caseB.ts';
export type { Level, LevelModel } from './levelModel.ts';
export { UPSILON_TE } from './levelModel.ts';
export type { Ion, LineList, Mechanism, Nature } from './lineList.ts';
export { linesBetween } from './linesBetween.ts';
export { loadAtomicData } from './loadAtomicData.ts';
export { collisionRates, isInsideRange, upsilonAt } from './physics/collisionRates.ts';
export { type Companion, type CompanionFinder, companionFinder, type RatioBasis } from './physics/companionFinder.ts';
export { criticalDensity, radiativeLifetime } from './physics/criticalDensity.ts';
export { branchingRatio, decayRate, emissivityPerIon, lineRatio } from './physics/emissivity.ts';
export { duration, powerOfTen } from './physics/figuresInWords.ts';
export { isMetastable } from './physics/isMetastable.ts';
export { levelPopulations, populationsFromRates } from './physics/levelPopulations.ts';
export { densityOfSurvival, survival } from './physics/survival.ts';
export { type ThinGasFacts, thinGasFacts } from './physics/thinGasFacts.ts';
export { readUserLines } from './user/readUserLines.ts';
export type { UserLine, UserLinesReading } from './user/userLine.ts';
export { withUserLines } from './user/withUserLines.ts';
