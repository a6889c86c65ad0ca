import { describe, expect, it } from 'vitest';
import { labelsThatFit, type Wish } from '../../src/ui/plot/labelsThatFit.ts';

const width = (text: string) => text.length * 6;
const wish = (x: number, importance: number, lane = 0): Wish => ({ x, lane, importance, text: '[O III] 5007' });

describe('labels of the marks', () => {
  it('draws the more important of two that would touch', () => {
    expect([...labelsThatFit([wish(100, 1), wish(120, 9)], width, 40)]).toEqual([1]);
  });

  it('draws both when they stand in different lanes or far enough apart', () => {
    expect(labelsThatFit([wish(100, 1, 0), wish(100, 9, 1), wish(300, 2, 0)], width, 40).size).toBe(3);
  });

  it('draws no more than it may, and never two that overlap, however crowded', () => {
    const crowd = Array.from({ length: 800 }, (_, k) => wish(k * 3, (k * 7919) % 811, k % 6));
    const drawn = [...labelsThatFit(crowd, width, 40)].map((k) => crowd[k]);
    expect(drawn.length).toBe(40);
    for (const a of drawn)
      for (const b of drawn) if (a !== b && a.lane === b.lane) expect(Math.abs(a.x - b.x)).toBeGreaterThanOrEqual(width(a.text));
  });
});
