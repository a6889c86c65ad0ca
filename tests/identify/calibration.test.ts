import { describe, expect, test } from 'vitest';
import { DEFAULT_NAMING_SETTINGS, nameMarks } from '../../src/identify/index.ts';
import { bundled as data } from '../atomic/bundledData.ts';
import { type SimulatedMark, simulateNebula } from './simulatedNebula.ts';

const { lines } = data;
/** One ion, and near enough to be printed as one line of a multiplet. */
const isSame = (a: number, b: number) =>
  a === b || (lines.ion[a] === lines.ion[b] && Math.abs(lines.wavelengthVac[a] - lines.wavelengthVac[b]) < 1.2);
/** A name is right when its leading line carries at least a quarter of the feature. */
const isRight = (mark: SimulatedMark, named: readonly number[]) => mark.lines.some((line) => isSame(line, named[0]));

interface Claim {
  readonly claimed: number;
  readonly right: boolean;
}

/** Names claimed for nebulae of all kinds, resolutions and redshifts; seeds that nothing was tuned on. */
function claims(): { leading: Claim[]; redshiftsRight: boolean[] } {
  const leading: Claim[] = [];
  const redshiftsRight: boolean[] = [];
  for (let seed = 1001; seed <= 1036; seed++) {
    const z = seed % 4 === 3 ? 0.05 * (seed % 30) : ((seed * 37) % 200) * 3e-6;
    const marks = simulateNebula(data, {
      seed,
      kind: (['low', 'high', 'shocked'] as const)[seed % 3],
      count: [60, 150, 100, 200][seed % 4],
      resolvingPower: [2000, 20_000, 5000][(seed >> 2) % 3],
      z,
      low: 3500,
      high: 9800,
      strangers: 0.03,
    });
    const naming = nameMarks(marks, data, DEFAULT_NAMING_SETTINGS, []);
    redshiftsRight.push(Math.abs(naming.z - z) < 2e-4 * (1 + z));
    naming.features.forEach(({ candidates, noneProbability }, k) => {
      const [best] = candidates;
      if (best && best.probability > noneProbability) leading.push({ claimed: best.probability, right: isRight(marks[k], best.lines) });
    });
  }
  return { leading, redshiftsRight };
}

describe('nebulae made from the list with other abundances, ratios, reddening, calibration errors and lines of no list', () => {
  const { leading, redshiftsRight } = claims();
  const within = (low: number, high: number) => {
    const bin = leading.filter((c) => c.claimed >= low && c.claimed < high);
    const mean = (values: readonly number[]) => values.reduce((a, b) => a + b, 0) / values.length;
    return { claimed: mean(bin.map((c) => c.claimed)), right: mean(bin.map((c) => (c.right ? 1 : 0))), count: bin.length };
  };

  test('their redshifts are found', () => {
    expect(redshiftsRight.every((right) => right)).toBe(true);
  });

  test('97 of 100 names are right', () => {
    expect(leading.filter((c) => c.right).length / leading.length).toBeGreaterThan(0.97);
  });

  // the tolerance holds two sigma of a few hundred counts, and blends of which two names are right
  test.each([
    [0.4, 0.6, 0.15],
    [0.6, 0.8, 0.1],
    [0.8, 0.95, 0.08],
    [0.95, 1.01, 0.02],
  ])('of the names claimed with %f to %f about as many are right', (low, high, tolerance) => {
    const { claimed, right, count } = within(low, high);
    expect(count).toBeGreaterThan(30);
    expect(Math.abs(claimed - right), `claimed ${claimed.toFixed(3)}, right ${right.toFixed(3)} of ${count}`).toBeLessThan(tolerance);
  });
});
