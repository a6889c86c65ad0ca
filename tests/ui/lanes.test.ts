import { expect, it } from 'vitest';
import { LANES, laneOf } from '../../src/ui/plot/lanes.ts';

it('ions stand in the lane of the energy that makes them', () => {
  const lane = (ev: number) => LANES[laneOf(ev)].label;
  expect([0, 13.6, 14.53, 24.59, 27.63, 35.12, 40.96, 54.42, 63.45].map(lane)).toEqual([
    '0–14',
    '0–14',
    '14–25',
    '14–25',
    '25–35',
    '35–54',
    '35–54',
    '> 54',
    '> 54',
  ]);
});

it('an unknown energy is put at the bottom, not lost', () => {
  expect(laneOf(undefined)).toBe(0);
  expect(laneOf(Number.NaN)).toBe(0);
});
