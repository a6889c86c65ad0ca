import { describe, expect, test } from 'vitest';
import { DEFAULT_MEASURE_SETTINGS, measure } from '../../src/measure/index.ts';
import { ProblemError } from '../../src/problems/index.ts';
import { sky } from './sky.ts';

const found = (words: string, settings = {}) => {
  const made = sky(words);
  const measurement = measure(made.spectrum, { ...DEFAULT_MEASURE_SETTINGS, ...settings });
  return { ...made, measurement, features: measurement.features, real: measurement.features.filter((f) => !f.artefact) };
};

describe('measuring', () => {
  test('finds a doublet with its fluxes and widths within their errors', () => {
    const { real, lines } = found('R 8000; 4958.91 33; 5006.84 100; noise 1');
    expect(real).toHaveLength(2);
    real.forEach((feature, k) => {
      expect(Math.abs(feature.centroid - lines[k].centre)).toBeLessThan(4 * feature.centroidErr);
      expect(Math.abs(feature.flux - lines[k].flux)).toBeLessThan(4 * feature.fluxErr);
      expect(feature.fit.ended).toBe('converged');
      expect(feature.kind).toBe('emission');
    });
  });

  test('separates two lines 1.2 FWHM apart and says that they are blended', () => {
    const { real, lines } = found('R 8000; 4930 60; 4950 80; 4970 60; 5000 100; 5000.75 60; 5050 70; 5080 90; noise 1', {
      resolvingPower: 8000,
    });
    expect(real).toHaveLength(lines.length);
    const pair = real.filter((f) => Math.abs(f.centroid - 5000.4) < 1);
    expect(pair).toHaveLength(2);
    expect(pair.every((f) => f.notes.includes('blended'))).toBe(true);
    expect(pair[0].flux / pair[1].flux).toBeCloseTo(100 / 60, 0);
  });

  test('finds nothing in noise over a waving continuum', () => {
    for (const seed of [1, 2, 3, 4, 5]) expect(found(`R 4000; from 4000; to 7000; noise 2; wave 6; seed ${seed}`).real).toEqual([]);
  });

  test('the wings of very strong lines breed no features, and the remark says by how much lines are no Gaussians', () => {
    const strong = Array.from({ length: 6 }, (_, k) => `${4920 + 28 * k} 4000`).join('; ');
    const { real, measurement } = found(`R 8000; ${strong}; noise 1; wings 0.03`);
    expect(real.map((f) => Math.round(f.centroid))).toEqual([4920, 4948, 4976, 5004, 5032, 5060]);
    expect(measurement.remarks.map((r) => r.code)).toContain('not-gaussian');
  });

  test('calls a lone sample a spike, not a line', () => {
    const { real, features } = found('R 8000; 4950 80; 5000 100; 5050 90; spike 5020; noise 1');
    expect(real.map((f) => Math.round(f.centroid))).toEqual([4950, 5000, 5050]);
    const spike = features.find((f) => f.artefact);
    expect(spike?.centroid).toBeCloseTo(5020, 0);
  });

  test('measures absorption as negative flux, and not when told not to', () => {
    const words = 'R 8000; 4950 80; 5000 -60; 5050 90; noise 1';
    const dip = found(words).real.find((f) => Math.abs(f.centroid - 5000) < 0.5);
    expect(dip?.kind).toBe('absorption');
    expect(dip?.flux).toBeLessThan(-45);
    expect(dip?.ew).toBeLessThan(0);
    expect(found(words, { absorption: false }).real.some((f) => f.flux < 0)).toBe(false);
  });

  test('learns the resolving power from isolated lines, within five percent', () => {
    const lines = Array.from({ length: 12 }, (_, k) => `${4920 + 14 * k} ${60 + 10 * k}`).join('; ');
    const { measurement } = found(`R 9000; ${lines}; noise 1`);
    expect(measurement.resolvingPowerFrom).toBe('lines');
    expect(measurement.resolvingPower / 9000).toBeGreaterThan(0.95);
    expect(measurement.resolvingPower / 9000).toBeLessThan(1.05);
  });

  test('estimates the noise where the file has no errors', () => {
    const { measurement } = found('R 8000; 5000 100; noise 3; bare');
    expect(measurement.noise[100] / 3).toBeGreaterThan(0.85);
    expect(measurement.noise[100] / 3).toBeLessThan(1.15);
    expect(measurement.remarks.map((r) => r.code)).toContain('no-errors');
  });

  test('says by how much the errors of the file are off', () => {
    const made = sky('R 8000; 5000 100; 4950 60; 5050 80; noise 2');
    const spectrum = { ...made.spectrum, fluxErr: made.spectrum.fluxErr?.map((e) => e / 2) };
    const measurement = measure(spectrum, DEFAULT_MEASURE_SETTINGS);
    expect(measurement.noiseFactor).toBeGreaterThan(1.85);
    expect(measurement.noiseFactor).toBeLessThan(2.15);
    expect(measurement.remarks.map((r) => r.code)).toContain('errors-rescaled');
  });

  test('gives the equivalent width of a line on its continuum', () => {
    const feature = found('R 8000; 5000 100; 4950 60; 5050 80; noise 0.5; continuum 50').real.find(
      (f) => Math.abs(f.centroid - 5000) < 0.5,
    );
    expect(feature?.ew).toBeGreaterThan(1.9);
    expect(feature?.ew).toBeLessThan(2.1);
  });

  test('the error of an equivalent width does not take the photons of a bright line for noise of the continuum', () => {
    const { spectrum } = sky('R 8000; 5000 4000; 4950 60; 5050 80; noise 1');
    const photons = { ...spectrum, fluxErr: spectrum.flux.map((f) => Math.sqrt(1 + 0.2 * Math.max(0, f - 100))) };
    const feature = measure(photons, DEFAULT_MEASURE_SETTINGS).features.find((f) => Math.abs(f.centroid - 5000) < 0.5);
    // 4000 over 100; the continuum is known to about 1 in 100 samples of noise 1
    expect(feature?.ew).toBeCloseTo(40, 0);
    expect((feature?.ewErr ?? 1) / (feature?.ew ?? 1)).toBeGreaterThan(0.0005);
    expect((feature?.ewErr ?? 1) / (feature?.ew ?? 1)).toBeLessThan(0.02);
  });

  test('refuses a spectrum of too few samples in words', () => {
    const { spectrum } = sky('R 8000; noise 1; from 5000; to 5002');
    expect(() => measure(spectrum, DEFAULT_MEASURE_SETTINGS)).toThrow(ProblemError);
  });
});

test('errors are true: centroids and fluxes of 300 lines scatter by their errors', () => {
  const pulls: number[] = [];
  const fluxPulls: number[] = [];
  for (let seed = 1; seed <= 12; seed++) {
    const lines = Array.from({ length: 25 }, (_, k) => `${4905 + 7.7 * k + 0.13 * seed} ${20 + 7 * ((k * 7 + seed) % 13)}`).join('; ');
    const { real, lines: truth } = found(`R 8000; ${lines}; noise 1; seed ${seed}`);
    for (const line of truth) {
      const feature = real.find((f) => Math.abs(f.centroid - line.centre) < 0.3);
      if (!feature) throw new Error(`no feature at ${line.centre}`);
      pulls.push((feature.centroid - line.centre) / feature.centroidErr);
      fluxPulls.push((feature.flux - line.flux) / feature.fluxErr);
    }
  }
  for (const set of [pulls, fluxPulls]) {
    const sorted = set.sort((a, b) => a - b);
    expect(Math.abs(sorted[Math.floor(sorted.length / 2)])).toBeLessThan(0.2);
    const within = set.filter((p) => Math.abs(p) < 1).length / set.length;
    // a normal distribution has 0.683 within one sigma; 300 draws know it to 0.027
    expect(within).toBeGreaterThan(0.6);
    expect(within).toBeLessThan(0.78);
  }
});
