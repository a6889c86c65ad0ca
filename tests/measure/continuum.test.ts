import { describe, expect, test } from 'vitest';
import { DEFAULT_MEASURE_SETTINGS, type MeasureSettings, measure } from '../../src/measure/index.ts';
import { sky } from './sky.ts';

const measured = (words: string, settings: Partial<MeasureSettings> = {}) => {
  const { spectrum } = sky(words);
  return { spectrum, found: measure(spectrum, { ...DEFAULT_MEASURE_SETTINGS, ...settings }) };
};

const CROWD = Array.from({ length: 30 }, (_, k) => `${4910 + 6 * k} ${40 + 13 * (k % 5)}`).join('; ');

describe('continuum', () => {
  test('its error is that of the noise: two thirds of the samples lie within one sigma', () => {
    let within = 0;
    let count = 0;
    for (let seed = 1; seed <= 20; seed++) {
      const { found } = measured(`R 8000; ${CROWD}; noise 1; seed ${seed}`);
      for (let i = 0; i < found.continuum.length; i += 40) {
        count++;
        if (Math.abs(found.continuum[i] - 100) < found.continuumErr[i]) within++;
      }
    }
    expect(within / count).toBeGreaterThan(0.55);
    expect(within / count).toBeLessThan(0.8);
  });

  test('it passes through a pin', () => {
    const { spectrum, found } = measured('R 8000; noise 1; wave 0', { continuum: { pins: [{ wavelength: 5000, level: 103 }] } });
    const at = spectrum.wavelength.findIndex((w) => w >= 5000);
    expect(found.continuum[at]).toBeCloseTo(103, 1);
  });

  test('an excluded bump does not lift it', () => {
    const words = 'R 8000; 5000 500; fwhm 60; noise 1; from 4700; to 5300';
    const settings = { resolvingPower: 8000, continuum: { halfPeriodA: 60 } };
    const level = (exclude: readonly [number, number][]) => {
      const { spectrum, found } = measured(words, { ...settings, continuum: { ...settings.continuum, exclude } });
      return found.continuum[spectrum.wavelength.findIndex((w) => w >= 5000)];
    };
    expect(level([])).toBeGreaterThan(103);
    expect(Math.abs(level([[4900, 5100]]) - 100)).toBeLessThan(1.5);
  });

  test('a longer period makes it stiffer', () => {
    const swing = (halfPeriodA: number) => {
      const { found } = measured('R 8000; noise 0.5; wave 5; from 4700; to 5300', { continuum: { halfPeriodA } });
      return Math.max(...found.continuum) - Math.min(...found.continuum);
    };
    expect(swing(60)).toBeGreaterThan(8);
    expect(swing(2000)).toBeLessThan(3);
  });
});

describe('noise', () => {
  test('noise that neighbours share is recognised, and errors of lines are true again', () => {
    const pulls: number[] = [];
    const factors: number[] = [];
    for (let seed = 1; seed <= 12; seed++) {
      const { found } = measured(`R 8000; ${CROWD}; noise 1.7; smooth 3; from 4800; to 5200; seed ${seed}`);
      factors.push(found.noiseCorrelation);
      for (let k = 0; k < 30; k++) {
        const truth = 4910 + 6 * k;
        const feature = found.features.find((f) => Math.abs(f.centroid - truth) < 0.3);
        if (feature) pulls.push((feature.centroid - truth) / feature.centroidErr);
      }
    }
    pulls.sort((a, b) => Math.abs(a) - Math.abs(b));
    expect(Math.min(...factors)).toBeGreaterThan(1.2);
    expect(pulls.length).toBeGreaterThan(300);
    const width = Math.abs(pulls[Math.floor(0.683 * pulls.length)]);
    expect(width).toBeGreaterThan(0.85);
    expect(width).toBeLessThan(1.2);
  });

  test('independent noise is left alone', () => {
    const { found } = measured(`R 8000; ${CROWD}; noise 1`);
    expect(found.noiseCorrelation).toBe(1);
  });
});

describe('line width', () => {
  const spread = Array.from({ length: 24 }, (_, k) => `${4200 + 200 * k} ${300 + 40 * (k % 7)}`).join('; ');

  test('lines of one width in Angstrom are seen as such', () => {
    const { found } = measured(`R 4000; ${spread}; fwhm 3; step 0.6; from 4000; to 9000; noise 1`);
    expect(found.lineWidth.form).toBe('constant-width');
    expect(found.lineWidth.fwhmA).toBeCloseTo(3, 1);
  });

  test('lines of one resolving power are seen as such', () => {
    const { found } = measured(`R 2500; ${spread}; step 0.3; from 4000; to 9000; noise 1`);
    expect(found.lineWidth.form).toBe('constant-resolving-power');
    expect(found.resolvingPower / 2500).toBeCloseTo(1, 1);
  });

  test('an instrument given as a width in Angstrom is taken out of the lines', () => {
    const { found } = measured(`R 4000; ${spread}; fwhm 5; step 0.6; from 4000; to 9000; noise 1`, { instrumentFwhmA: 3 });
    expect(found.resolvingPowerFrom).toBe('user');
    const feature = found.features.find((f) => Math.abs(f.centroid - 5000) < 3);
    // sqrt(5^2 - 3^2) = 4 A
    expect(((feature?.intrinsicFwhmKms ?? 0) / 299_792.458) * 5000).toBeCloseTo(4, 0);
  });
});
