import { expect, it } from 'vitest';
import { type LevelModel, linesBetween } from '../../src/atomic/index.ts';
import { DEFAULT_GAS_SETTINGS, describeGas, type NamedLine } from '../../src/plasma/index.ts';
import { bundled } from '../atomic/bundledData.ts';
import { atomOf, pairAt, referenceTable } from './referenceTable.ts';

/** The list's line of an ion between two levels. */
function lineOf(ion: string, [upper, lower]: readonly [number, number], vacuum: number): number {
  const { lines } = bundled;
  const [first, end] = linesBetween(lines, vacuum * 0.999, vacuum * 1.001);
  for (let k = first; k < end; k++)
    if (lines.ions[lines.ion[k]].name === ion && lines.upperLevel[k] === upper && lines.lowerLevel[k] === lower) return k;
  return -1;
}

const named = (lines: readonly number[], flux: number): NamedLine => ({
  feature: lines[0],
  label: `${lines[0]}`,
  lines,
  shares: lines.map(() => 1 / lines.length),
  accepted: true,
  flux,
  fluxErr: 0.001 * flux,
  restVac: bundled.lines.wavelengthVac[lines[0]],
  velocityKms: 0,
  velocityErrKms: 1,
});

it('the outside ratios, measured as they are printed, lead back to the temperature or density they were computed for', () => {
  let solved = 0;
  const off: string[] = [];
  for (const row of referenceTable('lineRatios.csv')) {
    const model: LevelModel = atomOf(row['ion']);
    const side = (text: string) => text.split('+').map((w) => lineOf(row['ion'], pairAt(model, Number(w)), Number(w)));
    const [over, under] = [side(row['over_vac']), side(row['under_vac'])];
    if ([...over, ...under].includes(-1)) continue;
    for (const log of [1, 2, 3, 4, 5, 6]) {
      const [trueTe, trueNe] = [Number(row['te']), 10 ** log];
      const lines = [named(over, Number(row[`n${log}`])), named(under, 1)];
      const solve = (given: { te?: number; ne?: number }) =>
        describeGas(lines, {
          data: bundled,
          settings: { ...DEFAULT_GAS_SETTINGS, cHbeta: 0, ...given },
          startTe: 1e4,
          startNe: 1e3,
          draws: 50,
        }).diagnostics[0];
      const asked = solve({ te: trueTe, ne: trueNe });
      if (!asked) continue;
      const { result, tells } = asked;
      if (result.ended !== 'value') continue;
      const truth = tells === 'density' ? trueNe : trueTe;
      solved++;
      // a tenth in density, 2 % in temperature: what 2 % in the ratio (the agreement of the atoms) make where the ratio is steep
      const steep = (result.high - result.low) / result.value < 0.02;
      if (steep && Math.abs(result.value / truth - 1) > (tells === 'density' ? 0.1 : 0.02))
        off.push(`${row['ratio']} ${trueTe} K 10^${log}: ${result.value}`);
    }
  }
  expect(off).toEqual([]);
  expect(solved).toBeGreaterThan(250);
});
