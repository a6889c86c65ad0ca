import { expect, it } from 'vitest';
import { criticalDensity, densityOfSurvival, survival } from '../../src/atomic/index.ts';
import { bundled } from './bundledData.ts';
import { someAtom } from './someAtom.ts';

const oxygen = bundled.levelModel('O III')!;
const ONE_D = 3;

it('all of the light is left in thin gas, and it falls as one over the density far above the critical density', () => {
  const critical = criticalDensity(oxygen, ONE_D, 10_000);
  const [thin, dense, denser] = survival(oxygen, ONE_D, 10_000, [1, 1e5 * critical, 1e6 * critical]);
  expect(thin).toBeCloseTo(1, 3);
  expect(dense).toBeLessThan(1e-4);
  expect(dense / denser).toBeCloseTo(10, 3);
});

it('a two-level atom keeps half of its light where collisions of both ways equal the decay', () => {
  const atom = someAtom({ levels: '3P 0 0 even; 1D 2 50000 even', decays: '0 1 0.02', collisions: '0 1 2' });
  // excitation hardly counts at 50000 cm^-1: the critical density itself
  expect(densityOfSurvival(atom, 1, 8000) / criticalDensity(atom, 1, 8000)).toBeCloseTo(1, 2);
});

it('the density of half survival is where the curve says one half', () => {
  for (const [ion, level] of [
    ['O III', 3],
    ['O III', 4],
    ['S II', 1],
    ['C III', 2],
    ['N I', 1],
  ] as const) {
    const model = bundled.levelModel(ion)!;
    const half = densityOfSurvival(model, level, 12_000);
    expect(survival(model, level, 12_000, [half])[0], ion).toBeCloseTo(0.5, 6);
    expect(survival(model, level, 12_000, [half * 3, half * 30, half * 3e3]).every((left) => left < 0.5)).toBe(true);
  }
});

it('without collisions or decays nobody can say what survives', () => {
  const noCollisions = someAtom({ levels: '3P 0 0 even; 1D 2 20000 even', decays: '0 1 0.02', collisions: '' });
  expect(survival(noCollisions, 1, 10_000, [100])).toEqual([Number.NaN]);
  expect(densityOfSurvival(noCollisions, 1, 10_000)).toBeNaN();
  const noDecay = someAtom({ levels: '3P 0 0 even; 1D 2 20000 even', decays: '', collisions: '0 1 2' });
  expect(densityOfSurvival(noDecay, 1, 10_000)).toBeNaN();
  expect(() => densityOfSurvival(oxygen, ONE_D, 10_000, 1)).toThrow(RangeError);
});
