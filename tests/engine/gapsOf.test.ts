import { expect, test } from 'vitest';
import { gapsOf } from '../../src/engine/gapsOf.ts';

const spectrum = (wavelength: readonly number[], blind: readonly number[] = []) => ({
  name: 'holes',
  wavelength: Float64Array.from(wavelength),
  flux: new Float64Array(wavelength.length).fill(1),
  masked: Uint8Array.from(wavelength, (_, i) => (blind.includes(i) ? 1 : 0)),
  medium: 'vacuum' as const,
  fluxUnit: '',
});
const even = Array.from({ length: 20 }, (_, i) => 5000 + i);

test('stretches of masked samples and holes between detectors are gaps, single bad samples are not', () => {
  expect(gapsOf(spectrum(even))).toEqual([]);
  expect(gapsOf(spectrum(even, [4]))).toEqual([]);
  expect(gapsOf(spectrum(even, [4, 5, 6, 7]))).toEqual([[5003, 5008]]);
  expect(gapsOf(spectrum([...even, ...even.map((w) => w + 200)]))).toEqual([[5019, 5200]]);
});
