import { describe, expect, it } from 'vitest';
import { inside, panned, pinched, showing, zoomed } from '../../src/ui/plot/viewRange.ts';

const whole = [3500, 7500] as const;

describe('the view', () => {
  it('zooms about the pointer: what is under it stays there', () => {
    const [low, high] = zoomed([4000, 5000], 4250, 0.5, whole);
    expect((4250 - low) / (high - low)).toBeCloseTo(0.25, 12);
    expect(high - low).toBeCloseTo(500, 9);
  });

  it('never leaves the spectrum and never becomes wider than it', () => {
    expect(inside([3000, 4000], whole)).toEqual([3500, 4500]);
    expect(inside([7000, 8000], whole)).toEqual([6500, 7500]);
    expect(zoomed([4000, 5000], 4500, 100, whole)).toEqual([3500, 7500]);
    expect(panned([6000, 7000], 3, whole)).toEqual([6500, 7500]);
  });

  it('is pinched so that what two fingers hold stays under them, even while they wander', () => {
    const held = [4200, 4800] as const;
    const [low, high] = pinched([4000, 5000], [0.2, 0.8], [0.1, 0.9], whole);
    expect(low + 0.1 * (high - low)).toBeCloseTo(held[0], 9);
    expect(low + 0.9 * (high - low)).toBeCloseTo(held[1], 9);
    const moved = pinched([4000, 5000], [0.2, 0.8], [0.4, 1], whole);
    expect(moved[0] + 0.4 * (moved[1] - moved[0])).toBeCloseTo(held[0], 9);
    expect(pinched([4000, 5000], [0.4, 0.6], [0.5, 0.5], whole)[0]).toBeGreaterThanOrEqual(3500);
  });

  it('moves to a feature only when that is out of sight', () => {
    expect(showing([4000, 5000], 4500, whole)).toEqual([4000, 5000]);
    expect(showing([4000, 5000], 6000, whole)).toEqual([5500, 6500]);
  });
});
