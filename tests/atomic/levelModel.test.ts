import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { UPSILON_TE } from '../../src/atomic/index.ts';
import { bundled } from './bundledData.ts';

const models = bundled.modelIons.map((ion) => {
  const model = bundled.levelModel(ion);
  if (model === undefined) throw new Error(`${ion} has no n-level atom`);
  return model;
});

it('156 ions have an n-level atom, made once', () => {
  expect(models.length).toBe(156);
  expect(bundled.levelModel('O III')).toBe(bundled.levelModel('O III'));
  expect(bundled.levelModel('H2')).toBeUndefined();
});

it('levels ascend from a ground level of zero energy', () => {
  for (const { levels } of models) {
    expect(levels[0].energyCm1).toBe(0);
    for (let k = 1; k < levels.length; k++) expect(levels[k].energyCm1).toBeGreaterThanOrEqual(levels[k - 1].energyCm1);
  }
});

/** Largest J of a term: L + S. */
function largestJ(term: string): number {
  const m = /(\d+)([A-Z])/.exec(term);
  if (!m) throw new Error(`no LS term: ${term}`);
  return 'SPDFGHIKLMN'.indexOf(m[2]) + (Number(m[1]) - 1) / 2;
}

it('J is one that the term allows', () => {
  const wrong: string[] = [];
  for (const { ion, levels } of models) {
    for (const { term, j, configuration } of levels) {
      const s = (Number(/(\d+)[A-Z]/.exec(term)?.[1]) - 1) / 2;
      const l = largestJ(term) - s;
      const allowed = j >= Math.abs(l - s) && j <= l + s && Number.isInteger(j - (l + s));
      if (!allowed) wrong.push(`${ion} ${configuration} ${term} ${j}`);
    }
  }
  expect(wrong).toEqual([]);
});

it('decays go down, rates are positive, a pair stands once', () => {
  for (const { ion, radiative, collisions, levels } of models) {
    for (const { lower, upper } of [radiative, collisions]) {
      const pairs = new Set<string>();
      for (let k = 0; k < lower.length; k++) {
        if (!(lower[k] < upper[k] && upper[k] < levels.length)) throw new Error(`${ion}: pair ${lower[k]}-${upper[k]}`);
        pairs.add(`${lower[k]}-${upper[k]}`);
      }
      expect(pairs.size, ion).toBe(lower.length);
    }
    expect(
      radiative.a.every((a) => a > 0),
      ion,
    ).toBe(true);
    expect(collisions.upsilon.length).toBe(collisions.lower.length * UPSILON_TE.length);
    expect(
      collisions.upsilon.every((u) => Number.isNaN(u) || u > 0),
      ion,
    ).toBe(true);
  }
});

it('rates survive the packing: collision strengths to 0.03 %, A values to single precision', () => {
  const file = (name: string): string[][] =>
    readFileSync(new URL(`../../src/atomic/tables/${name}`, import.meta.url), 'utf8')
      .split('\n')
      .slice(1, -1)
      .map((line) => line.split(','));
  const places = new Map<string, number>();
  const next = (kind: string, ion: string): number => {
    const place = places.get(`${kind} ${ion}`) ?? 0;
    places.set(`${kind} ${ion}`, place + 1);
    return place;
  };
  let worst = 0;
  for (const row of file('model-upsilon.csv')) {
    const upsilon = bundled.levelModel(row[0])!.collisions.upsilon;
    const pair = next('upsilon', row[0]);
    row.slice(3, 12).forEach((text, t) => {
      const kept = upsilon[pair * UPSILON_TE.length + t];
      if (text === '') expect(kept).toBeNaN();
      else worst = Math.max(worst, Math.abs(kept / Number(text) - 1));
    });
  }
  expect(worst).toBeLessThan(3e-4);
  for (const row of file('model-a.csv')) {
    const a = bundled.levelModel(row[0])!.radiative.a[next('a', row[0])];
    expect(Math.abs(a / Number(row[3]) - 1)).toBeLessThan(1e-6);
  }
});

it('every quantity names its compilation', () => {
  const silent = models.filter(
    ({ sources, radiative, collisions }) =>
      sources.energies.length === 0 ||
      (radiative.a.length > 0 && sources.radiative.length === 0) ||
      (collisions.lower.length > 0 && sources.collisions.length === 0),
  );
  expect(silent.map((m) => m.ion)).toEqual([]);
});
