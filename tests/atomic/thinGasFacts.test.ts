import { expect, it } from 'vitest';
import { criticalDensity, duration, isMetastable, powerOfTen, radiativeLifetime, thinGasFacts } from '../../src/atomic/index.ts';
import { bundled } from './bundledData.ts';
import { someAtom } from './someAtom.ts';

const LEVELS = '3P 0 0 even; 1D 2 20000 even; 5S 2 60000 odd; 3S 1 90000 odd';

it('a level with an allowed decay is not metastable, one with a forbidden or a slow intercombination decay is', () => {
  const atom = someAtom({ levels: LEVELS, decays: '0 1 0.02; 0 2 1; 1 2 700; 0 3 1e9', collisions: '' });
  expect([1, 2, 3].map((level) => isMetastable(atom, level))).toEqual([true, true, false]);
});

it('an allowed decay counts however slow, and terms with a letter before them are read', () => {
  const slow = someAtom({
    levels: '3P 0 0 even; 3So 1 90000 odd',
    decays: '0 1 500',
    collisions: '',
  });
  expect(isMetastable(slow, 1)).toBe(false);
  const lettered = { ...slow, levels: slow.levels.map((level, k) => ({ ...level, term: k === 0 ? 'a 5D' : 'z 7Do' })) };
  expect(isMetastable(lettered, 1)).toBe(true);
  const sameSpin = { ...slow, levels: slow.levels.map((level, k) => ({ ...level, term: k === 0 ? 'a 5D' : 'z 5Do' })) };
  expect(isMetastable(sameSpin, 1)).toBe(false);
});

it('all levels of the bundled atoms are metastable: the tables stop at the first allowed decay', () => {
  const allowed = bundled.modelIons.flatMap((ion) => {
    const model = bundled.levelModel(ion)!;
    return model.levels.flatMap((level, k) => (isMetastable(model, k) ? [] : [`${ion} ${level.term} ${level.j}`]));
  });
  expect(allowed).toEqual([]);
});

it('the sentence says how long the atom waits, the density and what is left above it', () => {
  const facts = thinGasFacts(bundled.levelModel('O III')!, 3, 10_000);
  expect(facts.why).toBe(
    'O III in its level 2p2 1D, J = 2 has no allowed way down and waits 37 seconds on average before it radiates. ' +
      'Above 6.9 × 10⁵ electrons per cm³ (at 10000 K) a collision comes first. At 6.9 × 10⁷ per cm³ about 1 % of its light per electron is left.',
  );
  expect(facts.metastable).toBe(true);
  expect(facts.lifetimeS).toBe(radiativeLifetime(bundled.levelModel('O III')!, 3));
});

it('without collision rates no density is claimed', () => {
  const facts = thinGasFacts(bundled.levelModel('Fe III')!, 10, 10_000);
  expect(facts.criticalDensityCm3).toBe(Number.POSITIVE_INFINITY);
  expect(facts.why).toContain('collision rates are not tabulated, so no critical density can be given');
});

it('without a decay neither lifetime nor density is claimed', () => {
  const atom = someAtom({ levels: LEVELS, decays: '', collisions: '0 1 2' });
  expect(criticalDensity(atom, 1, 10_000)).toBeNaN();
  expect(thinGasFacts(atom, 1, 10_000).why).toContain('no decay in the tables');
});

it('an allowed line is told apart, and values held outside their table are said to be', () => {
  const allowed = someAtom({ levels: LEVELS, decays: '0 3 1e9', collisions: '0 3 2' });
  expect(thinGasFacts(allowed, 3, 10_000).why).toMatch(/after 1 nanosecond on average: its lines do not need thin gas\.$/);
  const narrow = someAtom({ levels: LEVELS, decays: '0 1 0.02', collisions: '0 1 2 8000 12000' });
  expect(thinGasFacts(narrow, 1, 20_000).why).toMatch(/held at the end of their tabulated temperatures\.$/);
  expect(thinGasFacts(narrow, 1, 10_000).why).not.toContain('held');
});

it('figures are worded for people', () => {
  expect([71_000, 0.004, 690, 12.34, 999.6, 0, 1e-12].map(powerOfTen)).toEqual([
    '7.1 × 10⁴',
    '4.0 × 10⁻³',
    '690',
    '12',
    '1.0 × 10³',
    '0',
    '1.0 × 10⁻¹²',
  ]);
  expect([36.9, 15_000, 1.4, 1, 0.52, 1e9, 1e14, 2e-10].map(duration)).toEqual([
    '37 seconds',
    '4.2 hours',
    '1.4 seconds',
    '1 second',
    '520 milliseconds',
    '32 years',
    '3.2 × 10⁶ years',
    '0.2 nanoseconds',
  ]);
});
