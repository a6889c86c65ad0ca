import { expect, it } from 'vitest';
import { linesBetween } from '../../src/atomic/index.ts';
import { bundled, lineAt, lineAtAir, strength } from './bundledData.ts';

const { lines } = bundled;
const every = Array.from({ length: lines.count }, (_, i) => i);
const ofObject = every.filter((i) => !['sky', 'telluric', 'interstellar'].includes(lines.nature(i)));
const named = (i: number): string => `${lines.ions[lines.ion[i]].name} ${lines.wavelengthVac[i].toFixed(3)}`;
/** Carriers whose level energies are not known here. */
const LABEL_ONLY = /^(H2|Kr|Xe|Se|Br|Rb) ?/;

it('covers 900 A to 30 um with more than 19000 lines in ascending order', () => {
  expect(lines.count).toBeGreaterThan(19_000);
  expect(lines.wavelengthVac[0]).toBeGreaterThan(900);
  expect(lines.wavelengthVac[lines.count - 1]).toBeLessThanOrEqual(300_000);
  expect(every.slice(1).filter((i) => !(lines.wavelengthVac[i] >= lines.wavelengthVac[i - 1]))).toEqual([]);
});

it('a wavelength is the Ritz value unless the list says otherwise', () => {
  const wrong = ofObject.filter(
    (i) =>
      bundled.wavelengthNote(i) === 'Ritz principle: 10^8 / (upper - lower level energy)' && bundled.ritzVac(i) !== lines.wavelengthVac[i],
  );
  expect(wrong.map(named)).toEqual([]);
  expect(ofObject.filter((i) => bundled.ritzVac(i) === lines.wavelengthVac[i]).length / ofObject.length).toBeGreaterThan(0.9);
});

it('a given wavelength stays near the Ritz value', () => {
  const far = ofObject.filter((i) => Math.abs(bundled.ritzVac(i) - lines.wavelengthVac[i]) > Math.max(0.7, 5 * lines.wavelengthErr[i]));
  expect(far.map(named)).toEqual([]);
});

it('no wavelength is free of error', () => {
  expect(every.filter((i) => !(lines.wavelengthErr[i] >= 0.000_99)).map(named)).toEqual([]);
});

it('no line of the object lacks a level', () => {
  expect(ofObject.filter((i) => bundled.lowerLabel(i) === '' || bundled.upperLabel(i) === '' || lines.upperId[i] === 0).map(named)).toEqual(
    [],
  );
  const noEnergy = ofObject.filter(
    (i) => Number.isNaN(bundled.upperEnergyCm1(i)) && lines.nature(i) !== 'raman' && !LABEL_ONLY.test(named(i)),
  );
  // the five high-l shells of C III, N IV, O IV and O V whose wavelength alone is known
  expect(noEnergy.length).toBeLessThanOrEqual(5);
});

it('no transition stands twice', () => {
  const seen = new Map<string, number>();
  const twice: string[] = [];
  for (const i of ofObject) {
    const key = `${lines.ion[i]} ${bundled.lowerLabel(i)} ${bundled.lowerEnergyCm1(i)} ${lines.upperId[i]}`;
    if (seen.has(key)) twice.push(named(i));
    seen.set(key, i);
  }
  expect(twice).toEqual([]);
});

it('an upper level has one number, one label and one place in the n-level atom', () => {
  const labels = new Map<number, string>();
  const mixed: string[] = [];
  for (const i of ofObject) {
    const label = `${lines.ion[i]} ${bundled.upperLabel(i)} ${lines.upperLevel[i]}`;
    const before = labels.get(lines.upperId[i]);
    if (before !== undefined && before !== label) mixed.push(named(i));
    labels.set(lines.upperId[i], label);
  }
  expect(mixed).toEqual([]);
});

it('levels of lines agree with the n-level atom they point into', () => {
  const off: string[] = [];
  for (const i of ofObject) {
    const model = bundled.levelModel(lines.ions[lines.ion[i]].name);
    for (const [level, energy] of [
      [lines.upperLevel[i], bundled.upperEnergyCm1(i)],
      [lines.lowerLevel[i], bundled.lowerEnergyCm1(i)],
    ]) {
      if (level < 0) continue;
      const held = model?.levels[level];
      if (held === undefined || Math.abs(held.energyCm1 - energy) > Math.max(3, 5e-5 * energy)) off.push(named(i));
    }
  }
  expect(off).toEqual([]);
});

it('lines of a multiplet share ion and terms', () => {
  const names = new Map<number, string>();
  const mixed: string[] = [];
  for (const i of ofObject) {
    if (lines.multiplet[i] === 0) continue;
    const name = `${lines.ion[i]} ${bundled.multipletName(i).replace(/ \(\d+\w*\)$/, '')}`;
    const before = names.get(lines.multiplet[i]);
    if (before !== undefined && before !== name) mixed.push(named(i));
    names.set(lines.multiplet[i], name);
  }
  expect(mixed).toEqual([]);
  expect(names.size).toBeGreaterThan(3000);
});

it('every line names its sources, every known strength how it was made', () => {
  expect(every.filter((i) => bundled.lineSources(i).length === 0 || bundled.lineSources(i).includes('')).map(named)).toEqual([]);
  expect(every.filter((i) => lines.logStrength[i] > Number.NEGATIVE_INFINITY && bundled.strengthBasis(i) === 'unknown').map(named)).toEqual(
    [],
  );
  expect(ofObject.filter((i) => bundled.strengthNote(i) === '').map(named)).toEqual([]);
});

it('H I and He II reach n = 40', () => {
  for (const ion of ['H I', 'He II']) {
    const uppers = ofObject.filter((i) => lines.ions[lines.ion[i]].name === ion).map((i) => bundled.upperLabel(i));
    expect(uppers).toContain('n=40');
  }
});

it('ratios from a common upper level are those of the literature', () => {
  const ratio = (ion: string, one: number, other: number): number => strength(lineAtAir(ion, one)) / strength(lineAtAir(ion, other));
  expect(ratio('O III', 5006.84, 4958.91)).toBeCloseTo(2.98, 1);
  // Storey & Zeippen 2000, relativistic
  expect(ratio('N II', 6583.45, 6548.05)).toBeCloseTo(3.05, 1);
  expect(lines.upperId[lineAtAir('O III', 5006.84)]).toBe(lines.upperId[lineAtAir('O III', 4958.91)]);
});

it('the strong lines of nebulae come out strong', () => {
  for (const [ion, air, least, most] of [
    ['O III', 5006.84, 300, 1500],
    ['N II', 6583.45, 50, 300],
    ['S II', 6716.44, 5, 50],
    ['Fe III', 4658.05, 0.2, 2],
    ['Fe VII', 6086.97, 0.05, 2],
    ['H I', 6562.8, 280, 290],
    ['He I', 5875.62, 8, 20],
  ] as const) {
    expect(strength(lineAtAir(ion, air))).toBeGreaterThan(least);
    expect(strength(lineAtAir(ion, air))).toBeLessThan(most);
  }
});

it('a window holds exactly the lines between its edges', () => {
  const [start, end] = linesBetween(lines, 5000, 5010);
  expect(lines.wavelengthVac[start - 1]).toBeLessThan(5000);
  expect(lines.wavelengthVac[start]).toBeGreaterThanOrEqual(5000);
  expect(lines.wavelengthVac[end - 1]).toBeLessThan(5010);
  expect(lines.wavelengthVac[end]).toBeGreaterThanOrEqual(5010);
  expect(linesBetween(lines, 10, 20)).toEqual([0, 0]);
  expect(linesBetween(lines, 5010, 5000)).toEqual([end, end]);
});

it('telluric bands have two edges', () => {
  expect(bundled.skyBands.length).toBeGreaterThan(40);
  expect(bundled.skyBands.filter((band) => !(band.highVac > band.lowVac))).toEqual([]);
  expect(bundled.skyBands.some((band) => band.species === 'O2' && band.lowVac < 7600 && band.highVac > 7650)).toBe(true);
});

it('resonance lines end on the ground term', () => {
  expect(bundled.isResonance(lineAtAir('Mg II', 2795.53))).toBe(true);
  expect(bundled.isResonance(lineAtAir('Ca II', 3933.66))).toBe(true);
  expect(bundled.isResonance(lineAtAir('Ca II', 8542.09))).toBe(false);
  expect(bundled.isResonance(lineAtAir('O III', 5006.84))).toBe(false);
});

it('H I goes on into the infrared', () => {
  const pfund = lineAt('H I', 74_598.5);
  expect(bundled.upperLabel(pfund)).toBe('n=6');
  expect(bundled.lowerLabel(pfund)).toBe('n=5');
});
