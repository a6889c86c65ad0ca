import { describe, expect, test } from 'vitest';
import { DEFAULT_NAMING_SETTINGS, nameMarks } from '../../src/identify/index.ts';
import { bundled as data } from '../atomic/bundledData.ts';
import { nebula } from './nebula.ts';

const C = 299_792.458;
const wrongIons = (marks: ReturnType<typeof nebula>) => {
  const naming = nameMarks(marks, data, DEFAULT_NAMING_SETTINGS, []);
  const ion = (line: number) => data.lines.ions[data.lines.ion[line]].name;
  const wrong = marks.filter((m, k) => !naming.features[k].candidates[0]?.lines.some((line) => ion(line) === m.ion.replace(/[[\]]/g, '')));
  return { naming, wrong: wrong.map((m) => `${m.ion} ${m.air}`) };
};

describe('a wavelength calibration that errs', () => {
  test('between two arms by 85 km/s is found, said, and the names stay right', () => {
    const marks = nebula({ seed: 21, z: 2e-4 }).map((m) => ({ ...m, wavelength: m.wavelength * (1 + (m.wavelength > 5600 ? 85 : 0) / C) }));
    const { naming, wrong } = wrongIons(marks);
    expect(wrong.length).toBeLessThanOrEqual(1);
    const kms = naming.drift?.map((d) => d.kms) ?? [];
    expect(Math.max(...kms) - Math.min(...kms)).toBeGreaterThan(65);
    expect(Math.max(...kms) - Math.min(...kms)).toBeLessThan(105);
    expect(naming.remarks.map((r) => r.code)).toContain('calibration-drift');
  });

  test('is not put right in the velocities of the table', () => {
    const marks = nebula({ seed: 22 }).map((m) => ({ ...m, wavelength: m.wavelength * (1 + (m.wavelength > 5600 ? 85 : 0) / C) }));
    const { naming } = wrongIons(marks);
    const velocityOf = (air: number) => naming.features[marks.findIndex((m) => m.air === air)].candidates[0].velocityKms;
    expect(velocityOf(6562.8) - velocityOf(4861.33)).toBeGreaterThan(75);
  });

  test('is not seen where there is none', () => {
    for (const seed of [23, 24, 25]) {
      const { naming } = wrongIons(nebula({ seed, scatter: 0.2 }));
      expect(naming.drift).toBeUndefined();
      expect(naming.remarks.map((r) => r.code)).not.toContain('calibration-drift');
    }
  });
});

test('a trend of velocity with ionisation is found, and none where there is none', () => {
  const trendOf = (slope: number) => {
    const marks = nebula({ seed: 27, scatter: 0.03 }).map((m) => {
      const ion = data.lines.ions.find((i) => i.name === m.ion.replace(/[[\]]/g, ''));
      const kms = slope * Math.log(((ion?.creationEv ?? 0) + 8) / 25);
      return { ...m, wavelength: m.wavelength * (1 + kms / C) };
    });
    return nameMarks(marks, data, DEFAULT_NAMING_SETTINGS, []).trendKms ?? 0;
  };
  expect(trendOf(-8)).toBeLessThan(-4);
  expect(trendOf(-8)).toBeGreaterThan(-10);
  expect(trendOf(0)).toBe(0);
});

test('a feature four times as wide as the others is less likely a line', () => {
  const marks = nebula({ seed: 26 }).map((m) => ({ ...m, fwhm: m.wavelength / 6000 }));
  const k = marks.findIndex((m) => m.air === 5754.59);
  const widthOf = (fwhm: number) => {
    const changed = marks.map((m, i) => (i === k ? { ...m, fwhm } : m));
    const [best] = nameMarks(changed, data, DEFAULT_NAMING_SETTINGS, []).features[k].candidates;
    return best.evidence.find((e) => e.kind === 'width')?.nats ?? 0;
  };
  // most strangers are as wide as the others: a usual width says little
  expect(widthOf(marks[k].wavelength / 6000)).toBeGreaterThan(0.1);
  expect(widthOf(marks[k].wavelength / 1500)).toBeLessThan(-0.5);
});
