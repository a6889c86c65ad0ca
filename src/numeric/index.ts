// Mathematics that knows no light: robust statistics, seeded random numbers, the normal distribution, solvers.
// Deliberately not here: anything with a physical unit.
export { expOfNegative } from './expOfNegative.ts';
export { faddeeva } from './faddeeva.ts';
export { type LeastSquaresEnd, levenbergMarquardt, type NormalEquations } from './levenbergMarquardt.ts';
export { solveLinear } from './linearSolve.ts';
export { interpolateMonotone } from './monotoneInterpolation.ts';
export { erfc, normalTail } from './normalDistribution.ts';
export { median, quantile, robustSigma } from './robust.ts';
export { type SeededRandom, seededRandom } from './seededRandom.ts';
export { stationaryShares } from './stationaryShares.ts';
export { whittaker, whittakerVariance } from './whittaker.ts';
