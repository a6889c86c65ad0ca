import { expect, it } from 'vitest';
import { nearestFeature } from '../../src/ui/plot/nearestFeature.ts';

const targets = [
  { centroid: 4958.9, fwhm: 2 },
  { centroid: 5006.8, fwhm: 2 },
  { centroid: 5015.7, fwhm: Number.NaN },
];

it('a click beside a peak means the peak', () => {
  expect(nearestFeature(targets, 5007.5, 0.1)).toBe(1);
  expect(nearestFeature(targets, 5013, 4)).toBe(2);
});

it('a click on bare continuum means nothing', () => {
  expect(nearestFeature(targets, 4980, 4)).toBeUndefined();
  expect(nearestFeature([], 4980, 4)).toBeUndefined();
});
