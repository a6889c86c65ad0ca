import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { vacuumFromAir } from '../../src/units/index.ts';
import { bundled, lineAt } from '../atomic/bundledData.ts';

const printed = readFileSync(new URL('./laboratoryWavelengths.csv', import.meta.url), 'utf8')
  .split('\n')
  .filter((line) => line !== '' && !line.startsWith('#'))
  .slice(1)
  .map((line) => {
    const [ion, medium, wavelength, tolerance] = line.split(',');
    const vacuum = medium === 'air' ? vacuumFromAir(Number(wavelength)) : Number(wavelength);
    return { ion, name: `${ion} ${wavelength}`, vacuum, tolerance: Number(tolerance) };
  });

it('holds more than 60 printed wavelengths', () => {
  expect(printed.length).toBeGreaterThan(250);
});

it('every printed wavelength is met by a line of its ion within its tolerance', () => {
  const missed = printed
    .map(({ ion, name, vacuum, tolerance }) => ({ name, off: bundled.lines.wavelengthVac[lineAt(ion, vacuum)] - vacuum, tolerance }))
    .filter(({ off, tolerance }) => Math.abs(off) > tolerance);
  expect(missed).toEqual([]);
});
