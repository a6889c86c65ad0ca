import { expect, it } from 'vitest';
import { emissivityPerIon, levelPopulations, lineRatio } from '../../src/atomic/index.ts';
import { HC_OVER_K_CM } from '../../src/units/index.ts';
import { bundled } from './bundledData.ts';
import { someAtom } from './someAtom.ts';

const atoms = bundled.modelIons.flatMap((ion) => bundled.levelModel(ion) ?? []);

it('two levels follow the formula', () => {
  const [te, ne, a, upsilon] = [10_000, 1e4, 0.02, 2];
  const atom = someAtom({ levels: '3P 0 0 even; 1D 2 20000 even', decays: '0 1 0.02', collisions: '0 1 2' });
  const down = (8.629e-6 * upsilon) / (5 * Math.sqrt(te));
  const up = down * 5 * Math.exp((-HC_OVER_K_CM * 20_000) / te);
  const ratio = (ne * up) / (a + ne * down);
  expect(levelPopulations(atom, te, ne)[1] / (ratio / (1 + ratio))).toBeCloseTo(1, 12);
});

it('every atom has shares that sum to 1 from 2000 to 30000 K and from 10^-2 to 10^14 cm^-3', () => {
  for (const atom of atoms) {
    for (const te of [2000, 9000, 30_000]) {
      for (const ne of [1e-2, 1e3, 1e8, 1e14]) {
        const populations = levelPopulations(atom, te, ne);
        expect(
          populations.every((share) => share >= 0),
          atom.ion,
        ).toBe(true);
        expect(
          populations.reduce((sum, share) => sum + share, 0),
          atom.ion,
        ).toBeCloseTo(1, 12);
      }
    }
  }
});

it('dense gas has the levels that collisions reach in Boltzmann shares', () => {
  for (const ion of ['O III', 'S II', 'Fe II', 'C III', 'Ne V']) {
    const atom = atoms.find((model) => model.ion === ion)!;
    const populations = levelPopulations(atom, 12_000, 1e20);
    const reached = new Set(atom.collisions.upper);
    for (const level of reached) {
      const { j, energyCm1 } = atom.levels[level];
      const boltzmann = ((2 * j + 1) / (2 * atom.levels[0].j + 1)) * Math.exp((-HC_OVER_K_CM * energyCm1) / 12_000);
      expect(populations[level] / populations[0] / boltzmann, `${ion} ${level}`).toBeCloseTo(1, 4);
    }
  }
});

it('thin gas emits in proportion to the density', () => {
  const atom = atoms.find((model) => model.ion === 'O III')!;
  expect(emissivityPerIon(atom, 3, 2, 10_000, 1e-3) / emissivityPerIon(atom, 3, 2, 10_000, 1e-5)).toBeCloseTo(100, 4);
});

it('hotter gas makes 4363 stronger against 5007', () => {
  const atom = atoms.find((model) => model.ion === 'O III')!;
  const ratio = (te: number) => lineRatio(atom, [4, 3], [3, 2], te, 100);
  expect(ratio(15_000)).toBeGreaterThan(2 * ratio(10_000));
});

it('a level that nothing reaches is empty, one that nothing leaves too', () => {
  const atom = someAtom({
    levels: '3P 0 0 even; 1D 2 20000 even; 1S 0 30000 even; 5S 2 40000 odd',
    decays: '0 1 0.02; 1 2 1.5',
    collisions: '0 1 2',
  });
  const populations = levelPopulations(atom, 10_000, 1e4);
  expect(populations[1]).toBeGreaterThan(0);
  expect([populations[2], populations[3]]).toEqual([0, 0]);
});

it('no density and no temperature are a mistake of the caller', () => {
  const atom = someAtom({ levels: '3P 0 0 even; 1D 2 20000 even', decays: '0 1 0.02', collisions: '0 1 2' });
  expect(() => levelPopulations(atom, 10_000, 0)).toThrow(RangeError);
  expect(() => levelPopulations(atom, 10_000, Number.NaN)).toThrow('cm^-3');
  expect(() => levelPopulations(atom, -5, 100)).toThrow('electron temperature -5');
});
