// Mathematics that knows no light: robust statistics, seeded random numbers, the normal distribution, solvers.
// Deliberately not here: anything with a physical unit.
export { erfc, normalTail } from './normalDistribution.ts';
export { median, quantile, robustSigma, SIGMA_PER_MAD } from './robust.ts';
export { type SeededRandom, seededRandom } from './seededRandom.ts';
