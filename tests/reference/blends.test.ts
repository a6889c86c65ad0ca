import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { fitGroup } from '../../src/measure/fitGroup.ts';
import { constantResolvingPower, widthPrior } from '../../src/measure/lineSpread.ts';

// Values of scipy.optimize.curve_fit for blends made by tests/reference/blends/makeBlends.py; made with numpy 1.24 and scipy 1.10 or later.
interface Blend {
  readonly name: string;
  readonly x: readonly number[];
  readonly y: readonly number[];
  readonly noise: number;
  readonly start: readonly number[];
  readonly parameters: readonly number[];
  readonly errors: readonly number[];
  readonly chi2: number;
}
const blends = JSON.parse(readFileSync(new URL('blends/blends.json', import.meta.url), 'utf8')) as Blend[];

/** So wide a prior that it says nothing; the local continuum's own prior of two noise sigma stays, and is the reason for the tolerance. */
const free = widthPrior(constantResolvingPower(5000, 5000), 1e6);
/** Values agree to this share of their own error. */
const SHARE_OF_ERR = 0.02;

describe('blends against scipy', () => {
  test.each(blends.map((blend) => [blend.name, blend] as const))('%s: values and errors agree', (_, blend) => {
    const lines = (blend.parameters.length - 2) / 3;
    const x = Float64Array.from(blend.x);
    const samples = {
      x,
      y: Float64Array.from(blend.y),
      noise: new Float64Array(x.length).fill(blend.noise),
      usable: new Uint8Array(x.length).fill(1),
      // no width: the profile is taken at the middle of the sample, as the script does
      sampleWidth: new Float64Array(x.length).fill(1e-6),
    };
    const starts = Array.from({ length: lines }, (_v, k) => ({
      flux: blend.start[3 * k],
      centre: blend.start[3 * k + 1],
      sigma: blend.start[3 * k + 2],
    }));
    const fit = fitGroup(samples, 0, x.length - 1, starts, free);
    if (fit.end.ended !== 'converged') throw new Error(`ended ${fit.end.ended}`);
    const { covariance } = fit.end;
    const size = fit.parameters.length;
    const err = (i: number) => Math.sqrt(covariance[i * size + i]);
    for (let k = 0; k < lines; k++) {
      const [flux, centre, sigma] = blend.parameters.slice(3 * k, 3 * k + 3);
      const errors = blend.errors.slice(3 * k, 3 * k + 3);
      expect(Math.abs(fit.components[k].flux - flux)).toBeLessThan(SHARE_OF_ERR * errors[0]);
      expect(Math.abs(fit.components[k].centre - centre)).toBeLessThan(SHARE_OF_ERR * errors[1]);
      expect(Math.abs(fit.components[k].sigma - sigma)).toBeLessThan(SHARE_OF_ERR * errors[2]);
      expect(err(3 * k) / errors[0]).toBeCloseTo(1, 2);
      expect(err(3 * k + 1) / errors[1]).toBeCloseTo(1, 2);
      expect((err(3 * k + 2) * fit.components[k].sigma) / errors[2]).toBeCloseTo(1, 2);
    }
    expect(fit.chi2 / blend.chi2).toBeCloseTo(1, 3);
  });
});
