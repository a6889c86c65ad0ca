import { expect, it } from 'vitest';
import { criticalDensity, radiativeLifetime } from '../../src/atomic/index.ts';
import { agreement, atomOf, referenceTable } from './referenceTable.ts';

const TE = 10_000;

/** `a 4Fo` -> `4F`: compilations differ in what they print around the term. */
const bare = (term: string) => /\d+[A-Z]/.exec(term)?.[0] ?? term;

/** Index of the level of a row by term, J and energy. */
function levelOf(row: Record<string, string>): number {
  const { levels } = atomOf(row['ion']);
  const wanted = Number(row['energy_cm1']);
  const same = levels.flatMap((level, k) => (level.j === Number(row['j']) && bare(level.term) === bare(row['term']) ? [k] : []));
  const near = same.filter((k) => !(Math.abs(levels[k].energyCm1 - wanted) > Math.max(3, 1e-4 * wanted)));
  if (near.length !== 1) throw new Error(`${row['ion']} ${row['term']} ${row['j']}: ${near.length} levels fit`);
  return near[0];
}

const rows = referenceTable('criticalDensities.csv').map((row) => ({ row, model: atomOf(row['ion']), level: levelOf(row) }));
const nameOf = (row: Record<string, string>) => `${row['ion']} ${row['term']} J=${row['j']}`;

it('more than 500 critical densities, all collisions counted, are met within 3 %', () => {
  const found = agreement(
    rows.map(({ model, level, row }) => ({ name: nameOf(row), ours: criticalDensity(model, level, TE), theirs: Number(row['n_crit']) })),
  );
  expect(rows.length).toBeGreaterThan(500);
  expect(found.worstPercent, found.sentence).toBeLessThan(3);
  expect(found.medianPercent, found.sentence).toBeLessThan(0.1);
});

it('the same with collisions to lower levels only', () => {
  const found = agreement(
    rows
      .filter(({ row }) => Number(row['n_crit_down']) > 0)
      .map(({ model, level, row }) => ({
        name: nameOf(row),
        ours: criticalDensity(model, level, TE, 'down'),
        theirs: Number(row['n_crit_down']),
      })),
  );
  expect(found.worstPercent, found.sentence).toBeLessThan(3);
});

it('lifetimes are met within 3 %', () => {
  const found = agreement(
    rows.map(({ model, level, row }) => ({ name: nameOf(row), ours: radiativeLifetime(model, level), theirs: Number(row['lifetime_s']) })),
  );
  expect(found.worstPercent, found.sentence).toBeLessThan(3);
});

/** Critical density of a textbook row by the definition the row names. */
function byDefinition(row: Record<string, string>): number {
  const model = atomOf(row['ion']);
  const level = model.levels.findIndex((l) => bare(l.term) === row['term'] && l.j === Number(row['j']));
  if (row['definition'] !== 'terms') return criticalDensity(model, level, TE, row['definition'] === 'down' ? 'down' : 'all');
  const { term } = model.levels[level];
  // down to other terms only: the collisions inside the term are left out of the model
  const kept = Array.from(model.collisions.lower.keys()).filter(
    (k) => model.levels[model.collisions.lower[k]].term !== term || model.levels[model.collisions.upper[k]].term !== term,
  );
  const per = model.collisions.upsilon.length / model.collisions.lower.length;
  const collisions = {
    lower: Uint8Array.from(kept, (k) => model.collisions.lower[k]),
    upper: Uint8Array.from(kept, (k) => model.collisions.upper[k]),
    upsilon: Float32Array.from(kept.flatMap((k) => Array.from(model.collisions.upsilon.subarray(per * k, per * (k + 1))))),
    teLow: Float32Array.from(kept, (k) => model.collisions.teLow[k]),
    teHigh: Float32Array.from(kept, (k) => model.collisions.teHigh[k]),
  };
  return criticalDensity({ ...model, collisions }, level, TE, 'down');
}

it('critical densities of the textbook are met within the scatter of its definitions and of older collision strengths', () => {
  const checked = referenceTable('textbookCriticalDensities.csv').map((row) => ({
    name: nameOf(row),
    factor: byDefinition(row) / Number(row['n_crit']),
    allowed: Number(row['factor']),
  }));
  expect(checked.length).toBe(21);
  expect(checked.filter(({ factor, allowed }) => !(factor < allowed && factor > 1 / allowed))).toEqual([]);
  expect(checked.filter(({ factor }) => Math.abs(Math.log(factor)) < Math.log(1.2)).length).toBeGreaterThanOrEqual(16);
});
