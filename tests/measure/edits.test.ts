import { describe, expect, test } from 'vitest';
import {
  DEFAULT_MEASURE_SETTINGS,
  type FeatureEdit,
  fitSpectrum,
  fluxLimit,
  measure,
  measurementOf,
  shapesOfFeature,
} from '../../src/measure/index.ts';
import { sky } from './sky.ts';

const WORDS = 'R 8000; 4930 60; 4959 33; 5006.8 100; 5060 80; noise 1';

const start = (words = WORDS, settings = {}) => {
  const made = sky(words);
  const fitted = fitSpectrum(made.spectrum, { ...DEFAULT_MEASURE_SETTINGS, ...settings });
  const edited = (edits: readonly FeatureEdit[] = []) => measurementOf(fitted, edits);
  return { ...made, fitted, edited };
};
const places = (m: { features: readonly { centroid: number }[] }) => m.features.map((f) => Math.round(f.centroid * 10) / 10);

describe('features by hand', () => {
  test('a feature added where there is none stays, however faint, and says that it was added', () => {
    const { edited } = start();
    const added = edited([{ edit: 'add', at: 5030 }]).features.find((f) => Math.abs(f.centroid - 5030) < 1);
    expect(added?.byHand).toBe('added by hand');
    expect(added?.snr).toBeLessThan(4.5);
  });

  test('a faint line below the threshold is measured where it is added', () => {
    const { edited } = start(`${WORDS}; 5030 4; seed 4`, { thresholdSigma: 12 });
    expect(places(edited())).not.toContain(5030);
    const added = edited([{ edit: 'add', at: 5030.2 }]).features.find((f) => Math.abs(f.centroid - 5030) < 0.3);
    expect(Math.abs((added?.flux ?? 0) - 4) / (added?.fluxErr ?? 1)).toBeLessThan(4);
  });

  test('deleting takes one feature away and leaves the others as they were', () => {
    const { edited } = start();
    const before = edited();
    const now = edited([{ edit: 'delete', at: 4959 }]);
    expect(places(now)).toEqual(places(before).filter((w) => Math.abs(w - 4959) > 1));
    for (const feature of now.features) {
      const same = before.features.find((f) => f.centroid === feature.centroid);
      expect(same?.flux).toBe(feature.flux);
    }
  });

  test('splitting a blend that was taken for one line gives both lines their places', () => {
    const words = 'R 8000; 4930 60; 4960 70; 5000 100; 5000.5 90; 5060 80; noise 1; seed 2';
    const { edited } = start(words);
    const near = (m: ReturnType<typeof edited>) => m.features.filter((f) => Math.abs(f.centroid - 5000.2) < 1.5);
    const merged: FeatureEdit = { edit: 'delete', at: 5000.5 };
    const [one, ...others] = near(edited([merged]));
    expect(others).toEqual([]);
    const split = near(edited([merged, { edit: 'split', at: one.centroid }]));
    expect(split).toHaveLength(2);
    expect(Math.abs(split[0].centroid - 5000)).toBeLessThan(4 * split[0].centroidErr);
    expect(Math.abs(split[1].centroid - 5000.5)).toBeLessThan(4 * split[1].centroidErr);
    expect(split[0].byHand).toBe('split by hand');
  });

  test('moving starts the fit anew from another place', () => {
    const { edited } = start();
    const moved = edited([
      { edit: 'delete', at: 4959 },
      { edit: 'add', at: 4950 },
      { edit: 'move', at: 4950, to: 4959 },
    ]).features.find((f) => Math.abs(f.centroid - 4958.9) < 0.5);
    expect(moved?.byHand).toBe('moved by hand');
    expect(Math.abs((moved?.flux ?? 0) - 33)).toBeLessThan(8);
  });

  test('a tie gives the weaker line the velocity, the width and the share of the stronger one', () => {
    const { edited } = start('R 8000; 4930 60; 4958.91 3; 5006.84 100; 5060 80; noise 1; seed 3', { thresholdSigma: 3 });
    const tie: FeatureEdit = { edit: 'tie', at: 4958.91, to: 5006.84, restAt: 4958.911, restTo: 5006.843, ratio: 1 / 3 };
    const tied = edited([{ edit: 'add', at: 4958.91 }, tie]);
    const strong = tied.features.find((f) => Math.abs(f.centroid - 5006.8) < 0.5);
    const weak = tied.features.find((f) => Math.abs(f.centroid - 4958.9) < 0.5);
    if (!strong || !weak) throw new Error('the pair was lost');
    expect(weak.centroid / strong.centroid).toBeCloseTo(4958.911 / 5006.843, 10);
    expect(weak.fwhm / strong.fwhm).toBeCloseTo(4958.911 / 5006.843, 10);
    expect(weak.flux / strong.flux).toBeCloseTo(1 / 3, 10);
    expect(weak.fluxErr / strong.fluxErr).toBeCloseTo(1 / 3, 6);
    expect(weak.byHand).toMatch(/^tied by hand to 5006\.8/);
  });

  test('an edit that finds nothing is told, not swallowed', () => {
    const { edited } = start();
    expect(edited([{ edit: 'split', at: 5033 }]).remarks.map((r) => r.code)).toContain('edit-lost');
    expect(edited([{ edit: 'delete', at: 4959 }]).remarks.map((r) => r.code)).not.toContain('edit-lost');
  });

  test('measure does the edits of its settings', () => {
    const { spectrum, edited } = start();
    const edits: FeatureEdit[] = [{ edit: 'delete', at: 4930 }];
    expect(measure(spectrum, { ...DEFAULT_MEASURE_SETTINGS, edits }).features).toEqual(edited(edits).features);
  });
});

describe('other shapes', () => {
  test('a line with Lorentzian wings is best as a Voigt profile, a plain one as a Gaussian', () => {
    const shapes = (words: string) => {
      const { fitted } = start(words);
      return shapesOfFeature(fitted, [], 5000);
    };
    expect(shapes('R 8000; 4930 600; 5000 1000; 5060 800; noise 1; wings 0.15')[0].as).toBe('voigt');
    expect(shapes('R 8000; 4930 60; 5000 100; 5060 80; noise 1')[0].as).toBe('gaussian');
  });

  test('a narrow line on a broad one: the two Gaussians come back, and the feature takes their sum', () => {
    const words = 'R 8000; 4900 200; 4980 220; 5040 250; 5100 210; noise 1; from 4850; to 5150';
    const made = sky(words);
    const broad = sky('R 1500; 5040 400; noise 0; continuum 0; from 4850; to 5150; step 0.20208333333333334');
    for (let i = 0; i < made.spectrum.flux.length; i++) made.spectrum.flux[i] += broad.spectrum.flux[i];
    const fitted = fitSpectrum(made.spectrum, { ...DEFAULT_MEASURE_SETTINGS, resolvingPower: 8000 });
    const single = measurementOf(fitted)
      .features.filter((f) => Math.abs(f.centroid - 5040) < 6)
      .sort((a, b) => Math.abs(a.centroid - 5040) - Math.abs(b.centroid - 5040));
    const edits: FeatureEdit[] = [...single.slice(1).map((f) => ({ edit: 'delete', at: f.centroid }) as const)];
    const [best] = shapesOfFeature(fitted, edits, single[0].centroid);
    expect(best.as).toBe('two-gaussians');
    const feature = measurementOf(fitted, [...edits, { edit: 'profile', at: single[0].centroid, as: 'two-gaussians' }]).features.find(
      (f) => f.byHand === 'measured as two Gaussians',
    );
    expect(Math.abs((feature?.flux ?? 0) - 650)).toBeLessThan(5 * (feature?.fluxErr ?? 0));
  });
});

describe('limits', () => {
  test('a line at the limit is seen at three sigma: fluxes fitted to noise scatter by a third of it', () => {
    const pulls: number[] = [];
    for (let seed = 1; seed <= 40; seed++) {
      const { fitted, edited } = start(`${WORDS}; seed ${seed}`);
      for (const at of [4940, 4980, 5030, 5040]) {
        const limit = fluxLimit(fitted, edited().model, at);
        if (limit) pulls.push((3 * limit.flux) / limit.limit);
      }
    }
    const rms = Math.sqrt(pulls.reduce((sum, v) => sum + v * v, 0) / pulls.length);
    expect(pulls).toHaveLength(160);
    expect(rms).toBeGreaterThan(0.8);
    expect(rms).toBeLessThan(1.15);
  });

  test('there is none outside the spectrum', () => {
    const { fitted, edited } = start();
    expect(fluxLimit(fitted, edited().model, 4000)).toBeUndefined();
  });
});

describe('strange tops', () => {
  test('a saturated line says so, and its flanks still give its flux', () => {
    const { edited } = start('R 3000; 4930 600; 4980 700; 5040 3000; 5080 640; noise 1; step 0.3; clip 900');
    const feature = edited().features.find((f) => Math.abs(f.centroid - 5040) < 1);
    expect(feature?.notes.join()).toMatch(/saturated/);
    expect(Math.abs((feature?.flux ?? 0) / 3000 - 1)).toBeLessThan(0.1);
  });

  test('plain bright lines do not', () => {
    const { edited } = start('R 3000; 4930 6000; 4980 7000; 5040 3000; 5080 6400; noise 1; step 0.3');
    expect(edited().features.flatMap((f) => f.notes)).toEqual([]);
  });
});
