import { describe, expect, it } from 'vitest';
import { continuumAt, fitCurve } from '../../src/ui/plot/fitCurve.ts';

const continuum = { x: [4990, 5000, 5010, 5020], y: [2, 2, 4, 4] };

describe('the fit between the samples', () => {
  it('is the continuum where there is no line', () => {
    expect(continuumAt(continuum, 5005)).toBe(3);
    expect(continuumAt(continuum, 4980)).toBeNaN();
    expect(fitCurve([], continuum, 4990, 5020, 3).y).toEqual([2, 2, 4, 4]);
  });

  it('holds the flux of every line: the area over the continuum is what was measured', () => {
    const lines = [
      { centre: 5003, fwhm: 1.5, flux: 12 },
      { centre: 5004.2, fwhm: 1.5, flux: 5 },
    ];
    const step = 30 / 3000;
    const bare = fitCurve([], continuum, 4990, 5020, 3000);
    const fit = fitCurve(lines, continuum, 4990, 5020, 3000);
    const area = fit.y.reduce((sum, y, k) => sum + (y - bare.y[k]) * step, 0);
    expect(area).toBeCloseTo(17, 3);
  });

  it('is highest at the centroid', () => {
    const { x, y } = fitCurve([{ centre: 4995, fwhm: 1, flux: 3 }], continuum, 4990, 5000, 1000);
    expect(x[y.indexOf(Math.max(...y))]).toBeCloseTo(4995, 2);
  });
});
