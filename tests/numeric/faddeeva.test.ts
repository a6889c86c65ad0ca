import { expect, test } from 'vitest';
import { faddeeva } from '../../src/numeric/index.ts';

// x, y, Re w, Im w from scipy.special.wofz (scipy 1.10.1).
const VALUES = [
  [0, 0, 1, 0],
  [1, 0.1, 0.37317014831126744, 0.5385548078594318],
  [2, 1, 0.14023958136627798, 0.22221344017989925],
  [5, 0.01, 0.0002408033919511768, 0.11524544620269582],
  [0.3, 3, 0.1775814038183155, 0.016191516423492164],
  [20, 0.001, 1.4157965831846981e-6, 0.02824487402099906],
  [-1.5, 0.2, 0.15652058418879553, -0.42107594736198084],
] as const;

test.each(VALUES)('w(%f + %f i) agrees with scipy to 1e-11', (x, y, re, im) => {
  const [foundRe, foundIm] = faddeeva(x, y);
  expect(Math.abs(foundRe - re)).toBeLessThan(1e-11);
  expect(Math.abs(foundIm - im)).toBeLessThan(1e-11);
});
