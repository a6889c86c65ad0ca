import { describe, expect, it } from 'vitest';
import { commonExponent, fluxScale, fluxTicks, SCALE_KINDS, tickText } from '../../src/ui/plot/fluxScale.ts';

describe('the flux axis', () => {
  it('comes back to the same flux on every scale', () => {
    for (const kind of SCALE_KINDS) {
      const scale = fluxScale(kind, 1e-17);
      for (const flux of [2e-17, 1e-15, 3.3e-12]) expect(scale.back(scale.forward(flux)) / flux).toBeCloseTo(1, 10);
    }
  });

  it('cuts a logarithm at the noise and lets gaps be gaps', () => {
    const { forward } = fluxScale('log', 0.01);
    expect(forward(-5)).toBe(-2);
    expect(forward(Number.NaN)).toBeNaN();
  });

  it('ticks are inside the axis, ascending, and far enough apart to be read', () => {
    for (const kind of SCALE_KINDS) {
      const scale = fluxScale(kind, 0.02);
      const ticks = fluxTicks(scale, kind === 'log' ? 0.02 : -0.1, 950, 6);
      expect(ticks.length).toBeGreaterThanOrEqual(3);
      expect(ticks.length).toBeLessThanOrEqual(12);
      for (let k = 1; k < ticks.length; k++) expect(ticks[k]).toBeGreaterThan(ticks[k - 1]);
      expect(ticks[0]).toBeGreaterThanOrEqual(-0.1);
      expect(ticks[ticks.length - 1]).toBeLessThanOrEqual(950);
    }
  });

  it('a power of ten is taken out of fluxes in physical units', () => {
    expect(commonExponent(3.2e-14)).toBe(-14);
    expect(commonExponent(320)).toBe(0);
    expect(tickText(2.5e-14, -14)).toBe('2.5');
    expect(tickText(-0.30000000000000004, 0)).toBe('−0.3');
  });
});
