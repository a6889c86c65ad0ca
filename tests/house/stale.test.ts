import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { referencesJson } from '../../src/atomic/build/bibliography.ts';
import { buildBundle } from '../../src/atomic/build/buildBundle.ts';
import { readTables } from '../../src/atomic/build/readTables.ts';
import { SAMPLE_RECIPES } from '../../src/atomic/build/sampleRecipes.ts';
import { sampleSpectrum } from '../../src/atomic/build/sampleSpectrum.ts';
import { loadAtomicData } from '../../src/atomic/index.ts';

it('public/atomic.bin is what the tables of src/atomic give today', () => {
  const built = Buffer.from(buildBundle(readTables()));
  const kept = readFileSync(new URL('../../public/atomic.bin', import.meta.url));
  expect(built.equals(kept), 'public/atomic.bin is stale: run `npm run data` and commit the result').toBe(true);
});

it('the sample spectra are what their script gives today', () => {
  const data = loadAtomicData(buildBundle(readTables()));
  for (const recipe of SAMPLE_RECIPES) {
    const kept = readFileSync(new URL(`../../public/samples/${recipe.file}`, import.meta.url), 'utf8');
    expect(
      kept === sampleSpectrum(data, recipe),
      `public/samples/${recipe.file} is stale: run \`npm run data\` and commit the result`,
    ).toBe(true);
  }
});

it('public/references.json is what sources.bib gives today', () => {
  const kept = readFileSync(new URL('../../public/references.json', import.meta.url), 'utf8');
  expect(
    kept === referencesJson(readTables().files.get('sources.bib') ?? ''),
    'public/references.json is stale: run `npm run data` and commit the result',
  ).toBe(true);
});
