import { expect, it } from 'vitest';
import { plotSamplesOf } from '../../src/ui/plot/plotSamples.ts';

const samples = (masked: readonly number[]) => ({
  wavelength: Float64Array.from(masked, (_, i) => 5000 + i),
  flux: Float64Array.from(masked, () => 2),
  masked: Uint8Array.from(masked),
  continuum: Float64Array.from(masked, () => 1),
  model: Float64Array.from(masked, () => 1),
  noise: Float64Array.from(masked, () => 0.5),
});

it('masked samples are gaps in the curve and stretches of their own width below it', () => {
  const { flux, masked, residual } = plotSamplesOf(samples([0, 1, 1, 0, 0, 1, 0]));
  expect([...flux].map(Number.isNaN)).toEqual([false, true, true, false, false, true, false]);
  expect([...masked]).toEqual([5000.5, 5002.5, 5004.5, 5005.5]);
  expect(residual[0]).toBe(2);
});

it('a spectrum masked at both ends is shaded to its last samples', () => {
  const { masked } = plotSamplesOf(samples([1, 0, 0, 1]));
  expect([...masked]).toEqual([5000, 5000.5, 5002.5, 5003]);
});

it('the typical noise is a positive median', () => {
  expect(plotSamplesOf(samples([0, 0, 0])).typicalNoise).toBe(0.5);
});
