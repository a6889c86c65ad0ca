import { expect, it } from 'vitest';
import { branchingRatio, decayRate, type LevelModel, levelPopulations, lineRatio } from '../../src/atomic/index.ts';
import { agreement, atomOf, pairAt, referenceTable } from './referenceTable.ts';

/** Emission of a sum of lines per ion, in units of cm^-1 s^-1. */
function sumOf(model: LevelModel, populations: Float64Array, wavelengths: string): number {
  return wavelengths.split('+').reduce((sum, text) => {
    const [upper, lower] = pairAt(model, Number(text));
    return sum + populations[upper] * decayRate(model, upper, lower) * (model.levels[upper].energyCm1 - model.levels[lower].energyCm1);
  }, 0);
}

it('line ratios of 24 diagnostics at 5000 ... 20000 K and 10 ... 10^6 cm^-3 are met within 2 %', () => {
  const checked = referenceTable('lineRatios.csv').flatMap((row) => {
    const model = atomOf(row['ion']);
    const te = Number(row['te']);
    return [1, 2, 3, 4, 5, 6].map((log) => {
      const populations = levelPopulations(model, te, 10 ** log);
      const ours = sumOf(model, populations, row['over_vac']) / sumOf(model, populations, row['under_vac']);
      return { name: `${row['ratio']} at ${te} K, 10^${log}`, ours, theirs: Number(row[`n${log}`]) };
    });
  });
  const found = agreement(checked);
  expect(checked.length).toBe(576);
  expect(found.worstPercent, found.sentence).toBeLessThan(2);
  expect(found.medianPercent, found.sentence).toBeLessThan(0.1);
});

it('ratios fixed by a common upper level are those of the literature at any density', () => {
  const rows = referenceTable('branchingRatios.csv');
  const off = rows
    .map((row) => {
      const model = atomOf(row['ion']);
      const [over, under] = [pairAt(model, Number(row['over_vac'])), pairAt(model, Number(row['under_vac']))];
      expect(over[0], row['ratio']).toBe(under[0]);
      const ours = branchingRatio(model, over[0], over[1], under[1]);
      for (const ne of [1, 1e6]) expect(lineRatio(model, over, under, 8000, ne) / ours, row['ratio']).toBeCloseTo(1, 9);
      return { ratio: row['ratio'], ours, relative: ours / Number(row['value']) - 1, tolerance: Number(row['tolerance']) };
    })
    .filter(({ relative, tolerance }) => !(Math.abs(relative) < tolerance));
  expect(rows.length).toBe(14);
  expect(off).toEqual([]);
});
