import { expect, test } from 'vitest';
import { DEFAULT_MEASURE_SETTINGS, type FeatureEdit, fitSpectrum, measurementOf } from '../../src/measure/index.ts';
import { seededRandom } from '../../src/numeric/index.ts';

const SEED = 20_261_201;
const SPECTRA = 120;

/** What strange fluxes look like: flat, empty, negative, tiny, huge, half missing, combs, counts, one broad bump, a cliff, one spike. */
const SHAPES: readonly ((v: number, i: number, n: number) => number)[] = [
  () => 0,
  () => 5,
  (v) => -v,
  (v) => v * 1e-18,
  (v) => v * 1e25,
  (v, i) => (i % 2 === 0 ? Number.NaN : v),
  (_, i) => (i % 7 === 0 ? 1e6 : 0),
  (v) => Math.round(v),
  (v, i, n) => v + 1e5 * Math.exp(-0.5 * ((i - n / 2) / (1 + n / 20)) ** 2),
  (_, i, n) => (i < n / 2 ? 0 : 1e4),
  (v, i, n) => v + (i === Math.floor(n / 2) ? 1e9 : 0),
];

test(`any spectrum with any edits gives finite features and a finite model (seed ${SEED})`, () => {
  const random = seededRandom(SEED);
  const pick = (count: number) => Math.floor(random.uniform() * count);
  for (let k = 0; k < SPECTRA; k++) {
    const n = 20 + pick(500);
    const step = 10 ** (3 * random.uniform() - 2);
    const wavelength = Float64Array.from({ length: n }, (_, i) => 3000 + step * i);
    const shape = SHAPES[k % SHAPES.length];
    const flux = wavelength.map((_, i) => shape(1 + 0.1 * random.normal(), i, n));
    const masked = Uint8Array.from(flux, (f) => (Number.isFinite(f) ? 0 : 1));
    const edits = Array.from({ length: 4 }, (): FeatureEdit => {
      const at = wavelength[pick(n)];
      const all: readonly FeatureEdit[] = [
        { edit: 'add', at },
        { edit: 'split', at },
        { edit: 'delete', at },
        { edit: 'move', at, to: at + 2 * step },
        { edit: 'profile', at, as: 'voigt' },
        { edit: 'tie', at, to: wavelength[3], restAt: at, restTo: wavelength[3] },
      ];
      return all[pick(all.length)];
    });
    const pins =
      random.uniform() < 0.3 ? { continuum: { pins: [{ wavelength: wavelength[5], level: 2 }], exclude: [[1, 2] as const] } } : {};
    const spectrum = { name: `strange ${k}`, wavelength, flux, masked, medium: 'air' as const, fluxUnit: '' };
    const { features, model } = measurementOf(fitSpectrum(spectrum, { ...DEFAULT_MEASURE_SETTINGS, ...pins }), edits);
    for (const { centroid, flux: total } of features) expect(Number.isFinite(centroid) && Number.isFinite(total), spectrum.name).toBe(true);
    // without any noise there is nothing to weigh samples by, and no model
    if (k % SHAPES.length > 1) for (let i = 0; i < n; i++) if (!masked[i]) expect(Number.isFinite(model[i]), spectrum.name).toBe(true);
  }
});
