import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { airFromVacuum, vacuumFromAir } from '../../src/units/index.ts';

const pairs = readFileSync(new URL('./airVacuum.csv', import.meta.url), 'utf8')
  .split('\n')
  .filter((line) => line !== '' && !line.startsWith('#'))
  .slice(1)
  .map((line) => {
    const [name, vacuum, air, tolerance] = line.split(',');
    return { name, vacuum: Number(vacuum), air: Number(air), tolerance: Number(tolerance) };
  });

it('printed vacuum and air wavelengths are turned into each other both ways', () => {
  expect(pairs.length).toBe(8);
  for (const { vacuum, air, tolerance } of pairs) {
    expect(Math.abs(airFromVacuum(vacuum) - air)).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(vacuumFromAir(air) - vacuum)).toBeLessThanOrEqual(tolerance);
  }
});
