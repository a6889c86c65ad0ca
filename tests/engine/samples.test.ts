import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { SAMPLE_RECIPES } from '../../src/atomic/build/sampleRecipes.ts';
import { createEngine } from '../../src/engine/index.ts';
import { bytesSource } from '../../src/readers/index.ts';
import { EMPTY_DOCUMENT } from '../../src/session/index.ts';
import { bundled } from '../atomic/bundledData.ts';

const C_KMS = 299_792.458;
/** What each object must show, medium of its file. */
const SHOWS: Record<string, readonly string[]> = {
  'lantern-nebula.csv': ['[O III] 5006.84', 'He II 4685.71', '[N II] 6583.45'],
  'heron-marsh.csv': ['H I 6562.80', '[N II] 6583.45', '[S II] 6716.44', '[S III] 9530.62'],
  'kiln-nebula.csv': ['[O III] 5006.84', 'He II 4685.71', '[Ar IV] 4740.17', '[Ne III] 3868.76'],
  'ember-veil.csv': ['[S II] 6716.44', '[S II] 6730.82', '[O I] 6300.30', '[N II] 6583.45'],
  'dunlin-galaxy.csv': ['[O III] 5008.24', 'H I 4862.68', 'H I 6564.61', '[N II] 6585.27'],
};

describe.each(SAMPLE_RECIPES.map((recipe) => [recipe.file, recipe] as const))('the sample %s, opened without a word', (file, recipe) => {
  test('shows its redshift, and nine in ten of its features have a name', async () => {
    const engine = createEngine(bundled, () => 0);
    await engine.open(bytesSource(file, new Uint8Array(readFileSync(`public/samples/${file}`))), 'guess');
    const { z, features, reading } = await engine.analyse(EMPTY_DOCUMENT.settings, []);
    expect(reading.medium).toBe(recipe.medium);
    expect(Math.abs(z - recipe.z) * C_KMS).toBeLessThan(8);
    const named = features.filter((feature) => feature.name !== undefined);
    expect(named.length / features.length).toBeGreaterThan(file === 'dunlin-galaxy.csv' ? 0.75 : 0.9);
    const names = new Set(named.map(({ name }) => name?.label));
    for (const name of SHOWS[file]) expect([...names], file).toContain(name);
  });

  test('says in its first line that it is invented', () => {
    expect(readFileSync(`public/samples/${file}`, 'utf8').split('\n')[0]).toMatch(/invented .*made from the line list/);
  });
});
