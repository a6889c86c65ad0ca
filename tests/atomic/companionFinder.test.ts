import { expect, it } from 'vitest';
import { type Companion, caseBIntensity, companionFinder, levelPopulations, lineRatio } from '../../src/atomic/index.ts';
import { bundled, lineAt, lineAtAir } from './bundledData.ts';

const companionsOf = companionFinder(bundled);
const TE = 10_000;
const NE = 1000;

/** What is said of one line as a companion of another. */
function between(line: number, other: number, te = TE, ne = NE): Companion {
  const found = companionsOf(line, te, ne).find((companion) => companion.line === other);
  if (found === undefined) throw new Error('not a companion');
  return found;
}

it('5007 and 4959 of O III come at 2.98, whatever the gas', () => {
  const [strong, weak] = [lineAtAir('O III', 5006.84), lineAtAir('O III', 4958.91)];
  for (const [te, ne] of [
    [6000, 10],
    [20_000, 1e6],
  ] as const) {
    const { relation, predicted } = between(weak, strong, te, ne);
    expect(relation).toBe('same-upper-level');
    expect(predicted?.basis).toBe('common-upper-level');
    expect(predicted?.ratio).toBeCloseTo(2.98, 2);
    expect(predicted?.errDex).toBeLessThan(0.02);
  }
});

it('a companion and its line see each other at inverse ratios', () => {
  for (const [one, other] of [
    [lineAtAir('S II', 6716.44), lineAtAir('S II', 6730.82)],
    [lineAtAir('N II', 6583.45), lineAtAir('N II', 5754.59)],
    [lineAtAir('O II', 4649.13), lineAtAir('O II', 4641.81)],
  ] as const) {
    const [there, back] = [between(one, other), between(other, one)];
    expect((there.predicted?.ratio ?? 0) * (back.predicted?.ratio ?? 0)).toBeCloseTo(1, 6);
    expect(there.predicted?.basis).toBe(back.predicted?.basis);
  }
});

it('lines of the n-level atom follow temperature and density', () => {
  const [blue, red] = [lineAtAir('S II', 6716.44), lineAtAir('S II', 6730.82)];
  const model = bundled.levelModel('S II')!;
  const at = (ne: number) => between(red, blue, TE, ne).predicted;
  const pair = (line: number) => [bundled.lines.upperLevel[line], bundled.lines.lowerLevel[line]] as const;
  for (const ne of [10, 1000, 1e5]) expect((at(ne)?.ratio ?? 0) / lineRatio(model, pair(blue), pair(red), TE, ne)).toBeCloseTo(1, 4);
  expect(at(10)?.basis).toBe('level-populations');
  expect(levelPopulations(model, TE, 10)[1]).toBeGreaterThan(0);
});

it('lines of hydrogen come at case B', () => {
  const [alpha, beta] = [bundled.hydrogenicLine('H I', 2, 3), bundled.hydrogenicLine('H I', 2, 4)];
  const { predicted } = between(beta, alpha, 12_000, 1e4);
  expect(predicted?.basis).toBe('case-b');
  expect(predicted?.ratio).toBeCloseTo(caseBIntensity(bundled.caseB, 'H I', 2, 3, 12_000, 1e4) / 100, 4);
});

it('a recombination line has its multiplet as companions, but no forbidden line of the same name', () => {
  const companions = companionsOf(lineAtAir('O II', 4649.13), TE, NE);
  expect(companions.filter(({ relation }) => relation === 'same-multiplet').length).toBeGreaterThanOrEqual(6);
  expect(companions.map(({ line }) => line)).toContain(lineAtAir('O II', 4676.23));
  expect(
    companions.filter(({ line }) => bundled.lines.mechanism(line) !== 'recombination' && bundled.lines.nature(line) === 'forbidden'),
  ).toEqual([]);
});

it('a trapped line is predicted with a wider error', () => {
  const [blue, red] = [lineAt('C IV', 1548.2), lineAt('C IV', 1550.77)];
  expect(between(blue, red).predicted?.errDex).toBeGreaterThan(0.3);
});

it('no line is its own companion or named twice, and closer relatives stand first', () => {
  const order = ['same-upper-level', 'same-multiplet', 'same-ion'];
  for (let line = 0; line < bundled.lines.count; line += 37) {
    const companions = companionsOf(line, TE, NE);
    const others = companions.map((companion) => companion.line);
    expect(others).not.toContain(line);
    expect(new Set(others).size).toBe(others.length);
    const ranks = companions.map(({ relation }) => order.indexOf(relation));
    expect(ranks).toEqual(ranks.toSorted((p, q) => p - q));
    for (const { predicted } of companions) if (predicted) expect(predicted.ratio > 0 && predicted.errDex > 0).toBe(true);
  }
});

it('a line of the sky has no companions', () => {
  const sky = Array.from({ length: bundled.lines.count }, (_, line) => line).find((line) => bundled.lines.nature(line) === 'sky');
  expect(companionsOf(sky ?? -1, TE, NE)).toEqual([]);
});

it('Kr IV without collision rates is told from the strengths of the list', () => {
  const { predicted } = between(lineAt('Kr IV', 5869.37), lineAt('Kr IV', 5347.51));
  expect(predicted?.basis).toBe('reference-strength');
});
