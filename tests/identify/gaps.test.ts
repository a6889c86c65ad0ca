import { expect, test } from 'vitest';
import { DEFAULT_NAMING_SETTINGS, type Mark, nameMarks } from '../../src/identify/index.ts';
import { vacuumFromAir } from '../../src/units/index.ts';
import { bundled } from '../atomic/bundledData.ts';

/** A plain nebula whose [O III] 5006.84 fell into the gap between two detectors; air wavelength, flux. */
const LINES = [
  [3728.8, 150],
  [3868.76, 40],
  [4101.73, 26],
  [4340.46, 47],
  [4363.21, 4],
  [4861.33, 100],
  [4958.91, 150],
  [5875.64, 14],
  [6548.05, 20],
  [6562.8, 286],
  [6583.45, 60],
  [6716.44, 20],
  [6730.82, 18],
] as const;
const marks = LINES.map(([air, flux]): Mark => ({ wavelength: vacuumFromAir(air), wavelengthErr: 0.05, flux, fluxErr: 0.3, fwhm: 3 }));
const companionsOf4959 = (gaps?: readonly (readonly [number, number])[]) => {
  const naming = nameMarks(marks, bundled, { ...DEFAULT_NAMING_SETTINGS, ...(gaps ? { gaps } : {}) }, []);
  const k = LINES.findIndex(([air]) => air === 4958.91);
  const candidate = naming.features[k].candidates.find((c) => bundled.lines.ions[bundled.lines.ion[c.lines[0]]].name === 'O III');
  const brother = candidate?.companions.find(({ line }) => Math.abs(bundled.lines.wavelengthVac[line] - 5008.24) < 0.1);
  return {
    outcome: brother?.outcome,
    probability: candidate?.probability ?? 0,
    missing: naming.missing.map(({ line }) => bundled.lines.wavelengthVac[line]),
  };
};

test('a companion that fell into a gap is not held against a name, and is not called missing', () => {
  const blind = companionsOf4959();
  const told = companionsOf4959([[4985, 5030]]);
  expect(blind.outcome).toBe('absent');
  expect(told.outcome).toBe('outside');
  expect(told.probability).toBeGreaterThan(0.95);
  expect(told.missing.some((w) => Math.abs(w - 5008.24) < 0.1)).toBe(false);
});
