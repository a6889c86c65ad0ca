import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { buildBundle } from '../../src/atomic/build/buildBundle.ts';
import { lanternNebula } from '../../src/atomic/build/lanternNebula.ts';
import { readTables } from '../../src/atomic/build/readTables.ts';
import { loadAtomicData } from '../../src/atomic/index.ts';

it('public/atomic.bin is what the tables of src/atomic give today', () => {
  const built = Buffer.from(buildBundle(readTables()));
  const kept = readFileSync(new URL('../../public/atomic.bin', import.meta.url));
  expect(built.equals(kept), 'public/atomic.bin is stale: run `npm run data` and commit the result').toBe(true);
});

it('the sample spectrum is what its script gives today', () => {
  const kept = readFileSync(new URL('../../public/samples/lantern-nebula.csv', import.meta.url), 'utf8');
  expect(
    kept === lanternNebula(loadAtomicData(buildBundle(readTables()))),
    'public/samples is stale: run `npm run data` and commit the result',
  ).toBe(true);
});
