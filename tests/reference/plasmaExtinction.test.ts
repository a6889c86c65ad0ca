import { describe, expect, it } from 'vitest';
import { type ExtinctionCurve, extinctionRatio } from '../../src/plasma/index.ts';
import { referenceTable } from './referenceTable.ts';

const isCurve = (name: string): name is ExtinctionCurve => ['ccm89', 'ccm89-odonnell94', 'fitzpatrick99'].includes(name);

describe('extinction laws', () => {
  it('give the published values from 1500 A to 2.65 micron, R_V 3.1 to 5.5', () => {
    const rows = referenceTable('plasmaExtinction.csv');
    const off = rows.filter((row) => {
      const curve = row['curve'];
      if (!isCurve(curve)) throw new Error(curve);
      return !(
        Math.abs(extinctionRatio(curve, Number(row['r_v']), Number(row['wavelength'])) - Number(row['value'])) <= Number(row['tolerance'])
      );
    });
    expect(rows.length).toBe(44);
    expect(off).toEqual([]);
  });

  it('run on without a step in the visible and the infrared', () => {
    for (const curve of ['ccm89', 'ccm89-odonnell94', 'fitzpatrick99'] as const)
      for (let wavelength = 3_500; wavelength < 30_000; wavelength += 10) {
        const [here, next] = [extinctionRatio(curve, 3.1, wavelength), extinctionRatio(curve, 3.1, wavelength + 10)];
        expect(Math.abs(next - here), `${curve} at ${wavelength}`).toBeLessThan(0.012);
      }
  });

  it('say nothing below 1000 A', () => {
    expect(extinctionRatio('ccm89', 3.1, 912)).toBeNaN();
    expect(extinctionRatio('fitzpatrick99', 3.1, 912)).toBeNaN();
  });
});
