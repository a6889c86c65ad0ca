// The shape of a problem or remark about the user's material, and its wording. Not here: a caller's mistakes (RangeError, TypeError).
export { nearestWord } from './nearestWord.ts';
export type { Place, Problem, Remark } from './problem.ts';
export { ProblemError, wordPlace, wordProblem } from './problem.ts';
