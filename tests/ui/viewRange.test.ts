import { describe, expect, it } from 'vitest';
import { inside, panned, showing, zoomed } from '../../src/ui/plot/viewRange.ts';

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

  it('moves to a feature only when that is out of sight', () => {
    expect(showing([4000, 5000], 4500, whole)).toEqual([4000, 5000]);
    expect(showing([4000, 5000], 6000, whole)).toEqual([5500, 6500]);
  });
});
