import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { airFromVacuum, vacuumFromAir } from '../../src/units/index.ts';

test('air to vacuum and back is the same wavelength to 1e-8 A', () => {
  fc.assert(
    fc.property(fc.double({ min: 2001, max: 300_000, noNaN: true }), (air) => {
      expect(Math.abs(airFromVacuum(vacuumFromAir(air)) - air)).toBeLessThan(1e-8 * Math.max(1, air / 1e4));
    }),
    { seed: 7 },
  );
});

test('below 2000 A wavelengths are left in vacuum', () => {
  expect(airFromVacuum(1548.2)).toBe(1548.2);
  expect(vacuumFromAir(1548.2)).toBe(1548.2);
});
