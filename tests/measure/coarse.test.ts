import { expect, test } from 'vitest';
import { DEFAULT_MEASURE_SETTINGS, measure } from '../../src/measure/index.ts';
import { sky } from './sky.ts';

const LINES = '4930 60; 4947 80; 4970 60; 5000 100; 5000.9 60; 5030 70; 5060 90';

test('lines sampled forty times a FWHM are fitted in bins: places, fluxes, widths and errors stay true', () => {
  const pulls: number[] = [];
  for (let seed = 1; seed <= 12; seed++) {
    const { spectrum, lines, fwhmAt } = sky(`R 8000; ${LINES}; step 0.015; noise 4; seed ${seed}`);
    const { features, groups } = measure(spectrum, DEFAULT_MEASURE_SETTINGS);
    for (const { first, last } of groups) expect(first >= 0 && last < spectrum.flux.length && first < last).toBe(true);
    for (const { centre, flux } of lines) {
      const found = features.find((f) => !f.artefact && Math.abs(f.centroid - centre) < 0.3);
      if (!found) throw new Error(`the line at ${centre} was lost`);
      pulls.push((found.centroid - centre) / found.centroidErr, (found.flux - flux) / found.fluxErr);
      expect(found.fwhm / fwhmAt(centre)).toBeCloseTo(1, 1);
    }
  }
  pulls.sort((a, b) => Math.abs(a) - Math.abs(b));
  const width = Math.abs(pulls[Math.floor(0.683 * pulls.length)]);
  expect(width).toBeGreaterThan(0.8);
  expect(width).toBeLessThan(1.2);
});

test('a spike on an oversampled spectrum is one sample, and no line', () => {
  const { spectrum } = sky(`R 8000; ${LINES}; step 0.015; noise 1; spike 4985`);
  const { features } = measure(spectrum, DEFAULT_MEASURE_SETTINGS);
  const near = features.filter((f) => Math.abs(f.centroid - 4985) < 1);
  expect(near.every((f) => f.artefact !== undefined)).toBe(true);
});
